package material

import (
	"fmt"

	"stanchion/catalogue"
	"stanchion/design"
)

// ScopeError says why a grade has no yield strength on a section.
type ScopeError struct{ Reason string }

func (e *ScopeError) Error() string { return e.Reason }

// Fy returns the yield strength in MPa of a section in this grade. The
// thickness that counts is the section's Thickness. The error is a
// *ScopeError: the grade does not exist for such a section, or the section is
// thicker than the last band.
func (g Grade) Fy(src design.StrengthSource, s *catalogue.Section) (float64, error) {
	table, err := g.table(src, s)
	if err != nil {
		return 0, err
	}
	values, ok := table.fy[g.Nominal]
	if !ok {
		return 0, &ScopeError{fmt.Sprintf("%s has no yield strength for a %s", g.Name, product(s))}
	}
	t := s.Thickness()
	for i, limit := range table.upTo {
		if t <= limit {
			return values[i], nil
		}
	}
	return 0, &ScopeError{fmt.Sprintf("the thickness %g mm is beyond the last band of %s for %s, %g mm",
		t, table.standard, g.Name, table.upTo[len(table.upTo)-1])}
}

// table returns the bands that the grade has on a section.
func (g Grade) table(src design.StrengthSource, s *catalogue.Section) (*bands, error) {
	if s.Finish == catalogue.FinishNone && g.Hollow {
		return nil, &ScopeError{fmt.Sprintf("%s is a grade of hollow sections", g.Name)}
	}
	if s.Finish == catalogue.HotFinished && g.Delivery == Thermomechanical {
		return nil, &ScopeError{"EN 10210-1 has no M grade for hot-finished hollow sections"}
	}
	if src == design.Table31 {
		return g.table31(s.Finish), nil
	}
	return g.product(s.Finish), nil
}

func (g Grade) product(f catalogue.Finish) *bands {
	switch {
	case f == catalogue.ColdFormed:
		return &en10219
	case f == catalogue.HotFinished && g.Delivery == NonAlloy:
		return &en10210
	case f == catalogue.HotFinished:
		return &en10210FineGrain
	case g.Delivery == NonAlloy:
		return &en10025p2
	case g.Delivery == Thermomechanical:
		return &en10025p4
	}
	return &en10025p3
}

func (g Grade) table31(f catalogue.Finish) *bands {
	switch {
	case f == catalogue.ColdFormed:
		return &table31Cold
	case g.Delivery != NonAlloy:
		return &table31FineGrain
	case f == catalogue.HotFinished:
		return &table31Hot
	}
	return &table31NonAlloy
}

// product names what a section is, for messages.
func product(s *catalogue.Section) string {
	switch s.Finish {
	case catalogue.HotFinished:
		return "hot-finished hollow section (EN 10210-1)"
	case catalogue.ColdFormed:
		return "cold-formed hollow section (EN 10219-1)"
	}
	return "rolled open section"
}
