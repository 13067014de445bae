package ec3

import (
	"math"

	"stanchion/catalogue"
)

// Curve is a buckling curve of EN 1993-1-1:2005 Table 6.1.
type Curve uint8

// The buckling curves.
const (
	CurveA0 Curve = iota
	CurveA
	CurveB
	CurveC
	CurveD
)

// String returns the curve's letter.
func (c Curve) String() string { return [...]string{"a0", "a", "b", "c", "d"}[c] }

// Alpha returns the imperfection factor. EN 1993-1-1:2005 Table 6.1.
func (c Curve) Alpha() float64 { return [...]float64{0.13, 0.21, 0.34, 0.49, 0.76}[c] }

// Curves returns the buckling curves about y-y and z-z of a section of nominal
// strength 235 to 460 MPa. EN 1993-1-1:2005 Table 6.2. S460 has its own
// column; every other grade of the standard is in the other.
func Curves(s *catalogue.Section, nominal int) (y, z Curve, refusal *Refusal) {
	high := nominal >= 460
	pick := func(common, s460 Curve) Curve {
		if high {
			return s460
		}
		return common
	}
	switch s.Shape {
	case catalogue.ShapeI:
		slender := s.H/s.B > 1.2
		switch {
		case slender && s.Tf <= 40:
			return pick(CurveA, CurveA0), pick(CurveB, CurveA0), nil
		case slender && s.Tf <= 100:
			return pick(CurveB, CurveA), pick(CurveC, CurveA), nil
		case slender:
			return 0, 0, &Refusal{"Table 6.2", "there is no buckling curve for a rolled section with h/b > 1.2 and t_f > 100 mm"}
		case s.Tf <= 100:
			return pick(CurveB, CurveA), pick(CurveC, CurveA), nil
		}
		return pick(CurveD, CurveC), pick(CurveD, CurveC), nil
	case catalogue.ShapeCHS, catalogue.ShapeRHS:
		if s.Finish == catalogue.ColdFormed {
			return CurveC, CurveC, nil
		}
		return pick(CurveA, CurveA0), pick(CurveA, CurveA0), nil
	case catalogue.ShapeAngle:
		return CurveB, CurveB, nil
	}
	return CurveC, CurveC, nil // channels, and by the same row tees and solid sections
}

// Phi returns the value of EN 1993-1-1:2005 6.3.1.2(1) behind (6.49).
func Phi(alpha, lambdaBar float64) float64 {
	return 0.5 * (1 + alpha*(lambdaBar-0.2) + lambdaBar*lambdaBar)
}

// Chi returns the reduction factor of EN 1993-1-1:2005 (6.49), which is 1 up
// to a slenderness of 0.2.
func Chi(alpha, lambdaBar float64) float64 {
	if lambdaBar <= 0.2 {
		return 1
	}
	phi := Phi(alpha, lambdaBar)
	return min(1, 1/(phi+math.Sqrt(phi*phi-lambdaBar*lambdaBar)))
}
