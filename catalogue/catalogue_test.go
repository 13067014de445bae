package catalogue

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func TestFilterByFamilyAndFinish(t *testing.T) {
	count := func(f Filter) int {
		found, err := Default().Filter(f)
		require.NoError(t, err)
		return len(found)
	}
	// Counts of the tables' rows.
	for _, c := range []struct {
		filter Filter
		want   int
	}{
		{Filter{}, 1486},
		{Filter{Families: []string{"UKC"}}, 46},
		{Filter{Families: []string{"UC", "UB"}}, 46 + 107},
		{Filter{Families: []string{"HE"}}, 3 * 24},
		{Filter{Families: []string{"CHS"}}, 177},
		{Filter{Families: []string{"CHS"}, ColdFormed: true}, 106},
		{Filter{Families: []string{"CHS HF"}, ColdFormed: true}, 177},
		{Filter{Families: []string{"SHS CF", "UKC"}}, 91 + 46},
		{Filter{Families: []string{"SHS, SHS CF"}}, 179 + 91},
		{Filter{Families: []string{"L"}}, 96},
		{Filter{Families: []string{"channels"}}, 30},
	} {
		assert.Equal(t, c.want, count(c.filter), "%+v", c.filter)
	}
	_, err := Default().Filter(Filter{Families: []string{"UKC", "XYZ"}})
	require.ErrorContains(t, err, "XYZ")
}

func TestFilterExcludes(t *testing.T) {
	found, err := Default().Filter(Filter{Families: []string{"UKC"}, Exclude: []string{"203 UC 60", "UC 152x152x23"}})
	require.NoError(t, err)
	assert.Len(t, found, 44)
	assert.NotContains(t, namesOf(found), "203x203x60 UKC")
	_, err = Default().Filter(Filter{Exclude: []string{"203x203x61 UKC"}})
	require.ErrorContains(t, err, "203x203x60 UKC")
	found, err = Default().Filter(Filter{Families: []string{"SHS CF"}, Exclude: []string{"SHS 150x150x10"}})
	require.NoError(t, err)
	assert.Len(t, found, 90, "the family says which of the two is meant")
}

// A filter is a plain scan of its limits, in the catalogue's order.
func TestFilterKeepsItsLimits(t *testing.T) {
	all := Default().Sections()
	rapid.Check(t, func(t *rapid.T) {
		limit := func(name string, most float64) float64 {
			if rapid.Bool().Draw(t, name+" open") {
				return 0
			}
			return rapid.Float64Range(1, most).Draw(t, name)
		}
		f := Filter{
			MinDepth: limit("min depth", 600), MaxDepth: limit("max depth", 1000), MinWidth: limit("min width", 400),
			MaxWidth: limit("max width", 500), MinThickness: limit("min thickness", 40), MaxThickness: limit("max thickness", 60),
		}
		got, err := Default().Filter(f)
		if err != nil {
			t.Fatal(err)
		}
		var want []*Section
		for _, s := range all {
			out := s.H < f.MinDepth || s.B < f.MinWidth || s.Tf < f.MinThickness ||
				f.MaxDepth > 0 && s.H > f.MaxDepth || f.MaxWidth > 0 && s.B > f.MaxWidth || f.MaxThickness > 0 && s.Tf > f.MaxThickness
			if !out {
				want = append(want, s)
			}
		}
		if !slices.Equal(got, want) {
			t.Fatalf("%+v: %d sections, not %d", f, len(got), len(want))
		}
	})
}
