package takeoff

import (
	"cmp"
	"slices"

	"stanchion/design"
)

// levelOrder ranks the names of levels from the lowest to the highest, as the
// lengths between them tell. Names that nothing ranks keep the order in which
// they first stand.
type levelOrder struct {
	index map[string]int // by folded name: first appearance
	rank  []int
}

func newLevelOrder(items []Item) *levelOrder {
	o := &levelOrder{index: map[string]int{}}
	var above [][]int // by level: those at the tops of lengths that stand on it
	var below []int   // by level: lengths that end there and are not ranked yet
	seen := map[[2]int]bool{}
	for i := range items {
		var ends [2]int
		for k, name := range [...]string{items[i].From, items[i].To} {
			key := design.FoldLevel(name)
			n, ok := o.index[key]
			if !ok {
				n = len(o.index)
				o.index[key] = n
				above, below = append(above, nil), append(below, 0)
			}
			ends[k] = n
		}
		if ends[0] != ends[1] && !seen[ends] {
			seen[ends] = true
			above[ends[0]] = append(above[ends[0]], ends[1])
			below[ends[1]]++
		}
	}
	o.climb(above, below)
	return o
}

// climb gives each level the number of lengths of the longest way up to it.
// Levels on a ring, which no building has, stay unranked at the end.
func (o *levelOrder) climb(above [][]int, below []int) {
	o.rank = make([]int, len(below))
	var ready []int
	for n, b := range below {
		if b == 0 {
			ready = append(ready, n)
		}
	}
	ranked := 0
	for ; len(ready) > 0; ranked++ {
		n := ready[0]
		ready = ready[1:]
		for _, up := range above[n] {
			o.rank[up] = max(o.rank[up], o.rank[n]+1)
			if below[up]--; below[up] == 0 {
				ready = append(ready, up)
			}
		}
	}
	if ranked == len(below) {
		return
	}
	for n, b := range below {
		if b > 0 {
			o.rank[n] = len(below)
		}
	}
}

// compare orders two pairs of levels: by the lower one, then by the upper one,
// then by name.
func (o *levelOrder) compare(fromA, toA, fromB, toB string) int {
	a, b := o.index[design.FoldLevel(fromA)], o.index[design.FoldLevel(fromB)]
	c, d := o.index[design.FoldLevel(toA)], o.index[design.FoldLevel(toB)]
	return cmp.Or(
		cmp.Compare(o.rank[a], o.rank[b]), cmp.Compare(o.rank[c], o.rank[d]),
		cmp.Compare(a, b), cmp.Compare(c, d),
	)
}

// sortLevels puts lines by level into order.
func (o *levelOrder) sortLevels(lines []LevelLine) {
	slices.SortStableFunc(lines, func(a, b LevelLine) int { return o.compare(a.From, a.To, b.From, b.To) })
}
