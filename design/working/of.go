package working

import (
	"errors"
	"fmt"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
	"stanchion/design/working/formula"
)

// Of writes the working of an assessment whose result the run has. The
// assessment may be used again afterwards: the sheet keeps nothing of it.
func Of(a *ec3.Assessment, result *design.Result) *Sheet {
	a.Explain()
	for figures := usual; ; figures++ {
		w := write(a, result, figures)
		if !w.weak || figures == ever {
			return w.sheet
		}
	}
}

// write writes the working with values of a number of figures.
func write(a *ec3.Assessment, result *design.Result, figures int) *writer {
	m := a.Member
	s := &Sheet{Column: m.Column, Settings: m.Settings, Section: a.Candidate.Section, Grade: a.Candidate.Grade.Name,
		Result: result, Limit: ec3.Limit(m.Column, m.Settings), Governing: -1}
	w := &writer{sheet: s, known: map[formula.Symbol]known{}, most: figures, c: a.Candidate, m: m, a: a}
	w.section()
	w.actions()
	w.classification()
	w.crossSection()
	w.lengths()
	w.buckling()
	w.bending()
	w.fire()
	w.outcome()
	return w
}

// ErrNoSection is said of a result that names no section: there is nothing to
// work out.
var ErrNoSection = errors.New("no section: there is no working")

// Again assesses a column in the section and grade of its result once more,
// and writes the working. The settings are those of the run that gave the
// result.
func Again(find func(name string) (*catalogue.Section, error), set *design.Settings, col *design.Column, result *design.Result) (*Sheet, error) {
	if result.Section == "" {
		return nil, ErrNoSection
	}
	section, err := find(result.Section)
	if err != nil {
		return nil, err
	}
	grade, err := material.Parse(result.Grade)
	if err != nil {
		return nil, err
	}
	c, err := ec3.NewCandidate(section, grade, set)
	if err != nil {
		return nil, fmt.Errorf("%s %s: %w", result.Section, result.Grade, err)
	}
	m, err := ec3.NewMember(col, set)
	if err != nil {
		return nil, err
	}
	var a ec3.Assessment
	m.Assess(c, &a)
	return Of(&a, result), nil
}
