package working

import (
	"slices"

	"stanchion/design/ec3"
)

// outcome keeps every check, marks the governing one and keeps what bends the
// column in its combination.
func (w *writer) outcome() {
	s := w.sheet
	s.Checks = slices.Clone(w.a.Checks)
	for i := range s.Checks {
		if s.Checks[i] == w.a.Governing {
			s.Governing = i
			break
		}
	}
	s.Notes = slices.Concat(w.m.Notes, w.a.Notes())
	if my, mz := w.m.EndMoments(w.c, w.a.Governing.Combination); !my.Zero() || !mz.Zero() {
		s.Diagram = &Diagram{my, mz}
	}
}

// Chi returns the reduction factor of a buckling curve (a0, a, b, c, d) at a
// slenderness, for drawing the curve. EN 1993-1-1:2005 (6.49).
func Chi(curve string, lambdaBar float64) float64 {
	for c := ec3.CurveA0; c <= ec3.CurveD; c++ {
		if c.String() == curve {
			return ec3.Chi(c.Alpha(), lambdaBar)
		}
	}
	return 0
}
