package search

import (
	"context"

	"stanchion/design"
	"stanchion/design/ec3"
)

// Options is what a column may have: the candidates of its list, or the given
// section in each of its grades, and which of them pass.
type Options struct {
	List  *List
	Pass  []bool // by candidate of the list
	Given bool   // the section is given: the list has no other
	Err   error  // why the column cannot be designed; List is nil
}

// Options finds every candidate that passes for every column on its own, for
// decisions over many columns. Groups are the caller's: a group may have what
// every member may.
func (e *Engine) Options(ctx context.Context, cols []design.Column, workers int) ([]Options, error) {
	all := make([]Options, len(cols))
	var bugs bugs
	err := spread(ctx, workers, len(cols), 1, func() *worker { return e.worker(Size, &bugs) }, func(w *worker, i int) {
		w.guarded(&cols[i], func() { all[i] = w.options(&cols[i]) })
	}, nil)
	if err != nil {
		return nil, err
	}
	return all, bugs.err()
}

func (w *worker) options(col *design.Column) Options {
	if err := w.take(col); err != nil {
		return Options{Err: err}
	}
	l, err := w.allowed(col)
	if err != nil {
		return Options{Err: err}
	}
	limit := ec3.Limit(col, &w.engine.settings)
	o := Options{List: l, Pass: make([]bool, len(l.rows)), Given: col.Given != ""}
	for i := range l.rows {
		o.Pass[i] = l.try(i, &w.member, &w.demand, limit, &w.assess)
	}
	return o
}

// Lightest returns the candidate that SizeAll would choose for each column on
// its own, without the working: nil where none passes or the column cannot be
// designed.
func (e *Engine) Lightest(ctx context.Context, cols []design.Column, workers int) ([]*ec3.Candidate, error) {
	chosen := make([]*ec3.Candidate, len(cols))
	var bugs bugs
	err := spread(ctx, workers, len(cols), chunk, func() *worker { return e.worker(Size, &bugs) }, func(w *worker, i int) {
		w.guarded(&cols[i], func() { chosen[i] = w.lightest(&cols[i]) })
	}, nil)
	if err != nil {
		return nil, err
	}
	return chosen, bugs.err()
}

func (w *worker) lightest(col *design.Column) *ec3.Candidate {
	if w.take(col) != nil {
		return nil
	}
	l, err := w.allowed(col)
	if err != nil {
		return nil
	}
	if i := w.first(l, ec3.Limit(col, &w.engine.settings)); i >= 0 {
		return l.Candidates[i]
	}
	return nil
}

// Assign makes the result of every column in a candidate that was decided on
// elsewhere: it passes or fails there. A column without one (nil) is sized on
// its own. The errors are those of SizeAll.
func (e *Engine) Assign(ctx context.Context, cols []design.Column, to []*ec3.Candidate, workers int, progress func(done int)) ([]design.Result, error) {
	if len(to) != len(cols) {
		panic("search: one candidate for each column")
	}
	results := make([]design.Result, len(cols))
	var bugs bugs
	err := spread(ctx, workers, len(cols), chunk, func() *worker { return e.worker(Size, &bugs) }, func(w *worker, i int) {
		if to[i] == nil {
			w.one(&cols[i], &results[i])
			return
		}
		w.assign(&cols[i], to[i], &results[i])
	}, progress)
	if err != nil {
		return nil, err
	}
	return results, bugs.err()
}

func (w *worker) assign(col *design.Column, c *ec3.Candidate, res *design.Result) {
	defer w.bugs.catch(col, res)
	*res = design.Result{Fixed: col.Given != ""}
	if err := w.take(col); err != nil {
		notRead(res, err)
		return
	}
	w.member.Assess(c, &w.assess)
	w.fill(res)
	if !ec3.Passes(res.Utilisation, ec3.Limit(col, &w.engine.settings)) {
		res.Status = design.Fails
	}
}
