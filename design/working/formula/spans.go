package formula

import "strings"

// Kind says how a stretch of a printed formula stands.
type Kind uint8

// The kinds of stretches.
const (
	Upright   Kind = iota // figures, signs and words
	Letter                // a symbol
	Subscript             // of the letter before it
)

// Span is a stretch of a formula printed on one line.
type Span struct {
	Text string
	Kind Kind
}

// Spans returns a formula on one line, in stretches.
func Spans(e Expr) []Span {
	var l onLine
	l.write(e)
	return l.spans
}

// onLine writes a formula on one line.
type onLine struct{ spans []Span }

// put adds upright text.
func (l *onLine) put(text string) {
	if n := len(l.spans); n > 0 && l.spans[n-1].Kind == Upright {
		l.spans[n-1].Text += text
		return
	}
	l.spans = append(l.spans, Span{Text: text})
}

func (l *onLine) write(e Expr) {
	switch e := e.(type) {
	case Symbol:
		l.symbol(e)
	case Number:
		l.put(e.String())
	case Sum:
		l.sum(e)
	case Product:
		l.product(e)
	case Quotient:
		l.in(e.Above, AboveBracketed(e.Above))
		l.put(" / ")
		l.in(e.Below, BelowBracketed(e.Below))
	case Power:
		l.power(e)
	case Root:
		l.put("√")
		l.in(e.Of, true)
	case Call:
		l.call(e)
	}
}

func (l *onLine) symbol(s Symbol) {
	l.spans = append(l.spans, Span{s.Base, Letter})
	if s.Sub != "" {
		l.spans = append(l.spans, Span{s.Sub, Subscript})
	}
}

// in writes a formula, in brackets where its place asks for them.
func (l *onLine) in(e Expr, brackets bool) {
	if !brackets {
		l.write(e)
		return
	}
	l.put("(")
	l.write(e)
	l.put(")")
}

func (l *onLine) sum(e Sum) {
	for i, t := range e.Terms {
		switch {
		case i == 0 && t.Minus:
			l.put("−")
		case i > 0 && t.Minus:
			l.put(" − ")
		case i > 0:
			l.put(" + ")
		}
		l.in(t.Of, TermBracketed(t.Of, i == 0, t.Minus))
	}
}

func (l *onLine) product(e Product) {
	between := " "
	if Times(e) {
		between = " × "
	}
	for i, f := range e.Factors {
		if i > 0 {
			l.put(between)
		}
		l.in(f, Bracketed(f, i == 0))
	}
}

func (l *onLine) power(e Power) {
	l.in(e.Base, BaseBracketed(e.Base))
	if n, ok := e.Exponent.(Number); ok && n.Exponent == 0 && !strings.Contains(n.Figures, ".") {
		l.put(Raise(n.Figures))
		return
	}
	l.put("^")
	l.in(e.Exponent, binding(e.Exponent) < bindAtom)
}

func (l *onLine) call(e Call) {
	if e.Name == "abs" {
		l.put("|")
		l.write(e.Args[0])
		l.put("|")
		return
	}
	l.put(e.Name + "(")
	for i, a := range e.Args {
		if i > 0 {
			l.put(", ")
		}
		l.write(a)
	}
	l.put(")")
}
