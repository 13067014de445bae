package project

import (
	"cmp"
	"encoding/binary"
	"math"
	"slices"
)

// heuristic finds a good choice of k sizes to begin with: the last answer and
// the size that lowers its cost most, then exchanges while one helps.
func (s *search) heuristic(k int, warm []int32) answer {
	open := s.added(k, warm)
	best := answer{open: open, cost: s.costOf(s.f, open)}
	for len(s.f.strands) == 0 && s.exchange(&best) {
	}
	return best
}

// added brings sizes up to k by those that lower their cost most.
func (s *search) added(k int, open []int32) []int32 {
	open = slices.Clone(open)
	for len(open) < min(k, s.m) {
		j, ok := s.bestAddition(open)
		if !ok {
			break
		}
		open = append(open, j)
	}
	return open
}

// bestAddition finds the size that lowers the cost of the open ones most, tried
// among those that promise most.
func (s *search) bestAddition(open []int32) (int32, bool) {
	best, found := int32(-1), score{unserved: math.MaxInt}
	for _, j := range s.promising(open) {
		if slices.Contains(open, j) {
			continue
		}
		if sc := s.scoreOf(s.f, append(slices.Clone(open), j)); sc.less(found) {
			best, found = j, sc
		}
	}
	return best, best >= 0
}

// promising lists the sizes that would lower the cost of the open ones most if
// each node could have them whatever it stands on, or all sizes where the open
// ones do not serve every node.
func (s *search) promising(open []int32) []int32 {
	const few = 24
	gain := make([]float64, s.m)
	add := func(has float64, cost []float64) {
		for j, v := range cost {
			gain[j] += max(0, has-v)
		}
	}
	for i, has := range s.served(open) {
		if math.IsInf(has, 1) {
			return columns(s.m)
		}
		add(has, s.f.rows.row(i))
	}
	solver := s.f.solversOf(open, 1)[0]
	for c := range s.f.strands {
		st := &s.f.strands[c]
		s.f.openTo(solver, open, st)
		_, picks := solver.solve(st)
		if picks == nil {
			return columns(s.m)
		}
		for n, k := range picks {
			own := s.f.cost.row(st.first + n)
			add(own[open[k]], own)
		}
	}
	order := columns(s.m)
	slices.SortStableFunc(order, func(a, b int32) int { return cmp.Compare(gain[b], gain[a]) })
	return order[:min(few, len(order))]
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
			for i := range served {
				cost += min(served[i], s.f.rows.row(i)[j])
			}
			if cost < cutoff(best.cost) {
				*best = answer{open: append(others, j), cost: cost}
				return true
			}
		}
	}
	return false
}

// exchangeFor replaces open sizes of the best answer by some of these while that
// lowers the cost.
func (s *search) exchangeFor(sizes []int32, best *answer) {
	for better := true; better; {
		better = false
		for at := range best.open {
			for _, j := range sizes {
				better = s.try(best, [2]int{at, at}, [2]int32{j, j}) || better
			}
		}
	}
}

// exchangePairs replaces two open sizes of the best answer at a time by sizes
// beside them in a list of sizes by cost, while that lowers the cost: one size
// up and another down is often better where neither alone is.
func (s *search) exchangePairs(sizes []int32, best *answer) {
	for better := true; better; {
		better = false
		for a := range best.open {
			for b := range a {
				for _, i := range beside(sizes, best.open[a]) {
					for _, j := range beside(sizes, best.open[b]) {
						better = s.try(best, [2]int{a, b}, [2]int32{i, j}) || better
					}
				}
			}
		}
	}
}

// beside lists a few sizes before and after one in a rising list.
func beside(sizes []int32, size int32) []int32 {
	const few = 3
	at, _ := slices.BinarySearch(sizes, size)
	return sizes[max(0, at-few):min(len(sizes), at+few+1)]
}

// try takes the best answer with two places of it changed, where that costs less.
func (s *search) try(best *answer, places [2]int, sizes [2]int32) bool {
	open := slices.Clone(best.open)
	open[places[0]], open[places[1]] = sizes[0], sizes[1]
	slices.Sort(open)
	if len(slices.Compact(open)) < len(best.open) {
		return false
	}
	had := best.cost
	s.improve(s.f, open, best)
	return best.cost < had
}

// polish looks for a better answer among the exchanges of open sizes for some
// worthy ones and, where few are open, of two of them at a time.
func (s *search) polish(worthy []int32, best *answer) {
	s.exchangeFor(worthy, best)
	if len(best.open) <= mostPairs {
		slices.Sort(worthy)
		s.exchangePairs(worthy, best)
	}
}

// mostPairs is the number of sizes up to which pairs of them are exchanged: there
// are few, and better answers are hard to find by one exchange at a time.
const mostPairs = 6

// improve takes the columns that the relaxation picked as the best answer where
// they cost less.
func (s *search) improve(f *field, picked []int32, best *answer) {
	open := f.sizesOf(picked)
	slices.Sort(open)
	if !s.first(open) {
		return
	}
	cols := slices.Clone(picked)
	slices.Sort(cols)
	if cost := s.costOf(f, cols); cost < best.cost {
		*best = answer{open: open, cost: cost}
	}
}

// first reports whether improve has not seen these sizes before.
func (s *search) first(open []int32) bool {
	var key []byte
	for _, j := range open {
		key = binary.AppendUvarint(key, uint64(j))
	}
	if s.tried[string(key)] {
		return false
	}
	s.tried[string(key)] = true
	return true
}
