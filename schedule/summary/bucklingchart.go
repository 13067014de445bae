package summary

import (
	"fmt"
	"math"
	"slices"

	"github.com/xuri/excelize/v2"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule/workbook"
)

// The buckling curves, and how each is drawn.
var curveLooks = []struct {
	curve ec3.Curve
	ink   string
	dash  excelize.LineDashType
}{
	{ec3.CurveA0, inkGrey, excelize.LineDashSysDot},
	{ec3.CurveA, inkBlue, excelize.LineDashLgDash},
	{ec3.CurveB, inkDark, excelize.LineDashSolid},
	{ec3.CurveC, inkOrange, excelize.LineDashDash},
	{ec3.CurveD, inkGrey, excelize.LineDashLgDashDot},
}

// The kinds of points, by the buckling that is nearest to its resistance.
var pointLooks = []struct {
	name, symbol string
	fill         string
}{
	{"y-y", "triangle", inkDark},
	{"z-z", "circle", inkPale},
	{"torsional", "diamond", inkOrange},
}

const (
	leastSlenderness = 2.0 // to which the curves are drawn
	mostSlenderness  = 4.0
	slendernessStep  = 0.05
	maxPoints        = 400 // drawn one by one; where there are more, those at one place are drawn once
)

type point struct{ lambdaBar, chi float64 }

// buckling draws the curves of EN 1993-1-1 Figure 6.4, and each member at the
// slenderness of the buckling that is nearest to its resistance.
func (p *chartPage) buckling(lines []Line) {
	var points [3][]point
	n, beyond, far := 0, 0, leastSlenderness
	for i := range lines {
		kind, b := nearest(&lines[i].Result)
		if b == nil {
			continue
		}
		n++
		if b.LambdaBar > mostSlenderness {
			beyond++
			continue
		}
		points[kind] = append(points[kind], point{b.LambdaBar, b.Chi})
		far = max(far, b.LambdaBar)
	}
	if n == 0 {
		return
	}
	caption := plural(n, "member") + ", each at the slenderness of the buckling that is nearest to its resistance"
	if n > maxPoints {
		for k := range points {
			points[k] = once(points[k])
		}
		caption += "; members at one place are drawn once"
	}
	if beyond > 0 {
		caption += fmt.Sprintf("; %d beyond %.1f not drawn", beyond, mostSlenderness)
	}
	series := p.pointSeries(points)
	series = append(p.curveSeries(ceil(far, 0.5)), series...)
	p.add(caption, &excelize.Chart{
		Type: excelize.Scatter, Series: series,
		Title:  chartTitle("Members on the buckling curves (EN 1993-1-1, 6.3.1.2)"),
		Legend: excelize.ChartLegend{Position: "right"},
		XAxis:  axis("Slenderness lambda_bar", "0.0", 0, ceil(far, 0.5), 0.2),
		YAxis:  axis("Reduction factor chi", "0.0", 0, 1.1, 0.1),
	})
}

// nearest returns the buckling of a member with the greatest N_Ed/N_b,Rd; nil
// where there is none.
func nearest(r *design.Result) (kind int, b *design.Buckling) {
	if r.Section == "" {
		return 0, nil
	}
	best := 0.0
	for k, x := range []*design.Buckling{&r.Y, &r.Z, &r.T} {
		if k == 2 && !r.HasT || x.Chi <= 0 {
			continue
		}
		if u := x.Utilisation(); u > best {
			kind, b, best = k, x, u
		}
	}
	return kind, b
}

// once leaves one of the points that a drawing cannot tell apart.
func once(in []point) []point {
	seen := map[[2]int]bool{}
	var out []point
	for _, q := range in {
		key := [2]int{int(math.Round(q.lambdaBar * 50)), int(math.Round(q.chi * 200))}
		if !seen[key] {
			seen[key] = true
			out = append(out, q)
		}
	}
	slices.SortFunc(out, func(a, b point) int { return -compareDown(a.lambdaBar, b.lambdaBar) })
	return out
}

func (p *chartPage) curveSeries(far float64) []excelize.ChartSeries {
	var rows [][]workbook.Cell
	for i := range int(math.Round(far/slendernessStep)) + 1 {
		lambdaBar := float64(i) * slendernessStep
		row := []workbook.Cell{number(lambdaBar, "0.00")}
		for _, c := range curveLooks {
			row = append(row, number(ec3.Chi(c.curve.Alpha(), lambdaBar), ratio))
		}
		rows = append(rows, row)
	}
	headings, widths := []string{">lambda_bar"}, []float64{14}
	for _, c := range curveLooks {
		headings, widths = append(headings, ">curve "+c.curve.String()), append(widths, 11)
	}
	t := p.data.table(headings, widths, rows)
	var out []excelize.ChartSeries
	for i, c := range curveLooks {
		out = append(out, excelize.ChartSeries{
			Name: t.heading(1 + i), Categories: t.column(0), Values: t.column(1 + i), Fill: solid(c.ink),
			Line: excelize.LineOptions{Type: excelize.LineSolid, Dash: c.dash, Width: 1.25}, Marker: excelize.ChartMarker{Symbol: "none"},
		})
	}
	return out
}

func (p *chartPage) pointSeries(points [3][]point) []excelize.ChartSeries {
	var out []excelize.ChartSeries
	for k, list := range points {
		if len(list) == 0 {
			continue
		}
		var rows [][]workbook.Cell
		for _, q := range list {
			rows = append(rows, []workbook.Cell{number(q.lambdaBar, ratio), number(q.chi, ratio)})
		}
		look := pointLooks[k]
		t := p.data.table([]string{">lambda_bar", ">" + look.name}, []float64{14, 11}, rows)
		out = append(out, excelize.ChartSeries{
			Name: t.heading(1), Categories: t.column(0), Values: t.column(1), Fill: solid(inkDark),
			Line: excelize.LineOptions{Type: excelize.LineNone},
			Marker: excelize.ChartMarker{
				Symbol: look.symbol, Size: 7, Fill: solid(look.fill),
				Border: excelize.LineOptions{Type: excelize.LineSolid, Width: 1, Fill: solid(inkDark)},
			},
		})
	}
	return out
}
