package project

import (
	"context"
	"math"
	"slices"
	"time"
)

// FewSizes finds the least cost with at most K different sizes, for K = 1 up to
// most or to the K from which more sizes help no further. The answers are
// proven optima unless ctx ends first; then the bound says how far they may be
// off. Where no K sizes can serve every node, Choice is nil.
//
// Method: the constraint that a node's size must be among the K is relaxed with
// multipliers (Lagrangian relaxation of the p-median problem; Cornuejols,
// Fisher and Nemhauser, Management Science 23 (1977), 789-810), the multipliers
// are raised by subgradient steps with Polyak's length, sizes whose reduced
// cost exceeds the gap are settled, and branch and bound on the sizes that are
// left closes it.
func (p *Problem) FewSizes(ctx context.Context, most int) ([]Solution, error) {
	if err := p.Validate(); err != nil {
		return nil, err
	}
	live, f := p.reduce()
	s := newSearch(f, p.Workers)
	free := s.everySize()
	var answers []answer
	least, warm := s.fewest(ctx)
	for k := 1; k <= most; k++ {
		if k < least {
			answers = append(answers, answer{cost: math.Inf(1), bound: math.Inf(1), proven: true})
			continue
		}
		a := s.solveWithin(ctx, most-k+1, k, warm)
		answers = append(answers, a)
		warm = a.open
		if a.cost <= free*(1+tolerance) || ctx.Err() != nil {
			break
		}
	}
	s.finish(ctx, answers)
	out := make([]Solution, len(answers))
	for i, a := range answers {
		out[i] = p.solution(live, i+1, a)
	}
	return out, nil
}

// finish gives the time that is left to the K that had too little of it.
func (s *search) finish(ctx context.Context, answers []answer) {
	open := 0
	for _, a := range answers {
		if !a.proven {
			open++
		}
	}
	for i, a := range answers {
		if a.proven || ctx.Err() != nil {
			continue
		}
		again := s.solveWithin(ctx, open, i+1, a.open)
		again.bound = max(again.bound, a.bound)
		answers[i] = again
		open--
	}
}

// solveWithin solves for K in its part of the time that is left for so many.
func (s *search) solveWithin(ctx context.Context, left, k int, warm []int32) answer {
	share, stop := shareOf(ctx, left)
	defer stop()
	return s.solve(share, k, warm)
}

// shareOf gives one of several K its part of the time that is left, so that a
// hard K does not leave the others without an answer.
func shareOf(ctx context.Context, left int) (context.Context, context.CancelFunc) {
	end, limited := ctx.Deadline()
	if !limited {
		return ctx, func() {}
	}
	return context.WithTimeout(ctx, time.Until(end)/time.Duration(left))
}

// tolerance is the relative difference below which two costs are equal: sums of
// ten thousand float64 terms agree to about 1e-12.
const tolerance = 1e-9

// solution carries a reduced answer back to the problem's own sizes.
func (p *Problem) solution(live []int, k int, a answer) Solution {
	sol := Solution{K: k, Cost: a.cost, Bound: a.bound, Proven: a.proven}
	if math.IsInf(a.cost, 1) {
		return sol
	}
	open := make([]int, len(a.open))
	for i, j := range a.open {
		open[i] = live[j]
	}
	slices.Sort(open)
	sol.Choice, sol.Cost = p.CheapestOf(open)
	sol.Bound = min(sol.Bound, sol.Cost)
	used := map[int]bool{}
	for _, chain := range sol.Choice {
		for _, j := range chain {
			used[j] = true
		}
	}
	for j := range used {
		sol.Sizes = append(sol.Sizes, j)
	}
	slices.Sort(sol.Sizes)
	return sol
}

// answer is a solution in the reduced problem's sizes.
type answer struct {
	open   []int32
	cost   float64
	bound  float64
	proven bool
}
