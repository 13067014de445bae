package revision

import (
	"fmt"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
)

// notAllowed says why a row does not allow the section that it had: the limits
// of the row itself and the exclusions count; families, grades and stock that
// hold only for rows which say nothing do not.
func notAllowed(col *design.Column, h *Had, set *design.Settings) string {
	s, c := h.Section, &col.Choice
	for _, l := range []struct {
		name               string
		value, least, most float64
	}{
		{"depth", s.H, c.MinDepth, c.MaxDepth}, {"width", s.B, c.MinWidth, c.MaxWidth}, {"thickness", s.Tf, c.MinThickness, c.MaxThickness},
	} {
		if l.value < l.least || l.most > 0 && l.value > l.most {
			return fmt.Sprintf("%s %s mm: outside the row's limits", l.name, figures(l.value))
		}
	}
	if len(c.Families) > 0 && !isOf(s, c.Families, set.ColdFormed) {
		return "the row asks for " + strings.Join(c.Families, ", ")
	}
	if len(col.Grades) > 0 && h.Grade != "" && !slices.Contains(col.Grades, h.Grade) {
		return "the row asks for " + strings.Join(col.Grades, " ")
	}
	if slices.Contains(set.Exclude, s.Name()) {
		return "it is excluded"
	}
	return ""
}

// isOf reports whether a section is of one of these families. Hollow families
// without a stated finish are hot or cold as the settings say.
func isOf(s *catalogue.Section, families []string, cold bool) bool {
	usual := catalogue.HotFinished
	if cold {
		usual = catalogue.ColdFormed
	}
	for _, name := range families {
		specs, err := catalogue.ParseFamilies(name)
		if err != nil {
			continue // the sizing says so
		}
		for _, f := range specs {
			if f.Family != s.Family {
				continue
			}
			if s.Finish == catalogue.FinishNone || f.Finish == s.Finish || f.Finish == catalogue.FinishNone && s.Finish == usual {
				return true
			}
		}
	}
	return false
}
