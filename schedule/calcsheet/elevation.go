package calcsheet

import (
	"fmt"
	"math"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/design/working/formula"
)

// labelSize is that of the type in drawings, mm.
const labelSize = 6 * pt

// elevation draws the column as it is held about each axis: its ends, what
// holds it between them, and the segments with their buckling lengths.
func elevation(c canvas, s *working.Sheet, x, y, w, h float64) {
	views := []string{"y", "z"}
	if twistDiffers(s) {
		views = append(views, "T")
	}
	each := w / float64(len(views))
	for i, axis := range views {
		v := view{canvas: c, sheet: s, axis: axis, x: x + each*(float64(i)+0.46), top: y + 14, bottom: y + h - 10, width: each}
		v.draw(y)
	}
	write(c, x+w/2, y+h-0.4, "buckling lengths in mm, heights in m", upright, 5*pt, atMiddle)
}

// twistDiffers reports whether the twist is held elsewhere than z-z is.
func twistDiffers(s *working.Sheet) bool {
	var z, t []working.Length
	for _, l := range s.Lengths {
		switch l.Axis {
		case "z":
			z = append(z, l)
		case "T":
			t = append(t, l)
		}
	}
	if len(t) == 0 || len(t) == len(z) && func() bool {
		for i := range t {
			if t[i].From != z[i].From || t[i].To != z[i].To || t[i].Lcr != z[i].Lcr {
				return false
			}
		}
		return true
	}() {
		return false
	}
	return true
}

// view is the column about one axis.
type view struct {
	canvas      canvas
	sheet       *working.Sheet
	axis        string
	x           float64 // of the column's line
	top, bottom float64
	width       float64
}

// at returns where a height, mm above the bottom, stands on the page.
func (v *view) at(height float64) float64 {
	return v.bottom - (v.bottom-v.top)*height/v.sheet.Column.Length
}

func (v *view) hold() *design.Hold {
	if v.axis == "y" {
		return &v.sheet.Column.Y
	}
	return &v.sheet.Column.Z
}

// half is half the width of the drawn column, mm.
const half = 0.7

func (v *view) draw(y float64) {
	c := v.canvas
	title := v.axis + "-" + v.axis
	if v.axis == "T" {
		title = "torsion"
	}
	write(c, v.x, y+2.4, title, bold, 7*pt, atMiddle)
	v.moments()
	rectangle(c, v.x-half, v.top, 2*half, v.bottom-v.top, 0.82)
	frame(c, v.x-half, v.top, 2*half, v.bottom-v.top, usualLine)
	if v.axis == "T" {
		v.twist()
	} else {
		v.ends()
	}
	v.segments()
	if v.axis == "y" {
		v.load(y)
	}
}

// ends draws how the two ends are held, and the points between them.
func (v *view) ends() {
	h := v.hold()
	v.end(h.Bottom, v.bottom, 1)
	v.end(h.Top, v.top, -1)
	if h.Lcr > 0 || h.K > 0 {
		return // the restraints do not count
	}
	for _, x := range h.Restraints {
		v.held(v.at(x), x)
	}
}

// twist draws the points that hold the twist: the ends of its segments.
func (v *view) twist() {
	for _, l := range v.lengths() {
		for _, x := range []float64{l.From, l.To} {
			p := v.at(x)
			v.canvas.polyline([]point{{v.x - 2.2, p - 0.8}, {v.x - 2.2, p + 0.8}}, thickLine)
			v.canvas.polyline([]point{{v.x + 2.2, p - 0.8}, {v.x + 2.2, p + 0.8}}, thickLine)
			v.canvas.line(v.x-2.2, p, v.x+2.2, p, usualLine)
		}
	}
}

// held draws a point that holds the column sideways, and its height.
func (v *view) held(p, height float64) {
	v.canvas.polygon([]point{{v.x - half, p}, {v.x - half - 1.7, p - 0.9}, {v.x - half - 1.7, p + 0.9}}, 0)
	v.canvas.line(v.x-half-1.7, p-1.3, v.x-half-1.7, p+1.3, usualLine)
	write(v.canvas, v.x-half-2.2, p+0.7, metres(height), upright, labelSize, atRight)
}

