package summary

import (
	"fmt"
	"math"
	"slices"

	"github.com/xuri/excelize/v2"

	"stanchion/design"
	"stanchion/schedule/workbook"
)

const (
	maxMembers     = 80 // drawn one by one
	greatest       = 60 // of which, where there are more
	maxUtilisation = 2  // end of the axis: a bar beyond it is cut
	band           = 0.05
)

// utilisation draws how far the members are used: each of them or, where that
// would be a thicket, the greatest and how many there are in each band.
func (p *chartPage) utilisation(info *Info, lines []Line) {
	var shown []*Line
	for i := range lines {
		if r := &lines[i].Result; r.Section != "" && finite(r.Utilisation) {
			shown = append(shown, &lines[i])
		}
	}
	switch n := len(shown); {
	case n == 0:
	case n <= maxMembers:
		p.byMember(info, shown, "Utilisation by member", "members in the order of the schedule")
	default:
		p.bands(shown)
		slices.SortStableFunc(shown, func(a, b *Line) int { return compareDown(a.Result.Utilisation, b.Result.Utilisation) })
		p.byMember(info, shown[:greatest], fmt.Sprintf("The %d greatest utilisations", greatest), fmt.Sprintf("of %d members", n))
	}
}

func compareDown(a, b float64) int {
	switch {
	case a > b:
		return -1
	case a < b:
		return 1
	}
	return 0
}

// byMember draws one bar a member, those that do not pass darker, and the
// limit.
func (p *chartPage) byMember(info *Info, shown []*Line, title, caption string) {
	marks := map[string]int{}
	for _, l := range shown {
		marks[l.Member.Column.Mark]++
	}
	var rows [][]workbook.Cell
	top := 1.0
	for _, l := range shown {
		c, r := &l.Member.Column, &l.Result
		name := c.Mark
		if marks[name] > 1 && Level(c) != "" {
			name += " " + Level(c)
		}
		row := []workbook.Cell{workbook.TextCell(name), workbook.TextCell(""), workbook.TextCell(""), number(limitOf(info, c), ratio)}
		at := 1
		if r.Status != design.Passes {
			at = 2
		}
		row[at] = number(r.Utilisation, ratio)
		rows = append(rows, row)
		top = max(top, r.Utilisation)
	}
	if top > maxUtilisation {
		caption += fmt.Sprintf("; bars are cut at %d, the greatest is %.2f", maxUtilisation, top)
	}
	t := p.data.table([]string{"Member", ">passes", ">does not pass", ">limit"}, []float64{22, 10, 14, 10}, rows)
	gap, overlap := uint(35), 100
	along := excelize.ChartAxis{Font: axisFont(), TickLabelSkip: 1, Alignment: excelize.Alignment{TextRotation: 90}}
	up := axis("Utilisation", "0.0", 0, min(maxUtilisation, ceil(top, 0.1)), 0.1*math.Ceil(min(maxUtilisation, top)-1e-9))
	p.add(caption, &excelize.Chart{
		Type: excelize.Col,
		Series: []excelize.ChartSeries{
			{Name: t.heading(1), Categories: t.column(0), Values: t.column(1), Fill: solid(inkPale)},
			{Name: t.heading(2), Categories: t.column(0), Values: t.column(2), Fill: solid(inkOrange)},
		},
		Title:    chartTitle(title),
		Legend:   excelize.ChartLegend{Position: "bottom"},
		XAxis:    along,
		YAxis:    up,
		GapWidth: &gap, Overlap: &overlap,
	}, &excelize.Chart{
		Type: excelize.Line,
		Series: []excelize.ChartSeries{{
			Name: t.heading(3), Categories: t.column(0), Values: t.column(3), Fill: solid(inkDark),
			Line: excelize.LineOptions{Type: excelize.LineSolid, Dash: excelize.LineDashDash, Width: 1.5}, Marker: excelize.ChartMarker{Symbol: "none"},
		}},
		Legend: excelize.ChartLegend{Position: "bottom"},
		XAxis:  along,
		YAxis:  up,
	})
}

// limitOf is the limit that a member has to keep.
func limitOf(info *Info, c *design.Column) float64 {
	switch {
	case c.Choice.Limit > 0:
		return c.Choice.Limit
	case info.Limit > 0:
		return info.Limit
	}
	return 1
}

// bands draws how many members there are in each band of utilisation, the last
// one open.
func (p *chartPage) bands(shown []*Line) {
	const last = 30 // of bands: above 1.5
	var pass, not [last + 1]int
	top := 20 // bands up to 1.0 at least
	for _, l := range shown {
		i := min(last, max(0, int(math.Ceil(l.Result.Utilisation/band-1e-9))-1))
		if l.Result.Status == design.Passes {
			pass[i]++
		} else {
			not[i]++
		}
		top = max(top, i+1)
	}
	var rows [][]workbook.Cell
	for i := range top {
		name := fmt.Sprintf("%.2f-%.2f", float64(i)*band, float64(i+1)*band)
		if i == last {
			name = fmt.Sprintf("over %.2f", float64(i)*band)
		}
		rows = append(rows, []workbook.Cell{workbook.TextCell(name), number(float64(pass[i]), whole), number(float64(not[i]), whole)})
	}
	t := p.data.table([]string{"Utilisation", ">pass", ">do not pass"}, []float64{14, 10, 14}, rows)
	gap, overlap := uint(15), 100
	p.add(plural(len(shown), "member")+"; a band takes in its upper end", &excelize.Chart{
		Type: excelize.ColStacked,
		Series: []excelize.ChartSeries{
			{Name: t.heading(1), Categories: t.column(0), Values: t.column(1), Fill: solid(inkPale)},
			{Name: t.heading(2), Categories: t.column(0), Values: t.column(2), Fill: solid(inkOrange)},
		},
		Title:    chartTitle("Members by utilisation"),
		Legend:   excelize.ChartLegend{Position: "bottom"},
		XAxis:    excelize.ChartAxis{Font: axisFont(), TickLabelSkip: 1, Alignment: excelize.Alignment{TextRotation: 90}},
		YAxis:    axis("Members", "0", 0, 0, 0),
		GapWidth: &gap, Overlap: &overlap,
	})
}
