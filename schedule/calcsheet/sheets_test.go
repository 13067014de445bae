package calcsheet

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
	"stanchion/design/working"
)

// example is a column in a section: the subjects of these tests.
type example struct {
	name, section, grade string
	column               design.Column
	settings             func(*design.Settings)
}

// held is a column held about z-z between its ends, under two combinations.
func held() design.Column {
	col := design.Column{Mark: "C3", Stack: "B/4", From: "L1", To: "L2", Quantity: 2, Length: 5500,
		Combinations: []design.Combination{{Name: "ULS1", NEd: 800e3}, {Name: "ULS2", NEd: 850e3, Steps: []design.Step{{Height: 2500, NEd: 600e3}}}}}
	col.Z.Restraints = []float64{2500}
	col.Y.Bottom.Condition = design.Fixed
	return col
}

func bent() design.Column {
	col := held()
	col.Combinations[0].My = design.EndMoments{Bottom: -20e6, Top: 40e6}
	col.Combinations[0].Mz = design.EndMoments{Bottom: -2e6, Top: 6e6}
	return col
}

var examples = []example{
	{"axial", "203x203x60 UKC", "S355", held(), func(s *design.Settings) { s.SelfWeight, s.FireRatio = 1.35, 0.5 }},
	{"class4", "406x140x39 UKB", "S355", held(), nil},
	{"channel", "430x100x64 UKPFC", "S275", held(), nil},
	{"angle", "L 150x90x15", "S275", design.Column{Mark: "B7", Quantity: 1, Length: 2400, Combinations: []design.Combination{{NEd: 120e3}}}, nil},
	{"bent", "254x254x89 UKC", "S355", bent(), nil},
	{"bent-annex-a", "254x254x89 UKC", "S355", bent(), func(s *design.Settings) { s.Interaction = design.AnnexA }},
	{"bent-hollow", "RHS 250x150x8", "S355", bent(), nil},
	{"bent-class4", "406x140x39 UKB", "S355", bent(), nil},
	{"bent-class4-hollow", "SHS 300x300x6.3", "S355", bent(), nil},
}

// sheetOf works an example out.
func sheetOf(t testing.TB, e *example) *working.Sheet {
	t.Helper()
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	set := &design.Settings{National: uk, Limit: 1, Growth: 1}
	if e.settings != nil {
		e.settings(set)
	}
	s, err := catalogue.Default().Find(e.section, catalogue.FindOptions{})
	require.NoError(t, err)
	g, err := material.Parse(e.grade)
	require.NoError(t, err)
	c, err := ec3.NewCandidate(s, g, set)
	require.NoError(t, err)
	col := e.column
	col.Combinations = slices.Clone(col.Combinations)
	m, err := ec3.NewMember(&col, set)
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
