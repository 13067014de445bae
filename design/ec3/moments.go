package ec3

import (
	"math"

	"stanchion/design"
)

// at returns the ordinate of a linear diagram at height x of a length. At the
// ends it is the end moment to the last figure: where that is 0, the section is
// bent about one axis and not about both.
func at(m design.EndMoments, x, length float64) float64 {
	switch {
	case x <= 0:
		return m.Bottom
	case x >= length:
		return m.Top
	}
	return m.Bottom + (m.Top-m.Bottom)*x/length
}

// between returns the ordinates of a linear diagram at the ends of a part of the
// length: restraints between the ends do not bend the diagram.
func between(m design.EndMoments, from, to, length float64) design.EndMoments {
	return design.EndMoments{Bottom: at(m, from, length), Top: at(m, to, length)}
}

// greatest returns the greater of the two end moments, without sign.
func greatest(m design.EndMoments) float64 {
	return math.Max(math.Abs(m.Bottom), math.Abs(m.Top))
}

// Psi returns the ratio of the end moments, the smaller over the greater:
// +1 in uniform single curvature, -1 in antisymmetric double curvature, and +1
// where there is no moment. EN 1993-1-1:2005 Table 6.6, Table A.2, Table B.3.
func Psi(m design.EndMoments) float64 {
	large, small := m.Bottom, m.Top
	if math.Abs(small) > math.Abs(large) {
		large, small = small, large
	}
	if large == 0 {
		return 1
	}
	return small / large
}
