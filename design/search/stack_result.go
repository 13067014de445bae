package search

import (
	"fmt"

	"stanchion/design"
	"stanchion/design/ec3"
)

// fillNode writes the results of a settled node.
func (s *settling) fillNode(n *node) {
	if n.chosen.Candidate != nil {
		n.assign(n.chosen)
		return
	}
	n.fillAll(n.candidate(), design.Passes)
	switch {
	case n.given != nil:
		s.tellGiven(n)
	case n.aside:
		s.tellAside(n)
	default:
		s.tellLighter(n)
	}
}

// tellGiven says which lengths fail in a section that is given.
func (s *settling) tellGiven(n *node) {
	for _, m := range n.mates {
		if !ec3.Passes(m.res.Utilisation, m.limit) {
			failed(m.res)
		}
		m.res.Fixed = m.col.Given != ""
		if !m.res.Fixed {
			m.res.Notes = append(m.res.Notes, fmt.Sprintf("%s has the section given at %s", n.name, n.given.place()))
		}
	}
}

// tellAside says that no section passes beside the sections above and below.
func (s *settling) tellAside(n *node) {
	least, who := s.worst(n.lengths)
	for _, m := range n.mates {
		m.res.Status = design.NoSection
		whose := ""
		if n.name != "" {
			whose = " for " + n.name
		}
		m.res.Notes = append(m.res.Notes, fmt.Sprintf("no section passes%s beside those above and below: %s", whose,
			n.list.shortfall(n.candidate(), &who.res.Governing, least, " of the limit at "+who.place())))
	}
}

// tellLighter gives the next lighter candidate as evidence, with the check that
// it fails, which may be that of another length: one of the same set, or one
// above or below that depends on the section.
func (s *settling) tellLighter(n *node) {
	at := n.at
	for _, m := range n.mates {
		n.list.tellOver(m.res, at)
	}
	lighter := n.list.lighter(at)
	if lighter < 0 {
		return
	}
	n.move(lighter)
	most, who := s.worst(n.lengths)
	if failing := s.failing(n); ec3.Passes(most, 1) && len(failing) > 0 {
		who = failing[0]
	}
	who.member.Assess(who.node.candidate(), &s.assess)
	for _, m := range n.mates {
		evidence(m.res, &s.assess)
		m.res.NextLighter, m.res.NextLighterGrade = n.candidate().Section.Name(), n.candidate().Grade.Name
		if m != who.mate {
			m.res.Notes = append(m.res.Notes, "the next lighter section fails at "+who.place())
		}
	}
	n.move(at)
}

// failing returns the lengths that depend on a node and fail, sets put aside
// left out.
func (s *settling) failing(n *node) []*length {
	var list []*length
	for _, l := range n.touched {
		if !l.node.aside && !s.verdict(l) {
			list = append(list, l)
		}
	}
	return list
}
