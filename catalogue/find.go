package catalogue

import (
	"fmt"
	"slices"
	"strings"
)

// FindOptions settle names that fit several sections.
type FindOptions struct {
	// ColdFormed: a hollow section whose name states no finish is cold formed;
	// otherwise it is hot finished.
	ColdFormed bool
	// Families, as ParseFamilies reads them, settle a name without a family
	// that fits several, and the finish of a hollow section whose name states
	// none ("SHS CF"). They do not shut out a name that states another family.
	Families []string
}

// UnknownSectionError says that no section has a name, and which names are near.
type UnknownSectionError struct {
	Name    string
	Nearest []string
	Reason  string // what is wrong, where more can be said
}

func (e *UnknownSectionError) Error() string {
	msg := fmt.Sprintf("section %q is not in the catalogue", e.Name)
	if e.Reason != "" {
		msg += ": " + e.Reason
	}
	if len(e.Nearest) > 0 {
		msg += "; nearest: " + strings.Join(e.Nearest, ", ")
	}
	return msg
}

// AmbiguousSectionError says that a name fits several sections.
type AmbiguousSectionError struct {
	Name       string
	Candidates []string
}

func (e *AmbiguousSectionError) Error() string {
	shown, more := e.Candidates, ""
	if len(shown) > 6 {
		shown, more = shown[:6], fmt.Sprintf(" and %d more", len(e.Candidates)-6)
	}
	return fmt.Sprintf("section %q fits several: %s%s; give the full name", shortened(e.Name), strings.Join(shown, ", "), more)
}

// Find returns the section of a name in any of the trade's spellings. Errors
// are *UnknownSectionError and *AmbiguousSectionError, or what is wrong with
// o.Families.
func (c *Catalogue) Find(name string, o FindOptions) (*Section, error) {
	sp := readSpelling(name)
	found := c.index.bySpelling(&sp)
	if len(found) == 0 {
		// A stock list may name a section as it likes.
		if found = c.index.exact[plainKey(name)]; len(found) == 0 {
			return nil, c.unknown(name, &sp, sp.odd)
		}
	}
	specs, err := parseAll(o.Families)
	if err != nil {
		return nil, err
	}
	if sp.word == "" && len(found) > 1 {
		found = settleFamilies(found, specs)
	}
	return c.settleFinish(name, &sp, found, specs, o.ColdFormed)
}

func parseAll(families []string) ([]FamilySpec, error) {
	var specs []FamilySpec
	for _, text := range families {
		found, err := ParseFamilies(text)
		if err != nil {
			return nil, err
		}
		specs = append(specs, found...)
	}
	return specs, nil
}

// settleFamilies lets the schedule's families settle a name without one, where
// they leave any.
func settleFamilies(found []*Section, specs []FamilySpec) []*Section {
	kept := keep(found, func(s *Section) bool {
		return slices.ContainsFunc(specs, func(f FamilySpec) bool { return f.Family == s.Family })
	})
	if len(kept) > 0 {
		return kept
	}
	return found
}

func keep(sections []*Section, wanted func(*Section) bool) []*Section {
	var out []*Section
	for _, s := range sections {
		if wanted(s) {
			out = append(out, s)
		}
	}
	return out
}

// settleFinish picks the hot or the cold one of a hollow section; a size that
// there is only in the other finish is named, never taken silently.
func (c *Catalogue) settleFinish(name string, sp *spelling, found []*Section, specs []FamilySpec, cold bool) (*Section, error) {
	fits := keep(found, func(s *Section) bool {
		if s.Finish == FinishNone {
			return sp.finish == FinishNone
		}
		return s.Finish == wantedFinish(sp.finish, specs, s.Family, cold)
	})
	hollow := found[0].Finish != FinishNone
	switch {
	case len(fits) > 1:
		return nil, &AmbiguousSectionError{name, namesOf(fits)}
	case len(fits) == 1 && sp.partial(fits[0]):
		return nil, &UnknownSectionError{name, namesOf(fits), "the name gives no thickness"}
	case len(fits) == 1:
		return fits[0], nil
	case !hollow:
		return nil, c.unknown(name, sp, "only hollow sections are told apart as hot finished or cold formed")
	case found[0].Finish == ColdFormed:
		return nil, &UnknownSectionError{name, namesOf(found), "this size is there cold formed only: add CF where that is meant"}
	default:
		return nil, &UnknownSectionError{name, namesOf(found), "this size is there hot finished only: add HF where that is meant"}
	}
}

// wantedFinish is the finish that a name states; else the one that the
// schedule's families state for this family; else the setting's.
func wantedFinish(stated Finish, specs []FamilySpec, family string, cold bool) Finish {
	if stated != FinishNone {
		return stated
	}
	want := FinishNone
	for _, f := range specs {
		if f.Family != family {
			continue
		}
		finish := f.Finish
		if finish == FinishNone {
			finish = defaultFinish(cold)
		}
		if want != FinishNone && want != finish {
			return defaultFinish(cold) // both are allowed
		}
		want = finish
	}
	if want == FinishNone {
		want = defaultFinish(cold)
	}
	return want
}

func namesOf(sections []*Section) []string {
	out := make([]string, len(sections))
	for i, s := range sections {
		out[i] = s.Name()
	}
	return out
}
