package schedule

import (
	"strings"
	"unicode"

	"golang.org/x/text/unicode/norm"
)

// token is a run of letters or of digits of a heading.
type token struct {
	text       string // folded: lower case, without accents, Greek spelt out
	start, end int    // in the tidied heading
	bracket    bool   // stands in brackets
}

// tidy brings a heading into one line of plain characters: subscripts and
// other forms become their letters, line breaks and odd spaces a space.
func tidy(s string) string {
	if !isPlain(s) {
		s = norm.NFKC.String(s)
		s = strings.Map(func(r rune) rune {
			switch {
			case r == '\u200b' || r == '\u2060' || r == '\ufeff' || r == '\u00ad' || unicode.IsControl(r) && !unicode.IsSpace(r):
				return -1
			case unicode.IsSpace(r):
				return ' '
			default:
				return r
			}
		}, s)
	}
	return strings.Join(strings.Fields(s), " ")
}

func isPlain(s string) bool {
	for i := range len(s) {
		if s[i] < ' ' || s[i] > '~' {
			return false
		}
	}
	return true
}

var greek = strings.NewReplacer("η", "eta", "λ", "lambda", "ψ", "psi", "χ", "chi", "γ", "gamma", "α", "alpha", "β", "beta", "φ", "phi", "ß", "ss", "ø", "o", "œ", "oe", "æ", "ae")

// fold lowers s and takes its accents off.
func fold(s string) string {
	if isPlain(s) {
		return strings.ToLower(s)
	}
	s = strings.Map(func(r rune) rune {
		if unicode.Is(unicode.Mn, r) {
			return -1
		}
		return unicode.ToLower(r)
	}, norm.NFD.String(s))
	return greek.Replace(s)
}

// tokens parts a tidied heading into runs of letters and runs of digits. A
// capital within a run of letters opens a new one, so that MyTop is my, top.
func tokens(s string) []token {
	var list []token
	depth, start := 0, -1
	var last rune
	flush := func(end int) {
		if start >= 0 {
			if text := fold(s[start:end]); text != "" { // a lone accent is nothing
				list = append(list, token{text, start, end, depth > 0})
			}
		}
		start = -1
	}
	for i, r := range s {
		switch {
		case unicode.IsLetter(r) || unicode.Is(unicode.Mn, r) || r >= '0' && r <= '9':
			digit := r >= '0' && r <= '9'
			if start >= 0 && (digit != (last >= '0' && last <= '9') || unicode.IsUpper(r) && unicode.IsLower(last)) {
				flush(i)
			}
			if start < 0 {
				start = i
			}
		default:
			flush(i)
			switch r {
			case '(', '[':
				depth++
			case ')', ']':
				depth = max(depth-1, 0)
			}
		}
		last = r
	}
	flush(len(s))
	return list
}

// compact folds a spelling and drops all but letters and digits.
func compact(s string) string {
	var b strings.Builder
	for _, t := range tokens(tidy(s)) {
		b.WriteString(t.text)
	}
	return b.String()
}
