// Package summary adds up what a run found over a whole schedule, and lays it
// out as the project's own sheets of an annotated workbook.
package summary

import (
	"cmp"
	"slices"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
)

// Tally adds up the results of a run. It holds little, however many members
// there are.
type Tally struct {
	Count [4]int // of members, by design.Status

	// Worst are members that fail or have no section, the greatest utilisation
	// first, and NotRead the reasons why others could not be read, in the order
	// of the schedule: as many of each as were asked for. Unlisted counts the
	// reasons beyond those.
	Worst    []Line
	NotRead  []Reason
	Unlisted int
	Resized  bool // a member that could not be read has a section of an earlier run

	keep     int
	familyOf func(section string) string
	steel    map[string]*Steel // by family
}

// Reason is why members could not be read.
type Reason struct {
	Cell  string // the first
	Text  string
	Count int // of cells
}

// Line is one member with its result.
type Line struct {
	Member  *schedule.Member
	Result  design.Result
	Working string // place of its working in the workbook; empty: there is none
}

// Steel is the steel of one family that the members need.
type Steel struct {
	Family  string
	Lengths int
	Length  float64 // m
	Mass    float64 // kg
}

// NewTally starts a tally that keeps so many members of each kind that a
// person must look at. familyOf names the family of a section.
func NewTally(keep int, familyOf func(section string) string) *Tally {
	return &Tally{keep: keep, familyOf: familyOf, steel: map[string]*Steel{}}
}

// Add adds one member. The steel of members without a section that passes, or
// that is given, does not count.
func (t *Tally) Add(m *schedule.Member, r *design.Result) {
	t.Count[r.Status]++
	switch r.Status {
	case design.Passes:
		t.addSteel(m, r)
	case design.Fails:
		t.addSteel(m, r)
		t.addWorst(m, r)
	case design.NoSection:
		t.addWorst(m, r)
	case design.NotRead:
		t.addNotRead(m, r)
	}
}

func (t *Tally) addNotRead(m *schedule.Member, r *design.Result) {
	t.Resized = t.Resized || m.Earlier.Section != ""
	for _, p := range m.Problems {
		t.addReason(p.Cell, p.Message())
	}
	if len(m.Problems) == 0 {
		t.addReason(m.Column.Cell, strings.Join(r.Notes, "; "))
	}
}

func (t *Tally) addReason(cell, text string) {
	for i := range t.NotRead {
		if t.NotRead[i].Text == text {
			t.NotRead[i].Count++
			return
		}
	}
	if len(t.NotRead) == t.keep {
		t.Unlisted++
		return
	}
	t.NotRead = append(t.NotRead, Reason{cell, text, 1})
}

func (t *Tally) addSteel(m *schedule.Member, r *design.Result) {
	family := t.familyOf(r.Section)
	s := t.steel[family]
	if s == nil {
		s = &Steel{Family: family}
		t.steel[family] = s
	}
	n := float64(m.Column.Quantity)
	s.Lengths += m.Column.Quantity
	s.Length += n * m.Column.Length / 1000
	s.Mass += n * r.Mass
}

// addWorst keeps the members with the greatest utilisations; the earlier of
// two equal ones goes before.
func (t *Tally) addWorst(m *schedule.Member, r *design.Result) {
	at, _ := slices.BinarySearchFunc(t.Worst, r.Utilisation, func(l Line, u float64) int {
		if l.Result.Utilisation >= u {
			return -1
		}
		return 1
	})
	if at >= t.keep {
		return
	}
	t.Worst = slices.Insert(t.Worst, at, Line{Member: m, Result: *r})
	t.Worst = t.Worst[:min(len(t.Worst), t.keep)]
}

// Members returns the number of members.
func (t *Tally) Members() int { return t.Count[0] + t.Count[1] + t.Count[2] + t.Count[3] }

// Steel returns the steel by family, in alphabetical order.
func (t *Tally) Steel() []Steel {
	var list []Steel
	for _, s := range t.steel {
		list = append(list, *s)
	}
	slices.SortFunc(list, func(a, b Steel) int { return cmp.Compare(a.Family, b.Family) })
	return list
}

// Total returns the steel of all families.
func Total(list []Steel) Steel {
	all := Steel{Family: "all"}
	for _, s := range list {
		all.Lengths += s.Lengths
		all.Length += s.Length
		all.Mass += s.Mass
	}
	return all
}

// Level names the levels between which a member stands: "L1-L2".
func Level(c *design.Column) string {
	if c.From == "" || c.To == "" {
		return c.From + c.To
	}
	return c.From + "-" + c.To
}
