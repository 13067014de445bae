package revision

import (
	"fmt"
	"slices"
)

// Pair is a member of the old issue and the same of the new, by index.
type Pair struct {
	Old, New int
	Note     string // how it was told from others of the same name
}

// Matching says which member is which.
type Matching struct {
	Pairs      []Pair // in the order of the new issue
	Removed    []int  // of the old issue
	Added      []int  // of the new issue
	Candidates []Candidate
	Ignored    []string // parts of the name that only one issue has, and that do not count
}

// Match finds which member of one issue is which of the other.
func Match(old, new []Member) *Matching {
	m := &matcher{old: old, new: new, parts: commonParts(old, new), to: slices.Repeat([]int{-1}, len(new)),
		taken: make([]bool, len(old)), notes: make([]string, len(new))}
	m.byIdentity()
	r := &Matching{Ignored: ignored(old, new)}
	for i, j := range m.to {
		if j >= 0 {
			r.Pairs = append(r.Pairs, Pair{Old: j, New: i, Note: m.notes[i]})
		} else {
			r.Added = append(r.Added, i)
		}
	}
	for j, taken := range m.taken {
		if !taken {
			r.Removed = append(r.Removed, j)
		}
	}
	r.Candidates = m.candidates(r.Removed, r.Added)
	return r
}

// matcher is a matching in the making.
type matcher struct {
	old, new []Member
	parts    parts
	to       []int // by member of the new issue: the one of the old; -1: none
	taken    []bool
	notes    []string
}

func (m *matcher) pair(j, i int, note string) { m.to[i], m.taken[j], m.notes[i] = j, true, note }

// byIdentity pairs the members of one identity.
func (m *matcher) byIdentity() {
	before := map[identity][]int{}
	for j := range m.old {
		id := identityOf(&m.old[j].Column, m.parts)
		before[id] = append(before[id], j)
	}
	var order []identity
	after := map[identity][]int{}
	for i := range m.new {
		id := identityOf(&m.new[i].Column, m.parts)
		if after[id] == nil {
			order = append(order, id)
		}
		after[id] = append(after[id], i)
	}
	for _, id := range order {
		switch olds, news := before[id], after[id]; {
		case !id.says() || len(olds) == 0:
		case len(olds) == 1 && len(news) == 1:
			m.pair(olds[0], news[0], "")
		default:
			m.twins(olds, news)
		}
	}
}

// twins pairs members of which several have one name: first those that are
// alike in everything, then the others in their order if there are as many on
// both sides. The note says so.
func (m *matcher) twins(olds, news []int) {
	var left []int
	for _, i := range news {
		j := slices.IndexFunc(olds, func(j int) bool { return same(&m.old[j].Column, &m.new[i].Column) })
		if j < 0 {
			left = append(left, i)
			continue
		}
		m.pair(olds[j], i, "")
		olds = slices.Delete(slices.Clone(olds), j, j+1)
	}
	if len(olds) != len(left) {
		return
	}
	note := ""
	if len(news) > 1 {
		note = fmt.Sprintf("%d members have this name in both issues, with nothing to tell them apart: they are taken in their order", len(news))
	}
	for k, i := range left {
		m.pair(olds[k], i, note)
	}
}
