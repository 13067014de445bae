package schedule

import (
	"fmt"
	"slices"
	"strings"
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
	headerDepth = 60 // rows of a sheet among which the header must start
	maxHeader   = 3  // rows of a header
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
	return best
}

// promising reports whether a header may start at row i: a text there or in
// the rows that could belong to its header names a field.
func (h *headerScan) promising(i int) bool {
	for j := i; j < min(i+maxHeader, len(h.rows)); j++ {
		r := h.rows[j]
		for c := range r.Cells {
			if r.Cells[c].Kind == Text && !r.Cells[c].empty() && h.speaks(r.Cells[c].Text) {
				return true
			}
		}
	}
	return false
}

func (h *headerScan) speaks(text string) bool {
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
	for col := range width {
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
	case m == nil && rank == mapped:
		seen.Why = "the mapping says so"
		l.left = append(l.left, seen)
	case m == nil:
		l.other = append(l.other, seen)
	case m.vetoed:
		seen.Why = "it does not speak of design values"
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
	for i := range l.bindings {
		names[l.bindings[i].key] = max(names[l.bindings[i].key], min(l.bindings[i].rank, 2))
	}
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

// headerColumn is what the header holds over one column.
type headerColumn struct {
	col, row int      // row of the lowest text
	own      []string // texts of the column from the top, merged repeats once
	filled   []string // with blanks filled from the heading to their left; nil: the same
}

// column gathers the header texts over a column; nil where there are none, or
// where all belong to a cell merged from the left.
func (h *headerScan) column(block []*Row, col int) *headerColumn {
	c := &headerColumn{col: col}
	filled, spread := false, true
	for i, r := range block {
		cell := r.at(col)
		text := tidy(cell.text())
		if text == "" {
			if group := h.groupHeading(block, i, col); group != "" {
				c.filled = append(c.filled, group)
				filled = true
			}
			continue
		}
		if !(cell.Merged && col > 0 && tidy(r.at(col-1).text()) == text) {
			spread = false
		}
		c.row = r.Number
		if n := len(c.own); n == 0 || c.own[n-1] != text {
			c.own, c.filled = append(c.own, text), append(c.filled, text)
		}
	}
	if len(c.own) == 0 || spread {
		return nil
	}
	if !filled {
		c.filled = nil
	}
	return c
}

// groupHeading returns the heading to the left that a blank cell of an upper
// header row may stand under: where cells are not merged, or have lost it, a
// group is headed in its first column alone.
func (h *headerScan) groupHeading(block []*Row, i, col int) string {
	if i == len(block)-1 {
		return ""
	}
	r := block[i]
	others := 0
	for j := range r.Cells {
		if r.Cells[j].Kind != Blank && !r.Cells[j].Merged {
			others++
		}
	}
	for j := min(col, len(r.Cells)) - 1; j >= 0; j-- {
		cell := r.at(j)
		if cell.Kind == Blank {
			continue
		}
		if cell.Merged || j == 0 && others < 2 {
			return "" // the extent of a merged heading is known; a lone text at the left is a title
		}
		return tidy(cell.text())
	}
	return ""
}

func (c *headerColumn) folded() []string {
	list := make([]string, len(c.own))
	for i, t := range c.own {
		list[i] = strings.ToLower(t)
	}
	return list
}

// old reports whether an earlier run wrote the column, and what it holds.
func (c *headerColumn) old() (string, bool) {
	for _, t := range c.own {
		if name, ok := resultName(t); ok {
			return name, true
		}
	}
	return "", false
}

// resultName takes the mark and the unit off a heading of the result columns.
func resultName(heading string) (string, bool) {
	mark := strings.TrimSpace(ResultMark)
	heading = strings.TrimSpace(heading)
	if len(heading) <= len(mark) || !strings.EqualFold(heading[:len(mark)], mark) {
		return "", false
	}
	name, _, _ := strings.Cut(heading[len(mark):], "[")
	return strings.TrimSpace(name), true
}

// meaning finds what the header over a column says: all its texts together,
// or the lower ones where those above head a group that adds nothing.
func (h *headerScan) meaning(c *headerColumn) (heading string, best *meaning, rank int) {
	heading = strings.Join(c.own, " ")
	if e := h.mapped(c); e != nil {
		e.used = true
		if e.ignore {
			return heading, nil, mapped
		}
		m := *e.meaning
		if _, u, _ := splitUnit(heading); u != nil && u.measures(m.keys[0].line().of) {
			m.unit = u
		}
		return heading, &m, mapped
	}
	unclear := ""
	for i, text := range c.candidates() {
		m := h.read(text)
		unclear = or(unclear, m.unclear)
		if m.vetoed && (i == 0 || len(c.filled) > 0 && i == 1) {
			return text, m, 0
		}
		if better(m, best) {
			heading, best = text, m
		}
	}
	if best == nil && unclear != "" {
		best = &meaning{unclear: unclear}
	}
	return heading, best, best.rank()
}

func or(a, b string) string {
	if a != "" {
		return a
	}
	return b
}

func (h *headerScan) mapped(c *headerColumn) *mapEntry {
	for _, text := range append(c.candidates(), c.own...) {
		if e := h.maps.find(text); e != nil {
			return e
		}
	}
	return nil
}

// candidates are the texts that the header over a column may be read as, the
// likeliest first.
func (c *headerColumn) candidates() []string {
	var list []string
	for i := range max(len(c.own), len(c.filled)) {
		if i < len(c.own) {
			list = append(list, strings.Join(c.own[i:], " "))
		}
		if i < len(c.filled) {
			list = append(list, strings.Join(c.filled[i:], " "))
		}
	}
	return slices.Compact(list)
}

// better reports whether a says more than b.
func better(a, b *meaning) bool {
	if len(a.keys) == 0 {
		return false
	}
	if b == nil || a.rank() != b.rank() {
		return a.rank() > b.rank()
	}
	if (a.trouble == "") != (b.trouble == "") {
		return a.trouble == ""
	}
	return a.combination != "" && b.combination == "" || a.above != nil && b.above == nil
}
