package search

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// Whatever was asked before, a column gets its own list.
func TestMemoGivesEveryColumnItsOwnList(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	w := e.worker(Size, &bugs{})
	r := random(11)
	for range 500 {
		col := pressed(1e5)
		col.Choice = design.Choice{
			MinDepth: float64(r.IntN(2)) * 200, MaxDepth: float64(r.IntN(2)) * 400,
			MinWidth: float64(r.IntN(2)) * 150, MaxWidth: float64(r.IntN(2)) * 300,
			MinThickness: float64(r.IntN(2)) * 8, MaxThickness: float64(r.IntN(2)) * 30,
		}
		if r.IntN(2) == 0 {
			col.Choice.Families = []string{"HEA"}
		}
		if r.IntN(2) == 0 {
			col.Grades = []string{"S275"}
		}
		if r.IntN(4) == 0 {
			col.Given = []string{"203x203x60 UKC", "HEA 200"}[r.IntN(2)]
		}
		want, err := e.allowed(&col)
		require.NoError(t, err)
		got, err := w.allowed(&col)
		require.NoError(t, err)
		assert.Same(t, want, got)
	}
	assert.LessOrEqual(t, len(w.memo.kept), remembered)
}

// A caller may use a column's memory again for the next.
func TestMemoSurvivesReusedColumns(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	w := e.worker(Size, &bugs{})
	col := pressed(1e5)
	col.Grades, col.Choice.Families = []string{"S275"}, []string{"UKC"}
	first, err := w.allowed(&col)
	require.NoError(t, err)
	col.Grades[0], col.Choice.Families[0] = "S355", "HEA"
	second, err := w.allowed(&col)
	require.NoError(t, err)
	assert.NotSame(t, first, second)
	assert.Equal(t, "HEA", second.Candidates[0].Section.Family)
	assert.Equal(t, "S355", second.Candidates[0].Grade.Name)
}
