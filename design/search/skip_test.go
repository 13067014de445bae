package search

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/design"
	"stanchion/design/ec3"
)

// Bisection on a running maximum must find what a plain scan finds.
func TestStairsAgainstPlainScan(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		values := rapid.SliceOf(rapid.Float64Range(0.1, 10)).Draw(t, "values")
		need := rapid.OneOf(rapid.Float64Range(0, 11), rapid.SampledFrom(append(values, 1))).Draw(t, "need")
		plain := 0
		for plain < len(values) && values[plain] < need {
			plain++
		}
		s := climb(len(values), func(i int) float64 { return values[i] })
		assert.Equal(t, plain, s.from(need))
	})
}

// A fy is not monotonic in the order of the candidates: without the running
// maximum bisection would go wrong.
func TestStrengthIsNotMonotonic(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	falls := 0
	for i := 1; i < len(l.Candidates); i++ {
		if l.Candidates[i].NRk < l.Candidates[i-1].NRk {
			falls++
		}
	}
	assert.NotZero(t, falls)
}

// Whatever is passed over fails a check, for every candidate and member.
func TestSkippedCandidatesFail(t *testing.T) {
	set := settingsOf(t, "UK")
	set.National.GammaM0, set.National.GammaM1 = 1.25, 1 // the cross-section can govern
	e := engineOf(t, set)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	rapid.Check(t, func(rt *rapid.T) {
		col := column(drawn(rt), true)
		w := e.worker(Size, &bugs{})
		require.NoError(rt, w.take(&col))
		start := l.skip.start(&w.demand)
		for i, c := range l.Candidates[:start] {
			w.member.Assess(c, &w.assess)
			if ec3.Passes(w.assess.Utilisation, ec3.Limit(&col, &e.settings)) {
				rt.Fatalf("candidate %d, %s, passes but is skipped", i, c.Section.Name())
			}
		}
	})
}
