package ec3

import (
	"stanchion/design"
)

// cut fills the segments of every combination.
func (m *Member) cut(growth float64) error {
	col := m.Column
	for i := range col.Combinations {
		c := &col.Combinations[i]
		m.Y = appendSegments(m.Y, i, c, growth, &col.Y, col.Length)
		m.Z = appendSegments(m.Z, i, c, growth, &col.Z, col.Length)
	}
	for _, z := range m.Z {
		m.T = append(m.T, TwistSegment{Segment: z, LcrY: m.Y[0].Lcr, LcrZ: z.Lcr})
	}
	return nil
}

func appendSegments(dst []Segment, index int, c *design.Combination, growth float64, h *design.Hold, length float64) []Segment {
	add := func(from, to, lcr float64, how string) {
		dst = append(dst, Segment{Combination: index, From: from, To: to, Lcr: lcr, How: how,
			NEd: growth * greatest(c, from, to)})
	}
	switch {
	case h.Lcr > 0:
		add(0, length, h.Lcr, "given")
	case h.K > 0:
		add(0, length, h.K*length, "given factor")
	default:
		from := 0.0
		for _, to := range h.Restraints {
			add(from, to, to-from, "between restraints")
			from = to
		}
		add(from, length, length-from, "between restraints")
	}
	return dst
}
