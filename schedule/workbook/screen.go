package workbook

import (
	"fmt"
	"slices"

	"stanchion/schedule/workbook/internal/markup"
)

// What makes a wide schedule easy to read on a screen is added where the user
// has not seen to it: the headings and the marks stay in view, and the rows
// can be filtered. What the user has chosen stays.

// Bounds of what is frozen: more would leave no room on a small screen.
const (
	maxFrozenHeight  = 220 // points
	maxFrozenColumns = 4
	usualRowHeight   = 15 // points
)

// freeze keeps the headings in view, and the columns up to the marks.
func (p *Plan) freeze(edits *markup.Edits) {
	row := max(p.place.heading, p.place.unit)
	height := 0.0
	for r := 1; r <= row; r++ {
		if h, ok := p.sheet.extent.heights[r]; ok {
			height += h
		} else {
			height += usualRowHeight
		}
	}
	if height > maxFrozenHeight {
		return
	}
	root := p.layout.root
	pane := p.pane(row)
	views := root.Child("sheetViews")
	if views == nil {
		text := fmt.Sprintf(`<%[1]ssheetViews><%[1]ssheetView workbookViewId="0">%[2]s</%[1]ssheetView></%[1]ssheetViews>`, root.Prefix, pane)
		edits.Insert(behindLast(root, []string{"sheetPr", "dimension"}), text)
		return
	}
	list := views.All("sheetView")
	if len(list) != 1 || !plainView(list[0]) {
		return
	}
	v := list[0]
	if v.Empty() {
		tag := v.Tag()
		edits.Replace(v, string(tag[:len(tag)-2])+">"+pane+"</"+v.Prefix+v.Name+">")
		return
	}
	edits.Insert(v.Inner, pane)
}

// plainView reports whether a view shows the sheet as it comes, from its first
// cell.
func plainView(v *markup.Element) bool {
	kind, corner := v.Attr("view"), v.Attr("topLeftCell")
	return v.Child("pane") == nil && (kind == "" || kind == "normal") && (corner == "" || corner == "A1")
}

func (p *Plan) pane(row int) string {
	col := 0
	for _, b := range p.block.Header.Columns {
		if b.Field == "Mark" && b.Col < maxFrozenColumns {
			col = b.Col + 1
		}
	}
	corner, across := cellName(col, row+1), ""
	which := "bottomLeft"
	if col > 0 {
		which, across = "bottomRight", fmt.Sprintf(` xSplit="%d"`, col)
	}
	return fmt.Sprintf(`<%spane%s ySplit="%d" topLeftCell="%s" activePane="%s" state="frozen"/>`, p.layout.root.Prefix, across, row, corner, which)
}

// newFilter returns the range of a filter over the schedule and its results.
// There is none where the sheet has one, or tables, which have their own; where
// it is protected; or where cells are merged, since hiding the first row of a
// merged mark hides the mark.
func (p *Plan) newFilter() (area, bool) {
	root := p.layout.root
	first := max(p.place.heading, p.place.unit)
	a := area{first, p.block.LastRow, 0, p.place.rows.lastCol}
	for _, name := range []string{"autoFilter", "tableParts", "sheetProtection"} {
		if root.Child(name) != nil {
			return a, false
		}
	}
	if a.lastRow <= a.firstRow || len(p.block.Header.Columns) == 0 {
		return a, false
	}
	a.firstCol = p.block.Header.Columns[0].Col
	for _, m := range p.layout.merged {
		if m.meets(a) && !p.ours(m) {
			return a, false
		}
	}
	return a, true
}

// beforeFilter are the elements of a sheet that stand before its filter.
var beforeFilter = beforeMerges[:slices.Index(beforeMerges, "autoFilter")]

func (p *Plan) addFilter(edits *markup.Edits) {
	if a, ok := p.newFilter(); ok {
		edits.Insert(behindLast(p.layout.root, beforeFilter), fmt.Sprintf(`<%sautoFilter ref="%s"/>`, p.layout.root.Prefix, a))
	}
}
