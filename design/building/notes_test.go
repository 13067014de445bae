package building

import (
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
)

// tall is a stack of three lengths with a splice above each.
func tall(n ...float64) []design.Column {
	cols := make([]design.Column, len(n))
	for i := range n {
		cols[i] = length1("A1", i, n[i], 4000)
		cols[i].Splice, cols[i].SpliceSaid = true, true
		cols[i].Cell = "Columns!A" + string(rune('2'+i))
	}
	return cols
}

// A heavier load above (a transfer, a hanger let go) makes the length below as
// heavy, and the row says why the lighter section is not taken.
func TestWhatStandsAboveKeepsTheSectionBelow(t *testing.T) {
	e := engineOf(t, nil)
	cols := tall(2e5, 9e5)
	d := size(t, e, cols, Options{})
	below, above := &d.Results[0], &d.Results[1]
	require.Equal(t, design.Passes, below.Status)
	require.Equal(t, design.Passes, above.Status)
	assert.GreaterOrEqual(t, below.MassPerM, above.MassPerM)
	assert.Less(t, below.NextLighterUtilisation, 1.0)
	assert.Contains(t, strings.Join(below.Notes, "; "), "never heavier or of a larger serial size")
	assert.Greater(t, above.NextLighterUtilisation, 1.0)
	assert.Empty(t, above.Notes)
}

// A length for which nothing passes, or that cannot be designed, says so, and
// the rest of the stack is decided without it.
func TestLengthsWithoutASectionAreBridged(t *testing.T) {
	e := engineOf(t, nil)
	cols := tall(6e5, 9e7, 9e5)
	d := size(t, e, cols, Options{})
	assert.Equal(t, design.NoSection, d.Results[1].Status)
	assert.GreaterOrEqual(t, d.Results[0].MassPerM, d.Results[2].MassPerM, "the top stands on the bottom")

	cols = tall(6e5, 7e5, 9e5)
	cols[1].Length = -1
	d = size(t, e, cols, Options{MostSizes: 1})
	assert.Equal(t, design.NotRead, d.Results[1].Status)
	assert.Equal(t, d.Results[0].Section, d.Results[2].Section)
}

// Given sections stay, even where one is heavier than what it stands on.
func TestGivenSectionsAgainstTheRule(t *testing.T) {
	e := engineOf(t, nil)
	cols := tall(3e5, 3e5, 3e5)
	cols[0].Given, cols[1].Given = "152x152x30 UKC", "203x203x60 UKC"
	d := size(t, e, cols, Options{})
	assert.Equal(t, "152x152x30 UKC", d.Results[0].Section)
	assert.Equal(t, "203x203x60 UKC", d.Results[1].Section)
	assert.True(t, d.Results[0].Fixed && d.Results[1].Fixed)
	assert.Contains(t, strings.Join(d.Results[1].Notes, "; "), "given above 152x152x30 UKC")
	assert.Equal(t, design.Passes, d.Results[2].Status)

	// With a length between them no choice serves: each is sized by itself.
	cols = tall(3e5, 3e5, 3e5)
	cols[0].Given, cols[2].Given = "152x152x30 UKC", "203x203x60 UKC"
	d = size(t, e, cols, Options{})
	for i := range d.Results {
		assert.Equal(t, design.Passes, d.Results[i].Status)
		assert.Contains(t, strings.Join(d.Results[i].Notes, "; "), "each is sized by itself")
	}
}

// One section in two grades counts once, and the cheaper grade is taken.
func TestGradesOfOneSize(t *testing.T) {
	e := engineOf(t, func(s *design.Settings) { s.Grades = []string{"S355", "S275"} })
	cols := []design.Column{length1("A", 0, 1e5, 3000), length1("B", 0, 6e5, 3000)}
	for i := range cols {
		cols[i].Stack = ""
	}
	d := size(t, e, cols, Options{MostSizes: 1})
	assert.Equal(t, d.Results[0].Section, d.Results[1].Section)
	assert.Equal(t, "S275", d.Results[0].Grade)
	require.Len(t, d.Curve, 1)
	assert.Equal(t, []string{d.Results[0].Section}, d.Curve[0].Sizes)
}

