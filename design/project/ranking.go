package project

import (
	"math"
	"slices"
)

// ranking is a relation in the form in which the least cost over everything that
// each size may stand on, or that may stand on it, takes one sweep. Sizes that
// may stand on each other both ways share a rank.
type ranking struct {
	up   sweep // each rank after those that it may stand on
	down sweep // each rank after those that may stand on it
}

// sweep is the ranks in an order of work. Of the ranks before, a rank looks only
// at those next to it: what lies further follows, since it is an order
// (transitive reduction; Aho, Garey and Ullman, SIAM Journal on Computing 1
// (1972), 131-137).
type sweep struct {
	first []int32   // by rank: its first size
	more  [][]int32 // by rank: its other sizes; nil where no rank has any
	from  []int32   // the ranks next to rank n are next[from[n]:from[n+1]]
	next  []int32
}

func newRanking(r *relation) *ranking {
	bears := r.above()
	borne := make([]bitset, r.m)
	for i := range borne {
		borne[i] = newBitset(r.m)
		for j := range bears {
			if bears[j].has(int32(i)) {
				borne[i].add(int32(j))
			}
		}
	}
	return &ranking{up: newSweep(bears, borne), down: newSweep(borne, bears)}
}

// newSweep makes a sweep that hands on from each size to those after it; before
// is the same the other way round.
func newSweep(after, before []bitset) sweep {
	order := columns(len(after))
	behind := make([]int, len(after)) // sizes before each
	for j := range behind {
		behind[j] = before[j].count()
	}
	slices.SortStableFunc(order, func(a, b int32) int { return behind[a] - behind[b] })
	var w sweep
	w.gather(order, after)
	w.link(after)
	return w
}

// gather makes ranks of the sizes in an order in which each follows those before
// it: sizes of one rank have as many before them.
func (w *sweep) gather(order []int32, after []bitset) {
	twins := map[int][]int32{}
	for _, j := range order {
		at := slices.IndexFunc(w.first, func(i int32) bool { return after[j].has(i) && after[i].has(j) })
		if at < 0 {
			w.first = append(w.first, j)
			continue
		}
		twins[at] = append(twins[at], j)
	}
	if len(twins) == 0 {
		return
	}
	w.more = make([][]int32, len(w.first))
	for at, sizes := range twins {
		w.more[at] = sizes
	}
}

// link finds the ranks next to each: those before it that are not before
// another of them.
func (w *sweep) link(after []bitset) {
	before := make([]bitset, len(w.first)) // by rank, all ranks before it
	w.from = append(w.from, 0)
	for n := range w.first {
		before[n] = newBitset(len(w.first))
		for q := n - 1; q >= 0; q-- {
			if !after[w.first[q]].has(w.first[n]) || before[n].has(int32(q)) {
				continue
			}
			w.next = append(w.next, int32(q))
			before[n].add(int32(q))
			before[n].join(before[q])
		}
		w.from = append(w.from, int32(len(w.next)))
	}
}

// handOn adds to each size of to the cheaper of cost for the same size and, a
// splice dearer, the least cost of any size before it. least is room for one
// number a rank. Costs are not negative, so that their bits are in the order of
// their values: compared as whole numbers they need no branches, which is where
// the time would go.
func (w *sweep) handOn(cost, to []float64, least []uint64, splice float64) {
	if w.more != nil {
		w.handOnTwins(cost, to, least, splice)
		return
	}
	from := w.from[1:]
	least = least[:len(from)]
	at := int32(0)
	for n, j := range w.first[:len(from)] {
		own := math.Float64bits(cost[j])
		v := own
		for _, q := range w.next[at:from[n]] {
			v = min(v, least[q])
		}
		at = from[n]
		least[n] = v
		to[j] += math.Float64frombits(min(own, math.Float64bits(math.Float64frombits(v)+splice)))
	}
}

// handOnTwins is handOn where some sizes share a rank.
func (w *sweep) handOnTwins(cost, to []float64, least []uint64, splice float64) {
	for n, j := range w.first {
		v := math.Float64bits(cost[j])
		for _, j := range w.more[n] {
			v = min(v, math.Float64bits(cost[j]))
		}
		for _, q := range w.next[w.from[n]:w.from[n+1]] {
			v = min(v, least[q])
		}
		least[n] = v
		changed := math.Float64frombits(v) + splice
		to[j] += min(cost[j], changed)
		for _, j := range w.more[n] {
			to[j] += min(cost[j], changed)
		}
	}
}
