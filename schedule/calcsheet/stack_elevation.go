package calcsheet

import (
	"fmt"
	"math"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule"
)

// Where the parts of the elevation of a stack stand, mm from its left.
const (
	stackLevels = 15.0 // the right end of the names of levels
	stackAxis   = 21.0 // the column
	stackTexts  = 27.0
)

// stackElevation draws a column line: its levels, sections, splices and
// utilisations, the heights to scale.
func stackElevation(c canvas, s *Stack, x, y, w, h float64) {
	write(c, x, y+4, "Stack "+s.Name, bold, 9*pt, atLeft)
	top, bottom := y+11, y+h-5
	heights := s.heights()
	sum := 0.0
	for _, h := range heights {
		sum += h
	}
	scale := (bottom - top) / sum
	at := bottom
	for i := range s.Lengths {
		l := &s.Lengths[i]
		next := at - heights[i]*scale
		levelLine(c, l.column().From, x, at, w)
		if l.Sheet != nil {
			stackLength(c, l.Sheet, x, next, at, w)
		} else {
			stackGap(c, l.Missing, x, next, at, w)
		}
		if i > 0 {
			s.splice(c, i, x+stackAxis, at)
		}
		if i == len(s.Lengths)-1 {
			levelLine(c, l.column().To, x, next, w)
		}
		at = next
	}
}

func levelLine(c canvas, name string, x, y, w float64) {
	c.line(x+stackLevels+1, y, x+w, y, faint)
	write(c, x+stackLevels, y+0.8, cut(name, upright, stackLevels/(6.6*pt)), upright, 6.6*pt, atRight)
}

// drawnHalf is half the width of a drawn column: its depth to a scale of its
// own.
func drawnHalf(l *working.Sheet) float64 { return 0.5 + l.Section.H/400*1.4 }

// stackLength draws one length between two levels, with what is to say of it.
func stackLength(c canvas, l *working.Sheet, x, top, bottom, w float64) {
	half := drawnHalf(l)
	rectangle(c, x+stackAxis-half, top, 2*half, bottom-top, 0.82)
	frame(c, x+stackAxis-half, top, 2*half, bottom-top, usualLine)
	r := l.Result
	texts := []struct {
		s    string
		f    face
		size float64
	}{
		{l.Section.Name() + " " + l.Grade, bold, 7.4},
		{fmt.Sprintf("N_Ed = %.0f kN, L = %s m, %s", greatest(l)/1e3, metres(l.Column.Length), l.Column.Mark), upright, 6.2},
	}
	mid := (top + bottom) / 2
	room := bottom - top
	yy := mid - 1.6
	if room < 9 {
		yy = mid + 0.6
	}
	for i, t := range texts {
		if i > 0 && room < 9 {
			break
		}
		b := compact(row(words(t.s, t.f)...))
		draw(c, &b, x+stackTexts, yy, min(t.size*pt, (w-stackTexts)/b.w))
		yy += 3.1
	}
	if room < 6 {
		return
	}
	stackBar(c, l, x+stackTexts, yy-1.6, 22)
	text := working.Utilisation(r.Utilisation)
	f := upright
	if r.Status != design.Passes {
		text, f = text+" "+r.Status.String(), bold
	}
	write(c, x+stackTexts+23.5, yy+0.2, text, f, 6.2*pt, atLeft)
	if l.Governing >= 0 && room > 12 {
		write(c, x+stackTexts, yy+3.2, schedule.CheckName(l.Checks[l.Governing].Kind), upright, 5.6*pt, atLeft)
	}
}

// stackGap leaves a gap between two levels where a length has no sheet, with
// its mark and the word for that.
func stackGap(c canvas, m *Missing, x, top, bottom, w float64) {
	const half = 1.2
	for _, side := range []float64{-half, half} {
		c.line(x+stackAxis+side, top+0.8, x+stackAxis+side, bottom-0.8, dashed)
	}
	mid, room := (top+bottom)/2, bottom-top
	write(c, x+stackAxis, mid+1.1, "?", bold, 9*pt, atMiddle)
	y := mid + 0.6
	if room >= 9 {
		y = mid - 0.8
	}
	width := func(points float64) float64 { return (w - stackTexts) / (points * pt) }
	write(c, x+stackTexts, y, cut(m.Column.Mark+": "+m.Status.String(), bold, width(7.4)), bold, 7.4*pt, atLeft)
	if room >= 9 {
		write(c, x+stackTexts, y+3.1, cut(lengthSaid(m.Column), upright, width(6.2)), upright, 6.2*pt, atLeft)
	}
}

// lengthSaid says how long a length without a sheet is, as far as that is known.
func lengthSaid(c *design.Column) string {
	if c.Length > 0 {
		return "L = " + metres(c.Length) + " m"
	}
	return "its length is not known: not to scale"
}

// stackBar draws a utilisation against its limit.
func stackBar(c canvas, l *working.Sheet, x, y, w float64) {
	const h = 1.8
	full := w / 1.1
	u := l.Result.Utilisation / l.Limit
	rectangle(c, x, y, full*math.Min(u, 1.1), h, 0.55)
	frame(c, x, y, full, h, thinLine)
}

// greatest returns the greatest axial force of a column, N.
func greatest(l *working.Sheet) float64 {
	n := math.Inf(-1)
	for i := range l.Column.Combinations {
		comb := &l.Column.Combinations[i]
		n = math.Max(n, comb.NEd)
		for _, s := range comb.Steps {
			n = math.Max(n, s.NEd)
		}
	}
	if g := l.Settings.Growth; g > 0 {
		n *= g
	}
	return n
}

// splice marks a splice below length i, the thicker where the section changes.
func (s *Stack) splice(c canvas, i int, x, y float64) {
	spliced, changes := s.spliced(i)
	if !spliced {
		return
	}
	half := math.Max(drawnHalf(s.Lengths[i-1].Sheet), drawnHalf(s.Lengths[i].Sheet)) + 0.9
	stroke := usualLine
	if changes {
		stroke = thickLine
	}
	c.line(x-half, y-0.6, x+half, y-0.6, stroke)
	c.line(x-half, y-1.8, x+half, y-1.8, stroke)
	write(c, x-half-0.6, y-2.2, "splice", italic, 5.2*pt, atRight)
}

// The elevations of stacks on a page: three side by side, in two rows where
// they are low enough.
const (
	stacksAcross = 3
	stackLow     = 6 // lengths
)

// stackPages draws the elevations of the stacks.
func (d *document) stackPages(stacks []*Stack) {
	const top = marginTop + titleHeight + 3
	for len(stacks) > 0 {
		d.page("Elevations")
		rows, most := 1, 0
		for _, s := range stacks[:min(2*stacksAcross, len(stacks))] {
			most = max(most, len(s.Lengths))
		}
		if most <= stackLow {
			rows = 2
		}
		w, h := textWidth/stacksAcross, (bodyBottom-top)/float64(rows)
		n := min(rows*stacksAcross, len(stacks))
		for i, s := range stacks[:n] {
			x := marginLeft + float64(i%stacksAcross)*w
			stackElevation(d.canvas, s, x, top+float64(i/stacksAcross)*h, w-4, h-2)
		}
		stacks = stacks[n:]
	}
}
