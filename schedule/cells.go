package schedule

import (
	"strconv"
	"strings"
)

// at returns the cell of a column; blank beyond the row's end.
func (r *Row) at(col int) *Cell {
	if col < 0 || col >= len(r.Cells) {
		return &blankCell
	}
	return &r.Cells[col]
}

var blankCell Cell

// text returns what a person reads in the cell.
func (c *Cell) text() string {
	switch c.Kind {
	case Blank:
		return ""
	case Number:
		return strconv.FormatFloat(c.Number, 'f', -1, 64)
	default:
		return trim(c.Text)
	}
}

// trim takes the space off both ends; most cells have none.
func trim(s string) string {
	if s == "" || s[0] > ' ' && s[0] < 0x7f && s[len(s)-1] > ' ' && s[len(s)-1] < 0x7f {
		return s
	}
	return strings.TrimFunc(s, isSpace)
}

// empty reports whether the cell holds nothing. A lone dash is how offices
// write nothing.
func (c *Cell) empty() bool {
	switch c.Kind {
	case Blank:
		return true
	case Text:
		return nothing(trim(c.Text))
	default:
		return false
	}
}

func nothing(s string) bool {
	switch s {
	case "", "-", "--", "–", "—":
		return true
	}
	return false
}

// clone copies a row that is valid only until the next one.
func (r *Row) clone() *Row {
	c := *r
	c.Cells = append([]Cell(nil), r.Cells...)
	for i := range c.Cells {
		c.Cells[i].Text = strings.Clone(c.Cells[i].Text)
	}
	return &c
}
