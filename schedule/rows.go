package schedule

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// rows knows which rows are members, and reads them again.
type rows struct {
	src    Source
	plan   *Plan
	names  *names
	links  *rowLinks
	keep   *rowStore // nil: src can seek
	old    []oldColumn
	groups groupClashes
}

// members yields the members in the order of their first rows.
func (r *rows) members(yield func(*Member, error) bool) {
	rd := newReader(r)
	combos := newCombinationPlan(rd.bindings)
	first := &rowData{}
	for row, err := range r.each {
		if err != nil {
			yield(nil, err)
			return
		}
		if r.links.later[row.index] {
			continue
		}
		rd.read(row.Row, first)
		data := []*rowData{first}
		for next := r.links.next[row.index]; next >= 0; next = r.links.next[next] {
			again, err := r.again(int(next))
			if err != nil {
				yield(nil, err)
				return
			}
			d := &rowData{}
			rd.read(again, d)
			data = append(data, d)
		}
		m := rd.build(combos, data)
		r.remark(m, row.index)
		if !yield(m, nil) {
			return
		}
	}
}

// indexedRow is a row of a member and its place among them.
type indexedRow struct {
	*Row
	index int
}

// each yields the rows of members in order.
func (r *rows) each(yield func(indexedRow, error) bool) {
	if r.keep != nil {
		var row Row
		for i := range r.keep.rows {
			if !yield(indexedRow{r.keep.row(i, &row), i}, nil) {
				return
			}
		}
		return
	}
	i := 0
	for row, err := range r.src.Rows(r.plan.Sheet) {
		if err != nil {
			yield(indexedRow{}, err)
			return
		}
		if i == len(r.links.refs) {
			return
		}
		if row.Number != int(r.links.refs[i].number) {
			continue
		}
		if !yield(indexedRow{row, i}, nil) {
			return
		}
		i++
	}
	if i < len(r.links.refs) {
		yield(indexedRow{}, &Problem{File: r.plan.File, What: "the file has changed while it was read", Do: "run again"})
	}
}

// again reads one row once more.
func (r *rows) again(i int) (*Row, error) {
	if r.keep != nil {
		return r.keep.row(i, &Row{}), nil
	}
	row, err := r.src.(Seeker).RowAt(r.plan.Sheet, r.links.refs[i].pos)
	if err == nil {
		row.Number = int(r.links.refs[i].number)
	}
	return row, err
}

// remark adds what only the schedule as a whole tells of a member.
func (r *rows) remark(m *Member, index int) {
	col := &m.Column
	col.SpliceSaid = r.plan.has(spliceField)
	if twin := r.links.twin[index]; twin >= 0 {
		col.Notes = append(col.Notes, fmt.Sprintf("%s stands in %s too, with nothing to tell them apart: two members", named(col), rowName(r.src, r.plan.Sheet, int(r.links.refs[twin].number))))
	}
	if text := r.groups[int32(index)]; text != "" {
		p := &Problem{File: r.plan.File, Cell: col.Cell, Row: m.Rows[0], Col: -1, What: text, Do: "give a group one family and one grade"}
		for i := range r.plan.Header.Columns {
			if b := &r.plan.Header.Columns[i]; b.key.field == groupField {
				p.Cell, p.Col, p.Heading = r.src.Where(r.plan.Sheet, m.Rows[0], b.Col), b.Col, b.Heading
			}
		}
		m.Problems = append(m.Problems, p)
	}
}

// rowName names a row within its sheet: "row 5", "line 5" of a text.
func rowName(src Source, sheet string, row int) string {
	if rn, ok := src.(RowNamer); ok {
		return rn.WhereRow(sheet, row)
	}
	return rowList("row", []int{row})
}

// rowWord is what a source calls its rows: "row", or "line" of a text.
func rowWord(src Source, sheet string) string {
	word, _, _ := strings.Cut(rowName(src, sheet, 1), " ")
	return word
}

// named returns the member's mark and levels, for people.
func named(col *design.Column) string {
	return join(" ", col.Mark, col.Stack, join(" to ", col.From, col.To))
}

// has reports whether the header supplies a field.
func (p *Plan) has(f fieldName) bool {
	for i := range p.Header.Columns {
		if p.Header.Columns[i].key.field == f {
			return true
		}
	}
	return false
}
