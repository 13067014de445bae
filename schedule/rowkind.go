package schedule

import (
	"slices"
	"strings"
	"unicode"
)

// rowKind is what a row below the header is.
type rowKind uint8

const (
	blankRow rowKind = iota
	memberRow
	totalRow
	headerRow // a repeated header or unit row
	footnoteRow
)

// classifier tells the rows of members from the others.
type classifier struct {
	labels  []int // columns of mark, stack, levels and the like
	mark    int   // -1: none
	length  int
	numbers []int // columns that a member has numbers in
	others  []int // columns of the remaining fields
	texts   map[int][]string
	old     map[int]bool // columns of earlier results
	first   int          // first column with numbers
}

func newClassifier(l *layout) *classifier {
	c := &classifier{mark: -1, length: -1, texts: l.texts, old: map[int]bool{}, first: 1 << 30}
	for _, o := range l.old {
		c.old[o.col] = true
	}
	seen := map[int]bool{}
	for i := range l.bindings {
		b := &l.bindings[i]
		if b.key.field == markField {
			c.mark = b.Col
		}
		if b.key.field == lengthField {
			c.length = b.Col
		}
		if seen[b.Col] {
			continue
		}
		seen[b.Col] = true
		switch f := b.key.line(); {
		case f.needs&isLabel != 0:
			c.labels = append(c.labels, b.Col)
		case f.of > count && f.name != restraintsField && f.name != torsionField:
			c.numbers = append(c.numbers, b.Col)
			c.first = min(c.first, b.Col)
		default:
			c.others = append(c.others, b.Col)
		}
	}
	return c
}

// kind tells what a row is.
func (c *classifier) kind(r *Row) rowKind {
	numbers := c.filled(r, c.numbers)
	if numbers > 0 && c.mark >= 0 && c.plainMark(r) {
		return memberRow // the usual row, decided at once
	}
	labels, others := c.filled(r, c.labels), c.filled(r, c.others)
	if numbers+labels+others == 0 {
		if c.anything(r) {
			return footnoteRow
		}
		return blankRow
	}
	switch {
	case c.isTotal(r, labels):
		return totalRow
	case c.isHeader(r):
		return headerRow
	case numbers == 0 && !c.looksLikeMember(r):
		return footnoteRow
	case numbers+labels+others == 1 && c.single(r), c.signOff(r):
		return footnoteRow
	default:
		return memberRow
	}
}

// filled counts the cells of columns that hold something of their own.
func (c *classifier) filled(r *Row, cols []int) int {
	n := 0
	for _, col := range cols {
		if cell := r.at(col); !cell.Merged && !cell.empty() {
			n++
		}
	}
	return n
}

// anything reports whether any cell but those of earlier results holds
// something.
func (c *classifier) anything(r *Row) bool {
	for i := range r.Cells {
		if cell := &r.Cells[i]; !cell.Merged && !c.old[i] && !cell.empty() {
			return true
		}
	}
	return false
}

// plainMark reports whether the mark is one beyond doubt: a single word with a
// digit.
func (c *classifier) plainMark(r *Row) bool {
	cell := r.at(c.mark)
	if cell.Kind == Number {
		return false // may be the numbering under a repeated header
	}
	digit := false
	for i := range len(cell.Text) {
		switch b := cell.Text[i]; {
		case isDigit(b):
			digit = true
		case b <= ' ' || b >= 0x80:
			return false
		}
	}
	return digit
}

// totalWords open a row of totals or averages.
var totalWords = compactSet("total|totals|sub total|sub totals|subtotal|subtotals|grand total|sum|sums|average|averages|mean|avg|max|min|maximum|minimum|carried forward|brought forward|summe|gesamt|gesamtsumme|zwischensumme|mittelwert|durchschnitt|sous total|totale|subtotale|somma|media|suma|promedio|moyenne|somme|totaal|subtotaal")

