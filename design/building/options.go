package building

import (
	"fmt"
	"time"

	"stanchion/design"
	"stanchion/design/project"
)

// Splices says where the section of a stack may change.
type Splices uint8

// The rules for splices.
const (
	AsScheduled Splices = iota // above the lengths that the schedule marks; stacks without such a column are not joined
	EveryNth                   // above every n-th length, counted from the bottom of each stack
	WhereItPays                // above any length, at a cost
)

// Options are the decisions that concern many columns at once.
type Options struct {
	Splices    Splices
	Every      int     // lengths from splice to splice, for EveryNth
	SpliceCost float64 // of one splice, in what the objective counts (kg, cost or carbon), for WhereItPays

	MostSizes int           // at most so many different sections; 0: any number
	TimeLimit time.Duration // for few sizes, after which the best so far stands with its gap; 0: none
}

// Validate reports what cannot be meant.
func (o *Options) Validate() error {
	switch {
	case o.Splices == EveryNth && o.Every < 1:
		return fmt.Errorf("a splice above every %d-th length: give a number of at least 1", o.Every)
	case !(o.SpliceCost >= 0):
		return fmt.Errorf("the cost of a splice is %g: give 0 or more", o.SpliceCost)
	case o.MostSizes < 0:
		return fmt.Errorf("at most %d sizes: give a number of at least 1, or 0 for any number", o.MostSizes)
	}
	return nil
}

// Through reports whether the rule lets a piece run through above a length, if
// the section above is the same: said and splice are what the schedule says of
// the length, storey counts it from the bottom of its stack, from 0.
func (o *Options) Through(said, splice bool, storey int) bool {
	switch o.Splices {
	case EveryNth:
		return o.Every > 0 && (storey+1)%o.Every != 0
	case WhereItPays:
		return true
	}
	return said && !splice
}

// Decision is the sections of all columns and what they come to.
type Decision struct {
	Results []design.Result // by column

	// Curve is the trade-off where the number of sizes is limited: the least
	// total for 1, 2, 3 ... sizes, up to the limit or to where more help no
	// further. Its totals are of the columns that have a section that passes.
	Curve []Trade

	// Any is what the same columns come to with any number of sizes, and the
	// sections that they have then: what fewer sizes are measured against. Nil
	// where the number is not limited.
	Any *Trade
}

// Trade is the least total that a number of sizes allows.
type Trade struct {
	Sizes  []string // sections in use, lightest first; nil where so few cannot serve every column
	Most   int      // sizes allowed
	Total  float64  // kg, cost or carbon, of all pieces
	Bound  float64  // no choice of so few comes to less
	Proven bool     // Total is the least, or it is proven that so few cannot serve
}

// Gap returns what Total may lie above the least, as a part of it.
func (t *Trade) Gap() float64 {
	s := project.Solution{Cost: t.Total, Bound: t.Bound, Proven: t.Proven}
	return s.Gap()
}

// TooFewSizesError says that so few sizes cannot serve every column.
type TooFewSizesError struct{ Most int }

// Error says what to do about it.
func (e *TooFewSizesError) Error() string {
	return fmt.Sprintf("at most %s cannot serve every column: allow more, or give the columns more families in common", different(e.Most))
}

// different counts sections.
func different(n int) string {
	if n == 1 {
		return "1 different section"
	}
	return fmt.Sprintf("%d different sections", n)
}
