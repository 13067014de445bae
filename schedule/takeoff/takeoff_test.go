package takeoff

import (
	"fmt"
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
)

func section(t testing.TB, name string) *catalogue.Section {
	t.Helper()
	s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
	require.NoError(t, err)
	return s
}

func item(t testing.TB, mark, stack, from, to string, n int, length float64, name string) Item {
	return Item{Mark: mark, Stack: stack, From: from, To: to, Quantity: n, Length: length, Section: section(t, name), Grade: "S355"}
}

// drawItems draws a schedule: a building of stacks, some with splices said,
// with quantities and lengths as people type them.
func drawItems(rt *rapid.T) []Item {
	all := catalogue.Default().Sections()
	var items []Item
	for s := range rapid.IntRange(1, 6).Draw(rt, "stacks") {
		said := rapid.Bool().Draw(rt, "splices said")
		n := rapid.IntRange(1, 4).Draw(rt, "quantity")
		sec := rapid.SampledFrom(all).Draw(rt, "section")
		for l := range rapid.IntRange(1, 6).Draw(rt, "lengths") {
			if rapid.Bool().Draw(rt, "other section") {
				sec = rapid.SampledFrom(all).Draw(rt, "section")
			}
			items = append(items, Item{
				Mark: fmt.Sprintf("S%d-%d", s, l), Stack: fmt.Sprintf("G%d", s), From: fmt.Sprintf("L%d", l), To: fmt.Sprintf("L%d", l+1),
				Quantity: n, Length: float64(rapid.IntRange(300_0, 60_000_0).Draw(rt, "length")) / 10,
				Section: sec, Grade: rapid.SampledFrom([]string{"S275", "S355"}).Draw(rt, "grade"),
				SpliceSaid: said, Splice: rapid.Bool().Draw(rt, "splice"),
			})
		}
	}
	return items
}

// ratesForTest give half of the steel a rate.
var ratesForTest = design.Rates{
	CostPerTonne: map[string]float64{"S355": 1825.5, "UKC S275": 1790},
	CarbonPerKg:  map[string]float64{"": 1.742, "UKC": 1.1},
}

// The sum over the members, in exact arithmetic: the mass of a piece is the
// published mass per metre times the length, to the gram.
func massByHand(items []Item) *big.Int {
	total := new(big.Int)
	for _, it := range items {
		m, _ := new(big.Rat).SetString(fmt.Sprint(it.Section.Mass))
		l, _ := new(big.Rat).SetString(fmt.Sprint(it.Length))
		grams := new(big.Rat).Mul(m, l)
		grams.Add(grams, big.NewRat(1, 2))
		floor := new(big.Int).Div(grams.Num(), grams.Denom())
		total.Add(total, floor.Mul(floor, big.NewInt(int64(it.Quantity))))
	}
	return total
}

func TestEveryTableAddsUpToTheMembers(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		items := drawItems(rt)
		tk := Of(items, nil, Options{Rates: ratesForTest})
		// A product that ends in exactly half a gram may fall either way in
		// binary arithmetic: at most a gram a piece, and only then.
		byHand := massByHand(items)
		diff := new(big.Int).Sub(byHand, big.NewInt(tk.Net.Mass))
		assert.LessOrEqual(rt, diff.Abs(diff).Int64(), halves(items))

		var sections, levels, families, cut Amounts
		var pieces [3]int64
		for _, l := range tk.Sections {
			sections.Add(l.Amounts)
			pieces[0] += l.Pieces
		}
		for _, l := range tk.Levels {
			levels.Add(l.Amounts)
		}
		for _, l := range tk.Families {
			families.Add(l.Amounts)
			pieces[1] += l.Pieces
		}
		for _, l := range tk.Cuts {
			cut.Add(l.Amounts)
			pieces[2] += l.Number
			assert.Equal(rt, l.Length*l.Number, l.Amounts.Length)
		}
		for _, sum := range []Amounts{sections, levels, families, cut} {
			assert.Equal(rt, tk.Net, sum)
		}
		assert.Equal(rt, [3]int64{tk.Pieces, tk.Pieces, tk.Pieces}, pieces)
		assert.LessOrEqual(rt, tk.Pieces, tk.Net.Lengths)
	})
}

