package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// HotColumn is a column in compression whose temperature is the same all over.
// EN 1993-1-2:2005 4.2.3.2.
type HotColumn struct {
	LambdaBar float64 // at 20 C, over the buckling length in fire, gross section
	Alpha     float64 // imperfection: 0.65 sqrt(235/fy)
}

// HotState is a hot column at one temperature.
type HotState struct {
	Ky, KE float64 // Table 3.1
	Lambda float64 // lambdaBar_theta
	Phi    float64
	Chi    float64 // chi_fi
}

// FireAlpha returns the imperfection factor in fire, fy in MPa.
// EN 1993-1-2:2005 4.2.3.2(2).
func FireAlpha(fy float64) float64 { return 0.65 * math.Sqrt(235/fy) }

// At returns the column at a steel temperature, C. Nothing buckles at 1200 C,
// where no strength is left: chi_fi is that of the ratio just below.
func (h HotColumn) At(theta float64) HotState {
	s := HotState{Ky: Ky(theta), KE: KE(theta)}
	ratio := 1.0
	if s.KE > 0 {
		ratio = s.Ky / s.KE
	}
	s.Lambda = h.LambdaBar * math.Sqrt(ratio)                      // (4.7)
	s.Phi = 0.5 * (1 + h.Alpha*s.Lambda + s.Lambda*s.Lambda)       // 4.2.3.2(2)
	s.Chi = 1 / (s.Phi + math.Sqrt(s.Phi*s.Phi-s.Lambda*s.Lambda)) // (4.6)
	return s
}

// fireMode is one way of buckling in fire, of one segment in one combination.
type fireMode struct {
	kind    design.Kind
	segment *Segment
	nEd     float64 // in fire, N
	ncr     float64 // at 20 C, N
	curve   Curve   // at ambient temperature
	column  HotColumn
}

// modes lists every way of buckling in fire, in the order of the ambient
// checks.
func (f *fireAssessment) modes() []fireMode {
	var modes []fireMode
	c, m, a := f.candidate, &f.hot, &f.segment
	add := func(kind design.Kind, s *Segment, n, ncr float64, curve Curve) {
		if n = f.result.LoadRatio * n; n > 0 {
			modes = append(modes, fireMode{kind, s, n, ncr, curve,
				HotColumn{math.Sqrt(c.NplRk() / ncr), FireAlpha(c.Fy)}})
		}
	}
	force := func(s *Segment) float64 { return s.NEd + m.ownWeight(c.Section.Mass, s.From) }
	for axis, segments := range [][]Segment{a.SegY, a.SegZ} {
		euler, curve, kind := c.about(axis)
		for i := range segments {
			s := &segments[i]
			if c.Section.Shape == catalogue.ShapeAngle {
				// Principal axes: the longest of the lengths that overlap.
				lcr := math.Max(longest(a.SegY, s), longest(a.SegZ, s))
				add(kind, s, force(s), euler/(lcr*lcr), curve)
			} else if s.Lcr > 0 {
				add(kind, s, force(s), euler/(s.Lcr*s.Lcr), curve)
			}
		}
	}
	if c.Torsion == TorsionNone {
		return modes
	}
	for i := range a.SegT {
		s := &a.SegT[i]
		_, ncr, kind := m.twisting(c, a, s)
		add(kind, s, force(s), ncr, c.CurveZ)
	}
	return modes
}
