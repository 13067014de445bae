package working

import (
	"stanchion/design"
	"stanchion/design/ec3"
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
