package summary

import (
	"fmt"

	"stanchion/design"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

// size is what the members of one section and grade have in common.
type size struct {
	members, failing int
	worst            *Line
}

// sizesSheet lists the sizes used: how much of each, and how far it is used.
func sizesSheet(info *Info, lines []Line, steel *takeoff.TakeOff) workbook.Sheet {
	sizes := sizesOf(lines)
	p := &page{workbook.NewPage(SizesSheet, "Sizes used", 12, 22, 9, 9, 10, 9, 13, 11, 11, 13, 24, 10)}
	p.Footer, p.Landscape = info.File, true
	p.Row(workbook.Cell{Value: plural(len(steel.Sections), "size") + " in " + info.File, Look: workbook.Look{Role: workbook.Remark}})
	p.Blank()
	p.Headings("Family", "Section", "Grade", ">kg/m", ">Members", ">Pieces", ">Length [m]", ">Mass [t]", ">of the mass", ">Greatest utilisation", "of member", ">Failing")
	head := len(p.Rows)
	p.SetLines(2)
	p.Freeze()
	var all size
	for i := range steel.Sections {
		s := &steel.Sections[i]
		z := sizes[[2]string{s.Section.Name(), s.Grade}]
		if z == nil {
			z = &size{}
		}
		all.members += z.members
		all.failing += z.failing
		p.size(s, z, steel)
	}
	if len(p.Rows) > head {
		p.Filter = fmt.Sprintf("A%d:L%d", head, len(p.Rows))
	}
	p.Totals(workbook.TextCell("all"), workbook.Cell{}, workbook.Cell{}, workbook.Cell{}, number(float64(all.members), whole),
		number(float64(steel.Pieces), whole), workbook.NumberCell(steel.Net.Metres(), metres), workbook.NumberCell(steel.Net.Tonnes(), exactTonnes),
		workbook.Cell{}, workbook.Cell{}, workbook.Cell{}, some(float64(all.failing), whole))
	return p.Sheet
}

// exactTonnes shows sums as the take-off does.
const exactTonnes = "#,##0.000"

func (p *page) size(s *takeoff.SectionLine, z *size, steel *takeoff.TakeOff) {
	utilisation, mark := workbook.TextCell(""), workbook.TextCell("")
	if z.worst != nil {
		utilisation = number(z.worst.Result.Utilisation, ratio)
		mark = workbook.TextCell(takeoff.MemberName(&z.worst.Member.Column))
	}
	share := workbook.TextCell("")
	if steel.Net.Mass > 0 {
		share = number(float64(s.Mass)/float64(steel.Net.Mass), "0.0%")
	}
	p.Row(workbook.TextCell(takeoff.FamilyName(s.Section)), workbook.TextCell(s.Section.Name()), workbook.TextCell(s.Grade), number(s.Section.Mass, "0.0##"),
		number(float64(z.members), whole), number(float64(s.Pieces), whole), workbook.NumberCell(s.Metres(), metres), workbook.NumberCell(s.Tonnes(), exactTonnes),
		share, utilisation, mark, some(float64(z.failing), whole))
}

// sizesOf gathers the members that have a section by section and grade.
func sizesOf(lines []Line) map[[2]string]*size {
	out := map[[2]string]*size{}
	for i := range lines {
		r := &lines[i].Result
		if r.Status > design.Fails {
			continue
		}
		key := [2]string{r.Section, r.Grade}
		z := out[key]
		if z == nil {
			z = &size{}
			out[key] = z
		}
		z.members++
		if r.Status == design.Fails {
			z.failing++
		}
		if finite(r.Utilisation) && (z.worst == nil || r.Utilisation > z.worst.Result.Utilisation) {
			z.worst = &lines[i]
		}
	}
	return out
}
