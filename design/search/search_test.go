package search

import (
	"context"
	"math"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/material"
)

// plain is the search as one would write it without any thought of speed: every
// section of the catalogue in every grade, sorted, and the first that passes
// the full assessment.
type plain struct {
	set        design.Settings
	candidates []*ec3.Candidate
}

func newPlain(t *testing.T, set design.Settings) *plain {
	p := &plain{set: set}
	for _, s := range catalogue.Default().Sections() {
		if s.Finish == catalogue.ColdFormed || !slices.Contains(set.Families, s.Family) {
			continue
		}
		for _, name := range set.Grades {
			g, err := material.Parse(name)
			require.NoError(t, err)
			if c, err := ec3.NewCandidate(s, g, &p.set); err == nil {
				p.candidates = append(p.candidates, c)
			}
		}
	}
	slices.SortStableFunc(p.candidates, func(a, b *ec3.Candidate) int {
		switch s, o := a.Section, b.Section; {
		case s.Mass != o.Mass:
			return sign(s.Mass - o.Mass)
		case s.H != o.H:
			return sign(s.H - o.H)
		case s.B != o.B:
			return sign(s.B - o.B)
		case s.Name() < o.Name():
			return -1
		case s.Name() > o.Name():
			return 1
		}
		return a.Grade.Nominal - b.Grade.Nominal
	})
	return p
}

func sign(x float64) int {
	if x < 0 {
		return -1
	}
	return 1
}

// choose returns the first candidate that passes, else nil, and the least
// utilisation of any.
func (p *plain) choose(m *ec3.Member, limit float64) (*ec3.Candidate, float64) {
	var a ec3.Assessment
	least := math.Inf(1)
	for _, c := range p.candidates {
		m.Assess(c, &a)
		least = min(least, a.Utilisation)
		if a.Utilisation <= limit*(1+ec3.PassTolerance) {
			return c, a.Utilisation
		}
	}
	return nil, least
}

// Over the whole catalogue the search must choose the section that scanning
// every candidate with the full assessment chooses.
func TestAgainstEveryCandidate(t *testing.T) {
	uk := settingsOf(t, "UK")
	uk.Families = everyFamily
	grades := settingsOf(t, "EN")
	grades.Grades = []string{"S460", "S275", "S355"}
	elastic := settingsOf(t, "DK")
	elastic.Method = design.MethodElastic
	weight := settingsOf(t, "UK")
	weight.SelfWeight, weight.Growth, weight.Limit = 1.35, 1.1, 0.9
	own := settingsOf(t, "UK") // a set where the cross-section can govern over buckling
	own.National.GammaM0, own.National.GammaM1 = 1.25, 1
	hollow := settingsOf(t, "UK")
	hollow.Families = []string{"CHS", "SHS", "RHS"}
	angles := settingsOf(t, "UK")
	angles.Families = []string{"L equal", "L unequal", "UKPFC"}

	for _, tc := range []struct {
		name    string
		set     design.Settings
		moments bool
		members int
	}{
		{"whole catalogue", uk, false, 600},
		{"whole catalogue with moments", uk, true, 300},
		{"three grades", grades, true, 1000},
		{"elastic, gM0 and gM1 apart", elastic, true, 500},
		{"own weight, growth and limit", weight, true, 1000},
		{"gM0 above gM1", own, true, 1000},
		{"hollow", hollow, true, 1000},
		{"angles and channels", angles, false, 500},
	} {
		t.Run(tc.name, func(t *testing.T) {
			e := engineOf(t, tc.set)
			p := newPlain(t, tc.set)
			cols := columns(random(1), tc.members, tc.moments)
			results, err := e.SizeAll(context.Background(), cols, 2, nil)
			require.NoError(t, err)
			count := map[design.Status]int{}
			for i := range cols {
				r := &results[i]
				count[r.Status]++
				m, err := ec3.NewMember(&cols[i], &tc.set)
				if err != nil {
					assert.Equal(t, design.NotRead, r.Status)
					continue
				}
				c, u := p.choose(m, ec3.Limit(&cols[i], &tc.set))
				if c == nil {
					assert.Equal(t, design.NoSection, r.Status, "member %d", i)
				} else {
					require.Equal(t, design.Passes, r.Status, "member %d", i)
					assert.Equal(t, nameIn(c), r.Section+" "+r.Grade, "member %d", i)
				}
				assert.Equal(t, u, r.Utilisation, "member %d", i)
			}
			t.Log(count)
			assert.NotZero(t, count[design.Passes])
		})
	}
}

