package search

import (
	"context"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
)

// alone makes a set of every column.
func alone(cols []design.Column) []Set {
	sets := make([]Set, len(cols))
	for i := range sets {
		sets[i].Columns = []int{i}
	}
	return sets
}

// What the options say of every candidate is what the full assessment says,
// and the first that passes is what is chosen.
func TestOptionsAgainstAssess(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Grades = []string{"S275", "S355"}
	e := engineOf(t, set)
	cols := columns(random(8), 60, true)
	cols[3].Given = "203x203x60 UKC"
	cols[4].Length = 0
	options, err := e.Options(context.Background(), cols, alone(cols), 2)
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

// The options of a set are what every column of it may have.
func TestOptionsOfASet(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(8), 6, true)
	own, err := e.Options(context.Background(), cols, alone(cols), 1)
	require.NoError(t, err)
	both, err := e.Options(context.Background(), cols, []Set{{"stack", []int{0, 1, 2}}}, 1)
	require.NoError(t, err)
	for k := range both[0].Pass {
		assert.Equal(t, own[0].Pass[k] && own[1].Pass[k] && own[2].Pass[k], both[0].Pass[k])
	}
}

// Columns assigned what they would choose have the results of the search.
func TestAssign(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := columns(random(9), 40, true)
	want, err := e.SizeAll(context.Background(), cols, 1, nil)
	require.NoError(t, err)
	lightest, err := e.Lightest(context.Background(), cols, 1)
	require.NoError(t, err)
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	var chosen []Chosen
	for i, set := range alone(cols) {
		c := Chosen{Set: set, Candidate: lightest[i]}
		if k := slices.Index(l.Candidates, lightest[i]); k > 0 {
			c.Lighter = l.Candidates[k-1]
		}
		chosen = append(chosen, c)
	}
	got := make([]design.Result, len(cols))
	require.NoError(t, e.Assign(context.Background(), cols, chosen, got, 2, nil))
	assert.Equal(t, want, got)
}

// A section that is too small fails, and one that is larger than needed says
// why the lighter one was not taken.
func TestAssignWhatIsDecidedElsewhere(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	l, err := e.List(&design.Choice{}, nil)
	require.NoError(t, err)
	cols := []design.Column{pressed(9e6), pressed(1e5)}
	last := len(l.Candidates) - 1
	res := make([]design.Result, 2)
	require.NoError(t, e.Assign(context.Background(), cols, []Chosen{
		{Set: Set{Columns: []int{0}}, Candidate: l.Candidates[0]},
		{Set: Set{Columns: []int{1}}, Candidate: l.Candidates[last], Lighter: l.Candidates[last-1], Why: "few sizes"},
	}, res, 1, nil))
	assert.Equal(t, design.Fails, res[0].Status)
	assert.Equal(t, design.Passes, res[1].Status)
	assert.Less(t, res[1].NextLighterUtilisation, 1.0)
	require.Len(t, res[1].Notes, 1)
	assert.Contains(t, res[1].Notes[0], "not taken: few sizes")
}
