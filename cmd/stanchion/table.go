package main

import (
	"strings"
	"unicode/utf8"
)

// table is text in columns for a screen or a page.
type table struct {
	right []bool // columns of numbers
	most  []int  // greatest width of a column; 0: as wide as it needs
	rows  [][]string
}

// newTable starts a table with these headings. A heading that opens with ">"
// has its column set to the right.
func newTable(headings ...string) *table {
	t := &table{right: make([]bool, len(headings)), most: make([]int, len(headings))}
	for i, h := range headings {
		if rest, ok := strings.CutPrefix(h, ">"); ok {
			t.right[i], headings[i] = true, rest
		}
	}
	t.add(headings...)
	return t
}

// limit sets the greatest width of a column; longer values are cut.
func (t *table) limit(column, width int) { t.most[column] = width }

// add adds a row.
func (t *table) add(cells ...string) { t.rows = append(t.rows, cells) }

// lines returns the rows as lines of equal columns, two spaces apart, or one
// where the screen would be too narrow. Columns that are blank in every row are
// left out.
func (t *table) lines() []string {
	widths := t.widths()
	gap := "  "
	if whole := sum(widths) + 2*len(widths) - 2; whole > screenWidth {
		gap = " "
	}
	out := make([]string, len(t.rows))
	for i, row := range t.rows {
		var b strings.Builder
		for j, cell := range row {
			if widths[j] == 0 {
				continue
			}
			if b.Len() > 0 {
				b.WriteString(gap)
			}
			b.WriteString(pad(cut(cell, widths[j]), widths[j], t.right[j]))
		}
		out[i] = strings.TrimRight(b.String(), " ")
	}
	return out
}

func (t *table) widths() []int {
	widths := make([]int, len(t.right))
	for j := range widths {
		filled := false
		for i, row := range t.rows {
			widths[j] = max(widths[j], utf8.RuneCountInString(row[j]))
			filled = filled || i > 0 && row[j] != ""
		}
		if !filled {
			widths[j] = 0
		} else if t.most[j] > 0 {
			widths[j] = min(widths[j], t.most[j])
		}
	}
	return widths
}

func pad(s string, width int, right bool) string {
	space := strings.Repeat(" ", max(0, width-utf8.RuneCountInString(s)))
	if right {
		return space + s
	}
	return s + space
}

// cut shortens s to a width, with an ellipsis where something is lost.
func cut(s string, width int) string {
	if utf8.RuneCountInString(s) <= width {
		return s
	}
	runes := []rune(s)
	return strings.TrimRight(string(runes[:max(0, width-1)]), " ") + "…"
}

// wrap breaks words into lines of a width, each after the first led by indent.
func wrap(s string, width int, indent string) string {
	var b strings.Builder
	at := 0
	for i, word := range strings.Fields(s) {
		n := utf8.RuneCountInString(word)
		switch {
		case i == 0:
		case at+1+n > width:
			b.WriteString("\n" + indent)
			at = utf8.RuneCountInString(indent)
		default:
			b.WriteByte(' ')
			at++
		}
		b.WriteString(word)
		at += n
	}
	return b.String()
}

func sum(list []int) (total int) {
	for _, n := range list {
		total += n
	}
	return total
}

// wrapList writes a list in lines of a width that break between its items.
func wrapList(items []string, width int) []string {
	lines := []string{""}
	for i, item := range items {
		if i+1 < len(items) {
			item += ","
		}
		last := &lines[len(lines)-1]
		switch {
		case *last == "":
			*last = item
		case utf8.RuneCountInString(*last)+1+utf8.RuneCountInString(item) > width:
			lines = append(lines, item)
		default:
			*last += " " + item
		}
	}
	return lines
}