// halves counts the pieces whose mass ends in half a gram.
func halves(items []Item) (n int64) {
	for _, it := range items {
		m, _ := new(big.Rat).SetString(fmt.Sprint(it.Section.Mass))
		l, _ := new(big.Rat).SetString(fmt.Sprint(it.Length))
		if m.Mul(m, l).Mul(m, big.NewRat(2, 1)); m.IsInt() && m.Num().Bit(0) == 1 {
			n += int64(it.Quantity)
		}
	}
	return n
}

func TestTheOrderOfRowsDoesNotMatter(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		items := drawItems(rt)
		mixed := rapid.Permutation(items).Draw(rt, "mixed")
		a, b := Of(items, nil, Options{Rates: ratesForTest}), Of(mixed, nil, Options{Rates: ratesForTest})
		assert.Equal(rt, a.Sections, b.Sections)
		assert.Equal(rt, a.Families, b.Families)
		assert.Equal(rt, a.Net, b.Net)
		assert.Equal(rt, a.Pieces, b.Pieces)
		assert.Equal(rt, a.SpliceCount(), b.SpliceCount())
		assert.ElementsMatch(rt, a.Levels, b.Levels)
	})
}

// Each joint of a stack is either inside a piece or a splice.
func TestJointsAreSplicesOrInsidePieces(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		items := drawItems(rt)
		tk := Of(items, nil, Options{})
		var joints int64
		for i := 1; i < len(items); i++ {
			if items[i].Stack == items[i-1].Stack {
				joints += int64(items[i].Quantity)
			}
		}
		assert.Equal(rt, joints, tk.SpliceCount()+tk.Net.Lengths-tk.Pieces)
	})
}

func TestSmallSchedule(t *testing.T) {
	items := []Item{
		item(t, "A1-1", "A1", "L0", "L1", 1, 6200, "254x254x89 UKC"),
		item(t, "A1-2", "A1", "L1", "L2", 1, 4000, "254x254x89 UKC"),
		item(t, "A1-3", "A1", "L2", "Roof", 1, 3600, "203x203x46 UKC"),
		item(t, "P1", "Canopy", "L0", "L1", 4, 4800, "CHS 139.7x6.3"),
	}
	for i := range items[:3] {
		items[i].SpliceSaid = true
	}
	items[1].Splice = true
	tk := Of(items, []LeftOut{{"B1", "Columns!A9", "it has no section"}}, Options{
		Rates:       design.Rates{CostPerTonne: map[string]float64{"UKC": 1500, "": 2100}, CarbonPerKg: map[string]float64{"": 1.75}},
		Connections: 0.06, Waste: 0.025, Transport: 10_000,
	})
	// 88.9 kg/m x 10.2 m = 906.780 kg; 46.1 kg/m x 3.6 m = 165.960 kg;
	// 20.7 kg/m x 4.8 m = 99.360 kg a post (masses of EN 10365 and EN 10210-2).
	require.Len(t, tk.Sections, 3)
	chs, small, large := tk.Sections[0], tk.Sections[1], tk.Sections[2]
	assert.Equal(t, "203x203x46 UKC", small.Section.Name())
	assert.Equal(t, [3]int64{4 * 99_360, 165_960, 906_780}, [3]int64{chs.Mass, small.Mass, large.Mass})
	assert.Equal(t, [3]int64{4, 1, 1}, [3]int64{chs.Pieces, small.Pieces, large.Pieces})
	assert.Equal(t, int64(10_200_000), large.Length)
	assert.Equal(t, int64(2), large.Lengths)
	// pi x 139.7 mm x 4.8 m a post.
	assert.InDelta(t, 4*3.14159265*139.7*4800, float64(chs.Area), 4)
	assert.Equal(t, int64(1500)*(906_780+165_960)+2100*4*99_360, tk.Net.Cost)
	assert.Equal(t, 1750*tk.Net.Mass, tk.Net.Carbon)
	assert.Equal(t, int64(6), tk.Pieces)

	require.Len(t, tk.Levels, 3)
	assert.Equal(t, "L0 to L1", tk.Levels[0].Name())
	assert.Equal(t, int64(5), tk.Levels[0].Lengths)
	assert.Equal(t, "L2 to Roof", tk.Levels[2].Name())
	assert.Equal(t, []Splice{{Stack: "A1", Level: "L2", Lower: "254x254x89 UKC S355", Upper: "203x203x46 UKC S355", Number: 1}}, tk.Splices)
	require.Len(t, tk.TooLong, 1)
	assert.Equal(t, "A1-1 + A1-2", tk.TooLong[0].Name())
	assert.Equal(t, "A1-1 + A1-2", tk.Longest.Name())
	assert.Equal(t, []string{"P1 (4)"}, tk.Cuts[0].Marks)

	connections, waste := tk.Allowance()
	assert.Equal(t, whole(0.06*float64(tk.Net.Mass)), connections.Mass)
	assert.Equal(t, whole(0.025*float64(tk.Net.Mass)), waste.Mass)
	assert.Equal(t, tk.Net.Mass+connections.Mass+waste.Mass, tk.Gross().Mass)
	assert.Equal(t, tk.Net.Area, tk.Gross().Area)
	assert.Equal(t, []LeftOut{{"B1", "Columns!A9", "it has no section"}}, tk.LeftOut)
	assert.True(t, tk.HasCost())
}

