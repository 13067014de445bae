package summary

import (
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
	ProblemsSheet = "Problems"
)

// Sheets lays out the summary and what a person must look at. lines are all
// members with their results.
func Sheets(info *Info, t *Tally, lines []Line) (overview, problems workbook.Sheet) {
	return summarySheet(info, t), problemsSheet(info, lines)
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

// outcome is a status as the results show it.
func outcome(s design.Status) workbook.Cell {
	role := [...]workbook.Role{design.Passes: workbook.Passes, design.Fails: workbook.Fails, design.NoSection: workbook.NoSection, design.NotRead: workbook.NotRead}[s]
	return workbook.Cell{Value: s.String(), Look: workbook.Look{Role: role}}
}
