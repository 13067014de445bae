package calcsheet

import (
	"stanchion/design/working"
)

// cellBox sets a cell of a table.
func cellBox(s string, f face) box { return row(words(s, f)...) }

// tableSize is the size of the type in tables.
const tableSize = 0.92

// table sets a table. Where it is too wide its widest column of texts is
// wrapped.
func (s *setter) table(t *working.Table) []line {
	widths := make([]float64, len(t.Head))
	total := 0.0
	for j := range t.Head {
		widths[j] = cellBox(t.Head[j], bold).w
		for _, r := range t.Rows {
			widths[j] = max(widths[j], cellBox(r[j], upright).w)
		}
		total += widths[j]
	}
	const between = 0.8
	room := s.width/tableSize - between*float64(len(widths)-1)
	if total > room {
		widest := 0
		for j := range widths {
			if !t.Right[j] && widths[j] > widths[widest] {
				widest = j
			}
		}
		widths[widest] = max(4, widths[widest]-(total-room))
	}
	var lines []line
	for i, r := range append([][]string{t.Head}, t.Rows...) {
		f := upright
		if i == 0 {
			f = bold
		}
		lines = append(lines, s.tableRow(r, t.Right, widths, between, f)...)
	}
	return lines
}

func (s *setter) tableRow(row []string, right []bool, widths []float64, between float64, f face) []line {
	var lines []line
	x := 0.0
	for j, cell := range row {
		inner := setter{width: widths[j] + 0.01}
		for k, l := range inner.fill(words(cell, f), 0, 0) {
			if k == len(lines) {
				lines = append(lines, line{scale: tableSize})
			}
			at := x
			if right[j] {
				at += widths[j] - l.w
			}
			for _, p := range l.parts {
				lines[k].put(p.b, at+p.x)
			}
		}
		x += widths[j] + between
	}
	return lines
}
