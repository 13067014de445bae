package schedule

import (
	"fmt"
	"slices"

	"stanchion/design"
)

// value is what a cell says, in the units of design.
type value struct {
	set     bool
	num     float64
	text    string
	heights []height
	ends    [2]design.Condition // bottom, top
	row     int
}

// rowData is what one row says, by binding.
type rowData struct {
	number   int
	hidden   bool
	values   []value
	problems []*Problem
	notes    []string
	old      Earlier
}

// reader reads cells by the bindings of a plan.
type reader struct {
	plan     *Plan
	src      Source
	bindings []Binding
	names    *names
	old      []oldColumn
	heights  map[string][]height
	ends     map[string][2]design.Condition
	resolved map[nameCell]string
	sections map[nameCell]string // by name and families
}

// nameCell is the text of a name in a column of one kind.
type nameCell struct {
	field fieldName
	text  string
}

// remembered bounds how many texts a reader remembers the meaning of: those of
// a schedule repeat, those of a hostile one need not.
const remembered = 1 << 14

func newReader(r *rows) *reader {
	return &reader{plan: r.plan, src: r.src, bindings: r.plan.Header.Columns, names: r.names, old: r.old,
		heights: map[string][]height{}, ends: map[string][2]design.Condition{}, resolved: map[nameCell]string{}, sections: map[nameCell]string{}}
}

// read fills d with what a row says.
func (r *reader) read(row *Row, d *rowData) {
	d.number, d.hidden = row.Number, row.Hidden
	d.problems, d.notes, d.old = nil, nil, Earlier{}
	d.values = slices.Grow(d.values[:0], len(r.bindings))[:len(r.bindings)]
	for i := range r.bindings {
		b := &r.bindings[i]
		v := &d.values[i]
		*v = value{row: row.Number}
		cell := row.at(b.Col)
		if cell.empty() {
			continue
		}
		if p := r.cell(b, cell, v, d); p != nil {
			v.set = false
			r.place(p, b, row.Number, cell)
			d.problems = append(d.problems, p)
		}
	}
	for _, o := range r.old {
		d.old.take(o.name, row.at(o.col), r.plan.Decimal)
	}
}

func (r *reader) place(p *Problem, b *Binding, row int, cell *Cell) {
	p.File, p.Cell, p.Row, p.Col = r.src.Name(), r.src.Where(r.plan.Sheet, row, b.Col), row, b.Col
	p.Heading, p.Value = b.Heading, cell.text()
}

// cell reads one cell. The value counts where no problem is returned.
func (r *reader) cell(b *Binding, cell *Cell, v *value, d *rowData) *Problem {
	v.set = true
	switch cell.Kind {
	case Date:
		return &Problem{What: fmt.Sprintf("%s is a date, %s: the spreadsheet has turned what was typed into one", b.title(), trim(cell.Text)), Do: "format the cell as text and type it again"}
	case Fault:
		return &Problem{What: fmt.Sprintf("%s is the error %s", b.title(), trim(cell.Text)), Do: "mend the formula, or clear the row"}
	case Uncalculated:
		return &Problem{What: fmt.Sprintf("%s is a formula without a value, %s", b.title(), trim(cell.Text)), Do: "have the spreadsheet calculate it and save again"}
	}
	f := b.key.line()
	switch {
	case f.needs&isLabel != 0:
		v.text = cell.text()
		return nil
	case f.name == endsField:
		return r.endsCell(b, cell, v)
	case f.name == restraintsField || f.name == torsionField:
		return r.restraintsCell(b, cell, v, d)
	case f.name == heldAtField:
		return r.heldAtCell(b, cell, v)
	case f.name == spliceField || f.name == fireBoxField:
		return yesCell(b, cell, v)
	case f.of == noQuantity:
		return r.nameCell(b, cell, v)
	default:
		return r.numberCell(b, cell, v)
	}
}
