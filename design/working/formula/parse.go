package formula

import (
	"fmt"
	"strings"
)

// Parse reads a formula. Factors stand side by side or with ×; √ takes
// brackets; "a/b c" is (a/b) c.
func Parse(s string) (Expr, error) {
	p := parser{source: s, tokens: lex(s)}
	e := p.sum()
	if p.err == nil && p.kind() != tokenEnd {
		p.fail()
	}
	return e, p.err
}

// Must reads a formula of the program itself, and panics where it is none.
func Must(s string) Expr {
	e, err := Parse(s)
	if err != nil {
		panic(err)
	}
	return e
}

// Sym reads a symbol such as "N_b,y,Rd".
func Sym(s string) Symbol {
	base, sub, _ := strings.Cut(s, "_")
	return Symbol{base, sub}
}

type parser struct {
	source string
	tokens []token
	at     int
	err    error
}

func (p *parser) kind() rune { return p.tokens[p.at].kind }

func (p *parser) next() token {
	t := p.tokens[p.at]
	if t.kind != tokenEnd {
		p.at++
	}
	return t
}

func (p *parser) fail() Expr {
	if p.err == nil {
		p.err = fmt.Errorf("formula %q: cannot be read at part %d", p.source, p.at+1)
	}
	p.at = len(p.tokens) - 1
	return Number{Figures: "0"}
}

func (p *parser) expect(kind rune) {
	if p.kind() != kind {
		p.fail()
		return
	}
	p.next()
}

func (p *parser) sum() Expr {
	var terms []Term
	minus := p.sign()
	for {
		terms = append(terms, Term{minus, p.product()})
		if k := p.kind(); k != '+' && k != '-' {
			break
		}
		minus = p.sign()
	}
	if len(terms) == 1 && !terms[0].Minus {
		return terms[0].Of
	}
	return Sum{terms}
}

// sign passes over a sign and reports whether it is a minus.
func (p *parser) sign() bool {
	switch p.kind() {
	case '-':
		p.next()
		return true
	case '+':
		p.next()
	}
	return false
}

func (p *parser) product() Expr {
	factors := []Expr{p.power()}
	for {
		switch k := p.kind(); {
		case k == '*':
			p.next()
			factors = append(factors, p.power())
		case k == '/':
			p.next()
			factors = []Expr{Quotient{product(factors), p.power()}}
		case k == tokenNumber || k == tokenSymbol || k == '(' || k == '√':
			factors = append(factors, p.power())
		default:
			return product(factors)
		}
	}
}

func product(factors []Expr) Expr {
	if len(factors) == 1 {
		return factors[0]
	}
	return Product{factors}
}

func (p *parser) power() Expr {
	base := p.atom()
	switch p.kind() {
	case '^':
		p.next()
		return Power{base, p.atom()}
	case tokenRaised:
		return Power{base, Number{Figures: p.next().text}}
	}
	return base
}

func (p *parser) atom() Expr {
	switch t := p.next(); t.kind {
	case tokenNumber:
		return Number{Figures: t.text}
	case tokenSymbol:
		if p.kind() == '(' && (t.text == "min" || t.text == "max" || t.text == "abs") {
			return p.call(t.text)
		}
		return Sym(t.text)
	case '√':
		p.expect('(')
		e := p.sum()
		p.expect(')')
		return Root{e}
	case '(':
		e := p.sum()
		p.expect(')')
		return e
	case '|':
		e := p.sum()
		p.expect('|')
		return Call{"abs", []Expr{e}}
	}
	return p.fail()
}

func (p *parser) call(name string) Expr {
	p.expect('(')
	args := []Expr{p.sum()}
	for p.kind() == ',' || p.kind() == ';' {
		p.next()
		args = append(args, p.sum())
	}
	p.expect(')')
	return Call{name, args}
}
