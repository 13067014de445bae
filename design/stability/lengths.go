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
