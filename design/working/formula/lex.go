package formula

import (
	"strings"
	"unicode"
)

// The kinds of token. The others are their own character.
const (
	tokenEnd    = 0
	tokenNumber = 'n'
	tokenSymbol = 's'
	tokenRaised = 'r' // superscript figures
)

type token struct {
	kind rune
	text string
}

// superscripts are the raised figures of plain text.
const superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹"

// lex splits a formula. Typographic signs count as their plain counterparts,
// so that printed formulas are read too.
func lex(s string) []token {
	var tokens []token
	runes := []rune(s)
	for i := 0; i < len(runes); {
		r := runes[i]
		from := i
		switch {
		case unicode.IsSpace(r):
			i++
		case unicode.IsDigit(r):
			for i < len(runes) && (unicode.IsDigit(runes[i]) || runes[i] == '.') {
				i++
			}
			tokens = append(tokens, token{tokenNumber, string(runes[from:i])})
		case raised(r) != 0:
			var b strings.Builder
			for i < len(runes) && raised(runes[i]) != 0 {
				b.WriteRune(raised(runes[i]))
				i++
			}
			tokens = append(tokens, token{tokenRaised, b.String()})
		case unicode.IsLetter(r):
			i = symbolEnd(runes, i)
			tokens = append(tokens, token{tokenSymbol, string(runes[from:i])})
		default:
			i++
			tokens = append(tokens, token{kind: plainSign(r)})
		}
	}
	return append(tokens, token{kind: tokenEnd})
}

// symbolEnd returns where a symbol ends. A comma belongs to its subscript
// unless a space follows, as between the arguments of a function.
func symbolEnd(runes []rune, i int) int {
	letter := func(r rune) bool { return unicode.IsLetter(r) || unicode.Is(unicode.Mn, r) }
	for i < len(runes) && letter(runes[i]) {
		i++
	}
	if i == len(runes) || runes[i] != '_' {
		return i
	}
	for i++; i < len(runes); i++ {
		comma := runes[i] == ',' && i+1 < len(runes) && !unicode.IsSpace(runes[i+1])
		if !letter(runes[i]) && !unicode.IsDigit(runes[i]) && !comma {
			break
		}
	}
	return i
}

// raised returns the plain character of a superscript one, 0 of any other.
func raised(r rune) rune {
	if r == '⁻' {
		return '-'
	}
	if i := strings.IndexRune(superscripts, r); i >= 0 {
		return '0' + rune(len([]rune(superscripts[:i])))
	}
	return 0
}

func plainSign(r rune) rune {
	switch r {
	case '×', '·':
		return '*'
	case '−':
		return '-'
	}
	return r
}
