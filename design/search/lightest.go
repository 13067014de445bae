package search

import (
	"context"

	"stanchion/design"
	"stanchion/design/ec3"
)

// Lightest returns the candidate that SizeAll would choose for each column on
// its own, without the working: nil where none passes or the column cannot be
// designed.
func (e *Engine) Lightest(ctx context.Context, cols []design.Column, workers int) ([]*ec3.Candidate, error) {
	chosen := make([]*ec3.Candidate, len(cols))
	var bugs bugs
	err := spread(ctx, workers, len(cols), chunk, func() *worker { return e.worker(Size, &bugs) }, func(w *worker, i int) {
		defer w.bugs.catch(&cols[i], new(design.Result))
		chosen[i] = w.lightest(&cols[i])
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
