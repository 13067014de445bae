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
	first       []int32   // by rank: its first size; each rank follows all that it may stand on
	more        [][]int32 // by rank: its other sizes, nil where no rank has any
	under, over neighbours
}

// neighbours lists ranks by rank: those of n are list[from[n]:from[n+1]].
type neighbours struct{ from, list []int32 }

func (k neighbours) of(n int) []int32 { return k.list[k.from[n]:k.from[n+1]] }

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
	twins := map[int][]int32{}
	for _, j := range order {
		at := slices.IndexFunc(k.first, func(i int32) bool { return above[j].has(i) && above[i].has(j) })
		if at < 0 {
			k.first = append(k.first, j)
			continue
		}
		twins[at] = append(twins[at], j)
	}
	if len(twins) == 0 {
		return
	}
	k.more = make([][]int32, len(k.first))
	for at, sizes := range twins {
		k.more[at] = sizes
	}
}

// reduce links each rank to those next below and next above it.
func (k *ranking) reduce(above []bitset) {
	under, over := make([][]int32, len(k.first)), make([][]int32, len(k.first))
	below := make([]bitset, len(k.first)) // by rank, all ranks below it
	for n := range k.first {
		below[n] = newBitset(len(k.first))
		for q := n - 1; q >= 0; q-- {
			if !above[k.first[q]].has(k.first[n]) || below[n].has(int32(q)) {
				continue
			}
			under[n] = append(under[n], int32(q))
			over[q] = append(over[q], int32(n))
			below[n].add(int32(q))
			below[n].join(below[q])
		}
	}
	k.under, k.over = neighboursOf(under), neighboursOf(over)
}

func neighboursOf(lists [][]int32) neighbours {
	k := neighbours{from: []int32{0}}
	for _, list := range lists {
		k.list = append(k.list, list...)
		k.from = append(k.from, int32(len(k.list)))
	}
	return k
}

// handOn adds to each size of to the cheaper of cost for the same size and, a
// splice dearer, the least cost of any size that it may stand on or, down, that
// may stand on it. least is room for one number a rank.
func (k *ranking) handOn(cost, to, least []float64, splice float64, down bool) {
	if down {
		for n := len(k.first) - 1; n >= 0; n-- {
			k.handRank(n, k.over.of(n), cost, to, least, splice)
		}
		return
	}
	for n := range k.first {
		k.handRank(n, k.under.of(n), cost, to, least, splice)
	}
}

func (k *ranking) handRank(n int, next []int32, cost, to, least []float64, splice float64) {
	j := k.first[n]
	own := cost[j]
	v := own
	if k.more != nil {
		for _, j := range k.more[n] {
			v = min(v, cost[j])
		}
	}
	for _, q := range next {
		if w := least[q]; w < v { // the built-in min costs more: it asks for NaN
			v = w
		}
	}
	least[n] = v
	v += splice
	if k.more != nil {
		for _, j := range k.more[n] {
			to[j] += min(cost[j], v)
		}
	}
	if own < v {
		v = own
	}
	to[j] += v
}
