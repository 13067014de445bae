package summary

import (
	"fmt"
	"strconv"

	"stanchion/design"
	"stanchion/schedule/workbook"
)

// summarySheet is the page that says what was run, and what came of it.
func summarySheet(info *Info, t *Tally) workbook.Sheet {
	p := newPage(info, SummarySheet, "Column design: summary", 26, 30, 14, 14, 40)
	p.blank()
	for _, pair := range [][2]string{
		{"Schedule", info.File}, {"Sheet", info.Sheet}, {"SHA-256 of the schedule", info.SHA256},
		{"Program", info.Program}, {"Standard", info.Standard},
		{"National set", info.National.Name + ": " + info.National.Source},
	} {
		p.row(label(pair[0]), workbook.Cell{Value: pair[1]})
	}
	p.outcomes(t)
	p.steel(t)
	p.settings(info)
	p.reading(info)
	p.cautions(info)
	return p.Sheet
}

func (p *page) outcomes(t *Tally) {
	p.blank()
	p.headings("Outcome", ">Members")
	for _, s := range []design.Status{design.Passes, design.Fails, design.NoSection, design.NotRead} {
		name := text(s.String())
		if t.Count[s] > 0 {
			name = outcome(s) // a colour is for what there is
		}
		p.row(name, number(float64(t.Count[s]), 0))
	}
	p.row(total(text("all")), total(number(float64(t.Members()), 0)))
}

func (p *page) steel(t *Tally) {
	p.blank()
	p.headings("Steel", ">Pieces", ">Length [m]", ">Mass [t]")
	list := t.Steel()
	for _, s := range list {
		p.row(text(s.Family), number(float64(s.Pieces), 0), number(s.Length, 1), number(s.Mass/1000, 2))
	}
	all := Total(list)
	p.row(total(text("all")), total(number(float64(all.Pieces), 0)), total(number(all.Length, 1)), total(number(all.Mass/1000, 2)))
}

func (p *page) settings(info *Info) {
	p.blank()
	p.headings("Setting", "Value", "From")
	for _, s := range info.Settings {
		p.row(text(s.Name), text(s.Value), text(s.From))
	}
}

// reading says what the reading passed over.
func (p *page) reading(info *Info) {
	s := info.Reading
	p.blank()
	p.headings("Reading", "")
	p.row(text("rows of members"), text(strconv.Itoa(s.Rows)))
	for _, c := range []struct {
		what string
		n    int
	}{{"hidden rows, designed too", s.Hidden}, {"total rows passed over", s.Totals}, {"repeated headers passed over", s.Repeated}, {"footnotes passed over", s.Footnotes}} {
		if c.n > 0 {
			p.row(text(c.what), text(strconv.Itoa(c.n)))
		}
	}
	for _, h := range s.LeftAlone {
		p.row(text("left alone"), workbook.Cell{Value: fmt.Sprintf("%s %q: %s", h.Cell, h.Heading, h.Why)})
	}
	for _, h := range s.Other {
		p.row(text("not used"), workbook.Cell{Value: fmt.Sprintf("%s %q", h.Cell, h.Heading)})
	}
	for _, n := range s.Notes {
		p.row(text("note"), workbook.Cell{Value: n})
	}
}

func (p *page) cautions(info *Info) {
	p.blank()
	p.row(label("Cautions"))
	for _, c := range info.Cautions {
		p.row(workbook.Cell{Value: c, Look: workbook.Look{Role: workbook.Remark, Wrap: true}})
		n := len(p.Rows)
		p.Merges = append(p.Merges, fmt.Sprintf("A%d:E%d", n, n))
		if p.Heights == nil {
			p.Heights = map[int]float64{}
		}
		const charactersWide, lineHeight = 118, 15.5
		p.Heights[n] = lineHeight * float64(1+len(c)/charactersWide)
	}
}
