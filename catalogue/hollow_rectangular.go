package catalogue

import "math"

// cornerRadii are those that EN 10210-2 and EN 10219-2 take for section
// properties, mm: hot finished 1.5 t outside and 1.0 t inside; cold formed 2.0 t
// up to 6 mm, 2.5 t up to 10 mm and 3.0 t above, inside less t.
func cornerRadii(f Finish, t float64) (outer, inner float64) {
	if f != ColdFormed {
		return 1.5 * t, t
	}
	switch {
	case t <= 6:
		outer = 2 * t
	case t <= 10:
		outer = 2.5 * t
	default:
		outer = 3 * t
	}
	return outer, outer - t
}

// rhsProperties computes the properties of a square or rectangular hollow
// section from its outer and inner outlines (EN 10210-2 and EN 10219-2, Annex B).
func rhsProperties(s *Section) Properties {
	h, b, t, ro, ri := s.H, s.B, s.Tw, s.R, s.R2
	ao, iyo, wyo := rounded(h, b, ro)
	ai, iyi, wyi := rounded(h-2*t, b-2*t, ri)
	_, izo, wzo := rounded(b, h, ro)
	_, izi, wzi := rounded(b-2*t, h-2*t, ri)
	p := Properties{
		A: ao - ai, Iy: iyo - iyi, Iz: izo - izi,
		WplY: wyo - wyi, WplZ: wzo - wzi,
		Perimeter: 2*(h+b) - (8-2*math.Pi)*ro,
	}
	p.WelY, p.WelZ = 2*p.Iy/h, 2*p.Iz/b
	p.It, p.Wt = hollowTorsion(s)
	p.principalAreYZ()
	return p
}

// rounded returns the area, second moment and plastic modulus, about the axis
// that halves h, of a filled rectangle with corners of radius r.
func rounded(h, b, r float64) (a, i, w float64) {
	af, ef := filletArea*r*r, filletCentroid*r
	a = h*b - 4*af
	i = b*cube(h)/12 - 4*(filletInertia*math.Pow(r, 4)+af*square(h/2-ef))
	w = b*h*h/4 - 4*af*(h/2-ef)
	return a, i, w
}

// hollowTorsion returns the torsion constant and the torsional modulus of
// EN 10210-2 and EN 10219-2, Annex B: It = t^3 h/3 + 2 K Ah, Wt = It/(t + K/t),
// K = 2 Ah t/h, with h the length and Ah the area of the middle line.
func hollowTorsion(s *Section) (it, wt float64) {
	t := s.Tw
	rc := (s.R + s.R2) / 2
	length := 2*((s.B-t)+(s.H-t)) - 2*rc*(4-math.Pi)
	area := (s.B-t)*(s.H-t) - rc*rc*(4-math.Pi)
	k := 2 * area * t / length
	it = cube(t)*length/3 + 2*k*area
	return it, it / (t + k/t)
}
