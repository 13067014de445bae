package workbook

import (
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// Rich is a text of which parts are lettered otherwise.
type Rich []Run

// Run is a part of a Rich.
type Run struct {
	Text      string
	Letter    bool // a symbol: slanted
	Subscript bool
}

// String returns the text alone.
func (r Rich) String() string {
	var b strings.Builder
	for i := range r {
		b.WriteString(r[i].Text)
	}
	return b.String()
}

// text returns the text of a cell that holds one.
func (c *Cell) text() string {
	switch v := c.Value.(type) {
	case string:
		return v
	case Rich:
		return v.String()
	}
	return ""
}

// rich writes the content of a cell whose parts are lettered otherwise. Each
// says its whole font: what one leaves out is not taken from the cell by every
// spreadsheet program.
func (f *filling) rich(r Rich, l Look) {
	if text := r.String(); text == "" || len(text) > maxText {
		f.text(text)
		return
	}
	font := f.font(l)
	f.cells = append(f.cells, ` t="inlineStr"><is>`...)
	for i := range r {
		f.cells = append(f.cells, `<r><rPr>`...)
		if r[i].Letter {
			f.cells = append(f.cells, `<i/>`...)
		}
		if r[i].Subscript {
			f.cells = append(f.cells, `<vertAlign val="subscript"/>`...)
		}
		f.cells = append(f.cells, font...)
		f.cells = append(f.cells, `</rPr><t xml:space="preserve">`...)
		f.cells = appendCellText(f.cells, r[i].Text)
		f.cells = append(f.cells, `</t></r>`...)
	}
	f.cells = append(f.cells, `</is></c>`...)
}

// font returns the font of a look as a part of a text says it.
func (f *filling) font(l Look) string {
	if s, ok := f.fonts[l]; ok {
		return s
	}
	font := l.style(f.base).Font
	s := ""
	if font.Bold {
		s = `<b/>`
	}
	s += `<sz val="` + strconv.FormatFloat(font.Size, 'f', -1, 64) + `"/><color rgb="FF` + font.Color + `"/><rFont val="` + markup.Escaped(font.Family) + `"/>`
	if f.fonts == nil {
		f.fonts = map[Look]string{}
	}
	f.fonts[l] = s
	return s
}
