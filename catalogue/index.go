package catalogue

import (
	"math"
	"slices"
	"strings"
)

// index finds sections by the numbers of their names.
type index struct {
	full  map[string][]*Section // every dimension that the designation has
	short map[string][]*Section // the trade's shorter forms: 203x60, 150x10, 168x8
	stem  map[string][]*Section // the serial size alone: 203x203
	exact map[string][]*Section // the letters of the whole name: a stock list may hold "old joist A"
	names []indexedName

	misses misses
}

// indexedName is what the search for near names needs of a section.
type indexedName struct {
	section *Section
	plain   string // the name's letters and digits
	numbers []float64
	key     string
}

func newIndex(sections []*Section) *index {
	x := &index{full: map[string][]*Section{}, short: map[string][]*Section{}, stem: map[string][]*Section{}, exact: map[string][]*Section{}}
	for _, s := range sections {
		n := readSpelling(s.Designation).numbers
		x.names = append(x.names, indexedName{s, plainKey(s.Name()), n, key(n)})
		put(x.exact, plainKey(s.Name()), s)
		put(x.exact, plainKey(s.Designation), s)
		if len(n) == 0 {
			continue
		}
		put(x.full, key(n), s)
		for _, short := range shortForms(s, n) {
			put(x.short, key(short), s)
		}
		if last := len(n) - 1; last > 0 {
			put(x.stem, key(n[:last]), s)
		}
	}
	return x
}

func put(m map[string][]*Section, key string, s *Section) {
	if !slices.Contains(m[key], s) {
		m[key] = append(m[key], s)
	}
}

// shortForms are the numbers of a section's name as the trade shortens them.
func shortForms(s *Section, n []float64) [][]float64 {
	last := len(n) - 1
	var forms [][]float64
	switch s.Shape {
	case ShapeI:
		if r := math.Round(n[last]); last > 0 && r != n[last] {
			forms = append(forms, append(slices.Clone(n[:last]), r)) // HD 260x54
		}
	case ShapeCHS:
		if last == 1 { // 139.7x5 is called 140x5 and 139x5
			forms = append(forms, []float64{math.Round(n[0]), n[1]}, []float64{math.Floor(n[0]), n[1]})
		}
	}
	if len(n) == 3 && (s.Shape == ShapeI || s.Shape == ShapeChannel || n[0] == n[1]) {
		forms = append(forms, []float64{n[0], n[2]}) // 203 UC 60, SHS 150x10
	}
	return forms
}

// bySpelling returns the sections that a spelling fits: those with all of its
// dimensions before those that it shortens. Finishes are not looked at.
func (x *index) bySpelling(sp *spelling) []*Section {
	families, known := familyByWord[sp.word]
	if sp.odd != "" || len(sp.numbers) == 0 || sp.word != "" && !known {
		return nil
	}
	k := key(sp.numbers)
	for _, m := range []map[string][]*Section{x.full, x.short, x.stem} {
		if found := ofFamilies(m[k], families); len(found) > 0 {
			return found
		}
	}
	// The trade calls square hollow sections rectangular, too; then all three
	// dimensions stand there.
	if len(families) == 1 && families[0] == "RHS" && len(sp.numbers) == 3 {
		return ofFamilies(x.full[k], []string{"SHS"})
	}
	return nil
}

// partial tells whether a spelling leaves the thickness of a hollow section or
// an angle open. The serial size of an open section settles it where the
// product standard rolls one alone.
func (sp *spelling) partial(s *Section) bool {
	if s.Shape == ShapeI || s.Shape == ShapeChannel {
		return false
	}
	n := readSpelling(s.Designation).numbers
	return len(sp.numbers) == len(n)-1 && slices.Equal(sp.numbers, n[:len(n)-1])
}

// ofFamilies keeps the sections of the families that a name states.
func ofFamilies(found []*Section, names []string) []*Section {
	if names == nil {
		return found
	}
	return keep(found, func(s *Section) bool { return slices.Contains(names, s.Family) })
}

// plainKey is a name's letters and digits alone.
func plainKey(name string) string {
	return strings.ReplaceAll(plainUpper(name), " ", "")
}
