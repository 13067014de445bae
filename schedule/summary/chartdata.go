package summary

import (
	"fmt"

	"stanchion/schedule/workbook"
)

// dataPage is the sheet that the charts are drawn from: tables side by side,
// so that a person can see what a chart shows, and change it.
type dataPage struct {
	workbook.Sheet
	name string // under which the sheet will stand
}

// dataTop is the row of the headings, from 1.
const dataTop = 3

func newDataPage(info *Info) *dataPage {
	p := &dataPage{name: info.sheetName(ChartDataSheet)}
	p.Name, p.Footer, p.Landscape, p.PagesWide = ChartDataSheet, info.File, true, 1
	p.FreezeRows, p.RepeatRows = dataTop, dataTop
	p.Heights = map[int]float64{dataTop: 31} // some headings take two lines
	p.put(0, 0, workbook.Cell{Value: "What the charts are drawn from", Look: workbook.Look{Role: workbook.Title}})
	return p
}

// put sets a cell; row and column count from 0.
func (p *dataPage) put(row, col int, c workbook.Cell) {
	for len(p.Rows) <= row {
		p.Rows = append(p.Rows, nil)
	}
	for len(p.Rows[row]) <= col {
		p.Rows[row] = append(p.Rows[row], workbook.Cell{})
	}
	p.Rows[row][col] = c
}

// dataTable is one table: the ranges of its columns.
type dataTable struct {
	page       *dataPage
	first, end int // columns; rows lie below dataTop
	rows       int
}

// table adds a table to the right of the others, a column apart. Headings that
// open with ">" stand over numbers.
func (p *dataPage) table(headings []string, widths []float64, rows [][]workbook.Cell) *dataTable {
	first := len(p.Widths)
	if first > 0 {
		p.Widths = append(p.Widths, 3)
		first++
	}
	p.Widths = append(p.Widths, widths...)
	for i, h := range headings {
		look := workbook.Look{Role: workbook.Heading, Align: workbook.Left}
		if h[0] == '>' {
			h, look.Align = h[1:], workbook.Right
		}
		p.put(dataTop-1, first+i, workbook.Cell{Value: h, Look: look})
	}
	for r, row := range rows {
		for c := range row {
			p.put(dataTop+r, first+c, row[c])
		}
	}
	return &dataTable{p, first, first + len(headings), len(rows)}
}

// heading is where the heading of a column stands, for the name of a series.
func (t *dataTable) heading(col int) string { return t.ref(col, dataTop, dataTop) }

// column is where the values of a column stand.
func (t *dataTable) column(col int) string { return t.ref(col, dataTop+1, dataTop+max(1, t.rows)) }

func (t *dataTable) ref(col, first, last int) string {
	c := workbook.ColumnName(t.first + col)
	if first == last {
		return fmt.Sprintf("%s!$%s$%d", workbook.Quoted(t.page.name), c, first)
	}
	return fmt.Sprintf("%s!$%s$%d:$%s$%d", workbook.Quoted(t.page.name), c, first, c, last)
}
