package calcsheet

import (
	"strings"
	"unicode"

	"codeberg.org/go-pdf/fpdf"
)

// pdfCanvas draws on the pages of a PDF. It keeps the state of the file, so
// that nothing is said twice.
type pdfCanvas struct {
	pdf   *fpdf.Fpdf
	scale float64 // of the paper to A4
	face  face
	size  float64
	set   bool
	lines stroke
	fill  float64
	links []int // of the sheets
}

// fontName is the name of the family in the file.
const fontName = "Go"

var faceStyles = [...]string{upright: "", italic: "I", bold: "B"}

func newPDFCanvas(pdf *fpdf.Fpdf, scale float64) *pdfCanvas {
	for f, style := range faceStyles {
		pdf.AddUTF8FontFromBytes(fontName, style, faceData[f])
	}
	return &pdfCanvas{pdf: pdf, scale: scale, lines: stroke{width: -1, dash: -1, grey: -1}, fill: -1}
}

// page starts a page: the state of the one before is gone.
func (c *pdfCanvas) page() {
	c.pdf.AddPage()
	c.set, c.lines, c.fill = false, stroke{-1, -1, -1}, -1
}

func (c *pdfCanvas) stroke(s stroke) {
	if s.width != c.lines.width {
		c.pdf.SetLineWidth(s.width * c.scale)
	}
	if s.dash != c.lines.dash {
		pattern := []float64{}
		if s.dash > 0 {
			pattern = []float64{s.dash * c.scale, s.dash * c.scale}
		}
		c.pdf.SetDashPattern(pattern, 0)
	}
	if s.grey != c.lines.grey {
		v := int(s.grey * 255)
		c.pdf.SetDrawColor(v, v, v)
	}
	c.lines = s
}

func (c *pdfCanvas) line(x1, y1, x2, y2 float64, s stroke) {
	c.stroke(s)
	c.pdf.Line(x1*c.scale, y1*c.scale, x2*c.scale, y2*c.scale)
}

func (c *pdfCanvas) polyline(points []point, s stroke) {
	c.stroke(s)
	c.path(points)
	c.pdf.DrawPath("D")
}

func (c *pdfCanvas) polygon(points []point, grey float64) {
	c.grey(grey)
	c.path(points)
	c.pdf.ClosePath()
	c.pdf.DrawPath("F")
}

func (c *pdfCanvas) path(points []point) {
	for i, p := range points {
		if i == 0 {
			c.pdf.MoveTo(p.x*c.scale, p.y*c.scale)
		} else {
			c.pdf.LineTo(p.x*c.scale, p.y*c.scale)
		}
	}
}

func (c *pdfCanvas) grey(v float64) {
	if v != c.fill {
		c.pdf.SetFillColor(int(v*255), int(v*255), int(v*255))
		c.fill = v
	}
}

func (c *pdfCanvas) text(x, y float64, s string, f face, size float64) {
	if !c.set || f != c.face || size != c.size {
		c.pdf.SetFont(fontName, faceStyles[f], size/pt*c.scale)
		c.face, c.size, c.set = f, size, true
	}
	c.pdf.Text(x*c.scale, y*c.scale, printable(s))
}

// printable replaces what the file's fonts cannot address: control characters,
// and those beyond the first 65536.
func printable(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r > 0xFFFF:
			return '□'
		case unicode.IsControl(r):
			return ' '
		}
		return r
	}, s)
}

func (c *pdfCanvas) link(x, y, w, h float64, to int) {
	if to >= 0 && to < len(c.links) {
		c.pdf.Link(x*c.scale, y*c.scale, w*c.scale, h*c.scale, c.links[to])
	}
}