func TestSteelWithoutARateIsNamed(t *testing.T) {
	items := []Item{
		item(t, "C1", "", "", "", 2, 3000, "203x203x46 UKC"),
		item(t, "C2", "", "", "", 1, 3000, "HE 200 A"),
	}
	tk := Of(items, nil, Options{Rates: design.Rates{CostPerTonne: map[string]float64{"UKC": 1500}}})
	assert.Equal(t, int64(42_300*3), tk.Unpriced.Mass) // 42.3 kg/m
	assert.Equal(t, tk.Net.Mass, tk.Unrated.Mass)
	assert.True(t, tk.HasCost())
	assert.False(t, tk.HasCarbon())
	require.Len(t, tk.Levels, 1)
	assert.Empty(t, tk.Levels[0].Name())
}

func TestWhatCannotBeCounted(t *testing.T) {
	items := []Item{
		{Mark: "C1", Quantity: 1, Length: 3000},
		{Mark: "C2", Quantity: 1, Section: section(t, "HE 200 A")},
		{Mark: "C3", Length: 3000, Section: section(t, "HE 200 A")},
		{Mark: "C4", Quantity: 1, Length: 3000, Section: section(t, "HE 200 A"), Failing: true, Remark: "seen"},
	}
	tk := Of(items, nil, Options{})
	var why []string
	for _, l := range tk.LeftOut {
		why = append(why, l.Name+": "+l.Why)
	}
	assert.Equal(t, []string{"C1: it has no section", "C2: it has no length", "C3: its quantity is 0"}, why)
	assert.Equal(t, int64(1), tk.Pieces)
	assert.Len(t, tk.Failing, 1)
	assert.Len(t, tk.Remarks, 1)
	empty := Of(nil, nil, Options{Transport: 12_000})
	assert.Nil(t, empty.Longest)
	assert.Empty(t, empty.Sections)
}

