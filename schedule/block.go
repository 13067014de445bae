package schedule

import (
	"math"
	"strings"

	"stanchion/design"
)

// ResultColumns returns the result columns in their order.
func ResultColumns(o ResultOptions) []ResultColumn {
	outcome := outcomeColumns()
	status, note := outcome[:1], outcome[1:]
	var cols []ResultColumn
	if o.StatusFirst {
		cols = underGroup("Outcome", append(status, chosenColumns()...))
	} else {
		cols = underGroup("Section", chosenColumns())
		note = outcome
	}
	if o.AtHand {
		cols = append(cols, underGroup("Section", atHandColumns())...)
	}
	cols = append(cols, underGroup("Governing check", governingColumns())...)
	cols = append(cols, underGroup("Buckling", bucklingColumns())...)
	cols = append(cols, underGroup("Steel", sectionColumns())...)
	cols = append(cols, underGroup("Next lighter section", lighterColumns())...)
	if o.Reserve {
		cols = append(cols, underGroup("Reserve", reserveColumns())...)
	}
	if o.Fire {
		cols = append(cols, underGroup("Fire", fireColumns())...)
	}
	if o.StatusFirst {
		return append(cols, underGroup("Remarks", note)...)
	}
	return append(cols, underGroup("Outcome", note)...)
}

// underGroup puts columns under one heading.
func underGroup(group string, cols []ResultColumn) []ResultColumn {
	for i := range cols {
		cols[i].Group = group
	}
	return cols
}

func outcomeColumns() []ResultColumn {
	return []ResultColumn{
		text("status", 11, func(_ *Member, r *design.Result) string { return r.Status.String() }).repeated(),
		text("note", 40, func(m *Member, r *design.Result) string { return Note(m, r) }),
	}
}

func chosenColumns() []ResultColumn {
	return []ResultColumn{
		text("section", 18, func(_ *Member, r *design.Result) string { return r.Section }).repeated(),
		text("grade", 8, func(_ *Member, r *design.Result) string { return r.Grade }).repeated(),
		{Name: "utilisation", Decimals: 3, Numeric: true, Width: 10, Repeated: true, value: utilisation},
	}
}

func atHandColumns() []ResultColumn {
	return []ResultColumn{text("steel at hand", 24, func(_ *Member, r *design.Result) string { return r.AtHand }).repeated()}
}

func governingColumns() []ResultColumn {
	return []ResultColumn{
		text("governing axis", 14, func(_ *Member, r *design.Result) string { return AxisName(r.Governing.Kind) }),
		text("governing check", 22, func(_ *Member, r *design.Result) string { return CheckName(r.Governing.Kind) }),
		text("clause", 11, func(_ *Member, r *design.Result) string { return r.Governing.Clause }),
		text("combination", 12, governingCombination),
		text("segment", 9, governingSegment),
	}
}

func bucklingColumns() []ResultColumn {
	return []ResultColumn{
		number("N_b,y,Rd", "kN", 1, 9, func(_ *Member, r *design.Result) float64 { return r.Y.NbRd / 1e3 }),
		number("N_b,z,Rd", "kN", 1, 9, func(_ *Member, r *design.Result) float64 { return r.Z.NbRd / 1e3 }),
		number("N_b,T,Rd", "kN", 1, 9, func(_ *Member, r *design.Result) float64 { return torsional(r).NbRd / 1e3 }),
		number("L_cr,y", "m", 3, 8, func(_ *Member, r *design.Result) float64 { return r.Y.Lcr / 1e3 }),
		number("L_cr,z", "m", 3, 8, func(_ *Member, r *design.Result) float64 { return r.Z.Lcr / 1e3 }),
		number("lambda_bar,y", "", 3, 8, func(_ *Member, r *design.Result) float64 { return r.Y.LambdaBar }),
		number("lambda_bar,z", "", 3, 8, func(_ *Member, r *design.Result) float64 { return r.Z.LambdaBar }),
		number("chi_y", "", 3, 7, func(_ *Member, r *design.Result) float64 { return r.Y.Chi }),
		number("chi_z", "", 3, 7, func(_ *Member, r *design.Result) float64 { return r.Z.Chi }),
		text("curve y", 6, func(_ *Member, r *design.Result) string { return r.Y.Curve }),
		text("curve z", 6, func(_ *Member, r *design.Result) string { return r.Z.Curve }),
	}
}

func sectionColumns() []ResultColumn {
	return []ResultColumn{
		number("class", "", 0, 6, func(_ *Member, r *design.Result) float64 { return float64(r.Class) }),
		number("fy", "N/mm2", 0, 7, func(_ *Member, r *design.Result) float64 { return r.Fy }),
		number("mass per metre", "kg/m", 1, 8, func(_ *Member, r *design.Result) float64 { return r.MassPerM }),
		number("mass", "kg", 1, 9, func(_ *Member, r *design.Result) float64 { return r.Mass }),
	}
}

func lighterColumns() []ResultColumn {
	return []ResultColumn{
		text("next lighter", 18, nextLighter),
		text("fails in", 22, nextLighterFails),
		number("its utilisation", "", 3, 10, func(_ *Member, r *design.Result) float64 { return r.NextLighterUtilisation }),
	}
}

func reserveColumns() []ResultColumn {
	return []ResultColumn{
		number("reserve factor on N_Ed", "", 3, 9, func(_ *Member, r *design.Result) float64 { return r.Reserve }),
		number("reserve on N_Ed", "kN", 1, 9, func(_ *Member, r *design.Result) float64 { return r.ReserveN / 1e3 }),
		text("then fails in", 22, func(_ *Member, r *design.Result) string { return CheckName(r.ReserveCheck) }),
	}
}

