package project

import (
	"cmp"
	"context"
	"math"
	"slices"
)

// fewest finds the least number of sizes of which one serves every row and
// every node of a chain, and such sizes: with fewer there is no answer. It is
// the problem of the least hitting set, solved by deepening one size at a time.
// Where ctx ends first the number is that up to which it is proven, and the
// sizes are nil. What may stand on what is left out of it.
func (s *search) fewest(ctx context.Context) (least int, sizes []int32) {
	c := s.coverProblem()
	if c == nil {
		return s.m + 1, nil // some node nothing serves
	}
	for k := c.packing(c.rows); k <= s.m; k++ {
		picked, err := c.within(ctx, c.rows, k, nil)
		if err != nil {
			return k, nil
		}
		if picked != nil {
			return k, picked
		}
	}
	return s.m + 1, nil
}

// cover is a hitting-set problem: each row must hold one of the sizes picked.
type cover struct {
	m    int
	rows []bitset // none within another, shortest first
}

// coverProblem gathers the sizes that serve each row and node. It is nil where
// one is served by none.
func (s *search) coverProblem() *cover {
	var rows []bitset
	for _, cost := range []grid{s.f.rows, s.f.cost} {
		for i := range cost.rows() {
			b := newBitset(s.m)
			for j, v := range cost.row(i) {
				if !math.IsInf(v, 1) {
					b.add(int32(j))
				}
			}
			rows = append(rows, b)
		}
	}
	slices.SortStableFunc(rows, func(a, b bitset) int { return cmp.Compare(a.count(), b.count()) })
	c := &cover{m: s.m}
	for _, b := range rows {
		if b.count() == 0 {
			return nil
		}
		if !slices.ContainsFunc(c.rows, func(o bitset) bool { return o.within(b) }) {
			c.rows = append(c.rows, b)
		}
	}
	return c
}

// packing is a number of rows of which no two share a size: each needs its own.
func (c *cover) packing(rows []bitset) int {
	used := newBitset(c.m)
	n := 0
	for _, b := range rows {
		if !b.meets(used) {
			n++
			used.join(b)
		}
	}
	return n
}

// within finds at most k sizes more that hit all rows, nil where there are none.
// It branches on the sizes of the shortest row, those that hit most rows first.
func (c *cover) within(ctx context.Context, rows []bitset, k int, picked []int32) ([]int32, error) {
	if len(rows) == 0 {
		return append([]int32{}, picked...), nil
	}
	if err := ctx.Err(); err != nil {
		return nil, err
	}
	if c.packing(rows) > k {
		return nil, nil
	}
	for _, j := range c.branches(rows) {
		left := make([]bitset, 0, len(rows))
		for _, b := range rows {
			if !b.has(j) {
				left = append(left, b)
			}
		}
		found, err := c.within(ctx, left, k-1, append(picked, j))
		if found != nil || err != nil {
			return found, err
		}
	}
	return nil, nil
}

// branches lists the sizes of the first row that no other of them outdoes, by
// the number of rows they hit.
func (c *cover) branches(rows []bitset) []int32 {
	hits := map[int32]bitset{}
	var sizes []int32
	for j := range int32(c.m) {
		if !rows[0].has(j) {
			continue
		}
		h := newBitset(len(rows))
		for i, b := range rows {
			if b.has(j) {
				h.add(int32(i))
			}
		}
		hits[j] = h
		sizes = append(sizes, j)
	}
	slices.SortStableFunc(sizes, func(a, b int32) int { return cmp.Compare(hits[b].count(), hits[a].count()) })
	var kept []int32
	for _, j := range sizes {
		if !slices.ContainsFunc(kept, func(o int32) bool { return hits[j].within(hits[o]) }) {
			kept = append(kept, j)
		}
	}
	return kept
}
