package calcsheet

import (
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"stanchion/design/working/formula"
)

// The sizes and shifts of scripts and fractions, em.
const (
	scriptSize   = 0.72
	subShift     = 0.20
	supShift     = 0.36
	fractionSize = 0.86
	thin         = 0.15
	space        = 0.278 // between words: that of the typeface
	around       = 0.20  // about the signs of sums, and behind =
	unitGap      = 0.20
)

const macron = '\u0304'

// typeset sets a formula. Fractions are built up on the outside and written
// with a slash inside other fractions, powers and scripts.
func typeset(e formula.Expr) box { return set(e, true) }

func set(e formula.Expr, outside bool) box {
	switch e := e.(type) {
	case formula.Symbol:
		return setSymbol(e)
	case formula.Number:
		return setNumber(e)
	case formula.Sum:
		return row(setTerms(e, outside)...)
	case formula.Product:
		return row(setFactors(e, outside)...)
	case formula.Quotient:
		return setQuotient(e, outside)
	case formula.Power:
		return setPower(e, outside)
	case formula.Root:
		return setRoot(set(e.Of, outside))
	case formula.Call:
		return setCall(e, outside)
	}
	return box{}
}

// setSymbol sets a letter with its subscript; a bar stands over what has one.
func setSymbol(s formula.Symbol) box {
	base, barred := strings.CutSuffix(s.Base, string(macron))
	f := italic
	if !isLetter(base) {
		f = upright
	}
	b := textBox(base, f, 1)
	if barred {
		b.line(0.10, xHeight+0.28, b.w-0.02, xHeight+0.28)
		b.up = max(b.up, xHeight+0.34)
	}
	if s.Sub != "" {
		sub := textBox(s.Sub, upright, scriptSize)
		b.put(sub, b.w+0.02, -subShift)
	}
	return b
}

// isLetter reports whether a symbol is drawn slanted: one that is no digit or
// sign.
func isLetter(base string) bool {
	first, _ := utf8.DecodeRuneInString(base)
	return base == "" || unicode.IsLetter(first)
}

// setNumber sets figures and a power of ten.
func setNumber(n formula.Number) box {
	b := textBox(strings.Replace(n.Figures, "-", "−", 1), upright, 1)
	if n.Exponent == 0 {
		return b
	}
	ten := textBox("10", upright, 1)
	if n.Figures != "1" {
		b = row(b, textBox("×", upright, 1), ten)
	} else {
		b = ten
	}
	return raised(b, textBox(strings.Replace(strconv.Itoa(n.Exponent), "-", "−", 1), upright, scriptSize))
}

// raised puts a superscript behind a box.
func raised(b, script box) box {
	up := max(supShift, b.up-0.45*script.up-0.1)
	b.put(script, b.w+0.03, up)
	return b
}

func setTerms(e formula.Sum, outside bool) []box {
	var list []box
	for i, t := range e.Terms {
		switch {
		case i == 0 && t.Minus:
			list = append(list, textBox("−", upright, 1))
		case i > 0:
			list = append(list, gap(around), textBox(sign(t.Minus), upright, 1), gap(around))
		}
		list = append(list, setIn(t.Of, formula.TermBracketed(t.Of, i == 0, t.Minus), outside))
	}
	return list
}

func sign(minus bool) string {
	if minus {
		return "−"
	}
	return "+"
}

func setFactors(e formula.Product, outside bool) []box {
	between := []box{gap(thin)}
	if formula.Times(e) {
		between = []box{gap(thin), textBox("×", upright, 1), gap(thin)}
	}
	var list []box
	for i, f := range e.Factors {
		if i > 0 {
			list = append(list, between...)
		}
		brackets := formula.Bracketed(f, i == 0)
		if q, quotient := f.(formula.Quotient); quotient && outside && !(atom(q.Above) && atom(q.Below)) {
			brackets = false // the rule holds it together
		}
		list = append(list, setIn(f, brackets, outside))
	}
	return list
}

// setIn sets a formula, in brackets where its place asks for them.
func setIn(e formula.Expr, brackets, outside bool) box {
	b := set(e, outside)
	if brackets {
		return bracket(b, "(", ")")
	}
	return b
}

// bracket puts signs about a box that are as tall as it.
func bracket(b box, open, shut string) box {
	size, drop := 1.0, 0.0
	if height := b.up + b.down; height > 1.25 {
		size = height / (ascent + descent)
		drop = b.down - descent*size
	}
	left, right := textBox(open, upright, size), textBox(shut, upright, size)
	var out box
	out.put(left, 0, -drop)
	out.put(b, left.w, 0)
	out.put(right, left.w+b.w, -drop)
	return out
}

func setQuotient(e formula.Quotient, outside bool) box {
	if !outside || atom(e.Above) && atom(e.Below) {
		below := setIn(e.Below, formula.BelowBracketed(e.Below), false)
		return row(setIn(e.Above, formula.AboveBracketed(e.Above), false), textBox("/", upright, 1), below)
	}
	above, below := set(e.Above, false).scaled(fractionSize), set(e.Below, false).scaled(fractionSize)
	w := max(above.w, below.w) + 0.12
	var b box
	b.put(above, (w-above.w)/2, axis+0.12+above.down)
	b.put(below, (w-below.w)/2, axis-0.14-below.up)
	b.line(0, axis, w, axis)
	b.w = w
	return row(gap(0.05), b, gap(0.05))
}

// atom reports whether a formula is a letter or a plain number: a fraction of
// two such stands on one line.
func atom(e formula.Expr) bool {
	switch e := e.(type) {
	case formula.Symbol:
		return true
	case formula.Number:
		return e.Exponent == 0
	case formula.Call:
		return e.Name == "abs" && atom(e.Args[0])
	}
	return false
}

func setPower(e formula.Power, outside bool) box {
	base := setIn(e.Base, formula.BaseBracketed(e.Base), outside)
	return raised(base, set(e.Exponent, false).scaled(scriptSize))
}

// setRoot draws the sign about what is under it.
func setRoot(of box) box {
	up, down := of.up+0.10, of.down
	var b box
	b.put(of, 0.52, 0)
	b.line(0.02, 0.22, 0.14, 0.30)
	b.line(0.14, 0.30, 0.28, -down)
	b.line(0.28, -down, 0.46, up)
	b.line(0.46, up, 0.56+of.w, up)
	b.w = 0.60 + of.w
	b.up = up + 0.06
	return b
}

func setCall(e formula.Call, outside bool) box {
	var args []box
	for i, a := range e.Args {
		if i > 0 {
			args = append(args, textBox(",", upright, 1), gap(space))
		}
		args = append(args, set(a, outside))
	}
	if e.Name == "abs" {
		return bracket(row(args...), "|", "|")
	}
	return row(textBox(e.Name, upright, 1), bracket(row(args...), "(", ")"))
}
