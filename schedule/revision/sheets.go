package revision

import (
	"fmt"
	"math"

	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// The names that the sheets want.
const (
	RevisionSheet = "Revision"
	ChangesSheet  = "Changes"
)

// Info is what the sheets say beside the comparison itself.
type Info struct {
	Program, Standard, National string
	OldFile, OldSHA256          string
	NewFile, NewSHA256          string
	Sheet                       string // of the new issue, that holds the schedule; empty: text
	Settings                    []Change
	Cautions                    []string
}

// Sheets lays the comparison out as sheets of a workbook.
func (c *Comparison) Sheets(info *Info) []workbook.Sheet {
	return []workbook.Sheet{c.overview(info), c.changesSheet(info)}
}

// overview is the page that says what came of the comparison.
func (c *Comparison) overview(info *Info) workbook.Sheet {
	p := workbook.NewPage(RevisionSheet, "Revision: two issues side by side", 26, 22, 10, 12, 13, 44)
	p.Footer = info.NewFile
	p.Blank()
	for _, pair := range [][2]string{
		{"Old issue", info.OldFile}, {"SHA-256", info.OldSHA256}, {"New issue", info.NewFile}, {"SHA-256", info.NewSHA256},
		{"Program", info.Program}, {"Standard", info.Standard}, {"National set", info.National},
	} {
		fact(p, pair[0], pair[1])
	}
	p.Blank()
	for _, f := range c.Facts() {
		fact(p, f[0], f[1])
	}
	p.Blank()
	p.Headings("Steel", "", ">Pieces", ">Mass [t]", ">Change [t]", "Remark")
	p.Span(0, 1)
	list := c.Tonnages()
	for i, t := range list {
		change := blank()
		if i > 0 {
			change = workbook.NumberCell(float64(t.Steel.Net.Mass-list[0].Steel.Net.Mass)/1e6, "+0.000;-0.000;0.000")
		}
		p.Row(workbook.TextCell(t.Name), blank(), workbook.NumberCell(float64(t.Steel.Pieces), "#,##0"),
			workbook.NumberCell(t.Steel.Net.Tonnes(), "#,##0.000"), change, workbook.TextCell(t.Remark()))
		p.Span(0, 1)
	}
	if len(info.Settings) > 0 {
		p.Blank()
		p.Headings("Settings that differ", "", "", "", "", "")
		p.Span(0, 5)
		for _, s := range info.Settings {
			p.Row(workbook.WordsCell(s.Text), blank(), blank(), blank(), blank(), blank())
			p.Span(0, 5)
		}
	}
	p.Blank()
	for _, s := range info.Cautions {
		p.Across(6, workbook.Cell{Value: s, Look: workbook.Look{Role: workbook.Remark}})
	}
	return p.Sheet
}

// fact is a line of a name and of what is said of it, over the other columns.
func fact(p *workbook.Page, name, value string) {
	p.Row(workbook.LabelCell(name), workbook.Cell{Value: value, Look: workbook.Look{Wrap: true}})
	p.Span(1, len(p.Widths)-1)
}

// Remark says how many members a tonnage leaves out.
func (t *Tonnage) Remark() string {
	switch t.Without {
	case 0:
		return ""
	case 1:
		return "without 1 member that has no section"
	}
	return fmt.Sprintf("without %d members that have no section", t.Without)
}

// changesSheet lists what changed, what is weak or has steel to spare, what is
// new, what is gone, and what could be the same.
func (c *Comparison) changesSheet(info *Info) workbook.Sheet {
	p := workbook.NewPage(ChangesSheet, "Changes, and what they mean for the sections of the old issue", 13, 13, 9, 16, 22, 12, 18, 24, 22, 12, 56)
	p.Landscape, p.Footer = true, info.NewFile
	p.Row(workbook.Cell{Value: info.OldFile + " → " + info.NewFile, Look: workbook.Look{Role: workbook.Remark}})
	p.Blank()
	p.Headings("Change", "Mark", "Grid", "Level", "Section before", ">Utilisation", "Verdict", "Governing check", "Lightest", ">Saves [kg]", "What changed")
	head := len(p.Rows)
	p.FreezeCols = 2
	p.Freeze()
	for i := range c.Rows {
		if r := &c.Rows[i]; r.Word() != wordSame || r.Verdict >= Spare {
			p.Row(c.changeCells(r, info)...)
		}
	}
	for _, j := range c.Removed {
		m := &c.Old.Members[j]
		p.Row(append(memberCells(worded(wordGone, workbook.Gone), m, workbook.TextCell(m.Column.Mark)),
			workbook.TextCell(m.SectionName()), blank(), blank(), blank(), blank(), blank(), workbook.WordsCell("only in the old issue, at "+m.Column.Cell))...)
	}
	for _, k := range c.Candidates {
		old, new := &c.Old.Members[k.Old], &c.New.Members[k.New]
		word := worded(bare(k.Likeness), workbook.Perhaps)
		p.Row(append(memberCells(word, new, linked(new, info)), workbook.TextCell(old.SectionName()), blank(), blank(), blank(), blank(), blank(),
			workbook.WordsCell(fmt.Sprintf("was %s? %s", old.Name(), k.Why)))...)
	}
	if len(p.Rows) == head {
		p.Row(workbook.TextCell("nothing"))
	} else {
		p.Filter = fmt.Sprintf("A%d:K%d", head, len(p.Rows))
	}
	return p.Sheet
}

// bare is a likeness without its question mark, which the cell's look has.
func bare(l Likeness) string { return l.String()[:len(l.String())-1] }

func blank() workbook.Cell { return workbook.TextCell("") }

// worded is a cell whose look shows what its word says.
func worded(word string, role workbook.Role) workbook.Cell {
	return workbook.Cell{Value: word, Look: workbook.Look{Role: role, Align: workbook.Left}}
}

// lookOf draws a word of the comparison.
func lookOf(word string) workbook.Cell {
	if role, ok := Words()[word]; ok {
		return worded(word, role)
	}
	return workbook.TextCell(word)
}

func memberCells(first workbook.Cell, m *Member, mark workbook.Cell) []workbook.Cell {
	return []workbook.Cell{first, mark, workbook.TextCell(m.Column.Stack), workbook.WordsCell(m.Level())}
}

// linked is a member's mark with a link to its row.
func linked(m *Member, info *Info) workbook.Cell {
	c := workbook.TextCell(m.Column.Mark)
	c.Link = workbook.Place(info.Sheet, m.Column.Cell)
	return c
}

func (c *Comparison) changeCells(r *Row, info *Info) []workbook.Cell {
	verdict := blank()
	if r.Verdict != NotChecked {
		verdict = lookOf(r.Verdict.String())
	}
	before := ""
	if r.Old != nil {
		before = r.Old.SectionName()
	}
	return append(memberCells(lookOf(r.Word()), r.New, linked(r.New, info)),
		workbook.TextCell(before), some(r.Utilisation(), "0.000"), verdict, workbook.WordsCell(r.Governs()),
		workbook.TextCell(r.LightestName()), some(blankZero(float64(r.Saving)/1e3), "#,##0.0"), workbook.WordsCell(r.What()))
}

func some(x float64, format string) workbook.Cell {
	if math.IsNaN(x) {
		return blank()
	}
	return workbook.NumberCell(schedule.Round(x), format)
}
