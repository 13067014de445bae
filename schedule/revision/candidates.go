package revision

import (
	"fmt"

	"stanchion/design"
)

// Likeness says why two members could be one.
type Likeness uint8

// The likenesses, the strongest first.
const (
	Twin    Likeness = iota // one of several of the same name
	Respelt                 // the mark differs in punctuation, spaces or zeros alone
	Renamed                 // another mark in the same place
	Moved                   // the same mark in another place
	Alike                   // another name and place, everything else the same
)

// String names the likeness: what may have happened to the member.
func (l Likeness) String() string {
	return [...]string{"one of several?", "respelt?", "renamed?", "moved?", "alike?"}[l]
}

// Candidate is a removed member and an added one that could be one.
type Candidate struct {
	Old, New int
	Likeness Likeness
	Why      string
}

const (
	maxBucket    = 4 // members of one likeness on a side: more say nothing
	maxPerMember = 3 // candidates of one member
)

// candidates finds which removed members could be added ones under another
// name or in another place.
func (m *matcher) candidates(removed, added []int) []Candidate {
	c := &candidateFinder{matcher: m, seen: map[[2]int]bool{}, old: map[int]int{}, new: map[int]int{}}
	for _, l := range []Likeness{Twin, Respelt, Renamed, Moved, Alike} {
		c.find(l, removed, added)
	}
	return c.list
}

type candidateFinder struct {
	*matcher
	list     []Candidate
	seen     map[[2]int]bool
	old, new map[int]int // how many candidates a member has
}

// find pairs what has the same key under a likeness.
func (c *candidateFinder) find(l Likeness, removed, added []int) {
	before := map[string][]int{}
	for _, j := range removed {
		if k := likenessKey(l, &c.matcher.old[j].Column, c.parts); k != "" {
			before[k] = append(before[k], j)
		}
	}
	after := map[string][]int{}
	var order []string
	for _, i := range added {
		if k := likenessKey(l, &c.matcher.new[i].Column, c.parts); k != "" && before[k] != nil {
			if after[k] == nil {
				order = append(order, k)
			}
			after[k] = append(after[k], i)
		}
	}
	for _, k := range order {
		olds, news := before[k], after[k]
		most := maxBucket
		if l == Alike {
			most = 1 // many columns of a building are alike
		}
		if len(olds) > most || len(news) > most {
			continue
		}
		for _, i := range news {
			for _, j := range olds {
				c.add(l, j, i)
			}
		}
	}
}

func (c *candidateFinder) add(l Likeness, j, i int) {
	if at := [2]int{j, i}; !c.seen[at] && c.old[j] < maxPerMember && c.new[i] < maxPerMember {
		c.seen[at] = true
		c.old[j]++
		c.new[i]++
		c.list = append(c.list, Candidate{Old: j, New: i, Likeness: l, Why: c.why(l, j, i)})
	}
}

// likenessKey is what two members have in common under a likeness; empty where
// a member says too little.
func likenessKey(l Likeness, col *design.Column, p parts) string {
	id := identityOf(col, p)
	switch l {
	case Respelt:
		if bare := bareMark(id.mark); bare != "" {
			return fmt.Sprintf("%q %q %q %q", bare, id.stack, id.from, id.to)
		}
	case Renamed:
		if id.stack != "" && id.from+id.to != "" {
			return fmt.Sprintf("%q %q %q", id.stack, id.from, id.to)
		}
	case Moved:
		return id.mark
	case Twin:
		if id.says() {
			return fmt.Sprintf("%q", id)
		}
	case Alike:
		return likeness(col)
	}
	return ""
}

// why says what speaks for a candidate, and what is different.
func (c *candidateFinder) why(l Likeness, j, i int) string {
	a, b := &c.matcher.old[j], &c.matcher.new[i]
	text := ""
	switch l {
	case Respelt:
		text = fmt.Sprintf("%q and %q are the same but for how they are spelt", a.Column.Mark, b.Column.Mark)
	case Renamed:
		text = fmt.Sprintf("both stand at %s, %s", b.Column.Stack, b.Level())
	case Moved:
		text = "both have the mark " + b.Column.Mark
	case Twin:
		text = "several have this name, and not as many in both issues"
	case Alike:
		return "length, restraint and loads are the same"
	}
	changes := Changes(&a.Column, &b.Column)
	if len(changes) == 0 {
		return text + "; everything else is the same"
	}
	return text + "; " + changes[0].Text
}
