package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// Reduce returns the slenderness and resistance to buckling of a member of
// characteristic resistance NRk (A fy, class 4 A_eff fy, N) with the elastic
// critical load ncr, N. EN 1993-1-1:2005 6.3.1.1 and 6.3.1.2.
func Reduce(nRk, ncr, gammaM1 float64, curve Curve) design.Buckling {
	b := design.Buckling{Ncr: ncr, Curve: curve.String(), Alpha: curve.Alpha()}
	b.LambdaBar = math.Sqrt(nRk / ncr) // (6.50), class 4 (6.51)
	b.Phi = Phi(b.Alpha, b.LambdaBar)
	b.Chi = Chi(b.Alpha, b.LambdaBar)
	b.NbRd = b.Chi * nRk / gammaM1 // (6.47), class 4 (6.48)
	return b
}

// resistance returns N_b,Rd, N, at the elastic critical load ncr, N: the same
// value as Reduce, without what leads to it.
func (c *Candidate) resistance(ncr float64, curve Curve) float64 {
	return Chi(curve.Alpha(), math.Sqrt(c.NRk/ncr)) * c.NRk / c.GammaM1
}

// assessFlexural checks flexural buckling of every segment about both axes.
func (m *Member) assessFlexural(c *Candidate, a *Assessment) {
	if c.Section.Shape == catalogue.ShapeAngle {
		m.assessPrincipal(c, a, axisY)
		m.assessPrincipal(c, a, axisZ)
		return
	}
	m.assessAxis(c, a, a.SegY, axisY)
	m.assessAxis(c, a, a.SegZ, axisZ)
}

// The buckling axes: the slots of an Assessment that a check about them fills.
const (
	axisY = iota
	axisZ
	axisT
)

// clauses of the buckling checks, by axis; the resistance is by 6.3.1.1(1) in
// every one.
var clauses = [...]string{axisY: "6.3.1.1(1)", axisZ: "6.3.1.1(1)", axisT: "6.3.1.4"}

func (c *Candidate) about(axis int) (euler float64, curve Curve, kind design.Kind) {
	if axis == axisY {
		return c.EulerY, c.CurveY, design.FlexuralY
	}
	return c.EulerZ, c.CurveZ, design.FlexuralZ
}

func (m *Member) assessAxis(c *Candidate, a *Assessment, segments []Segment, axis int) {
	euler, curve, kind := c.about(axis)
	for i := range segments {
		s := &segments[i]
		if s.Lcr > 0 {
			a.buckle(axis, kind, s, s.NEd+m.ownWeight(c.Section.Mass, s.From), euler/(s.Lcr*s.Lcr), curve)
		}
	}
}

// assessPrincipal checks an angle about u-u or v-v: wherever a y-y and a z-z
// segment overlap, with the longer of their buckling lengths and the greater
// of their forces.
func (m *Member) assessPrincipal(c *Candidate, a *Assessment, axis int) {
	euler, curve, kind := c.about(axis)
	for i := range a.SegY {
		y := &a.SegY[i]
		for j := range a.SegZ {
			z := &a.SegZ[j]
			if y.Combination != z.Combination || y.To <= z.From || z.To <= y.From {
				continue
			}
			s := y
			if z.Lcr > y.Lcr {
				s = z
			}
			if s.Lcr > 0 {
				n := max(y.NEd+m.ownWeight(c.Section.Mass, y.From), z.NEd+m.ownWeight(c.Section.Mass, z.From))
				a.buckle(axis, kind, s, n, euler/(s.Lcr*s.Lcr), curve)
			}
		}
	}
}

// slot returns where the worst buckling of an axis is kept.
func (a *Assessment) slot(axis int) (worst *design.Buckling, from **Segment) {
	switch axis {
	case axisY:
		return &a.Y, &a.segY
	case axisZ:
		return &a.Z, &a.segZ
	}
	return &a.T, &a.segT
}

// buckle checks a segment under a force nEd, N, with the elastic critical load
// ncr, N, and keeps the values behind it where it is the worst of its axis so
// far, which it reports. A segment in tension has no check; its resistance
// stands where there is no other.
func (a *Assessment) buckle(axis int, kind design.Kind, s *Segment, nEd, ncr float64, curve Curve) bool {
	c := a.Candidate
	nbRd := c.resistance(ncr, curve)
	if nEd > 0 || a.Member.idle(s.Combination) {
		a.add(kind, clauses[axis], s.Combination, s.From, s.To, max(nEd, 0), nbRd)
	}
	worst, from := a.slot(axis)
	u, most := max(nEd, 0)/nbRd, worst.Utilisation()
	if *from != nil && !exceeds(u, most) && (u > 0 || most > 0 || !exceeds(worst.NbRd, nbRd)) {
		return false
	}
	*worst, *from = Reduce(c.NRk, ncr, c.GammaM1, curve), s
	worst.From, worst.To, worst.Combination, worst.Lcr, worst.NEd = s.From, s.To, s.Combination, s.Lcr, nEd
	return true
}

// idle reports whether a combination has no axial force at all, so that its
// checks stand at utilisation 0.
func (m *Member) idle(combination int) bool {
	f := &m.Forces[combination]
	return f.Least == 0 && f.Greatest == 0
}
