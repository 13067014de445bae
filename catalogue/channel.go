package catalogue

import "math"

// channelProperties computes the properties of a parallel-flange channel,
// symmetric about y-y, with root fillets of radius r.
func channelProperties(s *Section) Properties {
	h, b, tw, tf, r := s.H, s.B, s.Tw, s.Tf, s.R
	hw := h - 2*tf
	t := sum(
		rectangle(0, tw, -h/2, h/2),
		rectangle(tw, b, -h/2, -h/2+tf),
		rectangle(tw, b, h/2-tf, h/2),
		fillet(tw, hw/2, 1, -1, r, 1),
		fillet(tw, -hw/2, 1, 1, r, 1),
	)
	p := Properties{
		A: t.A, Iy: t.Iyy, Iz: t.Izz, Cz: t.y,
		WelY: 2 * t.Iyy / h, WelZ: t.Izz / (b - t.y),
		WplY:      b*tf*(h-tf) + tw*hw*hw/4 + 2*filletArea*r*r*(hw/2-filletCentroid*r),
		WplZ:      channelWplZ(s),
		It:        channelTorsion(s),
		Perimeter: 4*b + 2*h - 2*tw - (4-math.Pi)*r,
	}
	p.principalAreYZ()
	hs := h - tf
	// Expression of the UK section tables (SCI P363), from memory.
	p.Iw = hs * hs / 4 * (p.Iz - p.A*square(p.Cz-tw/2)*(hs*hs*p.A/(4*p.Iy)-1))
	p.Y0 = p.Cz - tw/2 + channelShearCentre(s)
	return p
}

// channelShearCentre is the distance of the shear centre beyond the middle line
// of the web: 3 b^2 tf/(6 b tf + hs tw) on the middle lines of a thin-walled
// channel (Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., art. 5.3,
// from memory). The European tables print it; the UK tables print
// hs^2 A (cz - tw/2)/(4 Iy), 1 % of y0 less; both are outside the one of
// St Venant's theory, by up to 3 % of y0, which lowers the critical force.
func channelShearCentre(s *Section) float64 {
	b, hs := s.B-s.Tw/2, s.H-s.Tf
	return 3 * b * b * s.Tf / (6*b*s.Tf + hs*s.Tw)
}

// channelTorsion is the expression of El Darwish and Johnston (1965) for
// channels, which the UK tables follow.
func channelTorsion(s *Section) float64 {
	h, b, tw, tf, r := s.H, s.B, s.Tw, s.Tf, s.R
	d := 2 * (3*r + tw + tf - math.Sqrt(2*(2*r+tw)*(2*r+tf)))
	alpha := -0.0908 + 0.2621*tw/tf + 0.1231*r/tf - 0.0752*tw*r/(tf*tf) - 0.0945*square(tw/tf)
	return 2.0/3*b*cube(tf) + (h-2*tf)*cube(tw)/3 + 2*alpha*math.Pow(d, 4) - 0.420*math.Pow(tf, 4)
}

// channelWplZ is the first moment of area about the axis parallel to the web
// that halves the area, exactly.
func channelWplZ(s *Section) float64 {
	first, whole := firstMomentBeyond(s, 0)
	y := whole / (2 * s.H) // where the web alone holds half of the area
	if y > s.Tw {
		lo, hi := s.Tw, s.B
		for range 60 { // bisection to rounding
			y = (lo + hi) / 2
			if _, beyond := firstMomentBeyond(s, y); beyond > whole/2 {
				lo = y
			} else {
				hi = y
			}
		}
	}
	outside, _ := firstMomentBeyond(s, y)
	return 2*outside - first // the halves' areas cancel
}

// firstMomentBeyond returns the first moment, about the back of the web, and
// the area of what a channel has beyond a distance y from that back.
func firstMomentBeyond(s *Section, y float64) (first, area float64) {
	add := func(from, to, depth float64) {
		if from < to {
			area += depth * (to - from)
			first += depth * (to*to - from*from) / 2
		}
	}
	add(y, s.Tw, s.H-2*s.Tf)
	add(y, s.B, 2*s.Tf)
	// Both fillets have the depth 2 (r - sqrt(r^2 - u^2)) at the distance u
	// from where they run out on the flange.
	end := s.Tw + s.R
	u := min(s.R, end-y)
	if u <= 0 {
		return first, area
	}
	chord := math.Sqrt(max(0, s.R*s.R-u*u))
	sector := (u*chord + s.R*s.R*math.Asin(u/s.R)) / 2 // integral of the chord
	fillets := 2 * (s.R*u - sector)
	byU := 2 * (s.R*u*u/2 - (cube(s.R)-cube(chord))/3) // its moment about u = 0
	return first + end*fillets - byU, area + fillets
}
