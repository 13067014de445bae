package main

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

const sheet = "Columns"

// The rows of the schedule's sheet.
const (
	groupRow   = 7 // merged headings
	headingRow = 8
	unitRow    = 9
	firstRow   = 10
)

// column is one column of the sheet.
type column struct {
	group, heading, unit string
	width                float64
	style                string // of its cells
	value                func(*line) any
}

var columns = []column{
	{"Location", "Grid", "", 8, "grid", func(l *line) any { return l.grid }},
	{"Location", "Mark", "", 8, "text", func(l *line) any { return l.mark }},
	{"Location", "From", "", 7, "centre", func(l *line) any { return l.from }},
	{"Location", "To", "", 7, "centre", func(l *line) any { return l.to }},
	{"", "Length", "m", 8, "metre", func(l *line) any { return l.length }},
	{"", "No. off", "", 7, "whole", func(l *line) any { return l.quantity }},
	{"Axial load N_Ed", "ULS1", "kN", 9, "force", func(l *line) any { return l.uls1 }},
	{"Axial load N_Ed", "ULS2", "kN", 9, "force", func(l *line) any { return l.uls2 }},
	{"Ends (bottom-top)", "y-y", "", 19, "centre", func(l *line) any { return l.endsY }},
	{"Ends (bottom-top)", "z-z", "", 15, "centre", func(l *line) any { return l.endsZ }},
	{"Restraints between the ends", "y-y", "m", 9, "centre", func(l *line) any { return blank(l.restraintsY) }},
	{"Restraints between the ends", "z-z", "m", 11, "centre", func(l *line) any { return blank(l.restraintsZ) }},
	{"Restraints between the ends", "torsion", "m", 9, "centre", func(l *line) any { return blank(l.torsion) }},
	{"Section", "Family", "", 10, "text", func(l *line) any { return blank(l.family) }},
	{"Section", "Section", "", 20, "text", func(l *line) any { return blank(l.section) }},
	{"Section", "Max width", "mm", 11, "centre", func(l *line) any { return noZero(l.maxWidth) }},
	{"", "Remarks", "", 36, "text", func(l *line) any { return blank(l.remark) }},
}

func blank(s string) any {
	if s == "" {
		return nil
	}
	return s
}

func noZero(x float64) any {
	if x == 0 {
		return nil
	}
	return x
}

// page writes to the schedule's sheet and keeps the first error.
type page struct {
	*excelize.File
	styles map[string]int
	err    error
}

func (p *page) do(err error) {
	if p.err == nil {
		p.err = err
	}
}

func (p *page) set(col, row int, v any, style string) {
	cell := at(col, row)
	if v != nil {
		p.do(p.SetCellValue(sheet, cell, v))
	}
	p.do(p.SetCellStyle(sheet, cell, cell, p.styles[style]))
}

func (p *page) merge(col1, row1, col2, row2 int) {
	if col1 != col2 || row1 != row2 {
		p.do(p.MergeCell(sheet, at(col1, row1), at(col2, row2)))
	}
}

// at names a cell; columns count from 1.
func at(col, row int) string {
	name, err := excelize.CoordinatesToCellName(col, row)
	if err != nil {
		panic(err) // our own numbers
	}
	return name
}

// workbook lays an issue out as a design office does.
func workbook(lines []line) (*excelize.File, error) {
	f := excelize.NewFile()
	p := &page{File: f}
	p.do(f.SetSheetName("Sheet1", sheet))
	p.styles, p.err = makeStyles(f)
	p.title()
	p.header()
	last := p.rows(lines)
	p.foot(lines, last)
	p.layout(last)
	p.settings()
	p.do(f.SetDocProps(&excelize.DocProperties{Title: "Ottermere Depot: column schedule", Creator: "stanchion examples",
		Created: "2024-03-04T09:00:00Z", Modified: "2024-03-04T09:00:00Z"}))
	return f, p.err
}

func (p *page) title() {
	p.set(1, 1, "Ottermere Depot", "title")
	p.set(1, 2, "Column schedule: hall, workshops and offices", "subtitle")
	for i, pair := range [][2]string{
		{"Project no.", "OTD-114"}, {"Issue", firstIssue.name + ", for sizing"}, {"Combinations", "ULS1: 1.25 G + 1.5 Q     ULS2: 1.25 G + 1.05 Q + 1.5 W"},
	} {
		p.set(1, 3+i, pair[0], "label")
		p.set(3, 3+i, pair[1], "plain")
	}
}

func (p *page) header() {
	for i := 0; i < len(columns); {
		j := i + 1
		for columns[i].group != "" && j < len(columns) && columns[j].group == columns[i].group {
			j++
		}
		p.group(i, j)
		i = j
	}
}

