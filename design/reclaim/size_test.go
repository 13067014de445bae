package reclaim

import (
	"context"
	"fmt"
	"strings"
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

func engine(t require.TestingT, change func(*design.Settings)) *search.Engine {
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	set := design.Settings{National: uk, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1}
	if change != nil {
		change(&set)
	}
	e, err := search.New(catalogue.Default(), set)
	require.NoError(t, err)
	return e
}

func list(t require.TestingT, lines ...string) *catalogue.Catalogue {
	c, err := catalogue.Default().Stock(strings.NewReader("section,grade,number,length_m\n"+strings.Join(lines, "\n")), "yard.csv")
	require.NoError(t, err)
	return c
}

func column(mark string, lengthM, kN float64, quantity int) design.Column {
	return design.Column{Mark: mark, Cell: mark, Quantity: quantity, Length: 1000 * lengthM, Combinations: []design.Combination{{NEd: 1000 * kN}}}
}

// bought is the mass of new steel.
func bought(cols []design.Column, results []design.Result) float64 {
	sum := 0.0
	for i := range results {
		if results[i].AtHand == "" {
			sum += results[i].Mass * float64(cols[i].Quantity)
		}
	}
	return sum
}

// What is said to be saved is what the schedule costs less in new steel, and
// every column passes in what it is given.
func TestSavedIsWhatIsNotBought(t *testing.T) {
	e := engine(t, nil)
	yard := list(t, "203x203x60 UKC,S275,3,4.5", "152x152x37 UKC,S235,2,3.2", "HE 220 B,S235,2,6", "254x254x107 UKC,S275,1,5")
	rapid.Check(t, func(t *rapid.T) {
		var cols []design.Column
		for i := range rapid.IntRange(1, 8).Draw(t, "columns") {
			cols = append(cols, column(fmt.Sprint("C", i), rapid.Float64Range(2.5, 6.5).Draw(t, "length"), rapid.Float64Range(100, 3000).Draw(t, "force"), rapid.IntRange(1, 3).Draw(t, "quantity")))
		}
		alone, err := e.SizeAll(context.Background(), cols, 1, nil)
		require.NoError(t, err)
		d, err := Size(context.Background(), e, cols, building.Options{}, yard, 1)
		require.NoError(t, err)
		require.True(t, d.Proven)
		require.InDelta(t, bought(cols, alone)-bought(cols, d.Results), d.Saved, 1e-6)
		for i := range d.Results {
			require.Equal(t, design.Passes, d.Results[i].Status)
			require.False(t, d.Results[i].Fixed)
		}
	})
}

// The row's own limits, families, grades and section hold for steel at hand;
// the settings' families and grades are of what is bought.
func TestWhatARowAllows(t *testing.T) {
	yard := list(t, "HE 220 B,S235,1,6")
	for name, tc := range map[string]struct {
		change func(*design.Column)
		taken  bool
	}{
		"any":             {func(*design.Column) {}, true},
		"too wide":        {func(c *design.Column) { c.Choice.MaxWidth = 210 }, false},
		"another family":  {func(c *design.Column) { c.Choice.Families = []string{"UKC"} }, false},
		"its family":      {func(c *design.Column) { c.Choice.Families = []string{"HEB"} }, true},
		"another grade":   {func(c *design.Column) { c.Grades = []string{"S275"} }, false},
		"its grade":       {func(c *design.Column) { c.Grades = []string{"S235", "S355"} }, true},
		"its section":     {func(c *design.Column) { c.Given = "HE 220 B" }, true},
		"another section": {func(c *design.Column) { c.Given = "HE 220 A" }, false},
		"too long":        {func(c *design.Column) { c.Length = 6001 }, false},
		"too much":        {func(c *design.Column) { c.Combinations[0].NEd = 3e6 }, false},
		"too many":        {func(c *design.Column) { c.Quantity = 2 }, false},
		"a group of one":  {func(c *design.Column) { c.Group = "G" }, true},
	} {
		t.Run(name, func(t *testing.T) {
			cols := []design.Column{column("A", 4, 900, 1)}
			tc.change(&cols[0])
			d, err := Size(context.Background(), engine(t, nil), cols, building.Options{}, yard, 1)
			require.NoError(t, err)
			assert.Equal(t, tc.taken, d.Results[0].AtHand != "")
			assert.Equal(t, tc.taken, d.Used == 1)
			assert.Equal(t, cols[0].Given != "", d.Results[0].Fixed)
			if tc.taken {
				assert.Equal(t, "HE 220 B S235", d.Results[0].Section+" "+d.Results[0].Grade)
			}
		})
	}
}

// Columns of a group share a section: they are decided as if they were bought,
// and pieces of that section and grade serve one or the other.
func TestGroupsTakeTheirOwnSectionAlone(t *testing.T) {
	cols := []design.Column{column("A", 4, 900, 1), column("B", 4.5, 700, 1)}
	cols[0].Group, cols[1].Group = "G", "G"
	e := engine(t, nil)
	alone, err := building.Size(context.Background(), e, cols, building.Options{}, 1, nil)
	require.NoError(t, err)
	section := alone.Results[0].Section
	require.Equal(t, section, alone.Results[1].Section)
	for name, tc := range map[string]struct {
		piece string
		want  []string
	}{
		"another section":   {"HE 220 B,S355,4,6", []string{"", ""}},
		"another grade":     {section + ",S275,4,6", []string{"", ""}},
		"one for either":    {section + ",S355,1,6", []string{"", "1 of 6.000 m (line 2)"}}, // the longer one saves more
		"too short for one": {section + ",S355,2,4.2", []string{"1 of 4.200 m (line 2)", ""}},
	} {
		t.Run(name, func(t *testing.T) {
			d, err := Size(context.Background(), e, cols, building.Options{}, list(t, tc.piece), 1)
			require.NoError(t, err)
			assert.Equal(t, 2, d.Tied)
			assert.Equal(t, tc.want, []string{d.Results[0].AtHand, d.Results[1].AtHand})
			assert.Equal(t, []string{section, section}, []string{d.Results[0].Section, d.Results[1].Section})
			assert.InDelta(t, bought(cols, alone.Results)-bought(cols, d.Results), d.Saved, 1e-6)
		})
	}
}

// A piece goes through every length of a stack up to a splice, or is not taken.
func TestOnePieceThroughALength(t *testing.T) {
	stack := func(splices ...bool) []design.Column {
		var cols []design.Column
		for k, splice := range splices {
			c := column(fmt.Sprint("A", k), 4, 900-200*float64(k), 2)
			c.Stack, c.From, c.To, c.Splice, c.SpliceSaid = "A", fmt.Sprint("L", k), fmt.Sprint("L", k+1), splice, true
			cols = append(cols, c)
		}
		return cols
	}
	e := engine(t, nil)
	for name, tc := range map[string]struct {
		splices []bool
		pieces  []string // length and number
		want    []bool   // taken
		used    int
	}{
		"through both":         {[]bool{false, false}, []string{"2,8"}, []bool{true, true}, 2},
		"one would be too few": {[]bool{false, false}, []string{"1,8"}, []bool{false, false}, 0},
		"too short for both":   {[]bool{false, false}, []string{"4,7.9"}, []bool{false, false}, 0},
		"up to the splice":     {[]bool{false, true, false}, []string{"2,8"}, []bool{true, true, false}, 2},
		"a splice between":     {[]bool{true, false}, []string{"2,4.1"}, []bool{true, false}, 2},
	} {
		t.Run(name, func(t *testing.T) {
			cols := stack(tc.splices...)
			alone, err := building.Size(context.Background(), e, cols, building.Options{}, 1, nil)
			require.NoError(t, err)
			var lines []string
			for _, p := range tc.pieces {
				lines = append(lines, alone.Results[0].Section+",S355,"+p)
			}
			d, err := Size(context.Background(), e, cols, building.Options{}, list(t, lines...), 1)
			require.NoError(t, err)
			assert.Equal(t, tc.used, d.Used)
			for i, taken := range tc.want {
				assert.Equal(t, taken, d.Results[i].AtHand != "", "length %d", i)
				assert.Equal(t, alone.Results[i].Section, d.Results[i].Section)
			}
			assert.InDelta(t, bought(cols, alone.Results)-bought(cols, d.Results), d.Saved, 1e-6)
		})
	}
}

// Where splices may stand wherever they pay, lengths of one section are one
// piece.
func TestOnePieceWhereItPays(t *testing.T) {
	cols := []design.Column{column("A0", 4, 900, 1), column("A1", 4, 880, 1)}
	for k := range cols {
		cols[k].Stack, cols[k].From, cols[k].To = "A", fmt.Sprint("L", k), fmt.Sprint("L", k+1)
	}
	e, o := engine(t, nil), building.Options{Splices: building.WhereItPays, SpliceCost: 50}
	alone, err := building.Size(context.Background(), e, cols, o, 1, nil)
	require.NoError(t, err)
	require.Equal(t, alone.Results[0].Section, alone.Results[1].Section)
	for length, used := range map[string]int{"8": 1, "6": 0} {
		d, err := Size(context.Background(), e, cols, o, list(t, alone.Results[0].Section+",S355,1,"+length), 1)
		require.NoError(t, err)
		assert.Equal(t, used, d.Used)
	}
}

// Few sizes are chosen for what is bought: once a column takes a piece, those of
// a group may have another section, and no piece of the first stands for it.
func TestFewSizesAndTiedColumns(t *testing.T) {
	e := engine(t, nil)
	rapid.Check(t, func(t *rapid.T) {
		var cols []design.Column
		for i := range rapid.IntRange(3, 7).Draw(t, "columns") {
			c := column(fmt.Sprint("C", i), rapid.Float64Range(3, 5).Draw(t, "length"), rapid.Float64Range(300, 1500).Draw(t, "force"), 1)
			c.Group = rapid.SampledFrom([]string{"", "G", "H"}).Draw(t, "group")
			cols = append(cols, c)
		}
		yard := list(t, "203x203x60 UKC,S355,2,5", "203x203x46 UKC,S355,2,5", "152x152x37 UKC,S355,2,5", "203x203x52 UKC,S355,1,5")
		d, err := Size(context.Background(), e, cols, building.Options{MostSizes: 2}, yard, 1)
		require.NoError(t, err)
		sections := map[string]string{}
		for i := range d.Results {
			require.Equal(t, design.Passes, d.Results[i].Status)
			if g := cols[i].Group; g != "" {
				if had, ok := sections[g]; ok {
					require.Equal(t, had, d.Results[i].Section, "group %s", g)
				}
				sections[g] = d.Results[i].Section
			}
		}
	})
}

// A column that nothing new can serve goes before one that saves more.
func TestRescueGoesFirst(t *testing.T) {
	cols := []design.Column{column("A", 6, 1500, 1), column("B", 4, 900, 1)}
	cols[1].Choice.Families, cols[1].Choice.MinDepth, cols[1].Choice.MaxDepth = []string{"UKC", "HEB"}, 219, 221 // no UKC is so deep
	e := engine(t, func(s *design.Settings) { s.Exclude = []string{"HE 220 B"} })
	d, err := Size(context.Background(), e, cols, building.Options{}, list(t, "HE 220 B,S355,1,6"), 1)
	require.NoError(t, err)
	assert.Empty(t, d.Results[0].AtHand, "what is excluded is not taken from the yard either")
	assert.Equal(t, design.NoSection, d.Results[1].Status)
	e = engine(t, nil)
	cols[1].Choice.Families = nil
	d, err = Size(context.Background(), e, cols, building.Options{}, list(t, "HE 220 B,S355,1,6"), 1)
	require.NoError(t, err)
	assert.Equal(t, []string{"", "1 of 6.000 m (line 2)"}, []string{d.Results[0].AtHand, d.Results[1].AtHand})
}

// Where own weight goes down the stack, what is taken still passes beside what
// stands on it.
func TestCoupledLengthsPass(t *testing.T) {
	e := engine(t, func(s *design.Settings) { s.SelfWeight = 1.35 })
	require.True(t, e.Coupled())
	var cols []design.Column
	for i := range 6 {
		c := column(fmt.Sprint("C", i), 4, 1450-150*float64(i), 1)
		c.Stack, c.From, c.To = "A", fmt.Sprint("L", i), fmt.Sprint("L", i+1)
		cols = append(cols, c)
	}
	d, err := Size(context.Background(), e, cols, building.Options{}, list(t, "203x203x60 UKC,S355,2,4", "203x203x46 UKC,S355,2,4", "152x152x37 UKC,S355,2,4"), 1)
	require.NoError(t, err)
	assert.False(t, d.Proven)
	assert.Positive(t, d.Used)
	for i := range d.Results {
		assert.Equal(t, design.Passes, d.Results[i].Status, "%d", i)
	}
}
