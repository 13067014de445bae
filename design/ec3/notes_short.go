package ec3

import (
	"slices"
	"strings"

	"stanchion/design"
	"stanchion/design/stability"
)

// leastByEnds is the least factor on the length that ends can give a column
// that is not held between them: BS 5950-1:2000 Table 22, fixed at both.
const leastByEnds = 0.7

// shortened warns of a given buckling length that only a restraint between the
// ends can explain, where a moment changes along the member: the part between
// two restraints sees less of that change than the whole length, by whose
// diagram psi, C1 and C_m are found. A restraint at mid-height of a diagram with
// psi = -1 makes that M_cr 44 % too high. It returns "" where there is nothing
// to warn of.
func (a *Assessment) shortened() string {
	var given []string
	name := func(short bool, symbol string) {
		if short && !slices.Contains(given, symbol) {
			given = append(given, symbol)
		}
	}
	m := a.Member
	y, z := a.changing()
	for _, axis := range []struct {
		changes bool
		hold    *design.Hold
		symbol  string
	}{{y, &m.Column.Y, "y"}, {z, &m.Column.Z, "z"}} {
		name(axis.changes && m.tooShort(axis.hold.Lcr), "L_cr,"+axis.symbol)
		name(axis.changes && axis.hold.Lcr == 0 && m.tooShort(axis.hold.K*m.Length), "k_"+axis.symbol)
	}
	if s := &m.T[0]; y && bucklesLaterally(a.Candidate.Section) {
		name(s.Basis == stability.GivenLength && m.tooShort(s.Lcr), "L_T")
		name(s.Basis == stability.FollowsZ && m.tooShort(s.Lcr), "L_cr,z")
	}
	if len(given) == 0 {
		return ""
	}
	return strings.Join(given, ", ") + " given below 0.7 L: psi, C1 and C_m are of the moments over the whole length; " +
		"where a restraint between the ends makes it so short, they are unsafe: give the restraint instead"
}

// tooShort reports whether a given buckling length, mm, 0 for none, is below
// what ends can explain.
func (m *Member) tooShort(lcr float64) bool {
	return lcr > 0 && lcr < leastByEnds*m.Length*(1-PassTolerance)
}

// changing reports whether the moments about y-y and about z-z change along the
// member in any combination.
func (a *Assessment) changing() (y, z bool) {
	for i := range a.Member.Forces {
		b, _ := a.Member.moments(a.Candidate, i)
		y = y || b.my.Bottom != b.my.Top
		z = z || b.mz.Bottom != b.mz.Top
	}
	return y, z
}
