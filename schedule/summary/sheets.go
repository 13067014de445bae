package summary

import (
	"strings"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// Info is what the sheets say of the run beside its results.
type Info struct {
	Program  string // name and version
	Standard string
	National *design.National
	Sheet    string // that holds the schedule
	File     string // name of the input, without its folder
	SHA256   string // of the input
	Settings []schedule.SettingLine
	Reading  *schedule.Summary
	Cautions []string
}

// The names that the sheets want.
const (
	SummarySheet  = "Summary"
	SizesSheet    = "Sizes used"
	ProblemsSheet = "Problems"
)

// Sheets lays out the summary, the sizes used and what a person must look at.
// lines are all members with their results.
func Sheets(info *Info, t *Tally, lines []Line) []workbook.Sheet {
	return []workbook.Sheet{summarySheet(info, t), sizesSheet(info, t), problemsSheet(info, lines)}
}

// page is a sheet being filled from the top.
type page struct{ workbook.Sheet }

func (p *page) row(cells ...workbook.Cell) { p.Rows = append(p.Rows, cells) }

// blank leaves a row out.
func (p *page) blank() { p.row() }

// headings writes a row of headings over columns of text or numbers.
func (p *page) headings(texts ...string) {
	var cells []workbook.Cell
	for _, t := range texts {
		text, number := strings.CutPrefix(t, ">")
		look := workbook.Look{Role: workbook.Heading}
		if number {
			look.Align = workbook.Right
		}
		cells = append(cells, workbook.Cell{Value: text, Look: look})
	}
	p.row(cells...)
}

func text(s string) workbook.Cell {
	return workbook.Cell{Value: s, Look: workbook.Look{Role: workbook.Result}}
}

// words is a text that may need several lines.
func words(s string) workbook.Cell {
	return workbook.Cell{Value: s, Look: workbook.Look{Role: workbook.Result, Wrap: true}}
}

func number(x float64, decimals int) workbook.Cell {
	return workbook.Cell{Value: schedule.Round(x), Look: workbook.Look{Role: workbook.Result, Format: workbook.Decimals(decimals)}}
}

func label(s string) workbook.Cell {
	return workbook.Cell{Value: s, Look: workbook.Look{Role: workbook.Label}}
}

// total turns a cell into one of the row of sums.
func total(c workbook.Cell) workbook.Cell {
	c.Look.Role = workbook.Total
	return c
}

// outcome is a status as the results show it.
func outcome(s design.Status) workbook.Cell {
	role := [...]workbook.Role{design.Passes: workbook.Passes, design.Fails: workbook.Fails, design.NoSection: workbook.NoSection, design.NotRead: workbook.NotRead}[s]
	return workbook.Cell{Value: s.String(), Look: workbook.Look{Role: role}}
}

func newPage(info *Info, name, title string, widths ...float64) *page {
	p := &page{workbook.Sheet{Name: name, Widths: widths, PagesWide: 1, Footer: info.File}}
	p.row(workbook.Cell{Value: title, Look: workbook.Look{Role: workbook.Title}})
	return p
}
