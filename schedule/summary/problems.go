package summary

import (
	"fmt"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// problemsPage is the sheet of what a person must look at.
type problemsPage struct {
	*page
	info   *Info
	places map[*Line]string // of the members on this sheet
}

// problemsSheet lists the members that a person must look at, each with a link
// to where it stands, and what of the schedule was not read. It returns where
// each member stands on it.
func problemsSheet(info *Info, lines []Line) (workbook.Sheet, map[*Line]string) {
	p := &problemsPage{
		page: &page{workbook.NewPage(ProblemsSheet, "Members that fail, have no section or could not be read", 15, 12, 12, 14, 19, 12, 24, 56, 44)},
		info: info, places: map[*Line]string{},
	}
	p.Footer = info.File
	p.Landscape = true
	p.Blank()
	p.Headings("Cell", "Mark", "Level", "Status", "Section", ">Utilisation", "Governing check", "What was found", "What to do")
	head := len(p.Rows)
	p.Freeze()
	for i := range lines {
		if l := &lines[i]; l.Result.Status != design.Passes {
			p.places[l] = fmt.Sprintf("%s!A%d", workbook.Quoted(info.sheetName(ProblemsSheet)), len(p.Rows)+1)
			p.member(i, l)
		}
	}
	if len(p.Rows) == head {
		p.Row(workbook.TextCell("none"))
	} else {
		p.Filter = fmt.Sprintf("A%d:I%d", head, len(p.Rows))
	}
	p.headers()
	p.passedOver()
	return p.Sheet, p.places
}

// member adds the rows of a member: one for each of its cells that could not be
// read, and one for what the design says.
func (p *problemsPage) member(i int, l *Line) {
	for _, q := range l.Member.Problems {
		p.line(i, l, q.Cell, q.What, q.Do)
	}
	if len(l.Member.Problems) > 0 {
		return
	}
	what, do := p.advice(l)
	p.line(i, l, l.Member.Column.Cell, what, do)
}

// advice says what was found of a member that was read, and what can be done.
func (p *problemsPage) advice(l *Line) (what, do string) {
	r := &l.Result
	what = schedule.Note(l.Member, r)
	switch r.Status {
	case design.Fails:
		if finite(r.Utilisation) {
			beyond := fmt.Sprintf("utilisation %.3f, limit %.2f", r.Utilisation, limitOf(p.info, &l.Member.Column))
			what = strings.TrimSuffix(beyond+"; "+what, "; ")
		}
		do = "choose a stronger section"
		if r.Fixed {
			do = "clear the section to have one chosen, or give a stronger one"
		}
	case design.NoSection:
		do = "allow other families, a stronger grade or larger dimensions, or hold the member at more places"
	case design.NotRead:
		do = "change the row, and run again"
	}
	return what, do
}

func (p *problemsPage) line(i int, l *Line, at, what, do string) {
	c, r := &l.Member.Column, &l.Result
	cell, section := p.cell(at), workbook.TextCell(r.Section)
	if r.Section != "" {
		section.Link = ResultsPlace(p.info.sheetName(ResultsSheet), i)
	}
	p.Row(cell, workbook.TextCell(c.Mark), workbook.WordsCell(Level(c)), workbook.OutcomeCell(r.Status), section, utilisationCell(r),
		checkCell(l), workbook.WordsCell(what), workbook.WordsCell(do))
}

// cell names a cell of the schedule and leads to it. The sheet is named where
// it is another than the schedule's own.
func (p *problemsPage) cell(at string) workbook.Cell {
	name := at
	if i := strings.LastIndexByte(at, '!'); i >= 0 && at[:i] == p.info.Sheet {
		name = cellOf(at)
	}
	c := workbook.TextCell(name)
	c.Link = workbook.Place(p.info.Sheet, at)
	return c
}

// headers lists the headings that were left alone.
func (p *problemsPage) headers() {
	s := p.info.Reading
	if len(s.LeftAlone)+len(s.Other) == 0 {
		return
	}
	p.Blank()
	p.Headings("Cell", "Heading not read", "", "", "", "Why", "", "")
	p.spanned()
	for _, h := range s.LeftAlone {
		p.heading(h, h.Why)
	}
	for _, h := range s.Other {
		p.heading(h, "it says nothing that the program knows; map it to a field if it should")
	}
}

func (p *problemsPage) heading(h schedule.Seen, why string) {
	blank := workbook.TextCell("")
	p.Row(p.cell(h.Cell), workbook.TextCell(h.Heading), blank, blank, blank, workbook.WordsCell(why), blank, blank)
	p.spanned()
}

func (p *problemsPage) spanned() {
	p.Span(1, 4)
	p.Span(5, 7)
}

// passedOver counts the rows that belong to no member, and repeats the notes on
// the schedule as a whole.
func (p *problemsPage) passedOver() {
	counts := passedOver(p.info.Reading)
	if len(counts)+len(p.info.Reading.Notes) == 0 {
		return
	}
	p.Blank()
	p.Headings("Passed over", "", "", ">Rows")
	p.Span(0, 2)
	for _, c := range counts {
		p.Row(workbook.TextCell(c.what), workbook.TextCell(""), workbook.TextCell(""), number(float64(c.n), whole))
		p.Span(0, 2)
	}
	for _, n := range p.info.Reading.Notes {
		p.Across(8, workbook.Cell{Value: "note: " + n})
	}
}

// cellOf takes the sheet off the name of a cell.
func cellOf(cell string) string { return cell[strings.LastIndexByte(cell, '!')+1:] }
