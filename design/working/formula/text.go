package formula

import (
	"strconv"
	"strings"
)

// String returns the symbol as plain text: "N_cr,y".
func (s Symbol) String() string {
	if s.Sub == "" {
		return s.Base
	}
	return s.Base + "_" + s.Sub
}

// String returns the number as plain text: "6122.9×10⁴".
func (n Number) String() string {
	figures := strings.Replace(n.Figures, "-", "−", 1)
	if n.Exponent == 0 {
		return figures
	}
	power := "10" + Raise(strconv.Itoa(n.Exponent))
	if figures == "1" {
		return power
	}
	return figures + "×" + power
}

// Raise writes an integer in raised figures.
func Raise(figures string) string {
	raised := []rune(superscripts)
	var b strings.Builder
	for _, r := range figures {
		if r == '-' {
			b.WriteRune('⁻')
		} else if r >= '0' && r <= '9' {
			b.WriteRune(raised[r-'0'])
		}
	}
	return b.String()
}

// How tightly the parts of a formula bind.
const (
	bindSum = iota
	bindProduct
	bindPower
	bindAtom
)

// binding returns how tightly a formula binds: brackets go about it where its
// place asks for more.
func binding(e Expr) int {
	switch e := e.(type) {
	case Sum:
		return bindSum
	case Product, Quotient:
		return bindProduct
	case Power:
		return bindPower
	case Number:
		if strings.HasPrefix(e.Figures, "-") {
			return bindSum
		}
		if e.Exponent != 0 {
			return bindProduct
		}
	}
	return bindAtom
}

// Bracketed reports whether a factor of a product needs brackets. A quotient
// needs them behind another factor alone.
func Bracketed(factor Expr, first bool) bool {
	if _, quotient := factor.(Quotient); quotient && first {
		return false
	}
	if n, number := factor.(Number); number {
		return strings.HasPrefix(n.Figures, "-")
	}
	return binding(factor) <= bindProduct
}

// BaseBracketed reports whether the base of a power needs brackets.
func BaseBracketed(e Expr) bool { return binding(e) < bindAtom }

// TermBracketed reports whether a term of a sum needs brackets.
func TermBracketed(e Expr, first, minus bool) bool {
	return binding(e) == bindSum && (!first || minus)
}

// Times reports whether the factors of a product stand with a × between them:
// where they are numbers, and where two numbers would stand side by side.
func Times(p Product) bool {
	symbols, beside := false, false
	for i, f := range p.Factors {
		symbols = symbols || hasSymbol(f)
		if i > 0 {
			_, before := p.Factors[i-1].(Number)
			_, this := f.(Number)
			beside = beside || before && this
		}
	}
	return beside || !symbols
}

// hasSymbol reports whether a symbol other than π is left in a formula.
func hasSymbol(e Expr) bool {
	switch e := e.(type) {
	case Symbol:
		return e.Base != "π"
	case Sum:
		for _, t := range e.Terms {
			if hasSymbol(t.Of) {
				return true
			}
		}
	case Product:
		return anySymbol(e.Factors)
	case Quotient:
		return hasSymbol(e.Above) || hasSymbol(e.Below)
	case Power:
		return hasSymbol(e.Base) || hasSymbol(e.Exponent)
	case Root:
		return hasSymbol(e.Of)
	case Call:
		return anySymbol(e.Args)
	}
	return false
}

func anySymbol(list []Expr) bool {
	for _, e := range list {
		if hasSymbol(e) {
			return true
		}
	}
	return false
}

// Text returns a formula as plain text.
func Text(e Expr) string {
	var b strings.Builder
	for _, s := range Spans(e) {
		if s.Kind == Subscript {
			b.WriteByte('_')
		}
		b.WriteString(s.Text)
	}
	return b.String()
}

// AboveBracketed reports whether the upper side of a quotient on one line needs
// brackets.
func AboveBracketed(e Expr) bool { return binding(e) == bindSum }

// BelowBracketed reports whether the lower side needs them.
func BelowBracketed(e Expr) bool { return binding(e) <= bindProduct }
