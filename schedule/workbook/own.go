package workbook

import (
	"bytes"
	"fmt"
	"math"
	"unicode/utf16"

	"github.com/xuri/excelize/v2"
)

// maxText is the longest text that a cell may hold, in UTF-16 units.
const maxText = 32_767

// own is a workbook being made with the library.
type own struct {
	file  *excelize.File
	base  lettering
	looks map[Look]int
	links map[string][]link // by sheet: the library takes ever longer over each
}

func newOwn(base lettering) *own {
	return &own{file: excelize.NewFile(), base: base, looks: map[Look]int{}, links: map[string][]link{}}
}

// style returns the id of a look in the own workbook.
func (o *own) style(l Look) (int, error) {
	if l == (Look{}) {
		return 0, nil
	}
	if id, ok := o.looks[l]; ok {
		return id, nil
	}
	id, err := o.file.NewStyle(l.style(o.base))
	if err == nil {
		o.looks[l] = id
	}
	return id, err
}

// add makes a sheet. The first takes the place of the one that a new workbook
// has.
func (o *own) add(s *Sheet, name string, first bool) error {
	var err error
	if first {
		err = o.file.SetSheetName("Sheet1", name)
	} else {
		_, err = o.file.NewSheet(name)
	}
	if err != nil {
		return err
	}
	for _, step := range []func(*Sheet, string) error{
		o.cells, o.sizes, o.view, o.print, o.validations, o.rules, o.charts,
	} {
		if err := step(s, name); err != nil {
			return fmt.Errorf("sheet %q: %w", name, err)
		}
	}
	return nil
}

func (o *own) cells(s *Sheet, name string) error {
	for r, row := range s.Rows {
		for c := range row {
			if err := o.cell(name, cellName(c, r+1), &row[c]); err != nil {
				return err
			}
		}
	}
	return nil
}

func (o *own) cell(sheet, ref string, c *Cell) error {
	if c.Link != "" {
		c.Look.Link = true
	}
	style, err := o.style(c.Look)
	if err != nil {
		return err
	}
	if style != 0 {
		if err := o.file.SetCellStyle(sheet, ref, ref, style); err != nil {
			return err
		}
	}
	if err := o.content(sheet, ref, c); err != nil {
		return err
	}
	if c.Link != "" {
		o.links[sheet] = append(o.links[sheet], link{ref, c.Link})
	}
	if c.Note == "" {
		return nil
	}
	return o.file.AddComment(sheet, excelize.Comment{Cell: ref, Author: "stanchion", Text: c.Note, Width: 320, Height: noteHeight(c.Note)})
}

func (o *own) content(sheet, ref string, c *Cell) error {
	switch v := c.Value.(type) {
	case nil:
	case string:
		return o.file.SetCellStr(sheet, ref, clip(v))
	case float64:
		if math.IsNaN(v) || math.IsInf(v, 0) {
			return nil
		}
		return o.file.SetCellFloat(sheet, ref, v, -1, 64)
	default:
		return o.file.SetCellValue(sheet, ref, v)
	}
	if c.Formula != "" {
		return o.file.SetCellFormula(sheet, ref, c.Formula)
	}
	return nil
}

// noteHeight returns a height, in pixels, at which a note shows whole.
func noteHeight(text string) uint {
	lines := 1 + len(text)/45
	for _, r := range text {
		if r == '\n' {
			lines++
		}
	}
	return uint(20 + 16*lines)
}

// clip cuts a text to what a cell can hold.
func clip(s string) string {
	if len(s) <= maxText {
		return s
	}
	units := utf16.Encode([]rune(s))
	if len(units) <= maxText {
		return s
	}
	cut := maxText - 1
	if utf16.IsSurrogate(rune(units[cut-1])) && units[cut-1] < 0xDC00 {
		cut--
	}
	return string(utf16.Decode(units[:cut])) + "…"
}

// bytes returns the own workbook as a package, without its links.
func (o *own) bytes() ([]byte, error) {
	var buf bytes.Buffer
	if err := o.file.Write(&buf); err != nil {
		return nil, err
	}
	return buf.Bytes(), o.file.Close()
}
