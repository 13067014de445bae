package search

import (
	"context"
	"errors"
	"fmt"

	"stanchion/design"
	"stanchion/design/ec3"
)

// Options is what a set of columns may have: the candidates that every one
// allows, or the given section in each grade, and which of them pass for all.
type Options struct {
	List  *List
	Pass  []bool // by candidate of the list
	Given bool   // the section is given: the list has no other
	Err   error  // why the set cannot be designed; List is nil then
}

// Options finds every candidate that passes for every set, for decisions over
// many columns. A column that cannot be designed has no say in its set. Where
// lengths depend on each other (Coupled) a candidate is tried beside the
// sections to which the lines settle by themselves, which need not be those
// that the decision ends at: Assign has the last word.
func (e *Engine) Options(ctx context.Context, cols []design.Column, sets []Set, workers int) ([]Options, error) {
	all := make([]Options, len(sets))
	scratch := make([]design.Result, len(cols))
	var around *surroundings
	if e.Coupled() {
		var err error
		if around, err = e.surroundings(ctx, cols, sets, scratch, workers); around == nil {
			return all, err
		}
	}
	err := e.each(ctx, workers, len(sets), nil, func(w *worker, i int) {
		all[i].Err = errUndesigned
		w.together(&sets[i], cols, scratch, func(t *team) { all[i] = t.options(around) })
	})
	return all, err
}

// errUndesigned is the error of a set of which no column can be designed: the
// columns' own results say why.
var errUndesigned = errors.New("no column of it can be designed")

func (t *team) options(around *surroundings) Options {
	l, given, err := t.candidates()
	if err != nil {
		return Options{Err: err}
	}
	o := Options{List: l, Pass: make([]bool, len(l.rows)), Given: given != nil}
	move := around.put(t)
	for i := range l.rows {
		move(l.Candidates[i])
		o.Pass[i] = t.allPass(l, i)
	}
	return o
}

// Chosen is a set and the candidate that was decided on for it.
type Chosen struct {
	Set
	Candidate *ec3.Candidate // nil: the set is sized by itself
	Lighter   *ec3.Candidate // the next lighter one, as evidence; nil: none
	Over      string         // what List.Over says of it
	Why       string         // why a lighter one that passes was not taken
}

// Assign makes the results of columns whose sections were decided on elsewhere:
// each passes or fails there. Columns in no set are left as they are in
// results. progress and the errors are those of SizeAll.
func (e *Engine) Assign(ctx context.Context, cols []design.Column, chosen []Chosen, results []design.Result, workers int, progress func(done int)) error {
	var lines standing
	var clusters [][]Chosen
	if e.Coupled() {
		lines = stand(cols)
		chosen, clusters = parts(chosen, &lines)
	}
	return e.each(ctx, workers, len(chosen)+len(clusters), progress, func(w *worker, i int) {
		if i >= len(chosen) {
			w.settle(clusters[i-len(chosen)], cols, &lines, results)
			return
		}
		c := &chosen[i]
		if c.Candidate == nil && len(c.Columns) == 1 {
			w.one(&cols[c.Columns[0]], &results[c.Columns[0]])
			return
		}
		w.together(&c.Set, cols, results, func(t *team) {
			if c.Candidate == nil {
				t.size()
				return
			}
			t.assign(c)
		})
	})
}

func (t *team) assign(c *Chosen) {
	t.fillAll(c.Candidate, design.Passes)
	for _, m := range t.mates {
		m.res.Fixed = m.col.Given != ""
		if !ec3.Passes(m.res.Utilisation, m.limit) {
			failed(m.res)
		}
	}
	for _, m := range t.mates {
		if c.Over != "" {
			m.res.Notes = append(m.res.Notes, c.Over)
		}
	}
	if c.Lighter == nil {
		return
	}
	if !t.evidence(c.Lighter) {
		return
	}
	for _, m := range t.mates {
		m.res.Notes = append(m.res.Notes, fmt.Sprintf("%s passes too, and is not taken: %s", nameIn(c.Lighter), c.Why))
	}
}

// each calls do for every unit on the pool.
func (e *Engine) each(ctx context.Context, workers int, n int, progress func(int), do func(w *worker, i int)) error {
	var bugs bugs
	err := spread(ctx, workers, n, 1, func() *worker { return e.worker(Size, &bugs) }, do, progress)
	if err != nil {
		return err
	}
	return bugs.err()
}
