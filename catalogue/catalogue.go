package catalogue

import (
	"cmp"
	"fmt"
	"slices"
)

// Catalogue is a list of sections in one total order: nominal mass per metre,
// then depth, then width, then name.
type Catalogue struct {
	sections []*Section
	index    *index
	pieces   []Piece
}

func newCatalogue(sections []*Section) *Catalogue {
	slices.SortFunc(sections, Compare)
	return &Catalogue{sections: sections, index: newIndex(sections)}
}

// Compare orders sections as candidates are tried: by nominal mass, depth,
// width and name.
func Compare(a, b *Section) int {
	return cmp.Or(
		cmp.Compare(a.Mass, b.Mass),
		cmp.Compare(a.H, b.H),
		cmp.Compare(a.B, b.B),
		cmp.Compare(a.Name(), b.Name()),
	)
}

// Sections returns every section in order. The slice must not be changed.
func (c *Catalogue) Sections() []*Section { return c.sections }

// Filter says which sections may be chosen. Zero values do not limit; lengths
// are in mm and inclusive.
type Filter struct {
	// Families as ParseFamilies reads them; none: every family, hot and cold.
	Families []string
	// ColdFormed: hollow families without a stated finish are cold formed;
	// otherwise they are hot finished.
	ColdFormed                 bool
	MinDepth, MaxDepth         float64
	MinWidth, MaxWidth         float64
	MinThickness, MaxThickness float64  // flange or wall
	Exclude                    []string // names as Find reads them
}

// Filter returns the sections that a filter lets through, in order. An error
// names a family or an excluded section that is not known.
func (c *Catalogue) Filter(f Filter) ([]*Section, error) {
	specs, err := parseAll(f.Families)
	if err != nil {
		return nil, err
	}
	excluded := map[*Section]bool{}
	for _, name := range f.Exclude {
		s, err := c.Find(name, FindOptions{ColdFormed: f.ColdFormed, Families: f.Families})
		if err != nil {
			return nil, fmt.Errorf("exclude: %w", err)
		}
		excluded[s] = true
	}
	var out []*Section
	for _, s := range c.sections {
		if !excluded[s] && f.fits(s) && (len(specs) == 0 || anyAllows(specs, s, f.ColdFormed)) {
			out = append(out, s)
		}
	}
	return out, nil
}

func anyAllows(specs []FamilySpec, s *Section, cold bool) bool {
	return slices.ContainsFunc(specs, func(spec FamilySpec) bool {
		if spec.Family != s.Family {
			return false
		}
		finish := spec.Finish
		if finish == FinishNone {
			finish = defaultFinish(cold)
		}
		return s.Finish == FinishNone || s.Finish == finish
	})
}

func defaultFinish(cold bool) Finish {
	if cold {
		return ColdFormed
	}
	return HotFinished
}

func (f *Filter) fits(s *Section) bool {
	within := func(v, least, most float64) bool { return v >= least && (most == 0 || v <= most) }
	return within(s.H, f.MinDepth, f.MaxDepth) && within(s.B, f.MinWidth, f.MaxWidth) &&
		within(s.Tf, f.MinThickness, f.MaxThickness)
}
