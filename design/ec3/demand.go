package ec3

import "stanchion/design"

// AxialDemand is what a member without bending asks of a candidate, for the
// quick check: pulls that another pull outdoes are left out. See
// Member.Axial.
type AxialDemand struct {
	Limit   float64 // utilisation limit
	Tension float64 // greatest tension, N
	Press   []Pull  // on the cross-section; Lcr is 0
	Y, Z    []Pull
	T       []Pull // Lcr is L_T

	member  *Member
	inverse float64 // 1/Limit
	quick   bool
}

// Pull is a compression over a buckling length: N plus Arm times the mass per
// metre of the section, whose own weight Arm stands for.
type Pull struct {
	N   float64 // N
	Lcr float64 // mm
	Arm float64 // N per kg/m
}

// Axial returns the member's demand for the quick check, and false where the
// quick check does not say all: the member is bent, a buckling length depends
// on the section, or z-z is held eccentrically.
func (m *Member) Axial() (*AxialDemand, bool) { return &m.axial, m.axial.quick }

// of fills the demand.
func (d *AxialDemand) of(m *Member) {
	d.member, d.quick = m, m.AxialOnly && !m.VariesWithEI() && !m.eccentric()
	d.Limit = Limit(m.Column, m.Settings)
	d.inverse = 1 / d.Limit
	d.Tension, d.Press, d.Y, d.Z, d.T = 0, d.Press[:0], d.Y[:0], d.Z[:0], d.T[:0]
	if !d.quick {
		return
	}
	for i := range m.Forces {
		d.Tension = max(d.Tension, -m.Forces[i].Least)
		c := &m.Column.Combinations[i]
		for k := 0; k <= len(c.Steps); k++ {
			n, from, _ := part(c, k, m.Length)
			d.Press = outdo(d.Press, Pull{N: m.Growth * n, Arm: m.WeightPerMass * (m.Length - from)})
		}
	}
	d.Y = m.pulls(d.Y, m.Y)
	d.Z = m.pulls(d.Z, m.Z)
	d.T = m.pulls(d.T, m.T)
}

// Limit returns the utilisation limit of a column: its own, else the
// settings', else 1.
func Limit(col *design.Column, set *design.Settings) float64 {
	switch {
	case col.Choice.Limit > 0:
		return col.Choice.Limit
	case set.Limit > 0:
		return set.Limit
	}
	return 1
}

func (m *Member) pulls(dst []Pull, segments []Segment) []Pull {
	for i := range segments {
		s := &segments[i]
		dst = outdo(dst, Pull{N: s.NEd, Lcr: s.Lcr, Arm: m.WeightPerMass * (m.Length - s.From)})
	}
	return dst
}

// outdo adds a pull unless another outdoes it, and drops those that it
// outdoes. A pull that can never be compression is none.
func outdo(pulls []Pull, p Pull) []Pull {
	if p.N <= 0 && p.Arm <= 0 {
		return pulls
	}
	kept := pulls[:0]
	for _, q := range pulls {
		if q.N >= p.N && q.Lcr >= p.Lcr && q.Arm >= p.Arm {
			return pulls
		}
		if !(p.N >= q.N && p.Lcr >= q.Lcr && p.Arm >= q.Arm) {
			kept = append(kept, q)
		}
	}
	return append(kept, p)
}

// Floor returns a resistance N_c,Rd, N, below which no candidate passes.
func (d *AxialDemand) Floor() float64 {
	n := 0.0
	for i := range d.Press {
		n = max(n, d.Press[i].N)
	}
	return n * d.inverse / (1 + 2*PassTolerance)
}
