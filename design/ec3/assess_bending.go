package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// bending is what bends a member in one combination: the ordinates of the
// diagrams at its ends, N mm, multiplied by the growth of the settings.
type bending struct {
	combination int
	my, mz      design.EndMoments
}

// moments returns what bends the member in a combination, and whether
// anything does: the end moments given, and where the settings ask for them the
// nominal moments of beam reactions.
func (m *Member) moments(c *Candidate, index int) (b bending, bends bool) {
	comb := &m.Column.Combinations[index]
	grow := func(e design.EndMoments) design.EndMoments {
		return design.EndMoments{Bottom: m.Growth * e.Bottom, Top: m.Growth * e.Top}
	}
	b = bending{index, grow(comb.My), grow(comb.Mz)}
	if m.Settings.Moments == design.MomentsSimple {
		m.nominal(c, index, &b)
	}
	return b, !b.my.Zero() || !b.mz.Zero()
}

// EndMoments returns the ordinates of the diagrams that the checks of a
// combination in a candidate read, N mm: given and nominal moments, growth
// included.
func (m *Member) EndMoments(c *Candidate, combination int) (my, mz design.EndMoments) {
	b, _ := m.moments(c, combination)
	return b.my, b.mz
}

// bendable refuses the shapes for which no rule of bending is implemented.
func bendable(s *catalogue.Section) bool {
	return s.Shape != catalogue.ShapeChannel && s.Shape != catalogue.ShapeAngle
}

// assessBendingSection makes the checks of the cross-section under axial force,
// bending and shear in every combination that bends the member.
// EN 1993-1-1:2005 6.2.6, 6.2.8, 6.2.9 and 6.2.10.
func (m *Member) assessBendingSection(c *Candidate, a *Assessment) {
	if m.AxialOnly {
		return
	}
	if !bendable(c.Section) {
		a.refuse("6.3.3", "moments on channels and angles are not covered: their shear centre is off the centroid")
		return
	}
	for i := range m.Forces {
		if b, bends := m.moments(c, i); bends {
			m.shear(c, a, &b)
		}
	}
	for i := range m.Forces {
		if b, bends := m.moments(c, i); bends {
			m.sections(c, a, &b)
		}
	}
}

// forces returns the shear forces along z-z and y-y: the slopes of the diagrams.
func (b *bending) forces(length float64) (vz, vy float64) {
	return math.Abs(b.my.Top-b.my.Bottom) / length, math.Abs(b.mz.Top-b.mz.Bottom) / length
}

func (m *Member) shear(c *Candidate, a *Assessment, b *bending) {
	vz, vy := b.forces(m.Length)
	vzRd, vyRd := c.VcRd()
	nEd, _, _ := m.press(b.combination, c.Section.Mass)
	if vz > 0 {
		a.record(design.Check{Kind: design.ShearZ, Clause: "6.2.6(1)", Combination: b.combination, To: m.Length,
			NEd: nEd, Ed: vz, Rd: vzRd, Utilisation: vz / vzRd}, c.Class)
	}
	if vy > 0 {
		a.record(design.Check{Kind: design.ShearY, Clause: "6.2.6(1)", Combination: b.combination, To: m.Length,
			NEd: nEd, Ed: vy, Rd: vyRd, Utilisation: vy / vyRd}, c.Class)
	}
}

// sections checks the cross-section at both ends of every part over which the
// axial force is constant; in between the moments are smaller than at one of
// them. Own weight is that at the part's lower end.
func (m *Member) sections(c *Candidate, a *Assessment, b *bending) {
	comb := &m.Column.Combinations[b.combination]
	vz, vy := b.forces(m.Length)
	for k := 0; k <= len(comb.Steps); k++ {
		n, from, to := part(comb, k, m.Length)
		n *= m.Growth
		if n >= 0 {
			n += m.ownWeight(c.Section.Mass, from)
		}
		for _, x := range [...]float64{from, to} {
			my, mz := math.Abs(at(b.my, x, m.Length)), math.Abs(at(b.mz, x, m.Length))
			if my == 0 && mz == 0 {
				continue // 6.2.3 and 6.2.4 stand alone
			}
			s := c.bendSection(n, my, mz, vz, vy)
			check := design.Check{Kind: design.CrossSection, Clause: s.clause(c.Section.Shape), Combination: b.combination,
				From: x, To: x, NEd: n, Utilisation: s.Utilisation}
			if a.Section.Class == 0 || exceeds(s.Utilisation, a.Section.Utilisation) {
				a.Section = s
			}
			a.record(check, s.Class)
		}
	}
}

// clause names the paragraph whose criterion was used.
func (x *Section629) clause(shape catalogue.Shape) string {
	switch {
	case x.RhoZ > 0 || x.RhoY > 0:
		return "6.2.10(3)"
	case x.Class == 3:
		return "6.2.9.2(1)"
	case x.Class == 4:
		return "6.2.9.3(1)"
	case x.MyEd > 0 && x.MzEd > 0 && shape != catalogue.ShapeCHS:
		return "6.2.9.1(6)"
	}
	return "6.2.9.1(2)"
}

