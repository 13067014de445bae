package sidebyside

import (
	"encoding/csv"
	"fmt"
	"io"
	"strconv"
	"strings"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// csvBegins is how the first line of a list begins.
const csvBegins = "scenario,changes,"

// IsCSV reports whether the first line of a file is that of a list written by
// WriteCSV.
func IsCSV(line string) bool {
	return strings.HasPrefix(strings.ReplaceAll(line, ";", ","), csvBegins)
}

// WriteCSV writes a line for each scenario. With a decimal comma the columns
// are parted by semicolons.
func (t *Table) WriteCSV(w io.Writer, decimal byte) error {
	out := csv.NewWriter(w)
	out.UseCRLF = true
	if decimal == ',' {
		out.Comma = ';'
	}
	columns := t.columns()
	header := []string{"scenario", "changes"}
	for i := range columns {
		header = append(header, columns[i].key)
	}
	out.Write(append(header, "remark"))
	for i := range t.Rows {
		r := &t.Rows[i]
		record := []string{r.Name, r.Changes}
		for j := range columns {
			text := ""
			if x, ok := columns[j].value(r); ok && r.Why == "" {
				decimals := 0
				if columns[j].decimals > 0 {
					decimals = 6
				}
				text = strings.Replace(strconv.FormatFloat(x, 'f', decimals, 64), ".", string(rune(decimal)), 1)
			}
			record = append(record, text)
		}
		out.Write(append(record, r.Why))
	}
	out.Flush()
	return out.Error()
}

// Sheet is the name that the sheet wants.
const Sheet = "Scenarios side by side"

// Page lays the table out as a sheet with a chart of the steel.
func (t *Table) Page() workbook.Sheet {
	columns := t.columns()
	widths := []float64{24}
	headings := []string{"Scenario"}
	for i := range columns {
		widths = append(widths, 11)
		headings = append(headings, ">"+columns[i].title())
	}
	p := workbook.NewPage(Sheet, "Scenarios side by side", append(widths, 60)...)
	p.Footer = t.File
	p.Landscape = true
	p.Blank()
	p.Headings(append(headings, "Changes")...)
	p.Heights = map[int]float64{len(p.Rows): 31}
	first := len(p.Rows) + 1
	steel := 0
	for i := range t.Rows {
		r := &t.Rows[i]
		cells := []workbook.Cell{workbook.TextCell(r.Name)}
		for j := range columns {
			if columns[j].key == "steel_t" {
				steel = j + 1
			}
			cells = append(cells, columns[j].sheetCell(r))
		}
		p.Row(append(cells, workbook.WordsCell(r.Changes))...)
	}
	last := len(p.Rows)
	p.Blank()
	for _, s := range t.Remarks() {
		p.Across(len(columns)+2, workbook.Cell{Value: s, Look: workbook.Look{Role: workbook.Remark}})
	}
	p.Blank()
	p.Charts = []workbook.Chart{chart(fmt.Sprintf("A%d", len(p.Rows)+1), columnLetter(steel), first, last)}
	return p.Sheet
}

func (c *column) sheetCell(r *Row) workbook.Cell {
	x, ok := c.value(r)
	if !ok || r.Why != "" {
		return workbook.TextCell("")
	}
	format := "#,##0"
	switch {
	case c.percent:
		format = "+0.0%;-0.0%;0.0%"
	case c.decimals > 0:
		format += "." + strings.Repeat("0", c.decimals)
	}
	if x == 0 {
		return workbook.NumberCell(0, format)
	}
	return workbook.NumberCell(schedule.Round(x), format)
}

// columnLetter names one of the first columns, from 0.
func columnLetter(i int) string { return string(rune('A' + i)) }

func chart(cell, column string, first, last int) workbook.Chart {
	in := func(c string) string { return fmt.Sprintf("'%s'!$%s$%d:$%s$%d", Sheet, c, first, c, last) }
	fill := excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{"2F4858"}}
	font := excelize.Font{Color: "1F2A33", Size: 9}
	zero := 0.0
	gap := uint(60)
	return workbook.Chart{Cell: cell, Chart: &excelize.Chart{
		Type:      excelize.Col,
		Series:    []excelize.ChartSeries{{Name: fmt.Sprintf("'%s'!$%s$%d", Sheet, column, first-1), Categories: in("A"), Values: in(column), Fill: fill}},
		Dimension: excelize.ChartDimension{Width: 760, Height: 320},
		Title:     excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: "Steel [t]"}}},
		Legend:    excelize.ChartLegend{Position: "none"},
		GapWidth:  &gap,
		XAxis:     excelize.ChartAxis{Font: font},
		YAxis:     excelize.ChartAxis{Font: font, Minimum: &zero, MajorGridLines: true},
	}}
}
