package building

import (
	"slices"

	"stanchion/catalogue"
	"stanchion/design/ec3"
	"stanchion/design/project"
	"stanchion/design/search"
)

// kind is what a size of a problem stands for: a section and, graded, its grade.
type kind struct {
	section *catalogue.Section
	grade   string
}

func kindOf(c *ec3.Candidate, graded bool) kind {
	if !graded {
		return kind{section: c.Section}
	}
	return kind{c.Section, c.Grade.Name}
}

// regrade makes the solution of a problem whose sizes are sections one of the
// same problem graded: with the same sections, the cheapest grades with the
// changes between them counted as the splices that they are.
func (p *problem) regrade(sections *problem, s *project.Solution) {
	if s.Choice == nil {
		return
	}
	var open []int
	for j, section := range p.sections {
		if slices.ContainsFunc(s.Sizes, func(i int) bool { return sections.sections[i] == section }) {
			open = append(open, j)
		}
	}
	s.Choice, s.Cost = p.CheapestOf(open)
	s.Sizes = used(s.Choice)
	s.Proven = s.Proven && s.Cost <= s.Bound*(1+rounding)
}

// rounding is the relative difference by which sums of the same terms in
// another order may differ: ten thousand float64 terms agree to about 1e-12.
const rounding = 1e-9

// used returns the sizes of a choice, rising.
func used(choice project.Choice) []int {
	var all []int
	for _, picks := range choice {
		all = append(all, picks...)
	}
	slices.Sort(all)
	return slices.Compact(all)
}

// names returns the sections behind sizes, each once, in their order.
func (p *problem) names(sizes []int) []string {
	var out []string
	for _, j := range sizes {
		if name := p.sections[j].Name(); !slices.Contains(out, name) {
			out = append(out, name)
		}
	}
	return out
}

// otherGrade reports whether a candidate is not the one that the search keeps
// of a given section: the first that passes.
func otherGrade(o *search.Options, c *ec3.Candidate) bool {
	i := slices.Index(o.Pass, true)
	return i >= 0 && o.List.Candidates[i] != c
}
