package schedule

import (
	"slices"
	"strings"
)

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
