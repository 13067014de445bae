package reclaim

import (
	"context"
	"slices"

	"stanchion/design"
	"stanchion/design/building"
)

// addTied adds rows for the columns whose sections are decided together. They
// are decided as if all were bought; then a piece at hand can stand for one that
// is of the same section and grade, as long as the run of lengths that it goes
// through.
func (r *run) addTied(ctx context.Context, tied []bool, passes [][]bool) error {
	if !slices.Contains(tied, true) {
		return nil
	}
	d, err := building.Size(ctx, r.engine, r.cols, r.options, r.workers, nil)
	if d == nil {
		return err
	}
	set := r.engine.Settings()
	for _, run := range building.Runs(r.cols, r.options, &set, d.Results) {
		if !tied[run[0]] {
			continue
		}
		kind := r.kindOf(&d.Results[run[0]])
		if kind < 0 || !r.oneKind(run, kind, d.Results, passes) {
			continue
		}
		row := Row{Pieces: max(1, r.cols[run[0]].Quantity), Kinds: []int{kind}}
		for _, i := range run {
			row.Length += r.cols[i].Length
			row.Saves += r.engine.PerMetre(r.kinds[kind]) * r.cols[i].Length / 1000
		}
		r.problem.Rows, r.row = append(r.problem.Rows, row), append(r.row, served{run, true})
	}
	return nil
}

// kindOf finds the kind of piece that is of a result's section and grade, -1
// where none is.
func (r *run) kindOf(res *design.Result) int {
	for k := range r.kinds {
		if r.isOf(res, k) {
			return k
		}
	}
	return -1
}

func (r *run) isOf(res *design.Result, kind int) bool {
	return res.Section == r.kinds[kind].Section.Name() && res.Grade == r.kinds[kind].Grade.Name
}

// oneKind reports whether all lengths of a run have the kind, pass with it, and
// are as many.
func (r *run) oneKind(run []int, kind int, results []design.Result, passes [][]bool) bool {
	for _, i := range run {
		if !r.isOf(&results[i], kind) || !passes[i][kind] || max(1, r.cols[i].Quantity) != max(1, r.cols[run[0]].Quantity) {
			return false
		}
	}
	return true
}

// changed takes from the problem tied columns whose sections are others now that
// some columns take pieces, as they can be where few sizes are asked for, and
// reports whether there was any that had taken one.
func (r *run) changed(s *Solution, d *building.Decision) (found bool) {
	for row := range r.row {
		if !r.row[row].tied || s.Kind[row] < 0 {
			continue
		}
		for _, i := range r.row[row].cols {
			if !r.isOf(&d.Results[i], s.Kind[row]) || d.Results[i].Status != design.Passes {
				r.problem.Rows[row].Kinds, found = nil, true
			}
		}
	}
	return found
}
