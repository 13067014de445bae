package main

import (
	"errors"
	"fmt"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/schedule"
)

// national resolves the name of a national set, or of the user's own.
func (r *run) national(name string) (design.National, error) { return nationalSet(name, r.input) }

// familyNames parts the families of one cell, each with the finish that it
// states.
func familyNames(text string) ([]string, error) {
	specs, err := catalogue.ParseFamilies(text)
	if err != nil {
		return nil, err
	}
	var names []string
	for _, s := range specs {
		names = append(names, s.Family+finishMark(s.Finish))
	}
	return names, nil
}

func finishMark(f catalogue.Finish) string {
	switch f {
	case catalogue.ColdFormed:
		return " CF"
	case catalogue.HotFinished:
		return " HF"
	}
	return ""
}

// names holds what is needed to say at its cell that a section is not known.
type names struct {
	cat     *catalogue.Catalogue
	source  schedule.Source
	plan    *schedule.Plan
	section int // column; -1: none
	seen    map[string]string
}

func newNames(cat *catalogue.Catalogue, source schedule.Source, plan *schedule.Plan) *names {
	n := &names{cat: cat, source: source, plan: plan, section: -1, seen: map[string]string{}}
	for i := range plan.Header.Columns {
		if b := &plan.Header.Columns[i]; b.Field == "Section" {
			n.section = b.Col
		}
	}
	return n
}

// resolve brings a member's given section to its full name, or adds to the
// member's problems why there is none.
func (n *names) resolve(m *schedule.Member) {
	col := &m.Column
	if col.Given == "" || n.section < 0 {
		return
	}
	set := &n.plan.Settings.Design
	o := catalogue.FindOptions{ColdFormed: set.ColdFormed, Families: col.Choice.Families}
	if len(o.Families) == 0 {
		o.Families = set.Families
	}
	key := col.Given + "\x1f" + strings.Join(o.Families, "\x1f")
	name, ok := n.seen[key]
	if !ok {
		s, err := n.find(col.Given, o)
		if err != nil {
			m.Problems = append(m.Problems, n.problem(m, err))
			return
		}
		name = s.Name()
		n.seen[key] = name
	}
	col.Given = name
}

// find returns the section of a name. One that is given need not be in stock.
func (n *names) find(name string, o catalogue.FindOptions) (*catalogue.Section, error) {
	s, err := n.cat.Find(name, o)
	var unknown *catalogue.UnknownSectionError
	if errors.As(err, &unknown) && n.cat != catalogue.Default() {
		if s, err := catalogue.Default().Find(name, o); err == nil {
			return s, nil
		}
	}
	return s, err
}

func (n *names) problem(m *schedule.Member, err error) *schedule.Problem {
	row := m.Rows[0]
	return &schedule.Problem{
		File: n.plan.File, Cell: n.source.Where(n.plan.Sheet, row, n.section), Row: row, Col: n.section,
		Heading: "Section", Value: m.Column.Given,
		What: fmt.Sprintf("Section is %q", m.Column.Given), Do: err.Error(),
	}
}
