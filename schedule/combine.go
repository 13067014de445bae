package schedule

import (
	"cmp"
	"fmt"
	"slices"

	"stanchion/design"
)

// combinationPlan says which columns supply the combinations of a row. A
// column whose heading names no combination belongs to all of them.
type combinationPlan struct {
	names []string // in the order of their first columns
	own   []int    // by binding: index into names, -1: names none
	bare  bool     // N_Ed without a name makes a combination of its own
	axial map[int]int
	parts []int // bindings of steps, moments and reactions
}

func newCombinationPlan(bindings []Binding) *combinationPlan {
	p := &combinationPlan{own: make([]int, len(bindings)), axial: map[int]int{}}
	namedAxial := false
	for i := range bindings {
		b := &bindings[i]
		p.own[i] = -1
		if b.key.line().needs&perCombination == 0 {
			continue
		}
		if b.Combination != "" {
			p.own[i] = p.index(b.Combination)
		}
		if b.key.field == axialField && b.above == nil {
			p.axial[p.own[i]] = i
			namedAxial = namedAxial || p.own[i] >= 0
			continue
		}
		p.parts = append(p.parts, i)
	}
	_, bareAxial := p.axial[-1]
	p.bare = len(p.names) == 0 || bareAxial && namedAxial
	// Columns that name no combination come first, so that those that name one
	// overwrite them.
	slices.SortStableFunc(p.parts, func(a, b int) int { return cmp.Compare(min(p.own[a], 0), min(p.own[b], 0)) })
	return p
}

func (p *combinationPlan) index(name string) int {
	for i, n := range p.names {
		if sameName(n, name) {
			return i
		}
	}
	p.names = append(p.names, name)
	return len(p.names) - 1
}

// row appends the combinations that one row gives.
func (p *combinationPlan) row(m *memberData, d *rowData) {
	rowName := m.rowCombination(d)
	before := len(m.combinations)
	if p.bare {
		p.one(m, d, -1, rowName)
	}
	for g, name := range p.names {
		p.one(m, d, g, join(", ", rowName, name))
	}
	nothing := len(m.combinations) == before && !m.saidNoAxial && !m.failedField(axialField)
	if len(m.rows) > 1 && nothing && !m.r.plan.loadsOptional {
		m.noAxial(d, rowName)
	}
}

// one appends one combination of a row, if the row gives it.
func (p *combinationPlan) one(m *memberData, d *rowData, g int, name string) {
	axial, ok := p.axial[g]
	if !ok {
		axial, ok = p.axial[-1]
	}
	c := design.Combination{Name: name}
	own := false // something beside N_Ed belongs to this combination alone
	var given endsGiven
	for _, i := range p.parts {
		v := &d.values[i]
		if !v.set || p.own[i] >= 0 && p.own[i] != g {
			continue
		}
		own = own || p.own[i] == g
		m.action(&c, i, v)
		given.mark(&m.r.bindings[i])
	}
	if !ok {
		if m.r.plan.loadsOptional {
			return
		}
	} else if v := &d.values[axial]; v.set {
		c.NEd = v.num
		slices.SortFunc(c.Steps, func(a, b design.Step) int { return cmp.Compare(a.Height, b.Height) })
		m.combinations = append(m.combinations, c)
		m.oneEnd("M_y,Ed", &c.My, given[0])
		m.oneEnd("M_z,Ed", &c.Mz, given[1])
		return
	} else if m.failed(d, axial) {
		return // reported with its cell
	}
	if own && (ok || g >= 0) {
		m.noAxial(d, name)
	}
}

// endsGiven says by axis at which ends a combination has a moment: bottom, top.
type endsGiven [2][2]bool

func (g *endsGiven) mark(b *Binding) {
	if b.key.field != momentField {
		return
	}
	axis, end := 0, 0
	if b.key.axis == zAxis {
		axis = 1
	}
	if b.key.end == topEnd {
		end = 1
	}
	g[axis][end] = true
}

// oneEnd notes that a moment is given at one end alone: a blank is absent, and
// the diagram that falls to nothing there is more favourable than most.
func (m *memberData) oneEnd(name string, at *design.EndMoments, given [2]bool) {
	if given[0] == given[1] || at.Zero() {
		return
	}
	here, there := "bottom", "top"
	if given[1] {
		here, there = there, here
	}
	if note := fmt.Sprintf("%s is given at the %s alone: 0 is taken at the %s", name, here, there); !slices.Contains(m.notes, note) {
		m.notes = append(m.notes, note)
	}
}

// noAxial says that a row, or one combination of it, has no N_Ed.
func (m *memberData) noAxial(d *rowData, name string) {
	what := "N_Ed is missing"
	if name != "" {
		what = fmt.Sprintf("N_Ed of combination %q is missing", name)
	}
	for i := range m.r.bindings {
		if b := &m.r.bindings[i]; b.key.field == axialField && (b.Combination == "" || sameName(b.Combination, name)) {
			m.problem(d.number, i, what, "give it (0 where there is none), or clear what stands beside it")
			break
		}
	}
	m.saidNoAxial = true
}

// action puts one action on a combination.
func (m *memberData) action(c *design.Combination, i int, v *value) {
	b := &m.r.bindings[i]
	x := v.num
	switch b.key.field {
	case axialField:
		m.step(c, i, v)
	case momentField:
		at := &c.My
		if b.key.axis == zAxis {
			at = &c.Mz
		}
		if b.key.end == topEnd {
			at.Top = x
		} else {
			at.Bottom = x
		}
	case flangeAField:
		c.FlangeA, c.HasReactions = x, true
	case flangeBField:
		c.FlangeB, c.HasReactions = x, true
	case webAField:
		c.WebA, c.HasReactions = x, true
	case webBField:
		c.WebB, c.HasReactions = x, true
	}
}

// step sets the force above a height.
func (m *memberData) step(c *design.Combination, i int, v *value) {
	b := &m.r.bindings[i]
	at := b.above.mm
	if b.above.fraction {
		at *= m.length
	}
	if m.length > 0 && (at < heightTolerance || at > m.length-heightTolerance) {
		m.problem(v.row, i, fmt.Sprintf("%s: the height is outside the length %s m", b.title(), metres(m.length)), "clear the cell, or correct the length")
		return
	}
	for j := range c.Steps {
		if abs(c.Steps[j].Height-at) < heightTolerance {
			c.Steps[j].NEd = v.num
			return
		}
	}
	c.Steps = append(c.Steps, design.Step{Height: at, NEd: v.num})
}

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}
