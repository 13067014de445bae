package calcsheet

import (
	"fmt"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule"
)

// The page, mm: A4 with room for binding at the left.
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

	resultsHeight = 15.0
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
	return list
}()

// memberPages draws the sheet of a member: one page, or more where not even
// the smallest type keeps it to one.
func (d *document) memberPages(s *working.Sheet, number, of int) {
	lines, how := d.fit(s)
	size := how.points * pt
	for first := true; first || len(lines) > 0; first = false {
		d.page(fmt.Sprintf("Sheet %d of %d", number, of))
		if first {
			d.pdf.SetLink(d.canvas.links[number-1], 0, -1)
			d.pdf.Bookmark(placeOf(s)+"  "+s.Section.Name(), 0, -1)
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

// fit sets a sheet in the first density with which it stands on one page.
func (d *document) fit(s *working.Sheet) (lines []line, how dense) {
	set := setter{steps: map[*working.Step]*setStep{}}
	blocks := append(append([]working.Block(nil), s.Blocks...), checksBlock(s))
	for _, how = range densities {
		size := how.points * pt
		set.width, set.bare = columnWidth/size, how.bare
		lines = lines[:0]
		for i := range blocks {
			lines = append(lines, set.block(&blocks[i])...)
		}
		n := fitting(lines, (bodyBottom-bodyStart-how.drawings)/size, how.leading)
		if n += fitting(lines[n:], (bodyBottom-bodyStart)/size, how.leading); n == len(lines) {
			break
		}
	}
	return lines, how
}

// column draws lines one below the other.
func (d *document) column(lines []line, x, y, size, leading float64) {
	for i := range lines {
		l := &lines[i]
		if i > 0 {
			y += l.before * size
		}
		y += l.up() * size
		draw(d.canvas, &l.body, x, y, size)
		draw(d.canvas, &l.edge, x+columnWidth-l.edge.w*size, y, size)
		y += (l.down() + leading) * size
	}
}

// memberHead says which column it is, in which section, and how it came out.
func (d *document) memberHead(s *working.Sheet, first bool) {
	c := d.canvas
	y := marginTop + titleHeight + 5.4
	mark := s.Column.Mark
	write(c, marginLeft, y, mark, bold, 13*pt, left)
	rest := rest(s.Column)
	if s.Column.Quantity > 1 {
		rest += fmt.Sprintf("   %d off", s.Column.Quantity)
	}
	if !first {
		rest += "   continued"
	}
	write(c, marginLeft+bold.width(mark)*13*pt+3, y, rest, upright, 9*pt, left)
	write(c, pageWidth-marginRight, y, s.Section.Name()+"   "+s.Grade, bold, 11*pt, right)
	write(c, marginLeft, y+4.6, verdict(s), upright, 8*pt, left)
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

func placeOf(s *working.Sheet) string { return place(s.Column) }

// drawings draws the elevation, the buckling curves and the main results.
func (d *document) drawings(s *working.Sheet, height float64) {
	split := 0.5 * columnWidth
	elevation(d.canvas, s, marginLeft, bodyTop+1, split, height-4)
	x := marginLeft + split + 1
	chart(d.canvas, s, x, bodyTop+1, columnWidth-split-1, height-resultsHeight-6)
	results(d.canvas, s, x+1, bodyTop+height-resultsHeight-3, columnWidth-split-2)
	y := bodyTop + height - 2
	d.canvas.line(marginLeft, y, marginLeft+columnWidth, y, faint)
}

// results is the table of what the schedule's result columns say, to the same
// decimals.
func results(c canvas, s *working.Sheet, x, y, w float64) {
	size := 6.4 * pt
	right := []float64{0.34 * w, 0.52 * w, 0.62 * w, 0.78 * w, w}
	head := []string{"L_cr m", "λ̄", "", "χ", "N_b,Rd kN"}
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
		y += 2.8
		write(c, x, y+2.8, row.name, upright, size, left)
		for i, text := range []string{fmt.Sprintf("%.3f", row.b.Lcr/1e3), fmt.Sprintf("%.3f", row.b.LambdaBar), row.b.Curve,
			fmt.Sprintf("%.3f", row.b.Chi), fmt.Sprintf("%.1f", row.b.NbRd/1e3)} {
			write(c, x+right[i], y+2.8, text, upright, size, 2)
		}
	}
	last := fmt.Sprintf("class %d, f_y %.0f N/mm², %.1f kg/m, %.1f kg", r.Class, r.Fy, r.MassPerM, r.Mass)
	if r.MbRd > 0 {
		last = fmt.Sprintf("M_b,Rd %.1f kNm, ", r.MbRd/1e6) + last
	}
	b := row(words(last, upright)...)
	draw(c, &b, x, y+6.4, min(5.6*pt, w/b.w))
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
