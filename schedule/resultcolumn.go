package schedule

import "stanchion/design"

// Valued returns the column with what fills its cells: for result columns of
// other kinds than a member's own results.
func (c ResultColumn) Valued(of func(*Member, *design.Result) Value) ResultColumn {
	c.value = of
	return c
}

// TextValue is a text; an empty one is a blank cell.
func TextValue(s string) Value {
	if s == "" {
		return Value{}
	}
	return Value{Kind: Text, Text: s}
}

// NumberValue is a number; one that says nothing is a blank cell.
func NumberValue(x float64) Value {
	if !finite(x) {
		return Value{}
	}
	return Value{Kind: Number, Number: x}
}
