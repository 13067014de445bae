package search

import "math"

// verdict is what the axial checks alone can say about a candidate.
type verdict uint8

const (
	fails  verdict = iota // an axial check is over the limit, whatever the other checks say
	passes                // every axial check is within the limit
	doubt                 // closer to the limit than rounding allows to decide, or not covered by the table
)

// guard is the relative distance from the limit within which the axial table
// leaves the decision to the full assessment. The two compute the same
// quantities by different roads, each with a few dozen roundings of 1.1e-16;
// the distance is some hundred times what these can add up to.
const guard = 1e-12

// axialRow is what the axial checks of one candidate read, in one line of the
// processor's cache and in the order in which it is read.
//
// A column passes flexural buckling where N_Ed <= limit chi A fy/gM1, that is
// where chi >= c with c = N_Ed gM1/(limit A fy). As chi of (6.49) is the lesser
// root of (1 - chi)(1 - lambdaBar^2 chi) = alpha (lambdaBar - 0.2) chi, that is
// so where c < 1, lambdaBar^2 c < 1 and
//
//	(1 - c)(1 - lambdaBar^2 c) >= alpha (lambdaBar - 0.2) c
//
// which needs neither square root nor division. lambdaBar is L_cr times a
// constant of the candidate.
type axialRow struct {
	c      float64 // gM1/(A_eff fy), 1/N
	kz     float64 // lambdaBar_z/L_cr,z, 1/mm
	alphaZ float64
	ky     float64 // lambdaBar_y/L_cr,y, 1/mm
	alphaY float64
	tA, tB float64 // 1/lambdaBar_T^2 = tA + tB/L_T^2; tA infinite where there is no torsional buckling
	known  bool    // the row says all about axial compression; else it can only refuse
}

// point is a compression and the buckling length that goes with it, N and mm.
type point struct{ n, l float64 }

// demand is what a column asks of the axial checks, divided by its limit of
// utilisation. In each list a point stands only if no other is both greater in
// force and longer; a column whose force does not change along its length has
// one point in each.
type demand struct {
	n       float64 // greatest axial force, tension or compression, N
	y, z, t []point
	full    bool // the axial checks are all that the column has to pass
}

// pass says whether chi >= c at slenderness lambdaBar.
func pass(c, lambdaBar, alpha float64) verdict {
	q := lambdaBar * lambdaBar
	u, v := 1-c, 1-c*q
	f := u*v - alpha*(lambdaBar-0.2)*c
	switch {
	case u < -guard || v < -guard || f < -guard:
		return fails
	case u > guard && v > guard && f > guard:
		return passes
	}
	return doubt
}

// axial says what the axial checks make of a candidate. ratio is gM0/gM1.
func (r *axialRow) axial(d *demand, ratio float64) verdict {
	out := passes
	if s := 1 - d.n*r.c*ratio; s <= guard { // (6.9), (6.5)
		if s < -guard {
			return fails
		}
		out = doubt
	}
	for _, p := range d.z {
		if v := pass(p.n*r.c, p.l*r.kz, r.alphaZ); v != passes {
			if v == fails {
				return fails
			}
			out = doubt
		}
	}
	for _, p := range d.y {
		if v := pass(p.n*r.c, p.l*r.ky, r.alphaY); v != passes {
			if v == fails {
				return fails
			}
			out = doubt
		}
	}
	for _, p := range d.t {
		if v := pass(p.n*r.c, 1/math.Sqrt(r.tA+r.tB/(p.l*p.l)), r.alphaZ); v != passes {
			if v == fails {
				return fails
			}
			out = doubt
		}
	}
	if !r.known || !d.full {
		return doubt
	}
	return out
}
