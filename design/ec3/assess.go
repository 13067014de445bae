package ec3

import (
	"stanchion/design"
)

// PassTolerance is the relative allowance on a utilisation against its limit.
// It covers the rounding of floating-point arithmetic, which differs between
// processors, and nothing else.
const PassTolerance = 1e-9

// Passes reports whether a utilisation is within a limit.
func Passes(utilisation, limit float64) bool { return utilisation <= limit*(1+PassTolerance) }

// Assessment is the outcome of every check of one member in one candidate,
// with the values that the printed working shows. Its buffers are reused.
type Assessment struct {
	Candidate *Candidate
	Member    *Member

	Checks      []design.Check // in the order of the standard, then of the schedule, then of height
	Governing   design.Check
	Utilisation float64
	Class       int // of the governing check

	// The values behind the buckling resistances, each of the segment and
	// combination with the greatest N_Ed/N_b,Rd.
	Y, Z, T design.Buckling
	HasT    bool        // the section can buckle by twisting
	TKind   design.Kind // Torsional, TorsionalFlexural or RestrainedAxis
}

// Assess carries out every check of the member in the candidate. It changes
// nothing but a, and allocates nothing once a's buffers are large enough.
func (m *Member) Assess(c *Candidate, a *Assessment) {
	*a = Assessment{Candidate: c, Member: m, Checks: a.Checks[:0]}
	m.assessSection(c, a)
	m.assessFlexural(c, a)
	m.assessTwist(c, a)
	a.govern()
}

// add records a check of an action against a resistance.
func (a *Assessment) add(kind design.Kind, clause string, combination int, from, to, ed, rd float64) {
	a.Checks = append(a.Checks, design.Check{Kind: kind, Clause: clause, Combination: combination,
		From: from, To: to, Ed: ed, Rd: rd, Utilisation: ed / rd})
}

// govern picks the governing check: the greatest utilisation, among equals the
// first.
func (a *Assessment) govern() {
	for i := range a.Checks {
		if i == 0 || a.Checks[i].Utilisation > a.Utilisation {
			a.Governing = a.Checks[i]
			a.Utilisation = a.Checks[i].Utilisation
		}
	}
	a.Class = a.Candidate.Class
}
