package stability

import (
	"math"

	"stanchion/design"
)

// Torsion appends to dst the segments of torsional buckling, lowest first,
// with their lengths L_T in Lcr: a given L_T; else the segments between
// torsion restraints where those are given; else the buckling length given
// about z-z, not less than the length where it came from a factor below 1
// (a factor below 1 clamps bending, not warping); else the segments between
// z-z restraints at factor 1.0, since twist is taken as held where z-z is.
// An end that is free about z-z is free to twist: its own segment counts
// double. A guided end holds the twist.
//
// Lateral-torsional buckling has the same segments: a point held about z-z
// alone may lie in the tension flange and does not count, and one held against
// twist alone does, since a beam that cannot twist there buckles in its next
// mode.
func Torsion(dst []Segment, col *design.Column) ([]Segment, error) {
	if err := validateTorsion(col); err != nil {
		return dst, err
	}
	L := col.Length
	switch t, z := &col.Torsion, &col.Z; {
	case t.LT > 0:
		return append(dst, Segment{To: L, Lcr: t.LT, Factor: t.LT / L, Basis: GivenLength}), nil
	case t.Given:
		return twistSegments(dst, col, t.Restraints), nil
	case z.Lcr > 0:
		return append(dst, Segment{To: L, Lcr: z.Lcr, Factor: z.Lcr / L, Basis: FollowsZ}), nil
	case z.K > 0:
		k := math.Max(z.K, 1)
		return append(dst, Segment{To: L, Lcr: k * L, Factor: k, Basis: FollowsZ}), nil
	default:
		return twistSegments(dst, col, z.Restraints), nil
	}
}

func twistSegments(dst []Segment, col *design.Column, heights []float64) []Segment {
	n := len(dst)
	dst = appendSplit(dst, col.Length, heights, TwistHeld)
	double := func(s *Segment) { s.Factor, s.Lcr = 2*s.Factor, 2*s.Lcr }
	if col.Z.Bottom.Condition == design.Free {
		double(&dst[n])
	}
	if col.Z.Top.Condition == design.Free {
		double(&dst[len(dst)-1])
	}
	return dst
}

func validateTorsion(col *design.Column) error {
	t := &col.Torsion
	switch {
	case !positive(col.Length):
		return &Error{AxisZ, "the length is not a positive number", "give the length of the column"}
	case t.LT != 0 && !positive(t.LT):
		return &Error{AxisZ, "L_T is not a positive number", "give it, or leave it out"}
	case !rising(t.Restraints, col.Length) || !rising(col.Z.Restraints, col.Length):
		return &Error{AxisZ, "a torsion or z-z restraint does not lie between the ends, or the heights do not rise",
			"give heights above the bottom, lowest first, below the top"}
	}
	return nil
}
