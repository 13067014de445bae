package project

import (
	"context"
	"math"
	"slices"
	"sort"
)

// momentum is the part of the last step's direction that the next one keeps
// (Camerini, Fratta and Maffioli, Mathematical Programming Study 3 (1975),
// 26-34): plain subgradients zigzag.
const momentum = 0.9

// dual holds the multipliers of the relaxed constraint "a node's size is among
// the K". A row has one multiplier u: its price for size j is max(0, u - cost).
// A node of a chain has one price for every size.
type dual struct {
	u     []float64
	price [][][]float64 // by chain, node, size
	level [][]float64   // by chain, node: while not nil, price is max(0, level - cost)

	worth     []float64 // what all nodes would pay for a size to be open
	pick      []bool
	order     []int32
	taken     [][]int // by chain and node: the size of the chain's own optimum at these prices
	uStep     []float64
	priceStep [][][]float64
	levelStep [][]float64
}

func newDual(s *search, start answer) *dual {
	d := &dual{u: make([]float64, len(s.r.rows))}
	for i, row := range s.r.rows {
		d.u[i] = start.costIn(row)
	}
	for c := range s.r.chains {
		nodes := s.r.chains[c].Nodes
		price, level := make([][]float64, len(nodes)), make([]float64, len(nodes))
		for n := range nodes {
			price[n] = make([]float64, s.m)
			level[n] = start.costIn(nodes[n].Cost)
		}
		d.price = append(d.price, price)
		d.level = append(d.level, level)
	}
	return d
}

// costIn is the cheapest open size's cost in a row, or its dearest cost where
// no open size serves: a start for the multiplier.
func (a *answer) costIn(row []float64) float64 {
	best := math.Inf(1)
	for _, j := range a.open {
		best = min(best, row[j])
	}
	if !math.IsInf(best, 1) {
		return best
	}
	most := 0.0
	for _, v := range row {
		if !math.IsInf(v, 1) {
			most = max(most, v)
		}
	}
	return most
}

func (d *dual) clone() *dual {
	c := &dual{u: slices.Clone(d.u)}
	for _, chain := range d.price {
		nodes := make([][]float64, len(chain))
		for n := range chain {
			nodes[n] = slices.Clone(chain[n])
		}
		c.price = append(c.price, nodes)
	}
	for _, l := range d.level {
		c.level = append(c.level, slices.Clone(l))
	}
	return c
}

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
	d.worth = make([]float64, s.m)
	d.pick = make([]bool, s.m)
	d.rest()
	state := slices.Clone(node.state)
	often := make([]float64, s.m)
	top, keep := math.Inf(-1), d.clone()
	scale, stale := effort.scale, 0
	for step := 0; ; step++ {
		bound := d.evaluate(s, k, state)
		if math.IsInf(bound, 1) {
			return outcome{closed: true}
		}
		s.improve(d.pick, best)
		if bound > top*(1+1e-12) || math.IsInf(top, -1) {
			top, stale = bound, 0
			keep.copy(d)
		} else if stale++; stale >= 12 {
			scale, stale = scale/2, 0
			d.copy(keep)
			d.rest()
			bound = d.evaluate(s, k, state)
		}
		if max(top, node.bound) >= cutoff(best.cost) {
			return outcome{closed: true}
		}
		if !settle(state, d, k, bound, best.cost) {
			return outcome{closed: true}
		}
		for j, in := range d.pick {
			often[j] *= 0.9
			if in {
				often[j] += 0.1
			}
		}
		if len(d.level) > 0 && (scale < 0.02 || step >= effort.steps/2) {
			// One level a node has raised the bound as far as it goes; now every price on its own.
			d.copy(keep)
			bound = d.evaluate(s, k, state)
			d.level, keep.level, scale, stale = nil, nil, 1.2, 0
		}
		if step >= effort.steps || scale < 1e-4 || ctx.Err() != nil {
			break
		}
		target := best.cost
		if math.IsInf(target, 1) {
			target = bound + math.Abs(bound)*0.05 + 1
		}
		if !d.step(s, scale*(target*1.0005-bound)) {
			break // the relaxation's choice serves every node: its bound is its cost
		}
	}
	d.copy(keep)
	j := branchOn(state, often)
	if j < 0 {
		s.improveBy(state, best)
		return outcome{closed: true}
	}
	return outcome{bound: max(top, node.bound), state: state, branch: j}
}

// rest forgets the direction of earlier steps.
func (d *dual) rest() {
	d.uStep = make([]float64, len(d.u))
	d.levelStep, d.priceStep = nil, nil
	for _, l := range d.level {
		d.levelStep = append(d.levelStep, make([]float64, len(l)))
	}
	d.priceStep = clonePrices(d.price)
	for _, chain := range d.priceStep {
		for _, steps := range chain {
			clear(steps)
		}
	}
}

// improveBy takes the sizes that are settled as open, where all are settled.
func (s *search) improveBy(state []int8, best *answer) {
	pick := make([]bool, len(state))
	for j, st := range state {
		pick[j] = st == opened
	}
	s.improve(pick, best)
}

