package working

import "slices"

// outcome keeps every check and marks the governing one.
func (w *writer) outcome() {
	s := w.sheet
	s.Checks = slices.Clone(w.a.Checks)
	for i := range s.Checks {
		if s.Checks[i] == w.a.Governing {
			s.Governing = i
			break
		}
	}
	s.Notes = slices.Clone(w.m.Notes)
}
