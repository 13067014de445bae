package workbook

import (
	"fmt"
	"io"
	"math"
	"strconv"
	"unicode/utf16"

	"stanchion/schedule/workbook/internal/markup"
)

// maxText is the longest text that a cell may hold, in UTF-16 units.
const maxText = 32_767

// filling puts the rows, merged cells and links of a sheet of ours into the frame that
// the library made for it. The library would take several times as long over
// the cells of a sheet as long as a schedule.
type filling struct {
	sheet *Sheet
	base  lettering
	style func(Look) int
	fonts map[Look]string // of texts in parts
	cells []byte

	merges, links late
}

// look returns how a cell is drawn.
func (c *Cell) look() Look {
	l := c.Look
	l.Link = l.Link || c.Link != ""
	return l
}

// copy passes a sheet's part through. retag may change tags; nil: none.
func (f *filling) copy(in io.Reader, out io.Writer, retag func(*markup.Token) string) error {
	f.merges.done, f.links.done = false, false
	scan := markup.NewScanner(in)
	for {
		t, err := scan.Next()
		if err == io.EOF {
			return nil
		}
		if err != nil {
			return err
		}
		f.merges.before(out, t, scan.Depth())
		f.links.before(out, t, scan.Depth())
		opens := t.Kind == markup.Start || t.Kind == markup.Empty
		switch {
		case opens && string(t.Name) == "sheetData":
			if err := f.rows(t, scan, out); err != nil {
				return err
			}
		case opens && string(t.Name) == "dimension":
			io.WriteString(out, markup.SetAttrs(t.Raw, "ref", f.sheet.extent()))
		case opens && retag != nil:
			io.WriteString(out, retag(t))
		default:
			if _, err := out.Write(t.Raw); err != nil {
				return err
			}
		}
	}
}

// extent returns the range that the rows take up.
func (s *Sheet) extent() string {
	a := area{1, max(1, len(s.Rows)), 0, 0}
	for _, row := range s.Rows {
		a.lastCol = max(a.lastCol, len(row)-1)
	}
	return a.String()
}

// rows writes the rows in the place of those of the frame.
func (f *filling) rows(t *markup.Token, scan *markup.Scanner, out io.Writer) error {
	if t.Kind == markup.Start {
		if err := scan.Skim(io.Discard); err != nil {
			return err
		}
		if _, err := scan.Next(); err != nil { // its end tag
			return err
		}
	}
	io.WriteString(out, "<sheetData>")
	for i := range f.sheet.Rows {
		f.cells = f.cells[:0]
		f.row(i)
		if _, err := out.Write(f.cells); err != nil {
			return err
		}
	}
	_, err := io.WriteString(out, "</sheetData>")
	return err
}

func (f *filling) row(i int) {
	row, height := f.sheet.Rows[i], f.height(i+1)
	if len(row) == 0 && height == 0 {
		return
	}
	f.cells = append(f.cells, `<row r="`...)
	f.cells = strconv.AppendInt(f.cells, int64(i+1), 10)
	if height > 0 {
		f.cells = append(f.cells, `" ht="`...)
		f.cells = strconv.AppendFloat(f.cells, height, 'f', -1, 64)
		f.cells = append(f.cells, `" customHeight="1`...)
	}
	f.cells = append(f.cells, `">`...)
	for c := range row {
		f.cell(c, i+1, &row[c])
	}
	f.cells = append(f.cells, `</row>`...)
}

// height returns the height of a row, in points: given for the usual letters,
// it grows with those of the workbook, unless charts stand on the rows.
func (f *filling) height(row int) float64 {
	h := f.sheet.Heights[row]
	if len(f.sheet.Charts) > 0 {
		return h
	}
	return min(tallest, math.Round(h*f.base.size/usualLettering.size*100)/100)
}

func (f *filling) cell(col, row int, c *Cell) {
	style := f.style(c.look())
	if style == 0 && c.Value == nil && c.Formula == "" {
		return
	}
	f.cells = append(f.cells, `<c r="`...)
	f.cells = appendCell(f.cells, col, row)
	f.cells = append(f.cells, '"')
	if style != 0 {
		f.cells = append(f.cells, ` s="`...)
		f.cells = strconv.AppendInt(f.cells, int64(style), 10)
		f.cells = append(f.cells, '"')
	}
	f.content(c)
}

// content ends the tag of a cell and writes what it holds.
func (f *filling) content(c *Cell) {
	if c.Formula != "" {
		f.cells = append(f.cells, `><f>`...)
		f.cells = markup.AppendEscaped(f.cells, c.Formula)
		f.cells = append(f.cells, `</f></c>`...)
		return
	}
	switch v := c.Value.(type) {
	case nil:
		f.cells = append(f.cells, `/>`...)
	case float64:
		if math.IsNaN(v) || math.IsInf(v, 0) {
			f.cells = append(f.cells, `/>`...)
			return
		}
		f.cells = append(f.cells, `><v>`...)
		f.cells = strconv.AppendFloat(f.cells, v, 'g', -1, 64)
		f.cells = append(f.cells, `</v></c>`...)
	case int:
		f.cells = append(f.cells, `><v>`...)
		f.cells = strconv.AppendInt(f.cells, int64(v), 10)
		f.cells = append(f.cells, `</v></c>`...)
	case bool:
		truth := byte('0')
		if v {
			truth = '1'
		}
		f.cells = append(f.cells, ` t="b"><v>`...)
		f.cells = append(f.cells, truth)
		f.cells = append(f.cells, `</v></c>`...)
	case string:
		f.text(v)
	case Rich:
		f.rich(v, c.Look)
	default:
		f.text(fmt.Sprint(v))
	}
}

func (f *filling) text(s string) {
	if s == "" {
		f.cells = append(f.cells, `/>`...)
		return
	}
	f.cells = append(f.cells, ` t="inlineStr">`...)
	f.cells = appendInline(f.cells, "", clip(s))
	f.cells = append(f.cells, `</c>`...)
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
