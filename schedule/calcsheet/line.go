package calcsheet

// line is one line of a sheet, in em: what stands on it from the left, what
// stands at its right edge, and whether it stays with the next one. Boxes are
// put together when the line is drawn: most lines are set several times before
// their size is settled.
type line struct {
	parts    []placed
	w        float64
	up, down float64
	scale    float64 // of all of it; 0 is 1
	edge     box
	before   float64 // room above
	keep     bool
}

// placed is a box at a place on a line.
type placed struct {
	b *box
	x float64
}

// put adds a box at a place.
func (l *line) put(b *box, x float64) {
	l.parts = append(l.parts, placed{b, x})
	l.w = max(l.w, x+b.w)
	l.up, l.down = max(l.up, b.up), max(l.down, b.down)
}

// body returns what stands on the line as one box.
func (l *line) body() box {
	var b box
	for _, p := range l.parts {
		b.put(*p.b, p.x, 0)
	}
	if b = compact(b); l.scale > 0 {
		b = b.scaled(l.scale)
	}
	return b
}

// ascent and descent are the room above and below the baseline, without the
// edge's own where it is less.
func (l *line) ascent() float64 { return max(l.up, l.edge.up, ascent) }

func (l *line) descent() float64 { return max(l.down, l.edge.down, descent) }

func (l *line) height() float64 { return l.before + l.ascent() + l.descent() }

// fitting returns the number of lines that stand in a height, em, with leading
// between them, so that no line is parted from one that it stays with.
func fitting(lines []line, height, leading float64) int {
	n, used := 0, 0.0
	for n < len(lines) {
		h := lines[n].height() + leading
		if n == 0 {
			h -= lines[n].before
		}
		if used+h > height {
			break
		}
		used += h
		n++
	}
	if n == len(lines) {
		return n
	}
	for k := n; k > 0; k-- {
		if !lines[k-1].keep {
			return k
		}
	}
	return n
}
