package revision

import (
	"context"
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/ec3"
	"stanchion/design/search"
)

func settings(t require.TestingT) design.Settings {
	n, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	return design.Settings{National: n, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1}
}

func engine(t require.TestingT, set design.Settings) *search.Engine {
	e, err := search.New(catalogue.Default(), set)
	require.NoError(t, err)
	return e
}

func section(t require.TestingT, name string) *catalogue.Section {
	s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
	require.NoError(t, err)
	return s
}

func had(t require.TestingT, name string) Had {
	if name == "" {
		return Had{}
	}
	return Had{section(t, name), "S355"}
}

// column is one of 4 m with an axial force in kN.
func column(kN float64, change ...func(*design.Column)) design.Column {
	c := design.Column{Mark: "C", Cell: "Columns!A1", Quantity: 1, Length: 4000, Combinations: []design.Combination{{NEd: kN * 1e3}}}
	for _, f := range change {
		f(&c)
	}
	return c
}

func group(name string) func(*design.Column) { return func(c *design.Column) { c.Group = name } }

func keep(t require.TestingT, e *search.Engine, cols []design.Column, sections ...string) []Kept {
	var h []Had
	for i := range cols {
		cols[i].Mark = fmt.Sprint("C", i)
		h = append(h, had(t, sections[i]))
	}
	kept, err := Keep(context.Background(), e, cols, h, building.Options{}, 2)
	require.NoError(t, err)
	return kept.Columns
}

func TestKeep(t *testing.T) {
	e := engine(t, settings(t))
	lightest := func(kN float64) string {
		r, err := e.SizeAll(context.Background(), []design.Column{column(kN)}, 1, nil)
		require.NoError(t, err)
		return r[0].Section
	}
	for name, c := range map[string]struct {
		col   design.Column
		had   string
		want  string
		stays bool
		why   string
	}{
		"passes, though heavier than needed": {column(500), "254x254x89 UKC", "254x254x89 UKC", true, ""},
		"fails":                              {column(2500), "203x203x46 UKC", lightest(2500), false, "fails in flexural buckling z-z"},
		"none before":                        {column(500), "", lightest(500), false, "the old issue has no section for it"},
		"the row gives another": {column(500, func(c *design.Column) { c.Given = "203x203x60 UKC" }), "254x254x89 UKC", "203x203x60 UKC", false,
			"the schedule gives another"},
		"the row gives the same":    {column(500, func(c *design.Column) { c.Given = "254x254x89 UKC" }), "254x254x89 UKC", "254x254x89 UKC", true, ""},
		"another family than usual": {column(500), "HE 260 A", "HE 260 A", true, ""},
		"not of the row's family": {column(500, func(c *design.Column) { c.Choice.Families = []string{"UKC"} }), "HE 260 A", lightest(500), false,
			"the row asks for UKC"},
		"too wide for the row": {column(500, func(c *design.Column) { c.Choice.MaxWidth = 210 }), "254x254x89 UKC", lightest(500), false,
			"width 256.3 mm: outside the row's limits"},
		"not of the row's grade": {column(500, func(c *design.Column) { c.Grades = []string{"S460"} }), "254x254x89 UKC", "", false, "the row asks for S460"},
	} {
		t.Run(name, func(t *testing.T) {
			k := keep(t, e, []design.Column{c.col}, c.had)[0]
			if c.want != "" {
				assert.Equal(t, c.want, k.Result.Section)
			}
			assert.Equal(t, c.stays, k.Stays)
			assert.Contains(t, k.Why, c.why)
			assert.Equal(t, c.why == "", k.Why == "")
			assert.Equal(t, design.Passes, k.Result.Status)
		})
	}
	set := settings(t)
	set.Exclude = []string{"254x254x89 UKC"}
	k := keep(t, engine(t, set), []design.Column{column(500)}, "254x254x89 UKC")[0]
	assert.Equal(t, "it is excluded", k.Why)
}