// assessBendingBuckling checks lateral-torsional buckling and the interaction
// of buckling and bending. EN 1993-1-1:2005 6.3.2 and 6.3.3.
func (m *Member) assessBendingBuckling(c *Candidate, a *Assessment) {
	if m.AxialOnly || !bendable(c.Section) {
		return
	}
	for i := range m.Forces {
		if b, bends := m.moments(c, i); bends {
			m.lateralChecks(c, a, &b)
		}
	}
	m.simpleScopes(c, a)
	m.interactions(c, a)
	for i := range a.interactions {
		x := &a.interactions[i]
		a.record(design.Check{Kind: design.Interaction661, Clause: "6.3.3 (6.61)", Combination: x.Combination,
			From: x.FromY, To: x.ToY, NEd: x.NY, Utilisation: x.U661, Reason: a.scopes[x.Combination].reason}, x.Class)
	}
	for i := range a.interactions {
		x := &a.interactions[i]
		a.record(design.Check{Kind: design.Interaction662, Clause: "6.3.3 (6.62)", Combination: x.Combination,
			From: x.FromZ, To: x.ToZ, NEd: x.NZ, Utilisation: x.U662, Reason: a.scopes[x.Combination].reason}, x.Class)
	}
	m.assessSimple(c, a)
	if a.unchecked && Passes(a.Utilisation, Limit(m.Column, m.Settings)) {
		// The buckling check alone is a little above 1: a limit above 1 must
		// not let it pass with its moments unchecked.
		a.refuse("6.3.3", "N_Ed reaches a critical load, where the factors of Annex A do not exist")
	}
}

// lateralChecks checks bending about y-y alone in every lateral-torsional
// segment, by the class that the section has under the force and moments there.
// A section whose chi_LT is 1 by rule has M_b,Rd and no such check: its
// cross-section says as much.
func (m *Member) lateralChecks(c *Candidate, a *Assessment, b *bending) {
	for i := range a.SegT {
		s := &a.SegT[i]
		if s.Combination != b.combination {
			continue
		}
		my := between(b.my, s.From, s.To, m.Length)
		if my.Zero() {
			continue
		}
		mz := greatest(between(b.mz, s.From, s.To, m.Length))
		n := s.NEd
		if n >= 0 {
			n += m.ownWeight(c.Section.Mass, s.From)
		}
		class, _ := c.CombinedClass(n, true, mz > 0)
		lt := m.lateral(c, s, my, class)
		if a.Lateral.Class == 0 || exceeds(lt.Utilisation, a.Lateral.Utilisation) {
			a.Lateral = lt
		}
		if bucklesLaterally(c.Section) {
			a.record(design.Check{Kind: design.LateralTorsional, Clause: "6.3.2.1(1)", Combination: s.Combination,
				From: s.From, To: s.To, NEd: n, Ed: lt.MyEd, Rd: lt.MbRd, Utilisation: lt.Utilisation}, class)
		}
	}
}

// interactions works out (6.61) and (6.62) of every set of overlapping segments
// of a combination that compresses and bends the member, unless the rule of
// simple construction stands for it.
func (m *Member) interactions(c *Candidate, a *Assessment) {
	for i := range a.SegY {
		y := &a.SegY[i]
		b, bends := m.moments(c, y.Combination)
		if !bends || a.scopes[y.Combination].covers {
			continue
		}
		for j := range a.SegZ {
			z := &a.SegZ[j]
			if !overlap(y, z) {
				continue
			}
			for k := range a.SegT {
				if t := &a.SegT[k]; overlap(y, t) && overlap(z, t) {
					m.interaction(c, a, y, z, t, &b)
				}
			}
		}
	}
}

func overlap(a, b *Segment) bool {
	return a.Combination == b.Combination && a.From < b.To && b.From < a.To
}

// interaction keeps one set of overlapping segments. Where all of it is in
// tension, 6.2.9 and 6.3.2 stand alone. Without axial force the criteria stand
// for bending about both axes, so that the first newton changes nothing.
func (m *Member) interaction(c *Candidate, a *Assessment, y, z, t *Segment, b *bending) {
	w := c.Section.Mass
	if y.NEd+m.ownWeight(w, y.From) < 0 && z.NEd+m.ownWeight(w, z.From) < 0 {
		return
	}
	x := m.interact(c, y, z, t, b)
	if x.Undefined {
		a.unchecked = true
		return
	}
	a.interactions = append(a.interactions, x)
	if a.Interaction.Class == 0 || exceeds(x.worst(), a.Interaction.worst()) {
		a.Interaction = x
	}
}