// end draws an end: down is 1 at the bottom, -1 at the top.
func (v *view) end(e design.End, p, down float64) {
	c := v.canvas
	word := e.Condition.String()
	switch {
	case e.Stiffness != nil:
		word = "spring"
	case e.Eta != nil:
		word = "η " + formula.Figures(*e.Eta, 3)
	}
	plate := p
	switch e.Condition {
	case design.Pinned:
		plate = p + 1.9*down
		c.polyline([]point{{v.x, p}, {v.x - 1.5, plate}, {v.x + 1.5, plate}, {v.x, p}}, usualLine)
	case design.PartlyFixed, design.PartlyGuided:
		plate = p + 0.9*down
		frame(c, v.x-1, p, 2, 0.9*down, usualLine)
	}
	if e.Condition == design.Guided || e.Condition == design.PartlyGuided {
		c.line(v.x-2.4, plate, v.x+2.4, plate, usualLine)
		plate += 0.7 * down
	}
	if e.Condition != design.Free {
		c.line(v.x-2.4, plate, v.x+2.4, plate, usualLine)
		for k := -2; k <= 2; k++ {
			a := v.x + float64(k)*0.95
			c.line(a, plate, a-0.7, plate+0.9*down, thinLine)
		}
	}
	y := p + 5*down
	if down < 0 {
		y = p - 3.6
	}
	write(c, v.x, y, word, upright, labelSize, atMiddle)
}

func (v *view) lengths() []working.Length {
	var list []working.Length
	for _, l := range v.sheet.Lengths {
		if l.Axis == v.axis {
			list = append(list, l)
		}
	}
	return list
}

// segments draws the buckling lengths beside the segments that they belong to;
// the one that decides is drawn thick.
func (v *view) segments() {
	x := v.x + 3.6
	last := math.Inf(1)
	for _, l := range v.lengths() {
		a, b := v.at(l.From), v.at(l.To)
		s, f := usualLine, upright
		if l.Governs {
			s, f = thickLine, bold
		}
		v.canvas.line(x, a-0.4, x, b+0.4, s)
		for _, p := range []float64{a, b} {
			v.canvas.line(x-0.8, p, x+0.8, p, thinLine)
		}
		mid := (a+b)/2 + 0.7
		if last-mid < 2.2 {
			continue // no room
		}
		last = mid
		write(v.canvas, x+1, mid, formula.Figures(l.Lcr, 5), f, labelSize, atLeft)
	}
}

// load draws the force at the top, of the combination that governs, and what
// lands below it.
func (v *view) load(y float64) {
	s := v.sheet
	i := 0
	if s.Governing >= 0 {
		i = s.Checks[s.Governing].Combination
	}
	if i >= len(s.Column.Combinations) {
		return
	}
	comb := &s.Column.Combinations[i]
	growth := s.Settings.Growth
	if growth == 0 {
		growth = 1
	}
	c := v.canvas
	n := growth * comb.NEdAt(s.Column.Length)
	tip, tail := v.top-6.6, v.top-9.6
	if n < 0 {
		tip, tail = tail, tip
	}
	c.line(v.x, tail, v.x, tip, usualLine)
	head := math.Copysign(1.1, tail-tip)
	c.polygon([]point{{v.x, tip}, {v.x - 0.6, tip + head}, {v.x + 0.6, tip + head}}, 0)
	write(c, v.x+1.4, v.top-7.4, formula.Figures(math.Abs(n)/1e3, 4)+" kN", upright, labelSize, atLeft)
	for k, step := range comb.Steps {
		below := comb.NEd
		if k > 0 {
			below = comb.Steps[k-1].NEd
		}
		p := v.at(step.Height)
		c.line(v.x-half-3, p, v.x-half, p, usualLine)
		write(c, v.x-half-3.2, p-0.5, fmt.Sprintf("%+.0f", growth*(below-step.NEd)/1e3), upright, labelSize, atRight)
	}
}

// moments draws the diagram about the axis, on the side of the column where
// the labels of restraints do not stand in its way.
func (v *view) moments() {
	d := v.sheet.Diagram
	if d == nil || v.axis == "T" {
		return
	}
	m := d.My
	if v.axis == "z" {
		m = d.Mz
	}
	most := math.Max(math.Abs(m.Bottom), math.Abs(m.Top))
	if most == 0 {
		return
	}
	reach := 0.16 * v.width
	x := func(m float64) float64 { return v.x - half - 2.4 - reach*(m/most+1)/2 }
	v.canvas.line(x(0), v.top, x(0), v.bottom, faint)
	v.canvas.polyline([]point{{x(0), v.bottom}, {x(m.Bottom), v.bottom}, {x(m.Top), v.top}, {x(0), v.top}}, thinLine)
	label := func(m, y float64) {
		if m != 0 {
			write(v.canvas, v.x-half-2.4, y, formula.Figures(m/1e6, 3)+" kNm", upright, 5*pt, atRight)
		}
	}
	label(m.Top, v.top-0.6)
	label(m.Bottom, v.bottom+2)
}
