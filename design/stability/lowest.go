package stability

import "math"

// rootTolerance is the width, over lambda, to which the critical load is
// enclosed; the lower bound is what counts.
const rootTolerance = 1e-10

// lowest returns the lowest positive critical load factor.
//
// A column with every node clamped buckles no sooner than the real one, so the
// first of its parts to buckle bounds lambda from above, and below that bound
// no part has buckled between its nodes: the exact stiffness matrix K(lambda)
// is regular there, and the column is stable as long as K is positive definite
// (Wittrick and Williams, 1971, with no member eigenvalue exceeded). For given
// displacements of the nodes the energy is the least over all shapes between
// them of a function linear in lambda, so it is concave in lambda, and so is
// the least eigenvalue of K. For a concave function a chord's zero lies below
// the root and the zero of its extension above: the two enclose the root.
func (s *solver) lowest() float64 {
	bound := s.clamped()
	if s.dofs == 0 {
		return bound
	}
	a, fa, b, fb := s.bracket(bound)
	for range 100 {
		if b-a <= rootTolerance*b {
			break
		}
		width := b - a
		a0, fa0 := a, fa
		try := func(x float64) {
			if !(x > a && x < b) {
				return
			}
			if f := s.least(x); f >= 0 {
				a, fa = x, f
			} else {
				b, fb = x, f
			}
		}
		try(a + fa*(b-a)/(fa-fb))
		if fa < fa0 {
			try(a + fa*(a-a0)/(fa0-fa))
		}
		if b-a > width/2 {
			try((a + b) / 2)
		}
	}
	return a
}

// clamped returns the lowest load factor at which a part with clamped ends
// buckles.
func (s *solver) clamped() float64 {
	bound := math.Inf(1)
	for i := range s.parts {
		if p := &s.parts[i]; p.n > 0 {
			bound = math.Min(bound, 4*math.Pi*math.Pi/(p.n*p.length*p.length))
		}
	}
	return bound
}

// bracket encloses the lowest root below the bound. Where nothing buckles
// before it, a and b are both the bound.
func (s *solver) bracket(bound float64) (a, fa, b, fb float64) {
	fa = s.least(0)
	for b = bound / 4; bound-b > rootTolerance*bound; b = (b + bound) / 2 {
		if fb = s.least(b); fb < 0 {
			return a, fa, b, fb
		}
		a, fa = b, fb
	}
	return bound, 0, bound, 0
}
