package schedule

import "stanchion/design"

// ResultColumns returns the result columns in their order.
func ResultColumns(o ResultOptions) []ResultColumn { return nil }

// Cells appends the result cells of the first row of a member, one a column.
func Cells(to []Value, cols []ResultColumn, m *Member, r *design.Result) []Value { return to }

// ContinuedCells appends the result cells of a further row of a member.
func ContinuedCells(to []Value, cols []ResultColumn, m *Member, r *design.Result) []Value { return to }

// NotReadResult is the result of a member that could not be read.
func NotReadResult(m *Member) design.Result { return design.Result{Status: design.NotRead} }
