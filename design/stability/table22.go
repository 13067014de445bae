package stability

import "stanchion/design"

// heldFactor is the effective-length factor of a segment held in position at
// both ends (BS 5950-1:2000 Table 22 a).
func heldFactor(a, b design.Condition) float64 {
	switch {
	case a == design.Fixed && b == design.Fixed:
		return 0.7
	case a == design.PartlyFixed && b == design.PartlyFixed:
		return 0.85
	case a == design.Fixed || b == design.Fixed:
		return 0.85
	}
	return 1
}

// swayFactor is the effective-length factor of a length held in position and
// direction at one end and swaying at the other (BS 5950-1:2000 Table 22 b).
func swayFactor(swaying design.Condition) float64 {
	switch swaying {
	case design.Guided:
		return 1.2
	case design.PartlyGuided:
		return 1.5
	}
	return 2
}

// table22 returns the factor of a single segment with the given ends, and
// false where the table has none.
func table22(bottom, top design.Condition) (float64, bool) {
	switch {
	case !bottom.Sways() && !top.Sways():
		return heldFactor(bottom, top), true
	case bottom == design.Fixed && top.Sways():
		return swayFactor(top), true
	case top == design.Fixed && bottom.Sways():
		return swayFactor(bottom), true
	}
	return 0, false
}
