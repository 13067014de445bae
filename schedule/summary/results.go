package summary

import (
	"fmt"
	"math"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// resultColumn is a column of the sheet of results.
type resultColumn struct {
	group, heading string // a heading that opens with ">" stands over numbers
	width          float64
	cell           func(*resultsPage, *Line) workbook.Cell
}

// resultColumns are those that people look for on paper; the schedule's own
// sheet holds the rest.
var resultColumns = []resultColumn{
	{"Member", "Row", 8, (*resultsPage).row},
	{"Member", "Mark", 13, (*resultsPage).mark},
	{"Member", "Stack", 9, func(_ *resultsPage, l *Line) workbook.Cell { return workbook.TextCell(l.Member.Column.Stack) }},
	{"Member", "Level", 13, func(_ *resultsPage, l *Line) workbook.Cell { return workbook.TextCell(Level(&l.Member.Column)) }},
	{"Member", ">No.", 6, func(_ *resultsPage, l *Line) workbook.Cell { return some(float64(l.Member.Column.Quantity), whole) }},
	{"Member", ">Length [m]", 10, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Member.Column.Length/1e3, "0.00#") }},
	{"Outcome", "Status", 15, (*resultsPage).status},
	{"Outcome", "Section", 19, func(_ *resultsPage, l *Line) workbook.Cell { return workbook.TextCell(l.Result.Section) }},
	{"Outcome", "Grade", 8, func(_ *resultsPage, l *Line) workbook.Cell { return workbook.TextCell(l.Result.Grade) }},
	{"Outcome", ">Utilisation", 12, func(_ *resultsPage, l *Line) workbook.Cell { return utilisationCell(&l.Result) }},
	{"Governing check", "Check", 27, func(_ *resultsPage, l *Line) workbook.Cell { return checkCell(l) }},
	{"Governing check", "Combination", 15, func(_ *resultsPage, l *Line) workbook.Cell {
		return workbook.TextCell(schedule.CombinationName(l.Member, &l.Result))
	}},
	{"Governing check", ">N_Ed [kN]", 11, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Governing.NEd/1e3, kilonewtons) }},
	{"Buckling", ">N_b,y,Rd [kN]", 11, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Y.NbRd/1e3, kilonewtons) }},
	{"Buckling", ">N_b,z,Rd [kN]", 11, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Z.NbRd/1e3, kilonewtons) }},
	{"Buckling", ">L_cr,y [m]", 8, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Y.Lcr/1e3, "0.00#") }},
	{"Buckling", ">L_cr,z [m]", 8, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Z.Lcr/1e3, "0.00#") }},
	{"Buckling", ">chi_y", 8, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Y.Chi, ratio) }},
	{"Buckling", ">chi_z", 8, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Z.Chi, ratio) }},
	{"Steel", ">kg/m", 8, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.MassPerM, "0.0") }},
	{"Steel", ">Mass [kg]", 9, func(_ *resultsPage, l *Line) workbook.Cell { return some(l.Result.Mass, "#,##0") }},
}

const kilonewtons = "#,##0.0"

// resultsHead is the row of the headings; the members follow it in the order
// of the schedule.
const resultsHead = 4

// Columns of the sheet, counted from 0.
const (
	markColumn   = 1
	statusColumn = 6
)

// ResultsPlace returns the place on the sheet of results, named as it stands
// in the workbook, of the member with that number from 0.
func ResultsPlace(sheet string, member int) string {
	return fmt.Sprintf("%s!%s%d", workbook.Quoted(sheet), workbook.ColumnName(statusColumn), resultsHead+1+member)
}

// maxNotes is how many members carry a note: of more, nobody rests the pointer
// on each.
const maxNotes = 300

// resultsPage is the sheet of results, made to be printed.
type resultsPage struct {
	*page
	info     *Info
	problems map[*Line]string // place of a member on the sheet of problems
	notes    int
}

// resultsSheet lists every member with what people look for on paper.
func resultsSheet(info *Info, lines []Line, problems map[*Line]string) workbook.Sheet {
	var widths []float64
	var headings []string
	var groups []workbook.Cell
	for i, c := range resultColumns {
		widths, headings = append(widths, c.width), append(headings, c.heading)
		group := ""
		if i == 0 || c.group != resultColumns[i-1].group {
			group = c.group
		}
		groups = append(groups, workbook.Cell{Value: group, Look: workbook.Look{Role: workbook.Group, Edge: group != ""}})
	}
	p := &resultsPage{page: &page{workbook.NewPage(ResultsSheet, "Results", widths...)}, info: info, problems: problems}
	p.Footer, p.Landscape, p.FreezeCols = info.File, true, 2
	p.Row(workbook.Cell{Value: fmt.Sprintf("%s, sheet %s; %s, national set %s", info.File, info.Sheet, info.Standard, info.National.Name), Look: workbook.Look{Role: workbook.Remark}})
	p.Row(groups...)
	p.spanGroups()
	p.Headings(headings...)
	p.SetLines(2)
	p.Freeze()
	for i := range lines {
		row := make([]workbook.Cell, len(resultColumns))
		for j := range resultColumns {
			row[j] = resultColumns[j].cell(p, &lines[i])
			row[j].Look.Edge = j > 0 && resultColumns[j].group != resultColumns[j-1].group
		}
		p.Row(row...)
	}
	if len(lines) > 0 {
		p.Filter = fmt.Sprintf("A%d:%s%d", resultsHead, workbook.ColumnName(len(resultColumns)-1), len(p.Rows))
	}
	return p.Sheet
}

func (p *resultsPage) spanGroups() {
	for i := 0; i < len(resultColumns); {
		j := i + 1
		for j < len(resultColumns) && resultColumns[j].group == resultColumns[i].group {
			j++
		}
		p.Span(i, j-1)
		i = j
	}
}

// row leads to the member's row of the schedule.
func (p *resultsPage) row(l *Line) workbook.Cell {
	c := workbook.TextCell(cellOf(l.Member.Column.Cell))
	c.Link = workbook.Place(p.info.Sheet, l.Member.Column.Cell)
	return c
}

// mark leads, from a member with a problem, to where that stands. The status
// does not: a link would take the mark off it in some spreadsheet programs.
func (p *resultsPage) mark(l *Line) workbook.Cell {
	c := workbook.TextCell(l.Member.Column.Mark)
	c.Link = p.problems[l]
	return c
}

// status says of a member that does not pass, in a note, why.
func (p *resultsPage) status(l *Line) workbook.Cell {
	c := workbook.OutcomeCell(l.Result.Status)
	if l.Result.Status != design.Passes && p.notes < maxNotes {
		if c.Note = schedule.Note(l.Member, &l.Result); c.Note != "" {
			p.notes++
		}
	}
	return c
}

// checkCell names the check that governs a member and leads to its working.
func checkCell(l *Line) workbook.Cell {
	c := workbook.TextCell(schedule.CheckName(l.Result.Governing.Kind))
	if c.Value != "" {
		c.Link = l.Working
	}
	return c
}

func utilisationCell(r *design.Result) workbook.Cell {
	if r.Section == "" || !finite(r.Utilisation) {
		return workbook.TextCell("")
	}
	return number(r.Utilisation, ratio)
}

// some is a number; 0 says that it does not apply.
func some(x float64, format string) workbook.Cell {
	if x == 0 || !finite(x) {
		return workbook.TextCell("")
	}
	return number(x, format)
}

func finite(x float64) bool { return !math.IsInf(x, 0) && !math.IsNaN(x) }
