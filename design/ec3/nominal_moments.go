package ec3

import (
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
)

// Neighbour is the length of the same column line that stands on a member or
// that it stands on. Its section may change between assessments; nil is a
// neighbour whose section is not known.
type Neighbour struct {
	Column  *design.Column
	Section *catalogue.Section
}

// clearance is the distance from the face of a column at which a beam's
// reaction acts, mm, and equalUpTo the ratio of stiffnesses up to which the
// lengths above and below a floor share its moment equally. Access Steel NCCI
// SN005 and SN048, from memory.
const (
	clearance = 100.0
	equalUpTo = 1.5
)

// Eccentricities returns the distances, mm, from the axes of a section at
// which reactions act that stand on its flanges (bending about y-y) and on its
// web (about z-z): 100 mm outside the face, of a hollow section the wall's.
func Eccentricities(s *catalogue.Section) (y, z float64) {
	if s.Shape == catalogue.ShapeRHS || s.Shape == catalogue.ShapeCHS {
		return s.H/2 + clearance, s.B/2 + clearance
	}
	return s.H/2 + clearance, s.Tw/2 + clearance
}

// Share returns the part of a floor's moment that goes to a length of the
// stiffness own = I/L, other being that of the length on the other side of the
// floor: half up to a ratio of 1.5, else by stiffness.
func Share(own, other float64) float64 {
	if max(own, other) <= equalUpTo*min(own, other) {
		return 0.5
	}
	return own / (own + other)
}

// Between says what stands below and above the member, nil for nothing: with
// nothing above, all of the floor's moment goes to its top, as at a roof; with
// nothing below, no nominal moment comes in at its bottom, which is a base.
// Reset forgets it. The sections of the neighbours may change afterwards.
func (m *Member) Between(below, above *Neighbour) {
	m.Below, m.Above, m.bottoms = below, above, m.bottoms[:0]
	if m.Settings.Moments == design.MomentsSimple && below != nil {
		m.meet(below.Column)
	}
	m.AxialOnly = true
	for i := range m.Column.Combinations {
		m.AxialOnly = m.AxialOnly && !m.bends(i)
	}
}

// StandLike gives the member the neighbours of another, and what that carries:
// for the same column under other actions.
func (m *Member) StandLike(other *Member) {
	m.Between(other.Below, other.Above)
	m.Carried = other.Carried
}

// meet finds the combinations of the length below that go with the member's,
// and says which have none.
func (m *Member) meet(below *design.Column) {
	var lost []string
	for i := range m.Column.Combinations {
		j := matching(m.Column, i, below)
		m.bottoms = append(m.bottoms, j)
		if j < 0 {
			lost = append(lost, m.combination(i))
		}
	}
	if len(lost) > 0 && reacts(below) {
		m.Notes = append(m.Notes, "the length below has no combination "+strings.Join(lost, ", ")+
			": no moment of its beams comes in at the bottom there")
	}
}

// matching returns the index of the combination of another length that goes
// with combination i of a column: the one of the same name; without names the
// one in the same place; -1 if there is none.
func matching(col *design.Column, i int, other *design.Column) int {
	name := col.Combinations[i].Name
	for j := range other.Combinations {
		if other.Combinations[j].Name == name && (name != "" || i == j) {
			return j
		}
	}
	return -1
}

// reacts reports whether beams stand on a column in any combination.
func reacts(col *design.Column) bool {
	for i := range col.Combinations {
		if col.Combinations[i].HasReactions {
			return true
		}
	}
	return false
}

// underfoot returns the combination of the length below that goes with
// combination i, nil where no beam of it brings in a moment.
func (m *Member) underfoot(i int) *design.Combination {
	if i >= len(m.bottoms) || m.bottoms[i] < 0 {
		return nil
	}
	if c := &m.Below.Column.Combinations[m.bottoms[i]]; c.HasReactions {
		return c
	}
	return nil
}

// bends reports whether combination i bends the member.
func (m *Member) bends(i int) bool {
	c := &m.Column.Combinations[i]
	return !c.My.Zero() || !c.Mz.Zero() ||
		m.Settings.Moments == design.MomentsSimple && (c.HasReactions || m.underfoot(i) != nil)
}

// nominal adds the nominal moments of beam reactions to the diagrams of
// combination i, growth included. The reactions at the top of a length act at
// the eccentricities of its own section, those at its bottom at the
// eccentricities of the section below the floor. What the floor brings in is
// shared by the lengths above and below and bends them in opposite senses;
// none of it is carried over to their far ends.
func (m *Member) nominal(c *Candidate, i int, b *bending) {
	if k := &m.Column.Combinations[i]; k.HasReactions {
		y, z := m.floor(k, c.Section, c.Section, m.Above)
		b.my.Top += y
		b.mz.Top += z
	}
	if k := m.underfoot(i); k != nil {
		at := m.Below.Section
		if at == nil {
			at = c.Section
		}
		y, z := m.floor(k, at, c.Section, m.Below)
		b.my.Bottom -= y
		b.mz.Bottom -= z
	}
}

// floor returns the member's share, N mm, of the moments that reactions bring
// in about y-y and z-z, with the eccentricities of section at, the member
// being in section s beside a neighbour.
func (m *Member) floor(k *design.Combination, at, s *catalogue.Section, n *Neighbour) (my, mz float64) {
	ey, ez := Eccentricities(at)
	shareY, shareZ := 1.0, 1.0
	if n != nil && n.Section != nil {
		shareY = Share(s.Iy/m.Length, n.Section.Iy/n.Column.Length)
		shareZ = Share(s.Iz/m.Length, n.Section.Iz/n.Column.Length)
	}
	return m.Growth * shareY * (k.FlangeA - k.FlangeB) * ey, m.Growth * shareZ * (k.WebA - k.WebB) * ez
}