// isTotal reports whether the row is one of totals or averages: a label to the
// left of its numbers says so, or it has neither mark nor length and holds sums.
func (c *classifier) isTotal(r *Row, labels int) bool {
	for i := range min(len(r.Cells), c.first) {
		if cell := r.at(i); cell.Kind == Text && opensWithTotal(cell.Text) {
			return true
		}
	}
	if c.mark >= 0 && r.at(c.mark).Kind == Text && opensWithTotal(r.at(c.mark).Text) {
		return true
	}
	return labels == 0 && r.at(c.length).empty() && c.sums(r)
}

// sums reports whether a row without mark and length is one of sums: all its
// cells are formulas, or one says so.
func (c *classifier) sums(r *Row) bool {
	formulas := true
	for i := range r.Cells {
		cell := &r.Cells[i]
		if c.old[i] || cell.Merged || cell.empty() {
			continue
		}
		if cell.Kind == Text && opensWithTotal(cell.Text) {
			return true
		}
		formulas = formulas && cell.Formula
	}
	return formulas
}

func opensWithTotal(s string) bool {
	toks := tokens(tidy(s))
	if len(toks) == 0 || toks[0].bracket || isDigit(toks[0].text[0]) {
		return false
	}
	if totalWords[toks[0].text] {
		return true
	}
	return len(toks) > 1 && totalWords[toks[0].text+toks[1].text]
}

// isHeader reports whether the row repeats the header or its units: every
// cell of its own says what the header says there.
func (c *classifier) isHeader(r *Row) bool {
	n := 0
	for _, cols := range [][]int{c.numbers, c.labels, c.others} {
		for _, col := range cols {
			cell := r.at(col)
			if cell.empty() {
				continue
			}
			if cell.Kind != Text || !oneOf(strings.ToLower(tidy(cell.Text)), c.texts[col]...) {
				return false
			}
			n++
		}
	}
	return n > 0
}

// looksLikeMember reports whether a row without numbers is still meant as a
// member: it has a mark, and no sentence in its place.
func (c *classifier) looksLikeMember(r *Row) bool {
	if c.mark < 0 {
		return c.filled(r, c.labels) > 1
	}
	mark := r.at(c.mark)
	return !mark.Merged && !mark.empty() && looksLikeMark(mark.text())
}

// headingWords open a heading between rows, or a note below them.
var headingWords = compactSet("level|levels|floor|storey|story|block|zone|grid|phase|sheet|page|rev|revision|note|notes|table|roof|ground|basement|building|core|area|stage|part|columns|see|drawing|date|issue|key|legend|status|by|checked|prepared|approved")

func looksLikeMark(s string) bool {
	words := strings.Fields(s)
	if len(words) == 0 || len(words) > 3 || len(s) > 24 || strings.ContainsAny(s[:1], "*(#†‡") || strings.HasSuffix(s, ":") || strings.HasSuffix(s, ".") {
		return false
	}
	if toks := tokens(tidy(s)); len(toks) == 0 || len(toks) > 1 && headingWords[toks[0].text] || len(toks) == 1 && headingWords[toks[0].text] {
		return false
	}
	return len([]rune(s)) <= 3 || strings.ContainsFunc(s, unicode.IsDigit)
}

// signOff reports whether a row is to be signed rather than designed: "Made by:
// AB", "Checked:" over the columns of numbers, which hold none.
func (c *classifier) signOff(r *Row) bool {
	colon := false
	for i := range r.Cells {
		cell := &r.Cells[i]
		if cell.empty() || cell.Merged || c.old[i] {
			continue
		}
		if cell.Kind != Text {
			return false
		}
		colon = colon || strings.HasSuffix(trim(cell.Text), ":")
	}
	if !colon {
		return false
	}
	return !slices.ContainsFunc(c.numbers, func(col int) bool { return strings.ContainsFunc(r.at(col).text(), unicode.IsDigit) })
}

// single reports whether the only cell of a row is a note rather than what is
// left of a member.
func (c *classifier) single(r *Row) bool {
	for i := range r.Cells {
		cell := &r.Cells[i]
		if cell.empty() || cell.Merged || c.old[i] {
			continue
		}
		if cell.Kind != Text {
			return false
		}
		return i != c.mark || !looksLikeMark(cell.text())
	}
	return false
}
