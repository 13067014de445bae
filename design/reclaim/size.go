package reclaim

import (
	"context"
	"errors"
	"fmt"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/material"
	"stanchion/design/search"
)

// Decision is the sections of all columns, with those that come from steel at
// hand.
type Decision struct {
	*building.Decision

	AtHand int // pieces in the list
	Used   int // pieces that columns take
	Tied   int // columns that share or depend on sections, decided as if they were bought

	Saved  float64 // what the same columns would cost new: kg, cost or carbon
	Bound  float64 // no assignment saves more
	Proven bool    // Saved is the most; where columns are tied, with the sections decided for them
}

// Size assigns pieces of steel at hand to columns so that the least new steel
// is bought, and sizes the rest new. The pieces are those that the stock list
// counts; each has its own grade. Columns of groups and of stacks whose lengths
// share or depend on each other's sections are sized as if they were bought, and
// then take pieces of the same section and grade, one through every length
// between splices.
//
// Where lengths depend on each other's sections otherwise (Engine.Coupled), the
// assignment is made as if they did not, and made again without what fails
// beside its neighbours. Saved is not proven then, nor where the number of
// sizes is limited: steel at hand does not count among the sizes, but what it
// saves is told by the lightest new section of each column alone.
//
// The errors are those of building.Size, and those of a list that cannot be
// used.
func Size(ctx context.Context, e *search.Engine, cols []design.Column, o building.Options, atHand *catalogue.Catalogue, workers int) (*Decision, error) {
	r := &run{engine: e, cols: cols, options: o, list: atHand, workers: workers}
	if err := r.prepare(ctx); err != nil {
		return nil, err
	}
	for {
		s, err := r.problem.Solve(ctx)
		if err != nil {
			return nil, err
		}
		d, err := r.size(ctx, s)
		if d == nil {
			return nil, err
		}
		again := r.changed(s, d)
		if e.Coupled() {
			again = r.ruleOut(s, d) || again
		}
		if !again {
			return r.finish(s, d), err
		}
	}
}

// run is the work of one Size.
type run struct {
	engine  *search.Engine
	cols    []design.Column
	options building.Options
	list    *catalogue.Catalogue
	workers int

	kinds   []search.Offered
	lots    []catalogue.Piece // by lot
	problem Problem
	row     []served // of each row
	tied    int
}

// served is the columns that one row stands for: one, or the lengths through
// which a piece runs. A tied one has its section from its group or stack.
type served struct {
	cols []int
	tied bool
}

// prepare makes the problem.
func (r *run) prepare(ctx context.Context) error {
	if err := r.readLots(); err != nil {
		return err
	}
	passes, err := r.engine.Offer(ctx, r.cols, r.list, r.kinds, r.workers)
	if err != nil {
		return err
	}
	lightest, err := r.engine.Lightest(ctx, r.cols, r.workers)
	if err != nil {
		return err
	}
	set := r.engine.Settings()
	tied := building.Tied(r.cols, &r.options, &set)
	for i := range r.cols {
		if tied[i] {
			r.tied++
			continue
		}
		row := Row{Pieces: max(1, r.cols[i].Quantity), Length: r.cols[i].Length, Only: lightest[i] == nil}
		if lightest[i] != nil {
			row.Saves = r.engine.Objective(lightest[i]) * r.cols[i].Length / 1000
		}
		for k, ok := range passes[i] {
			if ok {
				row.Kinds = append(row.Kinds, k)
			}
		}
		if len(row.Kinds) > 0 {
			r.problem.Rows, r.row = append(r.problem.Rows, row), append(r.row, served{cols: []int{i}})
		}
	}
	return r.addTied(ctx, tied, passes)
}

