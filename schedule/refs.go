package schedule

import (
	"cmp"
	"slices"
)

// rowRef is what is kept of a row of members: who it is, and where it stands.
type rowRef struct {
	key    uint64 // hash of mark, stack and levels; 0: the row says neither mark nor stack
	comb   uint32 // hash of the combination that it names
	number int32  // row of the sheet
	pos    int64
}

// rowLinks joins the rows of one member.
type rowLinks struct {
	refs  []rowRef
	next  []int32 // the next row of the same member; -1: none
	later []bool  // the row continues a member
	twin  []int32 // first row of another member with the same mark and level; -1: none
}

// link finds which rows belong to one member: those with the same mark, stack
// and levels and different combinations, wherever they stand. The second
// appearance of a combination opens a second member.
func link(refs []rowRef) *rowLinks {
	n := len(refs)
	l := &rowLinks{refs: refs, next: make([]int32, n), later: make([]bool, n), twin: make([]int32, n)}
	order := make([]int32, 0, n)
	for i := range refs {
		l.next[i], l.twin[i] = -1, -1
		if refs[i].key != 0 {
			order = append(order, int32(i))
		}
	}
	slices.SortStableFunc(order, func(a, b int32) int { return cmp.Compare(refs[a].key, refs[b].key) })
	for from := 0; from < len(order); {
		to := from + 1
		for to < len(order) && refs[order[to]].key == refs[order[from]].key {
			to++
		}
		if to-from > 1 {
			l.join(order[from:to])
		}
		from = to
	}
	return l
}

// join parts the rows of one mark and level among members.
func (l *rowLinks) join(rows []int32) {
	seen := map[uint32]int{} // appearances of each combination
	var last []int32         // last row of each member
	var first []int32
	for _, i := range rows {
		k := seen[l.refs[i].comb]
		seen[l.refs[i].comb]++
		if k == len(last) {
			if k > 0 {
				l.twin[i] = first[0]
				if l.twin[first[0]] < 0 {
					l.twin[first[0]] = i
				}
			}
			first, last = append(first, i), append(last, i)
			continue
		}
		l.next[last[k]], l.later[i], last[k] = i, true, i
	}
}

// hash64 is FNV-1a over the folded parts, with its bits mixed once more. It
// is the same on every machine and in every run.
func hash64(parts ...string) uint64 {
	h := uint64(14695981039346656037)
	for _, p := range parts {
		for i := range len(p) {
			h = (h ^ uint64(p[i])) * 1099511628211
		}
		h = (h ^ 0xff) * 1099511628211
	}
	h ^= h >> 33
	h *= 0xff51afd7ed558ccd
	h ^= h >> 33
	return max(h, 1)
}
