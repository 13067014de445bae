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
	f      *field      // what is left open
	at     multipliers // those of the bound
	branch int         // a size
}

// ascent says how hard a node's bound is worked at: the number of steps, and
// the part of Polyak's length that the first ones take.
type ascent struct {
	steps int
	scale float64
}

// ascend raises the bound of a node by subgradient steps, settles sizes by
// their reduced costs and improves best by the sizes that the relaxation picks.
func (s *search) ascend(ctx context.Context, k int, node branchNode, best *answer, effort ascent) outcome {
	c := newClimb(s, k, node, effort)
	for step := 0; ; step++ {
		bound := c.r.bound(c.state)
		if impossible(bound) {
			return outcome{closed: true}
		}
		s.improve(c.f, c.r.picked, best)
		bound = c.compare(bound, best)
		if max(c.top, node.bound) >= cutoff(best.cost) || !c.settle(bound, best.cost) {
			return outcome{closed: true}
		}
		if s.tryAll(c.f, k, c.state, best) {
			return outcome{closed: true}
		}
		c.count()
		if step >= effort.steps || c.scale < 1e-4 || ctx.Err() != nil {
			break
		}
		if !c.r.step(c.state, &c.direction, c.scale*(aim(best.cost, bound)-bound)) {
			break
		}
		c.shrink()
	}
	j := c.branchOn()
	return outcome{bound: max(c.top, node.bound), state: c.state, f: c.f, at: c.keep, branch: j}
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
	s         *search
	k         int
	f         *field
	r         *relaxation
	at        *multipliers
	keep      multipliers // those of the best bound
	direction direction
	top       float64   // the best bound
	scale     float64   // part of Polyak's length
	stale     int       // steps since the best bound
	streak    int       // steps that raised it, one after the other
	state     []int8    // by size: what is settled about it
	often     []float64 // by size: how often it was picked of late
}

func newClimb(s *search, k int, node branchNode, effort ascent) *climb {
	at := node.at.clone()
	c := &climb{s: s, k: k, f: node.f, at: &at, keep: node.at.clone(), direction: at.ahead(len(s.parts)),
		top: math.Inf(-1), scale: effort.scale,
		state: slices.Clone(node.state), often: make([]float64, s.m)}
	c.r = newRelaxation(s, c.f, k, c.at)
	c.narrow(1)
	return c
}

// patience is how many steps may fail to raise the bound before they are
// halved; so many that raise it one after the other make them longer.
const (
	patience = 6
	streak   = 4
	longer   = 1.3
)

// compare keeps the multipliers where the bound is the best so far, and goes
// back to the best with shorter steps where it has long not been, and meanwhile
// looks for a better answer. It returns the bound of the multipliers as they
// then stand.
func (c *climb) compare(bound float64, best *answer) float64 {
	if bound > c.top+1e-12*math.Abs(bound) {
		c.top, c.stale = bound, 0
		c.keep.copy(c.at, c.s.workers)
		if c.streak++; c.streak >= streak {
			c.scale, c.streak = min(2, c.scale*longer), 0
		}
		return bound
	}
	c.streak = 0
	if c.stale++; c.stale < patience {
		return bound
	}
	c.scale, c.stale = c.scale/2, 0
	c.at.copy(&c.keep, c.s.workers)
	c.direction.rest()
	bound = c.r.bound(c.state)
	c.polish(best)
	return bound
}

func (c *climb) polish(best *answer) { c.s.polish(c.f.sizesOf(c.r.worthiest(c.k+others)), best) }

// others is how many sizes beside the K worthiest are tried for a better answer.
const others = 10

// count notes what the relaxation picks.
func (c *climb) count() {
	for j, size := range c.f.sizes {
		c.often[size] *= 0.9
		if c.r.pick[j] {
			c.often[size] += 0.1
		}
	}
}

// shrink leaves closed sizes out of the field once enough are closed to make
// that worth its while. Until then they may still be taken, which only lowers
// the bound.
func (c *climb) shrink() { c.narrow(0.9) }

// narrow leaves closed sizes out where no more than this part of them is left.
func (c *climb) narrow(part float64) {
	var cols []int32
	for j, size := range c.f.sizes {
		if c.state[size] != closed {
			cols = append(cols, int32(j))
		}
	}
	if len(cols) == len(c.f.sizes) || float64(len(cols)) > part*float64(len(c.f.sizes)) {
		return
	}
	c.f = c.f.only(cols, c.s.workers)
	*c.at = c.at.only(cols, c.s.workers)
	c.keep, c.direction = c.keep.only(cols, c.s.workers), c.direction.only(cols, c.s)
	due := c.r.due
	c.r = newRelaxation(c.s, c.f, c.k, c.at)
	c.r.due, c.r.along = due, &c.direction
}

// settle closes and opens sizes that a better answer cannot or must have, by
// what the bound rises to when they are forced the other way. It reports false
// where nothing better can lie below.
func (c *climb) settle(bound, cost float64) bool {
	limit := cutoff(cost)
	least, next, open := math.Inf(1), 0.0, 0
	for j, size := range c.f.sizes {
		switch {
		case c.state[size] == closed:
		case c.state[size] == opened:
			open++
		case c.r.pick[j]:
			least = min(least, c.r.worth[j])
		default:
			next = max(next, c.r.worth[j])
		}
	}
	if open > c.k {
		return false
	}
	for j, size := range c.f.sizes {
		if c.state[size] != undecided {
			continue
		}
		worth := c.r.worth[j]
		switch {
		case !c.r.pick[j] && (open == c.k || bound+least-worth >= limit):
			c.state[size] = closed
		case c.r.pick[j] && bound+worth-next >= limit:
			c.state[size] = opened
		}
	}
	return true
}

// branchOn chooses the undecided size about which the ascent was most in doubt.
func (c *climb) branchOn() int {
	branch, doubt := -1, -1.0
	for j, st := range c.state {
		if st != undecided {
			continue
		}
		if v := min(c.often[j], 1-c.often[j]); v > doubt {
			branch, doubt = j, v
		}
	}
	return branch
}
