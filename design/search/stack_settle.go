package search

import (
	"stanchion/design"
	"stanchion/design/ec3"
)

// settling chooses the sections of a cluster: lengths that stand on each other,
// whose moments and own weight depend on the sections above and below.
//
// A state is one candidate for every set, by its place in the set's list. Three
// steps lead to the answer.
//
//  1. raise. Every set starts at the first candidate that the axial checks let
//     through. As long as a length fails beside its neighbours as they stand,
//     its set moves up to the next candidate that passes beside them. Sets only
//     move up, and a set without such a candidate is put aside for good with
//     the one of least utilisation: each move uses up one of finitely many
//     places, so it ends. When it does, every set that was not put aside passes
//     beside the sections that its neighbours have then.
//  2. revive. A set that was put aside while its neighbours were still on their
//     way gets one more chance beside them as they ended.
//  3. lower. On the way up a set may have passed beside neighbours that were
//     weaker than they are now, and be heavier than it has to be. As long as a
//     set can move down to a candidate beside which it passes and every length
//     that depends on it still does, it takes the first such candidate. Each
//     move lowers the sum of the places, a number that cannot fall below 0, so
//     this ends too; and since each move keeps what passed passing, the state
//     is consistent at every moment.
//
// In the answer every length passes beside the sections that its neighbours
// have in the answer, and no set can take an earlier candidate without failing
// itself or making a neighbour fail. Of several such states it is the one that
// this fixed order of moves leads to; a lighter one that needs two sets to
// change at once is not looked for.
type settling struct {
	*worker
	nodes   []*node
	verdict func(*length) bool // whether a length passes in its section beside its neighbours
}

// node is a set of a cluster.
type node struct {
	*team
	chosen  *Chosen // the set, with a candidate where that is decided on elsewhere
	given   *mate   // whose section the set has; nil: none
	list    *List
	at      int       // place in the list
	low     int       // the first place that the axial checks let through
	aside   bool      // no candidate passes
	lengths []*length // its own
	touched []*length // those of other sets that depend on its section
}

// length is one column of a cluster.
type length struct {
	*mate
	node         *node
	index        int
	below, above *length
	as           ec3.Neighbour // what its neighbours see
}

// move gives a node another candidate, and tells the lengths that it bears on.
func (n *node) move(at int) {
	n.at = at
	c := n.list.Candidates[at]
	for _, l := range n.lengths {
		l.as.Section = c.Section
	}
	for _, l := range n.lengths {
		l.hand()
	}
}

// hand passes the own weight of a length down its line.
func (l *length) hand() {
	for ; l.below != nil; l = l.below {
		if l.as.Section != nil {
			l.below.member.Carried = l.member.Weight(l.as.Section.Mass)
		}
	}
}

// try is the verdict of the checks on a length.
func (s *settling) try(l *length) bool {
	return l.node.list.try(l.node.at, &l.member, &l.demand, l.limit, &s.assess)
}

// stands reports whether every length of a node passes.
func (s *settling) stands(n *node) bool {
	for _, l := range n.lengths {
		if !s.verdict(l) {
			return false
		}
	}
	return true
}

// bears reports whether every length that depends on a node passes, sets put
// aside left out.
func (s *settling) bears(n *node) bool {
	for _, l := range n.touched {
		if !l.node.aside && !s.verdict(l) {
			return false
		}
	}
	return true
}

// choose takes the three steps.
func (s *settling) choose() {
	s.raise()
	s.revive()
	s.lower()
}

// raise is the first step.
func (s *settling) raise() {
	for _, n := range s.nodes {
		n.move(n.low)
	}
	for again := true; again; {
		again = false
		for _, n := range s.nodes {
			if n.aside || s.stands(n) {
				continue
			}
			again = true
			if !s.climb(n) {
				n.aside = true
				s.least(n)
			}
		}
	}
}

// climb moves a node up to the next candidate that passes; false if none does.
func (s *settling) climb(n *node) bool {
	for at := n.at + 1; at < len(n.list.Candidates); at++ {
		if n.move(at); s.stands(n) {
			return true
		}
	}
	return false
}

// least gives a node the candidate whose worst utilisation is least, the first
// of equal ones.
func (s *settling) least(n *node) {
	best, least := 0, 0.0
	for at := range n.list.Candidates {
		n.move(at)
		if u, _ := s.worst(n.lengths); at == 0 || u < least {
			best, least = at, u
		}
	}
	n.move(best)
}

// worst returns the greatest utilisation of lengths in their sections, each as
// a part of its limit, and the first length that has it; that length is
// assessed last.
func (s *settling) worst(lengths []*length) (most float64, who *length) {
	for _, l := range lengths {
		l.member.Assess(l.node.candidate(), &s.assess)
		if u := s.assess.Utilisation / l.limit; who == nil || u > most {
			most, who = u, l
		}
	}
	if who != nil {
		who.member.Assess(who.node.candidate(), &s.assess)
	}
	return most, who
}

func (n *node) candidate() *ec3.Candidate { return n.list.Candidates[n.at] }

// revive is the second step.
func (s *settling) revive() {
	for _, n := range s.nodes {
		if !n.aside || len(n.list.Candidates) == 0 {
			continue
		}
		if at := s.earliest(n, n.low, len(n.list.Candidates)); at >= 0 {
			n.aside = false
			continue
		}
		s.least(n)
	}
}

// lower is the third step.
func (s *settling) lower() {
	for again := true; again; {
		again = false
		for _, n := range s.nodes {
			if n.aside {
				continue
			}
			at := n.at
			if s.earliest(n, n.low, at) >= 0 {
				again = true
				continue
			}
			n.move(at)
		}
	}
}

// earliest moves a node to the first candidate from low up to high that passes
// and makes nothing fail; -1 if there is none.
func (s *settling) earliest(n *node, low, high int) int {
	for at := low; at < high; at++ {
		if n.move(at); s.stands(n) && s.bears(n) {
			return at
		}
	}
	return -1
}

// settle chooses the sections of a cluster and writes the results.
func (w *worker) settle(cluster []Chosen, cols []design.Column, s *standing, results []design.Result) {
	defer w.bugs.catchAll(columnsOf(cluster), cols, results)
	t := w.settled(cluster, cols, s, results)
	for _, n := range t.nodes {
		t.fillNode(n)
	}
}

// settled chooses the sections of a cluster. What cannot be designed has its
// result.
func (w *worker) settled(cluster []Chosen, cols []design.Column, s *standing, results []design.Result) *settling {
	t := &settling{worker: w}
	t.verdict = t.try
	t.join(sorted(cluster, cols, s), cols, results)
	t.link(cols, s)
	t.choose()
	return t
}

func columnsOf(sets []Chosen) []int {
	var all []int
	for i := range sets {
		all = append(all, sets[i].Columns...)
	}
	return all
}
