package project

import (
	"math"
	"slices"
	"sort"
)

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