func TestKeepGroups(t *testing.T) {
	e := engine(t, settings(t))
	sections := func(kept []Kept) (list []string) {
		for i := range kept {
			list = append(list, kept[i].Result.Section)
		}
		return list
	}
	cols := func(kN ...float64) []design.Column {
		var list []design.Column
		for _, n := range kN {
			list = append(list, column(n, group("G1")))
		}
		return list
	}
	// All pass in what they had.
	k := keep(t, e, cols(500, 700), "203x203x60 UKC", "203x203x60 UKC")
	assert.Equal(t, []string{"203x203x60 UKC", "203x203x60 UKC"}, sections(k))
	assert.True(t, k[0].Stays && k[1].Stays)
	// One fails: the group is sized anew.
	k = keep(t, e, cols(500, 2500), "203x203x60 UKC", "203x203x60 UKC")
	assert.Equal(t, sections(k)[0], sections(k)[1])
	assert.False(t, k[0].Stays || k[1].Stays)
	assert.Equal(t, "it passes, others joined to it do not", k[0].Why)
	// Two had one section, one another: the group takes what most had, if it passes for all.
	k = keep(t, e, cols(500, 500, 500), "203x203x60 UKC", "203x203x71 UKC", "203x203x71 UKC")
	assert.Equal(t, "203x203x71 UKC", sections(k)[0])
	assert.Equal(t, []bool{false, true, true}, []bool{k[0].Stays, k[1].Stays, k[2].Stays})
	k = keep(t, e, cols(500, 500, 1800), "203x203x60 UKC", "203x203x60 UKC", "254x254x89 UKC")
	assert.Equal(t, "254x254x89 UKC", sections(k)[0])
	assert.Equal(t, []bool{false, false, true}, []bool{k[0].Stays, k[1].Stays, k[2].Stays})
	// A member that is new has the group's.
	k = keep(t, e, cols(500, 500), "203x203x60 UKC", "")
	assert.Equal(t, []string{"203x203x60 UKC", "203x203x60 UKC"}, sections(k))
}

// drawn are columns, in groups and alone, with sections that they had.
func drawn(rt *rapid.T) (cols []design.Column, names []string) {
	ukc := []string{"152x152x37 UKC", "203x203x46 UKC", "203x203x60 UKC", "254x254x89 UKC", "305x305x118 UKC", ""}
	for range rapid.IntRange(1, 8).Draw(rt, "columns") {
		c := column(float64(rapid.IntRange(100, 4000).Draw(rt, "N_Ed")), group(rapid.SampledFrom([]string{"", "", "G1", "G2"}).Draw(rt, "group")))
		cols = append(cols, c)
		names = append(names, rapid.SampledFrom(ukc).Draw(rt, "had"))
	}
	return cols, names
}

// The fewest members change, as every way of deciding shows: each column on its
// own, and each group on one section for all its members.
func TestTheFewestMembersChange(t *testing.T) {
	e := engine(t, settings(t))
	rapid.Check(t, func(rt *rapid.T) {
		cols, names := drawn(rt)
		kept := keep(rt, e, cols, names...)
		stays := map[string]int{}
		inGroup := map[string]string{}
		for i := range kept {
			require.Equal(rt, design.Passes, kept[i].Result.Status)
			if kept[i].Stays {
				stays[cols[i].Group]++
			}
			if g := cols[i].Group; g != "" {
				if s, ok := inGroup[g]; ok {
					assert.Equal(rt, s, kept[i].Result.Section)
				}
				inGroup[g] = kept[i].Result.Section
			}
		}
		for g, want := range bestByHand(rt, e, cols, names) {
			assert.Equal(rt, want, stays[g], "group %q", g)
		}
	})
}

