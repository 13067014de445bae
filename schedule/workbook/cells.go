package workbook

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
)

// cellReader reads the cells of a row. The texts of a row are gathered and
// made into one string, so that a row costs one allocation.
type cellReader struct {
	*reader
	text  []byte
	spans []span
}

// span says which part of the gathered text belongs to a cell.
type span struct {
	cell     int // index into the row's cells
	from, to int
	kind     string // the type that the file gives the cell
	style    int
	formula  bool
	valued   bool // the file has a value, if only an empty one
	empty    bool // the value is empty, and the text is the formula
}

// readAll reads the cells of the open row, up to and with its end tag.
func (c *cellReader) readAll() error {
	c.text, c.spans = c.text[:0], c.spans[:0]
	depth := c.scan.Depth()
	next := 0
	for {
		t, err := c.scan.Next()
		if err != nil {
			return err
		}
		if t.Kind == markup.End && c.scan.Depth() < depth {
			c.settle()
			return nil
		}
		if t.Kind != markup.Start && t.Kind != markup.Empty || string(t.Local()) != "c" {
			continue
		}
		if next, err = c.read(t, next); err != nil {
			return err
		}
	}
}

// read reads one cell, whose column is next unless it says so itself, and
// returns the column behind it.
func (c *cellReader) read(t *markup.Token, next int) (int, error) {
	s := span{cell: next, from: len(c.text)}
	for a := t.Attrs(); a.Next(); {
		switch string(a.Name) {
		case "r":
			col, row, ok := parseCell(a.Value)
			if !ok || row != c.row.Number {
				return 0, fmt.Errorf("%w: a cell %q stands in row %d", markup.ErrSyntax, a.Value, c.row.Number)
			}
			s.cell = col
		case "s":
			s.style, _ = parseInt(a.Value)
		case "t":
			s.kind = kindName(a.Value)
		}
	}
	if s.cell >= maxColumns {
		return 0, fmt.Errorf("%w: row %d has too many cells", markup.ErrSyntax, c.row.Number)
	}
	if t.Kind == markup.Start {
		if err := c.content(&s); err != nil {
			return 0, err
		}
	}
	if s.style != 0 {
		c.extent.styled = note(c.extent.styled, c.row.Number, s.cell)
	}
	c.extent.formulas = c.extent.formulas || s.formula
	if s.valued || s.formula {
		c.extent.valued = note(c.extent.valued, c.row.Number, s.cell)
		c.spans = append(c.spans, s)
	}
	return s.cell + 1, nil
}

// kindName returns the type of a cell without allocating.
func kindName(b []byte) string {
	for _, k := range [...]string{"s", "str", "inlineStr", "b", "e", "d"} {
		if string(b) == k {
			return k
		}
	}
	return "n"
}

// content reads what stands in a cell: its formula is kept only where it has
// no value.
func (c *cellReader) content(s *span) error {
	depth := c.scan.Depth()
	for {
		t, err := c.scan.Next()
		if err != nil {
			return err
		}
		if t.Kind == markup.End && c.scan.Depth() < depth {
			s.to = len(c.text)
			return nil
		}
		if t.Kind != markup.Start && t.Kind != markup.Empty {
			continue
		}
		switch string(t.Local()) {
		case "f":
			s.formula = true
			s.from = len(c.text)
			err = c.plain(t)
		case "v":
			s.valued = true
			mark := len(c.text)
			err = c.plain(t)
			if s.empty = len(c.text) == mark; !s.empty {
				s.from = mark // the value in place of the formula
			}
		case "is":
			s.valued = true
			s.from = len(c.text)
			if t.Kind == markup.Start {
				c.text, err = appendString(c.text, c.scan)
			}
		}
		if err != nil {
			return err
		}
	}
}

// plain reads the text of an element without children, up to and with its end
// tag.
func (c *cellReader) plain(t *markup.Token) error {
	if t.Kind == markup.Empty {
		return nil
	}
	depth := c.scan.Depth()
	for {
		t, err := c.scan.Next()
		if err != nil {
			return err
		}
		switch t.Kind {
		case markup.End:
			if c.scan.Depth() < depth {
				return nil
			}
		case markup.Text:
			c.text = markup.AppendText(c.text, t.Raw)
		case markup.CData:
			c.text = markup.AppendCData(c.text, t.Raw)
		}
	}
}

// settle turns what was gathered into cells.
func (c *cellReader) settle() {
	text := string(c.text)
	for i := range c.spans {
		s := &c.spans[i]
		cell := c.meaning(s, text[s.from:s.to])
		if cell.Kind == schedule.Blank && !cell.Formula {
			continue
		}
		for len(c.row.Cells) <= s.cell {
			c.row.Cells = append(c.row.Cells, schedule.Cell{})
		}
		c.row.Cells[s.cell] = cell
		c.filled = c.filled || cell.Kind != schedule.Blank
	}
}

// meaning returns the cell that the file's text stands for.
func (c *cellReader) meaning(s *span, text string) schedule.Cell {
	cell := schedule.Cell{Formula: s.formula}
	// A formula whose value is an empty text says so by its type; one without
	// a value has never been calculated.
	if s.formula && (!s.valued || s.empty && s.kind != "str") {
		return c.book.calculate(c.sheet, s.cell, c.row.Number, c.book.format(s.style), text)
	}
	if s.formula && s.empty {
		return cell
	}
	switch s.kind {
	case "s":
		return c.shared(cell, text)
	case "b":
		return boolean(cell, text)
	case "e":
		cell.Kind, cell.Text = schedule.Fault, text
	case "d":
		cell.Kind, cell.Text = schedule.Date, text
	case "str":
		text = string(unescape([]byte(text), 0))
		fallthrough
	case "inlineStr":
		cell.Kind, cell.Text = schedule.Text, text
	default:
		return c.number(cell, text, c.book.format(s.style))
	}
	if text == "" {
		cell.Kind = schedule.Blank
	}
	return cell
}

func (c *cellReader) shared(cell schedule.Cell, text string) schedule.Cell {
	i, err := strconv.Atoi(text)
	known := false
	if err == nil {
		cell.Text, known = c.book.strings.at(i)
	}
	switch {
	case !known:
		cell.Kind, cell.Text = schedule.Fault, fmt.Sprintf("missing text %q", text)
	case cell.Text != "":
		cell.Kind = schedule.Text
	}
	return cell
}

func boolean(cell schedule.Cell, text string) schedule.Cell {
	cell.Kind, cell.Text = schedule.Bool, "FALSE"
	if isTrue(text) {
		cell.Text = "TRUE"
	}
	return cell
}

func (c *cellReader) number(cell schedule.Cell, text string, f format) schedule.Cell {
	if text == "" {
		return cell
	}
	n, err := strconv.ParseFloat(strings.TrimSpace(text), 64)
	if err != nil || math.IsNaN(n) || math.IsInf(n, 0) {
		cell.Kind, cell.Text = schedule.Text, text
		return cell
	}
	cell.Number, cell.Text = n, text
	cell.Kind = schedule.Number
	cell.Fraction = f.fraction
	if f.date {
		cell.Kind, cell.Text = schedule.Date, c.book.shown(f, n, text)
	}
	return cell
}
