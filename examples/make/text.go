package main

import (
	"bytes"
	"encoding/csv"
	"strconv"
)

// csvOf writes an issue as plain text.
func csvOf(lines []line) []byte {
	var buf bytes.Buffer
	w := csv.NewWriter(&buf)
	w.Write([]string{"Mark", "Grid", "Level from", "Level to", "Length [m]", "Qty", "N_Ed ULS1 [kN]", "N_Ed ULS2 [kN]",
		"Ends y-y", "Ends z-z", "Restraints y-y [m]", "Restraints z-z [m]", "Torsion restraints", "Family", "Section", "Max width [mm]", "Remarks"})
	for i := range lines {
		l := &lines[i]
		w.Write([]string{l.mark, l.grid, l.from, l.to, strconv.FormatFloat(l.length, 'f', 2, 64), strconv.Itoa(l.quantity),
			number(l.uls1), number(l.uls2), l.endsY, l.endsZ, l.restraintsY, l.restraintsZ, l.torsion, l.family, l.section, blankZero(l.maxWidth), l.remark})
	}
	w.Flush()
	return buf.Bytes()
}

func number(x float64) string { return strconv.FormatFloat(x, 'f', -1, 64) }

func blankZero(x float64) string {
	if x == 0 {
		return ""
	}
	return number(x)
}