// bestByHand counts, for the columns alone ("") and for each group, how many
// can stay: by checking each old section for each member.
func bestByHand(rt *rapid.T, e *search.Engine, cols []design.Column, names []string) map[string]int {
	passes := func(i int, name string) bool {
		c := cols[i]
		c.Given, c.Group = name, ""
		r, err := e.SizeAll(context.Background(), []design.Column{c}, 1, nil)
		require.NoError(rt, err)
		return r[0].Status == design.Passes
	}
	best := map[string]int{}
	for i, name := range names {
		g := cols[i].Group
		switch {
		case name == "":
		case g == "":
			if passes(i, name) {
				best[""]++
			}
		default:
			n, all := 0, true
			for j := range cols {
				if cols[j].Group == g {
					all = all && passes(j, name)
					if names[j] == name {
						n++
					}
				}
			}
			if all {
				best[g] = max(best[g], n)
			}
		}
	}
	return best
}

// Sizing a schedule that is sized already changes nothing.
func TestKeepingIsIdempotent(t *testing.T) {
	e := engine(t, settings(t))
	rapid.Check(t, func(rt *rapid.T) {
		cols, names := drawn(rt)
		first := keep(rt, e, cols, names...)
		for i := range first {
			names[i] = first[i].Result.Section
		}
		second := keep(rt, e, cols, names...)
		for i := range second {
			assert.True(rt, second[i].Stays)
			assert.Equal(rt, names[i], second[i].Result.Section)
		}
	})
}

// Where own weight goes down the column line, all that stay pass beside what
// is sized anew.
func TestKeepInColumnLines(t *testing.T) {
	set := settings(t)
	set.SelfWeight = 1.35
	e := engine(t, set)
	require.True(t, e.Coupled())
	rapid.Check(t, func(rt *rapid.T) {
		cols, names := drawn(rt)
		for i := range cols {
			cols[i].Group, cols[i].Stack = "", "A"
			cols[i].From, cols[i].To = fmt.Sprint("L", i), fmt.Sprint("L", i+1)
		}
		for i, k := range keep(rt, e, cols, names...) {
			assert.Equal(rt, design.Passes, k.Result.Status, "%d", i)
		}
	})
}

// The lengths of a stack between splices share a section, as groups do, and
// the section above a splice may stay.
func TestKeepStacks(t *testing.T) {
	e := engine(t, settings(t))
	stack := func(kN ...float64) []design.Column {
		var cols []design.Column
		for i, n := range kN {
			cols = append(cols, column(n, func(c *design.Column) {
				c.Stack, c.From, c.To = "A", fmt.Sprint("L", i), fmt.Sprint("L", i+1)
				c.SpliceSaid, c.Splice = true, i == 1
			}))
		}
		return cols
	}
	k := keep(t, e, stack(1000, 800, 300), "203x203x60 UKC", "203x203x60 UKC", "203x203x46 UKC")
	for i := range k {
		assert.True(t, k[i].Stays, i)
	}
	// The lowest fails: it and the one that shares its section change, the top stays.
	k = keep(t, e, stack(2500, 800, 300), "203x203x60 UKC", "203x203x60 UKC", "203x203x46 UKC")
	assert.Equal(t, k[0].Result.Section, k[1].Result.Section)
	assert.Equal(t, []bool{false, false, true}, []bool{k[0].Stays, k[1].Stays, k[2].Stays})
	assert.Equal(t, "it passes, others joined to it do not", k[1].Why)
	assert.Equal(t, "203x203x46 UKC", k[2].Result.Section)
	// Without a word of splices every length is on its own.
	cols := stack(2500, 800, 300)
	for i := range cols {
		cols[i].SpliceSaid, cols[i].Splice = false, false
	}
	k = keep(t, e, cols, "203x203x60 UKC", "203x203x60 UKC", "203x203x46 UKC")
	assert.Equal(t, []bool{false, true, true}, []bool{k[0].Stays, k[1].Stays, k[2].Stays})
}

func TestKeepStops(t *testing.T) {
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	_, err := Keep(ctx, engine(t, settings(t)), []design.Column{column(500)}, []Had{had(t, "203x203x60 UKC")}, building.Options{}, 1)
	assert.ErrorIs(t, err, context.Canceled)
}
