package takeoff

import (
	"errors"
	"fmt"
	"math"
	"strings"
	"unicode"
	"unicode/utf8"

	"stanchion/catalogue"
	"stanchion/design"
)

// Item is one member of the schedule with the section that it has.
type Item struct {
	Mark, Stack, From, To string
	Quantity              int
	Length                float64 // mm
	Section               *catalogue.Section
	Grade                 string
	Cell                  string // where it stands

	// SpliceSaid: the schedule tells where the splices are, and Splice that
	// there is one above this length. Otherwise every length is a piece, unless
	// Options.Splices says another rule.
	SpliceSaid, Splice bool

	Failing bool   // it is counted, and does not pass its checks
	Remark  string // what a person should know of how it was counted
}

// LeftOut is a member that a person should look at: in most lists one that is
// not counted, and why.
type LeftOut struct{ Name, Cell, Why string }

// String returns "C4 L1 to L2 (Columns!A9): it has no section".
func (l *LeftOut) String() string {
	if l.Cell == "" || l.Cell == l.Name {
		return l.Name + ": " + l.Why
	}
	return l.Name + " (" + l.Cell + "): " + l.Why
}

// ItemOf returns a column with a section as the take-off counts it.
func ItemOf(col *design.Column, s *catalogue.Section, grade string) Item {
	return Item{
		Mark: col.Mark, Stack: col.Stack, From: col.From, To: col.To, Quantity: col.Quantity, Length: col.Length,
		Section: s, Grade: grade, Cell: col.Cell, SpliceSaid: col.SpliceSaid, Splice: col.Splice,
	}
}

// Name names the item for people: mark, stack and levels.
func (it *Item) Name() string { return memberName(it.Mark, it.Stack, it.From, it.To) }

// MemberName names a column for people: mark, stack and levels.
func MemberName(col *design.Column) string {
	return memberName(col.Mark, col.Stack, col.From, col.To)
}

func memberName(mark, stack, from, to string) string {
	return strings.TrimSpace(MarkName(mark, stack) + " " + LevelName(from, to))
}

// MarkName returns the mark with the grid reference behind it, unless the mark
// opens with that: "C1 A/3", but "A3-01".
func MarkName(mark, stack string) string {
	rest, ok := strings.CutPrefix(mark, stack)
	if ok && (rest == "" || !unicode.IsLetter(firstRune(rest)) && !unicode.IsDigit(firstRune(rest))) {
		return mark
	}
	return strings.TrimSpace(mark + " " + stack)
}

func firstRune(s string) rune {
	r, _ := utf8.DecodeRuneInString(s)
	return r
}

// LevelName returns "L1 to L2", or what there is of it.
func LevelName(from, to string) string {
	if from == "" || to == "" {
		return from + to
	}
	return from + " to " + to
}

// FamilyName returns the family of a section, with the finish of a cold-formed
// hollow one: "SHS CF".
func FamilyName(s *catalogue.Section) string {
	if s.Finish == catalogue.ColdFormed {
		return s.Family + " CF"
	}
	return s.Family
}

// one returns the amounts of one piece of the item, each rounded once, and
// whether there are rates for it.
func (it *Item) one(r *design.Rates) (a Amounts, priced, rated bool) {
	s := it.Section
	a = Amounts{
		Lengths: 1,
		Length:  whole(it.Length * 1e3),
		Mass:    whole(s.Mass * it.Length), // kg/m times mm is g
		Area:    whole(s.Perimeter * it.Length),
	}
	rate, priced := r.Cost(s.Family, it.Grade)
	a.Cost = whole(rate * float64(a.Mass)) // per t times g is millionths
	factor, rated := r.Carbon(s.Family, it.Grade)
	a.Carbon = whole(factor * 1e3 * float64(a.Mass)) // kg/kg is 1e3 mg/g
	return a, priced, rated
}

func whole(x float64) int64 { return int64(math.Round(x)) }

// The bounds of what can be counted without overflow, wider than any column.
const (
	maxQuantity = 1e6
	maxLength   = 1e6 // mm
)

// check says why an item cannot be counted.
func (it *Item) check() error {
	switch {
	case it.Section == nil:
		return errors.New("it has no section")
	case !(it.Length > 0 && it.Length <= maxLength):
		return errors.New("it has no length")
	case it.Quantity < 1 || it.Quantity > maxQuantity:
		return fmt.Errorf("its quantity is %d", it.Quantity)
	}
	return nil
}
