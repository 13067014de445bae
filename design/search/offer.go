package search

import (
	"context"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
)

// Offered is a section in a grade that columns may have beside what they choose
// from.
type Offered struct {
	Section *catalogue.Section
	Grade   material.Grade
}

// Offer says which of the offered sections, all of one catalogue, pass for each
// column on its own. The limits and families of a column's own row hold, and
// its own grades; the settings' families and grades do not. A column with a
// given section may have that one alone. One that cannot be designed has none.
func (e *Engine) Offer(ctx context.Context, cols []design.Column, of *catalogue.Catalogue, offered []Offered, workers int) ([][]bool, error) {
	made := make([]outcome, len(offered))
	e.mu.Lock()
	for k := range offered {
		made[k] = e.candidate(offered[k].Section, offered[k].Grade)
	}
	e.mu.Unlock()
	out := make([][]bool, len(cols))
	var bugs bugs
	err := spread(ctx, workers, len(cols), chunk, func() *worker { return e.worker(Size, &bugs) }, func(w *worker, i int) {
		defer w.bugs.catch(&cols[i], new(design.Result))
		out[i] = make([]bool, len(offered))
		if w.take(&cols[i]) != nil {
			return
		}
		may := e.mayHave(&cols[i], of)
		limit := ec3.Limit(&cols[i], &e.settings)
		for k := range offered {
			if made[k].candidate == nil || !may(&offered[k]) {
				continue
			}
			w.member.Assess(made[k].candidate, &w.assess)
			out[i][k] = ec3.Passes(w.assess.Utilisation, limit)
		}
	}, nil)
	if err != nil {
		return nil, err
	}
	return out, bugs.err()
}

// mayHave says which sections of a catalogue a column's row allows.
func (e *Engine) mayHave(col *design.Column, of *catalogue.Catalogue) func(*Offered) bool {
	ch := &col.Choice
	sections, err := of.Filter(catalogue.Filter{
		Families: ch.Families, ColdFormed: e.settings.ColdFormed,
		MinDepth: ch.MinDepth, MaxDepth: ch.MaxDepth, MinWidth: ch.MinWidth, MaxWidth: ch.MaxWidth,
		MinThickness: ch.MinThickness, MaxThickness: ch.MaxThickness,
	})
	grades, gradesErr := parseGrades(col.Grades)
	given := ""
	if col.Given != "" {
		s, findErr := e.find(col.Given, catalogue.FindOptions{ColdFormed: e.settings.ColdFormed, Families: or(ch.Families, e.settings.Families)})
		if findErr != nil {
			err = findErr
		} else {
			given = s.Name()
		}
	}
	return func(o *Offered) bool {
		return err == nil && gradesErr == nil &&
			(given != "" && given == o.Section.Name() || given == "" && slices.Contains(sections, o.Section)) &&
			(len(grades) == 0 || slices.ContainsFunc(grades, func(g material.Grade) bool { return g.Name == o.Grade.Name })) &&
			!slices.ContainsFunc(e.settings.Exclude, func(name string) bool { return strings.EqualFold(name, o.Section.Name()) })
	}
}

// PerMetre returns what a metre of an offered section would cost new, in the
// units of the objective.
func (e *Engine) PerMetre(o Offered) float64 {
	v, _ := e.objective(o.Section, o.Grade)
	return v
}
