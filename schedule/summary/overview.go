package summary

import (
	"fmt"
	"strconv"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// page is the summary being filled from the top.
type page struct{ *workbook.Page }

// summarySheet is the page that says what was run, and what came of it.
func summarySheet(info *Info, t *Tally) workbook.Sheet {
	p := &page{workbook.NewPage(SummarySheet, "Column design: summary", 26, 30, 28, 14, 26)}
	p.Footer = info.File
	p.Blank()
	for _, pair := range [][2]string{
		{"Project", info.Project}, {"Schedule", info.File}, {"Sheet", info.Sheet}, {"SHA-256 of the schedule", info.SHA256},
		{"Program", info.Program}, {"Standard", info.Standard},
		{"National set", info.National.Name + ": " + info.National.Source}, {"Working", info.Working},
	} {
		if pair[1] != "" || pair[0] != "Project" && pair[0] != "Working" {
			p.Row(workbook.LabelCell(pair[0]), workbook.Cell{Value: pair[1]})
		}
	}
	p.outcomes(t)
	p.steel(t)
	p.settings(info)
	p.reading(info)
	p.cautions(info)
	return p.Sheet
}

func (p *page) outcomes(t *Tally) {
	p.Blank()
	p.Begin()
	p.Headings("Outcome", ">Members")
	for _, s := range []design.Status{design.Passes, design.Fails, design.NoSection, design.NotRead} {
		name := workbook.TextCell(s.String())
		if t.Count[s] > 0 {
			name = workbook.OutcomeCell(s) // a colour is for what there is
		}
		p.Row(name, number(float64(t.Count[s]), whole))
	}
	p.Totals(workbook.TextCell("all"), number(float64(t.Members()), whole))
}

func (p *page) steel(t *Tally) {
	p.Blank()
	p.Begin()
	p.Headings("Steel", ">Lengths", ">Length [m]", ">Mass [t]")
	list := t.Steel()
	for _, s := range list {
		p.Row(workbook.TextCell(s.Family), number(float64(s.Lengths), whole), number(s.Length, metres), number(s.Mass/1000, tonnes))
	}
	all := Total(list)
	p.Totals(workbook.TextCell("all"), number(float64(all.Lengths), whole), number(all.Length, metres), number(all.Mass/1000, tonnes))
}

func (p *page) settings(info *Info) {
	p.Blank()
	p.Begin()
	p.Headings("Setting", "Value", "From")
	for _, s := range info.Settings {
		p.Row(workbook.TextCell(s.Name), workbook.TextCell(s.Value), workbook.TextCell(s.From))
	}
}

// reading says what the reading passed over.
func (p *page) reading(info *Info) {
	s := info.Reading
	p.Blank()
	p.Begin()
	p.Headings("Reading", "", "", "", "")
	p.Span(1, 4)
	p.read("rows of members", strconv.Itoa(s.Rows))
	for _, c := range passedOver(s) {
		p.read(c.what, strconv.Itoa(c.n))
	}
	for _, h := range s.LeftAlone {
		p.read("left alone", fmt.Sprintf("%s %q: %s", h.Cell, h.Heading, h.Why))
	}
	for _, h := range s.Other {
		p.read("not used", fmt.Sprintf("%s %q", h.Cell, h.Heading))
	}
	for _, n := range s.Notes {
		p.read("note", n)
	}
}

// read adds a line on what the reading came upon, as long as it may be.
func (p *page) read(what, text string) {
	none := workbook.TextCell("")
	p.Row(workbook.TextCell(what), workbook.WordsCell(text), none, none, none)
	p.Span(1, 4)
}

// counted is how many rows there are of a kind.
type counted struct {
	what string
	n    int
}

// passedOver counts what is worth a look among the rows.
func passedOver(s *schedule.Summary) []counted {
	var out []counted
	for _, c := range []counted{{"hidden rows, designed too", s.Hidden}, {"total rows passed over", s.Totals}, {"repeated headers passed over", s.Repeated}, {"other texts passed over", s.Footnotes}} {
		if c.n > 0 {
			out = append(out, c)
		}
	}
	return out
}

func (p *page) cautions(info *Info) {
	p.Blank()
	p.Begin()
	p.Row(workbook.LabelCell("Cautions"))
	for _, c := range info.Cautions {
		p.Across(5, workbook.Cell{Value: c, Look: workbook.Look{Role: workbook.Remark}})
	}
}
