package search

import (
	"cmp"
	"errors"
	"slices"

	"stanchion/design"
)

// errCoupled says that Stream was used where columns must be held.
var errCoupled = errors.New("the lengths of a column line depend on each other under these settings: all columns must be held")

// Coupled reports whether, under the engine's settings, the lengths of a column
// line depend on each other's sections: beam reactions are shared by the
// lengths above and below a floor, own weight goes down the line, and the rule
// of simple construction asks what stands on nothing. Columns must be held
// then: SizeAll and CheckAll settle the lines, Stream refuses.
func (e *Engine) Coupled() bool {
	s := &e.settings
	return s.Moments == design.MomentsSimple || s.SelfWeight > 0 || s.Interaction == design.SimpleInteraction
}

// split takes the clusters out of the columns that stand alone and the groups.
func split(single []int, groups []Set, s *standing) (alone []int, apart []Set, clusters [][]Chosen) {
	sets := make([]Chosen, 0, len(single)+len(groups))
	for _, i := range single {
		sets = append(sets, Chosen{Set: Set{Columns: []int{i}}})
	}
	for _, g := range groups {
		sets = append(sets, Chosen{Set: g})
	}
	rest, clusters := parts(sets, s)
	for i := range rest {
		if rest[i].Name == "" {
			alone = append(alone, rest[i].Columns...)
		} else {
			apart = append(apart, rest[i].Set)
		}
	}
	return alone, apart, clusters
}

// parts parts sets into those that stand alone and clusters of sets that
// depend on each other, because a length of one stands on a length of another
// or two lengths of one stand on each other.
func parts(sets []Chosen, s *standing) (alone []Chosen, clusters [][]Chosen) {
	setOf := map[int]int{}
	for k := range sets {
		for _, i := range sets[k].Columns {
			setOf[i] = k
		}
	}
	root := make([]int, len(sets)) // disjoint sets
	tied := make([]bool, len(sets))
	for k := range root {
		root[k] = k
	}
	find := func(k int) int {
		for root[k] != k {
			root[k] = root[root[k]]
			k = root[k]
		}
		return k
	}
	for i, below := range s.below {
		a, ok := setOf[i]
		b, also := setOf[below]
		if below < 0 || !ok || !also {
			continue
		}
		tied[a], tied[b] = true, true
		root[find(a)] = find(b)
	}
	place := map[int]int{}
	for k := range sets {
		if !tied[k] {
			alone = append(alone, sets[k])
			continue
		}
		r := find(k)
		if _, ok := place[r]; !ok {
			place[r] = len(clusters)
			clusters = append(clusters, nil)
		}
		clusters[place[r]] = append(clusters[place[r]], sets[k])
	}
	return alone, clusters
}

// compareColumns is an order of lengths that does not depend on the order of
// the schedule, as far as their names tell them apart.
func compareColumns(a, b *design.Column) int {
	return cmp.Or(cmp.Compare(lineOf(a), lineOf(b)), cmp.Compare(design.FoldLevel(a.From), design.FoldLevel(b.From)),
		cmp.Compare(a.Mark, b.Mark), cmp.Compare(a.Length, b.Length))
}

// sorted returns the sets of a cluster in the order in which they are settled:
// from the bottom up, by the height of their lowest length in its line, then
// by name.
func sorted(cluster []Chosen, cols []design.Column, s *standing) []Chosen {
	height := func(i int) int {
		h := 0
		for i = s.below[i]; i >= 0; i = s.below[i] {
			h++
		}
		return h
	}
	first := func(c *Chosen) int {
		return slices.MinFunc(c.Columns, func(i, j int) int {
			return cmp.Or(cmp.Compare(height(i), height(j)), compareColumns(&cols[i], &cols[j]))
		})
	}
	slices.SortStableFunc(cluster, func(a, b Chosen) int {
		i, j := first(&a), first(&b)
		return cmp.Or(cmp.Compare(height(i), height(j)), compareColumns(&cols[i], &cols[j]))
	})
	return cluster
}
