package search

import (
	"errors"
	"fmt"
	"math"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// errNoSection is said of a column that is to be checked and has no section.
var errNoSection = errors.New("no section is given: give one, or have it sized")

// notRead makes a result that says why a column cannot be designed.
func notRead(res *design.Result, err error) {
	res.Status = design.NotRead
	res.Notes = append(res.Notes, err.Error())
}

// fill writes what the worker assessed last, and what its member has to say,
// into a result.
func (w *worker) fill(res *design.Result) {
	a := &w.assess
	c := a.Candidate
	a.Explain()
	res.Notes = append(res.Notes, a.Member.Notes...)
	res.Notes = append(res.Notes, a.Notes()...)
	res.Utilisation = a.Utilisation
	res.Governing = a.Governing
	res.Y, res.Z, res.T = a.Y, a.Z, a.T
	res.HasT, res.TKind = a.HasT, a.TKind
	res.MbRd = a.Lateral.MbRd
	res.Class = a.Class
	res.Fy = c.Fy
	res.Fire = a.Member.AssessFire(c)
	weigh(res, c.Section, c.Grade.Name, a.Member.Column)
	if w.reserves {
		w.findReserve(a.Member, a, res)
	}
}

// weigh names the section of a result and says what a piece of it weighs.
func weigh(res *design.Result, s *catalogue.Section, grade string, col *design.Column) {
	res.Section, res.Grade = s.Name(), grade
	res.MassPerM = s.Mass
	res.Mass = s.Mass * col.Length / 1000
}

// evidence writes the assessment of the next lighter candidate into a result:
// the check that it fails.
func evidence(res *design.Result, a *ec3.Assessment) {
	res.NextLighter = a.Candidate.Section.Name()
	res.NextLighterGrade = a.Candidate.Grade.Name
	res.NextLighterUtilisation = a.Utilisation
	res.NextLighterCheck = a.Governing
}

// noSection names the candidate with the least utilisation where none passes.
func (w *worker) noSection(l *List, res *design.Result) {
	res.Status = design.NoSection
	best := w.best(l)
	if best < 0 {
		res.Notes = append(res.Notes, l.empty())
		return
	}
	w.member.Assess(l.Candidates[best], &w.assess)
	w.fill(res)
	res.Notes = append(res.Notes, "no section passes: "+l.shortfall(l.Candidates[best], &res.Governing, res.Utilisation, ""))
}

// shortfall says how near the best candidate of a list comes to passing, as
// units tells of its utilisation, or why a rule does not cover even that one.
func (l *List) shortfall(best *ec3.Candidate, governing *design.Check, utilisation float64, units string) string {
	if math.IsInf(utilisation, 1) {
		return fmt.Sprintf("%s, as all of %d tried, is outside the rules: %s (%s)%s",
			nameIn(best), len(l.Candidates), governing.Reason, governing.Clause, l.leftOut())
	}
	return fmt.Sprintf("%s has the least utilisation, %.3f%s, of %d tried%s",
		nameIn(best), utilisation, units, len(l.Candidates), l.leftOut())
}

// best returns the candidate with the least utilisation, the first of equal
// ones, -1 where there is none.
func (w *worker) best(l *List) int {
	best, least := -1, 0.0
	for i, c := range l.Candidates {
		w.member.Assess(c, &w.assess)
		if best < 0 || w.assess.Utilisation < least {
			best, least = i, w.assess.Utilisation
		}
	}
	return best
}

// nameIn names a candidate with its grade.
func nameIn(c *ec3.Candidate) string { return c.Section.Name() + " " + c.Grade.Name }

// empty says why a list has no candidate.
func (l *List) empty() string {
	if len(l.Refused) == 0 {
		return "no section of the catalogue lies within the families, limits and exclusions given"
	}
	return "no section can be used" + l.leftOut()
}

// leftOut says what the rules do not cover in the whole list.
func (l *List) leftOut() string {
	if text := refusals(l.Refused); text != "" {
		return "; left out: " + text
	}
	return ""
}

// refusals says what the rules do not cover, reasons once each in the order in
// which they first occur.
func refusals(refused []Refused) string {
	var reasons []string
	first := map[string]string{}
	count := map[string]int{}
	for _, r := range refused {
		reason := r.Refusal.Error()
		if count[reason]++; count[reason] == 1 {
			reasons = append(reasons, reason)
			first[reason] = r.Section.Name() + " " + r.Grade
		}
	}
	for i, reason := range reasons {
		which := first[reason]
		if n := count[reason]; n > 1 {
			which += fmt.Sprintf(" and %d more", n-1)
		}
		reasons[i] = which + ": " + reason
	}
	return strings.Join(reasons, "; left out: ")
}

// tellOver says of a chosen candidate which sections stand between it and the
// next lighter one in the order, and were not tried since a rule does not
// cover them.
func (l *List) tellOver(res *design.Result, i int) {
	if text := l.over[i]; text != "" {
		res.Notes = append(res.Notes, text)
	}
}

// passedOver says what was refused between a candidate and the next lighter
// one; nothing where that is not so.
func (l *List) passedOver(i int) string {
	from := 0
	if j := l.lighter(i); j >= 0 {
		from = l.before[j]
	}
	if text := refusals(l.Refused[from:l.before[i]]); text != "" {
		return "lighter, and left out: " + text
	}
	return ""
}
