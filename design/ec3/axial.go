package ec3

import "math"

// Axial holds the values of a candidate that the quick axial check reads, side
// by side so that a table of them runs through the cache.
type Axial struct {
	NcRd           float64 // N
	AlphaY, AlphaZ float64
	lambdaY        float64 // lambdaBar per mm of buckling length
	lambdaZ        float64
	perNbRk        float64 // gammaM1/NRk, 1/N
	nRk            float64 // N
	twistA         float64 // N_cr,T = twistA + twistB/L_T^2, of a doubly symmetric open section
	twistB         float64
	Mass           float64 // kg/m
	candidate      *Candidate
}

func newAxial(c *Candidate) Axial {
	x := Axial{
		NcRd: c.NcRd, AlphaY: c.AlphaY, AlphaZ: c.AlphaZ,
		lambdaY: math.Sqrt(c.NRk / c.EulerY), lambdaZ: math.Sqrt(c.NRk / c.EulerZ),
		perNbRk: c.GammaM1 / c.NRk, nRk: c.NRk, Mass: c.Section.Mass, candidate: c,
	}
	if c.Torsion == TorsionDoublySymmetric {
		x.twistA, x.twistB = c.GIt/c.I0Sq, c.EulerW/c.I0Sq
	}
	return x
}

// doubt is the width of the zone around a verdict in which the quick form
// leaves it to Assess: far wider than rounding and PassTolerance, and far too
// narrow to matter to speed.
const doubt = 1e-7

// Passes reports whether every check of the demand is within its limit: the
// verdict of Assess, without the values. It covers every shape; where the
// quick form cannot tell it asks Assess.
//
// The quick form turns (6.49) about. N_b,Rd reaches N_Ed where chi reaches
// w = N_Ed gammaM1/(limit N_Rk), and chi is the lesser root of
// lambdaBar^2 chi^2 - 2 Phi chi + 1 = 0, whose other root is above 1: the sign
// of that polynomial at w decides, and no square root is needed.
func (x *Axial) Passes(d *AxialDemand) bool {
	least := x.press(d)
	if least >= 0 {
		least = min(least, x.within(d.Z, d.inverse, x.lambdaZ, x.AlphaZ))
	}
	if least >= 0 {
		least = min(least, x.within(d.Y, d.inverse, x.lambdaY, x.AlphaY))
	}
	if least >= 0 {
		least = min(least, x.twist(d))
	}
	return least > 0 || least == 0 && Passes(x.Utilisation(d), d.Limit)
}

// Utilisation returns the greatest utilisation of the demand's member in the
// candidate, as Assess finds it.
func (x *Axial) Utilisation(d *AxialDemand) float64 {
	a := Assessment{quiet: true}
	d.member.Assess(x.candidate, &a)
	return a.Utilisation
}

// Candidate returns the candidate that the values belong to.
func (x *Axial) Candidate() *Candidate { return x.candidate }

// The verdicts below are positive where the force is within the resistance,
// negative where it is not, and 0 where it is too close to say, or where a
// rule applies that the quick form does not know.

// press is the verdict on the cross-section.
func (x *Axial) press(d *AxialDemand) int {
	least := within(d.Tension*d.inverse, x.candidate.NplRd)
	for i := range d.Press {
		p := &d.Press[i]
		least = min(least, within((p.N+p.Arm*x.Mass)*d.inverse, x.NcRd))
	}
	return least
}

func within(n, resistance float64) int {
	switch {
	case n > resistance*(1+doubt):
		return -1
	case n > resistance*(1-doubt):
		return 0
	}
	return 1
}

// within is the verdict on flexural buckling about an axis. For an angle, whose
// lengths about u-u and v-v are not shorter than these, a fail is a fail.
func (x *Axial) within(pulls []Pull, inverse, lambda, alpha float64) int {
	least := 1
	for i := range pulls {
		p := &pulls[i]
		v := x.verdict((p.N+p.Arm*x.Mass)*inverse, p.Lcr*lambda, alpha)
		if v < 0 {
			return v
		}
		least = min(least, v)
	}
	return least
}

// twist is the verdict on torsional buckling.
func (x *Axial) twist(d *AxialDemand) int {
	switch x.candidate.Torsion {
	case TorsionNone:
		return 1
	case TorsionDoublySymmetric:
	default:
		return 0
	}
	least := 1
	for i := range d.T {
		p := &d.T[i]
		lambdaBar := math.Sqrt(x.nRk / (x.twistA + x.twistB/(p.Lcr*p.Lcr)))
		least = min(least, x.verdict((p.N+p.Arm*x.Mass)*d.inverse, lambdaBar, x.AlphaZ))
	}
	return least
}

// verdict is that of a force n, divided by the limit, at a slenderness.
func (x *Axial) verdict(n, lambdaBar, alpha float64) int {
	w := n * x.perNbRk
	square := lambdaBar * lambdaBar
	f := w*(w*square-(1+alpha*(lambdaBar-0.2)+square)) + 1
	switch {
	case w > 1+doubt || f < -doubt:
		return -1
	case w < 1-doubt && f > doubt:
		return 1
	}
	return 0
}
