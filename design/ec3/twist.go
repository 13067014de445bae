package ec3

// assessTwist checks torsional or torsional-flexural buckling of every length
// between torsion restraints. It uses the curve about z-z.
// EN 1993-1-1:2005 6.3.1.4.
func (m *Member) assessTwist(c *Candidate, a *Assessment) {
	if c.Torsion == TorsionNone {
		return
	}
	a.HasT, a.TKind = true, c.Torsion.Kind()
	for i := range m.T {
		s := &m.T[i]
		ncr := c.NcrTF(c.EulerY/(s.LcrY*s.LcrY), c.EulerZ/(s.LcrZ*s.LcrZ), c.NcrT(s.Lcr))
		a.keep(&a.T, a.TKind, c.buckle(&s.Segment, s.NEd+m.ownWeight(c, s.From), ncr, c.CurveZ))
	}
}
