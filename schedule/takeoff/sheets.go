package takeoff

import (
	"fmt"
	"strings"

	"stanchion/schedule/workbook"
)

// The names that the sheets want.
const (
	Sheet        = "Take-off"
	SplicesSheet = "Splices"
	CuttingSheet = "Cutting list"
)

// The number formats of the sheets.
const (
	wholeFormat  = "#,##0"
	metreFormat  = "#,##0.00"
	lengthFormat = "0.000"
	tonneFormat  = "#,##0.000"
	areaFormat   = "#,##0.0"
	kgFormat     = "0.0##"
	moneyFormat  = "#,##0"
)

// Sheets lays the take-off out as sheets of a workbook. file is the name of
// the schedule, for the foot of the page.
func (t *TakeOff) Sheets(file string) []workbook.Sheet {
	p := &page{Page: workbook.NewPage(Sheet, "Take-off", 15, 21, 8, 9, 10, 12, 8, 12, 14, 11, 11), t: t}
	p.Footer = file
	p.Row(workbook.Cell{Value: "of " + file, Look: workbook.Look{Role: workbook.Remark}})
	p.notCounted()
	p.totals()
	p.bySection()
	p.byLevel()
	p.byFamily()
	p.remarks()
	p.Across(tableColumns, workbook.Cell{Value: exactness, Look: workbook.Look{Role: workbook.Remark}})
	sheets := []workbook.Sheet{p.Sheet}
	if len(t.Splices) > 0 {
		sheets = append(sheets, t.splicesSheet(file))
	}
	return append(sheets, t.cuttingSheet(file))
}

// tableColumns are the columns of the tables, without those of rates.
const tableColumns = 9

// exactness says what the sums rest on.
const exactness = "Mass is the published mass per metre times the length, each piece to the gram; every table adds up to the same total. " +
	"Painted area is the outside surface of the lengths, without ends and fittings. Allowances are parts of the net mass, priced as the steel is."

// page is the sheet of tables: three columns that name a row, then its amounts.
type page struct {
	*workbook.Page
	t *TakeOff
}

// amounts are the cells of a row from the fourth column on. pieces and kgM are
// left blank where they are 0.
func (p *page) amounts(pieces int64, kgM float64, a *Amounts) []workbook.Cell {
	cells := []workbook.Cell{
		some(float64(pieces), wholeFormat), some(float64(a.Lengths), wholeFormat), some(a.Metres(), metreFormat), some(kgM, kgFormat),
		workbook.NumberCell(a.Tonnes(), tonneFormat), some(a.SquareMetres(), areaFormat),
	}
	if p.t.HasCost() {
		cells = append(cells, rated(a.Money(), moneyFormat))
	}
	if p.t.HasCarbon() {
		cells = append(cells, rated(a.TonnesCO2e(), tonneFormat))
	}
	return cells
}

func some(x float64, format string) workbook.Cell {
	if x == 0 {
		return workbook.TextCell("")
	}
	return workbook.NumberCell(x, format)
}

// rated is what a rate gives, and says where there is none.
func rated(x float64, format string) workbook.Cell {
	if x == 0 {
		return workbook.Cell{Value: "no rate", Look: workbook.Look{Role: workbook.Result, Align: workbook.Right}}
	}
	return workbook.NumberCell(x, format)
}

// table starts a table: the headings of its first three columns, then those of
// the amounts.
func (p *page) table(a, b, c string) {
	p.Blank()
	p.Begin()
	headings := []string{a, b, c, ">Pieces", ">Lengths", ">Length [m]", ">kg/m", ">Mass [t]", ">Painted [m2]"}
	if p.t.HasCost() {
		headings = append(headings, ">Cost")
	}
	if p.t.HasCarbon() {
		headings = append(headings, ">CO2e [t]")
	}
	p.Headings(headings...)
	p.named(b, c)
}

func (p *page) line(a, b, c string, amounts []workbook.Cell) {
	p.Row(append([]workbook.Cell{workbook.TextCell(a), workbook.TextCell(b), workbook.TextCell(c)}, amounts...)...)
	p.named(b, c)
}

// named joins the cells that name a row where they are not all needed.
func (p *page) named(b, c string) {
	switch {
	case b == "":
		p.Span(0, 2)
	case c == "":
		p.Span(1, 2)
	}
}

// total ends a table.
func (p *page) total(name string, pieces int64, a *Amounts) {
	p.Totals(append([]workbook.Cell{workbook.TextCell(name), {}, {}}, p.amounts(pieces, 0, a)...)...)
}

func (p *page) notCounted() {
	n := len(p.t.LeftOut)
	if n == 0 {
		return
	}
	p.Across(tableColumns, workbook.Cell{Value: plural(int64(n), "member is", "members are") + " not counted: see below", Look: workbook.Look{Role: workbook.NotRead}})
}

// totals says what all of it comes to.
func (p *page) totals() {
	t := p.t
	p.table("Total", "", "")
	net := t.Net
	p.line("net", "", "", p.amounts(t.Pieces, 0, &net))
	connections, waste := t.Allowance()
	for _, a := range []struct {
		name string
		part float64
		*Amounts
	}{{"for connections", t.Connections, &connections}, {"for waste", t.Waste, &waste}} {
		if a.part > 0 {
			p.line(a.name, Percent(a.part), "", p.amounts(0, 0, a.Amounts))
		}
	}
	gross := t.Gross()
	p.total("with allowances", t.Pieces, &gross)
	p.Blank()
	for _, line := range t.Facts() {
		p.Row(workbook.LabelCell(line[0]), workbook.Cell{Value: line[1]})
	}
}

