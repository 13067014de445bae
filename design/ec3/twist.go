package ec3

import (
	"stanchion/catalogue"
	"stanchion/design"
)

// Twist holds the values behind a torsional or torsional-flexural critical
// load.
type Twist struct {
	LT         float64 // torsional buckling length, mm
	NcrT       float64 // torsional, N
	LcrY, LcrZ float64 // flexural buckling lengths coupled with it (u-u and v-v of an angle), mm; 0: not coupled
	NcrY, NcrZ float64 // flexural, N; 0: not coupled
	E          float64 // distance of an enforced axis of rotation from the shear centre, mm; 0: none
}

// assessTwist checks torsional, torsional-flexural or restrained-axis buckling
// of every length between torsion restraints. It uses the curve about z-z.
// EN 1993-1-1:2005 6.3.1.4.
func (m *Member) assessTwist(c *Candidate, a *Assessment) {
	if c.Torsion == TorsionNone {
		return
	}
	if m.Eccentric() && c.Torsion != TorsionDoublySymmetric {
		a.refuse("6.3.1.4", "z-z held off the shear centre without the twist being held is covered for I and H sections alone")
	}
	a.HasT = true
	for i := range a.SegT {
		s := &a.SegT[i]
		t, ncr, kind := m.twisting(c, a, s)
		n := s.NEd + m.ownWeight(c.Section.Mass, s.From)
		if a.buckle(axisT, kind, s, n, ncr, c.CurveZ) {
			a.Twist, a.TKind = t, kind
		}
	}
}

// twisting finds the critical load of a length between torsion restraints.
func (m *Member) twisting(c *Candidate, a *Assessment, s *Segment) (t Twist, ncr float64, kind design.Kind) {
	t = Twist{LT: s.Lcr, NcrT: c.NcrT(s.Lcr)}
	if c.Torsion == TorsionDoublySymmetric {
		if t.E = m.enforced(c, s); t.E > 0 {
			return t, c.NcrD(s.Lcr, t.E), design.RestrainedAxis
		}
		return t, t.NcrT, design.Torsional
	}
	t.LcrY = longest(a.SegY, s)
	if c.Section.Shape == catalogue.ShapeAngle {
		t.LcrY = max(t.LcrY, longest(a.SegZ, s))
		t.LcrZ = t.LcrY
		t.NcrZ = c.EulerZ / (t.LcrZ * t.LcrZ)
	}
	t.NcrY = c.EulerY / (t.LcrY * t.LcrY)
	return t, c.NcrTF(t.NcrY, t.NcrZ, t.NcrT), design.TorsionalFlexural
}

// longest returns the greatest buckling length of the segments that overlap
// another in its combination.
func longest(segments []Segment, of *Segment) float64 {
	lcr := 0.0
	for i := range segments {
		s := &segments[i]
		if s.Combination == of.Combination && s.From < of.To && s.To > of.From {
			lcr = max(lcr, s.Lcr)
		}
	}
	return lcr
}

// enforced returns the distance from the shear centre, mm, of the line about
// which a length between torsion restraints is made to turn: z-z is held there,
// inside the length. It returns 0 where nothing holds z-z inside it.
func (m *Member) enforced(c *Candidate, s *Segment) float64 {
	if !m.Eccentric() {
		return 0
	}
	z := &m.Column.Z
	held := z.Lcr > 0 && z.Lcr < s.Lcr || z.Lcr == 0 && z.K > 0 && z.K*m.Length < s.Lcr
	for _, x := range z.Restraints {
		held = held || x > s.From && x < s.To
	}
	switch {
	case !held:
		return 0
	case m.Column.Torsion.EccentricFlange:
		return c.Section.H / 2
	}
	return max(m.Column.Torsion.Eccentric, -m.Column.Torsion.Eccentric)
}
