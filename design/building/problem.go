package building

import (
	"math"
	"slices"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/project"
	"stanchion/design/search"
)

// problem is a project.Problem and what its parts stand for.
type problem struct {
	project.Problem
	sections []*catalogue.Section // by size; graded, a section stands once for each of its grades
	nodes    [][]int              // sets, by chain and node
	pick     map[int][]*ec3.Candidate
}

// builder makes a problem of sets and what they may have.
type builder struct {
	engine  *search.Engine
	cols    []design.Column
	plan    *plan
	options []search.Options
}

// silent says which sets have no say: no candidate can serve them, or their
// columns cannot be designed (the search says why in their results), or they
// were not asked for.
func (b *builder) silent() []bool {
	out := make([]bool, len(b.options))
	for k := range b.options {
		o := &b.options[k]
		serves := o.Given && len(o.Pass) > 0 || slices.Contains(o.Pass, true)
		out[k] = o.Err != nil || !serves
	}
	return out
}

// build makes the problem of the sets that wanted names. Its sizes are sections,
// in whatever grade is cheapest for each set; graded, a section in two grades is
// two sizes, with a splice between them.
func (b *builder) build(wanted []bool, spliceCost float64, links []link, graded bool) *problem {
	p := &problem{pick: map[int][]*ec3.Candidate{}}
	size := map[kind]int{}
	for j, c := range b.kinds(wanted, graded) {
		p.sections = append(p.sections, c.Section)
		size[kindOf(c, graded)] = j
	}
	p.Sizes = len(p.sections)
	p.MayStand = mayStandIn(p.sections)

	merged := merged(links, spliceCost)
	for _, sets := range chains(wanted, merged) {
		chain := project.Chain{Links: []project.Link{}}
		place := map[int]int{}
		for n, k := range sets {
			place[k] = n
			cost, pick := b.node(k, size, graded)
			p.pick[k] = pick
			chain.Nodes = append(chain.Nodes, project.Node{Cost: cost})
		}
		for _, l := range merged {
			if n, ok := place[l.Below]; ok {
				chain.Links = append(chain.Links, project.Link{Below: n, Above: place[l.Above], SpliceCost: l.SpliceCost})
			}
		}
		p.Chains = append(p.Chains, chain)
		p.nodes = append(p.nodes, sets)
	}
	return p
}

// kinds returns every section that a wanted set may have, in the order in which
// the search prefers them: at its best grade or, graded, once for each grade.
func (b *builder) kinds(wanted []bool, graded bool) []*ec3.Candidate {
	best := map[kind]*ec3.Candidate{}
	for k := range b.options {
		if !wanted[k] {
			continue
		}
		o := &b.options[k]
		for i, c := range o.List.Candidates {
			if !o.Pass[i] && !o.Given {
				continue
			}
			k := kindOf(c, graded)
			if had, ok := best[k]; !ok || b.engine.Compare(c, had) < 0 {
				best[k] = c
			}
		}
	}
	all := make([]*ec3.Candidate, 0, len(best))
	for _, c := range best {
		all = append(all, c)
	}
	slices.SortFunc(all, b.engine.Compare)
	return all
}

// node returns the cost of every size for a set, in its cheapest grade that
// passes, and the candidate that it stands for. A given section stays where it
// passes in no grade.
func (b *builder) node(k int, size map[kind]int, graded bool) (cost []float64, pick []*ec3.Candidate) {
	cost, pick = make([]float64, len(size)), make([]*ec3.Candidate, len(size))
	for j := range cost {
		cost[j] = math.Inf(1)
	}
	o := &b.options[k]
	metres := b.metres(k)
	stays := o.Given && !slices.Contains(o.Pass, true)
	for i, c := range o.List.Candidates {
		if !o.Pass[i] && !stays {
			continue
		}
		j := size[kindOf(c, graded)]
		if v := metres * b.engine.Objective(c); v < cost[j] {
			cost[j], pick[j] = v, c
		}
	}
	return cost, pick
}

// leaveOutUnserved takes out the chains that no choice of any number of sizes
// serves, and returns their sets.
func (p *problem) leaveOutUnserved() (out [][]int) {
	choice, _ := p.Cheapest()
	var chains []project.Chain
	var nodes [][]int
	for c := range choice {
		if choice[c] == nil {
			out = append(out, p.nodes[c])
			continue
		}
		chains, nodes = append(chains, p.Chains[c]), append(nodes, p.nodes[c])
	}
	p.Chains, p.nodes = chains, nodes
	return out
}

// metres returns the length of all pieces of a set.
func (b *builder) metres(k int) float64 {
	total := 0.0
	for _, i := range b.plan.sets[k].Columns {
		total += b.cols[i].Length / 1000 * float64(max(1, b.cols[i].Quantity))
	}
	return total
}

// chains parts the wanted sets into those that links join, in their order.
func chains(wanted []bool, links []project.Link) [][]int {
	b := newBonds(len(wanted))
	for _, l := range links {
		b.join(l.Below, l.Above)
	}
	sets, _ := b.sets(len(wanted))
	var out [][]int
	for _, s := range sets {
		if wanted[s.Columns[0]] {
			out = append(out, s.Columns)
		}
	}
	return out
}
