package calcsheet

import (
	"fmt"

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
		cells[w.leftOf(v.Left)] = formulaCell(v.Left)
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
		formulaColumn: formulaCell(s.Formula), numbersColumn: numbersCell(s.Numbers),
		valueColumn: numberCell(s.Result), unitColumn: workbook.TextCell(s.Unit.Name),
		clauseColumn: workbook.WordsCell(s.Clause), remarkColumn: remarkCell(s),
	}
	left := w.leftOf(s.Left)
	if s.Formula != nil {
		left = symbolColumn
	}
	cells[left] = formulaCell(s.Left)
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
		c.Value = richText(text)
		head[places[i]] = c
	}
	w.line(head)
	for _, texts := range t.Rows {
		cells := map[int]workbook.Cell{}
		for i, text := range texts {
			cells[places[i]] = wordsCell(text)
		}
		w.line(cells)
	}
}

// tablePlaces gives the columns of a table columns of the sheet: a name the
// first, how something was found that of the remarks, the others the next.
func tablePlaces(t *working.Table) []int {
	free := []int{symbolColumn, formulaColumn, numbersColumn, valueColumn, unitColumn, clauseColumn, remarkColumn}
	if len(t.Head) == 2 {
		return free[1:3]
	}
	places := make([]int, len(t.Head))
	next := 0
	for i := range t.Head {
		if !t.Right[i] && i > 1 {
			places[i] = remarkColumn
			continue
		}
		places[i] = free[next]
		next++
	}
	return places
}

// checks adds the list of all checks.
func (w *Workings) checks(s *working.Sheet) {
	w.title("All checks", false)
	for i := range s.Checks {
		w.check(s, i)
	}
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
		numbers = fmt.Sprintf("= %s / %s %s", ed, rd, unit)
	}
	cells := map[int]workbook.Cell{
		formulaColumn: workbook.WordsCell(schedule.CheckName(c.Kind)), numbersColumn: workbook.WordsCell(numbers),
		valueColumn:  numberCell(formula.Number{Figures: working.Utilisation(c.Utilisation)}),
		clauseColumn: workbook.WordsCell(c.Clause), remarkColumn: workbook.WordsCell(remark),
	}
	if i == s.Governing {
		for k, cell := range cells {
			cell.Look.Bold = true
			cells[k] = cell
		}
	}
	w.line(cells)
}
