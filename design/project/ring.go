package project

import (
	"cmp"
	"math"
	"slices"
)

// solveRings is solve for a chain whose links close rings. A ring is opened at
// one node after another: each of its sizes in turn is taken as settled, which
// cuts its links, until a tree is left. That is exact; sizes that cannot lead
// to less than what has been found are passed over, which keeps it short for
// the few rings that a building has.
func (s *chainSolver) solveRings(st *strand) (float64, []int32) {
	r := ringSearch{s: s, best: math.Inf(1), pick: make([]int32, st.count)}
	cost := make([][]float64, st.count)
	for n := range cost {
		cost[n] = slices.Clone(s.cost[n]) // the trees that are left are solved in its place
	}
	r.settle(cost, st.links)
	return r.best, r.found
}

// ringSearch is the work of one solveRings.
type ringSearch struct {
	s     *chainSolver
	best  float64
	pick  []int32
	found []int32
}

// settle finds the cheapest choice of nodes with these costs (+Inf: ruled out)
// and the links that are left.
func (r *ringSearch) settle(cost [][]float64, links []Link) {
	if r.least(cost) >= r.best {
		return
	}
	n := ringNode(len(cost), links)
	if n < 0 {
		r.forest(cost, links)
		return
	}
	order := make([]int32, len(cost[n]))
	for j := range order {
		order[j] = int32(j)
	}
	slices.SortStableFunc(order, func(a, b int32) int { return cmp.Compare(cost[n][a], cost[n][b]) })
	for _, j := range order {
		if math.IsInf(cost[n][j], 1) {
			break
		}
		cut, rest := r.cut(cost, links, n, j)
		r.settle(cut, rest)
	}
}

// least is the sum of every node's least cost: no choice costs less.
func (r *ringSearch) least(cost [][]float64) float64 {
	total := 0.0
	for _, row := range cost {
		v, _ := leastOf(row)
		total += v
	}
	return total
}

// cut settles node n on size j: its neighbours keep what fits, at the cost of
// the splice, and its links go.
func (r *ringSearch) cut(cost [][]float64, links []Link, n int, j int32) ([][]float64, []Link) {
	out := slices.Clone(cost)
	out[n] = only(cost[n], j)
	var rest []Link
	for _, l := range links {
		v := visit{node: l.Above, to: l.Below, down: true}
		switch n {
		case l.Below:
		case l.Above:
			v = visit{node: l.Below, to: l.Above}
		default:
			rest = append(rest, l)
			continue
		}
		other := v.node
		row := slices.Clone(out[other])
		for i := range row {
			switch i := int32(i); {
			case !r.s.fits(&v, i, j):
				row[i] = math.Inf(1)
			case i != j:
				row[i] += l.SpliceCost
			}
		}
		out[other] = row
	}
	return out, rest
}

// only rules out every size but one.
func only(row []float64, j int32) []float64 {
	out := make([]float64, len(row))
	for i := range out {
		out[i] = math.Inf(1)
	}
	out[j] = row[j]
	return out
}

// forest solves what is left once every ring is opened: trees, one by one.
func (r *ringSearch) forest(cost [][]float64, links []Link) {
	total := 0.0
	for _, nodes := range parts(len(cost), links) {
		tree, place := Chain{Links: []Link{}}, map[int]int{}
		for k, n := range nodes {
			place[n] = k
			tree.Nodes = append(tree.Nodes, Node{cost[n]})
			copy(r.s.cost[k], cost[n])
		}
		for _, l := range links {
			if k, ok := place[l.Below]; ok {
				tree.Links = append(tree.Links, Link{k, place[l.Above], l.SpliceCost})
			}
		}
		st := tree.strand(0)
		v, picks := r.s.solve(&st)
		if total += v; picks == nil || total >= r.best {
			return
		}
		for k, n := range nodes {
			r.pick[n] = picks[k]
		}
	}
	r.best, r.found = total, slices.Clone(r.pick)
}

// ringNode returns the node of a ring with the most links, -1 where the links
// close none. Nodes with one link are stripped off until only rings, and what
// joins them, are left.
func ringNode(nodes int, links []Link) int {
	degree := make([]int, nodes)
	for _, l := range links {
		degree[l.Below]++
		degree[l.Above]++
	}
	left := slices.Clone(links)
	for stripped := true; stripped; {
		kept := left[:0]
		stripped = false
		for _, l := range left {
			if degree[l.Below] == 1 || degree[l.Above] == 1 {
				degree[l.Below]--
				degree[l.Above]--
				stripped = true
				continue
			}
			kept = append(kept, l)
		}
		left = kept
	}
	if len(left) == 0 {
		return -1
	}
	most := 0
	for n := range degree {
		if degree[n] > degree[most] {
			most = n
		}
	}
	return most
}

// parts returns the nodes that links join, in their order.
func parts(nodes int, links []Link) [][]int {
	root := make([]int, nodes)
	for n := range root {
		root[n] = n
	}
	find := func(n int) int {
		for root[n] != n {
			n = root[n]
		}
		return n
	}
	for _, l := range links {
		a, b := find(l.Below), find(l.Above)
		root[max(a, b)] = min(a, b)
	}
	var out [][]int
	place := map[int]int{}
	for n := range root {
		r := find(n)
		k, ok := place[r]
		if !ok {
			k = len(out)
			place[r] = k
			out = append(out, nil)
		}
		out[k] = append(out[k], n)
	}
	return out
}
