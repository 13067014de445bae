package ec3

import (
	"fmt"

	"stanchion/design"
)

// Member is a column reduced to what its checks read: forces multiplied by
// the growth of the settings, and the segments about each axis with their
// buckling lengths. It does not change in Assess, so workers may share it.
type Member struct {
	Column *design.Column
	Length float64 // mm
	Forces []Force // one per combination, in order

	// Segments by combination, then height.
	Y, Z []Segment
	T    []TwistSegment

	Notes []string // what a person must know of how the row was taken

	// WeightPerMass times a section's mass per metre times the height of the
	// column's own top above a point is the own weight acting there, N.
	WeightPerMass float64
}

// Force is the extent of the axial force along the member in one combination,
// own weight left out, N, and the part of the member where each is reached.
type Force struct {
	Combination    int
	Greatest       float64 // greatest compression; negative where all is tension
	Least          float64 // greatest tension as a negative number; positive where there is none
	From, To       float64 // the part under Greatest, mm
	FromLow, ToLow float64 // the part under Least, mm
}

// Segment is a length between restraints about one axis in one combination.
type Segment struct {
	Combination int
	From, To    float64 // mm from the bottom
	Lcr         float64 // buckling length, mm
	NEd         float64 // greatest compression in it, N; negative where all is tension
	How         string  // how Lcr was found, for people
}

// TwistSegment is a length between torsion restraints in one combination; Lcr
// is the torsional buckling length L_T.
type TwistSegment struct {
	Segment
	LcrY, LcrZ float64 // greatest flexural buckling lengths of the segments that overlap it, mm
	Enforced   bool    // z-z is held off the shear centre inside the segment, without torsion: it turns about that line
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
	*m = Member{Column: col, Length: col.Length,
		Forces: m.Forces[:0], Y: m.Y[:0], Z: m.Z[:0], T: m.T[:0], Notes: m.Notes[:0],
		WeightPerMass: set.SelfWeight * design.Gravity / 1000}
	if !(col.Length > 0) {
		return fmt.Errorf("the length is %g mm: give one above 0", col.Length)
	}
	if len(col.Combinations) == 0 {
		return fmt.Errorf("there is no axial force: give N_Ed of at least one combination")
	}
	growth := set.Growth
	if growth == 0 {
		growth = 1
	}
	for i := range col.Combinations {
		m.Forces = append(m.Forces, extent(&col.Combinations[i], i, col.Length, growth))
	}
	return m.cut(growth)
}

// extent finds the greatest and least force of a combination.
func extent(c *design.Combination, index int, length, growth float64) Force {
	f := Force{Combination: index, Greatest: c.NEd, Least: c.NEd, To: length, ToLow: length}
	if len(c.Steps) > 0 {
		f.To, f.ToLow = c.Steps[0].Height, c.Steps[0].Height
	}
	for i, s := range c.Steps {
		to := length
		if i+1 < len(c.Steps) {
			to = c.Steps[i+1].Height
		}
		if s.NEd > f.Greatest {
			f.Greatest, f.From, f.To = s.NEd, s.Height, to
		}
		if s.NEd < f.Least {
			f.Least, f.FromLow, f.ToLow = s.NEd, s.Height, to
		}
	}
	f.Greatest *= growth
	f.Least *= growth
	return f
}

// greatest returns the greatest axial force between two heights, N.
func greatest(c *design.Combination, from, to float64) float64 {
	n := c.NEdAt(from)
	for _, s := range c.Steps {
		if s.Height > from && s.Height < to {
			n = max(n, s.NEd)
		}
	}
	return n
}
