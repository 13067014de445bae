package project

import (
	"cmp"
	"context"
	"math"
	"slices"
)

// What branch and bound has settled about a size.
const (
	undecided int8 = iota
	opened
	closed
)

// search is the branch and bound over one reduced problem.
type search struct {
	r  *reduced
	m  int
	dp *chainSolver

	offers [][]offer // of each row, the sizes that serve it, cheapest first

	// The root of the least cost of a row or node, by which its multiplier's
	// step is scaled: the multipliers of heavy nodes have further to go.
	rowScale  []float64
	nodeScale [][]float64
}

// offer is a size that serves a row, and its cost there.
type offer struct {
	size int32
	cost float64
}

// offersOf lists the sizes that serve a row, cheapest first.
func offersOf(row []float64) []offer {
	var out []offer
	for j, v := range row {
		if !math.IsInf(v, 1) {
			out = append(out, offer{int32(j), v})
		}
	}
	slices.SortStableFunc(out, func(a, b offer) int { return cmp.Compare(a.cost, b.cost) })
	return out
}

func newSearch(r *reduced) *search {
	inner := &Problem{Sizes: len(r.sizes), Chains: r.chains, MayStand: r.stand}
	s := &search{r: r, m: len(r.sizes), dp: newChainSolver(inner)}
	for _, row := range r.rows {
		s.rowScale = append(s.rowScale, math.Sqrt(slices.Min(row)))
		s.offers = append(s.offers, offersOf(row))
	}
	for _, c := range r.chains {
		scale := make([]float64, len(c.Nodes))
		for n, node := range c.Nodes {
			scale[n] = math.Sqrt(slices.Min(node.Cost))
		}
		s.nodeScale = append(s.nodeScale, scale)
	}
	return s
}

// everySize is the cost where the number of sizes is not limited.
func (s *search) everySize() float64 { return s.costOf(allSizes(s.m)) }

// costOf is the least cost with the open sizes, +Inf where they do not serve.
func (s *search) costOf(open []int32) float64 {
	total := 0.0
	for _, row := range s.r.rows {
		best := math.Inf(1)
		for _, j := range open {
			best = min(best, row[j])
		}
		total += best
	}
	if math.IsInf(total, 1) {
		return total
	}
	for c := range s.r.chains {
		v, _ := s.dp.solve(&s.r.chains[c], open, nil)
		total += v
	}
	return total
}

// branchNode is a part of the search tree: what is settled, the bound that its
// parent proved, and the multipliers that proved it.
type branchNode struct {
	state []int8
	bound float64
	dual  *dual
}

func (s *search) solve(ctx context.Context, k int, warm []int32) answer {
	best := s.heuristic(k, warm)
	stack := []branchNode{{state: make([]int8, s.m), bound: 0, dual: newDual(s, best)}}
	first := true
	for len(stack) > 0 {
		if ctx.Err() != nil {
			best.bound = best.cost
			for _, n := range stack {
				best.bound = min(best.bound, n.bound)
			}
			return best
		}
		node := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if node.bound >= cutoff(best.cost) {
			continue
		}
		d := node.dual.clone()
		effort := ascent{steps: 150, scale: 0.3} // the parent's multipliers are near
		if first {
			effort = ascent{steps: 800, scale: 1.2}
		}
		out := d.ascend(ctx, s, k, node, &best, effort)
		first = false
		if out.closed {
			continue
		}
		j := out.branch
		without := branchNode{slices.Clone(out.state), out.bound, d}
		without.state[j] = closed
		with := branchNode{slices.Clone(out.state), out.bound, d}
		with.state[j] = opened
		stack = append(stack, without, with)
	}
	best.bound, best.proven = best.cost, true
	return best
}

// cutoff is the bound from which a part of the tree cannot hold a better answer.
func cutoff(cost float64) float64 {
	if math.IsInf(cost, 1) {
		return cost
	}
	return cost * (1 - tolerance)
}
