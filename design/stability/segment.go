package stability

import (
	"fmt"
	"math"
	"strconv"

	"stanchion/design"
)

// Basis tells how a buckling length was found.
type Basis uint8

// The bases of a buckling length.
const (
	GivenLength  Basis = iota // given outright
	GivenFactor               // given factor on the whole length
	Table22                   // BS 5950-1:2000 Table 22, an inner segment pinned-pinned
	Distribution              // distribution factors, NCCI SN008a
	Elastic                   // elastic stability of the whole member
	TwistHeld                 // torsion: between points held against twist
	FollowsZ                  // torsion: the buckling length given about z-z
)

// Segment is a part of a column between two points that hold it, and its
// buckling length.
type Segment struct {
	From, To float64 // mm from the bottom
	Lcr      float64 // mm; 0 under method elastic where the segment carries no compression
	Factor   float64 // Lcr over the segment's own length
	Basis    Basis

	bottom, top design.Condition
	eta         [2]float64
	sway        bool
}

// Length returns the distance between the two points, mm.
func (s *Segment) Length() float64 { return s.To - s.From }

// Etas returns the distribution factors of its two ends, and whether one of
// them sways, of a segment whose length was found from them.
func (s *Segment) Etas() (bottom, top float64, sway bool) { return s.eta[0], s.eta[1], s.sway }

// NcrOverEI returns the elastic critical force per EI, 1/mm2
// (EN 1993-1-1:2005, 6.3.1.2; N_cr = pi2 EI/L_cr2).
func (s *Segment) NcrOverEI() float64 {
	k := math.Pi / s.Lcr
	return k * k
}

// How says in a few words how the length was found, for people.
func (s *Segment) How() string {
	k := factorText(s.Factor)
	switch s.Basis {
	case GivenLength:
		return "given"
	case GivenFactor:
		return "given k " + k + " x L"
	case Table22:
		return s.bottom.String() + "-" + s.top.String() + " segment, " + k + " L"
	case Distribution:
		mode := "non-sway"
		if s.sway {
			mode = "sway"
		}
		return fmt.Sprintf("%s, eta %.3g and %.3g, k %.3f", mode, s.eta[0], s.eta[1], s.Factor)
	case Elastic:
		return fmt.Sprintf("elastic stability of the whole member, %.3f x the segment", s.Factor)
	case TwistHeld:
		return "between points held against twist, " + k + " L"
	default:
		return "as given about z-z"
	}
}

// factorText writes a factor with at least one decimal.
func factorText(k float64) string {
	s := strconv.FormatFloat(k, 'f', -1, 64)
	if k == math.Trunc(k) {
		return s + ".0"
	}
	if len(s) > 5 {
		return strconv.FormatFloat(k, 'f', 3, 64)
	}
	return s
}
