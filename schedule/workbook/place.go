package workbook

import (
	"fmt"
)

// place is where the block stands. Rows count from 1, 0 being none; columns
// from 0.
type place struct {
	title, group, heading, unit int
	rows                        area // heading rows and results together
	old                         old
}

// old is what an earlier run left.
type old struct {
	columns  map[int]bool
	area     area
	adjacent bool // its columns stand side by side
}

// find settles rows and columns.
func (p *Plan) find() error {
	e, err := p.book.extentOf(p.sheet)
	if err != nil {
		return err
	}
	obstacles, err := p.obstacles()
	if err != nil {
		return err
	}
	p.findOld()
	h := p.block.Header
	first := max(1, min(h.First, h.Last))
	last := max(p.block.LastRow, h.Last, h.UnitRow)
	start := p.start(e, obstacles, first, last)
	p.place.rows = area{first, last, start, start + len(p.block.Columns) - 1}
	if p.place.rows.lastCol >= maxColumns {
		return refuse(p.book.name, fmt.Sprintf("sheet %q is used up to column %s, and the results need %d more", p.sheet.name, columnName(start-1), len(p.block.Columns)),
			"clear what is not used at its right")
	}
	p.findHeadings(e, obstacles)
	return nil
}

// findOld finds what an earlier run left: the columns by their headings, the
// rows by the name that the run gave them.
func (p *Plan) findOld() {
	columns := p.block.Header.Old
	if len(columns) == 0 {
		return
	}
	o := old{columns: map[int]bool{}, adjacent: true}
	low, high := columns[0], columns[0]
	for _, c := range columns {
		o.columns[c] = true
		low, high = min(low, c), max(high, c)
	}
	o.adjacent = high-low+1 == len(o.columns)
	o.area = area{p.block.Header.First, p.block.LastRow, low, high}
	if a, ok := p.book.oldResults(p.sheet); ok && a.meets(area{1, maxRows, low, high}) {
		o.area.firstRow = min(o.area.firstRow, a.firstRow)
		o.area.lastRow = max(o.area.lastRow, a.lastRow)
	}
	p.place.old = o
}

// maxStyledGap is how many columns of cells that are only styled the block
// goes round. Beyond that somebody has styled whole rows.
const maxStyledGap = 40

// start returns the first column of the block.
func (p *Plan) start(e *extent, obstacles []area, first, last int) int {
	o := &p.place.old
	n := len(p.block.Columns)
	width := p.block.Header.Width
	if len(o.columns) > 0 && o.adjacent {
		end := o.area.lastCol + 1
		beyond := max(furthest(e.valued, first, last), clear(obstacles, area{first, last, end, end + n})) > end
		if n <= len(o.columns) || !beyond && width <= end {
			return o.area.firstCol
		}
	}
	start := width
	// What reaches no further than the results of an earlier run is those.
	if valued := furthest(e.valued, first, last); len(o.columns) == 0 || valued > o.area.lastCol+1 {
		start = max(start, valued)
	}
	if styled := furthest(e.styled, first, last); len(o.columns) == 0 && styled > start && styled <= start+maxStyledGap {
		start = styled
	}
	return clear(obstacles, area{first, last, start, start + n - 1})
}

// clear moves an area to the right until it meets no obstacle, and returns its
// first column.
func clear(obstacles []area, a area) int {
	n := a.lastCol - a.firstCol
	for moved := true; moved; {
		moved = false
		for _, o := range obstacles {
			if o.meets(a) && o.lastCol < maxColumns-1 {
				a.firstCol = o.lastCol + 1
				a.lastCol = a.firstCol + n
				moved = true
			}
		}
	}
	return a.firstCol
}

// obstacles are merged cells, tables and drawings, which must not be written
// into or below.
func (p *Plan) obstacles() ([]area, error) {
	var out []area
	for _, m := range p.layout.merged {
		if !p.ours(m) {
			out = append(out, m)
		}
	}
	tables, err := p.book.tables(p.sheet)
	if err != nil {
		return nil, err
	}
	for _, t := range tables {
		if !t.area.meets(area{p.block.Header.Last, p.block.Header.Last, 0, max(0, p.block.Header.Width-1)}) {
			out = append(out, t.area)
		}
	}
	drawn, err := p.book.drawn(p.sheet)
	return append(out, drawn...), err
}

// ours reports whether a merged range is a heading that an earlier run merged.
func (p *Plan) ours(m area) bool {
	a, ok := p.book.oldResults(p.sheet)
	return ok && a.contains(m) && m.lastRow <= p.block.Header.Last
}
