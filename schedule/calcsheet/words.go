package calcsheet

import (
	"strings"

	"stanchion/design/working/formula"
)

// words sets the words of a text, each with the blank behind it.
func words(s string, f face) []box {
	fields := strings.Fields(s)
	list := make([]box, len(fields))
	for i, w := range fields {
		list[i] = textWithSymbols(w, f)
		if i < len(fields)-1 {
			list[i] = row(list[i], gap(space))
		}
	}
	return list
}

// textWithSymbols sets a word; what is spelt as a symbol ("N_fi,Ed", "λ̄_LT") is
// set as one.
func textWithSymbols(word string, f face) box {
	start, end := symbolIn(word)
	if start == end {
		return textBox(word, f, 1)
	}
	rest := word[end:]
	list := []box{textBox(word[:start], f, 1), setSymbol(formula.Sym(word[start:end]))}
	if strings.ContainsRune(rest, '_') {
		list = append(list, textBox(rest[:1], f, 1), textWithSymbols(rest[1:], f))
	} else {
		list = append(list, textBox(rest, f, 1))
	}
	return row(list...)
}

// symbolIn returns where a word spells a symbol; an empty stretch where it
// spells none.
func symbolIn(word string) (start, end int) {
	at := strings.IndexByte(word, '_')
	if at < 0 && !strings.ContainsRune(word, macron) {
		return 0, 0
	}
	start = strings.LastIndexAny(word[:max(at, 0)], "(,/+") + 1
	end = len(word)
	if i := strings.IndexAny(word[start:], ")/:;="); i >= 0 {
		end = start + i
	}
	return start, start + len(strings.TrimRight(word[start:end], ",."))
}
