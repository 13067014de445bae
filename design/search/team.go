package search

import (
	"fmt"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// team is a group whose section is being chosen.
type team struct {
	*worker
	name  string
	mates []mate
	left  []string // where the members stand that cannot be designed
}

// mate is a member of a group that can be designed.
type mate struct {
	col    *design.Column
	res    *design.Result
	member ec3.Member
	demand demand
	limit  float64
}

// group chooses the section of the columns of a group: the first candidate
// that passes for every one. Where one has a given section, the group has it.
func (w *worker) group(name string, cols []*design.Column, results []*design.Result) {
	defer w.bugs.catchAll(cols, results)
	t := &team{worker: w, name: name, mates: make([]mate, 0, len(cols))}
	for i, col := range cols {
		t.join(col, results[i])
	}
	if len(t.mates) == 0 {
		return
	}
	l, given, err := t.candidates()
	if err != nil {
		for i := range t.mates {
			notRead(t.mates[i].res, err)
		}
		return
	}
	if given != nil {
		t.keep(l, given)
		return
	}
	t.choose(l)
}

// join adds a column to the team.
func (t *team) join(col *design.Column, res *design.Result) {
	*res = design.Result{}
	m := mate{col: col, res: res, limit: ec3.Limit(col, &t.engine.settings)}
	if err := m.member.Reset(col, &t.engine.settings); err != nil {
		notRead(res, err)
		t.left = append(t.left, col.Cell)
		return
	}
	m.demand.of(&m.member, m.limit)
	t.mates = append(t.mates, m)
}

// candidates returns what the group may have: the candidates that every member
// allows, or the section that a member gives, in the group's grades, and that
// member.
func (t *team) candidates() (l *List, given *mate, err error) {
	if err := t.agree("grades", func(m *mate) []string { return or(m.col.Grades, t.engine.settings.Grades) }); err != nil {
		return nil, nil, err
	}
	for i := range t.mates {
		m := &t.mates[i]
		if m.col.Given == "" {
			continue
		}
		own, err := t.allowed(m.col)
		if err != nil {
			return nil, nil, err
		}
		if given != nil && own.section() != l.section() {
			return nil, nil, fmt.Errorf("group %q is given two sections, %s at %s and %s at %s: give it one",
				t.name, given.col.Given, given.col.Cell, m.col.Given, m.col.Cell)
		}
		l, given = own, m
	}
	if given != nil {
		return l, given, nil
	}
	if err := t.agree("families", func(m *mate) []string { return or(m.col.Choice.Families, t.engine.settings.Families) }); err != nil {
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

// agree returns an error that names two rows unless every member has the same
// of something.
func (t *team) agree(what string, of func(*mate) []string) error {
	first := &t.mates[0]
	for i := range t.mates {
		m := &t.mates[i]
		if a, b := of(first), of(m); !slices.Equal(a, b) {
			return fmt.Errorf("group %q has one section, but its members have different %s (%s at %s, %s at %s): give them the same",
				t.name, what, strings.Join(a, " "), first.col.Cell, strings.Join(b, " "), m.col.Cell)
		}
	}
	return nil
}

// common returns the candidates that the limits of size of every member allow.
func (t *team) common() (*List, error) {
	var l *List
	for i := range t.mates {
		own, err := t.allowed(t.mates[i].col)
		if err != nil {
			return nil, err
		}
		switch {
		case l == nil:
			l = own
		case l != own:
			l = l.in(own, &t.engine.settings.National)
		}
	}
	return l, nil
}

// in returns the part of a list that is in another too.
func (l *List) in(other *List, n *design.National) *List {
	has := map[*ec3.Candidate]bool{}
	for _, c := range other.Candidates {
		has[c] = true
	}
	both := &List{Refused: l.Refused}
	for _, c := range l.Candidates {
		if has[c] {
			both.Candidates = append(both.Candidates, c)
		}
	}
	both.tabulate(n)
	return both
}

// section returns the one section of a list of grades.
func (l *List) section() *catalogue.Section {
	if len(l.Candidates) > 0 {
		return l.Candidates[0].Section
	}
	return l.Refused[0].Section
}

// choose gives every member the first candidate that passes for all, or, if
// none does, the one with the least utilisation.
func (t *team) choose(l *List) {
	i := t.first(l)
	if i < 0 {
		t.noSection(l)
		return
	}
	t.fillAll(l.Candidates[i], design.Passes)
	if j := l.lighter(i, t.engine.settings.Rates.Objective); j >= 0 {
		t.evidence(l.Candidates[j])
	}
}

// first returns the first candidate that passes for every member, -1 if none
// does.
func (t *team) first(l *List) int {
	i := 0
	for k := range t.mates {
		i = max(i, l.skip.start(&t.mates[k].demand))
	}
	for ; i < len(l.rows); i++ {
		if t.allPass(l, i) {
			return i
		}
	}
	return -1
}

// allPass reports whether candidate i passes for every member. The last one
// that it failed for is asked first: it mostly fails the next one too.
func (t *team) allPass(l *List, i int) bool {
	for k := range t.mates {
		m := &t.mates[k]
		if t.passesFor(m, l, i) {
			continue
		}
		t.mates[0], t.mates[k] = t.mates[k], t.mates[0]
		return false
	}
	return true
}

// passesFor reports whether candidate i passes for a member.
func (t *team) passesFor(m *mate, l *List, i int) bool {
	return l.try(i, &m.member, &m.demand, m.limit, &t.assess)
}

// worst returns the greatest of the members' utilisations in a candidate, each
// as a part of its limit, and the first member that has it.
func (t *team) worst(c *ec3.Candidate) (most float64, who *mate) {
	for i := range t.mates {
		m := &t.mates[i]
		m.member.Assess(c, &t.assess)
		if u := t.assess.Utilisation / m.limit; who == nil || u > most {
			most, who = u, m
		}
	}
	return most, who
}

// best returns the candidate whose worst utilisation is least, the first of
// equal ones.
func (t *team) best(l *List) (best *ec3.Candidate, least float64, who *mate) {
	for _, c := range l.Candidates {
		if u, m := t.worst(c); best == nil || u < least {
			best, least, who = c, u, m
		}
	}
	return best, least, who
}

// fillAll gives every member a section with a status.
func (t *team) fillAll(c *ec3.Candidate, status design.Status) {
	for i := range t.mates {
		m := &t.mates[i]
		m.member.Assess(c, &t.assess)
		t.fill(m.res)
		m.res.Status = status
		if len(t.left) > 0 {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("group %q is sized without what could not be read: %s", t.name, strings.Join(t.left, ", ")))
		}
	}
}

// evidence gives every member the next lighter candidate and the check that it
// fails, which may be another member's.
func (t *team) evidence(c *ec3.Candidate) {
	_, who := t.worst(c)
	who.member.Assess(c, &t.assess)
	for i := range t.mates {
		m := &t.mates[i]
		evidence(m.res, &t.assess)
		if m != who {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("group %q: the next lighter section fails at %s", t.name, who.place()))
		}
	}
}

// place names a member for people.
func (m *mate) place() string { return fmt.Sprintf("%s (%s)", m.col.Mark, m.col.Cell) }

// noSection names the section with the least utilisation where none passes.
func (t *team) noSection(l *List) {
	best, least, who := t.best(l)
	if best == nil {
		for i := range t.mates {
			t.mates[i].res.Status = design.NoSection
			t.mates[i].res.Notes = append(t.mates[i].res.Notes, l.empty())
		}
		return
	}
	t.fillAll(best, design.NoSection)
	for i := range t.mates {
		m := &t.mates[i]
		m.res.Notes = append(m.res.Notes, fmt.Sprintf("no section passes for group %q: %s has the least utilisation, %.3f of the limit at %s, of %d tried%s",
			t.name, nameIn(best), least, who.place(), len(l.Candidates), l.leftOut()))
	}
}

// keep gives every member the section that one of them gives, in the first
// grade that passes for all.
func (t *team) keep(l *List, given *mate) {
	var c *ec3.Candidate
	if i := t.first(l); i >= 0 {
		c = l.Candidates[i]
	} else if c, _, _ = t.best(l); c == nil {
		for i := range t.mates {
			refuse(t.mates[i].res, &l.Refused[0], t.mates[i].col)
		}
	}
	if c != nil {
		t.fillAll(c, design.Passes)
	}
	for i := range t.mates {
		m := &t.mates[i]
		if c != nil && !ec3.Passes(m.res.Utilisation, m.limit) {
			m.res.Status = design.Fails
		}
		m.res.Fixed = m.col.Given != ""
		if !m.res.Fixed {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("group %q has the section given at %s", t.name, given.place()))
		}
	}
}
