package workbook

import (
	"fmt"
	"strings"
)

// Page is a Sheet being filled from the top.
type Page struct{ Sheet }

// NewPage starts a page with a title and columns of these widths.
func NewPage(name, title string, widths ...float64) *Page {
	p := &Page{Sheet{Name: name, Widths: widths, PagesWide: 1}}
	p.Row(Cell{Value: title, Look: Look{Role: Title}})
	return p
}

// Row adds a row, as high as its longest wrapped text needs: not every
// spreadsheet program finds that by itself.
func (p *Page) Row(cells ...Cell) {
	p.Rows = append(p.Rows, cells)
	lines := 1
	for c := range cells {
		if text, ok := cells[c].Value.(string); ok && cells[c].Look.Wrap && c < len(p.Widths) {
			lines = max(lines, linesAt(splitWords(text), max(1, int(p.Widths[c])-2)))
		}
	}
	p.high(lines)
}

// high makes the last row so many lines high.
func (p *Page) high(lines int) {
	if lines < 2 {
		return
	}
	if p.Heights == nil {
		p.Heights = map[int]float64{}
	}
	const points, most = 15.5, 409 // of a line; of a row, as spreadsheets have it
	p.Heights[len(p.Rows)] = min(points*float64(lines), most)
}

// Blank leaves a row out.
func (p *Page) Blank() { p.Row() }

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
	p.Row(c)
	p.Rows[len(p.Rows)-1][0].Look.Wrap = true
	wide := 0.0
	for _, w := range p.Widths[:min(columns, len(p.Widths))] {
		wide += w
	}
	p.high(linesAt(splitWords(fmt.Sprint(c.Value)), max(1, int(wide)-2)))
	p.Span(0, columns-1)
}

// Span merges cells of the last row, from one column to another.
func (p *Page) Span(from, to int) {
	n := len(p.Rows)
	p.Merges = append(p.Merges, fmt.Sprintf("%s%d:%s%d", columnName(from), n, columnName(to), n))
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
