package takeoff

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
)

// Options say what is asked of a take-off.
type Options struct {
	Rates       design.Rates // cost per tonne and carbon per kg; without them there are none
	Connections float64      // allowance for plates, bolts and welds, as a part of the net mass
	Waste       float64      // allowance for cutting, as a part of the net mass
	Transport   float64      // longest piece that can be brought, mm; 0: not limited

	// Splices is the rule by which the stacks were sized: as scheduled, above
	// every n-th length (Every), or wherever the section changes.
	Splices building.Splices
	Every   int
}

// TakeOff is the steel of a schedule.
type TakeOff struct {
	Options

	Sections []SectionLine // by family, then as the catalogue orders them
	Levels   []LevelLine   // from the lowest
	Families []FamilyLine
	Cuts     []Cut // as Sections, and of one section the longest first
	Splices  []Splice

	Pieces  int64   // as delivered
	Net     Amounts // the sum over the members
	Longest *Piece
	TooLong []Piece // longer than can be brought, the longest first

	Unpriced, Unrated Amounts // of the net: steel without a cost rate, without a carbon factor
	LeftOut           []LeftOut
	Failing           []LeftOut // counted, and they fail
	Remarks           []LeftOut // counted, with something to say
}

// SectionLine is the steel of one section and grade.
type SectionLine struct {
	Section *catalogue.Section
	Grade   string
	Pieces  int64
	Amounts
}

// LevelLine is the steel between two levels.
type LevelLine struct {
	From, To string
	Amounts
}

// Name names the levels: "L1 to L2".
func (l *LevelLine) Name() string { return LevelName(l.From, l.To) }

// FamilyLine is the steel of one family.
type FamilyLine struct {
	Family string
	Pieces int64
	Amounts
}

// Cut is the pieces of one section, grade and length.
type Cut struct {
	Section *catalogue.Section
	Grade   string
	Length  int64 // micrometres
	Number  int64
	Amounts
	Marks []string // with their numbers: "C1", "C4 (3)"
}

// Of counts the items. Those that cannot be counted are left out with the
// reason, after those that the caller has left out.
func Of(items []Item, leftOut []LeftOut, o Options) *TakeOff {
	t := &TakeOff{Options: o, LeftOut: slices.Clone(leftOut)}
	items = t.countable(items)
	one := make([]Amounts, len(items))
	for i := range items {
		one[i] = t.weigh(&items[i])
	}
	pieces, splices := assemble(items, one, &o)
	t.Splices = splices
	t.bySection(pieces)
	t.byLevel(items, one)
	t.byFamily()
	t.Cuts = cuts(pieces)
	t.transport(pieces)
	return t
}

// countable takes out what cannot be counted, and gathers what there is to say.
func (t *TakeOff) countable(items []Item) []Item {
	var kept []Item
	for i := range items {
		it := &items[i]
		if err := it.check(); err != nil {
			t.LeftOut = append(t.LeftOut, LeftOut{it.Name(), it.Cell, err.Error()})
			continue
		}
		if it.Failing {
			t.Failing = append(t.Failing, LeftOut{it.Name(), it.Cell, it.Section.Name() + " " + it.Grade + " fails"})
		}
		if it.Remark != "" {
			t.Remarks = append(t.Remarks, LeftOut{it.Name(), it.Cell, it.Remark})
		}
		kept = append(kept, *it)
	}
	return kept
}

// weigh adds an item to the net and returns the amounts of one piece of it.
func (t *TakeOff) weigh(it *Item) Amounts {
	one, priced, rated := it.one(&t.Rates)
	all := one.times(int64(it.Quantity))
	t.Net.Add(all)
	if !priced {
		t.Unpriced.Add(all)
	}
	if !rated {
		t.Unrated.Add(all)
	}
	return one
}

func (t *TakeOff) bySection(pieces []Piece) {
	type key struct {
		section *catalogue.Section
		grade   string
	}
	place := map[key]int{}
	for i := range pieces {
		p := &pieces[i]
		k := key{p.Section, p.Grade}
		n, ok := place[k]
		if !ok {
			n = len(t.Sections)
			place[k] = n
			t.Sections = append(t.Sections, SectionLine{Section: p.Section, Grade: p.Grade})
		}
		l := &t.Sections[n]
		l.Pieces += p.Number
		l.Add(p.Amounts)
		t.Pieces += p.Number
	}
	slices.SortFunc(t.Sections, func(a, b SectionLine) int {
		return cmp.Or(compareSections(a.Section, b.Section), strings.Compare(a.Grade, b.Grade))
	})
}

func (t *TakeOff) byLevel(items []Item, one []Amounts) {
	type key struct{ from, to string }
	place := map[key]int{}
	for i := range items {
		it := &items[i]
		k := key{design.FoldLevel(it.From), design.FoldLevel(it.To)}
		n, ok := place[k]
		if !ok {
			n = len(t.Levels)
			place[k] = n
			t.Levels = append(t.Levels, LevelLine{From: it.From, To: it.To})
		}
		t.Levels[n].Add(one[i].times(int64(it.Quantity)))
	}
	newLevelOrder(items).sortLevels(t.Levels)
}

// byFamily adds up the lines by section, which stand in the order of families.
func (t *TakeOff) byFamily() {
	for i := range t.Sections {
		s := &t.Sections[i]
		name := FamilyName(s.Section)
		if n := len(t.Families); n == 0 || t.Families[n-1].Family != name {
			t.Families = append(t.Families, FamilyLine{Family: name})
		}
		f := &t.Families[len(t.Families)-1]
		f.Pieces += s.Pieces
		f.Add(s.Amounts)
	}
}

// transport finds the longest piece, and those that are too long to be brought.
func (t *TakeOff) transport(pieces []Piece) {
	limit := whole(t.Transport * 1e3)
	for i := range pieces {
		p := &pieces[i]
		if t.Longest == nil || p.Length > t.Longest.Length {
			t.Longest = p
		}
		if limit > 0 && p.Length > limit {
			t.TooLong = append(t.TooLong, *p)
		}
	}
	slices.SortStableFunc(t.TooLong, func(a, b Piece) int { return cmp.Compare(b.Length, a.Length) })
}

// Allowance returns what the allowances add: connections and waste, each a
// part of the net.
func (t *TakeOff) Allowance() (connections, waste Amounts) {
	return t.Net.share(t.Connections), t.Net.share(t.Waste)
}

// Gross returns the net with the allowances.
func (t *TakeOff) Gross() Amounts {
	all := t.Net
	connections, waste := t.Allowance()
	all.Add(connections)
	all.Add(waste)
	return all
}

// HasCost and HasCarbon report whether there is a rate for any of the steel.
func (t *TakeOff) HasCost() bool {
	return len(t.Rates.CostPerTonne) > 0 && t.Unpriced.Mass < t.Net.Mass
}

// HasCarbon reports whether there is a carbon factor for any of the steel.
func (t *TakeOff) HasCarbon() bool {
	return len(t.Rates.CarbonPerKg) > 0 && t.Unrated.Mass < t.Net.Mass
}

// SpliceCount returns the number of splices.
func (t *TakeOff) SpliceCount() int64 {
	var n int64
	for i := range t.Splices {
		n += t.Splices[i].Number
	}
	return n
}

// markOf returns the piece's marks with their number.
func (p *Piece) markOf() string {
	if p.Number == 1 {
		return p.Name()
	}
	return fmt.Sprintf("%s (%d)", p.Name(), p.Number)
}
