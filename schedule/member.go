package schedule

import (
	"fmt"
	"slices"
	"strings"

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
	case len(have.heights) > 0 && m.sameHeights(have.heights, v.heights):
	default:
		b := &m.r.bindings[i]
		m.problem(v.row, i, fmt.Sprintf("%s differs from %s of the same member", b.title(), rowList([]int{have.row})), "make the rows of one mark and level agree")
	}
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

// field puts one value on the column.
func (m *memberData) field(col *design.Column, i int, v *value) {
	b := &m.r.bindings[i]
	hold := &col.Y
	if b.key.axis == zAxis {
		hold = &col.Z
	}
	switch b.key.field {
	case markField:
		col.Mark = v.text
	case stackField:
		col.Stack = v.text
	case levelField:
		col.From, col.To = splitLevels(v.text)
	case fromField:
		col.From = v.text
	case toField:
		col.To = v.text
	case quantityField:
		col.Quantity = int(v.num)
	case groupField:
		col.Group = v.text
	case spliceField:
		col.Splice = v.num != 0
	case lengthField:
		col.Length = v.num
	case lcrField:
		hold.Lcr = v.num
	case factorField:
		hold.K = v.num
	case endsField:
		setEnds(hold, b.key.end, v.ends)
	case etaField:
		eta := v.num
		endOf(hold, b.key.end).Eta = &eta
	case stiffnessField:
		k := v.num
		endOf(hold, b.key.end).Stiffness = &k
	case restraintsField:
		hold.Restraints = m.resolved(i, v)
	case torsionField:
		col.Torsion.Given = true
		col.Torsion.Restraints = m.resolved(i, v)
	case ltField:
		col.Torsion.LT = v.num
	case heldAtField:
		col.Torsion.EccentricFlange = v.text == "flange"
		col.Torsion.Eccentric = v.num
	case sectionField:
		m.given(col, i, v)
	case gradeField:
		col.Grades = strings.Split(v.text, severalNames)
	default:
		setLimits(col, b, v)
	}
}

// given resolves the section that the schedule fixes, among the member's
// families where its name fits several.
func (m *memberData) given(col *design.Column, i int, v *value) {
	id := nameCell{sectionField, v.text + severalNames + strings.Join(col.Choice.Families, severalNames)}
	name, ok := m.r.sections[id]
	if !ok {
		var err error
		if name, err = m.r.names.section(v.text, col.Choice.Families); err != nil {
			m.problem(v.row, i, err.Error(), "")
			return
		}
		if len(m.r.sections) < remembered {
			id.text = strings.Clone(id.text)
			m.r.sections[id] = name
		}
	}
	col.Given = name
}

// resolved turns a restraint list into heights of this length.
func (m *memberData) resolved(i int, v *value) []float64 {
	if m.length <= 0 {
		return nil // reported by itself
	}
	b := &m.r.bindings[i]
	heights, notes, err := resolveHeights(v.heights, m.length)
	if err != nil {
		m.problem(v.row, i, fmt.Sprintf("%s is %q: %s", b.title(), v.text, err), restraintHelp)
	}
	for _, n := range notes {
		m.notes = append(m.notes, b.title()+": "+n)
	}
	return heights
}

func endOf(h *design.Hold, e end) *design.End {
	if e == topEnd {
		return &h.Top
	}
	return &h.Bottom
}

func setEnds(h *design.Hold, e end, c [2]design.Condition) {
	if e == noEnd {
		h.Bottom.Condition, h.Top.Condition = c[0], c[1]
		return
	}
	endOf(h, e).Condition = c[0]
}

// setLimits puts a limit of the choice, or what the fire check needs, on the
// column.
func setLimits(col *design.Column, b *Binding, v *value) {
	ch := &col.Choice
	switch k := b.key; k.field {
	case familyField:
		ch.Families = strings.Split(v.text, severalNames)
	case depthField:
		*pickBound(k.bound, &ch.MinDepth, &ch.MaxDepth) = v.num
	case widthField:
		*pickBound(k.bound, &ch.MinWidth, &ch.MaxWidth) = v.num
	case thicknessField:
		*pickBound(k.bound, &ch.MinThickness, &ch.MaxThickness) = v.num
	case limitField:
		ch.Limit = v.num
	case fireLengthField:
		if k.axis == yAxis {
			col.Fire.LcrY = v.num
		} else {
			col.Fire.LcrZ = v.num
		}
	case fireRatioField:
		col.Fire.LoadRatio = v.num
	case firePeriodField:
		col.Fire.Period = v.num
	case fireSidesField:
		col.Fire.Sides = int(v.num)
	case fireBoxField:
		col.Fire.Boxed = v.num != 0
	}
}

func pickBound(b bound, low, high *float64) *float64 {
	if b == least {
		return low
	}
	return high
}

// splitLevels parts one cell for both levels: "L1 to L2", "GF - 1F".
func splitLevels(s string) (from, to string) {
	for _, sep := range []string{" to ", "→", "->", " - ", " – ", "–", " / "} {
		if a, b, ok := strings.Cut(s, sep); ok && trim(a) != "" && trim(b) != "" && !strings.Contains(b, sep) {
			return trim(a), trim(b)
		}
	}
	return s, ""
}