// Percent writes a part in per cent: 0.065 as "6.5 %".
func Percent(part float64) string {
	return strings.TrimSuffix(fmt.Sprintf("%.4g", 100*part), ".") + " %"
}

func (p *page) bySection() {
	p.table("Family", "Section", "Grade")
	for i := range p.t.Sections {
		s := &p.t.Sections[i]
		p.line(FamilyName(s.Section), s.Section.Name(), s.Grade, p.amounts(s.Pieces, s.Section.Mass, &s.Amounts))
	}
	p.total("all", p.t.Pieces, &p.t.Net)
}

func (p *page) byLevel() {
	p.table("Level", "", "")
	for i := range p.t.Levels {
		l := &p.t.Levels[i]
		p.line(orNone(l.Name()), "", "", p.amounts(0, 0, &l.Amounts))
	}
	p.total("all", 0, &p.t.Net)
}

func orNone(level string) string {
	if level == "" {
		return "not said"
	}
	return level
}

func (p *page) byFamily() {
	p.table("Family", "", "")
	for i := range p.t.Families {
		f := &p.t.Families[i]
		p.line(f.Family, "", "", p.amounts(f.Pieces, 0, &f.Amounts))
	}
	p.total("all", p.t.Pieces, &p.t.Net)
}

// splicesSheet lists the splices by what they join.
func (t *TakeOff) splicesSheet(file string) workbook.Sheet {
	p := workbook.NewPage(SplicesSheet, "Splices", 16, 28, 28, 12)
	p.Footer = file
	p.Row(workbook.Cell{Value: "of " + file, Look: workbook.Look{Role: workbook.Remark}})
	p.Blank()
	p.Headings("Level", "Section below", "Section above", ">Number")
	p.Freeze()
	for _, s := range t.SpliceKinds() {
		p.Row(workbook.TextCell(s.Level), workbook.TextCell(s.Lower), workbook.TextCell(s.Upper), workbook.NumberCell(float64(s.Number), wholeFormat))
	}
	p.Totals(workbook.TextCell("all"), workbook.Cell{}, workbook.Cell{}, workbook.NumberCell(float64(t.SpliceCount()), wholeFormat))
	return p.Sheet
}

// remarks lists what a person should look at.
func (p *page) remarks() {
	t := p.t
	for _, list := range []struct {
		heading string
		lines   []LeftOut
	}{{"Not counted", t.LeftOut}, {"Counted, and they fail", t.Failing}, {"Counted, with a remark", t.Remarks}} {
		if len(list.lines) == 0 {
			continue
		}
		p.Blank()
		p.Begin()
		p.Headings(list.heading, "", "Cell", "", "", "Why", "", "", "")
		p.remarkSpans()
		for i := range list.lines {
			l := &list.lines[i]
			none := workbook.TextCell("")
			p.Row(workbook.TextCell(l.Name), none, workbook.WordsCell(l.Cell), none, none, workbook.WordsCell(l.Why), none, none, none)
			p.remarkSpans()
		}
	}
	p.Blank()
}

// remarkSpans joins the cells of a member's name, of its cell and of what is
// said of it.
func (p *page) remarkSpans() {
	p.Span(0, 1)
	p.Span(2, 4)
	p.Span(5, tableColumns-1)
}

// shortList joins marks, as many as a cell shows whole; the CSV has them all.
func shortList(marks []string) string {
	const characters = 1200
	n, size := 0, 0
	for n < len(marks) && size+len(marks[n]) <= characters {
		size += len(marks[n]) + len("; ")
		n++
	}
	if n == len(marks) || n == 0 {
		return strings.Join(marks, "; ")
	}
	return fmt.Sprintf("%s and %d more", strings.Join(marks[:n], "; "), len(marks)-n)
}

// cuttingSheet lists the pieces by section and length.
func (t *TakeOff) cuttingSheet(file string) workbook.Sheet {
	p := workbook.NewPage(CuttingSheet, "Cutting list", 10, 22, 10, 13, 11, 15, 12, 12, 60)
	p.Landscape, p.Footer = true, file
	p.Row(workbook.Cell{Value: "of " + file, Look: workbook.Look{Role: workbook.Remark}})
	p.Blank()
	p.Headings("Family", "Section", "Grade", ">Length [m]", ">Number", ">Together [m]", ">Mass [t]", "Transport", "Marks")
	head := len(p.Rows)
	p.Freeze()
	limit := whole(t.Transport * 1e3)
	for i := range t.Cuts {
		c := &t.Cuts[i]
		transport := workbook.TextCell("")
		if limit > 0 && c.Length > limit {
			transport = workbook.Cell{Value: "too long", Look: workbook.Look{Role: workbook.Fails}}
		}
		p.Row(workbook.TextCell(FamilyName(c.Section)), workbook.TextCell(c.Section.Name()), workbook.TextCell(c.Grade),
			workbook.NumberCell(float64(c.Length)/1e6, lengthFormat), workbook.NumberCell(float64(c.Number), wholeFormat),
			workbook.NumberCell(c.Metres(), metreFormat), workbook.NumberCell(c.Tonnes(), tonneFormat), transport,
			workbook.WordsCell(shortList(c.Marks)))
	}
	if len(p.Rows) > head {
		p.Filter = fmt.Sprintf("A%d:I%d", head, len(p.Rows))
	}
	p.Totals(workbook.TextCell("all"), workbook.Cell{}, workbook.Cell{}, workbook.Cell{}, workbook.NumberCell(float64(t.Pieces), wholeFormat),
		workbook.NumberCell(t.Net.Metres(), metreFormat), workbook.NumberCell(t.Net.Tonnes(), tonneFormat), workbook.Cell{}, workbook.Cell{})
	return p.Sheet
}
