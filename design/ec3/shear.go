package ec3

import (
	"math"

	"stanchion/catalogue"
)

// ShearAreas returns the shear areas along z-z (with the web) and y-y (with the
// flanges), mm2. EN 1993-1-1:2005 6.2.6(3), with eta = 1.0.
func ShearAreas(s *catalogue.Section) (avZ, avY float64) {
	hw := s.H - 2*s.Tf
	switch s.Shape {
	case catalogue.ShapeI:
		return math.Max(s.A-2*s.B*s.Tf+(s.Tw+2*s.R)*s.Tf, hw*s.Tw), s.A - hw*s.Tw
	case catalogue.ShapeRHS:
		return s.A * s.H / (s.B + s.H), s.A * s.B / (s.B + s.H)
	case catalogue.ShapeCHS:
		return 2 * s.A / math.Pi, 2 * s.A / math.Pi
	}
	return hw * s.Tw, 2 * s.B * s.Tf // not bent: no moments are taken on channels and angles
}

// VplRd returns the plastic shear resistance, N, of a shear area, mm2.
// EN 1993-1-1:2005 (6.18).
func VplRd(av, fy, gammaM0 float64) float64 { return av * fy / math.Sqrt(3) / gammaM0 }

// shearRho returns the reduction of the yield strength of the shear area, 0
// where the shear force is up to half its resistance. EN 1993-1-1:2005 6.2.8(3).
func shearRho(v, vplRd float64) float64 {
	if v <= vplRd/2 {
		return 0
	}
	r := 2*min(v, vplRd)/vplRd - 1
	return r * r
}

// VbwRd returns the resistance of webs to shear buckling, N, +Inf where they are
// too stocky for it: hw/t <= 72 eps. EN 1993-1-1:2005 6.2.6(6) and
// EN 1993-1-5:2006 5.2 and 5.3, with eta = 1: stiffeners at the ends alone
// ((5.5)), a non-rigid end post (Table 5.1), no contribution of the flanges.
func VbwRd(hw, t, webs, fy, eps, gammaM1 float64) float64 {
	if hw <= 72*eps*t {
		return math.Inf(1)
	}
	lambdaW := hw / (86.4 * t * eps)
	return min(1, 0.83/lambdaW) * webs * hw * t * fy / math.Sqrt(3) / gammaM1
}

// VcRd returns the resistances to shear along z-z and y-y, N: plastic, or less
// where webs buckle. EN 1993-1-1:2005 6.2.6(1) and (6).
func (c *Candidate) VcRd() (vz, vy float64) {
	s := c.Section
	avZ, avY := ShearAreas(s)
	vz, vy = VplRd(avZ, c.Fy, c.GammaM0), VplRd(avY, c.Fy, c.GammaM0)
	switch s.Shape {
	case catalogue.ShapeI:
		vz = min(vz, VbwRd(s.H-2*s.Tf, s.Tw, 1, c.Fy, c.Eps, c.GammaM1))
	case catalogue.ShapeRHS:
		vz = min(vz, VbwRd(s.H-2*s.Tw, s.Tw, 2, c.Fy, c.Eps, c.GammaM1))
		vy = min(vy, VbwRd(s.B-2*s.Tw, s.Tw, 2, c.Fy, c.Eps, c.GammaM1))
	}
	return vz, vy
}

// sheared lowers the moduli, mm3, and the resistance to axial force, N, of a
// cross-section for the shear forces beside them. EN 1993-1-1:2005 6.2.8 and
// 6.2.10(3): the strength of the shear area is (1 - rho) fy. Of the plastic
// modulus this takes rho Aw2/(4 tw) from I and H about y-y (6.30), rho Av2/(8t)
// from a pair of walls of area Av and thickness t, and rho in full from the
// flanges of I and H about z-z and from a tube; what is left counts up to the
// modulus of the class.
func (c *Candidate) sheared(x *Section629) {
	s := c.Section
	avZ, avY := ShearAreas(s)
	wy, wz := s.WplY, s.WplZ
	switch s.Shape {
	case catalogue.ShapeI:
		aw := (s.H - 2*s.Tf) * s.Tw
		wy -= x.RhoZ * aw * aw / (4 * s.Tw)
		wz -= x.RhoY * wz
	case catalogue.ShapeRHS:
		wy -= x.RhoZ * avZ * avZ / (8 * s.Tw)
		wz -= x.RhoY * avY * avY / (8 * s.Tw)
	default:
		wy -= x.RhoZ * wy
		wz -= x.RhoZ * wz
	}
	x.WY, x.WZ = keep(x.WY, wy), keep(x.WZ, wz)
	x.NplRd = keep(x.NplRd, x.NplRd-(x.RhoZ*avZ+x.RhoY*avY)*c.Fy/c.GammaM0)
}

// keep returns what shear leaves of a value: not more than the whole, and a
// thousandth of it where shear takes all, so that utilisations stay numbers; the
// check of shear has failed then.
func keep(whole, left float64) float64 { return max(whole/1000, min(whole, left)) }
