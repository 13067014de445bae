package workbook

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// frames returns what stands before and behind the rows of the schedule's
// sheet, widened for the block.
func (p *Plan) frames() (before, behind []byte, err error) {
	var edits markup.Edits
	p.widenDimension(&edits)
	p.freeze(&edits)
	p.setColumns(&edits)
	p.addFilter(&edits)
	p.setMerges(&edits)
	p.widenFilter(&edits)
	p.setLinks(&edits)
	frame := edits.Apply(p.layout.frame)
	root, err := markup.Parse(frame)
	if err != nil {
		return nil, nil, err
	}
	data := root.Child("sheetData")
	if data.Empty() {
		name := data.Prefix + data.Name
		return append(frame[:data.From:data.From], "<"+name+">"...), append([]byte("</"+name+">"), frame[data.To:]...), nil
	}
	return frame[:data.Inner:data.Inner], frame[data.Close:], nil
}

func (p *Plan) widenDimension(edits *markup.Edits) {
	e := p.layout.root.Child("dimension")
	a, ok := parseArea(e.Attr("ref"))
	if !ok {
		return
	}
	r := p.place.rows
	a = area{min(a.firstRow, r.firstRow), max(a.lastRow, r.lastRow), min(a.firstCol, r.firstCol), max(a.lastCol, r.lastCol)}
	edits.SetAttrs(e, "ref", a.String())
}

const (
	headingLines = 2    // of text, in a heading row without a height of its own
	lineHeight   = 1.35 // of a line of text, in sizes of the font
)

// headerLines returns how many lines of text the heading row has room for.
func (p *Plan) headerLines() int {
	h, ok := p.sheet.extent.heights[p.place.heading]
	if !ok {
		return headingLines
	}
	return max(1, int(h/(lineHeight*p.letters.size)))
}

// setColumns gives the block's columns their widths. A range of columns that
// reaches into the block is split; the block is never hidden.
func (p *Plan) setColumns(edits *markup.Edits) {
	widths := p.widths(p.headerLines())
	root := p.layout.root
	list := root.Child("cols")
	prefix := root.Prefix
	first, last := p.place.rows.firstCol+1, p.place.rows.lastCol+1 // counted from 1 here
	styles := map[int]string{}
	var out []string
	for _, e := range list.All("col") {
		from, to := number(e, "min"), number(e, "max")
		if to < first || from > last {
			out = append(out, string(e.Raw()))
			continue
		}
		for c := max(from, first); c <= min(to, last); c++ {
			styles[c] = e.Attr("style")
		}
		if from < first {
			out = append(out, markup.SetAttrs(e.Tag(), "max", strconv.Itoa(first-1))+string(e.Rest()))
		}
		if to > last {
			out = append(out, markup.SetAttrs(e.Tag(), "min", strconv.Itoa(last+1))+string(e.Rest()))
		}
	}
	for i, w := range widths {
		style := ""
		if s := styles[first+i]; s != "" {
			style = ` style="` + markup.Escaped(s) + `"`
		}
		out = append(out, fmt.Sprintf(`<%scol min="%d" max="%d" width="%s"%s customWidth="1"/>`, prefix, first+i, first+i, strconv.FormatFloat(w, 'f', -1, 64), style))
	}
	slices.SortStableFunc(out, func(a, b string) int { return minOf(a) - minOf(b) })
	text := "<" + prefix + "cols>" + strings.Join(out, "") + "</" + prefix + "cols>"
	if list != nil {
		edits.Replace(list, text)
		return
	}
	edits.Insert(p.layout.data.From, text)
}

// minOf returns the first column of a col element.
func minOf(col string) int {
	e, err := markup.Parse([]byte(col))
	if err != nil {
		return 0
	}
	return number(e, "min")
}

// beforeMerges are the elements of a sheet that stand before mergeCells
// (ECMA-376 Part 1, 18.3.1.99).
var beforeMerges = []string{"sheetData", "sheetCalcPr", "sheetProtection", "protectedRanges", "scenarios", "autoFilter", "sortState", "dataConsolidate", "customSheetViews"}

