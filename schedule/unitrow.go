package schedule

import (
	"fmt"
	"strconv"
	"strings"
)

// takeUnitRow takes the row below the header where it is one of units, or of
// column numbers, and reports whether it is.
func (l *layout) takeUnitRow(src Source, r *Row) bool {
	if r.Number != l.skipTo+1 {
		return false
	}
	switch {
	case l.unitRow == 0 && l.isUnitRow(r):
		l.unitRow = r.Number
		l.applyUnits(src, r)
	case isNumbering(r):
	default:
		return false
	}
	l.skipTo = r.Number
	for col := range l.texts {
		if cell := r.at(col); !cell.empty() {
			l.texts[col] = append(l.texts[col], strings.ToLower(tidy(cell.text())))
		}
	}
	return true
}

// isUnitRow reports whether the row gives units: one at least, and nothing
// else, over the columns that are read.
func (l *layout) isUnitRow(r *Row) bool {
	found := 0
	for i := range l.bindings {
		cell := r.at(l.bindings[i].Col)
		if cell.empty() {
			continue
		}
		if cell.Kind != Text {
			return false
		}
		_, known, strange := findUnit(cell.Text)
		if !known && !strange {
			return false
		}
		found++
	}
	return found > 0
}

func (l *layout) applyUnits(src Source, r *Row) {
	for i := range l.bindings {
		b := &l.bindings[i]
		cell := r.at(b.Col)
		q := b.key.line().of
		if cell.empty() || q == noQuantity {
			continue
		}
		u, known, _ := findUnit(cell.Text)
		text := trim(cell.Text)
		p := Problem{File: src.Name(), Cell: src.Where(l.sheet, r.Number, b.Col), Row: r.Number, Col: b.Col, Heading: b.Heading, Value: text}
		switch {
		case u.of == noQuantity && known || q == count:
			continue
		case !known || !u.measures(q):
			p.What, p.Do = fmt.Sprintf("the unit %s is not read for %s", text, b.Field), "give it in "+q.unitNames()
			l.troubles = append(l.troubles, p)
		case b.named && b.unit.factor != u.factor:
			p.What, p.Do = fmt.Sprintf("the heading gives %s in %s, the unit row in %s", b.Field, b.unit.name, u.name), "make them agree"
			l.troubles = append(l.troubles, p)
		default:
			b.unit, b.named, b.Unit = u, true, u.name
		}
	}
}

// isNumbering reports whether the row numbers the columns: 1 2 3 ..., (1) (2).
func isNumbering(r *Row) bool {
	last, n := 0, 0
	for i := range r.Cells {
		cell := &r.Cells[i]
		if cell.empty() || cell.Merged {
			continue
		}
		x, err := strconv.Atoi(strings.Trim(cell.text(), "()[]."))
		if err != nil || n > 0 && x != last+1 || n == 0 && x > i+1 {
			return false
		}
		last, n = x, n+1
	}
	return n >= 3
}
