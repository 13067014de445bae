package search

import (
	"fmt"

	"stanchion/design"
	"stanchion/design/ec3"
)

// join makes the nodes of a cluster: its sets that can be designed, each with
// its list. What cannot be designed has its result at once and is nobody's
// neighbour.
func (s *settling) join(cluster []Chosen, cols []design.Column, results []design.Result) {
	for k := range cluster {
		c := &cluster[k]
		n := &node{team: &team{worker: s.worker, name: c.Name}, chosen: c}
		for _, i := range c.Columns {
			before := len(n.mates)
			if n.team.join(&cols[i], &results[i]); len(n.mates) > before {
				m := n.mates[before]
				n.lengths = append(n.lengths, &length{mate: m, node: n, index: i, as: ec3.Neighbour{Column: m.col}})
			}
		}
		if len(n.lengths) > 0 && s.enlist(n) {
			s.nodes = append(s.nodes, n)
		}
	}
}

// enlist finds what a node chooses from, and reports whether there is anything.
func (s *settling) enlist(n *node) bool {
	var err error
	if c := n.chosen.Candidate; c != nil {
		n.list = &List{}
		n.list.addCandidate(c)
		n.list.tabulate(&s.engine.settings)
		return true
	}
	if s.mode == Check && n.mates[0].col.Given == "" {
		err = errNoSection
	} else {
		n.list, n.given, err = n.candidates()
	}
	if err != nil {
		for _, m := range n.mates {
			notRead(m.res, err)
		}
		return false
	}
	if len(n.list.Candidates) > 0 {
		return true
	}
	for _, m := range n.mates {
		if n.given != nil {
			refuse(m.res, &n.list.Refused[0], m.col)
			m.res.Fixed = m.col.Given != ""
			continue
		}
		m.res.Status = design.NoSection
		m.res.Notes = append(m.res.Notes, n.list.empty())
	}
	return false
}

// link makes neighbours of the lengths that stand on each other, and finds
// which lengths depend on which node.
func (s *settling) link(cols []design.Column, st *standing) {
	at := map[int]*length{}
	for _, n := range s.nodes {
		for _, l := range n.lengths {
			at[l.index] = l
		}
	}
	for _, n := range s.nodes {
		for _, l := range n.lengths {
			l.below, l.above = at[st.below[l.index]], at[st.above[l.index]]
			l.member.Between(l.standsOn(cols, st), l.above.neighbour())
			l.demand.of(&l.member, l.limit)
			l.missing(cols, st)
		}
	}
	for _, n := range s.nodes {
		n.low = 0
		for _, l := range n.lengths {
			n.low = max(n.low, min(n.list.skip.start(&l.demand), len(n.list.Candidates)-1))
		}
		n.depend(s.engine.settings.SelfWeight > 0)
	}
}

// neighbour returns what a length is to those beside it; nil for none.
func (l *length) neighbour() *ec3.Neighbour {
	if l == nil {
		return nil
	}
	return &l.as
}

// standsOn returns the neighbour below. One that has no section still brings in
// the moments of the beams at its top.
func (l *length) standsOn(cols []design.Column, st *standing) *ec3.Neighbour {
	if i := st.below[l.index]; l.below == nil && i >= 0 {
		return &ec3.Neighbour{Column: &cols[i]}
	}
	return l.below.neighbour()
}

// missing says that a neighbour could not be designed.
func (l *length) missing(cols []design.Column, st *standing) {
	for _, side := range []struct {
		word  string
		index int
		there *length
	}{{"below", st.below[l.index], l.below}, {"above", st.above[l.index], l.above}} {
		if side.index >= 0 && side.there == nil {
			c := &cols[side.index]
			l.member.Notes = append(l.member.Notes, fmt.Sprintf("the length %s, %s (%s), has no section: its weight is left out, and the moments of the floor between are taken in full", side.word, c.Mark, c.Cell))
		}
	}
}

// depend lists the lengths of other nodes that depend on a node's section: the
// neighbours, and where own weight goes down the line all below.
func (n *node) depend(weight bool) {
	seen := map[*length]bool{}
	add := func(l *length) {
		if l != nil && l.node != n && !seen[l] {
			seen[l] = true
			n.touched = append(n.touched, l)
		}
	}
	for _, l := range n.lengths {
		add(l.above)
		add(l.below)
		for b := l.below; b != nil && weight; b = b.below {
			add(b)
		}
	}
}
