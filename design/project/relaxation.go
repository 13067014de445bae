package project

import (
	"math"
	"slices"
)

// relaxation is a field with the constraint "a node's size is among the K"
// relaxed, and what its optimum comes to at the multipliers as they stand.
type relaxation struct {
	*multipliers
	s       *search
	f       *field
	k       int
	solvers []*chainSolver // by worker

	worth  []float64 // by column: what all nodes would pay for it to be open
	pick   []bool    // the K columns that are worth most
	order  []int32   // the columns that may be picked, the worthiest first
	picked []int32   // the K first of them
	share  []float64 // by column, for the next step: how far it is open
	shared []int32   // the columns that have a share
	taken  []int32   // by node: the column of the strand's own optimum
	tasks  []task    // by part

	// The step that the next bound takes first: so far along this direction.
	due   float64
	along *direction
}

// task is what one part comes to.
type task struct {
	total  float64
	worth  []float64
	square float64 // of the step
}

func newRelaxation(s *search, f *field, k int, m *multipliers) *relaxation {
	r := &relaxation{multipliers: m, f: f, s: s, k: k, solvers: f.solvers(s.workers)}
	r.worth, r.pick = make([]float64, len(f.sizes)), make([]bool, len(f.sizes))
	r.share = make([]float64, len(f.sizes))
	r.taken = make([]int32, f.cost.rows())
	r.tasks = make([]task, len(s.parts))
	for i := range r.tasks {
		r.tasks[i].worth = make([]float64, len(f.sizes))
	}
	return r
}

// bound takes the step that is due and evaluates the relaxation: the sum over
// nodes at their prices, less the worth of the K best columns. +Inf: no column
// of the field serves some node.
func (r *relaxation) bound(state []int8) float64 {
	each(r.s.workers, len(r.tasks), func(w, i int) {
		if r.due != 0 {
			r.move(&r.s.parts[i])
		}
		r.evaluate(r.solvers[w], &r.s.parts[i], &r.tasks[i])
	})
	r.due = 0
	clear(r.worth)
	total := 0.0
	for i := range r.tasks {
		t := &r.tasks[i]
		total += t.total
		for j, v := range t.worth {
			r.worth[j] += v
		}
	}
	r.choose(state)
	for _, j := range r.picked {
		total -= r.worth[j]
	}
	return total
}

// move takes the step that is due for the rows of one part; prices are moved as
// they are charged.
func (r *relaxation) move(p *part) {
	for i := p.rows[0]; i < p.rows[1]; i++ {
		r.u[i] += r.due * r.s.rowScale[i] * r.along.u[i]
	}
}

// evaluate computes one part.
func (r *relaxation) evaluate(solver *chainSolver, p *part, t *task) {
	clear(t.worth)
	t.total = 0
	for i := p.rows[0]; i < p.rows[1]; i++ {
		u := r.u[i]
		t.total += u
		for _, o := range r.f.offers[i] {
			if o.cost >= u {
				break
			}
			t.worth[o.col] += u - o.cost
		}
	}
	for c := p.strands[0]; c < p.strands[1]; c++ {
		st := &r.f.strands[c]
		for n := range st.count {
			r.charge(st.first+n, r.s.nodeScale[st.first+n], solver.cost[n], t.worth)
		}
		v, picks := solver.solve(st)
		if t.total += v; picks == nil {
			continue // the total is +Inf; the prices of the others are moved all the same
		}
		copy(r.taken[st.first:], picks)
	}
}

// charge writes a node's costs with its prices added to cost, and adds the
// prices to worth, once they have taken the step that is due.
func (r *relaxation) charge(node int, scale float64, cost, worth []float64) {
	own := r.f.cost.row(node)
	cost, worth = cost[:len(own)], worth[:len(own)]
	price := r.price.row(node)[:len(own)]
	if r.due == 0 {
		for j, v := range own {
			cost[j] = v + price[j]
			worth[j] += price[j]
		}
		return
	}
	turn, far, shift := r.along.price.row(node)[:len(own)], r.due*scale*r.along.fade, r.due*scale*r.along.shift[node]
	for j, v := range own {
		p := price[j]
		if p > 0 {
			p += shift
		}
		p += far * turn[j]
		if p < 0 {
			p = 0
		}
		price[j] = p
		cost[j] = v + p
		worth[j] += p
	}
}

// choose picks the columns that are settled as open and the worthiest others.
func (r *relaxation) choose(state []int8) {
	order := columns(len(r.f.sizes))
	order = slices.DeleteFunc(order, func(j int32) bool { return state[r.f.sizes[j]] == closed })
	slices.SortStableFunc(order, func(a, b int32) int {
		i, j := state[r.f.sizes[a]] == opened, state[r.f.sizes[b]] == opened
		switch {
		case i != j:
			if i {
				return -1
			}
			return 1
		case r.worth[a] > r.worth[b]:
			return -1
		case r.worth[a] < r.worth[b]:
			return 1
		}
		return 0
	})
	clear(r.pick)
	r.order, r.picked = order, order[:min(r.k, len(order))]
	for _, j := range r.picked {
		r.pick[j] = true
	}
}

// worthiest are the first n columns by their worth.
func (r *relaxation) worthiest(n int) []int32 { return r.order[:min(n, len(r.order))] }

// impossible is the bound of a field that does not serve some node.
func impossible(bound float64) bool { return math.IsInf(bound, 1) }
