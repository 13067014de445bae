package building

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// holds reports every rule that a decision breaks.
func holds(t *testing.T, ru *rules, d *Decision, o *Options, seed uint64) {
	t.Helper()
	index := map[string]int{}
	for j, s := range ru.sections {
		index[s.Name()] = j
	}
	for i := range ru.cols {
		si := index[d.Results[i].Section]
		require.True(t, ru.passes[i][si], "seed %d: %s", seed, ru.cols[i].Mark)
		for j := range i {
			sj := index[d.Results[j].Section]
			require.True(t, ru.fits(i, j, si, sj, o), "seed %d: %s with %s", seed, ru.cols[i].Mark, ru.cols[j].Mark)
		}
	}
}

// splices adds what the splices of a decision cost.
func splices(ru *rules, d *Decision, o *Options) float64 {
	sum := 0.0
	for i, j := range ru.above {
		if o.Splices == WhereItPays && j >= 0 && d.Results[i].Section != d.Results[j].Section {
			sum += o.SpliceCost * float64(ru.cols[i].Quantity)
		}
	}
	return sum
}

// Stacks, splices, groups and given sections: the total is the least of every
// combination, and no rule is broken.
func TestAgainstEveryCombination(t *testing.T) {
	if testing.Short() {
		t.Skip("tries every combination: long, and nothing runs side by side")
	}
	e := engineOf(t, nil)
	served := 0
	for seed := range uint64(80) {
		r := rand.New(rand.NewPCG(seed, 1))
		cols := tower(r, 3+r.IntN(4))
		o := Options{Splices: Splices(seed % 3), Every: 1 + r.IntN(2), SpliceCost: 40 * r.Float64()}
		ru := newRules(t, e, cols, &o)
		want := ru.least(&o, 0)
		d := size(t, e, cols, o)
		if math.IsInf(want, 1) {
			continue // a given section, or a column for which nothing passes, spoils the stack
		}
		served++
		holds(t, ru, d, &o, seed)
		got := total(cols, d.Results) + splices(ru, d, &o)
		require.InEpsilon(t, want, got, 1e-9, "seed %d: sums in another order differ by rounding alone", seed)
	}
	assert.Greater(t, served, 40)
}

// The same with few sizes, proven for every number of them.
func TestFewSizesAgainstEveryCombination(t *testing.T) {
	if testing.Short() {
		t.Skip("tries every combination: long, and nothing runs side by side")
	}
	e := engineOf(t, nil)
	served := 0
	for seed := range uint64(60) {
		r := rand.New(rand.NewPCG(seed, 2))
		cols := tower(r, 3+r.IntN(4))
		o := Options{Splices: Splices(seed % 3), Every: 2, SpliceCost: 30, MostSizes: 3}
		ru := newRules(t, e, cols, &o)
		want := ru.least(&o, 3)
		if math.IsInf(want, 1) {
			continue
		}
		served++
		d := size(t, e, cols, o)
		holds(t, ru, d, &o, seed)
		for _, trade := range d.Curve {
			require.True(t, trade.Proven)
			if least := ru.least(&o, trade.Most); math.IsInf(least, 1) {
				require.Nil(t, trade.Sizes)
			} else {
				require.InEpsilon(t, least, trade.Total, 1e-9, "seed %d, %d sizes", seed, trade.Most)
				require.LessOrEqual(t, len(trade.Sizes), trade.Most)
			}
		}
		require.InEpsilon(t, want, total(cols, d.Results)+splices(ru, d, &o), 1e-9, "seed %d", seed)
	}
	assert.Greater(t, served, 25)
}

// Without stacks and limits it is the search's own answer.
func TestNothingToDecideTogether(t *testing.T) {
	e := engineOf(t, nil)
	cols := tower(rand.New(rand.NewPCG(5, 5)), 20)
	for i := range cols {
		cols[i].SpliceSaid = false
	}
	want, err := e.SizeAll(context.Background(), cols, 1, nil)
	require.NoError(t, err)
	assert.Equal(t, want, size(t, e, cols, Options{}).Results)
}

