package search

import (
	"fmt"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// team is the columns of a set at work: their section is being chosen.
type team struct {
	*worker
	name  string
	mates []*mate
	left  []string // where the columns stand that cannot be designed
}

// mate is a column of a set that can be designed.
type mate struct {
	col    *design.Column
	res    *design.Result
	member ec3.Member
	demand demand
	limit  float64
}

// together calls do with the team of a set. Columns that cannot be designed
// have their result already, and there is no call where none can.
func (w *worker) together(set *Set, cols []design.Column, results []design.Result, do func(*team)) {
	defer w.bugs.catchAll(set.Columns, cols, results)
	t := &team{worker: w, name: set.Name, mates: make([]*mate, 0, len(set.Columns))}
	for _, i := range set.Columns {
		t.join(&cols[i], &results[i])
	}
	if len(t.mates) > 0 {
		do(t)
	}
}

// size chooses the section of a set: the first candidate that passes for every
// column. Where one has a given section, the set has it.
func (t *team) size() {
	l, given, err := t.candidates()
	switch {
	case err != nil:
		for _, m := range t.mates {
			notRead(m.res, err)
		}
	case given != nil:
		t.keep(l, given)
	default:
		t.choose(l)
	}
}

// join adds a column to the team.
func (t *team) join(col *design.Column, res *design.Result) {
	*res = design.Result{}
	m := &mate{col: col, res: res, limit: ec3.Limit(col, &t.engine.settings)}
	if err := m.member.Reset(col, &t.engine.settings); err != nil {
		notRead(res, err)
		t.left = append(t.left, col.Cell)
		return
	}
	m.demand.of(&m.member, m.limit)
	t.mates = append(t.mates, m)
}

// candidates returns what the set may have: the candidates that every column
// allows, or the section that one gives, and that column.
func (t *team) candidates() (l *List, given *mate, err error) {
	set := &t.engine.settings
	if err := t.agree("grades", func(m *mate) []string { return or(m.col.Grades, set.Grades) }); err != nil {
		return nil, nil, err
	}
	for _, m := range t.mates {
		if m.col.Given == "" {
			continue
		}
		own, err := t.allowed(m.col)
		if err != nil {
			return nil, nil, err
		}
		if given != nil && own.section() != l.section() {
			return nil, nil, fmt.Errorf("%s is given two sections, %s at %s and %s at %s: give it one",
				t.name, given.col.Given, given.col.Cell, m.col.Given, m.col.Cell)
		}
		l, given = own, m
	}
	if given != nil {
		return l, given, nil
	}
	if err := t.agree("families", func(m *mate) []string { return or(m.col.Choice.Families, set.Families) }); err != nil {
		return nil, nil, err
	}
	l, err = t.common()
	return l, nil, err
}

// or returns own, or others where own is empty.
func or(own, others []string) []string {
	if len(own) > 0 {
		return own
	}
	return others
}

// agree returns an error that names two rows unless the columns of every group
// have the same of something.
func (t *team) agree(what string, of func(*mate) []string) error {
	first := map[string]*mate{}
	for _, m := range t.mates {
		group := m.col.Group
		if group == "" {
			continue
		}
		f := first[group]
		if f == nil {
			first[group] = m
			continue
		}
		if a, b := of(f), of(m); !slices.Equal(a, b) {
			return fmt.Errorf("%s has one section, but its members have different %s (%s at %s, %s at %s): give them the same",
				GroupName(group), what, strings.Join(a, " "), f.col.Cell, strings.Join(b, " "), m.col.Cell)
		}
	}
	return nil
}

// common returns the candidates that the choices of every column allow.
func (t *team) common() (*List, error) {
	var l *List
	for _, m := range t.mates {
		own, err := t.allowed(m.col)
		if err != nil {
			return nil, err
		}
		switch {
		case l == nil:
			l = own
		case l != own:
			l = l.in(own, &t.engine.settings)
		}
	}
	return l, nil
}

// in returns the part of a list that is in another too.
func (l *List) in(other *List, set *design.Settings) *List {
	has := map[*ec3.Candidate]bool{}
	for _, c := range other.Candidates {
		has[c] = true
	}
	both := &List{}
	from := 0
	for i, c := range l.Candidates {
		both.Refused = other.alsoRefuses(both.Refused, l.Refused[from:l.before[i]])
		from = l.before[i]
		if has[c] {
			both.addCandidate(c)
		}
	}
	both.Refused = other.alsoRefuses(both.Refused, l.Refused[from:])
	both.tabulate(set)
	return both
}

// alsoRefuses appends those refusals that are the list's too.
func (l *List) alsoRefuses(to, refused []Refused) []Refused {
	for _, r := range refused {
		if slices.ContainsFunc(l.Refused, func(o Refused) bool { return o.Section == r.Section && o.Grade == r.Grade }) {
			to = append(to, r)
		}
	}
	return to
}

// section returns the one section of a list of grades.
func (l *List) section() *catalogue.Section {
	if len(l.Candidates) > 0 {
		return l.Candidates[0].Section
	}
	return l.Refused[0].Section
}
