package workbook

import (
	"bytes"
	"fmt"
	"math"
	"unicode/utf16"

	"github.com/xuri/excelize/v2"
)

// Sheet is one of the project's own sheets, in neutral terms.
type Sheet struct {
	Name    string // as wanted; see Plan.SheetName
	Rows    [][]Cell
	Widths  []float64       // of the columns, in characters; 0: as it comes
	Heights map[int]float64 // of rows from 1, in points
	Merges  []string        // "A1:F1"

	FreezeRows, FreezeCols int
	Filter                 string // range with a filter on its first row
	RepeatRows             int    // rows repeated on every printed page
	Landscape              bool
	PagesWide              int // pages that the width is fitted to; 0: as it comes
	A3                     bool
	Footer                 string // left part of the footer; the page number stands at the right

	Charts      []Chart
	Validations []Validation
	Rules       []Rule
	TabColour   string // of the tab; empty: none
	Hidden      bool
}

// Cell is one cell of a Sheet.
type Cell struct {
	Value   any    // string, bool, any number, or nil
	Formula string // without =; its value is calculated on opening
	Look    Look
	Link    string // place in the workbook to go to: 'Sheet'!A1
	Note    string // shown where the pointer rests
}

// Chart is a chart standing on a cell.
type Chart struct {
	Cell  string
	Chart *excelize.Chart
	Combo []*excelize.Chart // drawn over it
}

// Validation says what may be typed into a range, and explains it.
type Validation struct {
	Range       string
	Allowed     []string // a list; what is not on it is refused
	AllowedIn   string   // or the range that holds the list: 'Lists'!$A$1:$A$9
	Loose       bool     // other values are warned of, not refused
	PromptTitle string
	Prompt      string
}

// Rule is a conditional format, in the library's terms.
type Rule struct {
	Range   string
	Options []excelize.ConditionalFormatOptions
	Look    *Look // of cells to which it applies; nil: Options say it
}

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

func (o *own) sizes(s *Sheet, name string) error {
	for c, w := range s.Widths {
		if w <= 0 {
			continue
		}
		col := columnName(c)
		if err := o.file.SetColWidth(name, col, col, w); err != nil {
			return err
		}
	}
	for _, r := range sortedKeys(s.Heights) {
		if err := o.file.SetRowHeight(name, r, s.Heights[r]); err != nil {
			return err
		}
	}
	for _, m := range s.Merges {
		a, ok := parseArea(m)
		if !ok {
			return fmt.Errorf("cannot merge %q", m)
		}
		if err := o.file.MergeCell(name, cellName(a.firstCol, a.firstRow), cellName(a.lastCol, a.lastRow)); err != nil {
			return err
		}
	}
	return nil
}

func (o *own) view(s *Sheet, name string) error {
	off := false
	if err := o.file.SetSheetView(name, 0, &excelize.ViewOptions{ShowGridLines: &off}); err != nil {
		return err
	}
	if s.FreezeRows > 0 || s.FreezeCols > 0 {
		corner := cellName(s.FreezeCols, s.FreezeRows+1)
		pane := "bottomRight"
		switch {
		case s.FreezeRows == 0:
			pane = "topRight"
		case s.FreezeCols == 0:
			pane = "bottomLeft"
		}
		err := o.file.SetPanes(name, &excelize.Panes{
			Freeze: true, XSplit: s.FreezeCols, YSplit: s.FreezeRows, TopLeftCell: corner, ActivePane: pane,
			Selection: []excelize.Selection{{SQRef: corner, ActiveCell: corner, Pane: pane}},
		})
		if err != nil {
			return err
		}
	}
	if s.Filter != "" {
		if err := o.file.AutoFilter(name, s.Filter, nil); err != nil {
			return err
		}
	}
	if s.Hidden {
		if err := o.file.SetSheetVisible(name, false); err != nil {
			return err
		}
	}
	if s.TabColour != "" {
		return o.file.SetSheetProps(name, &excelize.SheetPropsOptions{TabColorRGB: &s.TabColour})
	}
	return nil
}

func (o *own) print(s *Sheet, name string) error {
	size, orientation := 9, "portrait" // A4
	if s.A3 {
		size = 8
	}
	if s.Landscape {
		orientation = "landscape"
	}
	layout := &excelize.PageLayoutOptions{Size: &size, Orientation: &orientation}
	if s.PagesWide > 0 {
		tall, fit := 0, true
		layout.FitToWidth, layout.FitToHeight = &s.PagesWide, &tall
		if err := o.file.SetSheetProps(name, &excelize.SheetPropsOptions{FitToPage: &fit}); err != nil {
			return err
		}
	}
	if err := o.file.SetPageLayout(name, layout); err != nil {
		return err
	}
	if s.RepeatRows > 0 {
		err := o.file.SetDefinedName(&excelize.DefinedName{
			Name: "_xlnm.Print_Titles", Scope: name,
			RefersTo: fmt.Sprintf("%s!$1:$%d", quoted(name), s.RepeatRows),
		})
		if err != nil {
			return err
		}
	}
	footer := "&L&8" + escapeFooter(s.Footer) + "&R&8&A  &P/&N"
	return o.file.SetHeaderFooter(name, &excelize.HeaderFooterOptions{OddFooter: footer})
}

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

func (o *own) validations(s *Sheet, name string) error {
	for _, v := range s.Validations {
		dv := excelize.NewDataValidation(true)
		dv.SetSqref(v.Range)
		switch {
		case v.AllowedIn != "":
			dv.SetSqrefDropList(v.AllowedIn)
		case len(v.Allowed) > 0:
			if err := dv.SetDropList(v.Allowed); err != nil {
				return err
			}
		}
		if v.Prompt != "" {
			dv.SetInput(string(clipRunes(v.PromptTitle, 32)), string(clipRunes(v.Prompt, 255)))
		}
		if v.AllowedIn != "" || len(v.Allowed) > 0 {
			style := excelize.DataValidationErrorStyleStop
			if v.Loose {
				style = excelize.DataValidationErrorStyleWarning
			}
			dv.SetError(style, string(clipRunes(v.PromptTitle, 32)), "Not on the list.")
		}
		if err := o.file.AddDataValidation(name, dv); err != nil {
			return err
		}
	}
	return nil
}

func (o *own) rules(s *Sheet, name string) error {
	for _, r := range s.Rules {
		options := append([]excelize.ConditionalFormatOptions(nil), r.Options...)
		if r.Look != nil {
			style := r.Look.style(o.base)
			style.Font.Family, style.Font.Size, style.Alignment = "", 0, nil
			id, err := o.file.NewConditionalStyle(style)
			if err != nil {
				return err
			}
			for i := range options {
				options[i].Format = &id
			}
		}
		if err := o.file.SetConditionalFormat(name, r.Range, options); err != nil {
			return err
		}
	}
	return nil
}

func (o *own) charts(s *Sheet, name string) error {
	for _, c := range s.Charts {
		if err := o.file.AddChart(name, c.Cell, c.Chart, c.Combo...); err != nil {
			return err
		}
	}
	return nil
}

// bytes returns the own workbook as a package, without its links.
func (o *own) bytes() ([]byte, error) {
	var buf bytes.Buffer
	if err := o.file.Write(&buf); err != nil {
		return nil, err
	}
	return buf.Bytes(), o.file.Close()
}
