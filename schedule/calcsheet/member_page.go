package calcsheet

import (
	"fmt"
	"math"
	"sort"
	"strconv"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule"
)

// The page, mm: A4 with room for binding at the left, or the same enlarged to A3.
const (
	pageWidth    = 210.0
	pageHeight   = 297.0
	marginLeft   = 16.0
	marginRight  = 10.0
	marginTop    = 10.0
	marginBottom = 10.0
	titleHeight  = 14.0
	headHeight   = 12.0
	footHeight   = 8.0
	columnGap    = 5.0

	textWidth   = pageWidth - marginLeft - marginRight
	columnWidth = (textWidth - columnGap) / 2
	bodyTop     = marginTop + titleHeight + headHeight
	bodyStart   = bodyTop + 1.2
	bodyBottom  = pageHeight - marginBottom - footHeight

	resultsHeight = 17.5
)

// dense is how closely a sheet is set.
type dense struct {
	points   float64 // size of the type
	leading  float64 // between lines, em
	drawings float64 // height of the drawings, mm
	bare     bool    // numbers alone: the formulas stand in the list of formulas
}

// densities are tried in order: the first with which a sheet stands on one page
// is used.
var densities = func() (list []dense) {
	for points := 7.8; points > 6.5; points -= 0.2 {
		list = append(list, dense{points, 0.22, 66, false})
	}
	for points := 6.6; points > 5.7; points -= 0.2 {
		list = append(list, dense{points, 0.12, 58, false})
	}
	for points := 6.4; points > 5.1; points -= 0.2 {
		list = append(list, dense{points, 0.12, 58, true})
	}
	return append(list, dense{5.2, 0.08, 44, true}) // Annex A under moments about both axes
}()

// memberPages draws the sheet of a member: one page, or more where not even
// the smallest type keeps it to one.
func (d *document) memberPages(s *working.Sheet, how dense, number, of int) {
	size := how.points * pt
	lines := newSetter().sheet(s, how)
	for first := true; first || len(lines) > 0; first = false {
		d.page(fmt.Sprintf("Sheet %d of %d", number, of))
		if first {
			d.pdf.SetLink(d.canvas.links[number-1], 0, -1)
			d.pdf.Bookmark(printable(place(s.Column)+"  "+s.Section.Name()), 0, -1)
		}
		d.memberHead(s, first)
		top := bodyStart
		if first {
			top += how.drawings
			d.drawings(s, how.drawings)
		}
		for column := range 2 {
			x := marginLeft + float64(column)*(columnWidth+columnGap)
			if column == 1 {
				top = bodyStart
			}
			n := fitting(lines, (bodyBottom-top)/size, how.leading)
			if n == 0 && len(lines) > 0 && !first {
				n = 1 // taller than a page: never, but a loop must end
			}
			d.column(lines[:n], x, top, size, how.leading)
			lines = lines[n:]
		}
		x := marginLeft + columnWidth + columnGap/2
		d.canvas.line(x, bodyTop+1, x, bodyBottom-1, faint)
	}
}

// fit returns the first density with which a sheet stands on one page. One that
// has more to say than any of the standard's methods gives takes two that are
// easy to read.
func fit(s *working.Sheet) dense {
	set := newSetter()
	n := sort.Search(len(densities), func(i int) bool {
		how := densities[i]
		lines := set.sheet(s, how)
		size := how.points * pt
		n := fitting(lines, (bodyBottom-bodyStart-how.drawings)/size, how.leading)
		n += fitting(lines[n:], (bodyBottom-bodyStart)/size, how.leading)
		return n == len(lines)
	})
	if n == len(densities) {
		return dense{6.6, 0.15, 62, false}
	}
	return densities[n]
}

// sheet sets all blocks of a sheet.
func (s *setter) sheet(sheet *working.Sheet, how dense) []line {
	s.width, s.bare = columnWidth/(how.points*pt), how.bare
	var lines []line
	for i := range sheet.Blocks {
		lines = append(lines, s.block(&sheet.Blocks[i])...)
	}
	if s.checks == nil {
		checks := checksBlock(sheet)
		s.checks = &checks
	}
	return append(lines, s.block(s.checks)...)
}

// column draws lines one below the other.
func (d *document) column(lines []line, x, y, size, leading float64) {
	for i := range lines {
		l := &lines[i]
		if i > 0 {
			y += l.before * size
		}
		y += l.ascent() * size
		body := l.body()
		draw(d.canvas, &body, x, y, size)
		draw(d.canvas, &l.edge, x+columnWidth-l.edge.w*size, y, size)
		y += (l.descent() + leading) * size
	}
}

// memberHead says which column it is, in which section, and how it came out.
func (d *document) memberHead(s *working.Sheet, first bool) {
	c := d.canvas
	y := marginTop + titleHeight + 5.4
	mark := working.Short(s.Column.Mark)
	write(c, marginLeft, y, mark, bold, 13*pt, atLeft)
	rest := rest(s.Column)
	if s.Column.Quantity > 1 {
		rest += fmt.Sprintf("   %d off", s.Column.Quantity)
	}
	if !first {
		rest += "   continued"
	}
	write(c, marginLeft+bold.width(mark)*13*pt+3, y, rest, upright, 9*pt, atLeft)
	write(c, pageWidth-marginRight, y, s.Section.Name()+"   "+s.Grade, bold, 11*pt, atRight)
	write(c, marginLeft, y+4.6, verdict(s), upright, 8*pt, atLeft)
	d.bar(s, pageWidth-marginRight-40, y+2.2, 40, 2.2)
	c.line(marginLeft, y+6.4, pageWidth-marginRight, y+6.4, usualLine)
}