func TestTooFewSizes(t *testing.T) {
	e := engineOf(t, nil)
	cols := tall(1e5, 1e5)
	cols[0].Given, cols[1].Given = "203x203x60 UKC", "152x152x30 UKC"
	_, err := Size(t.Context(), e, cols, Options{MostSizes: 1}, 1, nil)
	assert.ErrorContains(t, err, "at most 1 different section cannot serve")
	_, err = Size(t.Context(), e, tall(9e7), Options{MostSizes: 1}, 1, nil)
	assert.ErrorContains(t, err, "no column has a section that passes")
}

// A time limit leaves the best so far, with a bound.
func TestTimeLimit(t *testing.T) {
	e := engineOf(t, nil)
	cols := tall(8e5, 6e5, 2e5)
	d := size(t, e, cols, Options{MostSizes: 3, TimeLimit: time.Nanosecond})
	require.NotEmpty(t, d.Curve)
	last := d.Curve[len(d.Curve)-1]
	assert.LessOrEqual(t, last.Bound, last.Total)
	for i := range d.Results {
		assert.Equal(t, design.Passes, d.Results[i].Status)
	}
}

func TestSerialSize(t *testing.T) {
	for name, want := range map[string]serial{
		"203x203x86 UKC":  {203, 203},
		"457x191x67 UKB":  {457, 191},
		"HE 200 A":        {200, 200},
		"SHS 150x150x8.0": {150, 150},
		"CHS 168.3x8.0":   {168.3, 168.3},
	} {
		s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
		require.NoError(t, err)
		assert.Equal(t, want, serialOf(s), name)
	}
}

func TestMayStand(t *testing.T) {
	section := func(name string) *catalogue.Section {
		s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
		require.NoError(t, err)
		return s
	}
	for _, tc := range []struct {
		below, above string
		want         bool
	}{
		{"254x254x89 UKC", "254x254x73 UKC", true},
		{"254x254x73 UKC", "254x254x89 UKC", false}, // heavier
		{"254x254x89 UKC", "203x203x86 UKC", true},
		{"203x203x86 UKC", "254x254x73 UKC", false}, // larger, though lighter
		{"457x152x82 UKB", "406x178x74 UKB", false}, // wider
		{"457x191x82 UKB", "406x178x74 UKB", true},
	} {
		assert.Equal(t, tc.want, mayStand(section(tc.below), section(tc.above)), "%s on %s", tc.above, tc.below)
	}
}

// A group that has no say is bridged in each stack by itself.
func TestBridgeKeepsToTheStack(t *testing.T) {
	p := &plan{links: []link{{0, 2, 1, "A"}, {2, 3, 1, "A"}, {1, 2, 1, "B"}, {2, 4, 1, "B"}}}
	got := p.bridge([]bool{false, false, true, false, false})
	assert.ElementsMatch(t, []link{{0, 3, 1, "A"}, {1, 4, 1, "B"}}, got)
}

// What the rules do not cover between the section and the next lighter one is
// said where the sizes are decided together, too.
func TestWhatTheRulesDoNotCoverIsSaid(t *testing.T) {
	e := engineOf(t, func(s *design.Settings) { s.Families, s.Grades = []string{"L"}, []string{"S355"} })
	cols := []design.Column{length1("A1", 0, 3e5, 4000), length1("B1", 0, 2.5e5, 4000)}
	d := size(t, e, cols, Options{MostSizes: 1})
	for _, r := range d.Results {
		require.Equal(t, design.Passes, r.Status)
		assert.Contains(t, strings.Join(r.Notes, "; "), "lighter, and left out: L ")
	}
}
