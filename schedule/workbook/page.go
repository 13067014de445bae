package workbook

import (
	"fmt"
	"strings"
	"unicode"

	"stanchion/design"
)

// Page is a Sheet being filled from the top.
type Page struct {
	Sheet
	spans [][2]int // merged columns of the last row
}

// NewPage starts a page with a title and columns of these widths.
func NewPage(name, title string, widths ...float64) *Page {
	p := &Page{Sheet: Sheet{Name: name, Widths: widths, PagesWide: 1}}
	p.Row(Cell{Value: title, Look: Look{Role: Title}})
	return p
}

// Row adds a row, high enough for the texts that may need several lines: not
// every spreadsheet program sees to that on opening.
func (p *Page) Row(cells ...Cell) {
	p.Rows = append(p.Rows, cells)
	p.spans = p.spans[:0]
	p.fit()
}

// fit gives the last row the height that its texts need.
func (p *Page) fit() {
	n := len(p.Rows)
	lines := 1
	for i, c := range p.Rows[n-1] {
		if text := c.text(); text != "" && c.Look.Wrap && i < len(p.Widths) {
			width := p.widthOf(i) - 2
			if c.Look.Bold {
				width *= 8.0 / 9
			}
			lines = max(lines, linesIn(text, width))
		}
	}
	delete(p.Heights, n)
	if lines > 1 {
		p.setHeight(n, float64(lines))
	}
}

// widthOf returns the width of a cell of the last row, merged or not.
func (p *Page) widthOf(col int) float64 {
	last := col
	for _, s := range p.spans {
		if s[0] == col {
			last = s[1]
		}
	}
	width := 0.0
	for _, w := range p.Widths[col:min(last+1, len(p.Widths))] {
		width += w
	}
	return width
}

// linesIn returns how many lines a text takes in a column of that width, by
// the words that fit on each.
func linesIn(text string, width float64) int {
	lines := 0
	for _, line := range strings.Split(text, "\n") {
		lines++
		used := -1.0
		for word := range strings.SplitSeq(line, " ") {
			w := textWidth(word)
			if used >= 0 && used+narrow+w > width {
				lines, used = lines+1, -narrow
			}
			used = max(0, used+narrow) + w
		}
	}
	return lines
}

// narrow is the width of blanks and signs of little width, in figures.
const narrow = 0.62

// textWidth returns the width of a text, in figures, much as any typeface has
// it.
func textWidth(text string) float64 {
	w := 0.0
	for _, r := range text {
		switch {
		case unicode.Is(unicode.Mn, r):
		case strings.ContainsRune(" .,:;|()⁻⁰¹²³⁴⁵⁶⁷⁸⁹", r):
			w += narrow
		default:
			w++
		}
	}
	return w
}

// SetLines gives the last row room for so many lines.
func (p *Page) SetLines(lines float64) { p.setHeight(len(p.Rows), lines) }

// setHeight makes a row high enough for so many lines.
func (p *Page) setHeight(row int, lines float64) {
	if p.Heights == nil {
		p.Heights = map[int]float64{}
	}
	p.Heights[row] = min(tallest, lineOfPage*lines)
}

const (
	lineOfPage = 15.5 // points
	tallest    = 409  // points, the most that a row can have
)

// Blank leaves a row out.
func (p *Page) Blank() { p.Row() }

// Begin begins a table with the next row, and ends the one before: a table that
// would be cut by the end of a printed page begins the next page.
func (p *Page) Begin() { p.Tables = append(p.Tables, len(p.Rows)+1) }

// Chapter begins a chapter with the next row: tables that are kept on one
// printed page where they can be, and else begin one.
func (p *Page) Chapter() { p.Chapters = append(p.Chapters, len(p.Rows)+1) }

// Headings adds a row of headings over columns of text. One that opens with
// ">" stands over numbers.
func (p *Page) Headings(texts ...string) {
	var cells []Cell
	for _, t := range texts {
		text, number := strings.CutPrefix(t, ">")
		look := Look{Role: Heading, Align: Left}
		if number {
			look.Align = Right
		}
		cells = append(cells, Cell{Value: text, Look: look})
	}
	p.Row(cells...)
}

// Totals adds a row of sums.
func (p *Page) Totals(cells ...Cell) {
	for i := range cells {
		cells[i].Look.Role = Total
	}
	p.Row(cells...)
}

// Across adds a text over the first columns of the page, as high as it needs.
func (p *Page) Across(columns int, c Cell) {
	c.Look.Wrap = true
	p.Row(c)
	p.Span(0, columns-1)
}

// Span merges cells of the last row, from one column to another.
func (p *Page) Span(from, to int) {
	n := len(p.Rows)
	p.Merges = append(p.Merges, fmt.Sprintf("%s%d:%s%d", columnName(from), n, columnName(to), n))
	p.spans = append(p.spans, [2]int{from, to})
	p.fit()
}

// Freeze keeps the rows so far in view and repeats them on every printed page.
func (p *Page) Freeze() { p.FreezeRows, p.RepeatRows = len(p.Rows), len(p.Rows) }

// TextCell is a text of a table.
func TextCell(s string) Cell { return Cell{Value: s, Look: Look{Role: Result, Align: Left}} }

// WordsCell is a text of a table that may need several lines.
func WordsCell(s string) Cell {
	return Cell{Value: s, Look: Look{Role: Result, Align: Left, Wrap: true}}
}

// NumberCell is a number of a table, shown in a number format.
func NumberCell(x float64, format string) Cell {
	return Cell{Value: x, Look: Look{Role: Result, Align: Right, Format: format}}
}

// OutcomeCell is a status, drawn so that it stands out where it must.
func OutcomeCell(s design.Status) Cell {
	return Cell{Value: s.String(), Look: Look{Role: outcomes[s.String()], Align: Left}}
}

// LabelCell names what stands beside it.
func LabelCell(s string) Cell { return Cell{Value: s, Look: Look{Role: Label}} }

// Place is a cell of a sheet as a link names it: 'Columns'!B12. cell is as
// messages name it; empty where it is none of a workbook.
func Place(sheet, cell string) string {
	i := strings.LastIndexByte(cell, '!')
	if i < 0 {
		return ""
	}
	return quoted(sheet) + cell[i:]
}