// Lengths that stand on each other in a ring, twice, or in two places are not
// joined, and counted all the same.
func TestOddStacks(t *testing.T) {
	on := func(mark, from, to string) Item {
		it := item(t, mark, "A1", from, to, 1, 3000, "203x203x46 UKC")
		it.SpliceSaid = true
		return it
	}
	for name, items := range map[string][]Item{
		"ring":          {on("1", "L0", "L1"), on("2", "L1", "L0")},
		"ring of three": {on("1", "L0", "L1"), on("2", "L1", "L2"), on("3", "L2", "L0")},
		"two on one":    {on("1", "L0", "L1"), on("2", "L1", "L2"), on("3", "L1", "L3")},
		"one on two":    {on("1", "L0", "L2"), on("2", "L1", "L2"), on("3", "L2", "L3")},
		"on itself":     {on("1", "L0", "L0"), on("2", "L0", "L1")},
		"no levels":     {on("1", "", ""), on("2", "", "")},
	} {
		t.Run(name, func(t *testing.T) {
			tk := Of(items, nil, Options{})
			assert.Equal(t, int64(len(items)), tk.Net.Lengths)
			assert.Equal(t, int64(len(items))*3*46_100, tk.Net.Mass)
			var cut int64
			for _, c := range tk.Cuts {
				cut += c.Number * c.Length
			}
			assert.Equal(t, tk.Net.Length, cut)
		})
	}
}

func TestLevelsRiseWhateverTheOrderOfRows(t *testing.T) {
	items := []Item{
		item(t, "5", "B", "L3", "Roof", 1, 3000, "203x203x46 UKC"),
		item(t, "4", "B", "L1", "L3", 1, 6000, "203x203x46 UKC"),
		item(t, "3", "A", "L2", "L3", 1, 3000, "203x203x46 UKC"),
		item(t, "2", "A", "L1", "L2", 1, 3000, "203x203x46 UKC"),
		item(t, "1", "A", "ground", "L1", 1, 3000, "203x203x46 UKC"),
	}
	want := []string{"ground to L1", "L1 to L2", "L1 to L3", "L2 to L3", "L3 to Roof"}
	for range 3 {
		var got []string
		for _, l := range Of(items, nil, Options{}).Levels {
			got = append(got, l.Name())
		}
		assert.Equal(t, want, got)
		slices.Reverse(items)
		items[0], items[2] = items[2], items[0]
	}
}

func BenchmarkOf(b *testing.B) {
	var items []Item
	s := section(b, "203x203x46 UKC")
	for i := range 10_000 {
		items = append(items, Item{Mark: fmt.Sprint("C", i), Stack: fmt.Sprint(i / 5), From: fmt.Sprint("L", i%5), To: fmt.Sprint("L", i%5+1), Quantity: 1, Length: 3000 + float64(i%100), Section: s, Grade: "S355"})
	}
	for b.Loop() {
		Of(items, nil, Options{})
	}
}

func TestMarkName(t *testing.T) {
	for _, c := range [][3]string{{"C1", "A/3", "C1 A/3"}, {"A3-01", "A3", "A3-01"}, {"C3", "C", "C3 C"}, {"A31", "A3", "A31 A3"}, {"A3", "A3", "A3"}, {"C1", "", "C1"}} {
		assert.Equal(t, c[2], MarkName(c[0], c[1]))
	}
}

// The setting for splices joins lengths as the schedule's own column does.
func TestRulesForSplices(t *testing.T) {
	var items []Item
	for i, name := range []string{"254x254x89 UKC", "254x254x89 UKC", "254x254x89 UKC", "203x203x46 UKC", "203x203x46 UKC"} {
		items = append(items, item(t, fmt.Sprint(i+1), "A", fmt.Sprint("L", i), fmt.Sprint("L", i+1), 1, 3000, name))
	}
	marks := func(o Options) (list []string) {
		for _, c := range Of(items, nil, o).Cuts {
			list = append(list, c.Marks...)
		}
		slices.Sort(list)
		return list
	}
	assert.Equal(t, []string{"1", "2", "3", "4", "5"}, marks(Options{}))
	assert.Equal(t, []string{"1 + 2", "3", "4", "5"}, marks(Options{Splices: building.EveryNth, Every: 2}))
	assert.Equal(t, []string{"1 + 2 + 3", "4 + 5"}, marks(Options{Splices: building.EveryNth, Every: 3}))
	assert.Equal(t, []string{"1 + 2 + 3", "4 + 5"}, marks(Options{Splices: building.WhereItPays}))
	slices.Reverse(items)
	assert.Equal(t, []string{"1 + 2", "3", "4", "5"}, marks(Options{Splices: building.EveryNth, Every: 2}))
}
