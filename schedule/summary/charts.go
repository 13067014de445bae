package summary

import (
	"fmt"
	"math"
	"slices"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

// The inks of the charts. What must be told apart differs by darkness, dash or
// shape too, so that it can be in black and white.
const (
	inkDark   = "1F2A33"
	inkBlue   = "1F4E79"
	inkPale   = "9DB8C9"
	inkOrange = "B5430B"
	inkGrid   = "D5DEE4"
	inkGrey   = "5A6670"
)

// A chart takes a page of A4, landscape.
const (
	chartWidth  = 1020           // pixels
	chartRows   = 31             // rows of the sheet: a caption, and 30 for the chart
	rowHeight   = 15             // points
	rowPixels   = 18             // that the library takes such a row for
	chartHeight = 30 * rowPixels // so that the chart ends with its rows
)

// chartPage is the sheet of charts, one a printed page.
type chartPage struct {
	workbook.Sheet
	data *dataPage
}

// chartSheets lays out the charts and what they are drawn from.
func chartSheets(info *Info, lines []Line, steel *takeoff.TakeOff) (charts, data workbook.Sheet) {
	p := &chartPage{data: newDataPage(info)}
	p.Name, p.Footer, p.Landscape, p.PagesWide = ChartsSheet, info.File, true, 1
	for range 16 {
		p.Widths = append(p.Widths, 8.4)
	}
	p.utilisation(info, lines)
	p.tonnesBySection(steel)
	p.tonnesByLevel(steel)
	p.buckling(lines)
	if len(p.Charts) == 0 {
		p.Rows = [][]workbook.Cell{{{Value: "There is nothing to draw: no member has a section.", Look: workbook.Look{Role: workbook.Remark}}}}
	}
	return p.Sheet, p.data.Sheet
}

// add puts a chart onto a page of its own, under a caption.
func (p *chartPage) add(caption string, c *excelize.Chart, combo ...*excelize.Chart) {
	top := len(p.Charts)*chartRows + 1
	if top > 1 {
		p.Breaks = append(p.Breaks, top)
	}
	if p.Heights == nil {
		p.Heights = map[int]float64{}
	}
	for len(p.Rows) < top+chartRows-1 {
		p.Rows = append(p.Rows, nil)
		p.Heights[len(p.Rows)] = rowHeight // else every program takes its own
	}
	p.Rows[top-1] = []workbook.Cell{{Value: caption, Look: workbook.Look{Role: workbook.Remark}}}
	c.Dimension = excelize.ChartDimension{Width: chartWidth, Height: chartHeight}
	p.Charts = append(p.Charts, workbook.Chart{Cell: fmt.Sprintf("A%d", top+1), Chart: c, Combo: combo})
}

// maxBars is how many bars a chart can hold and still be read.
const maxBars = 30

// tonnesBySection draws the mass of each size.
func (p *chartPage) tonnesBySection(steel *takeoff.TakeOff) {
	var rows [][]workbook.Cell
	oneGrade := true
	for i := range steel.Sections {
		oneGrade = oneGrade && steel.Sections[i].Grade == steel.Sections[0].Grade
	}
	for i := range steel.Sections {
		s := &steel.Sections[i]
		name := s.Section.Name()
		if !oneGrade {
			name += " " + s.Grade
		}
		rows = append(rows, bar(name, s.Tonnes()))
	}
	grade := ""
	if oneGrade && len(rows) > 0 {
		grade = ", all " + steel.Sections[0].Grade
	}
	p.bars("Steel by section", plural(len(rows), "size")+grade+"; "+fmt.Sprintf("%.2f t together", steel.Net.Tonnes()), "Section", rows, true)
}

// tonnesByLevel draws the mass between levels, the lowest at the foot.
func (p *chartPage) tonnesByLevel(steel *takeoff.TakeOff) {
	var rows [][]workbook.Cell
	named := false
	for i := range steel.Levels {
		l := &steel.Levels[i]
		name := l.Name()
		named = named || name != ""
		if name == "" {
			name = "not said"
		}
		rows = append(rows, bar(name, l.Tonnes()))
	}
	if !named {
		return
	}
	p.bars("Steel by level", "from level to level, the lowest at the foot; "+fmt.Sprintf("%.2f t together", steel.Net.Tonnes()), "Level", rows, false)
}

func bar(name string, tonnes float64) []workbook.Cell {
	return []workbook.Cell{workbook.TextCell(name), workbook.NumberCell(tonnes, "0.000")}
}

// bars draws lying bars of tonnes, the first on top or at the foot.
func (p *chartPage) bars(title, caption, of string, rows [][]workbook.Cell, firstOnTop bool) {
	if len(rows) == 0 {
		return
	}
	rows = heaviest(rows)
	if firstOnTop {
		slices.Reverse(rows)
	}
	t := p.data.table([]string{of, ">Mass [t]"}, []float64{26, 12}, rows)
	gap := uint(45)
	p.add(caption, &excelize.Chart{
		Type:     excelize.Bar,
		Series:   []excelize.ChartSeries{{Name: t.heading(1), Categories: t.column(0), Values: t.column(1), Fill: solid(inkBlue)}},
		Title:    chartTitle(title),
		Legend:   excelize.ChartLegend{Position: "none"},
		XAxis:    excelize.ChartAxis{Font: axisFont()},
		YAxis:    axis("Mass [t]", "0.0", 0, 0, 0),
		PlotArea: excelize.ChartPlotArea{ShowVal: true, NumFmt: excelize.ChartNumFmt{CustomNumFmt: "0.00"}},
		GapWidth: &gap,
	})
}

// heaviest keeps, of more bars than a chart can hold, the longest in their
// order, and puts the others together.
func heaviest(rows [][]workbook.Cell) [][]workbook.Cell {
	if len(rows) <= maxBars {
		return rows
	}
	tonnes := func(i int) float64 { return rows[i][1].Value.(float64) }
	order := make([]int, len(rows))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int { return compareDown(tonnes(a), tonnes(b)) })
	rest := 0.0
	for _, i := range order[maxBars-1:] {
		rest += tonnes(i)
	}
	kept := slices.Sorted(slices.Values(order[:maxBars-1]))
	var out [][]workbook.Cell
	for _, i := range kept {
		out = append(out, rows[i])
	}
	return append(out, bar(fmt.Sprintf("%d others", len(rows)-len(kept)), rest))
}

// axis returns an axis of numbers with a grid. to 0: as it comes.
func axis(title, format string, from, to, unit float64) excelize.ChartAxis {
	a := excelize.ChartAxis{
		MajorGridLines: true, MajorUnit: unit, Font: axisFont(), NumFmt: excelize.ChartNumFmt{CustomNumFmt: format},
		Title: excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: title, Font: &excelize.Font{Size: 10, Color: inkDark}}}},
	}
	a.Minimum = &from
	if to > 0 {
		a.Maximum = &to
	}
	return a
}

func axisFont() excelize.Font { return excelize.Font{Size: 9, Color: inkDark} }

func chartTitle(text string) excelize.ChartTitle {
	return excelize.ChartTitle{Paragraph: []excelize.RichTextRun{{Text: text, Font: &excelize.Font{Bold: true, Size: 13, Color: inkDark}}}}
}

func solid(colour string) excelize.Fill {
	return excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}}
}

// ceil rounds up to a multiple of a step.
func ceil(x, step float64) float64 { return math.Ceil(x/step-1e-9) * step }

func plural(n int, noun string) string {
	if n == 1 {
		return "1 " + noun
	}
	return fmt.Sprintf("%d %ss", n, noun)
}
