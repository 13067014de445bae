package ec3

import (
	"math"

	"stanchion/design"
	"stanchion/design/stability"
)

// PassTolerance is the relative allowance on a utilisation against its limit.
// It covers the rounding of floating-point arithmetic, which differs between
// processors, and nothing else.
const PassTolerance = 1e-9

// Passes reports whether a utilisation is within a limit.
func Passes(utilisation, limit float64) bool { return utilisation <= limit*(1+PassTolerance) }

// exceeds reports whether a utilisation is greater than another by more than
// the rounding of arithmetic: equal segments have lengths that differ in their
// last digit, and that must not decide which of them governs.
func exceeds(u, other float64) bool { return u > other*(1+PassTolerance) }

// Limit returns the utilisation limit of a column: its own, else the
// settings', else 1.
func Limit(col *design.Column, set *design.Settings) float64 {
	switch {
	case col.Choice.Limit > 0:
		return col.Choice.Limit
	case set.Limit > 0:
		return set.Limit
	}
	return 1
}

// Assessment is the outcome of every check of one member in one candidate,
// with the values that the printed working shows. Its buffers are reused.
type Assessment struct {
	Candidate *Candidate
	Member    *Member

	Checks      []design.Check // in the order of the standard, then of the schedule, then of height
	Governing   design.Check
	Utilisation float64 // +Inf where a rule does not cover the member in this candidate
	Class       int     // of the governing check

	// The segments in this candidate, by combination and height. They belong
	// to the member or to the assessment: read them before the next Assess.
	SegY, SegZ, SegT []Segment

	// The values behind the buckling resistances, each of the segment and
	// combination with the greatest N_Ed/N_b,Rd. How is filled by Explain.
	Y, Z, T design.Buckling
	HasT    bool        // the section can buckle by twisting
	TKind   design.Kind // Torsional, TorsionalFlexural or RestrainedAxis
	Twist   Twist       // behind T

	// The values behind the checks of bending with the greatest utilisations;
	// Class is 0 where there is none.
	Section     Section629
	Lateral     Lateral
	Interaction Interaction
	Simple      Simple

	interactions []Interaction
	unchecked    bool          // (6.61) and (6.62) have no factors: Annex A beyond a critical load
	scopes       []simpleScope // by combination

	segY, segZ, segT *Segment // behind Y, Z, T
	bufY, bufZ       []Segment
	spare            []stability.Segment
}

// Assess carries out every check of the member in the candidate. It changes
// nothing but a, and allocates nothing once a's buffers are large enough.
func (m *Member) Assess(c *Candidate, a *Assessment) {
	*a = Assessment{Candidate: c, Member: m, Checks: a.Checks[:0],
		bufY: a.bufY[:0], bufZ: a.bufZ[:0], spare: a.spare[:0], interactions: a.interactions[:0], scopes: a.scopes[:0]}
	a.Class = c.Class
	m.segments(c, a)
	m.assessSection(c, a)
	m.assessBendingSection(c, a)
	m.assessFlexural(c, a)
	m.assessTwist(c, a)
	m.assessBendingBuckling(c, a)
}

// segments gives a the member's segments in the candidate.
func (m *Member) segments(c *Candidate, a *Assessment) {
	a.SegY, a.SegZ, a.SegT = m.Y, m.Z, m.T
	if m.y.VariesWithEI() {
		for i := range m.Forces {
			a.bufY = m.cut(a.bufY, &a.spare, &m.y, i, design.E*c.Section.Iy)
		}
		a.SegY = a.bufY
	}
	if m.z.VariesWithEI() {
		for i := range m.Forces {
			a.bufZ = m.cut(a.bufZ, &a.spare, &m.z, i, design.E*c.Section.Iz)
		}
		a.SegZ = a.bufZ
	}
}

// add records a check of an axial force, compression positive, against a
// resistance to its size.
func (a *Assessment) add(kind design.Kind, clause string, combination int, from, to, nEd, rd float64) {
	ed := math.Abs(nEd)
	a.record(design.Check{Kind: kind, Clause: clause, Combination: combination,
		From: from, To: to, NEd: nEd, Ed: ed, Rd: rd, Utilisation: ed / rd}, a.Candidate.Class)
}

// refuse records that a rule does not cover the member in this candidate.
func (a *Assessment) refuse(clause, reason string) {
	a.record(design.Check{Kind: design.Refused, Clause: clause, To: a.Member.Length,
		Utilisation: math.Inf(1), Reason: reason}, a.Candidate.Class)
}

// record keeps a check, and makes it the governing one where its utilisation
// is the greatest so far: among equals the first in the order of the standard
// governs, since checks are made in that order. The class is that which the
// check rests on.
func (a *Assessment) record(check design.Check, class int) {
	if a.Governing.Kind == design.KindNone || exceeds(check.Utilisation, a.Utilisation) {
		a.Governing, a.Utilisation, a.Class = check, check.Utilisation, class
	}
	a.Checks = append(a.Checks, check)
}

// Explain fills in how the buckling lengths of Y, Z and T were found.
func (a *Assessment) Explain() {
	for _, b := range []struct {
		to   *design.Buckling
		from *Segment
	}{{&a.Y, a.segY}, {&a.Z, a.segZ}, {&a.T, a.segT}} {
		if b.from != nil {
			b.to.How = b.from.How()
		}
	}
}
