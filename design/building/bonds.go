package building

import (
	"fmt"
	"strings"

	"stanchion/design"
	"stanchion/design/project"
	"stanchion/design/search"
)

// plan is what ties the columns together: sets that share one section, and
// which set stands on which.
type plan struct {
	sets  []search.Set
	of    []int // set of each column
	links []link
}

// link says that a set stands on another, with a splice between them.
type link struct {
	below, above int // sets
	pieces       int // columns alike that have the splice
	stack        string
}

// tie finds the sets and links of columns in stacks and groups.
func tie(cols []design.Column, all []stack) *plan {
	b := newBonds(len(cols))
	byGroup := map[string]int{}
	for i := range cols {
		if g := design.FoldName(cols[i].Group); g != "" {
			if k, ok := byGroup[g]; ok {
				b.join(k, i)
			} else {
				byGroup[g] = i
			}
		}
	}
	for _, s := range all {
		for k := 1; k < len(s.lengths); k++ {
			if !s.splice[k-1] {
				b.join(s.lengths[k-1], s.lengths[k])
			}
		}
	}
	p := &plan{}
	p.sets, p.of = b.sets(len(cols))
	p.name(cols, all)
	for _, s := range all {
		for k := 1; k < len(s.lengths); k++ {
			below, above := s.lengths[k-1], s.lengths[k]
			if p.of[below] != p.of[above] {
				p.links = append(p.links, link{p.of[below], p.of[above], max(1, cols[below].Quantity), s.name})
			}
		}
	}
	return p
}

// bonds joins columns into sets.
type bonds struct{ root []int }

func newBonds(n int) *bonds {
	b := &bonds{make([]int, n)}
	for i := range b.root {
		b.root[i] = i
	}
	return b
}

func (b *bonds) find(i int) int {
	for b.root[i] != i {
		b.root[i] = b.root[b.root[i]]
		i = b.root[i]
	}
	return i
}

// join makes two columns share a section. The first column of a set is its
// root, so that sets come out in the order of the schedule.
func (b *bonds) join(i, j int) {
	i, j = b.find(i), b.find(j)
	b.root[max(i, j)] = min(i, j)
}

func (b *bonds) sets(n int) (sets []search.Set, of []int) {
	of = make([]int, n)
	place := map[int]int{}
	for i := range n {
		r := b.find(i)
		k, ok := place[r]
		if !ok {
			k = len(sets)
			place[r] = k
			sets = append(sets, search.Set{})
		}
		of[i] = k
		sets[k].Columns = append(sets[k].Columns, i)
	}
	return sets, of
}

// name names every set of several columns by the groups and stacks that tie it.
func (p *plan) name(cols []design.Column, all []stack) {
	names := make([][]string, len(p.sets))
	add := func(set int, name string) {
		for _, n := range names[set] {
			if n == name {
				return
			}
		}
		names[set] = append(names[set], name)
	}
	for i := range cols {
		if cols[i].Group != "" {
			add(p.of[i], search.GroupName(cols[i].Group))
		}
	}
	for _, s := range all {
		for k := 1; k < len(s.lengths); k++ {
			if !s.splice[k-1] {
				add(p.of[s.lengths[k]], fmt.Sprintf("stack %q", s.name))
			}
		}
	}
	for k := range p.sets {
		p.sets[k].Name = strings.Join(names[k], " with ")
	}
}

// bridge leaves out sets that have no say (nothing passes for them, or they
// cannot be designed): what stands on one stands on what it stands on.
func (p *plan) bridge(silent []bool) []link {
	links := p.links
	for n := range silent {
		if !silent[n] {
			continue
		}
		var rest, under, over []link
		for _, l := range links {
			switch n {
			case l.above:
				under = append(under, l)
			case l.below:
				over = append(over, l)
			default:
				rest = append(rest, l)
			}
		}
		for _, u := range under {
			for _, o := range over {
				if u.stack == o.stack && u.below != o.above {
					rest = append(rest, link{u.below, o.above, u.pieces, u.stack})
				}
			}
		}
		links = rest
	}
	return links
}

// merged puts links between the same two sets into one, with the cost of all
// their splices.
func merged(links []link, spliceCost float64) []project.Link {
	place := map[[2]int]int{}
	var out []project.Link
	for _, l := range links {
		key := [2]int{l.below, l.above}
		k, ok := place[key]
		if !ok {
			k = len(out)
			place[key] = k
			out = append(out, project.Link{Below: l.below, Above: l.above})
		}
		out[k].SpliceCost += spliceCost * float64(l.pieces)
	}
	return out
}

// Sets returns which columns share a section: the members of a group, the
// lengths of a stack between splices, and the others each on its own.
func Sets(cols []design.Column, o Options, set *design.Settings) []search.Set {
	all, _ := stacks(cols, &o, set)
	return tie(cols, all).sets
}