func fireColumns() []ResultColumn {
	return []ResultColumn{
		// Rounded down: the next degree up has not been shown to be borne.
		number("critical temperature", "C", 0, 9, func(_ *Member, r *design.Result) float64 { return math.Floor(r.Fire.CriticalTemperature) }),
		number("A_m/V", "1/m", 0, 7, func(_ *Member, r *design.Result) float64 { return r.Fire.SectionFactor }),
		number("time to critical, unprotected", "min", 1, 9, func(_ *Member, r *design.Result) float64 { return r.Fire.TimeToCritical }),
	}
}

// text makes a column of texts; an empty one is a blank cell.
func text(name string, width int, of func(*Member, *design.Result) string) ResultColumn {
	return ResultColumn{Name: name, Width: width, value: func(m *Member, r *design.Result) Value {
		if s := of(m, r); s != "" {
			return Value{Kind: Text, Text: s}
		}
		return Value{}
	}}
}

// number makes a column of numbers; 0 says that a value does not apply, and is
// a blank cell.
func number(name, unit string, decimals, width int, of func(*Member, *design.Result) float64) ResultColumn {
	return ResultColumn{Name: name, Unit: unit, Decimals: decimals, Numeric: true, Width: width, value: func(m *Member, r *design.Result) Value {
		if x := of(m, r); usable(x) {
			return Value{Kind: Number, Number: x}
		}
		return Value{}
	}}
}

func (c ResultColumn) repeated() ResultColumn {
	c.Repeated = true
	return c
}

// utilisation is 0 of a member without load, and blank of one without section.
func utilisation(_ *Member, r *design.Result) Value {
	if r.Section == "" || !finite(r.Utilisation) {
		return Value{}
	}
	return Value{Kind: Number, Number: r.Utilisation}
}

func torsional(r *design.Result) *design.Buckling {
	if r.HasT {
		return &r.T
	}
	return &design.Buckling{}
}

func governingCombination(m *Member, r *design.Result) string {
	if i := r.Governing.Combination; r.Governing.Kind != design.KindNone && i >= 0 && i < len(m.Column.Combinations) {
		return m.Column.Combinations[i].Name
	}
	return ""
}

// CombinationName names the combination of the governing check; empty: none.
func CombinationName(m *Member, r *design.Result) string { return governingCombination(m, r) }

func governingSegment(_ *Member, r *design.Result) string {
	if r.Governing.Kind == design.KindNone || r.Governing.To <= r.Governing.From {
		return ""
	}
	return SegmentName(r.Governing.From, r.Governing.To)
}

// nextLighter names the grade too where it is another one.
func nextLighter(_ *Member, r *design.Result) string {
	if r.NextLighterGrade != "" && r.NextLighterGrade != r.Grade {
		return r.NextLighter + " " + r.NextLighterGrade
	}
	return r.NextLighter
}

func nextLighterFails(_ *Member, r *design.Result) string {
	c := &r.NextLighterCheck
	return join(": ", CheckName(c.Kind), c.Reason)
}

// Note joins what the reading, the design and the fire have to say about a
// member.
func Note(m *Member, r *design.Result) string {
	seen := map[string]bool{}
	var notes []string
	for _, list := range [][]string{m.problemTexts(), r.Notes, fireNotes(&r.Fire), m.Column.Notes} {
		for _, n := range list {
			if !seen[n] {
				seen[n] = true
				notes = append(notes, n)
			}
		}
	}
	return strings.Join(notes, "; ")
}

// fireNotes says why a member has no critical temperature, and on what it rests
// (EN 1993-1-2, as the lengths used where none are given for fire).
func fireNotes(f *design.FireResult) []string {
	if f.Reason == "" {
		return f.Notes
	}
	return append([]string{"no critical temperature: " + f.Reason}, f.Notes...)
}

// problemTexts are the member's problems with their cells, without the file.
func (m *Member) problemTexts() []string {
	var list []string
	for _, p := range m.Problems {
		list = append(list, join(": ", p.Cell, p.Message()))
	}
	return list
}

// Cells appends the result cells of the first row of a member, one a column.
func Cells(to []Value, cols []ResultColumn, m *Member, r *design.Result) []Value {
	for i := range cols {
		to = append(to, cols[i].value(m, r))
	}
	return to
}

// ContinuedCells appends the result cells of a further row of a member: what
// makes no sum, and which row holds the rest.
func ContinuedCells(to []Value, cols []ResultColumn, m *Member, r *design.Result) []Value {
	for i := range cols {
		switch {
		case cols[i].Repeated:
			to = append(to, cols[i].value(m, r))
		case cols[i].Name == "note":
			to = append(to, Value{Kind: Text, Text: "one member with " + m.firstRow()})
		default:
			to = append(to, Value{})
		}
	}
	return to
}

// firstRow names the first row of a member as messages do: "line 5" of a text,
// which has no cells, "row 5" of a sheet.
func (m *Member) firstRow() string {
	if cell := m.Column.Cell; cell != "" && !strings.Contains(cell, "!") {
		return cell
	}
	return rowList("row", m.Rows[:1])
}

// NotReadResult is the result of a member that could not be read. Its reasons
// are the member's problems, which Note adds.
func NotReadResult(*Member) design.Result { return design.Result{Status: design.NotRead} }
