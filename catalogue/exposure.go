package catalogue

// Exposure says what of a section a fire or a coat reaches.
type Exposure struct {
	// ThreeSides: one side of width b is covered, the outside of a flange (the
	// shorter leg of an angle); otherwise the section is exposed all round.
	ThreeSides bool
	// Boxed: the surface is that of the rectangular casing about the section.
	Boxed bool
}

// ExposedPerimeter returns the exposed surface per length, mm2/mm: of the
// profile or of its box, on four sides or three. EN 1993-1-2:2005 Tables 4.2
// and 4.3. A circular hollow section has no side that could be covered, and a
// casing follows it.
func (s *Section) ExposedPerimeter(e Exposure) float64 {
	if s.Shape == ShapeCHS {
		return s.Perimeter
	}
	surface := s.Perimeter
	if e.Boxed {
		surface = 2 * (s.H + s.B)
	}
	if e.ThreeSides {
		surface -= s.B
	}
	return surface
}

// SectionFactor returns A_m/V, 1/m, of the profile or of its box ([A_m/V]_b).
// EN 1993-1-2:2005 Tables 4.2 and 4.3.
func (s *Section) SectionFactor(e Exposure) float64 {
	return s.ExposedPerimeter(e) / s.A * 1000
}
