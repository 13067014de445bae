package building

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// levels makes the lengths of one stack from pairs of levels.
func levels(pairs ...[2]string) []design.Column {
	cols := make([]design.Column, len(pairs))
	for i, p := range pairs {
		cols[i] = length1("A1", i, 1e5, 3000)
		cols[i].From, cols[i].To = p[0], p[1]
		cols[i].SpliceSaid, cols[i].Splice = true, true
		cols[i].Cell = "A" + string(rune('1'+i))
	}
	return cols
}

func TestLengthsAreOrderedByLevel(t *testing.T) {
	for name, tc := range map[string]struct {
		pairs [][2]string
		want  [][]int
		note  string
	}{
		"bottom up":        {[][2]string{{"GF", "L1"}, {"L1", "L2"}, {"L2", "Roof"}}, [][]int{{0, 1, 2}}, ""},
		"top down":         {[][2]string{{"L2", "Roof"}, {"L1", "L2"}, {"GF", "L1"}}, [][]int{{2, 1, 0}}, ""},
		"any order":        {[][2]string{{"l1", "L2"}, {"L2 ", "roof"}, {"GF", "L1"}}, [][]int{{2, 0, 1}}, ""},
		"one height":       {[][2]string{{"0", "+3.90"}, {"3.9", "Roof"}}, [][]int{{0, 1}}, ""},
		"heights, no tops": {[][2]string{{"+7.200", ""}, {"0.000", ""}, {"+3.6", ""}}, [][]int{{1, 2, 0}}, ""},
		"heights and gap":  {[][2]string{{"10", "14"}, {"0", "4"}, {"4", "8"}}, [][]int{{1, 2, 0}}, ""},
		"no levels":        {[][2]string{{"", ""}, {"", ""}}, [][]int{{0, 1}}, "as listed"},
		"a gap":            {[][2]string{{"GF", "L1"}, {"L3", "L4"}, {"L1", "L2"}}, [][]int{{0, 2}, {1}}, "its levels do not join: GF to L2 and L3 to L4 are sized each by itself"},
		"one level twice":  {[][2]string{{"GF", "L1"}, {"GF", "L1"}}, nil, "A1 and A2 stand at one level"},
		"a ring of levels": {[][2]string{{"L1", "L2"}, {"L2", "L1"}}, [][]int{{0}, {1}}, "do not join"},
	} {
		t.Run(name, func(t *testing.T) {
			cols := levels(tc.pairs...)
			line := make([]int, len(cols))
			for i := range line {
				line[i] = i
			}
			parts, note := ordered(cols, line)
			assert.Equal(t, tc.want, parts)
			if tc.note == "" {
				assert.Empty(t, note)
			} else {
				assert.Contains(t, note, tc.note)
			}
		})
	}
}

// A stack is one however it is spelled, as in the take-off and where own weight
// goes down it.
func TestSpellingsOfAStack(t *testing.T) {
	cols := levels([2]string{"GF", "L1"}, [2]string{"L1", "L2"})
	cols[0].Stack, cols[1].Stack = "A 1", "a  1"
	all, _ := stacks(cols, &Options{}, &design.Settings{})
	require.Len(t, all, 1)
	assert.Equal(t, []int{0, 1}, all[0].lengths)
	cols[0].Group, cols[1].Group = "Edge", "edge"
	assert.Len(t, tie(cols, nil).sets, 1)
}

// Only stacks for which the schedule speaks of splices are joined, unless the
// run has a rule of its own.
func TestWhichStacksAreJoined(t *testing.T) {
	cols := levels([2]string{"GF", "L1"}, [2]string{"L1", "L2"})
	all, _ := stacks(cols, &Options{}, &design.Settings{})
	require.Len(t, all, 1)
	cols[0].SpliceSaid, cols[1].SpliceSaid = false, false
	all, _ = stacks(cols, &Options{}, &design.Settings{})
	assert.Empty(t, all)
	all, _ = stacks(cols, &Options{Splices: WhereItPays}, &design.Settings{})
	require.Len(t, all, 1)
	assert.Equal(t, []bool{true, true}, all[0].splice)
	all, _ = stacks(cols, &Options{Splices: EveryNth, Every: 2}, &design.Settings{})
	assert.Equal(t, []bool{false, true}, all[0].splice)
}

// A rule that counts lengths gives way where two lengths can have no section in
// common, and says so.
func TestCountedSplicesGiveWay(t *testing.T) {
	set := &design.Settings{Families: []string{"UKC"}, Grades: []string{"S355"}}
	for name, tc := range map[string]struct {
		change func(below, above *design.Column)
		why    string
	}{
		"alike":                {func(_, _ *design.Column) {}, ""},
		"one given":            {func(b, a *design.Column) { b.Given, a.Choice.Families = "203x203x46 UKC", []string{"HEA"} }, ""},
		"the same given":       {func(b, a *design.Column) { b.Given, a.Given = "203x203x46 UKC", "203x203x46 UKC" }, ""},
		"two given":            {func(b, a *design.Column) { b.Given, a.Given = "203x203x60 UKC", "203x203x46 UKC" }, "other sections"},
		"another family":       {func(b, _ *design.Column) { b.Choice.Families = []string{"SHS"} }, "other families"},
		"a family in common":   {func(b, _ *design.Column) { b.Choice.Families = []string{"SHS", "UKC"} }, ""},
		"another grade":        {func(_, a *design.Column) { a.Grades = []string{"S275"} }, "other grades"},
		"the settings' family": {func(_, a *design.Column) { a.Choice.Families = []string{"UKC"} }, ""},
	} {
		t.Run(name, func(t *testing.T) {
			cols := levels([2]string{"GF", "L1"}, [2]string{"L1", "L2"}, [2]string{"L2", "L3"})
			tc.change(&cols[0], &cols[1])
			all, notes := stacks(cols, &Options{Splices: EveryNth, Every: 2}, set)
			require.Len(t, all, 1)
			assert.Equal(t, []bool{tc.why != "", true, false}, all[0].splice)
			assert.Contains(t, notes[1], tc.why)
			assert.Equal(t, tc.why != "", notes[1] != "")
		})
	}
}
