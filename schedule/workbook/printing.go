package workbook

import (
	"slices"
	"strconv"
	"strings"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
)

// On paper the schedule stays as it was: with the results beside it a sheet
// would print too small to be read. Results that have no sheet of their own for
// that (Block.Printed) follow on pages of their own, the marks repeated at
// their left.

// printArea returns the print area of a schedule that has none: its own
// columns, whatever rows come, and the printed results.
func (p *Plan) printArea() (string, bool) {
	if p.hasName(printAreaName) {
		return "", false
	}
	e, start := &p.sheet.extent, p.place.rows.firstCol
	right := furthest(e.valued, 1, len(e.valued)-1)
	if o := &p.place.old; len(o.columns) > 0 && right <= o.area.lastCol+1 {
		right = 0 // an earlier run's results
	}
	drawn, err := p.book.drawn(p.sheet)
	if err != nil || right > start {
		return "", false
	}
	for _, d := range drawn {
		if d.lastCol >= start {
			return "", false
		}
	}
	return p.withResults(wholeColumns(0, start-1)), start > 0
}

const (
	printAreaName   = "_xlnm.Print_Area"
	printTitlesName = "_xlnm.Print_Titles"
)

// wholeColumns is the range from a column to another.
func wholeColumns(first, last int) string { return "$" + columnName(first) + ":$" + columnName(last) }

// withResults returns a print area, of cells without their sheet, as it stands
// in the name: with the printed results behind it.
func (p *Plan) withResults(cells string) string {
	here := quoted(p.sheet.name) + "!"
	if p.block.Printed == 0 {
		return here + cells
	}
	first := p.place.rows.firstCol
	results := wholeColumns(first, first+p.block.Printed-1)
	if a, ok := parseArea(cells); ok && a.lastRow < maxRows {
		results = area{a.firstRow, max(a.lastRow, p.block.LastRow), first, first + p.block.Printed - 1}.absolute()
	}
	return here + cells + "," + here + results
}

// followedArea returns the print area of the schedule as it is to be: one that
// took in the results of an earlier run takes in these, one that an earlier run
// set beside them ends beside these, any other stays, and the printed results
// follow behind.
func (p *Plan) followedArea(text string) (string, bool) {
	refs, changed := splitRefs(text), p.block.Printed > 0
	o := &p.place.old
	if len(refs) == 2 && len(o.columns) > 0 {
		if _, cells, ok := splitRef(refs[1]); ok {
			if a, ok := parseArea(cells); ok && a.firstCol == o.area.firstCol {
				refs, changed = refs[:1], true // the results of an earlier run
			}
		}
	}
	if len(refs) != 1 {
		return "", false
	}
	_, cells, ok := splitRef(refs[0])
	a, isArea := parseArea(cells)
	if !ok || !isArea {
		return "", false
	}
	whole := a.firstRow == 1 && a.lastRow == maxRows && a.firstCol == 0
	switch {
	case len(o.columns) > 0 && a.lastCol == o.area.lastCol && p.reaches(a):
		return quoted(p.sheet.name) + "!" + p.widened(a).absolute(), true
	case len(o.columns) > 0 && whole && a.lastCol == o.area.firstCol-1:
		a.lastCol = p.place.rows.firstCol - 1
		cells, changed = wholeColumns(0, a.lastCol), true
	}
	if a.meets(area{1, maxRows, p.place.rows.firstCol, p.place.rows.lastCol}) {
		return "", false // it prints them as it is
	}
	return p.withResults(cells), changed
}

// splitRefs splits references at the commas between them, not at those in the
// name of a sheet.
func splitRefs(text string) []string {
	var refs []string
	inName, from := false, 0
	for i := 0; i < len(text); i++ {
		switch {
		case text[i] == '\'':
			inName = !inName
		case text[i] == ',' && !inName:
			refs, from = append(refs, text[from:i]), i+1
		}
	}
	return append(refs, text[from:])
}

// printTitles returns what is repeated on every page of a schedule whose
// results are printed: at the left its marks, and at the top what is said
// already or its headings.
func (p *Plan) printTitles(said string) (string, bool) {
	first, last, ok := p.markColumns()
	if p.block.Printed == 0 || !ok {
		return "", false
	}
	here := quoted(p.sheet.name) + "!"
	rows := here + "$" + strconv.Itoa(p.headingTop()) + ":$" + strconv.Itoa(max(p.place.heading, p.place.unit))
	if said != "" {
		refs := splitRefs(said)
		_, cells, ok := splitRef(refs[0])
		if a, isArea := parseArea(cells); len(refs) > 1 || !ok || !isArea || a.lastCol < maxColumns-1 {
			return "", false // columns are repeated as they are
		}
		rows = refs[0]
	}
	return here + wholeColumns(first, last) + "," + rows, true
}

// headingTop is the first row of the headings of the schedule.
func (p *Plan) headingTop() int { return max(1, min(p.block.Header.First, p.block.Header.Last)) }

// markColumns returns the columns that tell the members apart: from the first
// of the sheet where the marks stand among the first few, to the levels where
// they follow.
func (p *Plan) markColumns() (first, last int, ok bool) {
	columns := p.block.Header.Columns
	i := slices.IndexFunc(columns, func(b schedule.Binding) bool { return b.Field == "Mark" })
	if i < 0 {
		return 0, 0, false
	}
	first, last = columns[i].Col, columns[i].Col
	if first < maxFrozenColumns {
		first = 0
	}
	for _, b := range columns[i+1:] {
		if b.Col != last+1 || !strings.HasPrefix(b.Field, "Level") {
			break
		}
		last = b.Col
	}
	return first, last, true
}

// editPrinting returns the print area or the print titles of the schedule as
// they are to be.
func (p *Plan) editPrinting(n *markup.Element) (string, bool) {
	switch n.Attr("name") {
	case printAreaName:
		return p.followedArea(n.Text())
	case printTitlesName:
		return p.printTitles(n.Text())
	}
	return "", false
}
