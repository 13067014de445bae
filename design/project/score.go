package project

import "math"

// score orders choices: fewest nodes unserved first, then cost.
type score struct {
	unserved int
	cost     float64
}

func (a score) less(b score) bool {
	return a.unserved < b.unserved || a.unserved == b.unserved && a.cost < b.cost
}

func (a *score) add(v float64) {
	if math.IsInf(v, 1) {
		a.unserved++
	} else {
		a.cost += v
	}
}

// everySize is the cost where the number of sizes is not limited.
func (s *search) everySize() float64 { return s.costOf(s.f, columns(s.m)) }

// costOf is the least cost with the open columns, +Inf where they do not serve.
func (s *search) costOf(f *field, open []int32) float64 {
	sc := s.scoreOf(f, open)
	if sc.unserved > 0 {
		return math.Inf(1)
	}
	return sc.cost
}

// scoreOf is the least cost of the rows and strands that the open columns serve.
func (s *search) scoreOf(f *field, open []int32) score {
	scores := make([]score, len(s.parts))
	solvers := f.solversOf(open, s.workers)
	each(s.workers, len(s.parts), func(w, i int) { f.scorePart(solvers[w], open, &s.parts[i], &scores[i]) })
	var sum score
	for _, sc := range scores {
		sum.unserved += sc.unserved
		sum.cost += sc.cost
	}
	return sum
}

// solversOf makes solvers that know the open columns only.
func (f *field) solversOf(open []int32, workers int) []*chainSolver {
	o := &field{longest: f.longest}
	o.relate(f.relation.only(open))
	return o.solvers(workers)
}

// scorePart adds up one part.
func (f *field) scorePart(solver *chainSolver, open []int32, p *part, sc *score) {
	for i := p.rows[0]; i < p.rows[1]; i++ {
		row, best := f.rows.row(i), math.Inf(1)
		for _, j := range open {
			best = min(best, row[j])
		}
		sc.add(best)
	}
	for c := p.strands[0]; c < p.strands[1]; c++ {
		st := &f.strands[c]
		f.openTo(solver, open, st)
		sc.add(solver.value(st))
	}
}

// openTo writes a strand's costs of the open columns to a solver that knows them
// alone.
func (f *field) openTo(solver *chainSolver, open []int32, st *strand) {
	for n := range st.count {
		own, cost := f.cost.row(st.first+n), solver.cost[n]
		for k, j := range open {
			cost[k] = own[j]
		}
	}
}

// served is the cheapest open size's cost in each row.
func (s *search) served(open []int32) []float64 {
	out := make([]float64, s.f.rows.rows())
	for i := range out {
		out[i] = math.Inf(1)
		for _, j := range open {
			out[i] = min(out[i], s.f.rows.row(i)[j])
		}
	}
	return out
}
