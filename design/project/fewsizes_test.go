package project

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"slices"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
)

// office makes a project like an office's: sizes of two serial ranges with a
// minor-axis and a major-axis strength, members with a demand on each.
func office(rng *rand.Rand, members, sizes, deepest int) *Problem {
	mass, y, z, serial := make([]float64, sizes), make([]float64, sizes), make([]float64, sizes), make([]int, sizes)
	for j := range sizes {
		mass[j] = 20 * math.Exp(3*float64(j)/float64(sizes))
		wide := 0.4 + 0.6*rng.Float64()
		y[j] = mass[j] * (1.6 - wide*0.5)
		z[j] = mass[j] * wide
		serial[j] = int(y[j] / 40)
	}
	p := &Problem{Sizes: sizes, MayStand: func(below, above int) bool {
		return mass[above] <= mass[below] && serial[above] <= serial[below]
	}}
	for members > 0 {
		depth := 1 + rng.IntN(deepest)
		chain := Chain{SpliceCost: 30 * rng.Float64()}
		load := 10 + 250*rng.Float64()*rng.Float64()
		shape := 0.3 + 0.7*rng.Float64()
		for n := range depth {
			length := 2.5 + 3*rng.Float64()
			cost := make([]float64, sizes)
			for j := range cost {
				cost[j] = math.Inf(1)
				need := load * (1 - 0.8*float64(n)/float64(depth))
				if y[j] >= need && z[j] >= need*shape || j == sizes-1 {
					cost[j] = mass[j] * length
				}
			}
			chain.Nodes = append(chain.Nodes, Node{cost})
			members--
		}
		p.Chains = append(p.Chains, chain)
	}
	return p
}

// bruteForce tries every set of at most k sizes.
func bruteForce(p *Problem, k int) float64 {
	best := math.Inf(1)
	var try func(from int, open []int)
	try = func(from int, open []int) {
		choice, total := p.CheapestOf(open)
		if !slices.ContainsFunc(choice, func(c []int) bool { return c == nil }) {
			best = min(best, total)
		}
		if len(open) == k {
			return
		}
		for j := from; j < p.Sizes; j++ {
			try(j+1, append(open[:len(open):len(open)], j))
		}
	}
	try(0, nil)
	return best
}

func TestFewSizesAgreesWithEveryCombinationTried(t *testing.T) {
	for seed := range uint64(150) {
		rng := rand.New(rand.NewPCG(seed, 1))
		p := office(rng, 4+rng.IntN(12), 4+rng.IntN(7), 1+int(seed%3))
		got, err := p.FewSizes(context.Background(), 4)
		require.NoError(t, err)
		for _, s := range got {
			want := bruteForce(p, s.K)
			require.True(t, s.Proven, "seed %d, K %d", seed, s.K)
			require.InEpsilon(t, want, s.Cost, 1e-9, "seed %d, K %d: sums in another order differ by rounding alone", seed, s.K)
			require.LessOrEqual(t, len(s.Sizes), s.K)
		}
	}
}

func TestMoreSizesAreNeverHeavier(t *testing.T) {
	p := office(rand.New(rand.NewPCG(7, 7)), 300, 120, 1)
	got, err := p.FewSizes(context.Background(), 8)
	require.NoError(t, err)
	_, free := p.Cheapest()
	last := math.Inf(1)
	for _, s := range got {
		require.LessOrEqual(t, s.Cost, last*(1+1e-12))
		require.GreaterOrEqual(t, s.Cost, free*(1-1e-12))
		last = s.Cost
	}
}

// TestWorkersDecideNothing looks for the same answers, to the last bit, with
// another number of workers: parts are added up in their order.
func TestWorkersDecideNothing(t *testing.T) {
	for _, deepest := range []int{1, 6} {
		p := office(rand.New(rand.NewPCG(9, 9)), 900, 60, deepest)
		p.Workers = 1
		want, err := p.FewSizes(context.Background(), 5)
		require.NoError(t, err)
		for _, workers := range [...]int{2, 5} {
			p.Workers = workers
			got, err := p.FewSizes(context.Background(), 5)
			require.NoError(t, err)
			require.Equal(t, want, got)
		}
	}
}

func TestNoSizeServes(t *testing.T) {
	inf := math.Inf(1)
	p := &Problem{Sizes: 2, Chains: []Chain{
		{Nodes: []Node{{[]float64{1, inf}}}},
		{Nodes: []Node{{[]float64{inf, 2}}}},
	}}
	got, err := p.FewSizes(context.Background(), 2)
	require.NoError(t, err)
	require.Nil(t, got[0].Choice, "one size cannot serve both")
	require.True(t, got[0].Proven)
	require.Equal(t, []int{0, 1}, got[1].Sizes)
	require.Equal(t, 3.0, got[1].Cost)
}

func BenchmarkFewSizes(b *testing.B) {
	for _, size := range []struct{ members, sizes, deepest int }{{300, 250, 1}, {300, 250, 5}, {10_000, 250, 1}, {10_000, 250, 5}} {
		b.Run(fmt.Sprintf("%d lengths, %d sizes, stacks of %d", size.members, size.sizes, size.deepest), func(b *testing.B) {
			p := office(rand.New(rand.NewPCG(3, 3)), size.members, size.sizes, size.deepest)
			for b.Loop() {
				ctx, cancel := context.WithTimeout(context.Background(), 60*time.Second)
				got, err := p.FewSizes(ctx, 12)
				require.NoError(b, err)
				proven := 0.0
				for _, s := range got {
					if s.Proven {
						proven++
					}
					b.Logf("K %d cost %.0f proven %v gap %.4f", s.K, s.Cost, s.Proven, s.Gap())
				}
				b.ReportMetric(proven, "proven")
				cancel()
			}
		})
	}
}
