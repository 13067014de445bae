package project

import (
	"math"
	"slices"
)

// multipliers are those of the relaxed constraint "a node's size is among the
// K", or steps of theirs. A row has one, u: its price for a size is
// max(0, u - cost). So does a node of a strand at first; then it has one price
// for every size.
type multipliers struct {
	u     []float64 // by row
	level []float64 // by node, empty once prices move on their own
	price grid      // by node and column, empty before
}

// startFrom sets the multipliers to what a choice costs: near the optimum they
// lie near it.
func startFrom(f *field, open []int32) multipliers {
	var m multipliers
	for i := range f.rows.rows() {
		m.u = append(m.u, cheapestOpen(f.rows.row(i), open))
	}
	for i := range f.cost.rows() {
		m.level = append(m.level, cheapestOpen(f.cost.row(i), open))
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

// free turns levels into prices, which then move on their own.
func (m *multipliers) free(f *field) {
	m.price = newGrid(f.cost.rows(), f.cost.m)
	for i, level := range m.level {
		price := m.price.row(i)
		for j, v := range f.cost.row(i) {
			price[j] = max(0, level-v)
		}
	}
	m.level = nil
}

func (m *multipliers) clone() multipliers {
	return multipliers{slices.Clone(m.u), slices.Clone(m.level), grid{m.price.m, slices.Clone(m.price.flat)}}
}

// copy takes the values of from, which has the same shape.
func (m *multipliers) copy(from *multipliers) {
	copy(m.u, from.u)
	copy(m.level, from.level)
	copy(m.price.flat, from.price.flat)
}

// zero is as many multipliers, all 0.
func (m *multipliers) zero() multipliers {
	return multipliers{make([]float64, len(m.u)), make([]float64, len(m.level)), grid{m.price.m, make([]float64, len(m.price.flat))}}
}

// only keeps the prices of these columns.
func (m *multipliers) only(cols []int32) multipliers {
	o := multipliers{u: slices.Clone(m.u), level: slices.Clone(m.level)}
	if len(m.level) == 0 {
		o.price = m.price.only(cols)
	}
	return o
}
