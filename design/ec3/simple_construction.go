package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// Simple holds the values behind the criterion of columns in simple
// construction in one combination. Access Steel NCCI SN048.
type Simple struct {
	Combination         int
	Class               int     // under N_Ed with the moments
	NEd                 float64 // N
	NbyRd, NbMinRd      float64 // about y-y; the lesser of that and about z-z, N
	MyEd, MzEd          float64 // greatest, N mm
	PsiY, PsiZ          float64
	MbRd, MczRd         float64 // N mm
	LT                  Lateral // behind MbRd
	TermN, TermY, TermZ float64
	PinnedBase          bool // psi = 0 about an axis: N_Ed/N_b,y,Rd is limited too
	Utilisation         float64
}

// The limits of NCCI SN048: the greatest ratio of the end moments (from
// memory), the greatest N_Ed/N_b,y,Rd of a length on a nominally pinned base,
// and the factor on the term of M_z.
const (
	simplePsi    = -0.11
	simpleBase   = 0.83
	simpleFactor = 1.5
)

// simpleScope says whether the criterion stands for a combination.
type simpleScope struct {
	covers bool
	pinned bool   // it does as a length on a nominally pinned base
	reason string // where (6.61) and (6.62) take its place: why
}

// simpleScopes fills the scope of every combination.
func (m *Member) simpleScopes(c *Candidate, a *Assessment) {
	a.scopes = a.scopes[:0]
	for i := range m.Forces {
		var s simpleScope
		if b, bends := m.moments(c, i); bends && m.Settings.Interaction == design.SimpleInteraction {
			s = m.simpleScope(c, &b)
		}
		a.scopes = append(a.scopes, s)
	}
}

// simpleScope applies the scope of NCCI SN048: rolled I and H and rectangular
// hollow sections of class 1 to 3 in compression, held both ways at the floors
// and not between, with straight diagrams whose end moments bend in double
// curvature, or come to nothing at a nominally pinned base. Outside it single
// curvature can exceed (6.61) and (6.62).
func (m *Member) simpleScope(c *Candidate, b *bending) simpleScope {
	outside := func(why string) simpleScope { return simpleScope{reason: why} }
	if n, _, _ := m.press(b.combination, c.Section.Mass); n < 0 {
		return outside("") // tension: neither criterion applies
	}
	switch col := m.Column; {
	case c.Section.Shape != catalogue.ShapeI && c.Section.Shape != catalogue.ShapeRHS:
		return outside("outside NCCI SN048: it covers I and H and rectangular hollow sections")
	case c.Class == 4:
		return outside("outside NCCI SN048: class 4 in compression")
	case m.swayY || m.swayZ:
		return outside("outside NCCI SN048: the column sways")
	case len(col.Y.Restraints) > 0 || len(col.Z.Restraints) > 0:
		return outside("outside NCCI SN048: the column is held between the floors")
	}
	okY, baseY := m.simpleShape(b.my, &m.Column.Y.Bottom)
	okZ, baseZ := m.simpleShape(b.mz, &m.Column.Z.Bottom)
	switch {
	case !okY:
		return outside("outside NCCI SN048: psi_y is above -0.11, and not 0 on a pinned base")
	case !okZ:
		return outside("outside NCCI SN048: psi_z is above -0.11, and not 0 on a pinned base")
	}
	return simpleScope{covers: true, pinned: baseY || baseZ}
}

// simpleShape reports whether the diagram about an axis is in scope, and
// whether only for a nominally pinned base. A base is the bottom of a length
// that the schedule stands on no other; it is nominally pinned about an axis
// where its end is a pin and has no moment.
func (m *Member) simpleShape(d design.EndMoments, bottom *design.End) (ok, base bool) {
	if d.Zero() || Psi(d) <= simplePsi*(1-PassTolerance) {
		return true, false
	}
	pin := bottom.Condition == design.Pinned && bottom.Eta == nil && bottom.Stiffness == nil
	base = m.Below == nil && pin && d.Bottom == 0
	return base, base
}

// simplified works out the criterion of a combination in scope:
//
//	N_Ed/N_b,min,Rd + M_y,Ed/M_b,Rd + 1.5 M_z,Ed/M_c,z,Rd <= 1,
//
// M_b,Rd being that of the lateral-torsional segment with the greatest
// M_y/M_b,Rd, W_y and W_z those of the class under N_Ed with the moments, and
// M_c,z,Rd = W_z fy/gamma_M0.
func (m *Member) simplified(c *Candidate, a *Assessment, b *bending) Simple {
	n, _, _ := m.press(b.combination, c.Section.Mass)
	x := Simple{Combination: b.combination, NEd: n, MyEd: greatest(b.my), MzEd: greatest(b.mz),
		PsiY: Psi(b.my), PsiZ: Psi(b.mz)}
	x.Class, _ = c.CombinedClass(n, x.MyEd > 0, x.MzEd > 0)
	nRk := c.resistanceNRk(x.Class)
	x.NbyRd = m.leastNb(a.SegY, b.combination, c.EulerY, c.AlphaY, nRk) / c.GammaM1
	x.NbMinRd = min(x.NbyRd, m.leastNb(a.SegZ, b.combination, c.EulerZ, c.AlphaZ, nRk)/c.GammaM1)
	for i := range a.SegT {
		if s := &a.SegT[i]; s.Combination == b.combination {
			lt := m.lateral(c, s, between(b.my, s.From, s.To, m.Length), x.Class)
			if x.MbRd == 0 || exceeds(lt.Utilisation, x.TermY) {
				x.TermY, x.MbRd, x.LT = lt.Utilisation, lt.MbRd, lt
			}
		}
	}
	_, wz := c.modulus(x.Class)
	x.MczRd = wz * c.Fy / c.GammaM0
	x.TermN, x.TermZ = x.NEd/x.NbMinRd, simpleFactor*x.MzEd/x.MczRd
	x.Utilisation = x.TermN + x.TermY + x.TermZ
	return x
}

// leastNb returns the least characteristic resistance to flexural buckling of
// the segments of a combination about one axis, N.
func (m *Member) leastNb(segments []Segment, combination int, euler, alpha, nRk float64) float64 {
	chi := 1.0
	for i := range segments {
		if s := &segments[i]; s.Combination == combination {
			chi = min(chi, Chi(alpha, math.Sqrt(nRk/ncrOf(euler, s.Lcr))))
		}
	}
	return chi * nRk
}

// assessSimple checks the combinations in scope, and those among them that
// stand on a pinned base for N_Ed/N_b,y,Rd.
func (m *Member) assessSimple(c *Candidate, a *Assessment) {
	for i := range a.scopes {
		if !a.scopes[i].covers {
			continue
		}
		b, _ := m.moments(c, i)
		x := m.simplified(c, a, &b)
		x.PinnedBase = a.scopes[i].pinned
		if a.Simple.Class == 0 || exceeds(x.Utilisation, a.Simple.Utilisation) {
			a.Simple = x
		}
		a.record(design.Check{Kind: design.SimpleConstruction, Clause: "NCCI SN048", Combination: i,
			To: m.Length, NEd: x.NEd, Utilisation: x.Utilisation}, x.Class)
	}
	for i := range a.scopes {
		if !a.scopes[i].pinned {
			continue
		}
		b, _ := m.moments(c, i)
		x := m.simplified(c, a, &b)
		limit := simpleBase * x.NbyRd
		a.record(design.Check{Kind: design.SimpleConstructionY, Clause: "NCCI SN048", Combination: i,
			To: m.Length, NEd: x.NEd, Ed: x.NEd, Rd: limit, Utilisation: x.NEd / limit}, x.Class)
	}
}
