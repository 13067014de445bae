package ec3

import (
	"fmt"

	"stanchion/design"
	"stanchion/design/stability"
)

// Member is a column reduced to what its checks read: forces multiplied by
// the growth of the settings, and the segments about each axis with their
// buckling lengths. Nothing changes in it but by Reset; it reads the column
// that it was made of, which must not change meanwhile.
type Member struct {
	Column   *design.Column
	Settings *design.Settings
	Length   float64 // mm
	Growth   float64 // factor that the forces below already hold, and moments must still get
	Forces   []Force // one per combination, in order

	// Segments by combination, then height. Where VariesWithEI they are empty:
	// an Assessment has them, for its candidate.
	Y, Z []Segment
	T    []Segment // between torsion restraints; Lcr is the torsional buckling length L_T

	AxialOnly bool // no combination bends it

	Notes []string // what a person must know of how the row was taken; Reset reuses the slice

	// WeightPerMass times a section's mass per metre, times the height of the
	// column's top above a point, is the own weight acting there, N.
	WeightPerMass float64

	// What stands below and above, by Between: nil for nothing.
	Below, Above *Neighbour

	// Carried is the own weight of the lengths above, with its load factor, N;
	// 0 after Reset.
	Carried float64

	bottoms []int // by combination: the one of the length below that goes with it, -1 if none

	swayY, swayZ bool // the member sways about the axis: C_m 0.9

	y, z  stability.Lengths
	twist []stability.Segment
	spare []stability.Segment
}

// Segment is a length between points that hold the member about one axis, in
// one combination.
type Segment struct {
	stability.Segment
	Combination int
	NEd         float64 // greatest compression in it, own weight left out, N; negative where all is tension
}

// NewMember reduces a column. The error says why the row cannot be designed
// as it stands.
func NewMember(col *design.Column, set *design.Settings) (*Member, error) {
	m := new(Member)
	if err := m.Reset(col, set); err != nil {
		return nil, err
	}
	return m, nil
}

// Reset makes m the reduction of another column, reusing its memory.
func (m *Member) Reset(col *design.Column, set *design.Settings) error {
	m.Column, m.Settings, m.Length = col, set, col.Length
	m.Forces, m.Y, m.Z, m.T, m.Notes = m.Forces[:0], m.Y[:0], m.Z[:0], m.T[:0], m.Notes[:0]
	m.WeightPerMass = set.SelfWeight * design.Gravity / 1000 // kg/m to N/mm
	m.Growth = set.Growth
	if m.Growth == 0 {
		m.Growth = 1
	}
	if err := m.measure(set.Method); err != nil {
		return err
	}
	if len(col.Combinations) == 0 {
		return fmt.Errorf("there is no axial force: give N_Ed of at least one combination")
	}
	for i := range col.Combinations {
		if err := m.load(i); err != nil {
			return err
		}
	}
	m.Carried = 0
	m.Between(nil, nil)
	m.swayY, m.swayZ = stability.Sways(col, stability.AxisY), stability.Sways(col, stability.AxisZ)
	m.note()
	return nil
}

// measure finds the segments about both axes and against twist.
func (m *Member) measure(method design.Method) (err error) {
	if err := m.y.Find(m.Column, stability.AxisY, method); err != nil {
		return err
	}
	if err := m.z.Find(m.Column, stability.AxisZ, method); err != nil {
		return err
	}
	if t := &m.Column.Torsion; m.Eccentric() && !t.Given {
		// Restraints that hold one flange alone do not hold the twist.
		col := *m.Column
		col.Torsion.Given = true
		m.twist, err = stability.Torsion(m.twist[:0], &col)
		return err
	}
	m.twist, err = stability.Torsion(m.twist[:0], m.Column)
	return err
}

// Eccentric reports whether z-z is held off the shear centre without the
// twist being held, so that twist is not checked by T alone.
func (m *Member) Eccentric() bool {
	return m.Column.Torsion.EccentricFlange || m.Column.Torsion.Eccentric != 0
}

// load adds the forces and segments of a combination.
func (m *Member) load(index int) error {
	c := &m.Column.Combinations[index]
	if err := finite(c); err != nil {
		return err
	}
	m.Forces = append(m.Forces, extent(c, index, m.Length, m.Growth))
	if !m.y.VariesWithEI() {
		m.Y = m.cut(m.Y, &m.spare, &m.y, index, 0)
	}
	if !m.z.VariesWithEI() {
		m.Z = m.cut(m.Z, &m.spare, &m.z, index, 0)
	}
	for i := range m.twist {
		m.T = append(m.T, m.loaded(&m.twist[i], index))
	}
	return nil
}

// cut appends the segments about an axis in one combination, for a bending
// stiffness EI where the lengths depend on it. A segment without compression
// has no length of its own by the elastic method; where own weight may still
// press on it, it gets the one that it has under a uniform force.
func (m *Member) cut(dst []Segment, spare *[]stability.Segment, l *stability.Lengths, index int, ei float64) []Segment {
	n := len(dst)
	*spare = l.Segments((*spare)[:0], &m.Column.Combinations[index], ei)
	bare := false
	for i := range *spare {
		dst = append(dst, m.loaded(&(*spare)[i], index))
		bare = bare || (*spare)[i].Lcr == 0
	}
	if bare && m.WeightPerMass > 0 {
		*spare = l.Segments((*spare)[:0], nil, ei)
		for i := range *spare {
			if dst[n+i].Lcr == 0 {
				dst[n+i].Segment = (*spare)[i]
			}
		}
	}
	return dst
}

// loaded puts the force of a combination on a segment.
func (m *Member) loaded(s *stability.Segment, index int) Segment {
	return Segment{Segment: *s, Combination: index,
		NEd: m.Growth * stability.MaxNEd(&m.Column.Combinations[index], s.From, s.To)}
}

// VariesWithEI reports whether buckling lengths depend on the section that is
// tried, because the rotational stiffness of an end is given.
func (m *Member) VariesWithEI() bool { return m.y.VariesWithEI() || m.z.VariesWithEI() }
