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

// buckle works out the resistance of a segment with the elastic critical load
// ncr, N, under a force nEd, N.
func (c *Candidate) buckle(s *Segment, nEd, ncr float64, curve Curve) design.Buckling {
	b := Reduce(c.NRk, ncr, c.GammaM1, curve)
	b.From, b.To, b.Combination, b.Lcr, b.NEd = s.From, s.To, s.Combination, s.Lcr, nEd
	return b
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

// buckling axes: the slots of an Assessment that a check about them fills.
const (
	axisY = iota
	axisZ
	axisT
)

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
			n := s.NEd + m.ownWeight(c.Section.Mass, s.From)
			a.keep(axis, kind, s, c.buckle(s, n, euler/(s.Lcr*s.Lcr), curve))
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
				a.keep(axis, kind, s, c.buckle(s, n, euler/(s.Lcr*s.Lcr), curve))
			}
		}
	}
}

// keep records a buckling check, and the values behind it where it is the
// worst of its axis so far. It reports whether it is. A segment in tension has
// no check; its resistance stands where there is no other.
func (a *Assessment) keep(axis int, kind design.Kind, s *Segment, b design.Buckling) bool {
	if b.NEd > 0 || a.Member.idle(b.Combination) {
		a.add(kind, "6.3.1.1(1)", b.Combination, b.From, b.To, max(b.NEd, 0), b.NbRd)
	}
	worst, from := &a.Y, &a.segY
	switch axis {
	case axisZ:
		worst, from = &a.Z, &a.segZ
	case axisT:
		worst, from = &a.T, &a.segT
	}
	u, most := b.Utilisation(), worst.Utilisation()
	if *from != nil && u <= most && (u > 0 || most > 0 || b.NbRd >= worst.NbRd) {
		return false
	}
	*worst, *from = b, s
	return true
}

// idle reports whether a combination has no axial force at all, so that its
// checks stand at utilisation 0.
func (m *Member) idle(combination int) bool {
	f := &m.Forces[combination]
	return f.Least == 0 && f.Greatest == 0
}
