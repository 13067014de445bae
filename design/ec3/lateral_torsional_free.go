package ec3

import (
	"math"

	"stanchion/design"
	"stanchion/design/stability"
)

// C1Free returns C1 of a length that is held against twist at one end alone, L
// being twice the length, from the ratio psi of its end moments; atFree says
// that the greater one is at the free end. NCCI SN003a covers lengths that are
// held against twist at both ends. Its table stands here as long as the greater
// moment is at the held end and psi is not below -0.5; beyond that it would
// overrate the critical moment, by up to half, as the free end is the one that
// twists most. What is taken there is a straight line below the theory of
// elasticity (Timoshenko and Gere, Theory of Elastic Stability, art. 6.1 to
// 6.3), by up to 8 %; the branches meet at psi = 1 and -1.
func C1Free(psi float64, atFree bool) float64 {
	psi = max(-1, min(1, psi))
	switch {
	case atFree:
		return c1FreeEnd(psi)
	case psi >= c1FreeFrom:
		return C1(psi)
	}
	from, to := C1(c1FreeFrom), c1FreeEnd(-1)
	return from + (to-from)*(c1FreeFrom-psi)/(c1FreeFrom+1)
}

// c1FreeFrom is the least psi for which the table of NCCI SN003a is used where
// the greater moment is at the held end.
const c1FreeFrom = -0.5

func c1FreeEnd(psi float64) float64 { return 1.3 - 0.3*psi }

// beyondTable reports whether C1Free is not the table's value.
func beyondTable(psi float64, atFree bool) bool { return atFree || psi < c1FreeFrom }

// freeEnd reports whether a lateral-torsional segment is free to twist at one
// of its ends, and whether the greater of its end moments is there: an end that
// is free about z-z is, unless a given length takes the place of the ends.
func (m *Member) freeEnd(s *Segment, my design.EndMoments) (free, atFree bool) {
	if s.Basis != stability.TwistHeld {
		return false, false
	}
	bottom := s.From <= 0 && m.Column.Z.Bottom.Condition == design.Free
	top := s.To >= m.Length && m.Column.Z.Top.Condition == design.Free
	b, t := math.Abs(my.Bottom), math.Abs(my.Top)
	return bottom || top, bottom && b > t || top && t > b
}

// beyond reports whether M_b,Rd rests on a C1 that is not the table's.
func (x *Lateral) beyond() bool { return x.Beyond && x.Alpha > 0 }
