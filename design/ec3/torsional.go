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
// (y0/i0)2. Timoshenko and Gere art. 5.6; Access Steel NCCI SN001a.
func ncrSymmetric(ncrY, ncrT, q float64) float64 {
	r := ncrT / ncrY
	return ncrY / (2 * (1 - q)) * (1 + r - math.Sqrt((1-r)*(1-r)+4*q*r))
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
