package stability

import (
	"math"

	"stanchion/design"
)

// validate checks what the schedule's reading should have settled, so that
// nothing later divides by it.
func (l *Lengths) validate() error {
	h := l.hold
	bad := func(what, do string) error { return &Error{l.Axis, what, do} }
	if !positive(l.length) {
		return bad("the length is not a positive number", "give the length of the column")
	}
	if !rising(h.Restraints, l.length) {
		return bad("a restraint does not lie between the ends, or the heights do not rise",
			"give heights above the bottom, lowest first, below the top")
	}
	if h.Lcr != 0 && !positive(h.Lcr) {
		return bad("the buckling length is not a positive number", "give it, or leave it out")
	}
	if h.K != 0 && !positive(h.K) {
		return bad("the effective-length factor is not a positive number", "give it, or leave it out")
	}
	for _, e := range []*design.End{&h.Bottom, &h.Top} {
		if e.Eta != nil && !(*e.Eta >= 0 && *e.Eta <= 1) {
			return bad("a distribution factor lies outside 0 to 1", "give 0 for fixed, 1 for pinned, or a value between")
		}
		if e.Stiffness != nil && !(*e.Stiffness >= 0 && !math.IsInf(*e.Stiffness, 1)) {
			return bad("a rotational stiffness is negative or not a number", "give 0 for a pin, or a positive value")
		}
	}
	return nil
}

func positive(x float64) bool { return x > 0 && !math.IsInf(x, 1) }

// rising reports whether heights lie strictly between 0 and length and rise.
func rising(heights []float64, length float64) bool {
	below := 0.0
	for _, x := range heights {
		if !(x > below && x < length) {
			return false
		}
		below = x
	}
	return true
}

func (l *Lengths) swayingBeyond() error {
	return &Error{l.Axis, "an end that sways lies beyond a restraint, where a segment on its own is a mechanism",
		"use the effective length method 'elastic', hold the end, or give L_cr or k"}
}

func (l *Lengths) guidedBeyond() error {
	return &Error{l.Axis, "a guided end with restraints between the ends has no published factor",
		"give L_cr or k, or the rotational stiffness of the guided end"}
}

func (l *Lengths) notInTable() error {
	h := l.hold
	switch {
	case h.Bottom.Condition.Sways() && h.Top.Condition.Sways(),
		h.Bottom.Condition == design.Free && h.Top.Condition == design.Pinned,
		h.Top.Condition == design.Free && h.Bottom.Condition == design.Pinned:
		return l.mechanism()
	}
	return &Error{l.Axis, "BS 5950-1 Table 22 has no factor for a " + l.ends() + " column",
		"give L_cr, k or the stiffness of the ends, or fix the end that does not sway"}
}

func (l *Lengths) mechanism() error {
	return &Error{l.Axis, "a " + l.ends() + " column is a mechanism",
		"hold one end in position, fix the other, or give L_cr or k"}
}

func (l *Lengths) ends() string {
	return l.hold.Bottom.Condition.String() + "-" + l.hold.Top.Condition.String()
}
