package summary

import (
	"fmt"
	"math"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// problemsSheet lists the members that a person must look at, each with a link
// to its row.
func problemsSheet(info *Info, lines []Line) workbook.Sheet {
	p := newPage(info, ProblemsSheet, "Members that fail, have no section or could not be read", 16, 12, 12, 13, 20, 11, 24, 80)
	p.Landscape = true
	p.blank()
	p.headings("Cell", "Mark", "Level", "Status", "Section", ">Utilisation", "Governing check", "Reason")
	head := len(p.Rows)
	p.FreezeRows, p.RepeatRows = head, head
	for i := range lines {
		if lines[i].Result.Status != design.Passes {
			p.problem(info, &lines[i])
		}
	}
	if len(p.Rows) == head {
		p.row(text("none"))
	} else {
		p.Filter = fmt.Sprintf("A%d:H%d", head, len(p.Rows))
	}
	return p.Sheet
}

func (p *page) problem(info *Info, l *Line) {
	c, r := &l.Member.Column, &l.Result
	utilisation := text("")
	if r.Section != "" && !math.IsInf(r.Utilisation, 0) {
		utilisation = number(r.Utilisation, 3)
	}
	cell := text(c.Cell)
	cell.Link = place(info.Sheet, c.Cell)
	p.row(cell, text(c.Mark), text(Level(c)), outcome(r.Status), text(r.Section), utilisation,
		text(schedule.CheckName(r.Governing.Kind)), words(schedule.Note(l.Member, r)))
}

// place is a cell as a link names it: 'Columns'!B12.
func place(sheet, cell string) string {
	i := strings.LastIndexByte(cell, '!')
	if i < 0 {
		return ""
	}
	return "'" + strings.ReplaceAll(sheet, "'", "''") + "'" + cell[i:]
}
