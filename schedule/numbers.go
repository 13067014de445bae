package schedule

import (
	"errors"
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"
)

// errNotNumber says that a cell does not open with a number, or that its
// separators do not make one.
var errNotNumber = errors.New("not a number")

// splitNumber reads the number that opens s, with the file's decimal mark, and
// returns what follows it, trimmed. Comma, point, space or apostrophe, where
// it is not the decimal mark, may group the whole part in threes.
func splitNumber(s string, decimal byte) (value float64, rest string, err error) {
	s = strings.TrimFunc(s, isSpace)
	var digits [64]byte
	buf := digits[:0]
	s, buf = takeSign(s, buf)
	n := 0 // digits taken
	var group string
	for len(s) > 0 {
		if isDigit(s[0]) {
			run := digitRun(s)
			if group != "" && run != 3 {
				return 0, "", errNotNumber // 12,34,567
			}
			buf, s, n = append(buf, s[:run]...), s[run:], n+run
		}
		sep := groupMark(s, decimal)
		if sep == "" || n == 0 || group == "" && n > 3 || group != "" && sep != group || !isDigitAt(s, len(sep)) {
			break
		}
		if group == "" && buf[len(buf)-n] == '0' {
			return 0, "", errNotNumber // 0,500: nobody groups behind a zero
		}
		group, s = sep, s[len(sep):]
	}
	if len(s) > 0 && s[0] == decimal {
		run := digitRun(s[1:])
		buf = append(append(buf, '.'), s[1:1+run]...)
		s, n = s[1+run:], n+run
	}
	if n == 0 {
		return 0, "", errNotNumber
	}
	s, buf = takeExponent(s, buf)
	if s != "" && strings.IndexByte(".,'0123456789", s[0]) >= 0 || strings.HasPrefix(s, "’") {
		return 0, "", errNotNumber
	}
	rest = strings.TrimFunc(s, isSpace)
	if rest != "" && isDigit(rest[0]) {
		return 0, "", errNotNumber // 12 00, 1.5 2
	}
	value, err = strconv.ParseFloat(string(buf), 64)
	if err != nil || math.IsInf(value, 0) {
		return 0, "", errNotNumber
	}
	return value, rest, nil
}

func takeSign(s string, buf []byte) (string, []byte) {
	for _, sign := range []string{"-", "−", "–"} { // hyphen, minus, en dash
		if after, ok := strings.CutPrefix(s, sign); ok {
			return strings.TrimLeftFunc(after, isSpace), append(buf, '-')
		}
	}
	return strings.TrimPrefix(s, "+"), buf
}

func takeExponent(s string, buf []byte) (string, []byte) {
	if s == "" || s[0] != 'e' && s[0] != 'E' {
		return s, buf
	}
	i := 1
	if i < len(s) && (s[i] == '+' || s[i] == '-') {
		i++
	}
	if run := digitRun(s[i:]); run > 0 && run <= 3 {
		return s[i+run:], append(buf, s[:i+run]...)
	}
	return s, buf
}

// groupMark returns the grouping mark that s opens with, or "". All spaces
// that are printed between groups count as one mark.
func groupMark(s string, decimal byte) string {
	if s == "" {
		return ""
	}
	switch {
	case s[0] == decimal:
		return ""
	case s[0] == ',', s[0] == '.', s[0] == ' ', s[0] == '\'':
		return s[:1]
	}
	for _, m := range []string{"\u00a0", "\u202f", "\u2009", "’"} {
		if strings.HasPrefix(s, m) {
			return m
		}
	}
	return ""
}

func digitRun(s string) int {
	i := 0
	for i < len(s) && isDigit(s[i]) {
		i++
	}
	return i
}

func isDigit(b byte) bool { return b >= '0' && b <= '9' }

func isDigitAt(s string, i int) bool { return i < len(s) && isDigit(s[i]) }

// isSpace is unicode.IsSpace and what else prints as nothing.
func isSpace(r rune) bool {
	if r < utf8.RuneSelf {
		return r == ' ' || r >= '\t' && r <= '\r'
	}
	return unicode.IsSpace(r) || r == '\u200b' || r == '\u2060' || r == '\ufeff' || r == '\u00ad'
}

// countWords may follow a number of pieces: "2 no.", "4 off".
var countWords = compactSet("no|nos|nr|nrs|number|off|no off|x|pc|pcs|piece|pieces|column|columns|stk|stuck|st|pz|ud")

// parseNumber reads a whole cell as a number of quantity q in unit u, or in
// the unit that stands behind it, and returns it in the unit of design.
func parseNumber(s string, decimal byte, q quantity, u unit) (float64, error) {
	value, rest, err := splitNumber(s, decimal)
	if err != nil {
		return 0, err
	}
	if rest == "" || q == count && countWords[compact(rest)] && !strings.ContainsAny(rest, "()[]") {
		return value * u.factor, nil
	}
	own, known, _ := findUnit(rest)
	switch {
	case known && own.of == noQuantity:
		return 0, errNotNumber // "5 -"
	case !known || strings.ContainsAny(rest, "()[]"):
		return 0, fmt.Errorf("more than a number: %q follows it", rest)
	case !own.measures(q):
		return 0, fmt.Errorf("in %s, which is not a unit of it", own.name)
	}
	return value * own.factor, nil
}
