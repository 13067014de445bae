package search

import (
	"context"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
)

// At the reserve the column passes, a hair beyond it does not: by factor and by
// added force, with moments, own weight, growth, forces that step, either
// method.
func TestReserveIsWhereTheFirstCheckFails(t *testing.T) {
	elastic := settingsOf(t, "DK")
	elastic.Method, elastic.Growth = design.MethodElastic, 1.1
	weight := settingsOf(t, "UK")
	weight.SelfWeight = 1.35
	for _, set := range []design.Settings{settingsOf(t, "UK"), elastic, weight} {
		e := engineOf(t, set)
		cols := columns(random(7), 150, true)
		for i := range cols {
			cols[i].Given = []string{"203x203x46 UKC", "356x368x129 UKC", "533x210x92 UKB"}[i%3]
		}
		results, err := e.CheckAll(context.Background(), cols, 2, nil)
		require.NoError(t, err)
		helped := 0
		for i := range cols {
			col, res := &cols[i], &results[i]
			if res.Status == design.NotRead {
				continue
			}
			limit := ec3.Limit(col, &set)
			u := func(f, n float64) float64 { return utilisationUnder(t, e, col, res, f, n) }
			if res.Reserve > 0 {
				helped++
				// 1e-6 is a thousand times the precision of the root.
				assert.LessOrEqual(t, u(res.Reserve*(1-1e-6), 0), limit, "%d", i)
				assert.Greater(t, u(res.Reserve*(1+1e-6), 0), limit, "%d", i)
				assert.Equal(t, res.Status == design.Passes, res.Reserve >= 1, "%d", i)
			}
			if n := res.ReserveN; n != 0 {
				hair := 1e-6 * math.Max(math.Abs(n), 1e5)
				assert.LessOrEqual(t, u(1, n-hair), limit, "%d", i)
				assert.Greater(t, u(1, n+hair), limit, "%d", i)
				assert.Equal(t, res.Status == design.Passes, n > 0, "%d", i)
				assert.NotZero(t, res.ReserveCheck)
			}
		}
		assert.Greater(t, helped, 50)
	}
}

// utilisationUnder assesses the column anew under its axial forces times f
// plus n.
func utilisationUnder(t *testing.T, e *Engine, col *design.Column, res *design.Result, f, n float64) float64 {
	t.Helper()
	other := *col
	other.Combinations = nil
	for _, c := range col.Combinations {
		steps := c.Steps
		c.Steps = nil
		for _, s := range steps {
			c.Steps = append(c.Steps, design.Step{Height: s.Height, NEd: f*s.NEd + n})
		}
		c.NEd = f*c.NEd + n
		other.Combinations = append(other.Combinations, c)
	}
	l, err := e.givenIn(col)
	require.NoError(t, err)
	m, err := ec3.NewMember(&other, &e.settings)
	require.NoError(t, err)
	var a ec3.Assessment
	for _, c := range l.Candidates {
		if c.Grade.Name == res.Grade {
			m.Assess(c, &a)
		}
	}
	return a.Utilisation
}

// Without moments the factor is the limit over the utilisation, and an
// unloaded column can take its whole resistance.
func TestReserveOfAnAxialColumn(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	col := design.Column{Length: 4000, Given: "203x203x60 UKC", Combinations: []design.Combination{{NEd: 8e5}}}
	idle := col
	idle.Combinations = []design.Combination{{}}
	res, err := e.CheckAll(context.Background(), []design.Column{col, idle}, 1, nil)
	require.NoError(t, err)
	assert.InEpsilon(t, 1/res[0].Utilisation, res[0].Reserve, 1e-12)
	assert.InEpsilon(t, res[0].Z.NbRd-8e5, res[0].ReserveN, 1e-12)
	assert.Equal(t, design.FlexuralZ, res[0].ReserveCheck)
	assert.Zero(t, res[1].Reserve)
	assert.InEpsilon(t, res[0].Z.NbRd, res[1].ReserveN, 1e-12)
}

func TestCrossing(t *testing.T) {
	for name, f := range map[string]func(float64) float64{
		"straight": func(x float64) float64 { return x - 0.3 },
		"steep":    func(x float64) float64 { return math.Pow(x, 30) - 1e-9 },
		"flat":     func(x float64) float64 { return math.Pow(x-0.7, 9) },
		"a step": func(x float64) float64 {
			if x > 0.25 {
				return math.Inf(1)
			}
			return x - 1
		},
	} {
		calls := 0
		x := crossing(func(x float64) float64 { calls++; return f(x) }, 0, 1)
		assert.LessOrEqual(t, f(x), 0.0, name)
		assert.Greater(t, f(x+2*precision), 0.0, name)
		assert.Less(t, calls, 4*31, name) // 31 halvings reach the precision; at worst three steps fail to halve before each
	}
}
