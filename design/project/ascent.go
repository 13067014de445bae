package project

import (
	"context"
	"math"
	"slices"
)

// outcome of an ascent: closed where nothing better can lie below the node,
// else the size to branch on.
type outcome struct {
	closed bool
	bound  float64
	state  []int8
	branch int
}

// ascent says how hard a node's bound is worked at: the number of steps, and
// the part of Polyak's length that the first ones take.
type ascent struct {
	steps int
	scale float64
}

// ascend raises the bound of a node by subgradient steps, settles sizes by
// their reduced costs and improves best by the sizes that the relaxation picks.
func (d *dual) ascend(ctx context.Context, s *search, k int, node branchNode, best *answer, effort ascent) outcome {
	c := newClimb(s, d, node, effort)
	for step := 0; ; step++ {
		bound := d.evaluate(s, k, c.state)
		if math.IsInf(bound, 1) {
			return outcome{closed: true}
		}
		s.improve(d.pick, best)
		bound = c.compare(s, k, bound)
		if max(c.top, node.bound) >= cutoff(best.cost) || !settle(c.state, d, k, bound, best.cost) {
			return outcome{closed: true}
		}
		c.count()
		if c.scale < effort.scale/4 || step >= effort.steps/2 {
			bound = c.freePrices(s, k, bound)
		}
		if step >= effort.steps || c.scale < 1e-4 || ctx.Err() != nil {
			break
		}
		if d.step(s, c.scale*(aim(best.cost, bound)-bound)) {
			continue
		}
		if len(d.level) == 0 {
			break // the relaxation's choice serves every node: its bound is its cost
		}
		c.freePrices(s, k, bound)
	}
	d.copy(c.keep)
	j := branchOn(c.state, c.often)
	if j < 0 {
		s.improveBy(c.state, best)
		return outcome{closed: true}
	}
	return outcome{bound: max(c.top, node.bound), state: c.state, branch: j}
}

// aim is the bound that a step is meant to reach: a little above the best cost
// known, or above the bound where none is.
func aim(cost, bound float64) float64 {
	if math.IsInf(cost, 1) {
		return bound + math.Abs(bound)*0.05 + 1
	}
	return cost * 1.0005
}

// climb is an ascent under way.
type climb struct {
	d, keep *dual     // keep: the multipliers of the best bound
	top     float64   // the best bound
	scale   float64   // part of Polyak's length
	stale   int       // steps since the best bound
	state   []int8    // what is settled about each size
	often   []float64 // how often each size was picked of late
}

func newClimb(s *search, d *dual, node branchNode, effort ascent) *climb {
	d.worth, d.pick = make([]float64, s.m), make([]bool, s.m)
	d.rest()
	return &climb{d: d, keep: d.clone(), top: math.Inf(-1), scale: effort.scale,
		state: slices.Clone(node.state), often: make([]float64, s.m)}
}

// patience is how many steps may fail to raise the bound before they are halved.
const patience = 12

// compare keeps the multipliers where the bound is the best so far, and goes
// back to the best with shorter steps where it has long not been. It returns
// the bound of the multipliers as they then stand.
func (c *climb) compare(s *search, k int, bound float64) float64 {
	if bound > c.top+1e-12*math.Abs(bound) {
		c.top, c.stale = bound, 0
		c.keep.copy(c.d)
		return bound
	}
	if c.stale++; c.stale < patience {
		return bound
	}
	c.scale, c.stale = c.scale/2, 0
	c.d.copy(c.keep)
	c.d.rest()
	return c.d.evaluate(s, k, c.state)
}

// count notes what the relaxation picks.
func (c *climb) count() {
	for j, in := range c.d.pick {
		c.often[j] *= 0.9
		if in {
			c.often[j] += 0.1
		}
	}
}

// freePrices lets every price of a chain's node move on its own, once one level
// a node has raised the bound as far as it goes.
func (c *climb) freePrices(s *search, k int, bound float64) float64 {
	if len(c.d.level) == 0 {
		return bound
	}
	c.d.copy(c.keep)
	bound = c.d.evaluate(s, k, c.state)
	c.d.level, c.keep.level = nil, nil
	c.scale, c.stale = 1.2, 0
	return bound
}

// improveBy takes the sizes that are settled as open, where all are settled.
func (s *search) improveBy(state []int8, best *answer) {
	pick := make([]bool, len(state))
	for j, st := range state {
		pick[j] = st == opened
	}
	s.improve(pick, best)
}

// settle closes and opens sizes that a better answer cannot or must have, by
// what the bound rises to when they are forced the other way. It reports false
// where nothing better can lie below.
func settle(state []int8, d *dual, k int, bound, cost float64) bool {
	limit := cutoff(cost)
	least, next, open := math.Inf(1), 0.0, 0
	for _, j := range d.order {
		switch {
		case state[j] == opened:
			open++
		case d.pick[j]:
			least = min(least, d.worth[j])
		default:
			next = max(next, d.worth[j])
		}
	}
	if open > k {
		return false
	}
	for _, j := range d.order {
		if state[j] != undecided {
			continue
		}
		switch {
		case !d.pick[j] && (open == k || bound+least-d.worth[j] >= limit):
			state[j] = closed
		case d.pick[j] && bound+d.worth[j]-next >= limit:
			state[j] = opened
		}
	}
	return true
}

// branchOn chooses the undecided size about which the ascent was most in doubt,
// -1 where none is undecided.
func branchOn(state []int8, often []float64) int {
	branch, doubt := -1, -1.0
	for j, st := range state {
		if st != undecided {
			continue
		}
		if v := min(often[j], 1-often[j]); v > doubt {
			branch, doubt = j, v
		}
	}
	return branch
}
