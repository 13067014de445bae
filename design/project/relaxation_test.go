package project

import (
	"math/rand/v2"
	"testing"
)

// BenchmarkRelaxation is one step of the multipliers of 2000 lengths in stacks
// and the bound they then give, on one core.
func BenchmarkRelaxation(b *testing.B) {
	_, f := office(rand.New(rand.NewPCG(3, 3)), 2000, 150, 8).reduce()
	s := newSearch(f, 1)
	best := s.heuristic(6, nil)
	at := startFrom(f, best.open)
	c := newClimb(s, 6, branchNode{make([]int8, s.m), 0, f, at}, ascent{steps: 1, scale: 1})
	bound := c.r.bound(c.state)
	b.ResetTimer()
	for range b.N {
		c.r.step(c.state, &c.direction, 0.1*(aim(best.cost, bound)-bound))
		bound = c.r.bound(c.state)
	}
	b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(b.N)/float64(len(f.cost.flat)), "ns/price")
}
