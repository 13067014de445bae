package project

import (
	"math"
	"slices"
)

// heuristic finds a good choice of k sizes to begin with: the last answer and
// the size that lowers its cost most, then exchanges while one helps.
func (s *search) heuristic(k int, warm []int32) answer {
	open := slices.Clone(warm)
	for len(open) < min(k, s.m) {
		j, ok := s.bestAddition(open)
		if !ok {
			break
		}
		open = append(open, j)
	}
	best := answer{open: open, cost: s.costOf(open)}
	for len(s.r.chains) == 0 && s.exchange(&best) {
	}
	return best
}

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

func (s *search) bestAddition(open []int32) (int32, bool) {
	served := s.served(open)
	best, found := int32(-1), score{unserved: math.MaxInt}
	for j := range int32(s.m) {
		if slices.Contains(open, j) {
			continue
		}
		var sc score
		for i, row := range s.r.rows {
			sc.add(min(served[i], row[j]))
		}
		trial := append(slices.Clone(open), j)
		for c := range s.r.chains {
			v, _ := s.dp.solve(&s.r.chains[c], trial, nil)
			sc.add(v)
		}
		if sc.less(found) {
			best, found = j, sc
		}
	}
	return best, best >= 0
}

// served is the cheapest open size's cost in each row.
func (s *search) served(open []int32) []float64 {
	out := make([]float64, len(s.r.rows))
	for i, row := range s.r.rows {
		out[i] = math.Inf(1)
		for _, j := range open {
			out[i] = min(out[i], row[j])
		}
	}
	return out
}

// exchange replaces one open size by another where that lowers the cost.
func (s *search) exchange(best *answer) bool {
	for at := range best.open {
		others := slices.Delete(slices.Clone(best.open), at, at+1)
		served := s.served(others)
		for j := range int32(s.m) {
			if slices.Contains(best.open, j) {
				continue
			}
			cost := 0.0
			for i, row := range s.r.rows {
				cost += min(served[i], row[j])
			}
			if cost < cutoff(best.cost) {
				*best = answer{open: append(others, j), cost: cost}
				return true
			}
		}
	}
	return false
}

// improve takes the sizes that the relaxation picked as the best answer where
// they cost less.
func (s *search) improve(pick []bool, best *answer) {
	var open []int32
	for j, in := range pick {
		if in {
			open = append(open, int32(j))
		}
	}
	if cost := s.costOf(open); cost < best.cost {
		*best = answer{open: open, cost: cost}
	}
}
