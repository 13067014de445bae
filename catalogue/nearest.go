package catalogue

import (
	"cmp"
	"math"
	"slices"
	"strings"
	"sync"

	"github.com/agnivade/levenshtein"
)

const (
	longestName  = 64   // bytes; a longer text is no misspelt name
	mostMisses   = 4096 // errors kept
	nearestShown = 5
)

// misses keeps the errors of names that were not found: long schedules repeat
// their mistakes, and the search for near names looks at every section.
type misses struct {
	sync.Mutex
	byName map[string]*UnknownSectionError
}

// unknown returns the error with the nearest names.
func (c *Catalogue) unknown(name string, sp *spelling, reason string) error {
	m := &c.index.misses
	m.Lock()
	defer m.Unlock()
	k := reason + "\x00" + name
	if e := m.byName[k]; e != nil {
		return e
	}
	e := c.newUnknown(name, sp, reason)
	if len(name) <= longestName && len(m.byName) < mostMisses {
		if m.byName == nil {
			m.byName = map[string]*UnknownSectionError{}
		}
		m.byName[k] = e
	}
	return e
}

func (c *Catalogue) newUnknown(name string, sp *spelling, reason string) *UnknownSectionError {
	e := &UnknownSectionError{Name: shortened(name), Reason: reason}
	if len(name) > longestName {
		return e
	}
	if turned := c.index.turned(sp); turned != nil {
		e.Nearest = namesOf(turned)
		e.Reason = cmp.Or(reason, "the greater dimension comes first")
		return e
	}
	e.Nearest = c.index.nearest(name, sp)
	return e
}

// shortened cuts a text that is too long to be shown whole.
func shortened(name string) string {
	if len(name) <= longestName {
		return name
	}
	return strings.ToValidUTF8(name[:longestName], "") + "..."
}

// turned finds the sections of a name whose first two dimensions stand the
// wrong way round.
func (x *index) turned(sp *spelling) []*Section {
	n := sp.numbers
	if len(n) != 3 || n[0] >= n[1] || sp.odd != "" {
		return nil
	}
	found := ofFamilies(x.full[key([]float64{n[1], n[0], n[2]})], familyByWord[sp.word])
	if sp.finish == FinishNone {
		return found
	}
	return keep(found, func(s *Section) bool { return s.Finish == sp.finish })
}

// nearest names the nearest sections, of the family stated where there is one:
// by edit distance of the name or of its dimensions, then by how near the
// numbers are.
func (x *index) nearest(name string, sp *spelling) []string {
	type scored struct {
		s           *Section
		edits       int
		numbersAway float64
	}
	plain, k := plainKey(name), key(sp.numbers)
	families := familyByWord[sp.word]
	var near []scored
	for i := range x.names {
		n := &x.names[i]
		if sp.finish != FinishNone && n.section.Finish != sp.finish || families != nil && !slices.Contains(families, n.section.Family) {
			continue
		}
		edits := levenshtein.ComputeDistance(plain, n.plain)
		if sp.word != "" && len(sp.numbers) > 0 || len(sp.numbers) > 1 {
			edits = min(edits, levenshtein.ComputeDistance(k, n.key))
		}
		if edits <= max(3, len(plain)/2) {
			near = append(near, scored{n.section, edits, apart(sp.numbers, n.numbers)})
		}
	}
	slices.SortStableFunc(near, func(a, b scored) int {
		return cmp.Or(cmp.Compare(a.edits, b.edits), cmp.Compare(a.numbersAway, b.numbersAway))
	})
	var names []string
	for _, n := range near[:min(nearestShown, len(near))] {
		names = append(names, n.s.Name())
	}
	return names
}

// apart is how far two lists of dimensions are from each other; a missing one
// counts as 0.
func apart(a, b []float64) float64 {
	total := 0.0
	for i := range max(len(a), len(b)) {
		var x, y float64
		if i < len(a) {
			x = a[i]
		}
		if i < len(b) {
			y = b[i]
		}
		total += math.Abs(x - y)
	}
	return total
}
