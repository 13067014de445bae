package stability

import (
	"math"
	"strconv"
	"strings"

	"stanchion/design"
)

// Lengths holds what a column buckles over about one axis. The zero value is
// ready for Find, which may be called again and again: its memory is reused.
// It reads the column that it was found for, which must not change meanwhile.
// It is not for use by several goroutines at once.
type Lengths struct {
	Axis       Axis
	Overridden []float64 // restraints that a given length or factor overrides, mm

	hold    *design.Hold
	length  float64
	base    []Segment // lengths for a uniform force where no stiffness is given
	elastic bool      // lengths come from the critical load of the whole member
	withEI  bool      // an end's stiffness is given: lengths depend on EI
}

// weakest is the greatest effective-length factor: a column that a spring too
// weak to count holds up gets this one, so that every length is a number.
const weakest = 1e6

// Of finds the lengths of a column about an axis; see Find.
func Of(col *design.Column, axis Axis, method design.Method) (*Lengths, error) {
	l := new(Lengths)
	return l, l.Find(col, axis, method)
}

// Find works out the lengths of a column about an axis by the order of
// precedence of the package. A column that cannot be designed as it stands (a
// mechanism, an arrangement that the rules have no factor for) is an *Error.
func (l *Lengths) Find(col *design.Column, axis Axis, method design.Method) error {
	h := axis.hold(col)
	l.Axis, l.hold, l.length = axis, h, col.Length
	l.Overridden, l.base = nil, l.base[:0]
	l.elastic, l.withEI = false, false
	if err := l.validate(); err != nil {
		return err
	}
	switch {
	case h.Lcr > 0:
		l.whole(h.Lcr, GivenLength)
	case h.K > 0:
		l.whole(h.K*l.length, GivenFactor)
	case method == design.MethodElastic && !l.guided():
		return l.findElastic()
	default:
		return l.findSegments()
	}
	return nil
}

// VariesWithEI reports whether the lengths depend on the bending stiffness of
// the section that is tried: an end's rotational stiffness is given.
func (l *Lengths) VariesWithEI() bool { return l.withEI }

// VariesWithForce reports whether the lengths depend on how the axial force
// changes along the column: method elastic.
func (l *Lengths) VariesWithForce() bool { return l.elastic }

// Segments appends to dst the segments, lowest first, with their buckling
// lengths. The combination matters where VariesWithForce, and may be nil for a
// uniform force; EI (N mm2, about the axis) matters where VariesWithEI.
func (l *Lengths) Segments(dst []Segment, c *design.Combination, EI float64) []Segment {
	n := len(dst)
	dst = append(dst, l.base...)
	segs := dst[n:]
	if l.elastic {
		stepped := c != nil && !uniform(c)
		if stepped || l.withEI {
			l.solveInto(segs, c, stepped, EI)
		}
	} else if l.withEI {
		l.distribute(segs, EI)
	}
	return dst
}

// Note says which restraints a given length or factor overrides, for the row's
// note; empty where there are none.
func (l *Lengths) Note() string {
	if len(l.Overridden) == 0 {
		return ""
	}
	var b strings.Builder
	axis := l.Axis.String()
	if l.hold.Lcr > 0 {
		b.WriteString("L_cr," + axis[:1])
	} else {
		b.WriteString("k_" + axis[:1])
	}
	b.WriteString(" is given: the " + axis + " restraints at ")
	for i, x := range l.Overridden {
		if i > 0 {
			b.WriteString(", ")
		}
		b.WriteString(metres(x))
	}
	b.WriteString(" m do not count")
	return b.String()
}

// metres writes a height for people.
func metres(mm float64) string {
	return strconv.FormatFloat(math.Round(mm)/1000, 'f', -1, 64)
}

// whole makes the column one segment of a given buckling length.
func (l *Lengths) whole(Lcr float64, basis Basis) {
	l.base = append(l.base, Segment{To: l.length, Lcr: Lcr, Factor: Lcr / l.length, Basis: basis})
	l.Overridden = l.hold.Restraints
}

