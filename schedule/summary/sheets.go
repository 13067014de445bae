package summary

import (
	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

// Info is what the sheets say of the run beside its results.
type Info struct {
	Project  string // empty: not said
	Program  string // name and version
	Standard string
	National *design.National
	Sheet    string // that holds the schedule
	File     string // name of the input, without its folder
	SHA256   string // of the input
	Settings []schedule.SettingLine
	Reading  *schedule.Summary
	Cautions []string
	Working  string  // which members' workings the workbook holds
	Limit    float64 // of utilisation, where a row gives none; 0: 1.00
	// SheetName returns the name under which a sheet of ours will stand; nil:
	// the one that it wants.
	SheetName func(wanted string) string
}

func (i *Info) sheetName(wanted string) string {
	if i.SheetName == nil {
		return wanted
	}
	return i.SheetName(wanted)
}

// The names that the sheets want.
const (
	SummarySheet   = "Summary"
	ResultsSheet   = "Results"
	SizesSheet     = "Sizes used"
	ProblemsSheet  = "Problems"
	ChartsSheet    = "Charts"
	ChartDataSheet = "Chart data"
)

// Sheets are the project's own sheets on what a run found.
type Sheets struct {
	Summary, Results, Sizes, Problems, Charts, ChartData workbook.Sheet

	lines    []Line
	problems map[*Line]string
	results  string // name of the sheet of results
}

// NewSheets lays out the sheets. lines are all members with their results,
// steel is what they come to.
func NewSheets(info *Info, t *Tally, lines []Line, steel *takeoff.TakeOff) *Sheets {
	s := &Sheets{lines: lines, results: info.sheetName(ResultsSheet)}
	s.Problems, s.problems = problemsSheet(info, lines)
	s.Summary = summarySheet(info, t)
	s.Results = resultsSheet(info, lines, s.problems)
	s.Sizes = sizesSheet(info, lines, steel)
	s.Charts, s.ChartData = chartSheets(info, lines, steel)
	return s
}

// Place returns where a member, numbered from 0, is to be looked at: among the
// problems if it has one, else among the results.
func (s *Sheets) Place(member int) (to string, problem bool) {
	if to := s.problems[&s.lines[member]]; to != "" {
		return to, true
	}
	return ResultsPlace(s.results, member), false
}

// The number formats of the sheets.
const (
	whole  = "#,##0"
	metres = "#,##0.0"
	tonnes = "#,##0.00"
	ratio  = "0.000"
)

func number(x float64, format string) workbook.Cell {
	return workbook.NumberCell(schedule.Round(x), format)
}
