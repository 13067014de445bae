package calcsheet

import (
	"fmt"
	"html"
	"strconv"
	"strings"
)

// svgCanvas writes an SVG.
type svgCanvas struct{ b strings.Builder }

func num(v float64) string {
	s := strconv.FormatFloat(v, 'f', 2, 64)
	return strings.TrimRight(strings.TrimRight(s, "0"), ".")
}

func grey(v float64) string {
	if v == 0 {
		return "#000"
	}
	return fmt.Sprintf("#%02[1]x%02[1]x%02[1]x", int(v*255))
}

func (s stroke) svg() string {
	text := fmt.Sprintf(`fill="none" stroke="%s" stroke-width="%s"`, grey(s.grey), num(s.width))
	if s.dash > 0 {
		text += fmt.Sprintf(` stroke-dasharray="%s"`, num(s.dash))
	}
	return text
}

func (c *svgCanvas) line(x1, y1, x2, y2 float64, s stroke) {
	fmt.Fprintf(&c.b, `<line x1="%s" y1="%s" x2="%s" y2="%s" %s/>`+"\n", num(x1), num(y1), num(x2), num(y2), s.svg())
}

func svgPoints(points []point) string {
	list := make([]string, len(points))
	for i, p := range points {
		list[i] = num(p.x) + "," + num(p.y)
	}
	return strings.Join(list, " ")
}

func (c *svgCanvas) polyline(points []point, s stroke) {
	fmt.Fprintf(&c.b, `<polyline points="%s" %s/>`+"\n", svgPoints(points), s.svg())
}

func (c *svgCanvas) polygon(points []point, v float64) {
	fmt.Fprintf(&c.b, `<polygon points="%s" fill="%s"/>`+"\n", svgPoints(points), grey(v))
}

var svgFaces = [...]string{upright: "", italic: ` font-style="italic"`, bold: ` font-weight="bold"`}

func (c *svgCanvas) text(x, y float64, s string, f face, size float64) {
	// The width is stated: a reader without the typeface keeps the layout.
	fmt.Fprintf(&c.b, `<text x="%s" y="%s" font-size="%s"%s textLength="%s" lengthAdjust="spacingAndGlyphs">%s</text>`+"\n",
		num(x), num(y), num(size), svgFaces[f], num(f.width(s)*size), html.EscapeString(s))
}

func (c *svgCanvas) link(x, y, w, h float64, to int) {}

// SVGBegins is the first line of every SVG that this package writes.
const SVGBegins = `<?xml version="1.0" encoding="UTF-8"?><!--written by stanchion-->`

// bytes returns the file, of a size in mm.
func (c *svgCanvas) bytes(w, h float64, title string) []byte {
	return fmt.Appendf(nil, SVGBegins+`
<svg xmlns="http://www.w3.org/2000/svg" width="%smm" height="%smm" viewBox="0 0 %s %s" font-family="Go, Arial, Helvetica, sans-serif">
<title>%s</title>
<rect width="100%%" height="100%%" fill="#fff"/>
%s</svg>
`, num(w), num(h), num(w), num(h), html.EscapeString(title), c.b.String())
}
