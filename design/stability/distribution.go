package stability

import (
	"math"

	"stanchion/design"
)

// Rotational restraint of an end that is called fixed or partly fixed, in
// EI/L of the adjoining segment: the springs at which a segment so held at
// both ends has Table 22's factors 0.7 and 0.85. Practice does not count on a
// rigid base.
const (
	springFixed  = 3.58
	springPartly = 1.05
)

// NonSway is the effective-length factor of a column held in position at both
// ends, with distribution factors eta1 and eta2 from 0 (fixed) to 1 (pinned)
// (Access Steel NCCI SN008a; ENV 1993-1-1:1992 Annex E, E.2.1).
func NonSway(eta1, eta2 float64) float64 {
	sum, product := eta1+eta2, eta1*eta2
	return (1 + 0.145*sum - 0.265*product) / (2 - 0.364*sum - 0.247*product)
}

// Sway is the effective-length factor of a column one end of which sways, with
// distribution factors eta1 and eta2 from 0 to 1; +Inf where both are 1, which
// is a mechanism (Access Steel NCCI SN008a; ENV 1993-1-1:1992 Annex E, E.2.2).
func Sway(eta1, eta2 float64) float64 {
	sum, product := eta1+eta2, eta1*eta2
	below := 1 - 0.8*sum + 0.6*product
	if below <= 0 {
		return math.Inf(1)
	}
	return math.Sqrt((1 - 0.2*sum - 0.12*product) / below)
}

// springOf is the rotational spring, in EI/L, that a distribution factor
// stands for; +Inf where it is 0.
func springOf(eta float64) float64 {
	if eta <= 0 {
		return math.Inf(1)
	}
	return 4 * (1 - eta) / eta
}

// numbered reports whether the rotational restraint of an end is given as a
// number.
func numbered(e *design.End) bool { return e.Eta != nil || e.Stiffness != nil }

// spring returns the rotational restraint of an end in EI/L of the segment of
// length L that it adjoins. EI is used where a stiffness is given. The end of
// a column that sways at its other end is rigid where it is called fixed:
// Table 22's factor 2.0 of a fixed-free column is that of a rigid base.
func spring(e *design.End, otherSways bool, L, EI float64) float64 {
	switch {
	case e.Stiffness != nil:
		return *e.Stiffness * L / EI
	case e.Eta != nil:
		return springOf(*e.Eta)
	}
	switch e.Condition {
	case design.Fixed:
		if otherSways {
			return math.Inf(1)
		}
		return springFixed
	case design.Guided:
		return springFixed
	case design.PartlyFixed, design.PartlyGuided:
		return springPartly
	}
	return 0
}

// eta returns the distribution factor of an end, the counterpart of spring.
func eta(e *design.End, otherSways bool, L, EI float64) float64 {
	if e.Stiffness == nil && e.Eta != nil {
		return *e.Eta
	}
	return 4 / (4 + spring(e, otherSways, L, EI))
}
