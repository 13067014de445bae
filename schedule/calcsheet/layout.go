package calcsheet

import (
	"strings"

	"github.com/rivo/uniseg"
)

// columns returns how many columns of a screen a text takes.
func columns(s string) int { return uniseg.StringWidth(s) }

// pad fills a text with blanks to a width.
func pad(s string, width int) string {
	return s + strings.Repeat(" ", max(0, width-columns(s)))
}

func padLeft(s string, width int) string {
	return strings.Repeat(" ", max(0, width-columns(s))) + s
}

// ends sets two texts at the two edges of a line.
func ends(left, right string) string {
	if right == "" {
		return left
	}
	return left + strings.Repeat(" ", max(1, TextWidth-columns(left)-columns(right))) + right
}

// wrap breaks a text at blanks into lines of a width.
func wrap(s string, width int) []string { return wrapFirst(s, width, width) }

// wrapFirst breaks a text at blanks into lines, the first of its own width.
func wrapFirst(s string, first, rest int) []string {
	var lines []string
	at, width := "", first
	for _, word := range strings.Fields(s) {
		switch {
		case at == "":
			at = word
		case columns(at)+1+columns(word) > width:
			lines = append(lines, at)
			at, width = word, rest
		default:
			at += " " + word
		}
	}
	return append(lines, at)
}

// tableLines sets rows in columns, two blanks apart. Where they are too wide
// the widest column of texts is cut down and its cells wrapped.
func tableLines(head []string, right []bool, rows [][]string, width int) []string {
	widths := make([]int, len(head))
	total := 2 * (len(head) - 1)
	for j := range head {
		widths[j] = columns(head[j])
		for _, r := range rows {
			widths[j] = max(widths[j], columns(r[j]))
		}
		total += widths[j]
	}
	if over := total - width; over > 0 {
		widest := 0
		for j := range widths {
			if !right[j] && widths[j] > widths[widest] {
				widest = j
			}
		}
		widths[widest] = max(8, widths[widest]-over)
	}
	var lines []string
	for _, r := range append([][]string{head}, rows...) {
		lines = append(lines, rowLines(r, right, widths)...)
	}
	return lines
}

// rowLines sets one row, over several lines where a cell is wrapped.
func rowLines(row []string, right []bool, widths []int) []string {
	cells := make([][]string, len(row))
	height := 1
	for j := range row {
		cells[j] = wrap(row[j], widths[j])
		height = max(height, len(cells[j]))
	}
	lines := make([]string, height)
	for k := range lines {
		parts := make([]string, len(row))
		for j := range row {
			text := ""
			if k < len(cells[j]) {
				text = cells[j][k]
			}
			if right[j] {
				parts[j] = padLeft(text, widths[j])
			} else {
				parts[j] = pad(text, widths[j])
			}
		}
		lines[k] = strings.TrimRight(strings.Join(parts, "  "), " ")
	}
	return lines
}
