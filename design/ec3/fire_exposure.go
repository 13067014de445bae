package ec3

import (
	"math"

	"stanchion/catalogue"
)

// exposure fills A_m/V and the shadow factor.
func (f *fireAssessment) exposure() {
	s, fire := f.candidate.Section, &f.member.Column.Fire
	three := fire.Sides == 3
	f.result.SectionFactor = s.SectionFactor(catalogue.Exposure{ThreeSides: three, Boxed: fire.Boxed})
	f.result.ShadowFactor = f.member.Settings.ShadowFactor
	if f.result.ShadowFactor == 0 {
		f.result.ShadowFactor = ShadowFactor(s, three)
	}
}

// ShadowFactor returns k_sh. EN 1993-1-2:2005 4.2.5.1(2), (4.26a) for I
// sections under nominal fire actions, (4.26b) for the others; a hollow
// section has no shadow.
func ShadowFactor(s *catalogue.Section, three bool) float64 {
	e := catalogue.Exposure{ThreeSides: three}
	box := catalogue.Exposure{ThreeSides: three, Boxed: true}
	k := s.ExposedPerimeter(box) / s.ExposedPerimeter(e)
	switch s.Shape {
	case catalogue.ShapeCHS, catalogue.ShapeRHS:
		return 1
	case catalogue.ShapeI:
		k *= 0.9
	}
	return math.Min(k, 1)
}
