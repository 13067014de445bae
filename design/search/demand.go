package search

import "stanchion/design/ec3"

// of works out what a member asks of the axial checks at a utilisation limit.
func (d *demand) of(m *ec3.Member, limit float64) {
	scale := 1 / (limit * (1 + ec3.PassTolerance))
	*d = demand{y: d.y[:0], z: d.z[:0], t: d.t[:0], full: axialOnly(m)}
	for i := range m.Forces {
		d.n = max(d.n, m.Forces[i].Greatest*scale)
	}
	for i := range m.Y {
		d.y = worst(d.y, m.Y[i].NEd*scale, m.Y[i].Lcr)
	}
	for i := range m.Z {
		d.z = worst(d.z, m.Z[i].NEd*scale, m.Z[i].Lcr)
	}
	if !d.full {
		return // twist may be held in ways that the table does not know
	}
	for i := range m.T {
		d.t = worst(d.t, m.T[i].NEd*scale, m.T[i].Lcr)
	}
}

// worst adds a point to those that no other covers, and drops those that it
// covers. Without compression there is nothing to add.
func worst(points []point, n, l float64) []point {
	if n <= 0 {
		return points
	}
	kept := points[:0]
	for _, p := range points {
		if p.n >= n && p.l >= l {
			return points
		}
		if p.n > n || p.l > l {
			kept = append(kept, p)
		}
	}
	return append(kept, point{n, l})
}

// axialOnly reports whether the axial checks are all that a member has to
// pass, with the forces and lengths that it carries whatever the section.
func axialOnly(m *ec3.Member) bool {
	if !m.AxialOnly || m.VariesWithEI() || m.Eccentric() || m.WeightPerMass != 0 {
		return false
	}
	for i := range m.Forces {
		if m.Forces[i].Least < 0 {
			return false // tension is checked against the gross section
		}
	}
	return true
}
