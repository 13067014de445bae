package search

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"sync"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
)

// Engine chooses and checks sections under the settings of one run. It is safe
// for use by several goroutines at once.
type Engine struct {
	// Reserve asks SizeAll to find by how much the axial force could still
	// grow, as CheckAll does. Set it before the engine is used.
	Reserve bool

	// AtHand holds sections that no catalogue has and that a column may be given
	// all the same: those of steel at hand. Set it before the engine is used.
	AtHand *catalogue.Catalogue

	catalogue *catalogue.Catalogue
	settings  design.Settings
	grades    []material.Grade // the settings' own

	mu    sync.Mutex
	lists map[string]listOrError
	made  map[pair]outcome
}

// pair is a section in a grade.
type pair struct {
	section *catalogue.Section
	grade   string
}

// outcome is what ec3 makes of a pair: a candidate or a refusal.
type outcome struct {
	candidate *ec3.Candidate
	refusal   *ec3.Refusal
}

// New returns an engine that chooses from a catalogue under settings. An
// unknown family, grade or excluded section in the settings is an error.
func New(cat *catalogue.Catalogue, set design.Settings) (*Engine, error) {
	e := &Engine{catalogue: cat, settings: set, lists: map[string]listOrError{}, made: map[pair]outcome{}}
	grades, err := parseGrades(set.Grades)
	if err != nil {
		return nil, err
	}
	if len(grades) == 0 {
		return nil, errors.New("no grade: give the setting 'grade', such as S355")
	}
	e.grades = grades
	if len(set.Families) == 0 {
		return nil, errors.New("no family: give the setting 'families', such as UKC")
	}
	if !(set.Limit > 0) {
		return nil, fmt.Errorf("the utilisation limit is %g: give one above 0", set.Limit)
	}
	if _, err := e.List(&design.Choice{}, nil); err != nil {
		return nil, err
	}
	return e, nil
}

// Settings returns the settings that the engine works under.
func (e *Engine) Settings() design.Settings { return e.settings }

// SizeAll chooses a section for every column: the first candidate in order
// that passes every check, one for all the members of a group. A column with a
// given section keeps it and is checked. Results land by index and do not
// depend on the number of workers (one per processor where it is not
// positive). progress, if not nil, is told how many columns are done, from one
// goroutine at a time.
//
// The error is that of ctx, and then there are no results; or one or more
// *BugError joined, and then every column but those named has its result.
func (e *Engine) SizeAll(ctx context.Context, cols []design.Column, workers int, progress func(done int)) ([]design.Result, error) {
	return e.all(ctx, Size, cols, workers, progress)
}

// CheckAll checks the given section of every column, and finds by how much its
// axial force could still grow. A column without one is not read. The rest is
// as for SizeAll.
func (e *Engine) CheckAll(ctx context.Context, cols []design.Column, workers int, progress func(done int)) ([]design.Result, error) {
	return e.all(ctx, Check, cols, workers, progress)
}

func (e *Engine) all(ctx context.Context, mode Mode, cols []design.Column, workers int, progress func(done int)) ([]design.Result, error) {
	results := make([]design.Result, len(cols))
	single, groups := partition(cols, mode)
	var lines standing
	var clusters [][]Chosen
	if e.Coupled() {
		lines = stand(cols)
		single, groups, clusters = split(single, groups, &lines)
	}
	var bugs bugs
	start := func() *worker { return e.worker(mode, &bugs) }

	err := spread(ctx, workers, len(single), chunk, start, func(w *worker, i int) {
		w.one(&cols[single[i]], &results[single[i]])
	}, progress)
	if err != nil {
		return nil, err
	}
	// Groups are few and large: one unit each.
	err = spread(ctx, workers, len(groups), 1, start, func(w *worker, i int) {
		w.together(&groups[i], cols, results, (*team).size)
	}, nil)
	if err != nil {
		return nil, err
	}
	err = spread(ctx, workers, len(clusters), 1, start, func(w *worker, i int) {
		w.settle(clusters[i], cols, &lines, results)
	}, nil)
	if err != nil {
		return nil, err
	}
	lines.tell(results)
	if progress != nil && len(groups)+len(clusters) > 0 {
		progress(len(cols))
	}
	return results, bugs.err()
}

// candidate returns what ec3 makes of a section in a grade, worked out once.
// The engine must be locked.
func (e *Engine) candidate(s *catalogue.Section, g material.Grade) outcome {
	key := pair{s, g.Name}
	if o, ok := e.made[key]; ok {
		return o
	}
	c, err := ec3.NewCandidate(s, g, &e.settings)
	o := outcome{candidate: c}
	if err != nil {
		o = outcome{refusal: asRefusal(err)}
	}
	e.made[key] = o
	return o
}

func asRefusal(err error) *ec3.Refusal {
	if r, ok := errors.AsType[*ec3.Refusal](err); ok {
		return r
	}
	return &ec3.Refusal{Reason: err.Error()}
}

// parseGrades reads names of grades, each kept once and in the order of the
// choice: the weaker first, then by name.
func parseGrades(names []string) ([]material.Grade, error) {
	var grades []material.Grade
	for _, name := range names {
		g, err := material.Parse(name)
		if err != nil {
			return nil, err
		}
		grades = append(grades, g)
	}
	slices.SortFunc(grades, compareGrades)
	return slices.CompactFunc(grades, func(a, b material.Grade) bool { return a.Name == b.Name }), nil
}
