package workbook

import (
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
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
	// Rows repeated on every printed page: from RepeatFrom (0: the first of the
	// sheet) to RepeatRows (0: none). The frozen columns are repeated where the
	// width takes several pages.
	RepeatFrom, RepeatRows int
	Landscape              bool
	PagesWide              int   // pages that the width is fitted to, or more where it could not be read; 0: as it comes
	Breaks                 []int // rows, from 1, that begin a printed page
	Chapters               []int // rows, from 1, that begin what is kept on one printed page where it can be, and else begins one
	Tables                 []int // rows, from 1, that begin a table: kept on one printed page where it can be
	A3                     bool
	Footer                 string // left part of the footer; the page number stands at the right

	Charts      []Chart
	Validations []Validation
	Rules       []Rule
	TabColour   string // of the tab; empty: none
	Hidden      bool
}

// Laid returns the sheets laid out for a size of paper.
func Laid(sheets []Sheet, on schedule.Paper) []Sheet {
	for i := range sheets {
		sheets[i].A3 = on == schedule.A3
	}
	return sheets
}

// Cell is one cell of a Sheet.
type Cell struct {
	Value   any    // string, Rich, bool, any number, or nil
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
