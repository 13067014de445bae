package schedule

// phrase is a heading taken apart into words.
type phrase struct {
	text        string
	nouns       []word
	axes        []axis
	ends        []end
	bound       bound
	fire        bool
	veto        bool
	left        []token  // tokens that no word explains
	spans       [][2]int // what the words and noise take of the text
	boundTokens []token
	combos      []token // tokens of nouns that name a combination
	last        token   // the one before
}

// parsePhrase takes a heading apart: at each place the longest spelling of the
// vocabulary.
func parsePhrase(s string) *phrase {
	p := &phrase{text: s}
	toks := tokens(s)
	for i := 0; i < len(toks); {
		w, n := longestWord(toks[i:])
		p.take(w, toks[i:i+n])
		i += n
	}
	return p
}

func longestWord(toks []token) (word, int) {
	var found word
	n := 1
	joined := ""
	for i := range min(len(toks), maxPhrase) {
		if toks[i].bracket != toks[0].bracket {
			break
		}
		joined += toks[i].text
		if w, ok := vocabulary[joined]; ok {
			found, n = w, i+1
		}
	}
	return found, n
}

// namesOn reports whether a single letter goes on with the name of a
// combination: the b of 6.10b, the X of Wind X, the A of Case A.
func (p *phrase) namesOn(letter token) bool {
	if n := len(p.left); n > 0 && p.left[n-1] == p.last {
		return p.last.end == letter.start || combinationWords[p.last.text]
	}
	n := len(p.combos)
	return n > 0 && p.combos[n-1] == p.last
}

func (p *phrase) take(w word, toks []token) {
	if len(toks) == 1 && len(toks[0].text) == 1 && p.namesOn(toks[0]) {
		w = word{}
	}
	defer func() { p.last = toks[len(toks)-1] }()
	span := [2]int{toks[0].start, toks[len(toks)-1].end}
	switch w.kind {
	case noun:
		if w.field == combinationField {
			p.combos = append(p.combos, toks...)
		}
		p.nouns = append(p.nouns, w)
		if w.axis != noAxis {
			p.axes = append(p.axes, w.axis)
		}
	case axisWord:
		p.axes = append(p.axes, w.axis)
	case endWord:
		p.ends = append(p.ends, w.end)
	case boundWord:
		p.bound = w.bound
		p.boundTokens = append(p.boundTokens, toks...)
		return
	case fireWord:
		p.fire = true
	case vetoWord:
		p.veto = true
	case noiseWord:
	default:
		p.left = append(p.left, toks...)
		return
	}
	p.spans = append(p.spans, span)
}