// guided reports whether an end is guided and no rotational restraint is given
// as a number anywhere: such a column takes Table 22's factor under either
// method.
func (l *Lengths) guided() bool {
	h := l.hold
	isGuided := func(e *design.End) bool {
		return e.Condition == design.Guided || e.Condition == design.PartlyGuided
	}
	return (isGuided(&h.Bottom) || isGuided(&h.Top)) && !numbered(&h.Bottom) && !numbered(&h.Top)
}

// split makes a segment between each two neighbouring points that hold the
// column, at factor 1.0.
func (l *Lengths) split(basis Basis) {
	l.base = appendSplit(l.base, l.length, l.hold.Restraints, basis)
	l.base[0].bottom = l.hold.Bottom.Condition
	l.base[len(l.base)-1].top = l.hold.Top.Condition
}

// appendSplit appends the segments of a length between its ends and the given
// heights.
func appendSplit(dst []Segment, length float64, heights []float64, basis Basis) []Segment {
	from := 0.0
	for i := 0; i <= len(heights); i++ {
		to := length
		if i < len(heights) {
			to = heights[i]
		}
		dst = append(dst, Segment{From: from, To: to, Lcr: to - from, Factor: 1, Basis: basis})
		from = to
	}
	return dst
}

// findSegments applies method segment: each segment on its own, an inner one
// pinned at both ends, an end segment held by the column's end and a pin.
func (l *Lengths) findSegments() error {
	h := l.hold
	if swayingEnd(h) && len(h.Restraints) > 0 {
		if l.guided() {
			return l.guidedBeyond()
		}
		return l.swayingBeyond()
	}
	l.split(Table22)
	l.withEI = h.Bottom.Stiffness != nil || h.Top.Stiffness != nil
	if numbered(&h.Bottom) || numbered(&h.Top) {
		return l.findDistributed()
	}
	for i := range l.base {
		s := &l.base[i]
		k, ok := table22(s.bottom, s.top)
		if !ok {
			return l.notInTable()
		}
		s.Factor, s.Lcr = k, k*s.Length()
	}
	return nil
}

// findDistributed applies the distribution-factor expressions to the end
// segments whose rotational restraint is given as a number.
func (l *Lengths) findDistributed() error {
	if swayingEnd(l.hold) && !l.resistsSway() {
		return l.mechanism()
	}
	for i := range l.base {
		if s := &l.base[i]; !l.distributed(i) {
			s.Factor, _ = table22(s.bottom, s.top)
			s.Lcr = s.Factor * s.Length()
		}
	}
	if !l.withEI {
		l.distribute(l.base, 0)
	}
	return nil
}

// distributed reports whether segment i takes its factor from distribution
// factors: it ends at an end of the column whose restraint is a number.
func (l *Lengths) distributed(i int) bool {
	return i == 0 && numbered(&l.hold.Bottom) || i == len(l.base)-1 && numbered(&l.hold.Top)
}

// distribute sets the factors of the segments that take theirs from
// distribution factors, for a column of bending stiffness EI.
func (l *Lengths) distribute(segs []Segment, EI float64) {
	h := l.hold
	for i := range segs {
		if !l.distributed(i) {
			continue
		}
		s := &segs[i]
		eta1, eta2 := 1.0, 1.0
		if i == 0 {
			eta1 = eta(&h.Bottom, h.Top.Condition.Sways(), s.Length(), EI)
		}
		if i == len(segs)-1 {
			eta2 = eta(&h.Top, h.Bottom.Condition.Sways(), s.Length(), EI)
		}
		s.Basis, s.eta, s.sway = Distribution, [2]float64{eta1, eta2}, swayingEnd(h)
		if s.sway {
			s.Factor = math.Min(Sway(eta1, eta2), weakest)
		} else {
			s.Factor = NonSway(eta1, eta2)
		}
		s.Lcr = s.Factor * s.Length()
	}
}

// resistsSway reports whether a column with a swaying end and nothing between
// its ends stands up: one end is held in position and something stops it from
// turning over.
func (l *Lengths) resistsSway() bool {
	h := l.hold
	if h.Bottom.Condition.Sways() && h.Top.Condition.Sways() {
		return false
	}
	turns := func(e, other *design.End) bool {
		return spring(e, other.Condition.Sways(), 1, 1) == 0
	}
	return !(turns(&h.Bottom, &h.Top) && turns(&h.Top, &h.Bottom))
}

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
