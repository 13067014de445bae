package working

import (
	"errors"
	"fmt"
	"math"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
	"stanchion/design/search"
)

// ErrNoSection is said of a result that names no section: there is nothing to
// work out.
var ErrNoSection = errors.New("no section: there is no working")

// Run is a run over a schedule: its columns with their results. It assesses
// any of them once more, in the section that the run gave it and beside the
// sections that the run gave its neighbours. It is not for use by several
// goroutines at once.
type Run struct {
	find     func(name string) (*catalogue.Section, error)
	settings *design.Settings
	columns  []design.Column
	results  []design.Result

	below, above []int
	assessment   ec3.Assessment
}

// NewRun takes the columns and results of a run under these settings. The
// function finds the sections that results name.
func NewRun(find func(name string) (*catalogue.Section, error), set *design.Settings, columns []design.Column, results []design.Result) *Run {
	r := &Run{find: find, settings: set, columns: columns, results: results}
	r.below, r.above = search.Stand(columns)
	return r
}

// Sheet writes the working of a column.
func (r *Run) Sheet(i int) (*Sheet, error) {
	result := &r.results[i]
	if result.Section == "" {
		return nil, ErrNoSection
	}
	section, err := r.find(result.Section)
	if err != nil {
		return nil, err
	}
	grade, err := material.Parse(result.Grade)
	if err != nil {
		return nil, err
	}
	c, err := ec3.NewCandidate(section, grade, r.settings)
	if err != nil {
		return nil, fmt.Errorf("%s %s: %w", result.Section, result.Grade, err)
	}
	m, err := ec3.NewMember(&r.columns[i], r.settings)
	if err != nil {
		return nil, err
	}
	m.Between(r.standsOn(r.below[i]), r.neighbour(r.above[i]))
	m.Carried = r.carried(i)
	m.Assess(c, &r.assessment)
	return Of(&r.assessment, result), nil
}

// neighbour returns what a column is to those beside it: nil where there is
// none, or none that could be designed.
func (r *Run) neighbour(i int) *ec3.Neighbour {
	if i < 0 || r.results[i].Section == "" || math.IsInf(r.results[i].Utilisation, 0) {
		return nil
	}
	section, err := r.find(r.results[i].Section)
	if err != nil {
		return nil
	}
	return &ec3.Neighbour{Column: &r.columns[i], Section: section}
}

// standsOn returns the neighbour below a column. One that has no section still
// brings in the moments of the beams at its top.
func (r *Run) standsOn(i int) *ec3.Neighbour {
	n := r.neighbour(i)
	if n == nil && i >= 0 {
		n = &ec3.Neighbour{Column: &r.columns[i]}
	}
	return n
}

// carried returns the own weight of the lengths above a column, N, with its
// load factor.
func (r *Run) carried(i int) float64 {
	weight := 0.0
	for above := r.above[i]; above >= 0 && r.settings.SelfWeight > 0; above = r.above[above] {
		n := r.neighbour(above)
		if n == nil {
			break
		}
		weight += r.settings.SelfWeight * design.Gravity / 1000 * n.Section.Mass * n.Column.Length
	}
	return weight
}
