package summary

import "stanchion/schedule/workbook"

// sizesSheet lists the steel by section and grade.
func sizesSheet(info *Info, t *Tally) workbook.Sheet {
	p := newPage(info, SizesSheet, "Sizes used", 14, 24, 12, 10, 10, 12, 12)
	p.blank()
	p.headings("Family", "Section", "Grade", ">kg/m", ">Pieces", ">Length [m]", ">Mass [t]")
	p.FreezeRows, p.RepeatRows = len(p.Rows), len(p.Rows)
	list := t.Sizes()
	for _, s := range list {
		p.row(text(s.Family), text(s.Section), text(s.Grade), number(s.MassPerM, 1), number(float64(s.Pieces), 0), number(s.Length, 1), number(s.Mass/1000, 3))
	}
	all := Total(list)
	p.row(total(text("all")), total(text("")), total(text("")), total(text("")), total(number(float64(all.Pieces), 0)), total(number(all.Length, 1)), total(number(all.Mass/1000, 3)))
	return p.Sheet
}
