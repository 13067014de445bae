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

// shearedModuli lowers the moduli, mm3, of a class for the shear force beside
// the moment. EN 1993-1-1:2005 6.2.8: I and H about y-y by (6.30); otherwise by
// the reduced strength of the shear area, which for a wall pair of area Av and
// thickness 2t takes away rho Av^2/(8t) and for flanges or a tube rho in full.
func (c *Candidate) shearedModuli(wy, wz, rhoZ, rhoY float64) (float64, float64) {
	s := c.Section
	avZ, avY := ShearAreas(s)
	switch s.Shape {
	case catalogue.ShapeI:
		aw := (s.H - 2*s.Tf) * s.Tw
		return wy - rhoZ*aw*aw/(4*s.Tw), wz * (1 - rhoY)
	case catalogue.ShapeRHS:
		return wy - rhoZ*avZ*avZ/(8*s.Tw), wz - rhoY*avY*avY/(8*s.Tw)
	}
	return wy * (1 - rhoZ), wz * (1 - rhoY)
}
