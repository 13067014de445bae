package stability

import "stanchion/design"

// MaxNEd returns the greatest axial force between two heights (mm), in N:
// compression positive, so that a part in tension gives way to one in
// compression.
func MaxNEd(c *design.Combination, from, to float64) float64 {
	n := c.NEdAt(from)
	for _, s := range c.Steps {
		if s.Height > from && s.Height < to && s.NEd > n {
			n = s.NEd
		}
	}
	return n
}

// uniform reports whether the force is the same all along the length.
func uniform(c *design.Combination) bool {
	for _, s := range c.Steps {
		if s.NEd != c.NEd {
			return false
		}
	}
	return true
}
