package search

import (
	"fmt"
	"strings"

	"stanchion/design"
	"stanchion/design/ec3"
)

// choose gives every member the first candidate that passes for all, or, if
// none does, the one with the least utilisation.
func (t *team) choose(l *List) {
	i := t.first(l)
	if i < 0 {
		t.noSection(l)
		return
	}
	t.fillAll(l.Candidates[i], design.Passes)
	for _, m := range t.mates {
		l.tellOver(m.res, i)
	}
	if j := l.lighter(i); j >= 0 {
		t.evidence(l.Candidates[j])
	}
}

// first returns the first candidate that passes for every member, -1 if none
// does.
func (t *team) first(l *List) int {
	i := 0
	for _, m := range t.mates {
		i = max(i, l.skip.start(&m.demand))
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
	for k, m := range t.mates {
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
	for _, m := range t.mates {
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
	for _, m := range t.mates {
		m.member.Assess(c, &t.assess)
		t.fill(m.res)
		m.res.Status = status
		if len(t.left) > 0 {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("%s is sized without what could not be read: %s", t.name, strings.Join(t.left, ", ")))
		}
	}
}

// evidence gives every column the next lighter candidate and the check that it
// fails, which may be another column's. It reports whether it passes after
// all, for every column.
func (t *team) evidence(c *ec3.Candidate) (passes bool) {
	most, who := t.worst(c)
	who.member.Assess(c, &t.assess)
	passes = ec3.Passes(most, 1)
	for _, m := range t.mates {
		evidence(m.res, &t.assess)
		if m != who && !passes {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("%s: the next lighter section fails at %s", t.name, who.place()))
		}
	}
	return passes
}

// place names a member for people.
func (m *mate) place() string { return fmt.Sprintf("%s (%s)", m.col.Mark, m.col.Cell) }

// noSection names the section with the least utilisation where none passes.
func (t *team) noSection(l *List) {
	best, least, who := t.best(l)
	if best == nil {
		for _, m := range t.mates {
			m.res.Status = design.NoSection
			m.res.Notes = append(m.res.Notes, l.empty())
		}
		return
	}
	t.fillAll(best, design.NoSection)
	for _, m := range t.mates {
		m.res.Notes = append(m.res.Notes, fmt.Sprintf("no section passes for %s: %s", t.name,
			l.shortfall(best, &who.res.Governing, least, " of the limit at "+who.place())))
	}
}

// keep gives every member the section that one of them gives, in the first
// grade that passes for all.
func (t *team) keep(l *List, given *mate) {
	var c *ec3.Candidate
	if i := t.first(l); i >= 0 {
		c = l.Candidates[i]
	} else if c, _, _ = t.best(l); c == nil {
		for _, m := range t.mates {
			refuse(m.res, &l.Refused[0], m.col)
		}
	}
	if c != nil {
		t.fillAll(c, design.Passes)
	}
	for _, m := range t.mates {
		if c != nil && !ec3.Passes(m.res.Utilisation, m.limit) {
			failed(m.res)
		}
		m.res.Fixed = m.col.Given != ""
		if !m.res.Fixed {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("%s has the section given at %s", t.name, given.place()))
		}
	}
}
