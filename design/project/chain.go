package project

import (
	"math"
	"slices"
)

// chainSolver finds the cheapest sizes of a chain by dynamic programming over
// its nodes, each before the one that it hands its cost on to. The state is the
// size of the node; the work is nodes x sizes^2, and the answer exact.
type chainSolver struct {
	sizes int
	fits  [2][]bool   // fits[0][above*sizes+below]: one may stand on the other; fits[1][below*sizes+above] likewise
	cost  [][]float64 // by node and size: the part of the chain that ends there
	from  [][]int32   // from[n][j]: size of n in the best choice with j where n hands on to
	order []ranked    // the open sizes that serve, by their cost at the node at hand
	picks []int
	paths []visit
	trees map[*Chain][]visit
}

func newChainSolver(p *Problem) *chainSolver {
	s := &chainSolver{sizes: p.Sizes, trees: map[*Chain][]visit{}}
	deepest := 0
	for i := range p.Chains {
		c := &p.Chains[i]
		deepest = max(deepest, len(c.Nodes))
		if c.Links != nil && c.isTree() {
			s.trees[c] = c.visits()
		}
	}
	if deepest > 1 {
		s.fits = fits(p)
	}
	s.cost, s.from = make([][]float64, deepest), make([][]int32, deepest)
	for n := range deepest {
		s.cost[n] = make([]float64, p.Sizes)
		s.from[n] = make([]int32, p.Sizes)
		s.paths = append(s.paths, visit{node: n, to: n + 1})
	}
	s.picks = make([]int, deepest)
	return s
}

// fits tabulates which size may stand on which, by the size above and by the
// one below.
func fits(p *Problem) (table [2][]bool) {
	table[0], table[1] = make([]bool, p.Sizes*p.Sizes), make([]bool, p.Sizes*p.Sizes)
	for above := range p.Sizes {
		for below := range p.Sizes {
			ok := above == below || p.MayStand == nil || p.MayStand(below, above)
			table[0][above*p.Sizes+below] = ok
			table[1][below*p.Sizes+above] = ok
		}
	}
	return table
}

// visitsOf returns the nodes of a chain in the order of the work.
func (s *chainSolver) visitsOf(c *Chain) []visit {
	if c.Links != nil {
		if v, ok := s.trees[c]; ok {
			return v
		}
		return c.visits()
	}
	return s.paths[:len(c.Nodes)]
}

// solve returns the least cost of the chain with the open sizes only, price
// added to each node's cost (nil: none), and the sizes chosen; the slice is
// valid until the next call. The cost is +Inf where no choice serves.
func (s *chainSolver) solve(c *Chain, open []int32, price [][]float64) (float64, []int) {
	if c.Links != nil && !c.isTree() {
		return s.solveRings(c, open, price)
	}
	visits := s.visitsOf(c)
	for n := range c.Nodes {
		for _, j := range open {
			s.cost[n][j] = c.Nodes[n].Cost[j]
			if price != nil {
				s.cost[n][j] += price[n][j]
			}
		}
	}
	last := len(visits) - 1
	for _, v := range visits[:last] {
		if c.Links == nil {
			v.splice = c.SpliceCost
		}
		s.handOn(v, open)
	}
	root := visits[last].node
	pick, best := int32(-1), math.Inf(1)
	for _, j := range open {
		if s.cost[root][j] < best {
			pick, best = j, s.cost[root][j]
		}
	}
	if pick < 0 {
		return best, nil
	}
	picks := s.picks[:len(c.Nodes)]
	picks[root] = int(pick)
	for i := last - 1; i >= 0; i-- {
		v := visits[i]
		picks[v.node] = int(s.from[v.node][picks[v.to]])
	}
	return best, picks
}

// handOn adds, for every size of the node that v hands on to, the cost of the
// best size of v that goes with it.
func (s *chainSolver) handOn(v visit, open []int32) {
	cost, to, from := s.cost[v.node], s.cost[v.to], s.from[v.node]
	s.order = s.order[:0]
	for _, j := range open {
		if !math.IsInf(cost[j], 1) {
			s.order = append(s.order, ranked{cost[j], j})
		}
	}
	slices.SortFunc(s.order, byCost)
	table := s.fits[0]
	if v.down {
		table = s.fits[1]
	}
	for _, j := range open {
		if math.IsInf(to[j], 1) {
			continue
		}
		var best float64
		best, from[j] = s.bestWith(cost, table[int(j)*s.sizes:], j, v.splice)
		to[j] += best
	}
}

// bestWith finds the size that makes the chain so far cheapest where the next
// node has size j, among those that fit with j; on equal cost the section runs
// through.
func (s *chainSolver) bestWith(cost []float64, fits []bool, j int32, splice float64) (float64, int32) {
	through := cost[j]
	for _, o := range s.order {
		w := o.cost + splice
		if !(w < through) {
			break
		}
		if fits[o.size] {
			return w, o.size
		}
	}
	return through, j
}

// ranked is a size and the cost of the part of a chain that ends with it.
type ranked struct {
	cost float64
	size int32
}

// byCost orders sizes by cost, and by size where that is equal.
func byCost(a, b ranked) int {
	switch {
	case a.cost < b.cost:
		return -1
	case a.cost > b.cost:
		return 1
	}
	return int(a.size - b.size)
}

// Cheapest returns the cheapest sizes of every chain where any number of sizes
// may be used: the lower limit that fewer sizes are measured against. Chains
// that nothing serves have a nil choice and are left out of the cost.
func (p *Problem) Cheapest() (Choice, float64) {
	return p.cheapestOf(newChainSolver(p), allSizes(p.Sizes))
}

// CheapestOf is Cheapest with the open sizes only, given rising.
func (p *Problem) CheapestOf(open []int) (Choice, float64) {
	sizes := make([]int32, len(open))
	for i, j := range open {
		sizes[i] = int32(j)
	}
	return p.cheapestOf(newChainSolver(p), sizes)
}

func (p *Problem) cheapestOf(s *chainSolver, open []int32) (Choice, float64) {
	choice, total := make(Choice, len(p.Chains)), 0.0
	for c := range p.Chains {
		v, picks := s.solve(&p.Chains[c], open, nil)
		if picks == nil {
			continue
		}
		total += v
		choice[c] = append([]int(nil), picks...)
	}
	return choice, total
}

func allSizes(n int) []int32 {
	sizes := make([]int32, n)
	for j := range sizes {
		sizes[j] = int32(j)
	}
	return sizes
}
