package tradeoff

import (
	"fmt"
	"math"
	"strings"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// Sheet is the name that the sheet wants.
const Sheet = "Few sizes"

// columns of the sheet, from A
const (
	colMost, colAmount, colAny = "A", "B", "C"
	chartRows                  = 20 // that the chart stands over
)

// Page lays the table out as a sheet of its own, with a chart. name is the one
// under which the sheet will stand in its workbook.
func (t *Table) Page(name string) workbook.Sheet {
	p := workbook.NewPage(Sheet, "How many sizes: the least "+t.noun()+" for each number", 9, 13, 15, 11, 14, 14, sectionsWide)
	p.Footer = t.File
	p.Landscape = true
	p.Blank()
	for _, r := range t.Remarks() {
		p.Across(7, workbook.Cell{Value: r, Look: workbook.Look{Role: workbook.Remark}})
	}
	p.Blank()
	served := t.Served()
	if len(served) > 0 {
		at := len(p.Rows) + 1
		p.Rows = append(p.Rows, make([][]workbook.Cell, chartRows)...)
		head := len(p.Rows) + 1
		p.Charts = []workbook.Chart{t.chart(name, fmt.Sprintf("A%d", at), head+1, head+len(served))}
	}
	p.Headings(">Sizes", ">"+headingOf(t.Quantity()), ">with any number", ">above it", ">one more saves", "Least", "Sections")
	high(p, 2)
	p.RepeatFrom, p.RepeatRows = len(p.Rows), len(p.Rows) // on the pages behind the chart's
	for i := range served {
		t.row(p, &served[i])
	}
	p.Blank()
	p.Row(workbook.TextCell("any: "+fmt.Sprint(t.Any.Most)), t.amount(t.Any.Amount), workbook.TextCell(""), workbook.TextCell(""), workbook.TextCell(""), workbook.TextCell(t.Any.Proof()), workbook.WordsCell(strings.Join(t.Any.Sections, ", ")))
	high(p, linesOf(t.Any.Sections))
	return p.Sheet
}

func (t *Table) row(p *workbook.Page, l *Line) {
	none := workbook.TextCell("")
	cells := []workbook.Cell{workbook.NumberCell(float64(l.Most), "0"), none, none, none, none, workbook.TextCell(l.Proof()), workbook.WordsCell(strings.Join(l.Sections, ", "))}
	cells[1], cells[2], cells[3] = t.amount(l.Amount), t.amount(t.Any.Amount), workbook.NumberCell(schedule.Round(l.Above), "0.0%")
	if l.Saves > 0 {
		cells[4] = t.amount(l.Saves)
	}
	p.Row(cells...)
	high(p, linesOf(l.Sections))
}

// sectionsWide is the width of the column of sections, in characters.
const sectionsWide = 78

// linesOf is the number of lines that a list of sections takes.
func linesOf(sections []string) int {
	return 1 + (len(strings.Join(sections, ", "))-1)/(sectionsWide-8) // lines break before they are full
}

// high makes the last row as high as so many lines.
func high(p *workbook.Page, lines int) {
	const points = 15.5 // of a line
	if p.Heights == nil {
		p.Heights = map[int]float64{}
	}
	p.Heights[len(p.Rows)] = points * float64(lines)
}

func (t *Table) amount(x float64) workbook.Cell {
	format := "#,##0"
	if d := t.Decimals(); d > 0 {
		format += "." + strings.Repeat("0", d)
	}
	return workbook.NumberCell(schedule.Round(x), format)
}

// chart draws the amounts of rows from first to last over the number of sizes.
func (t *Table) chart(sheet, cell string, first, last int) workbook.Chart {
	in := func(column string) string {
		return fmt.Sprintf("'%s'!$%s$%d:$%s$%d", strings.ReplaceAll(sheet, "'", "''"), column, first, column, last)
	}
	heading := func(column string) string {
		return fmt.Sprintf("'%s'!$%s$%d", strings.ReplaceAll(sheet, "'", "''"), column, first-1)
	}
	line := func(column, colour string, width float64, dash excelize.LineDashType, marker string) excelize.ChartSeries {
		return excelize.ChartSeries{
			Name: heading(column), Categories: in(colMost), Values: in(column), Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}},
			Line:   excelize.LineOptions{Width: width, Dash: dash, Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}}},
			Marker: excelize.ChartMarker{Symbol: marker, Size: 7, Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}}},
		}
	}
	font := excelize.Font{Color: inkColour, Size: 9}
	return workbook.Chart{Cell: cell, Chart: &excelize.Chart{
		Type:      excelize.Line,
		Series:    []excelize.ChartSeries{line(colAmount, lineColour, 2.25, excelize.LineDashSolid, "circle"), line(colAny, leastColour, 1.5, excelize.LineDashDash, "none")},
		Dimension: excelize.ChartDimension{Width: 760, Height: 340},
		Title:     excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: headingOf(t.Quantity()) + " over the number of sizes"}}},
		Legend:    excelize.ChartLegend{Position: "bottom"},
		XAxis:     excelize.ChartAxis{Font: font, Title: excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: "Sizes"}}}},
		YAxis:     excelize.ChartAxis{Font: font, Minimum: t.floor(), Title: excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: headingOf(t.Quantity())}}}, MajorGridLines: true},
	}}
}

// floor is where the axis of amounts begins: a round number somewhat below all
// of them, so that what sizes save is seen.
func (t *Table) floor() *float64 {
	served := t.Served()
	span := served[0].Amount - t.Any.Amount
	if !(span > 0) {
		return nil
	}
	step := math.Pow(10, math.Floor(math.Log10(span)))
	x := max(0, math.Floor((t.Any.Amount-0.3*span)/step)*step)
	return &x
}

// The colours of the chart and the picture: a dark blue and an orange that
// people with any common colour blindness tell apart.
const (
	lineColour  = "2F4858"
	leastColour = "B5430B"
	inkColour   = "1F2A33"
)

// headingOf writes "steel, t" as a heading has it: "Steel [t]".
func headingOf(quantity string) string {
	name, unit, ok := strings.Cut(quantity, ", ")
	name = strings.ToUpper(name[:1]) + name[1:]
	if !ok {
		return name
	}
	return name + " [" + unit + "]"
}

// noun is what the table makes least, in a sentence.
func (t *Table) noun() string {
	name, _, _ := strings.Cut(t.Quantity(), ", ")
	return name
}