// readLots makes lots and kinds of the list's pieces.
func (r *run) readLots() error {
	var problems []error
	place := map[string]int{}
	for _, p := range r.list.Pieces() {
		g, err := material.Parse(p.Grade)
		if p.Grade == "" {
			err = errors.New("has no grade: give the one that the steel is known to have")
		}
		if err != nil {
			problems = append(problems, fmt.Errorf("line %d: %w", p.Line, err))
			continue
		}
		key := p.Section.Name() + " " + g.Name
		k, ok := place[key]
		if !ok {
			k = len(r.kinds)
			place[key] = k
			r.kinds = append(r.kinds, search.Offered{Section: p.Section, Grade: g})
		}
		r.lots = append(r.lots, p)
		r.problem.Lots = append(r.problem.Lots, Lot{Kind: k, Length: p.Length, Number: p.Number, Mass: p.Section.Mass * p.Length / 1000})
	}
	if len(problems) == 0 && len(r.lots) == 0 {
		return errors.New("no pieces: give number and length_m of each")
	}
	return errors.Join(problems...)
}

// size designs the columns with the sections that they take from steel at hand.
func (r *run) size(ctx context.Context, s *Solution) (*building.Decision, error) {
	pinned := append([]design.Column(nil), r.cols...)
	taken := make([]bool, len(r.cols))
	for row, of := range r.row {
		if k := s.Kind[row]; k >= 0 && !of.tied {
			i := of.cols[0]
			taken[i] = true
			pinned[i].Given, pinned[i].Grades = r.kinds[k].Section.Name(), []string{r.kinds[k].Grade.Name}
		}
	}
	if r.engine.Coupled() {
		return building.Size(ctx, r.engine, pinned, r.options, r.workers, nil)
	}
	return r.apart(ctx, pinned, taken)
}

// apart sizes what is bought new and what is taken one after the other: steel at
// hand does not count among few sizes.
func (r *run) apart(ctx context.Context, pinned []design.Column, taken []bool) (*building.Decision, error) {
	var part [2][]design.Column
	for i := range pinned {
		part[which(taken[i])] = append(part[which(taken[i])], pinned[i])
	}
	d := &building.Decision{}
	var err error
	if len(part[0]) > 0 {
		if d, err = building.Size(ctx, r.engine, part[0], r.options, r.workers, nil); d == nil {
			return nil, err
		}
	}
	results, err2 := r.engine.SizeAll(ctx, part[1], r.workers, nil)
	if results == nil && err2 != nil {
		return nil, err2
	}
	from := [2][]design.Result{d.Results, results}
	d.Results = make([]design.Result, len(pinned))
	for i := range pinned {
		w := which(taken[i])
		d.Results[i], from[w] = from[w][0], from[w][1:]
	}
	return d, errors.Join(err, err2)
}

func which(taken bool) int {
	if taken {
		return 1
	}
	return 0
}

// ruleOut takes from the problem what turned out to fail beside its neighbours,
// and reports whether there was anything.
func (r *run) ruleOut(s *Solution, d *building.Decision) (found bool) {
	for row, of := range r.row {
		if k := s.Kind[row]; k >= 0 && !of.tied && d.Results[of.cols[0]].Status == design.Fails {
			p := &r.problem.Rows[row]
			var rest []int
			for _, other := range p.Kinds {
				if other != k {
					rest = append(rest, other)
				}
			}
			p.Kinds, found = rest, true
		}
	}
	return found
}

// finish says of each result from which pieces it comes.
func (r *run) finish(s *Solution, d *building.Decision) *Decision {
	out := &Decision{Decision: d, Tied: r.tied, Saved: s.Saved, Bound: s.Bound, Proven: s.Proven && !r.engine.Coupled() && r.options.MostSizes == 0}
	for i := range r.lots {
		out.AtHand += r.lots[i].Number
	}
	for row, of := range r.row {
		if s.Kind[row] < 0 {
			continue
		}
		var from []string
		for _, u := range s.Uses[row] {
			out.Used += u.Number
			from = append(from, fmt.Sprintf("%d of %.3f m (line %d)", u.Number, r.lots[u.Lot].Length/1000, r.lots[u.Lot].Line))
		}
		for _, i := range of.cols {
			res := &d.Results[i]
			res.Fixed = r.cols[i].Given != ""
			res.AtHand = strings.Join(from, ", ")
			note := "of steel at hand: " + res.AtHand
			if len(of.cols) > 1 {
				note += fmt.Sprintf(", one through %d lengths of stack %q", len(of.cols), r.cols[i].Stack)
			}
			res.Notes = append(res.Notes, note)
		}
	}
	return out
}