// evaluate computes the relaxation's bound for the multipliers as they stand:
// the sum over nodes at their prices, less the worth of the K best sizes.
// worth, pick and the direction of the steps are left in d. +Inf: no size that
// is not closed serves some node.
func (d *dual) evaluate(s *search, k int, state []int8) float64 {
	clear(d.worth)
	total := 0.0
	for i, offers := range s.offers {
		u := d.u[i]
		total += u
		for _, o := range offers {
			if o.cost >= u {
				break
			}
			d.worth[o.size] += u - o.cost
		}
	}
	d.order = d.order[:0]
	for j := range d.worth {
		if state[j] != closed {
			d.order = append(d.order, int32(j))
		}
	}
	d.taken = d.taken[:0]
	for c := range s.r.chains {
		for n := range d.price[c] {
			if d.level != nil {
				for j, v := range s.r.chains[c].Nodes[n].Cost {
					d.price[c][n][j] = max(0, d.level[c][n]-v)
				}
			}
			for j, v := range d.price[c][n] {
				d.worth[j] += v
			}
		}
		v, picks := s.dp.solve(&s.r.chains[c], d.order, d.price[c])
		if picks == nil {
			return math.Inf(1)
		}
		total += v
		d.taken = append(d.taken, slices.Clone(picks))
	}
	d.choose(k, state)
	for j, in := range d.pick {
		if in {
			total -= d.worth[j]
		}
	}
	return total
}

// choose picks the sizes that are settled as open and the worthiest others.
func (d *dual) choose(k int, state []int8) {
	sort.SliceStable(d.order, func(a, b int) bool {
		i, j := d.order[a], d.order[b]
		if (state[i] == opened) != (state[j] == opened) {
			return state[i] == opened
		}
		return d.worth[i] > d.worth[j]
	})
	clear(d.pick)
	for _, j := range d.order[:min(k, len(d.order))] {
		d.pick[j] = true
	}
}

// step moves the multipliers along the subgradient by Polyak's length: the
// distance to the target over the gradient's square. It reports false where the
// gradient is nil.
func (d *dual) step(s *search, distance float64) bool {
	norm := 0.0
	for i, offers := range s.offers {
		g := 1.0
		for _, o := range offers {
			if o.cost >= d.u[i] {
				break
			}
			if d.pick[o.size] {
				g--
			}
		}
		g = momentum*d.uStep[i] + g*s.rowScale[i]
		d.uStep[i] = g
		norm += g * g
	}
	if d.level != nil {
		norm += d.levelGradient(s)
	} else {
		d.eachPrice(func(c, n, j int, g float64) {
			g = momentum*d.priceStep[c][n][j] + g*s.nodeScale[c][n]
			d.priceStep[c][n][j] = g
			norm += g * g
		})
	}
	if norm == 0 {
		return false
	}
	t := distance / norm
	for i, g := range d.uStep {
		d.u[i] += t * g * s.rowScale[i]
	}
	for c := range d.level {
		for n, g := range d.levelStep[c] {
			d.level[c][n] += t * g * s.nodeScale[c][n]
		}
	}
	if d.level != nil {
		return true
	}
	for c, chain := range d.price {
		for n, price := range chain {
			scaled := t * s.nodeScale[c][n]
			for j, g := range d.priceStep[c][n] {
				price[j] = max(0, price[j]+scaled*g)
			}
		}
	}
	return true
}

// levelGradient is the subgradient where one level a node sets its prices.
func (d *dual) levelGradient(s *search) float64 {
	norm := 0.0
	for c, levels := range d.level {
		for n, u := range levels {
			cost, g := s.r.chains[c].Nodes[n].Cost, 0.0
			if cost[d.taken[c][n]] < u {
				g = 1
			}
			for j, in := range d.pick {
				if in && cost[j] < u {
					g--
				}
			}
			g = momentum*d.levelStep[c][n] + g*s.nodeScale[c][n]
			d.levelStep[c][n] = g
			norm += g * g
		}
	}
	return norm
}

// eachPrice calls f with the subgradient of every chain price: up where a node
// takes a size that is not among the K, down where a size is open and the node
// pays for it without taking it.
func (d *dual) eachPrice(f func(c, n, j int, g float64)) {
	for c, chain := range d.price {
		for n, price := range chain {
			taken := d.taken[c][n]
			for j, in := range d.pick {
				switch {
				case j == taken && !in:
					f(c, n, j, 1)
				case j != taken && in && price[j] > 0:
					f(c, n, j, -1)
				default:
					f(c, n, j, 0)
				}
			}
		}
	}
}

func clonePrices(p [][][]float64) [][][]float64 {
	return (&dual{price: p}).clone().price
}

// copy takes the multipliers of from.
func (d *dual) copy(from *dual) {
	copy(d.u, from.u)
	for c := range from.price {
		for n := range from.price[c] {
			copy(d.price[c][n], from.price[c][n])
		}
	}
	for c := range from.level {
		copy(d.level[c], from.level[c])
	}
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
