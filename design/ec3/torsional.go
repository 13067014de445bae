package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// TorsionRule says how a section buckles by twisting.
type TorsionRule uint8

// The rules of torsional buckling.
const (
	TorsionNone            TorsionRule = iota // closed sections
	TorsionDoublySymmetric                    // torsional buckling on its own
	TorsionSymmetricY                         // coupled with flexure about y-y (u-u), the axis of symmetry
	TorsionGeneral                            // coupled with flexure about both axes
)

// torsionRule returns the rule for a section with its shear centre at y0, z0
// from the centroid.
func torsionRule(s *catalogue.Section, y0, z0 float64) TorsionRule {
	switch s.Shape {
	case catalogue.ShapeCHS, catalogue.ShapeRHS:
		return TorsionNone
	case catalogue.ShapeI:
		return TorsionDoublySymmetric
	case catalogue.ShapeAngle:
		if math.Abs(z0) > 1e-6*math.Abs(y0) {
			return TorsionGeneral
		}
	}
	return TorsionSymmetricY
}

// Kind returns the check that the rule stands for.
func (r TorsionRule) Kind() design.Kind {
	switch r {
	case TorsionNone:
		return design.KindNone
	case TorsionDoublySymmetric:
		return design.Torsional
	}
	return design.TorsionalFlexural
}

// NcrT returns the elastic critical load for torsional buckling, N, over the
// length LT, mm. EN 1993-1-1:2005 6.3.1.4 leaves it to the theory of
// elasticity: Timoshenko and Gere, Theory of Elastic Stability, art. 5.5.
func (c *Candidate) NcrT(LT float64) float64 {
	return (c.GIt + c.EulerW/(LT*LT)) / c.I0Sq
}

// NcrTF returns the elastic critical load for torsional-flexural buckling, N,
// from the loads of flexure about y-y and z-z (u-u and v-v) and of torsion.
// For doubly symmetric sections it is the torsional load, and where the
// coupled flexure cannot happen (an infinite load) too.
func (c *Candidate) NcrTF(ncrY, ncrZ, ncrT float64) float64 {
	switch {
	case math.IsInf(ncrY, 1):
		return ncrT
	case c.Torsion == TorsionSymmetricY:
		return ncrSymmetric(ncrY, ncrT, c.Y0*c.Y0/c.I0Sq)
	case c.Torsion == TorsionGeneral:
		return ncrGeneral(ncrY, ncrZ, ncrT, c.Y0*c.Y0/c.I0Sq, c.Z0*c.Z0/c.I0Sq)
	}
	return ncrT
}

// ncrSymmetric is the closed form for a section symmetric about y-y, q being
// (y0/i0)2 and beta = 1 - q:
//
//	N_cr,TF = N_cr,y/(2 beta) (1 + r - sqrt((1 - r)2 + 4 q r)), r = N_cr,T/N_cr,y.
//
// Timoshenko and Gere art. 5.6; Access Steel NCCI SN001a. It is multiplied out
// with the conjugate, so that no figures are lost where r is large.
func ncrSymmetric(ncrY, ncrT, q float64) float64 {
	r := ncrT / ncrY
	return 2 * ncrT / (1 + r + math.Sqrt((1-r)*(1-r)+4*q*r))
}

// ncrGeneral returns the least root N of the general equation of
// torsional-flexural buckling,
//
//	(N - Ny)(N - Nz)(N - NT) - N2 qy (N - Nz) - N2 qz (N - Ny) = 0,
//
// with qy = (y0/i0)2 and qz = (z0/i0)2: flexure about y-y moves the section
// along z, as twist does where the shear centre lies off along y, so that Ny
// couples with y0 and Nz with z0. Timoshenko and Gere, Theory of Elastic
// Stability, art. 5.6.
//
// It is solved for x = 1/N, of which the greatest is wanted: with a = 1/Ny,
// b = 1/Nz and c = 1/NT,
//
//	(x - a)(x - b)(x - c) - a c qy (x - b) - b c qz (x - a) = 0,
//
// the characteristic equation of a symmetric matrix. Its three roots are real,
// and the trigonometric solution of the cubic gives the greatest.
func ncrGeneral(ny, nz, nt, qy, qz float64) float64 {
	a, b, c := 1/ny, 1/nz, 1/nt
	u, v := a*c*qy, b*c*qz // squares of the coupling terms
	mean := (a + b + c) / 3
	da, db, dc := a-mean, b-mean, c-mean
	spread := math.Sqrt((da*da + db*db + dc*dc + 2*(u+v)) / 6)
	if spread < 1e-12*mean {
		return 1 / mean
	}
	half := (da*db*dc - u*db - v*da) / (2 * spread * spread * spread)
	angle := math.Acos(max(-1, min(1, half))) / 3
	x := mean + 2*spread*math.Cos(angle)
	// Two nearly equal roots cost half the figures: Newton's steps from above
	// the greatest root, on the equation as it stands, bring them back.
	x *= 1 + 1e-7
	for range 12 {
		f := (x-a)*(x-b)*(x-c) - u*(x-b) - v*(x-a)
		slope := (x-a)*(x-b) + (x-b)*(x-c) + (x-c)*(x-a) - u - v
		next := x - f/slope
		if !(f > 0 && slope > 0 && next < x) {
			break
		}
		x = next
	}
	return 1 / x
}

// NcrD returns the elastic critical load, N, of a doubly symmetric section
// that is made to turn about a line parallel to its axis at the distance e,
// mm, from the shear centre along z-z, over the length LT, mm, between points
// where the twist is held:
//
//	N_cr,D = (G It + pi2 E (Iw + Iz e2)/L_T2)/(i0^2 + e2).
//
// Timoshenko and Gere, Theory of Elastic Stability, 2nd ed., art. 5.7, buckling
// about an enforced axis of rotation. The line is held all along in that
// theory; held at points it is held less well, by up to about 7 % in N_cr where
// the flexural load between the points is close to N_cr,D.
func (c *Candidate) NcrD(LT, e float64) float64 {
	return (c.GIt + (c.EulerW+c.EulerZ*e*e)/(LT*LT)) / (c.I0Sq + e*e)
}
