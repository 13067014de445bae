package search

import (
	"context"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// sizeGroup sizes columns as one group.
func sizeGroup(t require.TestingT, e *Engine, cols []design.Column) []design.Result {
	for i := range cols {
		cols[i].Group = "G1"
		cols[i].Mark = string(rune('A' + i))
		cols[i].Cell = "Columns!" + cols[i].Mark + "9"
	}
	res, err := e.SizeAll(context.Background(), cols, 2, nil)
	require.NoError(t, err)
	return res
}

// A group has the first candidate that passes for every member, as a plain
// scan with the full assessment finds it, and the next lighter one fails for
// one of them.
func TestGroupAgainstEveryCandidate(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Grades = []string{"S275", "S355"}
	e := engineOf(t, set)
	p := newPlain(t, set)
	rapid.Check(t, func(rt *rapid.T) {
		r := drawn(rt)
		cols := columns(r, 1+r.IntN(6), true)
		res := sizeGroup(rt, e, cols)
		want := -1
		for i, c := range p.candidates {
			if worstOf(rt, &set, cols, c) <= 1+ec3.PassTolerance {
				want = i
				break
			}
		}
		if want < 0 {
			best := math.Inf(1)
			for _, c := range p.candidates {
				best = min(best, worstOf(rt, &set, cols, c))
			}
			for i := range res {
				require.Equal(rt, design.NoSection, res[i].Status)
				require.Equal(rt, res[0].Section, res[i].Section)
			}
			require.InEpsilon(rt, best, worstIn(res, cols, &set), 1e-12)
			return
		}
		for i := range res {
			require.Equal(rt, design.Passes, res[i].Status)
			require.Equal(rt, nameIn(p.candidates[want]), res[i].Section+" "+res[i].Grade)
			if res[i].NextLighter != "" {
				require.Equal(rt, res[0].NextLighterUtilisation, res[i].NextLighterUtilisation)
			}
		}
	})
}

// worstOf returns the greatest utilisation of any column in a candidate, as a
// part of its limit.
func worstOf(t require.TestingT, set *design.Settings, cols []design.Column, c *ec3.Candidate) float64 {
	most := 0.0
	for i := range cols {
		m, err := ec3.NewMember(&cols[i], set)
		require.NoError(t, err)
		var a ec3.Assessment
		m.Assess(c, &a)
		most = max(most, a.Utilisation/ec3.Limit(&cols[i], set))
	}
	return most
}

func worstIn(res []design.Result, cols []design.Column, set *design.Settings) float64 {
	most := 0.0
	for i := range res {
		most = max(most, res[i].Utilisation/ec3.Limit(&cols[i], set))
	}
	return most
}

// pressed is a pinned column under compression.
func pressed(n float64) design.Column {
	return design.Column{Length: 4000, Quantity: 1, Combinations: []design.Combination{{NEd: n}}}
}

func TestGroupEvidenceNamesTheMemberThatFails(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	res := sizeGroup(t, e, []design.Column{pressed(2e5), pressed(2e6)})
	assert.Equal(t, res[0].Section, res[1].Section)
	assert.Less(t, res[0].Utilisation, res[1].Utilisation)
	assert.Greater(t, res[0].NextLighterUtilisation, 1.0)
	assert.Contains(t, res[0].Notes, `group "G1": the next lighter section fails at B (Columns!B9)`)
	assert.Empty(t, res[1].Notes)
}

func TestGroupTakesTheGivenSection(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := []design.Column{pressed(2e5), pressed(2e5), pressed(9e6)}
	cols[1].Given = "203x203x60 UKC"
	res := sizeGroup(t, e, cols)
	for i := range res {
		assert.Equal(t, "203x203x60 UKC", res[i].Section)
		assert.Equal(t, i == 1, res[i].Fixed)
	}
	assert.Equal(t, design.Passes, res[0].Status)
	assert.Equal(t, design.Fails, res[2].Status)
	assert.Contains(t, res[2].Notes, `group "G1" has the section given at B (Columns!B9)`)
}

func TestGroupHonoursEveryMembersLimits(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := []design.Column{pressed(1e6), pressed(1e6)}
	cols[0].Choice.MaxDepth = 265
	cols[1].Choice.MinDepth = 255
	res := sizeGroup(t, e, cols)
	require.Equal(t, design.Passes, res[0].Status)
	assert.Equal(t, res[0].Section, res[1].Section)
	s, err := catalogue.Default().Find(res[0].Section, catalogue.FindOptions{})
	require.NoError(t, err)
	assert.LessOrEqual(t, s.H, 265.0)
	assert.GreaterOrEqual(t, s.H, 255.0)
}

// Of two members alike the one with the lower limit decides.
func TestGroupMembersWithLimitsOfTheirOwn(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := []design.Column{pressed(1e6), pressed(1e6)}
	cols[1].Choice.Limit = 0.7
	res := sizeGroup(t, e, cols)
	assert.Equal(t, sizeOne(t, e, cols[1]).Section, res[0].Section)
	assert.LessOrEqual(t, res[0].Utilisation, 0.7)
	require.Len(t, res[0].Notes, 1)
	assert.Contains(t, res[0].Notes[0], "fails at B")

	for i := range cols {
		cols[i].Combinations[0].NEd = 9e7
	}
	none := sizeGroup(t, e, cols)
	assert.Contains(t, none[0].Notes[0], "at B (Columns!B9)")
}

func TestGroupThatCannotAgree(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	for name, tc := range map[string]struct {
		change func(*design.Column)
		says   string
	}{
		"families": {func(c *design.Column) { c.Choice.Families = []string{"HEA"} }, "different families (UKC UKB at Columns!A9, HEA at Columns!B9)"},
		"grades":   {func(c *design.Column) { c.Grades = []string{"S275"} }, "different grades (S355 at Columns!A9, S275 at Columns!B9)"},
		"sections": {func(c *design.Column) { c.Given = "203x203x60 UKC" }, "two sections, 203x203x71 UKC at Columns!A9 and 203x203x60 UKC at Columns!B9"},
	} {
		t.Run(name, func(t *testing.T) {
			cols := []design.Column{pressed(1e6), pressed(1e6)}
			if name == "sections" {
				cols[0].Given = "203x203x71 UKC"
			}
			tc.change(&cols[1])
			for _, r := range sizeGroup(t, e, cols) {
				assert.Equal(t, design.NotRead, r.Status)
				assert.Contains(t, r.Notes[0], tc.says)
			}
		})
	}
}

func TestGroupWithoutWhatCannotBeRead(t *testing.T) {
	e := engineOf(t, settingsOf(t, "UK"))
	cols := []design.Column{pressed(1e6), pressed(1e6)}
	cols[1].Length = -1
	res := sizeGroup(t, e, cols)
	assert.Equal(t, design.Passes, res[0].Status)
	assert.Contains(t, res[0].Notes[0], "Columns!B9")
	assert.Equal(t, design.NotRead, res[1].Status)
}
