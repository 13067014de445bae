// Package tradeoff lays out what it costs to use few different sizes: the least
// steel for 1, 2, 3 ... sizes, as a table, a sheet with a chart and a picture,
// so that a person can see from where on more sizes help little.
package tradeoff

import (
	"fmt"
	"math"
	"slices"

	"stanchion/design"
	"stanchion/design/building"
)

// Table is the trade-off for people. Amounts are in t, in t of CO2e or in the
// currency of the rates.
type Table struct {
	File  string // the schedule, for titles
	Lines []Line // by rising number of sizes
	Any   Line   // with any number of sizes

	NewOnly bool // steel at hand is not in the amounts
	Splices bool // what splices cost is in the amounts

	objective design.Objective
}

// Line is the least that a number of sizes comes to.
type Line struct {
	Most     int
	Served   bool     // so many sizes can serve every column
	Amount   float64  // where Served
	Above    float64  // Amount above that of any number of sizes, as a part of the latter
	Saves    float64  // against the line before; 0: the first that serves
	Proven   bool     // no choice of so many sizes comes to less, or none serves
	Gap      float64  // what Amount may be above the least, as a part of it
	Sections []string // in use, lightest first
}

// Of makes a table of what a decision says of its sizes.
func Of(file string, curve []building.Trade, anyNumber *building.Trade, objective design.Objective) *Table {
	t := &Table{File: file, objective: objective}
	least := math.Inf(1)
	if anyNumber != nil {
		least = anyNumber.Total
		t.Any = t.line(anyNumber, least)
	}
	for i := range curve {
		l := t.line(&curve[i], least)
		if i > 0 && t.Lines[i-1].Served {
			l.Saves = t.Lines[i-1].Amount - l.Amount
		}
		t.Lines = append(t.Lines, l)
	}
	return t
}

func (t *Table) line(tr *building.Trade, least float64) Line {
	l := Line{Most: tr.Most, Served: tr.Sizes != nil, Proven: tr.Proven, Sections: tr.Sizes}
	if !l.Served {
		return l
	}
	l.Amount, l.Gap = tr.Total*t.scale(), tr.Gap()
	if least > 0 && !math.IsInf(least, 1) {
		l.Above = max(0, tr.Total/least-1)
	}
	return l
}

// scale turns what the objective counts into what people read.
func (t *Table) scale() float64 {
	if t.objective == design.ByCost {
		return 1
	}
	return 1e-3
}

// Quantity names what is counted, with its unit.
func (t *Table) Quantity() string {
	name := [...]string{design.ByMass: "steel", design.ByCost: "cost", design.ByCarbon: "CO2e"}[t.objective]
	switch {
	case t.NewOnly && t.objective == design.ByMass:
		name = "new steel"
	case t.NewOnly:
		name += " of new steel"
	}
	if t.Splices {
		name += " and splices"
	}
	if t.objective == design.ByCost {
		return name
	}
	return name + ", t"
}

// Decimals are those that amounts are shown with.
func (t *Table) Decimals() int {
	return [...]int{design.ByMass: 3, design.ByCost: 0, design.ByCarbon: 3}[t.objective]
}

// Served are the lines with so many sizes that they can serve every column.
func (t *Table) Served() []Line {
	i := slices.IndexFunc(t.Lines, func(l Line) bool { return l.Served })
	if i < 0 {
		return nil
	}
	return t.Lines[i:]
}

// little is the part of an amount below which a saving is called small.
const little = 0.01

// Remarks say in words what the table shows.
func (t *Table) Remarks() []string {
	var list []string
	list = append(list, t.tooFew()...)
	for i := range t.Lines {
		if k := t.Lines[i].Most; t.flatFrom(i) && i+1 < len(t.Lines) {
			list = append(list, fmt.Sprintf("From %d sizes on, one more saves less than 1 %%.", k))
			break
		}
	}
	if n := len(t.Lines); n > 0 && t.Lines[n-1].Served && t.Lines[n-1].Most >= t.Any.Most {
		list = append(list, "More sizes save nothing.")
	} else if t.Any.Most > 0 {
		list = append(list, fmt.Sprintf("With any number of sizes %d are used.", t.Any.Most))
	}
	if slices.ContainsFunc(t.Lines, func(l Line) bool { return l.Served && !l.Proven }) {
		list = append(list, "Where a gap stands, the search was given up before the least was proven: it lies no further below than the gap.")
	}
	return list
}

// tooFew says which numbers of sizes cannot serve, and for which that is not
// certain.
func (t *Table) tooFew() (list []string) {
	most, doubtful := 0, 0
	for i := range t.Lines {
		l := &t.Lines[i]
		switch {
		case l.Served:
		case l.Proven:
			most = l.Most
		default:
			doubtful = l.Most
		}
	}
	if most > 0 {
		list = append(list, fmt.Sprintf("%s cannot serve every column.", sizes(most)))
	}
	if doubtful > 0 {
		list = append(list, fmt.Sprintf("No choice of up to %d that serves every column was found before the search was given up.", doubtful))
	}
	return list
}

func sizes(n int) string {
	if n == 1 {
		return "1 size"
	}
	return fmt.Sprintf("%d sizes or fewer", n)
}

// flatFrom reports whether every size after line i saves little.
func (t *Table) flatFrom(i int) bool {
	if !t.Lines[i].Served {
		return false
	}
	for j := i + 1; j < len(t.Lines); j++ {
		if t.Lines[j].Saves >= little*t.Lines[j].Amount {
			return false
		}
	}
	return true
}

// Proof says of a line whether it is proven: "proven", or the gap that is left.
func (l *Line) Proof() string {
	switch {
	case l.Proven:
		return "proven"
	case !l.Served:
		return "none found"
	}
	return fmt.Sprintf("gap %.2g %%", 100*l.Gap)
}