// bar draws the utilisation against its limit.
func (d *document) bar(s *working.Sheet, x, y, w, h float64) {
	u := min(s.Result.Utilisation, 1.25*s.Limit)
	full := w / 1.25
	rectangle(d.canvas, x, y, full*u/s.Limit, h, 0.7)
	frame(d.canvas, x, y, w, h, thinLine)
	d.canvas.line(x+full, y-0.5, x+full, y+h+0.5, thickLine)
}

// rest is what stands behind the mark: where the column is.
func rest(c *design.Column) string {
	copy := *c
	copy.Mark = ""
	s := place(&copy)
	for len(s) > 0 && (s[0] == ',' || s[0] == ' ') {
		s = s[1:]
	}
	return s
}

// drawings draws the elevation, the buckling curves and the main results.
func (d *document) drawings(s *working.Sheet, height float64) {
	split := 0.5 * columnWidth
	elevation(d.canvas, s, marginLeft, bodyTop+1, split, height-4)
	x := marginLeft + split + 1
	chart(d.canvas, s, x, bodyTop+1, columnWidth-split-1, height-resultsHeight-6)
	results(d.canvas, s, x+1, bodyTop+height-resultsHeight-2.4, columnWidth-split-2)
	y := bodyTop + height - 2
	d.canvas.line(marginLeft, y, marginLeft+columnWidth, y, faint)
}

// results is the table of what the results hand over to other programs, to the
// same figures.
func results(c canvas, s *working.Sheet, x, y, w float64) {
	const size = 5.4 * pt // six figures fit their column, with room between
	right := []float64{0.33 * w, 0.55 * w, 0.77 * w, w}
	head := []string{"L_cr m", "λ̄", "χ", "N_b,Rd kN"}
	for i, h := range head {
		cell(c, h, x+right[i], y+2.2, size)
	}
	c.line(x, y+3.2, x+w, y+3.2, thinLine)
	r := s.Result
	rows := []struct {
		name string
		b    *design.Buckling
	}{{"y-y", &r.Y}, {"z-z", &r.Z}, {"torsion", &r.T}}
	for _, row := range rows {
		if row.b.Curve == "" {
			continue
		}
		y += 2.7
		write(c, x, y+2.8, row.name+" "+row.b.Curve, upright, size, atLeft)
		for i, text := range []string{handed(row.b.Lcr / 1e3), handed(row.b.LambdaBar), handed(row.b.Chi), handed(row.b.NbRd / 1e3)} {
			write(c, x+right[i], y+2.8, text, upright, size, atRight)
		}
	}
	for _, text := range []string{
		"utilisation " + handed(r.Utilisation) + moment(r) + critical(r),
		fmt.Sprintf("class %d, f_y %s N/mm², %s kg/m, %s kg", r.Class, handed(r.Fy), handed(r.MassPerM), handed(r.Mass)),
	} {
		b := compact(row(words(text, upright)...))
		y += 2.7
		draw(c, &b, x, y+3.4, min(5.6*pt, w/b.w))
	}
}

// handed writes a value as it is handed over to other programs.
func handed(v float64) string {
	if math.IsInf(v, 0) || math.IsNaN(v) {
		return "-"
	}
	return strconv.FormatFloat(schedule.Round(v), 'f', -1, 64)
}

func moment(r *design.Result) string {
	if r.MbRd == 0 {
		return ""
	}
	return ", M_b,Rd " + handed(r.MbRd/1e6) + " kNm"
}

func critical(r *design.Result) string {
	if r.Fire.CriticalTemperature == 0 {
		return ""
	}
	return ", θ_cr " + handed(r.Fire.CriticalTemperature) + " °C"
}

// cell writes a heading of the table of results, its symbol set in type.
func cell(c canvas, head string, x, y, size float64) {
	b := headBox(head)
	draw(c, &b, x-b.w*size, y, size)
}

// checksBlock lists the greatest check of each kind.
func checksBlock(s *working.Sheet) working.Block {
	t := working.Table{Head: []string{"check", "clause", "where", "E_d / R_d", "", ""}, Right: []bool{false, false, false, true, true, false}}
	var worst [design.Refused + 1]int
	for i := range worst {
		worst[i] = -1
	}
	for i := range s.Checks {
		if k := s.Checks[i].Kind; worst[k] < 0 || s.Checks[i].Utilisation > s.Checks[worst[k]].Utilisation {
			worst[k] = i
		}
	}
	for _, i := range worst {
		if i < 0 {
			continue
		}
		c := &s.Checks[i]
		ed, rd, unit := amounts(c)
		amount := ""
		if rd != "" {
			amount = ed + "/" + rd + " " + unit
		}
		governs := ""
		if s.Governing >= 0 && s.Checks[s.Governing].Kind == c.Kind && s.Checks[s.Governing].Utilisation == c.Utilisation {
			governs = "◄"
		}
		where := segment(c.From, c.To)
		if name := combination(s.Column, c.Combination); name != "" {
			where += " " + name
		}
		t.Rows = append(t.Rows, []string{schedule.CheckName(c.Kind), c.Clause, where, amount, working.Utilisation(c.Utilisation), governs})
	}
	items := []working.Item{t}
	lines := closing(s)
	for _, l := range lines[:len(lines)-2] {
		items = append(items, working.Words(l))
	}
	for _, n := range s.Notes {
		items = append(items, working.Words("Note: "+n+"."))
	}
	title := fmt.Sprintf("Checks: the greatest of each kind, of %d", len(s.Checks))
	return working.Block{Title: title, Items: items}
}
