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

// hasher is FNV-1a, with its bits mixed once more at the end. It is the same
// on every machine and in every run.
type hasher uint64

const newHasher hasher = 14695981039346656037

func (h *hasher) byte(b byte) { *h = (*h ^ hasher(b)) * 1099511628211 }

// name adds a name, so that names that are the same for people add the same.
func (h *hasher) name(s string) {
	s = trim(s)
	for i := range len(s) {
		if s[i] >= 0x80 || s[i] < ' ' || s[i] == ' ' && s[i-1] == ' ' {
			s = foldName(s)
			break
		}
	}
	for i := range len(s) {
		b := s[i]
		if b >= 'A' && b <= 'Z' {
			b += 'a' - 'A'
		}
		h.byte(b)
	}
	h.byte(0xff) // stands in no name: parts what follows
}

func (h hasher) sum() uint64 {
	x := uint64(h)
	x ^= x >> 33
	x *= 0xff51afd7ed558ccd
	x ^= x >> 33
	return max(x, 1)
}
