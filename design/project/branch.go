package project

import (
	"context"
	"math"
	"runtime"
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
	f       *field // with every size
	m       int    // its sizes
	workers int
	parts   []part

	// The root of the least cost of a row or node, by which its multiplier's
	// step is scaled: the multipliers of heavy nodes have further to go.
	rowScale, nodeScale []float64

	tried map[string]bool // choices of sizes that improve has seen
}

func newSearch(f *field, workers int) *search {
	if workers < 1 {
		workers = runtime.GOMAXPROCS(0)
	}
	return &search{f: f, m: len(f.sizes), workers: workers, parts: partsOf(f),
		rowScale: scales(f.rows), nodeScale: scales(f.cost), tried: map[string]bool{}}
}

func scales(cost grid) []float64 {
	out := make([]float64, cost.rows())
	for i := range out {
		out[i] = math.Sqrt(slices.Min(cost.row(i)))
	}
	return out
}

// branchNode is a part of the search tree: what is settled, the bound that its
// parent proved, and the multipliers that proved it.
type branchNode struct {
	state []int8
	bound float64
	f     *field // what the parent left open
	at    multipliers
}

func (s *search) solve(ctx context.Context, k int, warm []int32) answer {
	best := s.heuristic(k, warm)
	stack := []branchNode{{make([]int8, s.m), 0, s.f, startFrom(s.f, best.open)}}
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
		effort := ascent{steps: 50, scale: 0.8} // the parent's multipliers are near
		if first {
			effort = ascent{steps: 200, scale: 1.2}
		}
		out := s.ascend(ctx, k, node, &best, effort)
		first = false
		if out.closed {
			continue
		}
		j := out.branch
		without := branchNode{slices.Clone(out.state), out.bound, out.f, out.at}
		without.state[j] = closed
		with := branchNode{slices.Clone(out.state), out.bound, out.f, out.at}
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
