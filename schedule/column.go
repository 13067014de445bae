package schedule

import (
	"fmt"
	"strings"

	"stanchion/design"
)

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
