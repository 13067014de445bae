package catalogue

import (
	"math"

	"gonum.org/v1/gonum/integrate/quad"
)

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
		WplZ:      channelWplZ(s, t.A),
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
// from memory).
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

// channelWplZ is the first moment about the axis parallel to the web that
// halves the area.
func channelWplZ(s *Section, a float64) float64 {
	depth := func(y float64) float64 {
		switch {
		case y < s.Tw:
			return s.H
		case y < s.Tw+s.R:
			u := s.R - (y - s.Tw)
			return 2 * (s.Tf + s.R - math.Sqrt(s.R*s.R-u*u))
		default:
			return 2 * s.Tf
		}
	}
	// Integrals between the breaks of the outline; within the fillet the arc
	// has a vertical tangent, for which 200 points leave under 1e-5 of it.
	integral := func(f func(float64) float64, from, to float64) float64 {
		total := 0.0
		breaks := []float64{0, s.Tw, s.Tw + s.R, s.B}
		for i := range 3 {
			lo, hi := max(from, breaks[i]), min(to, breaks[i+1])
			if lo < hi {
				total += quad.Fixed(f, lo, hi, 200, nil, 0)
			}
		}
		return total
	}
	lo, hi := 0.0, s.B
	for range 60 { // bisection to rounding
		mid := (lo + hi) / 2
		if integral(depth, 0, mid) < a/2 {
			lo = mid
		} else {
			hi = mid
		}
	}
	return integral(func(y float64) float64 { return depth(y) * math.Abs(y-lo) }, 0, lo) +
		integral(func(y float64) float64 { return depth(y) * math.Abs(y-lo) }, lo, s.B)
}
