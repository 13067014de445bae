package project

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// tied makes a project in which groups tie stacks together: random trees.
func tied(rng *rand.Rand, trees, sizes, most int) *Problem {
	p := &Problem{Sizes: sizes, MayStand: func(below, above int) bool {
		return above <= below && above%3 <= below%3 // a partial order
	}}
	for range trees {
		var c Chain
		for n := range 1 + rng.IntN(most) {
			cost := make([]float64, sizes)
			for j := range cost {
				cost[j] = float64(1+j) * (1 + rng.Float64())
				if rng.IntN(3) == 0 {
					cost[j] = math.Inf(1)
				}
			}
			c.Nodes = append(c.Nodes, Node{cost})
			if n == 0 {
				c.Links = []Link{}
				continue
			}
			l := Link{Below: rng.IntN(n), Above: n, SpliceCost: 2 * rng.Float64()}
			if rng.IntN(2) == 0 {
				l.Below, l.Above = l.Above, l.Below
			}
			c.Links = append(c.Links, l)
		}
		p.Chains = append(p.Chains, c)
	}
	return p
}

// everyChoice is the least cost of a chain over every combination of the open
// sizes.
func everyChoice(p *Problem, c *Chain, open []int) float64 {
	pick, best := make([]int, len(c.Nodes)), math.Inf(1)
	var try func(n int)
	try = func(n int) {
		if n < len(c.Nodes) {
			for _, j := range open {
				pick[n] = j
				try(n + 1)
			}
			return
		}
		best = min(best, p.costOf(c, pick))
	}
	try(0)
	return best
}

// costOf is the cost of a choice, written as the problem states it.
func (p *Problem) costOf(c *Chain, pick []int) float64 {
	total := 0.0
	for n := range c.Nodes {
		total += c.Nodes[n].Cost[pick[n]]
	}
	links := c.Links
	if links == nil {
		for n := 1; n < len(c.Nodes); n++ {
			links = append(links, Link{n - 1, n, c.SpliceCost})
		}
	}
	for _, l := range links {
		below, above := pick[l.Below], pick[l.Above]
		if below == above {
			continue
		}
		if p.MayStand != nil && !p.MayStand(below, above) {
			return math.Inf(1)
		}
		total += l.SpliceCost
	}
	return total
}

func TestTreesAgreeWithEveryChoiceTried(t *testing.T) {
	served := 0
	for seed := range uint64(300) {
		rng := rand.New(rand.NewPCG(seed, 2))
		p := tied(rng, 1, 2+rng.IntN(4), 6)
		if seed%3 == 0 {
			p.Chains[0].Links, p.Chains[0].SpliceCost = nil, rng.Float64()
		}
		require.NoError(t, p.Validate())
		choice, cost := p.Cheapest()
		want := everyChoice(p, &p.Chains[0], indices(p.Sizes))
		if math.IsInf(want, 1) {
			require.Nil(t, choice[0], "seed %d", seed)
			continue
		}
		served++
		require.InEpsilon(t, want, cost, 1e-12, "seed %d: sums in another order differ by rounding alone", seed)
		require.InEpsilon(t, want, p.costOf(&p.Chains[0], choice[0]), 1e-12, "seed %d", seed)
	}
	assert.Greater(t, served, 100)
}

func TestFewSizesOverTreesAndRings(t *testing.T) {
	served := 0
	for seed := range uint64(60) {
		rng := rand.New(rand.NewPCG(seed, 3))
		p := tied(rng, 2+rng.IntN(3), 5, 4)
		if seed%2 == 0 {
			closeRings(rng, &p.Chains[0])
		}
		got, err := p.FewSizes(context.Background(), 3)
		require.NoError(t, err)
		for _, s := range got {
			want := math.Inf(1)
			for set := range 1 << p.Sizes {
				var open []int
				for j := range p.Sizes {
					if set>>j&1 == 1 {
						open = append(open, j)
					}
				}
				if len(open) > s.K {
					continue
				}
				total := 0.0
				for c := range p.Chains {
					total += everyChoice(p, &p.Chains[c], open)
				}
				want = min(want, total)
			}
			require.True(t, s.Proven)
			if math.IsInf(want, 1) {
				require.Nil(t, s.Choice, "seed %d, K %d", seed, s.K)
				continue
			}
			served++
			require.InEpsilon(t, want, s.Cost, 1e-9, "seed %d, K %d", seed, s.K)
		}
	}
	assert.Greater(t, served, 30)
}

func indices(n int) []int {
	s := make([]int, n)
	for i := range s {
		s[i] = i
	}
	return s
}

func TestLinksThatJoinNothing(t *testing.T) {
	nodes := []Node{{[]float64{1}}, {[]float64{1}}, {[]float64{1}}}
	for name, links := range map[string][]Link{
		"too few":    {{Below: 0, Above: 1}},
		"two parts":  {{Below: 0, Above: 1}, {Below: 1, Above: 0}},
		"itself":     {{Below: 0, Above: 0}, {Below: 1, Above: 2}},
		"elsewhere":  {{Below: 0, Above: 1}, {Below: 1, Above: 3}},
		"none given": {},
	} {
		p := &Problem{Sizes: 1, Chains: []Chain{{Nodes: nodes, Links: links}}}
		assert.Error(t, p.Validate(), name)
	}
}

// closeRings adds links between nodes that are joined already.
func closeRings(rng *rand.Rand, c *Chain) {
	for range 1 + rng.IntN(3) {
		below, above := rng.IntN(len(c.Nodes)), rng.IntN(len(c.Nodes))
		if below != above {
			c.Links = append(c.Links, Link{below, above, rng.Float64()})
		}
	}
}

func TestRingsAgreeWithEveryChoiceTried(t *testing.T) {
	served := 0
	for seed := range uint64(300) {
		rng := rand.New(rand.NewPCG(seed, 4))
		p := tied(rng, 1, 2+rng.IntN(3), 6)
		c := &p.Chains[0]
		if len(c.Nodes) < 3 {
			continue
		}
		closeRings(rng, c)
		require.NoError(t, p.Validate())
		choice, cost := p.Cheapest()
		want := everyChoice(p, c, indices(p.Sizes))
		if math.IsInf(want, 1) {
			require.Nil(t, choice[0], "seed %d", seed)
			continue
		}
		served++
		require.InEpsilon(t, want, cost, 1e-12, "seed %d", seed)
		require.InEpsilon(t, want, p.costOf(c, choice[0]), 1e-12, "seed %d", seed)
	}
	assert.Greater(t, served, 50)
}
