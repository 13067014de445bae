package workbook

import (
	"unicode/utf8"

	"stanchion/schedule"
)

// findHeadings finds the rows of the headings: the columns' own headings stand
// in the last row of the schedule's header, and, where that leaves room above
// them, headings over groups and over the whole.
func (p *Plan) findHeadings(e *extent, obstacles []area) {
	h := p.block.Header
	pl := &p.place
	pl.heading, pl.unit = h.Last, h.UnitRow
	above := h.Last - 1
	if p.free(above, e, obstacles) && p.grouped() {
		pl.group = above
		above--
	}
	if p.block.Title != "" && p.free(above, e, obstacles) {
		pl.title = above
	}
	for _, row := range []int{pl.title, pl.group} {
		if row > 0 {
			pl.rows.firstRow = min(pl.rows.firstRow, row)
		}
	}
}

func (p *Plan) grouped() bool {
	for i := range p.block.Columns {
		if p.block.Columns[i].Group != "" {
			return true
		}
	}
	return false
}

// free reports whether a row above the header is free where the block stands.
func (p *Plan) free(row int, e *extent, obstacles []area) bool {
	if row < 1 {
		return false
	}
	pl := &p.place
	here := area{row, row, pl.rows.firstCol, pl.rows.lastCol}
	for _, o := range obstacles {
		if o.meets(here) {
			return false
		}
	}
	right := furthest(e.valued, row, row)
	left := len(pl.old.columns) > 0 && row >= pl.old.area.firstRow && right <= pl.old.area.lastCol+1
	return right <= pl.rows.firstCol || left
}

// headingCell is one cell of the block's headings.
type headingCell struct {
	row, col int
	text     string
	look     Look
}

// headings returns the cells of the block's headings, and the ranges to merge.
func (p *Plan) headings() (cells []headingCell, merges []area) {
	pl := &p.place
	for i := range p.block.Columns {
		c := &p.block.Columns[i]
		col := pl.rows.firstCol + i
		edge := p.edge(i)
		if pl.unit > 0 {
			cells = append(cells, headingCell{pl.unit, col, c.Unit, Look{Role: Unit, Align: alignOf(c), Edge: edge}})
		}
		cells = append(cells, headingCell{pl.heading, col, p.headingText(i), Look{Role: Heading, Align: alignOf(c), Edge: edge}})
	}
	if pl.group > 0 {
		cells, merges = p.groups(cells, merges)
	}
	if pl.title > 0 {
		a := area{pl.title, pl.title, pl.rows.firstCol, pl.rows.lastCol}
		if n := p.block.Printed; n > 0 {
			a.lastCol = pl.rows.firstCol + n - 1 // what is merged across the edge of the paper is cut there
		}
		cells, merges = spanned(cells, merges, a, p.block.Title, Look{Role: Heading, Align: Left, Edge: true})
	}
	return cells, merges
}

// headingText returns the heading of a column. Where the schedule has a row of
// units, the unit stands there.
func (p *Plan) headingText(i int) string {
	c := p.block.Columns[i]
	if p.place.unit > 0 {
		c.Unit = ""
	}
	return c.Heading()
}

func alignOf(c *schedule.ResultColumn) Align {
	if c.Numeric {
		return Right
	}
	return Left
}

// edge reports whether something new begins with a column.
func (p *Plan) edge(i int) bool {
	return i == 0 || p.block.Columns[i].Group != p.block.Columns[i-1].Group
}

// groups adds the headings over groups.
func (p *Plan) groups(cells []headingCell, merges []area) ([]headingCell, []area) {
	for i := 0; i < len(p.block.Columns); {
		j := i + 1
		for j < len(p.block.Columns) && !p.edge(j) {
			j++
		}
		first := p.place.rows.firstCol
		a := area{p.place.group, p.place.group, first + i, first + j - 1}
		cells, merges = spanned(cells, merges, a, p.block.Columns[i].Group, Look{Role: Group, Edge: true})
		i = j
	}
	return cells, merges
}

// spanned adds a heading over several columns.
func spanned(cells []headingCell, merges []area, a area, text string, look Look) ([]headingCell, []area) {
	for col := a.firstCol; col <= a.lastCol; col++ {
		cells = append(cells, headingCell{a.firstRow, col, text, look})
		text, look.Edge = "", false
	}
	if a.lastCol > a.firstCol {
		merges = append(merges, a)
	}
	return cells, merges
}

// widths returns the widths of the block's columns, in characters: enough for
// the values, and for the heading in the lines that the header row has.
func (p *Plan) widths(lines int) []float64 {
	out := make([]float64, len(p.block.Columns))
	for i := range p.block.Columns {
		c := &p.block.Columns[i]
		out[i] = float64(max(c.Width, boldWidth(wrapped(p.headingText(i), lines)))) + 2
	}
	return out
}

// boldWidth returns the width, in characters of usual text, of characters in
// bold.
func boldWidth(n int) int { return (n*9 + 7) / 8 }

// wrapped returns the least width at which a text takes so many lines.
func wrapped(text string, lines int) int {
	words := splitWords(text)
	width := 0
	for _, w := range words {
		width = max(width, utf8.RuneCountInString(w))
	}
	for linesAt(words, width) > max(1, lines) {
		width++
	}
	return width
}

func splitWords(text string) []string {
	var out []string
	word := ""
	for _, r := range text {
		if r == ' ' {
			out = append(out, word)
			word = ""
			continue
		}
		word += string(r)
	}
	return append(out, word)
}

func linesAt(words []string, width int) int {
	lines, used := 1, -1
	for _, w := range words {
		n := utf8.RuneCountInString(w)
		if used >= 0 && used+1+n > width {
			lines, used = lines+1, -1
		}
		used += 1 + n
	}
	return lines
}
