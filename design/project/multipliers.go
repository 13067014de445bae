package project

import (
	"math"
	"slices"
)

// multipliers are those of the relaxed constraint "a node's size is among the
// K", or steps of theirs. A row has one, u: its price for a size is
// max(0, u - cost). A node of a strand has a price for every size.
type multipliers struct {
	u     []float64 // by row
	price grid      // by node and column
}

// startFrom sets the multipliers by what a choice costs, u to that cost: near
// the optimum they lie near it.
func startFrom(f *field, open []int32) multipliers {
	m := multipliers{price: newGrid(f.cost.rows(), f.cost.m)}
	for i := range f.rows.rows() {
		m.u = append(m.u, cheapestOpen(f.rows.row(i), open))
	}
	for i := range f.cost.rows() {
		price, u := m.price.row(i), cheapestOpen(f.cost.row(i), open)
		for j, v := range f.cost.row(i) {
			price[j] = max(0, u-v)
		}
	}
	return m
}

// cheapestOpen is the cheapest open column's cost, or the dearest cost of all
// where no open column serves.
func cheapestOpen(row []float64, open []int32) float64 {
	best := math.Inf(1)
	for _, j := range open {
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

func (m *multipliers) clone() multipliers {
	return multipliers{slices.Clone(m.u), grid{m.price.m, slices.Clone(m.price.flat)}}
}

// copy takes the values of from, which has the same shape.
func (m *multipliers) copy(from *multipliers, workers int) {
	copy(m.u, from.u)
	m.price.copy(from.price, workers)
}

// zero is as many multipliers, all 0.
func (m *multipliers) zero() multipliers {
	return multipliers{make([]float64, len(m.u)), grid{m.price.m, make([]float64, len(m.price.flat))}}
}

// only keeps the prices of these columns.
func (m *multipliers) only(cols []int32, workers int) multipliers {
	return multipliers{slices.Clone(m.u), m.price.only(cols, workers)}
}
