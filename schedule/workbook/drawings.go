package workbook

import (
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// drawn returns the cells that drawings on a sheet stand over.
func (b *Book) drawn(s *sheet) ([]area, error) {
	rels, err := b.pkg.Rels(s.part)
	if err != nil {
		return nil, err
	}
	var out []area
	for _, r := range rels {
		if !r.Is("drawing") || r.Outside || !b.pkg.Has(r.Target) {
			continue
		}
		root, _, err := b.pkg.Tree(r.Target)
		if err != nil {
			return nil, err
		}
		l, err := b.layoutOf(s)
		if err != nil {
			return nil, err
		}
		for _, anchor := range root.Children {
			if a, ok := l.under(anchor); ok {
				out = append(out, a)
			}
		}
	}
	return out, nil
}

// under returns the cells under a drawing. It stands between two cells, or has
// its size and stands from a cell or a point of the sheet on.
func (l *layout) under(anchor *markup.Element) (area, bool) {
	from, to, size, at := anchor.Child("from"), anchor.Child("to"), anchor.Child("ext"), anchor.Child("pos")
	switch {
	case from != nil && to != nil:
		return area{inCell(from, "row") + 1, inCell(to, "row") + 1, inCell(from, "col"), inCell(to, "col")}, true
	case from != nil:
		a := area{inCell(from, "row") + 1, 0, inCell(from, "col"), 0}
		a.lastRow = l.rowAt(a.firstRow, inCell(from, "rowOff")+length(size, "cy"))
		a.lastCol = l.columnAt(a.firstCol, inCell(from, "colOff")+length(size, "cx"))
		return a, true
	case at != nil:
		x, y := length(at, "x"), length(at, "y")
		return area{
			l.rowAt(1, y), l.rowAt(1, y+length(size, "cy")),
			l.columnAt(0, x), l.columnAt(0, x+length(size, "cx")),
		}, true
	}
	return area{}, false
}

// A drawing's lengths are in parts of which 12 700 make a point.
const (
	partsOfPoint = 12_700
	partsOfPixel = 9_525 // 96 in an inch
	pixelsOfChar = 7     // in the usual letters
	usualColumn  = 64    // pixels
)

// columnAt returns the column in which a point lies that is so far from the
// left of another.
func (l *layout) columnAt(from, off int) int {
	widths, usual := l.columnWidths()
	for c := from; c < maxColumns-1; c++ {
		w, said := widths[c]
		if !said {
			w = usual
		}
		if off -= w; off < 0 {
			return c
		}
	}
	return maxColumns - 1
}

// rowAt returns the row in which a point lies that is so far below the top of
// another, as near as the usual height of the rows says.
func (l *layout) rowAt(from, off int) int {
	height := usualRowHeight * partsOfPoint
	if h, err := strconv.ParseFloat(l.root.Child("sheetFormatPr").Attr("defaultRowHeight"), 64); err == nil && h > 1 {
		height = int(h * partsOfPoint)
	}
	return min(from+off/height, maxRows)
}

// columnWidths returns the widths that columns say, and that of the others, in
// parts.
func (l *layout) columnWidths() (said map[int]int, usual int) {
	parts := func(chars string) (int, bool) {
		w, err := strconv.ParseFloat(chars, 64)
		return int(w * pixelsOfChar * partsOfPixel), err == nil && w >= 0 && w < 256
	}
	usual, ok := parts(l.root.Child("sheetFormatPr").Attr("defaultColWidth"))
	if !ok {
		usual = usualColumn * partsOfPixel
	}
	said = map[int]int{}
	for _, e := range l.root.Child("cols").All("col") {
		if w, ok := parts(e.Attr("width")); ok {
			for c := max(1, number(e, "min")); c <= min(number(e, "max"), maxColumns); c++ {
				said[c-1] = w
			}
		}
	}
	for c := range l.hidden {
		said[c] = 0
	}
	return said, usual
}

// inCell returns a number of one corner of a drawing.
func inCell(e *markup.Element, name string) int {
	c := e.Child(name)
	if c == nil {
		return 0
	}
	return bounded(strings.TrimSpace(c.Text()))
}

// length returns a length of a drawing, in parts.
func length(e *markup.Element, name string) int {
	return bounded(e.Attr(name))
}

// bounded reads a whole number; what is none, or out of all bounds, is taken
// to the nearest that makes sense.
func bounded(s string) int {
	const most = 1 << 31
	n, _ := strconv.ParseInt(s, 10, 64)
	return int(min(max(n, 0), most))
}
