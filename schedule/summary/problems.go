package summary

import (
	"fmt"
	"math"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// problemsSheet lists the members that a person must look at, each with a link
// to its row.
func problemsSheet(info *Info, lines []Line) workbook.Sheet {
	p := &page{workbook.NewPage(ProblemsSheet, "Members that fail, have no section or could not be read", 16, 12, 12, 13, 20, 11, 24, 80)}
	p.Footer = info.File
	p.Landscape = true
	p.Blank()
	p.Headings("Cell", "Mark", "Level", "Status", "Section", ">Utilisation", "Governing check", "Reason")
	head := len(p.Rows)
	p.Freeze()
	for i := range lines {
		if lines[i].Result.Status != design.Passes {
			p.problem(info, &lines[i])
		}
	}
	if len(p.Rows) == head {
		p.Row(workbook.TextCell("none"))
	} else {
		p.Filter = fmt.Sprintf("A%d:H%d", head, len(p.Rows))
	}
	return p.Sheet
}

func (p *page) problem(info *Info, l *Line) {
	c, r := &l.Member.Column, &l.Result
	utilisation := workbook.TextCell("")
	if r.Section != "" && !math.IsInf(r.Utilisation, 0) {
		utilisation = number(r.Utilisation, ratio)
	}
	cell := workbook.TextCell(c.Cell)
	cell.Link = workbook.Place(info.Sheet, c.Cell)
	p.Row(cell, workbook.TextCell(c.Mark), workbook.TextCell(Level(c)), outcome(r.Status), workbook.TextCell(r.Section), utilisation,
		workbook.TextCell(schedule.CheckName(r.Governing.Kind)), workbook.WordsCell(schedule.Note(l.Member, r)))
}