// The evidence is the strongest grade of the next lighter section, and fails.
func TestNextLighterIsAnotherSection(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Grades = []string{"S275", "S355"}
	e := engineOf(t, set)
	p := newPlain(t, set)
	cols := columns(random(10), 200, false)
	results, err := e.SizeAll(context.Background(), cols, 1, nil)
	require.NoError(t, err)
	for i := range results {
		r := &results[i]
		if r.Status != design.Passes || r.NextLighter == "" {
			continue
		}
		k := slices.IndexFunc(p.candidates, func(c *ec3.Candidate) bool { return c.Section.Name() == r.Section })
		assert.Equal(t, nameIn(p.candidates[k-1]), r.NextLighter+" "+r.NextLighterGrade)
		assert.Equal(t, "S355", r.NextLighterGrade)
		limit := ec3.Limit(&cols[i], &set)
		assert.Greater(t, r.NextLighterUtilisation, limit)
		assert.Equal(t, r.NextLighterUtilisation, r.NextLighterCheck.Utilisation)
	}
}

// A greater axial force never gives a lighter section.
func TestMoreForceIsNeverLighter(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	rapid.Check(t, func(rt *rapid.T) {
		r := drawn(rt)
		col := column(r, false)
		more := col
		more.Combinations = slices.Clone(col.Combinations)
		for i := range more.Combinations {
			f := between(r, 1, 1.5)
			cb := &more.Combinations[i]
			cb.NEd *= f
			cb.Steps = slices.Clone(cb.Steps)
			for k := range cb.Steps {
				cb.Steps[k].NEd *= f
			}
		}
		res, err := e.SizeAll(context.Background(), []design.Column{col, more}, 1, nil)
		require.NoError(rt, err)
		if res[0].Status == design.NoSection {
			require.Equal(rt, design.NoSection, res[1].Status)
		} else if res[1].Status == design.Passes {
			require.LessOrEqual(rt, res[0].MassPerM, res[1].MassPerM)
		}
	})
}

// The order of the rows and the number of workers decide nothing.
func TestOrderAndWorkersDecideNothing(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	rapid.Check(t, func(rt *rapid.T) {
		r := drawn(rt)
		cols := columns(r, r.IntN(2*chunk), true)
		for i := range cols {
			cols[i].Group = [...]string{"", "", "", "G1", "G2"}[r.IntN(5)]
		}
		one, err := e.SizeAll(context.Background(), cols, 1, nil)
		require.NoError(rt, err)
		many, err := e.SizeAll(context.Background(), cols, 7, nil)
		require.NoError(rt, err)
		require.Equal(rt, one, many)

		order := r.Perm(len(cols))
		shuffled := make([]design.Column, len(cols))
		for k, i := range order {
			shuffled[k] = cols[i]
		}
		res, err := e.SizeAll(context.Background(), shuffled, 2, nil)
		require.NoError(rt, err)
		for k, i := range order {
			res[k].Notes, one[i].Notes = nil, nil // they name other members of a group
			require.Equal(rt, one[i], res[k])
		}
	})
}

// The inner search allocates nothing per member.
func TestSearchAllocatesNothing(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	w := e.worker(Size, &bugs{})
	cols := columns(random(2), 50, false)
	k := 0
	allocs := testing.AllocsPerRun(500, func() {
		if w.take(&cols[k%len(cols)]) == nil {
			w.first(l, 1)
		}
		k++
	})
	assert.Zero(t, allocs)
}
