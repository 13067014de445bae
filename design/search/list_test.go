package search

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

func TestListIsSharedByEqualChoices(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	a, err := e.List(&design.Choice{MaxDepth: 300}, []string{"S275"})
	require.NoError(t, err)
	b, err := e.List(&design.Choice{MaxDepth: 300, Limit: 0.9}, []string{"S275"})
	require.NoError(t, err)
	assert.Same(t, a, b)
	c, err := e.List(&design.Choice{MaxDepth: 310}, []string{"S275"})
	require.NoError(t, err)
	assert.NotSame(t, a, c)
	for _, cand := range a.Candidates {
		assert.LessOrEqual(t, cand.Section.H, 300.0)
	}
}

// Mass, depth, width, designation, and the weaker grade first.
func TestListOrder(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Families = []string{"UKC", "UKB", "HEA", "IPE"}
	set.Grades = []string{"S460", "S355", "S275"}
	e := engineOf(t, set)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	sorted := slices.IsSortedFunc(l.Candidates[:], func(a, b *ec3.Candidate) int {
		s, o := a.Section, b.Section
		for _, d := range []float64{s.Mass - o.Mass, s.H - o.H, s.B - o.B} {
			if d != 0 {
				return sign(d)
			}
		}
		if s != o {
			return slices.Compare([]byte(s.Name()), []byte(o.Name()))
		}
		return a.Grade.Nominal - b.Grade.Nominal
	})
	assert.True(t, sorted)
}

// With rates the objective is what is paid or emitted, not mass.
func TestListByCost(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Grades = []string{"S355", "S275"}
	set.Rates = design.Rates{Objective: design.ByCost,
		CostPerTonne: map[string]float64{"": 1000, "UKB": 800, "UKB S355": 850, "S355": 1100}}
	e := engineOf(t, set)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	cost := func(c *ec3.Candidate) float64 {
		rate := map[string]float64{"UKC S275": 1000, "UKC S355": 1100, "UKB S275": 800, "UKB S355": 850}[c.Section.Family+" "+c.Grade.Name]
		require.NotZero(t, rate)
		return rate * c.Section.Mass
	}
	for i := 1; i < len(l.Candidates); i++ {
		assert.LessOrEqual(t, cost(l.Candidates[i-1]), cost(l.Candidates[i])*(1+1e-12))
	}
	res := sizeOne(t, e, pressed(1e6))
	assert.Equal(t, design.Passes, res.Status)
	assert.Greater(t, res.NextLighterUtilisation, 1.0)

	set.Rates.CostPerTonne = map[string]float64{"UKB": 800}
	_, err = New(catalogue.Default(), set)
	assert.ErrorContains(t, err, "UKC")
}

func TestSettingsThatLeaveNothingToChooseFrom(t *testing.T) {
	for name, spoil := range map[string]func(*design.Settings){
		"grade":    func(s *design.Settings) { s.Grades = []string{"S999"} },
		"family":   func(s *design.Settings) { s.Families = []string{"XYZ"} },
		"no grade": func(s *design.Settings) { s.Grades = nil },
		"none":     func(s *design.Settings) { s.Families = nil },
		"limit":    func(s *design.Settings) { s.Limit = 0 },
	} {
		set := settingsOf(t, "UK")
		spoil(&set)
		_, err := New(catalogue.Default(), set)
		assert.Error(t, err, name)
	}
}

// What the rules do not cover is left out and said where nothing passes.
func TestRefusedCandidatesAreKept(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Families = []string{"CHS"}
	e := engineOf(t, set)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	require.NotEmpty(t, l.Refused)
	res := sizeOne(t, e, pressed(9e7))
	assert.Equal(t, design.NoSection, res.Status)
	assert.NotEmpty(t, res.Section, "the best tried")
	assert.Contains(t, res.Notes[0], "least utilisation")
	assert.Contains(t, res.Notes[0], "left out: "+l.Refused[0].Section.Name())
}

// Sections that the rules do not cover, and that would have come before the
// one chosen, are said of it with the reason; those before the next lighter
// one are not, since that has been tried and fails.
func TestRefusedBetweenTheNextLighterAndTheChoiceAreSaid(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Families = []string{"L"}
	set.Grades = []string{"S355"}
	e := engineOf(t, set)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	res := sizeOne(t, e, pressed(3e5))
	require.Equal(t, design.Passes, res.Status)
	chosen, err := e.Section(res.Section)
	require.NoError(t, err)
	next, err := e.Section(res.NextLighter)
	require.NoError(t, err)
	var between []string
	for _, r := range l.Refused {
		if catalogue.Compare(next, r.Section) < 0 && catalogue.Compare(r.Section, chosen) < 0 {
			between = append(between, r.Section.Name())
		}
	}
	require.NotEmpty(t, between, "150x150x15 is class 4 in S355: 10 > 11.5 x 0.814")
	require.NotEmpty(t, res.Notes)
	assert.Regexp(t, `^lighter, and left out: `+between[0]+` S355.*: class 4 in compression`, res.Notes[len(res.Notes)-1])

	set.Families = []string{"UKC"}
	assert.Empty(t, sizeOne(t, engineOf(t, set), pressed(3e5)).Notes)
}

func TestNothingWithinTheLimitsOfSize(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	col := pressed(1e5)
	col.Choice.MinDepth, col.Choice.MaxDepth = 500, 400
	res := sizeOne(t, e, col)
	assert.Equal(t, design.NoSection, res.Status)
	assert.Empty(t, res.Section)
	assert.Contains(t, res.Notes[0], "no section of the catalogue")
}
