package schedule

import (
	"fmt"
	"slices"

	"stanchion/design"
)

// memberData is one member on its way from rows to a column.
type memberData struct {
	r            *reader
	plan         *combinationPlan
	rows         []*rowData
	merged       []value // by binding: what the rows say together
	length       float64
	combinations []design.Combination
	problems     []*Problem
	notes        []string
	saidNoAxial  bool
}

// build makes a member of its rows.
func (r *reader) build(combos *combinationPlan, rows []*rowData) *Member {
	m := &memberData{r: r, plan: combos, rows: rows}
	m.merge()
	out := &Member{Earlier: rows[0].old}
	col := &out.Column
	for i := range r.bindings {
		if v := &m.merged[i]; v.set && r.bindings[i].key.field == familyField {
			m.field(col, i, v)
		}
	}
	for i := range r.bindings {
		if v := &m.merged[i]; v.set {
			m.field(col, i, v)
		}
	}
	m.place(col)
	for _, d := range rows {
		out.Rows = append(out.Rows, d.number)
		combos.row(m, d)
	}
	col.Combinations = m.combinations
	m.complete(col)
	col.Notes = m.notes
	out.Problems = m.problems
	return out
}

// merge joins what the rows say: a blank agrees with everything, two different
// values disagree. Actions stay with their rows.
func (m *memberData) merge() {
	bindings := m.r.bindings
	m.merged = m.rows[0].values
	if len(m.rows) > 1 {
		m.merged = slices.Clone(m.merged)
	}
	for _, d := range m.rows {
		m.problems = append(m.problems, d.problems...)
		m.notes = append(m.notes, d.notes...)
	}
	for i := range bindings {
		if f := bindings[i].key.line(); f.needs&perCombination != 0 || f.name == combinationField {
			continue
		}
		for _, d := range m.rows[1:] {
			m.agree(i, &d.values[i])
		}
	}
	for i := range bindings {
		if v := &m.merged[i]; v.set && bindings[i].key.field == lengthField {
			m.length = v.num
		}
	}
}

// agree holds a further row's value against what the rows before it say.
func (m *memberData) agree(i int, v *value) {
	have := &m.merged[i]
	switch {
	case !v.set:
	case !have.set:
		*have = *v
	case have.num == v.num && foldName(have.text) == foldName(v.text) && have.ends == v.ends && slices.Equal(have.heights, v.heights):
	case m.r.bindings[i].key.field == sectionField && m.sameSection(have.text, v.text):
	case len(have.heights) > 0 && m.sameHeights(have.heights, v.heights):
	default:
		b := &m.r.bindings[i]
		m.problem(v.row, i, fmt.Sprintf("%s differs from %s of the same member", b.title(), rowName(m.r.src, m.r.plan.Sheet, have.row)), "make the rows of one mark and level agree")
	}
}

// sameSection compares two spellings by the section that they name.
func (m *memberData) sameSection(a, b string) bool {
	x, errX := m.r.names.section(a, nil)
	y, errY := m.r.names.section(b, nil)
	return errX == nil && errY == nil && x == y
}

// sameHeights compares two lists by the heights that they give.
func (m *memberData) sameHeights(a, b []height) bool {
	for i := range m.r.bindings {
		if v := &m.merged[i]; v.set && m.r.bindings[i].key.field == lengthField {
			x, _, errX := resolveHeights(a, v.num)
			y, _, errY := resolveHeights(b, v.num)
			return errX == nil && errY == nil && slices.EqualFunc(x, y, func(p, q float64) bool { return abs(p-q) < heightTolerance })
		}
	}
	return false
}

// problem adds a problem at a binding's cell.
func (m *memberData) problem(row, i int, what, do string) {
	b := &m.r.bindings[i]
	p := &Problem{What: what, Do: do}
	m.r.place(p, b, row, &blankCell)
	m.problems = append(m.problems, p)
}

// failed reports whether a cell of a row could not be read.
func (m *memberData) failed(d *rowData, i int) bool {
	col := m.r.bindings[i].Col
	return slices.ContainsFunc(d.problems, func(p *Problem) bool { return p.Col == col && p.Row == d.number })
}

// rowCombination returns the combination that a row names.
func (m *memberData) rowCombination(d *rowData) string {
	for i := range m.r.bindings {
		if m.r.bindings[i].key.field == combinationField && d.values[i].set {
			return d.values[i].text
		}
	}
	return ""
}

// place says where the member stands.
func (m *memberData) place(col *design.Column) {
	row := m.rows[0].number
	markCol := m.r.bindings[0].Col
	for i := range m.r.bindings {
		if m.r.bindings[i].key.field == markField {
			markCol = m.r.bindings[i].Col
		}
	}
	if rn, ok := m.r.src.(RowNamer); ok {
		col.Cell = rn.WhereRow(m.r.plan.Sheet, row)
	} else {
		col.Cell = m.r.src.Where(m.r.plan.Sheet, row, markCol)
	}
	if col.Mark == "" {
		col.Mark = col.Cell
	}
	if slices.ContainsFunc(m.rows, func(d *rowData) bool { return d.hidden }) {
		m.notes = append(m.notes, "the row is hidden")
	}
}

// complete adds what must not be missing, and the defaults.
func (m *memberData) complete(col *design.Column) {
	if col.Quantity == 0 {
		col.Quantity = 1
	}
	needs := []struct {
		field fieldName
		ok    bool
	}{
		{lengthField, m.length > 0},
		{axialField, len(m.combinations) > 0 || m.saidNoAxial || m.r.plan.loadsOptional},
	}
	for _, n := range needs {
		if n.ok || m.failedField(n.field) {
			continue
		}
		for i := range m.r.bindings {
			if b := &m.r.bindings[i]; b.key.field == n.field && b.above == nil {
				m.problem(m.rows[0].number, i, b.Field+" is missing", "give it in "+b.unit.name+", or clear the row")
				break
			}
		}
	}
}

func (m *memberData) failedField(f fieldName) bool {
	for i := range m.r.bindings {
		if m.r.bindings[i].key.field != f {
			continue
		}
		for _, d := range m.rows {
			if m.failed(d, i) {
				return true
			}
		}
	}
	return false
}
