package project

import "math"

// chainSolver finds the cheapest sizes of a chain by dynamic programming over
// its nodes, each before the one that it hands its cost on to. The state is the
// size of the node, and the answer exact. All sizes that it knows are open.
type chainSolver struct {
	relation *relation
	ranking  *ranking
	// cost holds, by node and size, the node's own cost, which the caller writes
	// there before the work; then the cost of the part of the chain that ends
	// at the node.
	cost  [][]float64
	least []uint64 // by rank, the bits
	picks []int32
}

// newChainSolver makes a solver for strands of up to so many nodes. Where all
// stand alone nothing is asked of relation.
func newChainSolver(r *relation, k *ranking, longest int) *chainSolver {
	s := &chainSolver{relation: r, ranking: k, picks: make([]int32, longest)}
	if k != nil {
		s.least = make([]uint64, len(k.up.first))
	}
	room := newGrid(longest, r.m)
	for n := range longest {
		s.cost = append(s.cost, room.row(n))
	}
	return s
}

// solve returns the least cost of the strand and the sizes chosen; the slice is
// valid until the next call. The cost is +Inf where no choice serves.
func (s *chainSolver) solve(st *strand) (float64, []int32) {
	if st.links != nil {
		return s.solveRings(st)
	}
	best, root := s.handDown(st)
	if root < 0 {
		return best, nil
	}
	picks := s.picks[:st.count]
	last := len(st.visits) - 1
	picks[st.visits[last].node] = root
	for i := last - 1; i >= 0; i-- {
		v := &st.visits[i]
		picks[v.node] = s.bestWith(v, picks[v.to])
	}
	return best, picks
}

// value is solve without the sizes.
func (s *chainSolver) value(st *strand) float64 {
	if st.links != nil {
		v, _ := s.solveRings(st)
		return v
	}
	v, _ := s.handDown(st)
	return v
}

// handDown carries the costs from node to node and returns the least at the
// last, and the first size that has it, -1 where none serves.
func (s *chainSolver) handDown(st *strand) (float64, int32) {
	last := len(st.visits) - 1
	for i := range st.visits[:last] {
		v := &st.visits[i]
		sweep := &s.ranking.up
		if v.down {
			sweep = &s.ranking.down
		}
		sweep.handOn(s.cost[v.node], s.cost[v.to], s.least, v.splice)
	}
	return leastOf(s.cost[st.visits[last].node])
}

// leastOf returns the least of costs and the first size that has it, -1 where
// none serves.
func leastOf(cost []float64) (float64, int32) {
	best, at := math.Inf(1), int32(-1)
	for j, v := range cost {
		if v < best {
			best, at = v, int32(j)
		}
	}
	return best, at
}

// bestWith finds the size of a node that makes the chain so far cheapest where
// the node that it hands on to has size j; on equal cost the section runs
// through.
func (s *chainSolver) bestWith(v *visit, j int32) int32 {
	cost := s.cost[v.node]
	best, pick := cost[j], j
	for o, w := range cost {
		o := int32(o)
		if w += v.splice; w < best && s.fits(v, o, j) {
			best, pick = w, o
		}
	}
	return pick
}

// fits reports whether the node of v may have size o where the other has j.
func (s *chainSolver) fits(v *visit, o, j int32) bool {
	if v.down {
		return s.relation.mayStand(j, o)
	}
	return s.relation.mayStand(o, j)
}

// Cheapest returns the cheapest sizes of every chain where any number of sizes
// may be used: the lower limit that fewer sizes are measured against. Chains
// that nothing serves have a nil choice and are left out of the cost.
func (p *Problem) Cheapest() (Choice, float64) {
	return p.CheapestOf(p.all())
}

// CheapestOf is Cheapest with the open sizes only, given rising.
func (p *Problem) CheapestOf(open []int) (Choice, float64) {
	s := p.solverOf(open)
	choice, total := make(Choice, len(p.Chains)), 0.0
	for c := range p.Chains {
		chain := &p.Chains[c]
		for n := range chain.Nodes {
			for i, j := range open {
				s.cost[n][i] = chain.Nodes[n].Cost[j]
			}
		}
		st := chain.strand(0)
		v, picks := s.solve(&st)
		if picks == nil {
			continue
		}
		total += v
		choice[c] = make([]int, len(picks))
		for n, i := range picks {
			choice[c][n] = open[i]
		}
	}
	return choice, total
}

// solverOf makes a solver of the problem's chains with the open sizes.
func (p *Problem) solverOf(open []int) *chainSolver {
	longest := 0
	for c := range p.Chains {
		longest = max(longest, len(p.Chains[c].Nodes))
	}
	if longest < 2 {
		return newChainSolver(&relation{m: len(open)}, nil, longest)
	}
	r := p.relationOf(open)
	return newChainSolver(r, newRanking(r), longest)
}
