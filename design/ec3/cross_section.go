package ec3

import "stanchion/design"

// ownWeight returns the weight of the column above a height, N, with its load
// factor; 0 where self-weight is left out.
func (m *Member) ownWeight(c *Candidate, height float64) float64 {
	return m.WeightPerMass * c.Section.Mass * (m.Length - height)
}

// assessSection makes the checks of the cross-section under axial force.
func (m *Member) assessSection(c *Candidate, a *Assessment) {
	for i := range m.Forces {
		if f := &m.Forces[i]; f.Least < 0 {
			// EN 1993-1-1:2005 6.2.3(2)a, (6.6): yielding of the gross section.
			a.add(design.Tension, "6.2.3(2)", f.Combination, f.FromLow, f.ToLow, -f.Least, c.NplRd)
		}
	}
	for i := range m.Forces {
		f := &m.Forces[i]
		if n := f.Greatest + m.ownWeight(c, f.From); n > 0 || f.Least >= 0 {
			// EN 1993-1-1:2005 6.2.4(2), (6.10) and (6.11).
			a.add(design.Compression, "6.2.4(2)", f.Combination, f.From, f.To, max(n, 0), c.NcRd)
		}
	}
}
