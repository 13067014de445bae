package calcsheet

import (
	"bufio"
	"io"
	"strings"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/design/working/formula"
)

// TextWidth is the number of characters that a line of text takes at most,
// unless a single word is longer.
const TextWidth = 100

// Text prints a working as plain text.
func Text(w io.Writer, s *working.Sheet) error {
	b := bufio.NewWriter(w)
	p := &textPrinter{w: b}
	p.head(s)
	for i := range s.Blocks {
		p.block(&s.Blocks[i])
	}
	p.checks(s)
	p.end(s)
	return b.Flush()
}

type textPrinter struct{ w *bufio.Writer }

func (p *textPrinter) line(s string) {
	p.w.WriteString(strings.TrimRight(s, " "))
	p.w.WriteByte('\n')
}

// words prints a sentence in lines, the further ones indented as the first.
func (p *textPrinter) words(indent, s string) {
	for _, l := range wrap(s, TextWidth-columns(indent)) {
		p.line(indent + l)
	}
}

// head prints what is designed and how it came out.
func (p *textPrinter) head(s *working.Sheet) {
	p.line(rule('='))
	p.line(ends(place(s.Column), s.Section.Name()+"  "+s.Grade))
	p.words("", verdict(s))
	p.line(rule('='))
	for _, n := range s.Notes {
		p.words("", "Note: "+n)
	}
}

func (p *textPrinter) block(b *working.Block) {
	p.line("")
	p.line(b.Title)
	p.line(strings.Repeat("-", columns(b.Title)))
	left := leftWidth(b)
	for _, item := range b.Items {
		switch item := item.(type) {
		case working.Values:
			p.values(item, left)
		case *working.Step:
			p.step(item, left)
		case working.Table:
			p.table(&item)
		case working.Words:
			p.words("  ", string(item))
		}
	}
}

// leftWidth is the width of the left sides of a block.
func leftWidth(b *working.Block) int {
	width := 0
	for _, item := range b.Items {
		switch item := item.(type) {
		case working.Values:
			width = max(width, columns(formula.Text(item[0].Left)))
		case *working.Step:
			width = max(width, columns(formula.Text(item.Left)))
		}
	}
	return width
}

// values prints given values, as many on a line as find room.
func (p *textPrinter) values(list working.Values, left int) {
	indent := "  "
	at := indent
	for i, v := range list {
		symbol := formula.Text(v.Left)
		if i == 0 {
			symbol = pad(symbol, left)
		}
		text := symbol + " = " + unitText(v.Number, v.Unit)
		if v.Note != "" {
			text += " (" + v.Note + ")"
		}
		if i > 0 && columns(at)+3+columns(text) > TextWidth {
			p.line(at)
			at = indent + pad(formula.Text(v.Left), left) + text[len(symbol):]
			continue
		}
		if i > 0 {
			at += "   "
		}
		at += text
	}
	p.line(at)
}

// step prints a formula, the line with numbers and the result.
func (p *textPrinter) step(s *working.Step, left int) {
	lead := "  " + pad(formula.Text(s.Left), left) + " = "
	follow := strings.Repeat(" ", columns(lead)-2) + "= "
	clause := s.Clause
	if s.Formula != nil {
		p.parts(lead, formula.Text(s.Formula), "", clause)
		lead, clause = follow, ""
	}
	result := unitText(s.Result, s.Unit)
	if s.Limit != "" {
		result += " " + s.Limit + " " + passes(s.Within)
	}
	if s.Note != "" {
		result += "  " + note(s.Note)
	}
	if s.Numbers == nil {
		p.parts(lead, result, "", clause)
		return
	}
	p.parts(lead, formula.Text(s.Numbers), result, clause)
}

// note sets off a remark behind a result; one that goes on from it ("≤ 33 ε")
// stands as it is.
func note(s string) string {
	if strings.HasPrefix(s, "≤") || strings.HasPrefix(s, ">") {
		return s
	}
	return "(" + s + ")"
}

// parts prints "lead body = result" with the clause at the right edge, over
// several lines where one is too short.
func (p *textPrinter) parts(lead, body, result, clause string) {
	const gap = 2
	whole := lead + body
	if result != "" {
		whole += " = " + result
	}
	room := TextWidth
	if clause != "" {
		room -= columns(clause) + gap
	}
	if columns(whole) <= room {
		p.line(ends(whole, clause))
		return
	}
	blank := strings.Repeat(" ", columns(lead))
	for i, l := range wrapFirst(body, room-columns(lead), TextWidth-columns(lead)-2) {
		if i == 0 {
			p.line(ends(lead+l, clause))
		} else {
			p.line(blank + "  " + l)
		}
	}
	if result != "" {
		p.line(blank[:len(blank)-2] + "= " + result)
	}
}

func (p *textPrinter) table(t *working.Table) {
	for _, l := range tableLines(t.Head, t.Right, t.Rows, TextWidth-2) {
		p.line("  " + l)
	}
}

// checks prints the list of all checks.
func (p *textPrinter) checks(s *working.Sheet) {
	p.line("")
	p.line("All checks")
	p.line("----------")
	t := checkTable(s, s.Checks, s.Governing)
	p.table(&t)
}

// end prints what is known beyond the checks, and the caution.
func (p *textPrinter) end(s *working.Sheet) {
	p.line("")
	for _, l := range closing(s) {
		p.words("", l)
	}
}

// unitText writes a number with its unit.
func unitText(n formula.Number, u working.Unit) string {
	n.Exponent = 0
	switch {
	case u.Name == "":
		return n.String()
	case strings.HasPrefix(u.Name, "×"):
		return n.String() + u.Name
	}
	return n.String() + " " + u.Name
}

func passes(within bool) string {
	if within {
		return "passes"
	}
	return "FAILS"
}

func rule(r rune) string { return strings.Repeat(string(r), TextWidth) }

// place says which column it is, in at most some 70 characters.
func place(c *design.Column) string {
	short := *c
	for _, name := range []*string{&short.Mark, &short.Stack, &short.From, &short.To} {
		*name = strings.Join(strings.Fields(working.Short(*name)), " ")
	}
	c = &short
	s := c.Mark
	if c.Stack != "" && c.Stack != c.Mark {
		s += ", " + c.Stack
	}
	switch {
	case c.From != "" && c.To != "":
		s += ", " + c.From + " to " + c.To
	case c.From+c.To != "":
		s += ", " + c.From + c.To
	}
	return s
}
