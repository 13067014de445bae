package search

import (
	"errors"
	"fmt"
	"math"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// given checks the section that the schedule fixes for a column, in the
// weakest of its grades that passes or, if none does, the one with the least
// utilisation.
func (w *worker) given(col *design.Column, res *design.Result) {
	res.Fixed = true
	l, err := w.allowed(col)
	if err != nil {
		notRead(res, err)
		return
	}
	limit := ec3.Limit(col, &w.engine.settings)
	i := w.first(l, limit)
	if i < 0 {
		i = w.best(l)
	}
	if i < 0 {
		refuse(res, &l.Refused[0], col)
		return
	}
	w.member.Assess(l.Candidates[i], &w.assess)
	w.fill(res)
	if !ec3.Passes(res.Utilisation, limit) {
		failed(res)
	}
}

// failed says of a result that its section does not pass and, where a rule
// does not cover the section under these actions, which.
func failed(res *design.Result) {
	res.Status = design.Fails
	if g := &res.Governing; g.Kind == design.Refused {
		res.Notes = append(res.Notes, fmt.Sprintf("%s %s: %s (%s)", res.Section, res.Grade, g.Reason, g.Clause))
	}
}

// givenIn returns the given section of a column in each of its grades, the
// weakest first. The error says what cannot be understood.
func (e *Engine) givenIn(col *design.Column) (*List, error) {
	families := or(col.Choice.Families, e.settings.Families)
	return e.listed(fmt.Sprintf("given %q %q %q", col.Given, families, col.Grades), func() (*List, error) {
		return e.newGiven(col, families)
	})
}

func (e *Engine) newGiven(col *design.Column, families []string) (*List, error) {
	s, err := e.find(col.Given, catalogue.FindOptions{ColdFormed: e.settings.ColdFormed, Families: families})
	if err != nil {
		return nil, err
	}
	grades, err := e.gradesOf(col.Grades)
	if err != nil {
		return nil, err
	}
	l := &List{}
	for _, g := range grades {
		l.add(s, g.Name, e.candidate(s, g))
	}
	l.tabulate(&e.settings)
	return l, nil
}

// find returns the section of a name. A given section need not be in the
// stock list that others are chosen from, and may be of the steel at hand.
func (e *Engine) find(name string, o catalogue.FindOptions) (*catalogue.Section, error) {
	s, err := e.catalogue.Find(name, o)
	if _, unknown := errors.AsType[*catalogue.UnknownSectionError](err); unknown {
		for _, c := range []*catalogue.Catalogue{e.AtHand, catalogue.Default()} {
			if c == nil {
				continue
			}
			if s, err := c.Find(name, o); err == nil {
				return s, nil
			}
		}
	}
	return s, err
}

// Section returns the section that a result names.
func (e *Engine) Section(name string) (*catalogue.Section, error) {
	return e.find(name, catalogue.FindOptions{})
}

// refuse fails a given section that the rules do not cover, with the reason.
func refuse(res *design.Result, r *Refused, col *design.Column) {
	res.Status = design.Fails
	weigh(res, r.Section, r.Grade, col)
	res.Utilisation = math.Inf(1)
	res.Governing = design.Check{Kind: design.Refused, Clause: r.Refusal.Clause, Reason: r.Refusal.Reason, To: col.Length, Utilisation: math.Inf(1)}
	res.Notes = append(res.Notes, fmt.Sprintf("%s %s: %s", res.Section, r.Grade, r.Refusal))
}
