package workbook

import (
	"fmt"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// table is a table (list object) of a sheet.
type table struct {
	area
	part string
	root *markup.Element
	doc  []byte
}

// tables returns the tables of a sheet.
func (b *Book) tables(s *sheet) ([]table, error) {
	rels, err := b.pkg.Rels(s.part)
	if err != nil {
		return nil, err
	}
	var out []table
	for _, r := range rels {
		if !r.Is("table") || r.Outside || !b.pkg.Has(r.Target) {
			continue
		}
		root, doc, err := b.pkg.Tree(r.Target)
		if err != nil {
			return nil, err
		}
		if a, ok := parseArea(root.Attr("ref")); ok {
			out = append(out, table{a, r.Target, root, doc})
		}
	}
	return out, nil
}

// widenTables lets the table in which the schedule stands take in the results,
// so that sorting it keeps them with their rows.
func (p *Plan) widenTables(d *draft) error {
	tables, err := p.book.tables(p.sheet)
	if err != nil {
		return err
	}
	for i := range tables {
		t := &tables[i]
		if !p.widens(t) {
			continue
		}
		content, err := p.widenTable(t)
		if err != nil {
			return err
		}
		d.out.Set(t.part, content)
	}
	return nil
}

// widens reports whether a table is to take in the results: they stand at its
// right edge or in it, under its header row, and it draws on nothing outside
// the sheet.
func (p *Plan) widens(t *table) bool {
	pl := &p.place
	if t.firstRow != pl.heading || t.lastRow < p.block.LastRow || t.root.Attr("headerRowCount") == "0" {
		return false
	}
	kind := t.root.Attr("tableType")
	if kind != "" && kind != "worksheet" {
		return false
	}
	return t.firstCol < pl.rows.firstCol && t.lastCol >= pl.rows.firstCol-1
}

func (p *Plan) widenTable(t *table) ([]byte, error) {
	list := t.root.Child("tableColumns")
	columns := list.All("tableColumn")
	if len(columns) != t.lastCol-t.firstCol+1 {
		return t.doc, nil // it does not fit its own range: better left alone
	}
	kept, gone := p.sortOut(t, columns)
	if p.sameColumns(gone) {
		return t.doc, nil
	}
	added, ok := p.tableColumns(t, columns, kept)
	if !ok {
		return t.doc, nil // two columns of one name: better left alone
	}
	wider := area{t.firstRow, t.lastRow, t.firstCol, p.place.rows.lastCol}
	var edits markup.Edits
	for _, c := range gone {
		edits.Remove(c)
	}
	count := strconv.Itoa(len(kept) + len(p.block.Columns))
	if beyond := p.beyond(t, columns); beyond != nil {
		if len(gone) != len(p.block.Columns) {
			return nil, refuse(p.book.name, fmt.Sprintf("the results of an earlier run stand in the middle of the table %q", t.root.Attr("name")),
				"delete those columns, then run this again")
		}
		wider.lastCol = t.lastCol
		edits.Insert(beyond.From, added)
		edits.SetAttrs(list, "count", count)
	} else {
		edits.AppendWith(list, added, "count", count)
	}
	edits.SetAttrs(t.root, "ref", wider.String())
	if f := t.root.Child("autoFilter"); f != nil {
		if a, ok := parseArea(f.Attr("ref")); ok {
			a.lastCol = wider.lastCol
			edits.SetAttrs(f, "ref", a.String())
		}
	}
	return edits.Apply(t.doc), nil
}

// sortOut tells the user's columns of a table from those of an earlier run and
// those in whose place the results come.
func (p *Plan) sortOut(t *table, columns []*markup.Element) (kept, gone []*markup.Element) {
	for i, c := range columns {
		col := t.firstCol + i
		if p.place.old.columns[col] || p.place.rows.firstCol <= col && col <= p.place.rows.lastCol {
			gone = append(gone, c)
			continue
		}
		kept = append(kept, c)
	}
	return kept, gone
}

// sameColumns reports whether the columns of an earlier run are those of this
// one.
func (p *Plan) sameColumns(gone []*markup.Element) bool {
	if len(gone) != len(p.block.Columns) {
		return false
	}
	for i, c := range gone {
		if c.Attr("name") != p.headingText(i) {
			return false
		}
	}
	return true
}

// beyond returns the user's first table column behind the block.
func (p *Plan) beyond(t *table, columns []*markup.Element) *markup.Element {
	for i, c := range columns {
		if col := t.firstCol + i; col > p.place.rows.lastCol && !p.place.old.columns[col] {
			return c
		}
	}
	return nil
}

// tableColumns returns the table columns of the block. A table has no two
// columns of one name.
func (p *Plan) tableColumns(t *table, columns, kept []*markup.Element) (string, bool) {
	next, names := 1, map[string]bool{}
	for _, c := range columns {
		next = max(next, number(c, "id")+1)
	}
	for _, c := range kept {
		names[strings.ToLower(c.Attr("name"))] = true
	}
	var out strings.Builder
	for i := range p.block.Columns {
		name := p.headingText(i)
		if names[strings.ToLower(name)] {
			return "", false
		}
		names[strings.ToLower(name)] = true
		fmt.Fprintf(&out, `<%stableColumn id="%d" name="%s"/>`, t.root.Prefix, next+i, markup.Escaped(name))
	}
	return out.String(), true
}