// Fixing a column, asking for fewer splices or fewer sizes is never lighter.
func TestMoreRulesAreNeverLighter(t *testing.T) {
	e := engineOf(t, nil)
	for seed := range uint64(25) {
		r := rand.New(rand.NewPCG(seed, 3))
		cols := tower(r, 12)
		for i := range cols {
			cols[i].Given, cols[i].Group = "", ""
		}
		free := total(cols, size(t, e, cols, Options{Splices: EveryNth, Every: 1}).Results)
		two := total(cols, size(t, e, cols, Options{Splices: EveryNth, Every: 2}).Results)
		assert.LessOrEqual(t, free, two*(1+1e-12))
		last := math.Inf(1)
		d := size(t, e, cols, Options{Splices: EveryNth, Every: 1, MostSizes: 6})
		for _, trade := range d.Curve {
			assert.LessOrEqual(t, trade.Total, last*(1+1e-12))
			assert.GreaterOrEqual(t, trade.Total, free*(1-1e-12))
			last = trade.Total
		}
		cols[0].Given = "203x203x86 UKC"
		assert.LessOrEqual(t, free, total(cols, size(t, e, cols, Options{Splices: EveryNth, Every: 1}).Results)*(1+1e-12))
	}
}

// The order of the rows and the number of workers decide nothing.
func TestWorkersAndOrderDecideNothing(t *testing.T) {
	e := engineOf(t, nil)
	cols := tower(rand.New(rand.NewPCG(9, 9)), 25)
	for _, o := range []Options{{}, {Splices: WhereItPays, SpliceCost: 20}, {MostSizes: 4}} {
		one, err := Size(context.Background(), e, cols, o, 1, nil)
		require.NoError(t, err)
		many, err := Size(context.Background(), e, cols, o, 5, nil)
		require.NoError(t, err)
		assert.Equal(t, one, many)

		order := rand.New(rand.NewPCG(9, 10)).Perm(len(cols))
		shuffled := make([]design.Column, len(cols))
		for k, i := range order {
			shuffled[k] = cols[i]
		}
		other := size(t, e, shuffled, o)
		for k, i := range order {
			assert.Equal(t, one.Results[i].Section, other.Results[k].Section, cols[i].Mark)
		}
	}
}

func TestOptionsThatCannotBeMeant(t *testing.T) {
	e := engineOf(t, nil)
	for _, o := range []Options{{Splices: EveryNth}, {SpliceCost: -1}, {SpliceCost: math.NaN()}, {MostSizes: -1}} {
		_, err := Size(context.Background(), e, nil, o, 1, nil)
		assert.Error(t, err)
	}
}

// Where each length carries the weight of those above, every section that is
// decided on passes under it, and the rules hold.
func TestCoupledStacks(t *testing.T) {
	e := engineOf(t, func(s *design.Settings) { s.SelfWeight = 1.35 * 40 }) // heavy, so that it decides
	require.True(t, e.Coupled())
	again := 0
	for seed := range uint64(30) {
		r := rand.New(rand.NewPCG(seed, 6))
		cols := tower(r, 8)
		for i := range cols {
			cols[i].Given, cols[i].Group = "", ""
			cols[i].Combinations[0].NEd *= 0.6
		}
		o := Options{Splices: EveryNth, Every: 1}
		d := size(t, e, cols, o)
		alone := size(t, engineOf(t, nil), cols, o)
		ru := newRules(t, engineOf(t, nil), cols, &o)
		holds(t, ru, d, &o, seed)
		for i := range d.Results {
			require.Equal(t, design.Passes, d.Results[i].Status, "seed %d", seed)
			if d.Results[i].Section != alone.Results[i].Section {
				again++
			}
		}
		require.LessOrEqual(t, total(cols, alone.Results), total(cols, d.Results)*(1+1e-12))
	}
	assert.NotZero(t, again, "the weight decides somewhere")
}
