package calcsheet

// canvas is what drawings and sheets are drawn on: a page of a PDF or an SVG.
// Lengths are in mm, y grows downwards, texts stand on their baseline.
type canvas interface {
	line(x1, y1, x2, y2 float64, s stroke)
	polyline(points []point, s stroke)
	polygon(points []point, grey float64) // filled
	text(x, y float64, s string, f face, size float64)
	link(x, y, w, h float64, to int) // a place that leads to a sheet; no-op where there are none
}

type point struct{ x, y float64 }

// stroke is how a line is drawn.
type stroke struct {
	width float64 // mm
	dash  float64 // mm; 0: solid
	grey  float64 // 0 black to 1 white
}

// The strokes of the drawings.
var (
	thinLine  = stroke{width: 0.12}
	usualLine = stroke{width: 0.2}
	thickLine = stroke{width: 0.5}
	dashed    = stroke{width: 0.12, dash: 0.8}
	faint     = stroke{width: 0.08, grey: 0.6}
)

// pt is a point of type in mm.
const pt = 25.4 / 72

// anchor says which point of a text stands at a place.
type anchor uint8

const (
	atLeft anchor = iota
	atMiddle
	atRight
)

// draw draws a box with its origin at x, y; size is that of 1 em in mm.
func draw(c canvas, b *box, x, y, size float64) {
	for i := range b.marks {
		m := &b.marks[i]
		if m.text == "" {
			c.line(x+m.x*size, y-m.y*size, x+m.x2*size, y-m.y2*size, stroke{width: m.size * size})
			continue
		}
		c.text(x+m.x*size, y-m.y*size, m.text, m.face, m.size*size)
	}
}

// write draws a text at an anchor; size is that of 1 em in mm.
func write(c canvas, x, y float64, s string, f face, size float64, at anchor) {
	switch w := f.width(s) * size; at {
	case atMiddle:
		x -= w / 2
	case atRight:
		x -= w
	}
	c.text(x, y, s, f, size)
}

// rectangle fills a rectangle.
func rectangle(c canvas, x, y, w, h, grey float64) {
	c.polygon([]point{{x, y}, {x + w, y}, {x + w, y + h}, {x, y + h}}, grey)
}

// frame draws the outline of a rectangle.
func frame(c canvas, x, y, w, h float64, s stroke) {
	c.polyline([]point{{x, y}, {x + w, y}, {x + w, y + h}, {x, y + h}, {x, y}}, s)
}

// cut shortens a text to a width, in em, with an ellipsis where some is lost.
func cut(s string, f face, width float64) string {
	if f.width(s) <= width {
		return s
	}
	runes := []rune(s)
	for len(runes) > 0 && f.width(string(runes)+"…") > width {
		runes = runes[:len(runes)-1]
	}
	return string(runes) + "…"
}
