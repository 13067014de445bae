package search

import (
	"slices"

	"stanchion/design"
	"stanchion/design/ec3"
)

// worker holds what one goroutine needs to design columns one after another
// without allocating for each: the member, the assessment, the demand on the
// axial table and the list that the last column chose from.
type worker struct {
	engine *Engine
	mode   Mode
	bugs   *bugs
	memo   memo

	member   ec3.Member
	assess   ec3.Assessment
	demand   demand
	reserves bool // the reserve is asked for
	reserve  reserver
}

func (e *Engine) worker(mode Mode, b *bugs) *worker {
	return &worker{engine: e, mode: mode, bugs: b, reserves: mode == Check || e.Reserve}
}

// one designs a column that shares its section with no other.
func (w *worker) one(col *design.Column, res *design.Result) {
	defer w.bugs.catch(col, res)
	*res = design.Result{}
	if err := w.take(col); err != nil {
		notRead(res, err)
		return
	}
	switch {
	case col.Given != "":
		w.given(col, res)
	case w.mode == Check:
		notRead(res, errNoSection)
	default:
		w.size(col, res)
	}
}

// take makes the worker's member that of a column.
func (w *worker) take(col *design.Column) error {
	if err := w.member.Reset(col, &w.engine.settings); err != nil {
		return err
	}
	w.demand.of(&w.member, ec3.Limit(col, &w.engine.settings))
	return nil
}

// allowed returns the candidates that a column may have: its given section, or
// what it chooses from.
func (w *worker) allowed(col *design.Column) (*List, error) {
	return w.memo.list(col, w.engine.allowed)
}

func (e *Engine) allowed(col *design.Column) (*List, error) {
	if col.Given != "" {
		return e.givenIn(col)
	}
	return e.List(&col.Choice, col.Grades)
}

// size chooses the section of a column.
func (w *worker) size(col *design.Column, res *design.Result) {
	l, err := w.allowed(col)
	if err != nil {
		notRead(res, err)
		return
	}
	limit := ec3.Limit(col, &w.engine.settings)
	i := w.first(l, limit)
	if i < 0 {
		w.noSection(l, res)
		return
	}
	w.member.Assess(l.Candidates[i], &w.assess)
	w.fill(res)
	res.Status = design.Passes
	l.tellOver(res, i)
	if j := l.lighter(i); j >= 0 {
		w.member.Assess(l.Candidates[j], &w.assess)
		evidence(res, &w.assess)
	}
}

// first returns the first candidate of the list that passes every check of the
// worker's member, -1 if none does.
func (w *worker) first(l *List, limit float64) int {
	for i := l.skip.start(&w.demand); i < len(l.rows); i++ {
		if l.try(i, &w.member, &w.demand, limit, &w.assess) {
			return i
		}
	}
	return -1
}

// try reports whether candidate i passes every check of a member. One that the
// axial table refuses fails a check for certain; the rest is assessed unless
// the table says all.
func (l *List) try(i int, m *ec3.Member, d *demand, limit float64, a *ec3.Assessment) bool {
	switch l.rows[i].axial(d, l.ratio) {
	case fails:
		return false
	case passes:
		return true
	}
	m.Assess(l.Candidates[i], a)
	return ec3.Passes(a.Utilisation, limit)
}

// lighter returns the candidate that the choice would have preferred next to
// candidate i, -1 if there is none: by mass the strongest grade of the section
// before it, by cost or carbon the candidate before it.
func (l *List) lighter(i int) int {
	j := i - 1
	if l.by == design.ByMass {
		for j >= 0 && l.Candidates[j].Section == l.Candidates[i].Section {
			j--
		}
	}
	return j
}

// Over says which sections stand between a candidate of the list and the next
// lighter one and were left out, since a rule does not cover them, and why;
// nothing where there is none.
func (l *List) Over(c *ec3.Candidate) string {
	if i := slices.Index(l.Candidates, c); i >= 0 {
		return l.over[i]
	}
	return ""
}

// Lighter returns the candidate of the list that the choice would have
// preferred next to c, nil if there is none.
func (l *List) Lighter(c *ec3.Candidate) *ec3.Candidate {
	if i := slices.Index(l.Candidates, c); i >= 0 {
		if j := l.lighter(i); j >= 0 {
			return l.Candidates[j]
		}
	}
	return nil
}
