package workbook

import (
	"fmt"
	"math"
	"strings"

	"github.com/xuri/excelize/v2"
)

func (o *own) print(s *Sheet, name string) error {
	size, orientation := 9, "portrait" // A4
	if s.A3 {
		size = 8
	}
	if s.Landscape {
		orientation = "landscape"
	}
	layout := &excelize.PageLayoutOptions{Size: &size, Orientation: &orientation}
	wide := s.pagesWide()
	if wide > 0 {
		tall, fit := 0, true
		layout.FitToWidth, layout.FitToHeight = &wide, &tall
		if err := o.file.SetSheetProps(name, &excelize.SheetPropsOptions{FitToPage: &fit}); err != nil {
			return err
		}
	}
	if err := o.file.SetPageLayout(name, layout); err != nil {
		return err
	}
	side, top, foot, mark := sideMargin, topMargin, footMargin, 0.3 // inches
	margins := &excelize.PageLayoutMarginsOptions{Left: &side, Right: &side, Top: &top, Bottom: &foot, Header: &mark, Footer: &mark}
	if err := o.file.SetPageMargins(name, margins); err != nil {
		return err
	}
	breaks := append(s.pageBreaks(), s.Breaks...)
	for _, row := range breaks[:min(len(breaks), maxBreaks)] {
		if err := o.file.InsertPageBreak(name, cellName(0, row)); err != nil {
			return err
		}
	}
	if titles := s.printTitles(quoted(name) + "!"); titles != "" {
		err := o.file.SetDefinedName(&excelize.DefinedName{Name: printTitlesName, Scope: name, RefersTo: titles})
		if err != nil {
			return err
		}
	}
	footer := "&L&8" + escapeFooter(s.Footer) + "&R&8&A  &P/&N"
	return o.file.SetHeaderFooter(name, &excelize.HeaderFooterOptions{OddFooter: footer})
}

// maxBreaks is how many page breaks a sheet may have in every spreadsheet
// program.
const maxBreaks = 1000

// escapeFooter keeps a text from being read as codes.
func escapeFooter(s string) string {
	var out []rune
	for _, r := range clipRunes(s, 180) {
		if r == '&' {
			out = append(out, '&')
		}
		out = append(out, r)
	}
	return string(out)
}

func clipRunes(s string, n int) []rune {
	r := []rune(s)
	return r[:min(len(r), n)]
}

const (
	topMargin    = 0.5        // inches
	footMargin   = 0.6        // inches
	sideMargin   = 0.4        // inches
	a4Short      = 210 / 25.4 // inches
	a4Long       = 297 / 25.4 // inches
	a3Long       = 420 / 25.4 // inches
	characters   = 96.0 / 7   // of a column's width, in an inch: 7 of 96 pixels each in the usual font
	usualWidth   = 9.14       // of a column for which none is said
	leastPrinted = 0.6        // of their size, that letters can still be read at
)

// page returns the room on a printed page, in inches.
func (s *Sheet) page() (width, height float64) {
	width, height = a4Short, a4Long
	if s.A3 {
		width, height = a4Long, a3Long
	}
	if s.Landscape {
		width, height = height, width
	}
	return width - 2*sideMargin, height - topMargin - footMargin
}

// width returns the width of the columns, and of those that are frozen, in
// characters.
func (s *Sheet) width() (width, repeated float64) {
	for c, w := range s.Widths {
		if w <= 0 {
			w = usualWidth
		}
		width += w
		if c < s.FreezeCols {
			repeated += w
		}
	}
	return width, repeated
}

// pagesWide returns how many pages the width is fitted to: those that are asked
// for, or, of a list whose first columns say of which row each page is, as many
// as it takes to be read.
func (s *Sheet) pagesWide() int {
	if s.PagesWide == 0 {
		return 0
	}
	page, _ := s.page()
	room := page * characters / leastPrinted
	width, repeated := s.width()
	if s.FreezeCols == 0 || width <= room*float64(s.PagesWide) || repeated >= room/2 {
		return s.PagesWide
	}
	return int(math.Ceil((width - repeated) / (room - repeated)))
}

// printTitles returns what is repeated on every printed page.
func (s *Sheet) printTitles(here string) string {
	var parts []string
	if s.FreezeCols > 0 && s.pagesWide() > 1 {
		parts = append(parts, here+wholeColumns(0, s.FreezeCols-1))
	}
	if s.RepeatRows > 0 {
		parts = append(parts, fmt.Sprintf("%s$%d:$%d", here, max(1, s.RepeatFrom), s.RepeatRows))
	}
	return strings.Join(parts, ",")
}
