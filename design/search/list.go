package search

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
)

// List is the candidates of one choice in their order, with the flat tables
// that the search runs over. It is shared by every column with that choice and
// does not change.
type List struct {
	Candidates []*ec3.Candidate
	Refused    []Refused // what the rules do not cover, in the same order

	rows   []axialRow
	skip   skipTable
	before []int    // how many were refused before each candidate
	over   []string // what passedOver says of each candidate
	ratio  float64  // gM0/gM1
	by     design.Objective
}

// Refused is a candidate that the rules do not cover, and why.
type Refused struct {
	Section *catalogue.Section
	Grade   string
	Refusal *ec3.Refusal
}

// List returns the candidates that a choice allows in the given grades (none:
// the settings' own). An unknown family, grade or exclusion, or a section
// without a rate where the objective needs one, is an error.
func (e *Engine) List(ch *design.Choice, grades []string) (*List, error) {
	return e.listed(listKey(ch, grades), func() (*List, error) { return e.newList(ch, grades) })
}

// listed returns the list of a key, made once. An error is kept too: a name
// that is not known stands in many rows, and looking for the nearest is slow.
func (e *Engine) listed(key string, make func() (*List, error)) (*List, error) {
	e.mu.Lock()
	defer e.mu.Unlock()
	if l, ok := e.lists[key]; ok {
		return l.list, l.err
	}
	l, err := make()
	e.lists[key] = listOrError{l, err}
	return l, err
}

type listOrError struct {
	list *List
	err  error
}

// listKey spells out a choice; the limit of utilisation is not part of it.
func listKey(ch *design.Choice, grades []string) string {
	return fmt.Sprintf("%q %q %v %v %v %v %v %v", ch.Families, grades,
		ch.MinDepth, ch.MaxDepth, ch.MinWidth, ch.MaxWidth, ch.MinThickness, ch.MaxThickness)
}

func (e *Engine) newList(ch *design.Choice, names []string) (*List, error) {
	grades, err := e.gradesOf(names)
	if err != nil {
		return nil, err
	}
	sections, err := e.catalogue.Filter(catalogue.Filter{
		Families: or(ch.Families, e.settings.Families), ColdFormed: e.settings.ColdFormed,
		MinDepth: ch.MinDepth, MaxDepth: ch.MaxDepth,
		MinWidth: ch.MinWidth, MaxWidth: ch.MaxWidth,
		MinThickness: ch.MinThickness, MaxThickness: ch.MaxThickness,
		Exclude: e.settings.Exclude,
	})
	if err != nil {
		return nil, err
	}
	entries, err := e.entries(sections, grades)
	if err != nil {
		return nil, err
	}
	slices.SortFunc(entries, compareEntries)
	l := &List{}
	for _, en := range entries {
		l.add(en.section, en.grade.Name, en.outcome)
	}
	l.tabulate(&e.settings)
	return l, nil
}

// add puts a candidate or a refusal at the end of the list.
func (l *List) add(s *catalogue.Section, grade string, o outcome) {
	if o.refusal != nil {
		l.Refused = append(l.Refused, Refused{s, grade, o.refusal})
		return
	}
	l.addCandidate(o.candidate)
}

func (l *List) addCandidate(c *ec3.Candidate) {
	l.Candidates = append(l.Candidates, c)
	l.before = append(l.before, len(l.Refused))
}

// gradesOf reads a column's grades; without any they are the settings' own.
func (e *Engine) gradesOf(names []string) ([]material.Grade, error) {
	if len(names) == 0 {
		return e.grades, nil
	}
	return parseGrades(names)
}

// entry is a section in a grade with its place in the order.
type entry struct {
	outcome
	section   *catalogue.Section
	grade     material.Grade
	objective float64 // what the choice makes least, per metre
}

func (e *Engine) entries(sections []*catalogue.Section, grades []material.Grade) ([]entry, error) {
	entries := make([]entry, 0, len(sections)*len(grades))
	for _, s := range sections {
		for _, g := range grades {
			objective, ok := e.objective(s, g)
			if !ok {
				return nil, fmt.Errorf("no rate for %s in %s: give one, or one for all others, or choose by mass", s.Family, g.Name)
			}
			entries = append(entries, entry{e.candidate(s, g), s, g, objective})
		}
	}
	return entries, nil
}

// objective returns what the choice makes least, per metre, and whether there
// is a rate for it.
func (e *Engine) objective(s *catalogue.Section, g material.Grade) (float64, bool) {
	rate, ok := e.settings.Rates.Rate(s.Family, g.Name)
	return rate * s.Mass, ok
}

// Objective returns what the choice of a section makes least, per metre of a
// candidate: kg, cost or carbon. Without a rate (a given section need not have
// one) it is 0.
func (e *Engine) Objective(c *ec3.Candidate) float64 {
	v, _ := e.objective(c.Section, c.Grade)
	return v
}

// Compare is the total order of candidates: the objective, then mass, depth,
// width and designation, and of one section the weaker grade first.
func (e *Engine) Compare(a, b *ec3.Candidate) int {
	return compareEntries(
		entry{section: a.Section, grade: a.Grade, objective: e.Objective(a)},
		entry{section: b.Section, grade: b.Grade, objective: e.Objective(b)})
}

func compareEntries(a, b entry) int {
	return cmp.Or(
		cmp.Compare(a.objective, b.objective),
		catalogue.Compare(a.section, b.section),
		compareGrades(a.grade, b.grade),
	)
}

// compareGrades puts the weaker grade first, which is also the cheaper.
func compareGrades(a, b material.Grade) int {
	return cmp.Or(cmp.Compare(a.Nominal, b.Nominal), strings.Compare(a.Name, b.Name))
}

// tabulate fills the flat tables from the candidates.
func (l *List) tabulate(set *design.Settings) {
	l.by = set.Rates.Objective
	l.ratio = set.National.GammaM0 / set.National.GammaM1
	l.rows = make([]axialRow, len(l.Candidates))
	l.over = make([]string, len(l.Candidates))
	for i, c := range l.Candidates {
		l.rows[i] = newAxialRow(c)
		l.over[i] = l.passedOver(i)
	}
	l.skip = newSkipTable(l.rows, l.ratio)
}

// newAxialRow takes the values of a candidate into a row. A section that
// buckles about other axes than y-y and z-z, or whose torsion is coupled with
// flexure, gets a row that can only refuse.
func newAxialRow(c *ec3.Candidate) axialRow {
	r := axialRow{c: c.GammaM1 / c.NRk, tA: math.Inf(1)}
	if c.Section.Shape == catalogue.ShapeAngle {
		return r // lambdaBar 0: the cross-section alone
	}
	r.ky, r.alphaY = math.Sqrt(c.NRk/c.EulerY), c.AlphaY
	r.kz, r.alphaZ = math.Sqrt(c.NRk/c.EulerZ), c.AlphaZ
	switch c.Torsion {
	case ec3.TorsionNone:
		r.known = true
	case ec3.TorsionDoublySymmetric:
		// 1/lambdaBar_T^2 = N_cr,T/N_Rk, N_cr,T = (G It + pi^2 E Iw/L_T^2)/i0^2.
		r.tA, r.tB = c.GIt/(c.I0Sq*c.NRk), c.EulerW/(c.I0Sq*c.NRk)
		r.known = true
	}
	return r
}
