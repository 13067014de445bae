package working_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
	"stanchion/design/working"
	"stanchion/design/working/formula"
)

func settings(t require.TestingT) design.Settings {
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	return design.Settings{National: uk, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1}
}

// sheetOf works a column out in a section, as a run would.
func sheetOf(t require.TestingT, col *design.Column, s *catalogue.Section, grade string, set *design.Settings) *working.Sheet {
	g, err := material.Parse(grade)
	require.NoError(t, err)
	c, err := ec3.NewCandidate(s, g, set)
	require.NoError(t, err)
	m, err := ec3.NewMember(col, set)
	require.NoError(t, err)
	var a ec3.Assessment
	m.Assess(c, &a)
	a.Explain()
	r := &design.Result{Section: s.Name(), Grade: g.Name, Utilisation: a.Utilisation, Governing: a.Governing,
		Y: a.Y, Z: a.Z, T: a.T, HasT: a.HasT, TKind: a.TKind, Class: a.Class, Fy: c.Fy,
		MassPerM: s.Mass, Mass: s.Mass * col.Length / 1000, Fire: m.AssessFire(c)}
	if !ec3.Passes(a.Utilisation, set.Limit) {
		r.Status = design.Fails
	}
	return working.Of(&a, r)
}

// followed works every line of a sheet out from its printed numbers, and
// compares with the printed result.
func followed(t assert.TestingT, s *working.Sheet) (steps int) {
	assert.Empty(t, s.Off)
	for _, b := range s.Blocks {
		for _, item := range b.Items {
			step, ok := item.(*working.Step)
			if !ok || step.Numbers == nil {
				continue
			}
			steps++
			printed := formula.Text(step.Numbers)
			read, err := formula.Parse(printed)
			assert.NoError(t, err, printed)
			got, err := formula.Eval(read, nil)
			assert.NoError(t, err, printed)
			// One step of the last figure is the promise of the sheet; a
			// utilisation has three decimals whatever it is worked out from.
			assert.LessOrEqual(t, math.Abs(got-step.Result.Value()), step.Result.Step()*1.001,
				"%s: %s = %s = %s = %s", b.Title, formula.Text(step.Left), formula.Text(step.Formula), printed, step.Result)
		}
	}
	return steps
}

// anyColumn draws a column that the rules can take.
func anyColumn(t *rapid.T) *design.Column {
	L := rapid.Float64Range(1500, 12000).Draw(t, "L")
	col := &design.Column{Mark: "C1", Quantity: 1, Length: L}
	for _, h := range []*design.Hold{&col.Y, &col.Z} {
		h.Bottom.Condition = rapid.SampledFrom([]design.Condition{design.Pinned, design.PartlyFixed, design.Fixed}).Draw(t, "bottom")
		h.Top.Condition = rapid.SampledFrom([]design.Condition{design.Pinned, design.PartlyFixed, design.Fixed}).Draw(t, "top")
		switch rapid.IntRange(0, 5).Draw(t, "hold") {
		case 0:
			h.Restraints = []float64{0.4 * L}
		case 1:
			h.Restraints = []float64{0.3 * L, 0.7 * L}
		case 3:
			if rapid.Bool().Draw(t, "stiffness") {
				s := rapid.Float64Range(1e8, 1e11).Draw(t, "S")
				h.Top.Stiffness = &s
			} else {
				eta := rapid.Float64Range(0, 1).Draw(t, "eta")
				h.Bottom.Eta = &eta
			}
		case 2:
			h.Lcr = rapid.Float64Range(1000, 15000).Draw(t, "Lcr")
		}
	}
	if rapid.Bool().Draw(t, "torsion") {
		col.Torsion.Given = true
	}
	n := rapid.IntRange(1, 2).Draw(t, "combinations")
	for range n {
		c := design.Combination{NEd: math.Round(rapid.Float64Range(-500e3, 4000e3).Draw(t, "N"))}
		if rapid.Bool().Draw(t, "steps") {
			c.Steps = []design.Step{{Height: 0.5 * L, NEd: c.NEd * 0.6}}
		}
		col.Combinations = append(col.Combinations, c)
	}
	return col
}

// bent adds end moments to a column.
func bent(t *rapid.T, col *design.Column) *design.Column {
	moment := rapid.Custom(func(t *rapid.T) float64 {
		return rapid.SampledFrom([]float64{0, 1, 1, -1}).Draw(t, "sign") * rapid.Float64Range(1e6, 150e6).Draw(t, "M")
	})
	for i := range col.Combinations {
		c := &col.Combinations[i]
		if rapid.IntRange(0, 3).Draw(t, "y") > 0 {
			c.My = design.EndMoments{Bottom: moment.Draw(t, "My bottom"), Top: moment.Draw(t, "My top")}
		}
		if rapid.IntRange(0, 1).Draw(t, "z") > 0 {
			c.Mz = design.EndMoments{Bottom: moment.Draw(t, "Mz bottom") / 4, Top: moment.Draw(t, "Mz top") / 4}
		}
	}
	return col
}

