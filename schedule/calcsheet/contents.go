package calcsheet

import (
	"fmt"
	"strconv"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule"
)

// contents draws what the sheets rest on, and the list of them.
func (d *document) contents(sheets []*working.Sheet) {
	d.page("Contents")
	y := d.basis()
	y = d.list(sheets, y)
	d.missing(y)
}

// paragraph writes a text in lines and returns where the next one stands.
func (d *document) paragraph(x, y, w float64, s string, f face, size float64) float64 {
	set := setter{width: w / size}
	for _, l := range set.fill(words(s, f), 0, 0) {
		y += 1.3 * size
		body := l.body()
		draw(d.canvas, &body, x, y, size)
	}
	return y
}

// basis says what was used: the schedule, the standard, the settings.
func (d *document) basis() float64 {
	p := d.project
	const size = 7.4 * pt
	y := marginTop + titleHeight + 5
	write(d.canvas, marginLeft, y, "Column calculations", bold, 14*pt, atLeft)
	y += 2
	rows := [][2]string{{"Schedule", p.File}, {"Sheet", p.Sheet}, {"SHA-256", p.SHA256}, {"Program", p.Program},
		{"Standard", p.Standard}, {"National set", fmt.Sprintf("%s: γ_M0 %.2f, γ_M1 %.2f; %s", p.National.Name, p.National.GammaM0, p.National.GammaM1, p.National.Source)}}
	rows = append(rows, p.Settings...)
	for _, r := range rows {
		if r[1] == "" {
			continue
		}
		write(d.canvas, marginLeft, y+1.3*size, r[0], upright, size, atLeft)
		y = d.paragraph(marginLeft+32, y, textWidth-32, r[1], upright, size)
	}
	y += 2
	y = d.paragraph(marginLeft, y, textWidth, "Every sheet gives the formula, the formula with the numbers put in, the result and the clause. "+
		"Numbers stand to as many figures as those before them support: worked out with the printed numbers, a line gives the printed result, but for one step of its last figure. "+
		"The elevations show the ends (pin, fixed or partly fixed plate), the points that hold the column, and the buckling lengths; the thick one decides.", upright, size)
	return y + 5
}

// The list of sheets: where its columns stand, mm from the left.
var listColumns = []struct {
	head string
	x    float64
	at   anchor
}{{"sheet", 7, atRight}, {"mark", 10, atLeft}, {"place", 34, atLeft}, {"section", 72, atLeft}, {"grade", 103, atLeft},
	{"utilisation", 127, atRight}, {"", 129, atLeft}, {"governs", 146, atLeft}}

const (
	listPitch = 4.0
	listSize  = 7.2 * pt
)

func (d *document) listHead(y float64) float64 {
	for _, col := range listColumns {
		write(d.canvas, marginLeft+col.x, y, col.head, bold, listSize, col.at)
	}
	d.canvas.line(marginLeft, y+1.2, pageWidth-marginRight, y+1.2, usualLine)
	return y + listPitch + 0.6
}

// list draws one line a sheet, over as many pages as it takes.
func (d *document) list(sheets []*working.Sheet, y float64) float64 {
	y = d.listHead(y)
	for i, s := range sheets {
		if y > bodyBottom-2 {
			d.page("Contents")
			y = d.listHead(marginTop + titleHeight + 4)
		}
		d.listLine(s, i, y)
		y += listPitch
	}
	return y
}

func (d *document) listLine(s *working.Sheet, i int, y float64) {
	r := s.Result
	state := r.Status.String()
	f := upright
	if r.Status != design.Passes {
		f = bold // a word and a weight: colour alone says nothing
	}
	governs := ""
	if s.Governing >= 0 {
		governs = schedule.CheckName(s.Checks[s.Governing].Kind)
	}
	cells := []string{strconv.Itoa(i + 1), s.Column.Mark, rest(s.Column), s.Section.Name(), s.Grade, working.Utilisation(r.Utilisation), state, governs}
	for k, col := range listColumns {
		next := textWidth
		if k+1 < len(listColumns) {
			next = listColumns[k+1].x
		}
		text := cells[k]
		if col.at == atLeft {
			text = cut(text, f, (next-col.x-1)/listSize)
		}
		write(d.canvas, marginLeft+col.x, y, text, f, listSize, col.at)
	}
	d.canvas.line(marginLeft, y+1.2, pageWidth-marginRight, y+1.2, faint)
	d.canvas.link(marginLeft, y-2.6, textWidth, listPitch, i)
}

// missing lists the members that have no sheet, with the reason.
func (d *document) missing(y float64) {
	if len(d.project.Missing) == 0 {
		return
	}
	const gap = 0.6 // mm, above each
	head := func(at float64) float64 {
		write(d.canvas, marginLeft, at, "Members without a sheet", bold, 8*pt, atLeft)
		return at
	}
	begun := false
	for _, m := range d.project.Missing {
		text := place(m.Column) + ": " + m.Why
		set := setter{width: textWidth / listSize}
		high := gap + 1.3*listSize*float64(len(set.fill(words(text, upright), 0, 0)))
		switch {
		case !begun && y+3+high > bodyBottom, y+high > bodyBottom:
			d.page("Contents")
			y = head(marginTop + titleHeight + 4)
		case !begun:
			y = head(y + 3)
		}
		begun = true
		y = d.paragraph(marginLeft, y+gap, textWidth, text, upright, listSize)
	}
}
