package main

import (
	"context"
	"errors"
	"fmt"
	"iter"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/reclaim"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/summary"
)

// design designs the members in their order and hands each to the outputs. The
// schedule streams through, unless a decision needs all members at once.
func (r *run) design(ctx context.Context) error {
	bar := newProgress(r.con, r.plan.Summary.Members)
	defer bar.done()
	put := func(m *schedule.Member, res *design.Result) error {
		r.tally.Add(m, res)
		r.leastReserve(m, res)
		bar.add()
		return r.out.put(m, res)
	}
	if r.mustHold() {
		return r.designTogether(ctx, put)
	}
	return search.Stream(ctx, r.engine, r.mode, r.flags.workers, r.jobs(), func(j *search.Job[*schedule.Member]) error {
		return put(j.Tag, &j.Result)
	})
}

// leastReserve keeps the member whose axial force can grow the least, of those
// that pass.
func (r *run) leastReserve(m *schedule.Member, res *design.Result) {
	if res.Status != design.Passes || res.ReserveCheck == design.KindNone {
		return
	}
	if r.least == nil || res.ReserveN < r.least.Result.ReserveN {
		r.least = &summary.Line{Member: m, Result: *res}
	}
}

// mustHold reports whether a decision needs all members at once.
func (r *run) mustHold() bool {
	if r.engine.Coupled() || r.keep != nil {
		return true
	}
	t := &r.plan.Settings.Together
	return r.mode == search.Size && (r.hasField("Group") || r.hasField("Splice") ||
		t.Splices != building.AsScheduled || t.MostSizes > 0 || t.Reclaimed != "")
}

// jobs yields the members as jobs of the search.
func (r *run) jobs() iter.Seq2[*search.Job[*schedule.Member], error] {
	return func(yield func(*search.Job[*schedule.Member], error) bool) {
		for m, err := range r.plan.Members() {
			if err != nil {
				yield(nil, err)
				return
			}
			j := &search.Job[*schedule.Member]{Column: m.Column, Tag: m}
			if len(m.Problems) > 0 {
				j.Skip, j.Result = true, schedule.NotReadResult(m)
			}
			if !yield(j, nil) {
				return
			}
		}
	}
}

// designTogether holds all members: those of a group share a section, those of
// a column line depend on each other, sizes are counted over all of them, and
// they may stand anywhere.
func (r *run) designTogether(ctx context.Context, put func(*schedule.Member, *design.Result) error) error {
	var members []*schedule.Member
	var cols []design.Column
	for j, err := range r.jobs() {
		if err != nil {
			return err
		}
		members = append(members, j.Tag)
		switch {
		case !j.Skip:
			cols = append(cols, j.Column)
		case r.keep != nil:
			r.keep.unread = append(r.keep.unread, j.Column)
		}
	}
	results, defects := r.decide(ctx, cols)
	if results == nil && defects != nil {
		return defects
	}
	next := 0
	for _, m := range members {
		res := schedule.NotReadResult(m)
		if len(m.Problems) == 0 {
			res = results[next]
			next++
		}
		if err := put(m, &res); err != nil {
			return err
		}
	}
	return defects
}

// decide designs columns that are held.
func (r *run) decide(ctx context.Context, cols []design.Column) ([]design.Result, error) {
	if r.mode == search.Check {
		return r.engine.CheckAll(ctx, cols, r.flags.workers, nil)
	}
	d, err := r.sized(ctx, cols)
	if d == nil {
		return nil, err
	}
	r.curve, r.anySizes = d.Curve, d.Any
	return d.Results, err
}

// sized chooses the sections of columns that are held.
func (r *run) sized(ctx context.Context, cols []design.Column) (*building.Decision, error) {
	if r.keep != nil {
		return r.decideKeeping(ctx, cols)
	}
	if r.atHand != nil {
		return r.decideReclaiming(ctx, cols)
	}
	return building.Size(ctx, r.engine, cols, r.plan.Settings.Together.Options, r.flags.workers, nil)
}

// decideReclaiming takes what can be taken from the steel at hand.
func (r *run) decideReclaiming(ctx context.Context, cols []design.Column) (*building.Decision, error) {
	t := &r.plan.Settings.Together
	d, err := reclaim.Size(ctx, r.engine, cols, t.Options, r.atHand, r.flags.workers)
	if d == nil {
		var few *building.TooFewSizesError
		if err != nil && ctx.Err() == nil && !errors.As(err, &few) {
			err = fmt.Errorf("reclaimed %s: %w", t.Reclaimed, err)
		}
		return nil, err
	}
	r.reclaim = d
	for i := range cols {
		r.quantities = append(r.quantities, cols[i].Quantity)
	}
	return d.Decision, err
}

// hasField reports whether the schedule has a column for a field.
func (r *run) hasField(name string) bool {
	for i := range r.plan.Header.Columns {
		if r.plan.Header.Columns[i].Field == name {
			return true
		}
	}
	return false
}
