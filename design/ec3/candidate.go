package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/material"
)

// Candidate is what section, grade and settings decide, whatever the member.
// For an angle, y and z in these names are the principal axes u and v.
type Candidate struct {
	Section *catalogue.Section
	Grade   material.Grade

	Fy               float64 // MPa
	Eps              float64 // sqrt(235/fy)
	GammaM0, GammaM1 float64

	Elements     []Element // in pure compression
	Class        int       // in pure compression
	AEff         float64   // mm2: A up to class 3
	WEffY, WEffZ float64   // mm3: effective moduli, each in bending about its axis alone; the elastic ones where nothing is slender
	NRk          float64   // AEff fy, N
	NplRd        float64   // A fy/gammaM0, N: resistance to tension
	NcRd         float64   // NRk/gammaM0, N

	CurveY, CurveZ Curve
	AlphaY, AlphaZ float64
	EulerY, EulerZ float64 // pi2 E I, N mm2

	Torsion TorsionRule
	GIt     float64 // N mm2
	EulerW  float64 // pi2 E Iw, N mm4
	Y0, Z0  float64 // shear centre from the centroid, along y and z (u and v), mm
	I0Sq    float64 // iy2 + iz2 + y0^2 + z0^2, mm2
}

// NewCandidate works out what the section in this grade can do under the
// settings. The error is a *Refusal where a rule does not cover it.
func NewCandidate(s *catalogue.Section, g material.Grade, set *design.Settings) (*Candidate, error) {
	fy, err := g.Fy(set.National.Strength, s)
	if err != nil {
		return nil, strengthRefusal(err)
	}
	c := &Candidate{Section: s, Grade: g, Fy: fy, Eps: Eps(fy),
		GammaM0: set.National.GammaM0, GammaM1: set.National.GammaM1}
	c.Elements = Elements(s, c.Eps)
	c.Class = worst(c.Elements)
	c.AEff = s.A
	if c.Class == 4 {
		area, refusal := effectiveArea(s, c.Elements, c.Eps)
		if refusal != nil {
			return nil, refusal
		}
		c.AEff = area
	}
	c.WEffY, c.WEffZ = c.effectiveModuli()
	y, z, refusal := Curves(s, g.Nominal)
	if refusal != nil {
		return nil, refusal
	}
	c.CurveY, c.CurveZ = y, z
	c.AlphaY, c.AlphaZ = y.Alpha(), z.Alpha()
	c.NRk = c.AEff * fy
	c.NplRd = s.A * fy / c.GammaM0
	c.NcRd = c.NRk / c.GammaM0
	c.stiffnesses()
	return c, nil
}

// stiffnesses fills what the critical loads need, from gross properties.
func (c *Candidate) stiffnesses() {
	s := c.Section
	const euler = math.Pi * math.Pi * design.E
	c.EulerY, c.EulerZ = euler*s.Iy, euler*s.Iz
	c.Y0 = s.Y0
	if s.Shape == catalogue.ShapeAngle {
		c.EulerY, c.EulerZ = euler*s.Iu, euler*s.Iv
		c.Y0, c.Z0 = s.U0, s.V0
	}
	c.GIt = design.G * s.It
	c.EulerW = euler * s.Iw
	c.I0Sq = (s.Iy+s.Iz)/s.A + c.Y0*c.Y0 + c.Z0*c.Z0
	c.Torsion = torsionRule(s, c.Y0, c.Z0)
}

// NplRk returns A fy, N, whatever the class.
func (c *Candidate) NplRk() float64 { return c.Section.A * c.Fy }
