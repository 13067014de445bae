package project

import (
	"slices"
)

// ranking is a relation in the form in which the least cost over everything that
// each size may stand on, or that may stand on it, takes one pass. Sizes that
// may stand on each other both ways share a rank. A rank lists only those next
// below and next above: what lies further follows, since it is an order
// (transitive reduction; Aho, Garey and Ullman, SIAM Journal on Computing 1
// (1972), 131-137).
type ranking struct {
	ranks []rank // each after all that it may stand on
}

type rank struct {
	size        int32   // the first size of the rank
	more        []int32 // the others
	under, over []int32 // ranks next below and next above
}

func newRanking(r *relation) *ranking {
	above := r.above()
	order := make([]int32, r.m)
	bearers := make([]int, r.m) // how many sizes each may stand on
	for j := range order {
		order[j] = int32(j)
		for i := range above {
			if above[i].has(int32(j)) {
				bearers[j]++
			}
		}
	}
	slices.SortStableFunc(order, func(a, b int32) int { return bearers[a] - bearers[b] })
	k := &ranking{}
	k.gather(order, above)
	k.reduce(above)
	return k
}

// gather makes ranks of the sizes in an order in which each follows what it may
// stand on: those that stand on each other both ways have as many below them.
func (k *ranking) gather(order []int32, above []bitset) {
	for _, j := range order {
		at := slices.IndexFunc(k.ranks, func(r rank) bool { return above[j].has(r.size) && above[r.size].has(j) })
		if at < 0 {
			k.ranks = append(k.ranks, rank{size: j})
			continue
		}
		k.ranks[at].more = append(k.ranks[at].more, j)
	}
}

// reduce links each rank to those next below it.
func (k *ranking) reduce(above []bitset) {
	below := make([]bitset, len(k.ranks)) // by rank, all ranks below it
	for n := range k.ranks {
		below[n] = newBitset(len(k.ranks))
		for q := n - 1; q >= 0; q-- {
			if !above[k.ranks[q].size].has(k.ranks[n].size) || below[n].has(int32(q)) {
				continue
			}
			k.ranks[n].under = append(k.ranks[n].under, int32(q))
			k.ranks[q].over = append(k.ranks[q].over, int32(n))
			below[n].add(int32(q))
			below[n].join(below[q])
		}
	}
}

// handOn adds to each size of to the cheaper of cost for the same size and, a
// splice dearer, the least cost of any size that it may stand on or, down, that
// may stand on it. least is room for one number a rank.
func (k *ranking) handOn(cost, to, least []float64, splice float64, down bool) {
	if !down {
		for n := range k.ranks {
			r := &k.ranks[n]
			least[n] = r.leastOf(cost, least, r.under)
			r.addTo(to, cost, least[n]+splice)
		}
		return
	}
	for n := len(k.ranks) - 1; n >= 0; n-- {
		r := &k.ranks[n]
		least[n] = r.leastOf(cost, least, r.over)
		r.addTo(to, cost, least[n]+splice)
	}
}

// leastOf is the least cost of the rank's sizes and of its neighbours.
func (r *rank) leastOf(cost, least []float64, neighbours []int32) float64 {
	v := cost[r.size]
	for _, j := range r.more {
		v = min(v, cost[j])
	}
	for _, q := range neighbours {
		v = min(v, least[q])
	}
	return v
}

func (r *rank) addTo(to, cost []float64, changed float64) {
	to[r.size] += min(cost[r.size], changed)
	for _, j := range r.more {
		to[j] += min(cost[j], changed)
	}
}
