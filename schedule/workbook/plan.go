package workbook

import (
	"fmt"
	"unicode/utf8"

	"stanchion/schedule"
)

// Block is what is written beside the schedule: one column for each kind of
// result, and one row for each row that has results.
type Block struct {
	Sheet   string
	Header  schedule.Header
	LastRow int    // of the rows that have results
	Title   string // over the whole block, where there is room for it
	Columns []schedule.ResultColumn
	// Cells returns the results of a row, one a column; none where the row has
	// no results. Rows are asked for in rising order, each once, and again for
	// each time that the workbook is written.
	Cells func(row int) []schedule.Value
	// Link returns a column of the block, counted from 0, whose cell in a row
	// leads to a place in the workbook ('Sheet'!A1); no place: it leads
	// nowhere. nil: no cell does.
	Link func(row int) (column int, place string)
}

// Plan says where results go in a workbook, before anything is written.
type Plan struct {
	book    *Book
	sheet   *sheet
	layout  *layout
	block   Block
	place   place
	letters lettering
}

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

// Plan finds the place for a block of results.
func (b *Book) Plan(block Block) (p *Plan, err error) {
	defer func() {
		if r := recover(); r != nil {
			p, err = nil, damaged(b.name, fmt.Errorf("%v", r))
		}
	}()
	s := b.find(block.Sheet)
	if s == nil {
		return nil, refuse(b.name, fmt.Sprintf("has no sheet %q that holds cells", block.Sheet), "name one that it has")
	}
	if s.own != "" {
		return nil, refuse(b.name, fmt.Sprintf("sheet %q was written by an earlier run", s.name), "name the sheet that holds the schedule")
	}
	p = &Plan{book: b, sheet: s, block: block}
	if p.layout, err = b.layoutOf(s); err != nil {
		return nil, explain(b.name, err)
	}
	if p.layout.data == nil {
		return nil, refuse(b.name, fmt.Sprintf("sheet %q has no cells", s.name), "name another")
	}
	if err := p.find(); err != nil {
		return nil, explain(b.name, err)
	}
	if p.letters, err = b.lettering(); err != nil {
		return nil, explain(b.name, err)
	}
	return p, nil
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

// Column returns the letters of a column of the block.
func (p *Plan) Column(i int) string { return columnName(p.place.rows.firstCol + i) }

// Range returns the results of a column of the block, from the first row that
// can hold results to the last, for a formula or a chart:
// 'Columns'!$AC$7:$AC$66.
func (p *Plan) Range(i int) string {
	col := p.place.rows.firstCol + i
	first := max(p.place.heading, p.place.unit) + 1
	return quoted(p.sheet.name) + "!" + area{first, max(first, p.block.LastRow), col, col}.absolute()
}

// Warnings says what a person should know before the workbook is written.
func (p *Plan) Warnings() []string {
	var out []string
	for _, name := range p.book.pkg.Names() {
		if hasPrefixFold(name, "_xmlsignatures/") {
			out = append(out, p.book.name+" is digitally signed: the signature does not hold for the annotated copy")
			break
		}
	}
	return out
}

func hasPrefixFold(s, prefix string) bool {
	return len(s) >= len(prefix) && partKey(s[:len(prefix)]) == prefix
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
