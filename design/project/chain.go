package project

import (
	"cmp"
	"math"
	"slices"
)

// chainSolver finds the cheapest sizes of a chain by dynamic programming over
// its nodes from the bottom up. The state is the size of the node; the work is
// nodes x sizes^2, and the answer exact.
type chainSolver struct {
	sizes int
	stand []bool // stand[above*sizes+below]
	cost  []float64
	next  []float64
	from  [][]int32 // from[n][j]: size below in the best choice with j at node n
	order []int32   // the open sizes, by their cost up to the node below
	picks []int
}

func newChainSolver(p *Problem) *chainSolver {
	s := &chainSolver{
		sizes: p.Sizes,
		cost:  make([]float64, p.Sizes),
		next:  make([]float64, p.Sizes),
	}
	deepest := 0
	for _, c := range p.Chains {
		deepest = max(deepest, len(c.Nodes))
	}
	if deepest > 1 {
		s.stand = make([]bool, p.Sizes*p.Sizes)
		for above := range p.Sizes {
			for below := range p.Sizes {
				s.stand[above*p.Sizes+below] = above == below || p.MayStand == nil || p.MayStand(below, above)
			}
		}
	}
	s.from = make([][]int32, deepest)
	for n := range s.from {
		s.from[n] = make([]int32, p.Sizes)
	}
	s.picks = make([]int, deepest)
	return s
}

// solve returns the least cost of the chain with the open sizes only, price
// added to each node's cost (nil: none), and the sizes chosen; the slice is
// valid until the next call. The cost is +Inf where no choice serves.
func (s *chainSolver) solve(c *Chain, open []int32, price [][]float64) (float64, []int) {
	for n := range c.Nodes {
		node := c.Nodes[n].Cost
		if n > 0 {
			s.order = append(s.order[:0], open...)
			slices.SortFunc(s.order, func(a, b int32) int {
				return cmp.Or(cmp.Compare(s.cost[a], s.cost[b]), cmp.Compare(a, b))
			})
		}
		for _, j := range open {
			v := node[j]
			if math.IsInf(v, 1) {
				s.next[j] = v
				continue
			}
			if price != nil {
				v += price[n][j]
			}
			if n > 0 {
				best, from := s.cheapestBelow(c, j)
				v += best
				s.from[n][j] = from
			}
			s.next[j] = v
		}
		s.cost, s.next = s.next, s.cost
	}
	last, best := int32(-1), math.Inf(1)
	for _, j := range open {
		if s.cost[j] < best {
			last, best = j, s.cost[j]
		}
	}
	if last < 0 {
		return best, nil
	}
	picks := s.picks[:len(c.Nodes)]
	for n := len(picks) - 1; n >= 0; n-- {
		picks[n] = int(last)
		last = s.from[n][last]
	}
	return best, picks
}

// cheapestBelow finds the size below j that makes the chain so far cheapest; on
// equal cost the section runs through.
func (s *chainSolver) cheapestBelow(c *Chain, j int32) (float64, int32) {
	through := s.cost[j]
	row := s.stand[int(j)*s.sizes:]
	for _, i := range s.order {
		w := s.cost[i] + c.SpliceCost
		if !(w < through) {
			break
		}
		if row[i] {
			return w, i
		}
	}
	return through, j
}

// Cheapest returns the cheapest sizes of every chain where any number of sizes
// may be used: the lower limit that fewer sizes are measured against. Chains
// that nothing serves have a nil choice and are left out of the cost.
func (p *Problem) Cheapest() (Choice, float64) {
	return p.cheapestOf(newChainSolver(p), allSizes(p.Sizes))
}

func (p *Problem) cheapestOf(s *chainSolver, open []int32) (Choice, float64) {
	choice, total := make(Choice, len(p.Chains)), 0.0
	for c := range p.Chains {
		v, picks := s.solve(&p.Chains[c], open, nil)
		if picks == nil {
			continue
		}
		total += v
		choice[c] = append([]int(nil), picks...)
	}
	return choice, total
}

func allSizes(n int) []int32 {
	sizes := make([]int32, n)
	for j := range sizes {
		sizes[j] = int32(j)
	}
	return sizes
}
