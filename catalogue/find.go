package catalogue

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/agnivade/levenshtein"
)

// FindOptions settle names that fit several sections.
type FindOptions struct {
	// ColdFormed: a hollow section whose name states no finish is cold formed;
	// otherwise it is hot finished.
	ColdFormed bool
	// Families, as ParseFamilies reads them, settle a name without a family
	// that fits several. They do not shut out a name that states another.
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
	return fmt.Sprintf("section %q fits several: %s%s; give the full name", e.Name, strings.Join(shown, ", "), more)
}

// index finds sections by the numbers of their names.
type index struct {
	full  map[string][]*Section // every dimension that the designation has
	short map[string][]*Section // the trade's shorter forms: 203x60, 150x10, 400x187
	stem  map[string][]*Section // the serial size alone: 203x203
	all   []*Section
}

func newIndex(sections []*Section) *index {
	x := &index{full: map[string][]*Section{}, short: map[string][]*Section{}, stem: map[string][]*Section{}, all: sections}
	for _, s := range sections {
		n := readSpelling(s.Designation).numbers
		put := func(m map[string][]*Section, numbers []float64) {
			k := key(numbers)
			if !slices.Contains(m[k], s) {
				m[k] = append(m[k], s)
			}
		}
		put(x.full, n)
		last := len(n) - 1
		if last > 0 {
			if r := math.Round(n[last]); r != n[last] && s.Shape == ShapeI {
				put(x.short, append(slices.Clone(n[:last]), r)) // HD 260x54
			}
			put(x.stem, n[:last])
		}
		if len(n) == 3 && (s.Shape == ShapeI || s.Shape == ShapeChannel || n[0] == n[1]) {
			put(x.short, []float64{n[0], n[2]}) // 203 UC 60, SHS 150x10
		}
	}
	return x
}

// Find returns the section of a name in any of the trade's spellings. Errors
// are *UnknownSectionError and *AmbiguousSectionError, or what is wrong with
// o.Families.
func (c *Catalogue) Find(name string, o FindOptions) (*Section, error) {
	sp := readSpelling(name)
	families, known := familyByWord[sp.word]
	if sp.odd || len(sp.numbers) == 0 || sp.word != "" && !known {
		return nil, c.unknown(name, &sp, "")
	}
	k := key(sp.numbers)
	for _, m := range []map[string][]*Section{c.index.full, c.index.short, c.index.stem} {
		found := ofFamilies(m[k], families)
		if len(found) == 0 {
			continue
		}
		settled, err := settleFamilies(found, sp.word, o.Families)
		if err != nil {
			return nil, err
		}
		return c.settleFinish(name, &sp, settled, o.ColdFormed)
	}
	return nil, c.unknown(name, &sp, "")
}

// ofFamilies keeps the sections of the families that a name states.
func ofFamilies(found []*Section, names []string) []*Section {
	if names == nil {
		return found
	}
	var out []*Section
	for _, s := range found {
		if slices.Contains(names, s.Family) {
			out = append(out, s)
		}
	}
	return out
}

// settleFamilies lets the schedule's families settle a name without one, where
// they leave any.
func settleFamilies(found []*Section, word string, families []string) ([]*Section, error) {
	if word != "" || len(found) == 1 || len(families) == 0 {
		return found, nil
	}
	var names []string
	for _, text := range families {
		specs, err := ParseFamilies(text)
		if err != nil {
			return nil, err
		}
		for _, spec := range specs {
			names = append(names, spec.Family)
		}
	}
	if kept := ofFamilies(found, names); len(kept) > 0 {
		return kept, nil
	}
	return found, nil
}

// settleFinish picks the hot or the cold one of a hollow section; a size that
// there is only in the other finish is named, never taken silently.
func (c *Catalogue) settleFinish(name string, sp *spelling, found []*Section, cold bool) (*Section, error) {
	want := sp.finish
	if want == FinishNone {
		want = defaultFinish(cold)
	}
	var fits []*Section
	for _, s := range found {
		if s.Finish == FinishNone && sp.finish == FinishNone || s.Finish == want {
			fits = append(fits, s)
		}
	}
	switch {
	case len(fits) == 1:
		return fits[0], nil
	case len(fits) > 1:
		return nil, &AmbiguousSectionError{name, namesOf(fits)}
	case found[0].Finish == FinishNone:
		return nil, c.unknown(name, sp, "only hollow sections are told apart as hot finished or cold formed")
	case want == HotFinished:
		return nil, &UnknownSectionError{name, namesOf(found), "this size is made cold formed only: add CF where that is meant"}
	default:
		return nil, &UnknownSectionError{name, namesOf(found), "this size is made hot finished only: add HF where that is meant"}
	}
}

func namesOf(sections []*Section) []string {
	out := make([]string, len(sections))
	for i, s := range sections {
		out[i] = s.Name()
	}
	return out
}

// unknown builds the error with the five nearest names: of the family stated
// where there is one, by how near the numbers are and then by edit distance.
func (c *Catalogue) unknown(name string, sp *spelling, reason string) error {
	if len(name) > 200 {
		name = name[:200]
	}
	plain := strings.ReplaceAll(plainUpper(name), " ", "")
	type scored struct {
		s        *Section
		distance int
	}
	pool := ofFamilies(c.index.all, familyByWord[sp.word])
	if len(pool) == 0 {
		pool = c.index.all
	}
	near := make([]scored, 0, len(pool))
	for _, s := range pool {
		if sp.finish != FinishNone && s.Finish != sp.finish {
			continue
		}
		d := levenshtein.ComputeDistance(plain, strings.ReplaceAll(plainUpper(s.Name()), " ", ""))
		if sp.word != "" || len(sp.numbers) > 1 {
			d = min(d, levenshtein.ComputeDistance(key(sp.numbers), key(readSpelling(s.Designation).numbers)))
		}
		near = append(near, scored{s, d})
	}
	slices.SortStableFunc(near, func(a, b scored) int {
		return cmp.Or(cmp.Compare(a.distance, b.distance), cmp.Compare(numbersApart(sp.numbers, a.s), numbersApart(sp.numbers, b.s)))
	})
	e := &UnknownSectionError{Name: name, Reason: reason}
	for _, n := range near[:min(5, len(near))] {
		if n.distance > max(3, len(plain)/2) {
			break
		}
		e.Nearest = append(e.Nearest, n.s.Name())
	}
	return e
}

// numbersApart is how far the numbers of a name are from a section's.
func numbersApart(numbers []float64, s *Section) float64 {
	own := readSpelling(s.Designation).numbers
	total := 0.0
	for i := range max(len(own), len(numbers)) {
		var a, b float64
		if i < len(own) {
			a = own[i]
		}
		if i < len(numbers) {
			b = numbers[i]
		}
		total += math.Abs(a - b)
	}
	return total
}
