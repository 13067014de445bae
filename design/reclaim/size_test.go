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

// Columns of a group share a section, so that none of them is served alone.
func TestGroupsAreSizedNew(t *testing.T) {
	cols := []design.Column{column("A", 4, 900, 1), column("B", 4, 700, 1)}
	cols[0].Group, cols[1].Group = "G", "G"
	d, err := Size(context.Background(), engine(t, nil), cols, building.Options{}, list(t, "HE 220 B,S235,4,6"), 1)
	require.NoError(t, err)
	assert.Equal(t, []int{2, 0}, []int{d.Tied, d.Used})
	assert.Equal(t, d.Results[0].Section, d.Results[1].Section)
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
