package calcsheet

import (
	"fmt"
	"strings"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/design/working/formula"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// line adds a row with a line in every column, and these cells in it.
func (w *Workings) line(cells map[int]workbook.Cell) {
	row := make([]workbook.Cell, workingColumns)
	for i := range row {
		c, ok := cells[i]
		if !ok {
			c = workbook.TextCell("")
		}
		row[i] = c
	}
	w.row(row...)
}

// values adds given values.
func (w *Workings) values(list working.Values) {
	for i := range list {
		v := &list[i]
		cells := map[int]workbook.Cell{
			valueColumn: numberCell(v.Number), unitColumn: workbook.TextCell(v.Unit.Name), remarkColumn: wordsCell(v.Note),
		}
		cells[w.leftOf(v.Left)] = w.formulaCell(v.Left)
		w.line(cells)
	}
}

// leftOf returns the column of what is found: of a symbol the first, of a ratio
// that of the formulas.
func (w *Workings) leftOf(e formula.Expr) int {
	if _, symbol := e.(formula.Symbol); symbol {
		return symbolColumn
	}
	return formulaColumn
}

// step adds a step of the working.
func (w *Workings) step(s *working.Step) {
	cells := map[int]workbook.Cell{
		formulaColumn: w.formulaCell(s.Formula), numbersColumn: numbersCell(s.Numbers),
		valueColumn: numberCell(s.Result), unitColumn: workbook.TextCell(s.Unit.Name),
		clauseColumn: workbook.WordsCell(s.Clause), remarkColumn: remarkCell(s),
	}
	left := w.leftOf(s.Left)
	if s.Formula != nil {
		left = symbolColumn
	}
	cells[left] = w.formulaCell(s.Left)
	w.line(cells)
}

// table adds a table.
func (w *Workings) table(t *working.Table) {
	places := tablePlaces(t)
	head := map[int]workbook.Cell{}
	for i := range workingColumns {
		head[i] = workbook.Cell{Look: workbook.Look{Role: workbook.Unit, Align: workbook.Left, Wrap: true}}
	}
	for i, text := range t.Head {
		c := head[places[i]]
		c.Value, c.Look.Align = richText(text), alignIn(places[i])
		head[places[i]] = c
	}
	w.line(head)
	for _, texts := range t.Rows {
		cells := map[int]workbook.Cell{}
		for i, text := range texts {
			cells[places[i]] = tableCell(text, places[i])
		}
		w.line(cells)
	}
}

// alignIn returns where what is in a column of a table stands.
func alignIn(column int) workbook.Align {
	if column == valueColumn || column == unitColumn {
		return workbook.Right
	}
	return workbook.Left
}

// tableCell is a cell of a table: a number where it holds one.
func tableCell(text string, column int) workbook.Cell {
	c := numberCell(formula.Number{Figures: strings.Replace(text, "−", "-", 1)})
	if _, number := c.Value.(float64); !number {
		c = wordsCell(text)
	}
	c.Look.Align = alignIn(column)
	return c
}

// tablePlaces gives the columns of a table columns of the sheet.
func tablePlaces(t *working.Table) []int {
	switch {
	case len(t.Head) == 2: // combinations and their forces
		return []int{formulaColumn, numbersColumn}
	case len(t.Head) == 5 && !t.Right[3]: // axis, segment, length, how found, buckling length
		return []int{symbolColumn, formulaColumn, unitColumn, numbersColumn, valueColumn}
	}
	places := make([]int, len(t.Head))
	for i := range places {
		places[i] = min(symbolColumn+i, remarkColumn)
	}
	return places
}

// checks adds the list of all checks.
func (w *Workings) checks(s *working.Sheet) {
	w.page.Begin()
	w.title("All checks")
	for i := range s.Checks {
		w.check(s, i)
	}
}

// utilisation is that of a check as it is printed.
func utilisation(c *design.Check) formula.Number {
	return formula.Number{Figures: working.Utilisation(c.Utilisation)}
}

func (w *Workings) check(s *working.Sheet, i int) {
	c := &s.Checks[i]
	remark := segment(c.From, c.To) + " m"
	if name := combination(s.Column, c.Combination); name != "" {
		remark += ", " + name
	}
	if i == s.Governing {
		remark += "; governs"
	}
	numbers := ""
	if ed, rd, unit := amounts(c); unit != "" {
		numbers = fmt.Sprintf("%s / %s %s", ed, rd, unit)
	}
	cells := map[int]workbook.Cell{
		formulaColumn: workbook.WordsCell(schedule.CheckName(c.Kind)), numbersColumn: workbook.WordsCell(numbers),
		valueColumn:  numberCell(utilisation(c)),
		clauseColumn: workbook.TextCell(c.Clause), remarkColumn: workbook.WordsCell(remark),
	}
	if i == s.Governing {
		for k, cell := range cells {
			cell.Look.Bold = true
			cells[k] = cell
		}
	}
	w.line(cells)
}
