package stability

import "stanchion/design"

// Axis is a cross-section axis that a column buckles about.
type Axis uint8

// The axes of EN 1993-1-1.
const (
	AxisY Axis = iota // y-y, major
	AxisZ             // z-z, minor
)

// String returns the axis as the standard writes it.
func (a Axis) String() string { return [...]string{"y-y", "z-z"}[a] }

// hold returns what holds the column about the axis.
func (a Axis) hold(col *design.Column) *design.Hold {
	if a == AxisY {
		return &col.Y
	}
	return &col.Z
}

// Error says why the lengths of a column cannot be found, and what to do.
type Error struct {
	Axis Axis
	What string // what is wrong
	Do   string // what the reader of the message can do
}

// Error returns the message, axis first.
func (e *Error) Error() string { return e.Axis.String() + ": " + e.What + ": " + e.Do }

// Sways reports whether the column counts as free to sway about the axis: an
// end that sways, a factor above 1 or a given buckling length above the
// length. Equivalent uniform moment factors are 0.9 about such an axis
// (EN 1993-1-1:2005 Table B.3).
func Sways(col *design.Column, axis Axis) bool {
	h := axis.hold(col)
	switch {
	case h.Lcr > 0:
		return h.Lcr > col.Length || h.K > 1 || swayingEnd(h)
	case h.K > 0:
		return h.K > 1 || swayingEnd(h)
	}
	return swayingEnd(h)
}

func swayingEnd(h *design.Hold) bool {
	return h.Bottom.Condition.Sways() || h.Top.Condition.Sways()
}
