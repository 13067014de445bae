package workbook

import (
	"fmt"

	"stanchion/schedule"
)

// Block is what is written beside the schedule: one column for each kind of
// result, and one row for each row that has results.
type Block struct {
	Sheet   string
	Header  schedule.Header
	LastRow int    // of the rows that have results
	Title   string // over the whole block, where there is room for it
	Columns []schedule.ResultColumn
	Words   map[string]Role // texts whose cells are drawn in a role; nil: the outcomes of a member
	// Printed is how many of the columns, from the first, are printed on pages
	// behind the schedule's own; 0: none, they have a sheet of their own for that.
	Printed int
	// Cells returns the results of a row, one a column; none where the row has
	// no results. Rows are asked for in rising order, each once, and again for
	// each time that the workbook is written.
	Cells func(row int) []schedule.Value
	// Links returns the cells of a row that lead to places in the workbook; nil:
	// no cell does.
	Links func(row int) []BlockLink
}

// BlockLink leads from a cell of the block to a place in the workbook.
type BlockLink struct {
	Column int    // of the block, counted from 0
	Place  string // 'Sheet'!A1
}

// Plan says where results go in a workbook, before anything is written.
type Plan struct {
	book    *Book
	sheet   *sheet
	layout  *layout
	block   Block
	place   place
	letters lettering
}

// Plan finds the place for a block of results.
func (b *Book) Plan(block Block) (p *Plan, err error) {
	defer func() {
		if r := recover(); r != nil {
			p, err = nil, damaged(b.name, fmt.Errorf("%v", r))
		}
	}()
	s := b.find(block.Sheet)
	if s == nil {
		return nil, refuse(b.name, fmt.Sprintf("has no sheet %q that holds cells", block.Sheet), "name one that it has")
	}
	if s.own != "" {
		return nil, refuse(b.name, fmt.Sprintf("sheet %q was written by an earlier run", s.name), "name the sheet that holds the schedule")
	}
	p = &Plan{book: b, sheet: s, block: block}
	if p.layout, err = b.layoutOf(s); err != nil {
		return nil, explain(b.name, err)
	}
	if p.layout.data == nil {
		return nil, refuse(b.name, fmt.Sprintf("sheet %q has no cells", s.name), "name another")
	}
	if err := p.find(); err != nil {
		return nil, explain(b.name, err)
	}
	if p.letters, err = b.lettering(); err != nil {
		return nil, explain(b.name, err)
	}
	return p, nil
}

// Column returns the letters of a column of the block.
func (p *Plan) Column(i int) string { return columnName(p.place.rows.firstCol + i) }

// Range returns the results of a column of the block, from the first row that
// can hold results to the last, for a formula or a chart:
// 'Columns'!$AC$7:$AC$66.
func (p *Plan) Range(i int) string {
	col := p.place.rows.firstCol + i
	first := max(p.place.heading, p.place.unit) + 1
	return quoted(p.sheet.name) + "!" + area{first, max(first, p.block.LastRow), col, col}.absolute()
}

// Warnings says what a person should know before the workbook is written.
func (p *Plan) Warnings() []string {
	var out []string
	for _, name := range p.book.pkg.Names() {
		if hasPrefixFold(name, "_xmlsignatures/") {
			out = append(out, p.book.name+" is digitally signed: the signature does not hold for the annotated copy")
			break
		}
	}
	return out
}

func hasPrefixFold(s, prefix string) bool {
	return len(s) >= len(prefix) && partKey(s[:len(prefix)]) == prefix
}