// group writes the headings of the columns i to j, which stand under one.
func (p *page) group(i, j int) {
	for k := i; k < j; k++ {
		c := &columns[k]
		for row := groupRow; row <= headingRow; row++ {
			p.set(k+1, row, nil, "heading")
		}
		if c.group == "" {
			p.set(k+1, groupRow, c.heading, "heading")
			p.merge(k+1, groupRow, k+1, headingRow)
		} else {
			p.set(k+1, headingRow, c.heading, "heading")
		}
		p.set(k+1, unitRow, blank(c.unit), "unit")
	}
	if g := columns[i].group; g != "" {
		p.set(i+1, groupRow, g, "heading")
		p.merge(i+1, groupRow, j, groupRow)
	}
}

// rows writes the lines, the grid reference merged down each stack, and
// returns the last row.
func (p *page) rows(lines []line) int {
	start := 0
	for i := range lines {
		row := firstRow + i
		first := i == 0 || lines[i].grid != lines[i-1].grid
		for k := range columns {
			c := &columns[k]
			style := c.style
			if first {
				style += " first"
			}
			v := c.value(&lines[i])
			if k == 0 && !first {
				v = nil
			}
			p.set(k+1, row, v, style)
		}
		if first {
			start = row
		}
		if i+1 == len(lines) || lines[i+1].grid != lines[i].grid {
			p.merge(1, start, 1, row)
		}
	}
	return firstRow + len(lines) - 1
}

func (p *page) foot(lines []line, last int) {
	total := last + 1
	for k := range columns {
		p.set(k+1, total, nil, "total")
	}
	n, length := pieces(lines)
	p.set(1, total, "Total", "total")
	p.set(5, total, length, "total metre")
	p.set(6, total, n, "total whole")
	p.do(p.SetCellFormula(sheet, at(5, total), fmt.Sprintf("SUMPRODUCT(E%d:E%d,F%d:F%d)", firstRow, last, firstRow, last)))
	p.do(p.SetCellFormula(sheet, at(6, total), fmt.Sprintf("SUM(F%d:F%d)", firstRow, last)))
	notes := []string{
		"Notes: axial forces are factored and positive in compression; moments from eccentric connections are to be added at the next issue.",
		"Restraints are heights above the lower level. Torsion: where blank, twist is held wherever z-z is held.",
		"Sections given here are existing or in stock and stay as they are.",
	}
	for i, n := range notes {
		p.set(1, total+2+i, n, "note")
	}
}

func (p *page) layout(last int) {
	for k := range columns {
		name, _ := excelize.ColumnNumberToName(k + 1)
		p.do(p.SetColWidth(sheet, name, name, columns[k].width))
	}
	p.do(p.SetRowHeight(sheet, 1, 26))
	p.do(p.SetRowHeight(sheet, groupRow, 18))
	p.do(p.SetPanes(sheet, &excelize.Panes{Freeze: true, XSplit: 2, YSplit: unitRow, TopLeftCell: at(3, firstRow), ActivePane: "bottomRight"}))
	size, landscape, across, down := 8, "landscape", 1, 0
	p.do(p.SetPageLayout(sheet, &excelize.PageLayoutOptions{Size: &size, Orientation: &landscape, FitToWidth: &across, FitToHeight: &down}))
	fit := true
	p.do(p.SetSheetProps(sheet, &excelize.SheetPropsOptions{FitToPage: &fit}))
	p.do(p.SetDefinedName(&excelize.DefinedName{Name: "_xlnm.Print_Titles", Scope: sheet, RefersTo: fmt.Sprintf("%s!$%d:$%d", sheet, groupRow, unitRow)}))
	p.do(p.SetHeaderFooter(sheet, &excelize.HeaderFooterOptions{OddFooter: "&L&F&CInvented example&RPage &P of &N"}))
	right := excelize.PageLayoutMarginsOptions{}
	for _, m := range []**float64{&right.Left, &right.Right, &right.Top, &right.Bottom} {
		v := 0.5
		*m = &v
	}
	p.do(p.SetPageMargins(sheet, &right))
}

// settings adds the sheet that holds the decisions of a run.
func (p *page) settings() {
	const name = "Settings"
	_, err := p.NewSheet(name)
	p.do(err)
	rows := [][2]string{{"Setting", "Value"}, {"project", "Ottermere Depot"}, {"national", "UK"}, {"grade", "S355"}, {"families", "UKC"}, {"limit", "1.00"}, {"effective length", "segment"}}
	for i, r := range rows {
		style := p.styles["plain"]
		if i == 0 {
			style = p.styles["heading"]
		}
		p.do(p.SetSheetRow(name, at(1, i+1), &[]any{r[0], r[1]}))
		p.do(p.SetCellStyle(name, at(1, i+1), at(2, i+1), style))
	}
	p.do(p.SetColWidth(name, "A", "B", 20))
}
