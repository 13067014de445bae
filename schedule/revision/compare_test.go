package revision

import (
	"context"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/search"
	"stanchion/schedule"
)

// with gives a member of an issue its section.
func with(t testing.TB, m Member, name string) Member {
	if name != "" {
		m.Section, m.Grade = section(t, name), "S355"
	}
	return m
}

func compared(t testing.TB, old, new []Member) *Comparison {
	t.Helper()
	e := engine(t, settings(t))
	c, err := Compare(context.Background(), &Issue{"old.xlsx", old}, &Issue{"new.xlsx", new}, e, e, building.Options{}, 2)
	require.NoError(t, err)
	return c
}

func TestCompare(t *testing.T) {
	old := []Member{
		with(t, col("C1 A L0 L1 900"), "203x203x46 UKC"),
		with(t, col("C1 A L1 L2 700"), "254x254x89 UKC"),
		with(t, col("C2 B L0 L1 500"), "203x203x60 UKC"),
		with(t, col("C3 C L0 L1 900"), "203x203x46 UKC"),
		col("C4 D L0 L1 900"),
	}
	new := []Member{
		with(t, col("C1 A L0 L1 2500"), "203x203x46 UKC"),
		with(t, col("C1 A L1 L2 700"), "254x254x89 UKC"),
		col("C9 E L0 L1 500"),
		with(t, col("C3 C L0 L1 900"), "203x203x52 UKC"),
		col("C4 D L0 L1 900"),
		col("C5 F L0 L1 900"),
	}
	new[5].Problems = []*schedule.Problem{{What: "N_Ed is missing"}}
	c := compared(t, old, new)

	verdicts := []Verdict{}
	for i := range c.Rows {
		verdicts = append(verdicts, c.Rows[i].Verdict)
	}
	assert.Equal(t, []Verdict{Weak, Spare, NotChecked, Stays, NotChecked, NotChecked}, verdicts)
	assert.Equal(t, []int{2}, c.Removed)
	assert.Equal(t, []int{2, 5}, c.Added)
	assert.Equal(t, 1, c.Count(Weak))

	weak := &c.Rows[0]
	assert.Equal(t, "N_Ed 900 → 2500 kN (+177.8 %)", TextOf(weak.Changes))
	assert.Equal(t, design.Fails, weak.Check.Status)
	assert.Equal(t, "203x203x46 UKC", weak.Check.Section)
	assert.Equal(t, weak.Lightest.Section, weak.Kept.Result.Section)
	assert.Greater(t, weak.Check.Utilisation, 1.0)

	spare := &c.Rows[1]
	assert.False(t, spare.Changed())
	assert.Equal(t, "254x254x89 UKC", spare.Kept.Result.Section)
	// 4 m of 88.9 kg/m against 4 m of the lighter one.
	assert.Equal(t, int64(4*88_900)-massOf(&spare.Lightest, spare.New), spare.Saving)
	assert.Positive(t, spare.Saving)

	assert.Equal(t, "section 203x203x46 UKC S355 → 203x203x52 UKC S355", TextOf(c.Rows[3].Changes))

	// 4 m each of 46.1, 88.9, 60.0 and 46.1 kg/m (EN 10365); C4 has none.
	assert.Equal(t, int64(4*(46_100+88_900+60_000+46_100)), c.Before.Net.Mass)
	assert.Len(t, c.Before.LeftOut, 1)
	assert.Equal(t, int64(4*(46_100+88_900+52_000)), c.Issued.Net.Mass)
	assert.Less(t, c.Light.Net.Mass, c.Staying.Net.Mass)
	assert.Equal(t, c.Staying.Net.Lengths, c.Light.Net.Lengths)
	assert.Equal(t, int64(5), c.Light.Net.Lengths)
}

// An old issue without any section is sized, and said to be.
func TestOldIssueWithoutSections(t *testing.T) {
	c := compared(t, []Member{col("C1 A L0 L1 900")}, []Member{col("C1 A L0 L1 910")})
	assert.True(t, c.Old.Members[0].Sized)
	assert.NotNil(t, c.Old.Members[0].Section)
	assert.Positive(t, c.Before.Net.Mass)
	assert.NotNil(t, c.Rows[0].Check)
}

// A section of a family that the settings do not name is held against the
// lightest of its own.
func TestLightestOfTheSameFamily(t *testing.T) {
	c := compared(t, []Member{with(t, col("C1 A L0 L1 64"), "CHS 168.3x8.0")}, []Member{col("C1 A L0 L1 64")})
	assert.Equal(t, Spare, c.Rows[0].Verdict)
	assert.Contains(t, c.Rows[0].Lightest.Section, "CHS")
}

func TestOldSectionThatIsNotAllowed(t *testing.T) {
	n := col("C1 A L0 L1 500")
	n.Column.Choice.MaxWidth = 210
	c := compared(t, []Member{with(t, col("C1 A L0 L1 500"), "254x254x89 UKC")}, []Member{n})
	assert.Equal(t, Barred, c.Rows[0].Verdict)
	assert.Nil(t, c.Rows[0].Check)
	assert.Equal(t, "width 256.3 mm: outside the row's limits", c.Rows[0].Clash)
}

func TestCompareNothing(t *testing.T) {
	c := compared(t, nil, nil)
	assert.Empty(t, c.Rows)
	assert.Zero(t, c.Before.Net.Mass)
}

func TestCompareStops(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	e := engine(t, settings(t))
	members := []Member{with(t, col("C1 A L0 L1 64"), "CHS 168.3x8.0")}
	c, err := Compare(ctx, &Issue{"a", members}, &Issue{"b", members}, e, e, building.Options{}, 1)
	assert.ErrorIs(t, err, context.Canceled)
	assert.Nil(t, c)
	var bug *search.BugError
	assert.NotErrorAs(t, err, &bug)
}

func BenchmarkCompare(b *testing.B) {
	e := engine(b, settings(b))
	var old, new []Member
	for i := range 2000 {
		m := col("C1 A L0 L1 500")
		m.Column.Stack = string(rune('A'+i%26)) + string(rune('a'+i/26))
		old = append(old, with(b, m, "203x203x60 UKC"))
		m.Column.Combinations = []design.Combination{{NEd: float64(300+i) * 1e3}}
		new = append(new, m)
	}
	for b.Loop() {
		if _, err := Compare(context.Background(), &Issue{"a", old}, &Issue{"b", new}, e, e, building.Options{}, 2); err != nil {
			b.Fatal(err)
		}
	}
}