// setMerges takes out the merged headings of an earlier run and adds those of
// this one.
func (p *Plan) setMerges(edits *markup.Edits) {
	root := p.layout.root
	list := root.Child("mergeCells")
	_, merges := p.headings()
	var out []string
	for _, e := range list.All("mergeCell") {
		if a, ok := parseArea(e.Attr("ref")); ok && p.ours(a) {
			continue
		}
		out = append(out, string(e.Raw()))
	}
	if len(merges) == 0 && len(out) == len(list.All("mergeCell")) {
		return
	}
	for _, m := range merges {
		out = append(out, fmt.Sprintf(`<%smergeCell ref="%s"/>`, root.Prefix, m))
	}
	text := ""
	if len(out) > 0 {
		name := root.Prefix + "mergeCells"
		text = fmt.Sprintf(`<%s count="%d">%s</%s>`, name, len(out), strings.Join(out, ""), name)
	}
	if list != nil {
		edits.Replace(list, text)
		return
	}
	edits.Insert(behindLast(root, beforeMerges), text)
}

// beforeLinks are the elements of a sheet that stand before hyperlinks.
var beforeLinks = append(slices.Clone(beforeMerges), "mergeCells", "phoneticPr", "conditionalFormatting", "dataValidations")

// setLinks takes out the links of an earlier run and adds those of this one.
func (p *Plan) setLinks(edits *markup.Edits) {
	root := p.layout.root
	list := root.Child("hyperlinks")
	var kept strings.Builder
	count, gone := 0, false
	for _, e := range list.All("hyperlink") {
		if a, ok := parseArea(e.Attr("ref")); ok && p.swept(a) {
			gone = true
			continue
		}
		kept.Write(e.Raw())
		count++
	}
	links := p.links(maxLinks - count)
	if len(links) == 0 && !gone {
		return
	}
	for _, l := range links {
		fmt.Fprintf(&kept, `<%shyperlink ref="%s" location="%s"/>`, root.Prefix, l.cell, markup.Escaped(l.to))
	}
	name := root.Prefix + "hyperlinks"
	text := ""
	if kept.Len() > 0 {
		text = "<" + name + ">" + kept.String() + "</" + name + ">"
	}
	if list != nil {
		edits.Replace(list, text)
		return
	}
	edits.Insert(behindLast(root, beforeLinks), text)
}

// swept reports whether a cell is one that an earlier run wrote, or that this
// one writes.
func (p *Plan) swept(a area) bool {
	o := &p.place.old
	return o.columns[a.firstCol] && o.area.contains(a) || p.place.rows.contains(a)
}

// links returns the block's links, so many at most.
func (p *Plan) links(most int) []link {
	if p.block.Links == nil {
		return nil
	}
	var out []link
	for row := p.place.heading + 1; row <= p.block.LastRow; row++ {
		for _, l := range p.block.Links(row) {
			if len(out) >= most {
				return out
			}
			out = append(out, link{cellName(p.place.rows.firstCol+l.Column, row), l.Place})
		}
	}
	return out
}

// behindLast returns where the last of the named children ends.
func behindLast(root *markup.Element, names []string) int {
	at := root.Inner
	for _, c := range root.Children {
		if slices.Contains(names, c.Name) {
			at = max(at, c.To)
		}
	}
	return at
}

// widenFilter lets the sheet's filter take in the results: sorting by it would
// part them from their rows.
func (p *Plan) widenFilter(edits *markup.Edits) {
	e := p.layout.root.Child("autoFilter")
	if a, ok := parseArea(e.Attr("ref")); ok && p.reaches(a) {
		edits.SetAttrs(e, "ref", p.widened(a).String())
	}
}

// widened returns an area with the results taken in: in the place of those of
// an earlier run where it ends with them.
func (p *Plan) widened(a area) area {
	if len(p.place.old.columns) == 0 || a.lastCol != p.place.old.area.lastCol {
		a.lastCol = max(a.lastCol, p.place.rows.lastCol)
		return a
	}
	if before, ok := p.book.oldResults(p.sheet); ok && a.lastRow == before.lastRow {
		a.lastRow = max(a.firstRow, p.block.LastRow) // the schedule has grown or shrunk
	}
	a.lastCol = p.place.rows.lastCol
	return a
}

// reaches reports whether an area takes in the schedule up to its last column,
// the results of an earlier run with it or not, and so is to take in these
// results.
func (p *Plan) reaches(a area) bool {
	h := p.block.Header
	if a.firstRow > max(h.Last, h.UnitRow) || a.lastRow <= h.Last || a.lastCol >= maxColumns-1 {
		return false
	}
	return a.firstCol < h.Width && a.lastCol >= h.Width-1
}
