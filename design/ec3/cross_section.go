package ec3

import "stanchion/design"

// assessSection makes the checks of the cross-section under axial force.
func (m *Member) assessSection(c *Candidate, a *Assessment) {
	for i := range m.Forces {
		if f := &m.Forces[i]; f.Least < 0 {
			// EN 1993-1-1:2005 6.2.3(2)a, (6.6): yielding of the gross section.
			a.add(design.Tension, "6.2.3(2)", f.Combination, f.FromLow, f.ToLow, f.Least, c.NplRd)
		}
	}
	for i := range m.Forces {
		n, from, to := m.press(i, c.Section.Mass)
		if n > 0 || m.Forces[i].Least >= 0 {
			// EN 1993-1-1:2005 6.2.4(2), (6.10) and (6.11).
			a.add(design.Compression, "6.2.4(2)", i, from, to, max(n, 0), c.NcRd)
		}
	}
}
