package catalogue

import (
	"strconv"
	"strings"
	"unicode"
)

// spelling is a section's name taken apart: its words without the separators
// between dimensions, and its numbers.
type spelling struct {
	word    string    // the family's word or words joined, "" where none is given
	numbers []float64 // dimensions, mm, and mass, kg/m, in the order written
	finish  Finish
	odd     bool // holds something that is no part of a section's name
}

// plainUpper folds what typing and typesetting vary: case, multiplication
// signs, non-breaking and thin spaces, hyphens and underlines between words.
func plainUpper(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '×' || r == '✕' || r == '✖' || r == '⨯' || r == 'х' || r == 'Х' || r == '*':
			return 'X'
		case unicode.IsSpace(r) || r == '-' || r == '_' || r == '–' || r == '—' || r == '(' || r == ')' || r == '"' || r == '\'':
			return ' '
		case r == '\u200b' || r == '\ufeff' || r == '\u00ad':
			return -1
		}
		return unicode.ToUpper(r)
	}, s)
}

// readSpelling takes a name apart. It never fails: what does not belong is odd.
func readSpelling(name string) spelling {
	var sp spelling
	var words []string
	text := plainUpper(name)
	for i := 0; i < len(text); {
		c := text[i]
		switch {
		case c >= '0' && c <= '9':
			n := numberLength(text[i:])
			v, err := strconv.ParseFloat(strings.Replace(text[i:i+n], ",", ".", 1), 64)
			if err != nil {
				sp.odd = true
			}
			sp.numbers = append(sp.numbers, v)
			i += n
		case c >= 'A' && c <= 'Z':
			n := 1
			for i+n < len(text) && text[i+n] >= 'A' && text[i+n] <= 'Z' {
				n++
			}
			words = appendWord(words, text[i:i+n])
			i += n
		case c == ' ' || c == '.' || c == ',' || c == '/':
			i++
		default:
			sp.odd = true
			i++
		}
	}
	sp.word, sp.finish, sp.numbers = readWords(words, sp.numbers)
	return sp
}

// appendWord keeps a word, less the X that separates dimensions: alone, at the
// end of a family ("UCX203") or before one ("203XUC").
func appendWord(words []string, w string) []string {
	if w == "X" {
		return words
	}
	if trimmed := strings.TrimSuffix(w, "X"); trimmed != w && familyByWord[trimmed] != nil {
		w = trimmed
	}
	return append(words, w)
}

// numberLength is the length of the number that text begins with: digits, and
// one decimal point or comma with digits behind it.
func numberLength(text string) int {
	digits := func(s string) int {
		n := 0
		for n < len(s) && s[n] >= '0' && s[n] <= '9' {
			n++
		}
		return n
	}
	n := digits(text)
	if n < len(text) && (text[n] == '.' || text[n] == ',') {
		if d := digits(text[n+1:]); d > 0 {
			n += 1 + d
		}
	}
	return n
}

// readWords joins the words that are not a finish. "EN 10219" says a finish,
// too, and its number is no dimension.
func readWords(words []string, numbers []float64) (string, Finish, []float64) {
	finish := FinishNone
	var family strings.Builder
	for i := 0; i < len(words); i++ {
		w := words[i]
		switch {
		case w == "EN" || w == "BS":
			numbers, finish = withoutStandard(numbers, finish)
		case finishWords[w] != FinishNone:
			finish = finishWords[w]
		case (w == "FORMED" || w == "FINISHED" || w == "ROLLED") && i > 0 && finishWords[words[i-1]] != FinishNone:
		case len(w) > 2 && familyByWord[w] == nil && finishWords[w[:2]] != FinishNone && familyByWord[w[2:]] != nil:
			finish = finishWords[w[:2]]
			family.WriteString(w[2:])
		case len(w) > 2 && familyByWord[w] == nil && finishWords[w[len(w)-2:]] != FinishNone && familyByWord[w[:len(w)-2]] != nil:
			finish = finishWords[w[len(w)-2:]]
			family.WriteString(w[:len(w)-2])
		default:
			family.WriteString(w)
		}
	}
	word := family.String()
	if familyByWord[word] == nil && familyByWord[strings.TrimSuffix(word, "S")] != nil {
		word = strings.TrimSuffix(word, "S")
	}
	return word, finish, numbers
}

// withoutStandard drops the numbers of EN 10210 or EN 10219 and their parts.
func withoutStandard(numbers []float64, finish Finish) ([]float64, Finish) {
	for i, v := range numbers {
		if v == 10210 || v == 10219 {
			if v == 10219 {
				finish = ColdFormed
			} else {
				finish = HotFinished
			}
			end := i + 1
			if end < len(numbers) && numbers[end] <= 2 {
				end++
			}
			return append(append([]float64(nil), numbers[:i]...), numbers[end:]...), finish
		}
	}
	return numbers, finish
}

// key joins numbers to a name's key: 203x203x60, 168.3x8.
func key(numbers []float64) string {
	var b []byte
	for i, v := range numbers {
		if i > 0 {
			b = append(b, 'x')
		}
		b = strconv.AppendFloat(b, v, 'f', -1, 64)
	}
	return string(b)
}
