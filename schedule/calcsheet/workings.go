package calcsheet

import (
	"fmt"
	"unicode/utf8"

	"stanchion/design/working"
	"stanchion/schedule/workbook"
)

// WorkingSheet is the name that the sheet of workings wants.
const WorkingSheet = "Working"

// The columns of the sheet of workings.
const (
	symbolColumn = iota
	formulaColumn
	numbersColumn
	valueColumn
	unitColumn
	clauseColumn
	remarkColumn
	workingColumns
)

var workingWidths = []float64{12, 29, 41, 11, 11, 13, 30}

// wordsOnALine is how long a sentence may be that stands on one line.
const wordsOnALine = 120

// maxRows is how many rows a sheet of a workbook has, endRows how many of them
// end this one.
const (
	maxRows = 1_048_576
	endRows = 3
)

// Workings is the sheet of workings of a workbook: a block for every member,
// the steps that Text prints, in columns.
type Workings struct {
	page     *workbook.Page
	name     string                   // under which the sheet will stand
	schedule string                   // sheet of the schedule
	formulas map[string]workbook.Rich // by their text
}

// NewWorkings starts the sheet. name is the one under which it will stand.
func NewWorkings(name string, project *Project) *Workings {
	p := workbook.NewPage(WorkingSheet, "Working", workingWidths...)
	p.Footer = project.File
	p.SetLines(1.5)
	p.Row(workbook.Cell{Look: workbook.Look{Role: workbook.Remark}, Value: fmt.Sprintf("%s, sheet %s; %s, national set %s. To be checked by a qualified engineer.",
		project.File, project.Sheet, project.Standard, project.National.Name)})
	p.SetLines(1)
	p.Headings("Symbol", "Formula", "With numbers", ">Value", "Unit", "Clause", "Remark")
	p.SetLines(1.2)
	p.Freeze()
	return &Workings{page: p, name: name, schedule: project.Sheet, formulas: map[string]workbook.Rich{}}
}

// Sheet ends the sheet and returns it.
func (w *Workings) Sheet() workbook.Sheet {
	w.row()
	for _, words := range []string{figures, caution} {
		w.page.Across(workingColumns, workbook.Cell{Value: words, Look: workbook.Look{Role: workbook.Remark}})
	}
	return w.page.Sheet
}

// Add writes the working of a member, and returns its place in the workbook;
// none where the sheet has no rows left for it.
func (w *Workings) Add(s *working.Sheet) (place string) {
	p := w.page
	before := p.Sheet
	if len(p.Rows) > p.FreezeRows {
		w.row()
	}
	p.Chapter()
	w.head(s)
	for i := range s.Blocks {
		if i > 0 { // the first stays with the heading
			p.Begin()
		}
		w.subject(&s.Blocks[i])
	}
	w.checks(s)
	for _, words := range beyond(s) {
		w.words(words)
	}
	if len(p.Rows) > maxRows-endRows {
		p.Sheet = before
		return ""
	}
	return fmt.Sprintf("%s!A%d", workbook.Quoted(w.name), p.Chapters[len(p.Chapters)-1])
}

// row adds a row of the height that it needs.
func (w *Workings) row(cells ...workbook.Cell) {
	w.page.Row(cells...)
	w.atLeast(1)
}

// atLeast gives the last row a height where its texts ask for none.
func (w *Workings) atLeast(lines float64) {
	if w.page.Heights[len(w.page.Rows)] == 0 {
		w.page.SetLines(lines)
	}
}

// head says which member it is and how it came out. Its name leads to its row
// of the schedule.
func (w *Workings) head(s *working.Sheet) {
	look := workbook.Look{Role: workbook.Group, Align: workbook.Left}
	row := make([]workbook.Cell, workingColumns)
	for i := range row {
		row[i].Look = look
	}
	row[symbolColumn].Value = place(s.Column)
	row[symbolColumn].Look.Wrap = true
	row[symbolColumn].Link = workbook.Place(w.schedule, s.Column.Cell)
	row[numbersColumn].Value = s.Section.Name() + "  " + s.Grade
	row[remarkColumn] = workbook.OutcomeCell(s.Result.Status)
	if s.Governing >= 0 {
		row[valueColumn] = headed(numberCell(utilisation(&s.Checks[s.Governing])))
		row[clauseColumn] = headed(workbook.TextCell(s.Checks[s.Governing].Clause))
	}
	w.row(row...)
	w.page.Span(symbolColumn, formulaColumn)
	w.atLeast(1.3)
	w.words(verdict(s))
	for _, n := range s.Notes {
		w.words("Note: " + n)
	}
}

// headed draws a cell as one of a heading.
func headed(c workbook.Cell) workbook.Cell {
	c.Look.Role = workbook.Group
	return c
}

// words adds a sentence: over all columns, or beyond its cell where it is short
// enough.
func (w *Workings) words(text string) {
	c := workbook.Cell{Value: richText(text)}
	if utf8.RuneCountInString(text) < wordsOnALine {
		w.row(c)
		return
	}
	w.page.Across(workingColumns, c)
	w.atLeast(1)
}

// subject adds a block of the working.
func (w *Workings) subject(b *working.Block) {
	w.title(b.Title)
	for _, item := range b.Items {
		switch item := item.(type) {
		case working.Values:
			w.values(item)
		case *working.Step:
			w.step(item)
		case working.Table:
			w.table(&item)
		case working.Words:
			w.words(string(item))
		}
	}
}

func (w *Workings) title(text string) {
	w.row(workbook.LabelCell(text))
	w.page.SetLines(1.5)
}
