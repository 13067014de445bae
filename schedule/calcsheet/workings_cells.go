package calcsheet

import (
	"strconv"
	"strings"

	"stanchion/design/working"
	"stanchion/design/working/formula"
	"stanchion/schedule/workbook"
)

// formulaCell sets a formula; nil is an empty cell. Members have most of them
// in common, so that each is held once.
func (w *Workings) formulaCell(e formula.Expr) workbook.Cell {
	c := workbook.WordsCell("")
	if e == nil {
		return c
	}
	text := formula.Text(e)
	if w.formulas[text] == nil {
		w.formulas[text] = formulaRich(e)
	}
	c.Value = w.formulas[text]
	return c
}

func formulaRich(e formula.Expr) (rich workbook.Rich) {
	for _, s := range formula.Spans(e) {
		letter := s.Kind == formula.Letter && isLetter(s.Text)
		rich = append(rich, workbook.Run{Text: s.Text, Letter: letter, Subscript: s.Kind == formula.Subscript})
	}
	return rich
}

// numbersCell writes a formula with numbers.
func numbersCell(e formula.Expr) workbook.Cell {
	if e == nil {
		return workbook.WordsCell("")
	}
	return workbook.WordsCell(formula.Text(e))
}

// wordsCell sets a text; what is spelt as a symbol is set as one.
func wordsCell(text string) workbook.Cell {
	c := workbook.WordsCell("")
	c.Value = richText(text)
	return c
}

// richText returns a text with its symbols set, or the text itself where it
// spells none.
func richText(text string) any {
	var rich workbook.Rich
	plain := ""
	for i, word := range strings.Split(text, " ") {
		if i > 0 {
			plain += " "
		}
		for start, end := symbolIn(word); start < end; start, end = symbolIn(word) {
			symbol := formula.Sym(word[start:end])
			rich = append(rich, workbook.Run{Text: plain + word[:start]}, workbook.Run{Text: symbol.Base, Letter: isLetter(symbol.Base)},
				workbook.Run{Text: symbol.Sub, Subscript: true})
			plain, word = "", word[end:]
		}
		plain += word
	}
	if rich == nil {
		return text
	}
	return filled(append(rich, workbook.Run{Text: plain}))
}

// filled leaves out what is empty.
func filled(r workbook.Rich) workbook.Rich {
	var out workbook.Rich
	for _, run := range r {
		if run.Text != "" {
			out = append(out, run)
		}
	}
	return out
}

// numberCell is a number as it is printed, with its figures.
func numberCell(n formula.Number) workbook.Cell {
	x, err := strconv.ParseFloat(n.Figures, 64)
	if err != nil || n.Figures == "" {
		c := workbook.TextCell(n.Figures)
		c.Look.Align = workbook.Right
		return c
	}
	return workbook.NumberCell(x, workbook.Decimals(decimals(n.Figures)))
}

func decimals(figures string) int {
	if i := strings.IndexByte(figures, '.'); i >= 0 {
		return len(figures) - i - 1
	}
	return 0
}

// remarkCell says what is to be known of a step: whether a result is within
// what it is held against, and its note.
func remarkCell(s *working.Step) workbook.Cell {
	if s.Limit == "" {
		return wordsCell(s.Note)
	}
	text := s.Limit + " " + passes(s.Within)
	if s.Note != "" {
		text += "; " + s.Note
	}
	c := workbook.WordsCell(text)
	if !s.Within {
		c.Look.Role = workbook.Fails
	}
	return c
}
