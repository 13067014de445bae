package ec3

import (
	"math"

	"stanchion/catalogue"
)

// exposure fills A_m/V and the shadow factor.
func (f *fireAssessment) exposure() {
	s, fire := f.candidate.Section, &f.member.Column.Fire
	three := fire.Sides == 3
	f.result.SectionFactor = SectionFactor(s, three, fire.Boxed)
	f.result.ShadowFactor = f.member.Settings.ShadowFactor
	if f.result.ShadowFactor == 0 {
		f.result.ShadowFactor = ShadowFactor(s, three)
	}
}

// SectionFactor returns A_m/V of a section in 1/m: of the profile, or of the
// box about it, exposed all round or on three sides, the fourth being the
// outside of a flange (the side b of a rectangular hollow section).
// EN 1993-1-2:2005 Tables 4.2 and 4.3. A circular hollow section has no side
// that could be covered, and a casing follows it.
func SectionFactor(s *catalogue.Section, three, boxed bool) float64 {
	surface := s.Perimeter
	round := s.Shape == catalogue.ShapeCHS
	if boxed && !round {
		surface = 2 * (s.H + s.B)
	}
	if three && !round {
		surface -= s.B
	}
	return surface / s.A * 1000
}

// ShadowFactor returns k_sh. EN 1993-1-2:2005 4.2.5.1(2), (4.26a) for I
// sections under nominal fire actions, (4.26b) for the others; a hollow
// section has no shadow.
func ShadowFactor(s *catalogue.Section, three bool) float64 {
	k := SectionFactor(s, three, true) / SectionFactor(s, three, false)
	switch s.Shape {
	case catalogue.ShapeCHS, catalogue.ShapeRHS:
		return 1
	case catalogue.ShapeI:
		k *= 0.9
	}
	return math.Min(k, 1)
}
