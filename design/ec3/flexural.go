package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// buckle works out the resistance of a segment. EN 1993-1-1:2005 6.3.1.1 and
// 6.3.1.2.
func (c *Candidate) buckle(s *Segment, nEd, ncr float64, curve Curve) design.Buckling {
	b := design.Buckling{From: s.From, To: s.To, Combination: s.Combination, Lcr: s.Lcr, How: s.How,
		Ncr: ncr, Curve: curve.String(), Alpha: curve.Alpha(), NEd: nEd}
	b.LambdaBar = math.Sqrt(c.NRk / ncr) // (6.50), class 4 (6.51)
	b.Phi = Phi(b.Alpha, b.LambdaBar)
	b.Chi = Chi(b.Alpha, b.LambdaBar)
	b.NbRd = b.Chi * c.NRk / c.GammaM1 // (6.47), class 4 (6.48)
	return b
}

// assessFlexural checks flexural buckling of every segment about both axes.
func (m *Member) assessFlexural(c *Candidate, a *Assessment) {
	if c.Section.Shape == catalogue.ShapeAngle {
		m.assessPrincipal(c, a, design.FlexuralY)
		m.assessPrincipal(c, a, design.FlexuralZ)
		return
	}
	for i := range m.Y {
		s := &m.Y[i]
		a.keep(&a.Y, design.FlexuralY, c.buckle(s, s.NEd+m.ownWeight(c, s.From), c.EulerY/(s.Lcr*s.Lcr), c.CurveY))
	}
	for i := range m.Z {
		s := &m.Z[i]
		a.keep(&a.Z, design.FlexuralZ, c.buckle(s, s.NEd+m.ownWeight(c, s.From), c.EulerZ/(s.Lcr*s.Lcr), c.CurveZ))
	}
}

// assessPrincipal checks an angle about u-u or v-v: wherever a y-y and a z-z
// segment overlap, with the longer of their buckling lengths and the greater
// of their forces.
func (m *Member) assessPrincipal(c *Candidate, a *Assessment, kind design.Kind) {
	euler, curve, worst := c.EulerY, c.CurveY, &a.Y
	if kind == design.FlexuralZ {
		euler, curve, worst = c.EulerZ, c.CurveZ, &a.Z
	}
	for i := range m.Y {
		for j := range m.Z {
			y, z := &m.Y[i], &m.Z[j]
			if y.Combination != z.Combination || y.To <= z.From || z.To <= y.From {
				continue
			}
			s := *y
			if z.Lcr > y.Lcr {
				s = *z
			}
			n := max(y.NEd+m.ownWeight(c, y.From), z.NEd+m.ownWeight(c, z.From))
			a.keep(worst, kind, c.buckle(&s, n, euler/(s.Lcr*s.Lcr), curve))
		}
	}
}

// keep records a buckling check, and the values behind it where it is the
// worst of its axis so far.
func (a *Assessment) keep(worst *design.Buckling, kind design.Kind, b design.Buckling) {
	if b.NEd > 0 || a.noCompression(b.Combination) {
		a.add(kind, "6.3.1.1(1)", b.Combination, b.From, b.To, max(b.NEd, 0), b.NbRd)
	}
	u, least := b.Utilisation(), worst.Utilisation()
	if worst.NbRd == 0 || u > least || u == least && u == 0 && b.NbRd < worst.NbRd {
		*worst = b
	}
}

// noCompression reports whether a combination has neither compression nor
// tension, so that a check at utilisation 0 stands for it.
func (a *Assessment) noCompression(combination int) bool {
	f := &a.Member.Forces[combination]
	return f.Least == 0 && f.Greatest == 0
}
