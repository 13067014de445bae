package stability

import (
	"math"
	"sync"

	"stanchion/design"
)

// solvers are the memories of the elastic analysis, shared between columns so
// that a shape met before is not analysed again.
var solvers = sync.Pool{New: func() any { return new(solver) }}

// mostRestraints bounds the work on a list of restraints that no column has.
const mostRestraints = 100

// findElastic applies method elastic: the lengths follow from the critical
// load of the whole member, found here for a uniform force.
func (l *Lengths) findElastic() error {
	h := l.hold
	if l.unrestrainedGuide() {
		return l.guidedBeyond()
	}
	if len(h.Restraints) > mostRestraints {
		return &Error{l.Axis, "there are more than 100 restraints, too many for the elastic method",
			"use the effective length method 'segment', or give L_cr or k"}
	}
	l.split(Elastic)
	l.elastic = true
	l.withEI = h.Bottom.Stiffness != nil || h.Top.Stiffness != nil
	if !l.standsUp() {
		return l.mechanism()
	}
	if !l.withEI {
		l.solveInto(l.base, nil, false, 0)
	}
	return nil
}

// unrestrainedGuide reports whether a guided end whose rotational restraint is
// not given as a number lies beyond a restraint.
func (l *Lengths) unrestrainedGuide() bool {
	h := l.hold
	bare := func(e *design.End) bool {
		return (e.Condition == design.Guided || e.Condition == design.PartlyGuided) && !numbered(e)
	}
	return len(h.Restraints) > 0 && (bare(&h.Bottom) || bare(&h.Top))
}

// standsUp reports whether the unloaded column is no mechanism: two points
// hold it in position, or one does and an end is held in direction.
func (l *Lengths) standsUp() bool {
	h := l.hold
	held := len(h.Restraints)
	for _, e := range []*design.End{&h.Bottom, &h.Top} {
		if !e.Condition.Sways() {
			held++
		}
	}
	turned := spring(&h.Bottom, h.Top.Condition.Sways(), 1, 1) > 0 ||
		spring(&h.Top, h.Bottom.Condition.Sways(), 1, 1) > 0
	return held >= 2 || held == 1 && turned
}

// solveInto sets the lengths of the segments from the critical load of the
// whole member under the forces of a combination, or a uniform force where the
// combination does not step or has no compression.
func (l *Lengths) solveInto(segs []Segment, c *design.Combination, stepped bool, EI float64) {
	s := solvers.Get().(*solver)
	defer solvers.Put(s)
	reference := 1.0
	if stepped {
		reference = MaxNEd(c, 0, l.length)
		stepped = reference > 0
	}
	m := l.memberShape(EI)
	if !stepped {
		l.setLengths(segs, s.uniform(&m, l.hold.Restraints, l.length), func(*Segment) float64 { return 1 })
		return
	}
	lambda := s.stepped(&m, l.hold.Restraints, l.length, c, reference)
	l.setLengths(segs, lambda, func(g *Segment) float64 { return MaxNEd(c, g.From, g.To) / reference })
}

// setLengths turns the critical load lambda, in EI/L2 of the reference force,
// into the length of the pinned-pinned column that buckles at each segment's
// own critical force.
func (l *Lengths) setLengths(segs []Segment, lambda float64, force func(*Segment) float64) {
	for i := range segs {
		s := &segs[i]
		n := force(s)
		s.Basis = Elastic
		if n <= 0 {
			s.Lcr, s.Factor = 0, 0
			continue
		}
		s.Lcr = math.Min(math.Pi/math.Sqrt(lambda*n), weakest) * l.length
		s.Factor = s.Lcr / s.Length()
	}
}

// ends describes the two ends of a member for the analysis.
type ends struct {
	sways  [2]bool
	spring [2]float64 // rotational, in EI/L of the whole length; +Inf rigid
}

// memberShape returns the ends of the column about the axis.
func (l *Lengths) memberShape(EI float64) ends {
	h := l.hold
	first, last := l.base[0], l.base[len(l.base)-1]
	bottom, top := h.Bottom.Condition.Sways(), h.Top.Condition.Sways()
	return ends{
		sways: [2]bool{bottom, top},
		spring: [2]float64{
			spring(&h.Bottom, top, first.Length(), EI) * l.length / first.Length(),
			spring(&h.Top, bottom, last.Length(), EI) * l.length / last.Length(),
		},
	}
}
