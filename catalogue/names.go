package catalogue

import (
	"slices"
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
	odd     string // why it is no section's name, "" where it may be one
}

// What makes a spelling odd.
const (
	oddSign     = "it holds a sign that no section's name has"
	oddNumber   = "it holds a number that no section has"
	oddFinishes = "it says both hot finished and cold formed"
)

// diameter stands for the signs of a diameter, which name a circular hollow
// section where nothing else does.
const diameter = '\x01'

// plainUpper folds what typing and typesetting vary: case, multiplication
// signs, non-breaking and thin spaces, hyphens and underlines between words.
func plainUpper(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '×' || r == '✕' || r == '✖' || r == '⨯' || r == 'х' || r == 'Х' || r == '*':
			return 'X'
		case r == 'Ø' || r == 'ø' || r == '⌀' || r == '∅':
			return diameter
		case r == '∟' || r == '∠':
			return 'L'
		case unicode.IsSpace(r) || r == '-' || r == '_' || r == '–' || r == '—' || r == '(' || r == ')' || r == '"' || r == '\'':
			return ' '
		case r == '\u200b' || r == '\ufeff' || r == '\u00ad':
			return -1
		}
		return unicode.ToUpper(r)
	}, s)
}

// units may stand behind the numbers of a name.
var units = strings.NewReplacer("KG/M", " ", "KG", " ", "MM", " ")

// readSpelling takes a name apart. It never fails: what does not belong is odd.
func readSpelling(name string) spelling {
	var sp spelling
	var words []string
	text := plainUpper(name)
	if strings.ContainsAny(text, "KM") {
		text = units.Replace(text)
	}
	round := false
	for i := 0; i < len(text); {
		c, n := text[i], 1
		switch {
		case c >= '0' && c <= '9':
			n = numberLength(text[i:])
			v, err := strconv.ParseFloat(strings.Replace(text[i:i+n], ",", ".", 1), 64)
			if err != nil || v > 1e6 {
				sp.odd = oddNumber
			}
			sp.numbers = append(sp.numbers, v)
		case c >= 'A' && c <= 'Z':
			for i+n < len(text) && text[i+n] >= 'A' && text[i+n] <= 'Z' {
				n++
			}
			words = appendWord(words, text[i:i+n])
		case c == diameter:
			round = true
		case c == ' ' || c == '.' || c == ',' || c == '/':
		default:
			sp.odd = oddSign
		}
		i += n
	}
	sp.readWords(words)
	if round && sp.word == "" {
		sp.word = "CHS"
	}
	return sp
}

// appendWord keeps a word, less the X that separates dimensions: alone, at the
// end of a family ("UCX203") or before one ("203XUC").
func appendWord(words []string, w string) []string {
	if w == "X" {
		return words
	}
	for _, trimmed := range []string{strings.TrimSuffix(w, "X"), strings.TrimPrefix(w, "X")} {
		if trimmed != w && familyByWord[trimmed] != nil {
			w = trimmed
		}
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
func (sp *spelling) readWords(words []string) {
	var family strings.Builder
	for i, w := range words {
		rest, finish := cutFinish(w)
		switch {
		case w == "EN" || w == "BS":
			sp.takeStandard()
		case (w == "FORMED" || w == "FINISHED" || w == "ROLLED") && i > 0 && finishWords[words[i-1]] != FinishNone:
		case finish != FinishNone:
			sp.state(finish)
			family.WriteString(rest)
		default:
			family.WriteString(w)
		}
	}
	sp.word = family.String()
	if singular := strings.TrimSuffix(sp.word, "S"); familyByWord[sp.word] == nil && familyByWord[singular] != nil {
		sp.word = singular
	}
}

// cutFinish parts a finish from a word that is one, or that has one before or
// behind a family: "CFSHS", "RHSCF".
func cutFinish(w string) (rest string, f Finish) {
	switch f = finishWords[w]; {
	case f != FinishNone:
		return "", f
	case familyByWord[w] != nil || len(w) <= 2:
		return w, FinishNone
	}
	end := len(w) - 2
	if f = finishWords[w[:2]]; f != FinishNone && familyByWord[w[2:]] != nil {
		return w[2:], f
	}
	if f = finishWords[w[end:]]; f != FinishNone && familyByWord[w[:end]] != nil {
		return w[:end], f
	}
	return w, FinishNone
}

// state notes a finish that a name states; two that differ are odd.
func (sp *spelling) state(f Finish) {
	if sp.finish != FinishNone && sp.finish != f {
		sp.odd = oddFinishes
	}
	sp.finish = f
}

// takeStandard drops the numbers of EN 10210 or EN 10219 and their parts, and
// notes the finish that they state.
func (sp *spelling) takeStandard() {
	for i, v := range sp.numbers {
		if v != 10210 && v != 10219 {
			continue
		}
		if v == 10219 {
			sp.state(ColdFormed)
		} else {
			sp.state(HotFinished)
		}
		end := i + 1
		if end < len(sp.numbers) && sp.numbers[end] <= 2 {
			end++
		}
		sp.numbers = slices.Delete(sp.numbers, i, end)
		return
	}
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
