package schedule

import (
	"fmt"
	"slices"
)

// layout is a block of rows taken as the header of a schedule.
type layout struct {
	sheet       string
	first, last int // rows, from 1
	unitRow     int
	skipTo      int // last row that belongs to the header, units and numbering included
	bindings    []Binding
	old         []oldColumn
	clashes     [][]Binding // columns that supply the same field with the same right
	troubles    []Problem   // headings that cannot be read as they stand
	left        []Seen      // headings of a field that are not read
	other       []Seen      // headings that say nothing to the program
	types       []Binding   // headings that are Family where their values are
	headings    int
	texts       map[int][]string // by column, what the header and unit rows hold, folded
	width       int              // columns that hold a heading
	cells       int              // cells of the longest row
	score       float64
}

// oldColumn is a column of an earlier run's results.
type oldColumn struct {
	col  int
	name string // without ResultMark and unit
}

// headerScan finds the header in the first rows of a sheet.
type headerScan struct {
	src    Source
	sheet  string
	rows   []*Row
	hidden map[int]bool
	maps   *mapping
	cache  map[string]*meaning
}

const (
	headerDepth = 60  // rows of a sheet among which the header must start
	maxHeader   = 3   // rows of a header
	maxColumns  = 512 // beyond it no office keeps a column of a schedule
)

// best returns the block of rows that reads best as a header.
func (h *headerScan) best() *layout {
	var best *layout
	for i := range h.rows {
		if !h.promising(i) {
			continue
		}
		for depth := 1; depth <= maxHeader && i+depth <= len(h.rows); depth++ {
			if h.rows[i+depth-1].Number != h.rows[i].Number+depth-1 {
				break
			}
			l := h.layout(h.rows[i : i+depth])
			if best == nil || l.score > best.score {
				best = l
			}
		}
	}
	if best == nil {
		return h.widest()
	}
	return best
}

// widest returns the row with the most texts, to be shown to people where none
// names a field; nil where there is no text.
func (h *headerScan) widest() *layout {
	var found *Row
	most := 0
	for _, r := range h.rows {
		texts := 0
		for i := range r.Cells {
			if r.Cells[i].Kind == Text && !r.Cells[i].Merged && !r.Cells[i].empty() {
				texts++
			}
		}
		if texts > most {
			found, most = r, texts
		}
	}
	if found == nil {
		return nil
	}
	return h.layout([]*Row{found})
}

// promising reports whether a header may start at row i: a text there or in
// the rows that could belong to its header names a field.
func (h *headerScan) promising(i int) bool {
	for j := i; j < min(i+maxHeader, len(h.rows)); j++ {
		r := h.rows[j]
		for c := range r.Cells {
			if r.Cells[c].Kind == Text && !r.Cells[c].empty() && h.names(r.Cells[c].Text) {
				return true
			}
		}
	}
	return false
}

func (h *headerScan) names(text string) bool {
	m := h.read(tidy(text))
	return len(m.keys) > 0 || m.vetoed || h.maps.find(text) != nil
}

// read reads a heading, or remembers it.
func (h *headerScan) read(text string) *meaning {
	if m, ok := h.cache[text]; ok {
		return m
	}
	m := readHeading(text)
	h.cache[text] = m
	return m
}

// layout reads a block of rows as a header.
func (h *headerScan) layout(block []*Row) *layout {
	l := &layout{sheet: h.sheet, first: block[0].Number, last: block[len(block)-1].Number, texts: map[int][]string{}}
	l.skipTo = l.last
	width := 0
	for _, r := range block {
		width = max(width, len(r.Cells))
	}
	l.cells = width
	vetoed := 0
	for col := range min(width, maxColumns) {
		c := h.column(block, col)
		if c == nil {
			continue
		}
		l.headings++
		l.width = col + 1
		l.texts[col] = c.folded()
		if name, ok := c.old(); ok {
			l.old = append(l.old, oldColumn{col, name})
			continue
		}
		if h.bind(l, c) {
			vetoed++
		}
	}
	l.settle()
	l.rate(len(block), vetoed)
	return l
}

// bind adds what a column supplies. It reports whether the heading speaks of
// a field, and of values that are not design values.
func (h *headerScan) bind(l *layout, c *headerColumn) (vetoed bool) {
	heading, m, rank := h.meaning(c)
	where := h.src.Where(h.sheet, c.row, c.col)
	seen := Seen{Cell: where, Heading: heading}
	switch {
	case rank == 0 && c.isType():
		k := key{field: familyField}
		l.types = append(l.types, Binding{Col: c.col, Heading: heading, Cell: where, Field: k.String(), key: k, rank: 1, hidden: h.hidden[c.col]})
	case m == nil && rank == mapped:
		seen.Why = "the mapping says so"
		l.left = append(l.left, seen)
	case m == nil:
		if _, u, _ := splitUnit(heading); u != nil && (u.of == force || u.of == moment) {
			seen.Why = "it is in " + u.name + ", and nothing says which field it is: map it if it is one"
			l.left = append(l.left, seen)
			break
		}
		l.other = append(l.other, seen)
	case m.vetoed:
		seen.Why = "it speaks of loads that are not design values (dead, live, G, Q, SLS ...): map it if its values are"
		l.left = append(l.left, seen)
		return true
	case m.unclear != "":
		seen.Why = "it may speak of " + m.unclear + ", and is not understood: map it if it does"
		l.left = append(l.left, seen)
	case m.trouble != "":
		p := Problem{File: h.src.Name(), Cell: where, Row: c.row, Col: c.col, Heading: heading, What: fmt.Sprintf("heading %q: %s", heading, m.trouble), Do: m.remedy}
		l.troubles = append(l.troubles, p)
	default:
		for _, k := range m.keys {
			b := Binding{Col: c.col, Heading: heading, Cell: where, Field: k.String(), Combination: m.combination,
				key: k, above: m.above, rank: rank, hidden: h.hidden[c.col], unit: k.line().of.defaultUnit()}
			if m.unit != nil {
				b.unit, b.named = *m.unit, true
			}
			b.Unit = b.unit.name
			l.bindings = append(l.bindings, b)
		}
	}
	return false
}

// rate tells how much a block looks like the header: what it names, and what
// of it is needed.
func (l *layout) rate(depth, vetoed int) {
	names := map[key]int{}
	combinations := map[string]bool{}
	for i := range l.bindings {
		b := &l.bindings[i]
		names[b.key] = max(names[b.key], min(b.rank, 2))
		if b.key.field == axialField && b.above == nil {
			combinations[foldName(b.Combination)] = true
		}
	}
	l.score += float64(max(0, len(combinations)-1)) // a row that tells combinations apart belongs to the header
	for k, rank := range names {
		l.score += float64(rank)
		if k.field == lengthField || k.field == axialField {
			l.score += 4
		}
	}
	l.score += 2*float64(vetoed) + float64(len(l.troubles)) - 3*float64(len(l.clashes)) - 0.25*float64(depth-1)
}

// has reports whether a field is supplied.
func (l *layout) has(f fieldName) bool {
	return slices.ContainsFunc(l.bindings, func(b Binding) bool { return b.key.field == f })
}

// missing names the needed fields that nothing supplies.
func (l *layout) missing(loads bool) []string {
	var list []string
	if !l.has(lengthField) {
		list = append(list, "Length")
	}
	if loads && !l.has(axialField) {
		list = append(list, "N_Ed")
	}
	return list
}