// A column that beams load is followed too, with what stands above and below.
func TestEveryLineOfSimpleConstructionCanBeFollowed(t *testing.T) {
	var sections []*catalogue.Section
	for _, s := range catalogue.Default().Sections() {
		if s.Shape == catalogue.ShapeI || s.Shape == catalogue.ShapeRHS {
			sections = append(sections, s)
		}
	}
	reaction := rapid.Custom(func(t *rapid.T) float64 {
		return math.Round(rapid.Float64Range(0, 300e3).Draw(t, "R"))
	})
	column := func(t *rapid.T) *design.Column {
		c := design.Combination{NEd: math.Round(rapid.Float64Range(50e3, 3000e3).Draw(t, "N")), HasReactions: true}
		c.FlangeA, c.FlangeB, c.WebA, c.WebB = reaction.Draw(t, "A"), reaction.Draw(t, "B"), reaction.Draw(t, "C"), reaction.Draw(t, "D")
		return &design.Column{Length: rapid.Float64Range(2500, 6000).Draw(t, "L"), Combinations: []design.Combination{c}}
	}
	simple := 0
	rapid.Check(t, func(t *rapid.T) {
		set := settings(t)
		set.Moments, set.Interaction = design.MomentsSimple, design.SimpleInteraction
		set.Growth = rapid.SampledFrom([]float64{1, 1.2}).Draw(t, "growth")
		s := rapid.SampledFrom(sections).Draw(t, "section")
		g, err := material.Parse("S355")
		require.NoError(t, err)
		c, err := ec3.NewCandidate(s, g, &set)
		if err != nil {
			t.Skip(err)
		}
		m, err := ec3.NewMember(column(t), &set)
		require.NoError(t, err)
		var neighbours [2]*ec3.Neighbour
		for i := range neighbours {
			if rapid.Bool().Draw(t, "neighbour") {
				neighbours[i] = &ec3.Neighbour{Column: column(t), Section: rapid.SampledFrom(sections).Draw(t, "its section")}
			}
		}
		m.Between(neighbours[0], neighbours[1])
		var a ec3.Assessment
		m.Assess(c, &a)
		if a.Simple.Class > 0 {
			simple++
		}
		followed(t, working.Of(&a, &design.Result{Section: s.Name(), Grade: g.Name, Utilisation: a.Utilisation}))
	})
	assert.Positive(t, simple)
}

func TestEveryLineOfBendingCanBeFollowed(t *testing.T) {
	var sections []*catalogue.Section
	for _, s := range catalogue.Default().Sections() {
		if s.Shape != catalogue.ShapeAngle && s.Shape != catalogue.ShapeChannel {
			sections = append(sections, s)
		}
	}
	rapid.Check(t, func(t *rapid.T) {
		set := settings(t)
		set.National = rapid.SampledFrom(ec3.NationalSets()).Draw(t, "national")
		set.Growth = rapid.SampledFrom([]float64{1, 1.1}).Draw(t, "growth")
		set.Interaction = rapid.SampledFrom([]design.Interaction{design.AnnexB, design.AnnexA}).Draw(t, "annex")
		set.LTB = rapid.SampledFrom([]design.LTBMethod{design.LTBRolled, design.LTBGeneral}).Draw(t, "LTB")
		if rapid.Bool().Draw(t, "weight") {
			set.SelfWeight = 1.35
		}
		s := rapid.SampledFrom(sections).Draw(t, "section")
		grade := rapid.SampledFrom([]string{"S235", "S355", "S460"}).Draw(t, "grade")
		g, err := material.Parse(grade)
		require.NoError(t, err)
		if _, err := ec3.NewCandidate(s, g, &set); err != nil {
			t.Skip(err)
		}
		sheet := sheetOf(t, bent(t, anyColumn(t)), s, grade, &set)
		for _, c := range sheet.Checks {
			if (c.Kind == design.ShearZ || c.Kind == design.ShearY) && c.Utilisation >= 1 || math.IsInf(c.Utilisation, 1) {
				t.Skip("shear leaves nothing for moments")
			}
		}
		followed(t, sheet)
	})
}

func TestEveryLineCanBeFollowed(t *testing.T) {
	sections := catalogue.Default().Sections()
	rapid.Check(t, func(t *rapid.T) {
		set := settings(t)
		set.National = rapid.SampledFrom(ec3.NationalSets()).Draw(t, "national")
		if rapid.Bool().Draw(t, "weight") {
			set.SelfWeight = 1.35
		}
		if rapid.Bool().Draw(t, "fire") {
			set.FireRatio = 0.6
		}
		if rapid.Bool().Draw(t, "elastic") {
			set.Method = design.MethodElastic
		}
		s := rapid.SampledFrom(sections).Draw(t, "section")
		g, err := material.Parse(rapid.SampledFrom([]string{"S235", "S355", "S460"}).Draw(t, "grade"))
		require.NoError(t, err)
		if _, err := ec3.NewCandidate(s, g, &set); err != nil {
			t.Skip(err)
		}
		followed(t, sheetOf(t, anyColumn(t), s, g.Name, &set))
	})
}
