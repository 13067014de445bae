package stability

import "math"

// stabilityFunctions returns the rotational stiffness s and the carry-over
// product sc of a prismatic member, in EI/L, under a constant axial force
// q = N L2/EI, compression positive: a unit rotation of one end, the other
// fixed, takes the moments s there and sc at the far end (Livesley and
// Chandler, Stability Functions for Structural Frameworks, 1956). Valid for
// q < 4 pi2, below which no member with fixed ends has buckled.
func stabilityFunctions(q float64) (s, sc float64) {
	switch {
	case math.Abs(q) < 0.02:
		// Series about q = 0, where the closed forms lose their figures; the
		// first terms left out are below 1e-9.
		return 4 - q*(2.0/15+q*11/6300), 2 + q*(1.0/30+q*13/12600)
	case q > 0:
		phi := math.Sqrt(q)
		sin, cos := math.Sincos(phi)
		below := 2 - 2*cos - phi*sin
		return phi * (sin - phi*cos) / below, phi * (phi - sin) / below
	default:
		// Divided by cosh phi, so that a large tension does not overflow.
		phi := math.Sqrt(-q)
		t, c := math.Tanh(phi), 1/math.Cosh(phi)
		below := 2*c - 2 + phi*t
		return phi * (phi - t) / below, phi * (t - phi*c) / below
	}
}
