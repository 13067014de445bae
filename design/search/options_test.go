package search

import (
	"context"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
)

// What the options say of every candidate is what the full assessment says,
// and the first that passes is what is chosen.
func TestOptionsAgainstAssess(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Grades = []string{"S275", "S355"}
	e := engineOf(t, set)
	cols := columns(random(8), 60, true)
	cols[3].Given = "203x203x60 UKC"
	cols[4].Length = 0
	options, err := e.Options(context.Background(), cols, 2)
	require.NoError(t, err)
	chosen, err := e.Lightest(context.Background(), cols, 2)
	require.NoError(t, err)
	results, err := e.SizeAll(context.Background(), cols, 2, nil)
	require.NoError(t, err)
	for i := range cols {
		if i == 4 {
			assert.Error(t, options[i].Err)
			assert.Nil(t, chosen[i])
			continue
		}
		require.NoError(t, options[i].Err)
		assert.Equal(t, i == 3, options[i].Given)
		m, err := ec3.NewMember(&cols[i], &set)
		require.NoError(t, err)
		first := (*ec3.Candidate)(nil)
		var a ec3.Assessment
		for k, c := range options[i].List.Candidates {
			m.Assess(c, &a)
			passes := ec3.Passes(a.Utilisation, ec3.Limit(&cols[i], &set))
			assert.Equal(t, passes, options[i].Pass[k])
			if passes && first == nil {
				first = c
			}
		}
		assert.Same(t, first, chosen[i])
		if first != nil {
			assert.Equal(t, nameIn(first), results[i].Section+" "+results[i].Grade)
		}
	}
}

// A column assigned what it would choose has the result of the search but for
// the evidence.
func TestAssign(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(9), 40, true)
	want, err := e.SizeAll(context.Background(), cols, 1, nil)
	require.NoError(t, err)
	chosen, err := e.Lightest(context.Background(), cols, 1)
	require.NoError(t, err)
	got, err := e.Assign(context.Background(), cols, chosen, 2, nil)
	require.NoError(t, err)
	for i := range want {
		if want[i].Status == design.Passes {
			want[i].NextLighter, want[i].NextLighterGrade, want[i].NextLighterUtilisation, want[i].NextLighterCheck = "", "", 0, design.Check{}
		}
		assert.Equal(t, want[i], got[i])
	}

	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	small, err := e.Assign(context.Background(), []design.Column{pressed(9e6)}, l.Candidates[:1], 1, nil)
	require.NoError(t, err)
	assert.Equal(t, design.Fails, small[0].Status)
}
