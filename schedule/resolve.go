package schedule

import (
	"slices"
	"strings"
)

// resolve finds the fields that the words name together.
func (p *phrase) resolve(m *meaning) {
	f, w := p.field()
	if f == nil {
		return
	}
	ax := p.axis()
	f, ax = p.special(f, ax)
	if p.veto && (f.needs&perCombination != 0 || w.exact) || p.fire && f.needs&perCombination != 0 {
		m.vetoed = f.needs&perCombination != 0
		return
	}
	m.exact = w.exact
	if !p.takeLeftovers(f, w, m) {
		return
	}
	p.makeKeys(f, ax, m)
}

// field returns the one field that the nouns name; nil where they name none
// or several.
func (p *phrase) field() (*field, word) {
	var found word
	if p.names(fromField) && p.names(toField) || p.names(fromField) && slices.Contains(p.ends, topEnd) || p.names(toField) && slices.Contains(p.ends, bottomEnd) {
		p.ends = nil
		return fieldTable[levelField], word{} // Level from / to, Base / top level
	}
	for _, weak := range []bool{false, true} {
		for _, w := range p.nouns {
			if w.weak != weak || w.field == combinationField && p.hasOther() {
				continue
			}
			switch {
			case found.field == noField:
				found = w
			case found.field == w.field:
				found.exact = found.exact || w.exact
				found.firm = found.firm || w.firm
			default:
				if f, ok := p.pair(found.field, w.field); ok {
					found.field, found.exact = f, true
					continue
				}
				return nil, word{}
			}
		}
		if found.field != noField {
			break
		}
	}
	return fieldTable[found.field], found
}

func (p *phrase) names(f fieldName) bool {
	return slices.ContainsFunc(p.nouns, func(w word) bool { return w.field == f })
}

// hasOther reports whether a noun that can be given per combination stands
// beside the word combination.
func (p *phrase) hasOther() bool {
	return slices.ContainsFunc(p.nouns, func(w word) bool {
		return fieldTable[w.field].needs&perCombination != 0
	})
}

// pair joins two nouns that make one: level and from.
func (p *phrase) pair(a, b fieldName) (fieldName, bool) {
	for _, f := range []fieldName{fromField, toField} {
		if a == levelField && b == f || a == f && b == levelField {
			return f, true
		}
	}
	return noField, false
}

func (p *phrase) axis() axis {
	ax := noAxis
	for _, a := range p.axes {
		switch {
		case ax == noAxis || ax == a:
			ax = a
		case ax == yAxis && a == zAxis || ax == zAxis && a == yAxis || ax == bothAxes || a == bothAxes:
			ax = bothAxes
		default:
			ax = xAxis // y with x, z with torsion: never guessed
		}
	}
	return ax
}

// special turns nouns that a word beside them changes into what they mean.
func (p *phrase) special(f *field, ax axis) (*field, axis) {
	switch {
	case f.name == levelField && slices.Equal(p.ends, []end{bottomEnd}):
		return fieldTable[fromField], ax
	case f.name == levelField && slices.Equal(p.ends, []end{topEnd}):
		return fieldTable[toField], ax
	case f.name == lcrField && ax == torsionAxis:
		return fieldTable[ltField], noAxis
	case f.name == restraintsField && ax == torsionAxis:
		return fieldTable[torsionField], noAxis
	case f.name == lcrField && p.fire:
		return fieldTable[fireLengthField], ax
	}
	return f, ax
}

// takeLeftovers decides about the tokens that no word explains: they name a
// combination, stand in brackets, or make the heading one of something else.
func (p *phrase) takeLeftovers(f *field, w word, m *meaning) bool {
	left := p.left
	if f.needs&perCombination != 0 {
		left = append(append(slices.Clone(left), p.boundTokens...), p.combos...)
		slices.SortFunc(left, func(a, b token) int { return a.start - b.start })
		left = slices.DeleteFunc(left, func(t token) bool { return t.bracket && !namesCombination([]token{t}) })
		left = slices.DeleteFunc(left, func(t token) bool { return t.text == "total" })
		if len(left) == 1 && left[0].text == "uls" {
			return true
		}
		if len(left) > 0 && !w.firm && !namesCombination(left) {
			m.unclear = f.plain()
			return false
		}
		if len(left) > 0 {
			m.combination = p.original(left)
		}
		return true
	}
	outside := slices.ContainsFunc(left, func(t token) bool { return !t.bracket })
	if !outside {
		return true
	}
	if f.needs&lenient == 0 || slices.ContainsFunc(left, func(t token) bool { return otherWords[t.text] }) {
		m.unclear = f.plain()
		return false
	}
	m.exact = false
	return true
}

// namesCombination reports whether the tokens look like a combination's name.
func namesCombination(left []token) bool {
	for _, t := range left {
		if combinationWords[t.text] || isDigit(t.text[0]) {
			return true
		}
	}
	return len(left) == 1 && len(left[0].text) == 1
}

// original returns the tokens' text as the user wrote it, with what stands
// between them, other words left out.
func (p *phrase) original(left []token) string {
	from, to := left[0].start, left[len(left)-1].end
	var b strings.Builder
	for i := from; i < to; {
		if end := p.spanAt(i); end > i {
			i = end
			b.WriteByte(' ')
			continue
		}
		b.WriteByte(p.text[i])
		i++
	}
	return strings.Join(strings.Fields(b.String()), " ")
}

func (p *phrase) spanAt(i int) int {
	for _, s := range p.spans {
		if s[0] == i && !p.isCombo(i) {
			return s[1]
		}
	}
	return i
}

func (p *phrase) isCombo(start int) bool {
	return slices.ContainsFunc(p.combos, func(t token) bool { return t.start == start })
}

// makeKeys spells out which fields the heading supplies, one a wanted axis and
// end. A value meant for both axes or ends only suggests each of them.
func (p *phrase) makeKeys(f *field, ax axis, m *meaning) {
	axes, ends := []axis{noAxis}, []end{noEnd}
	if f.needs&needsAxis != 0 {
		switch {
		case ax == xAxis || ax == torsionAxis:
			m.trouble = "it speaks of x-x"
			m.remedy = "here y-y is the major axis and z-z the minor one: rename the headings, or map them"
			axes = []axis{xAxis}
		case ax == bothAxes:
			axes = []axis{yAxis, zAxis}
		case ax != noAxis:
			axes = []axis{ax}
		case f.needs&axisFromBoth != 0:
			axes, m.exact = []axis{yAxis, zAxis}, false
		default:
			if f.name != momentField {
				m.unclear = f.plain()
				return
			}
			m.trouble, m.remedy = "it names no axis", "say y-y or z-z in the heading, or map it"
			axes = []axis{noAxis}
		}
	}
	if f.needs&(needsEnd|mayHaveEnd) != 0 {
		switch given := p.end(); {
		case given == topEnd || given == bottomEnd:
			ends = []end{given}
		case f.needs&mayHaveEnd != 0:
		default:
			ends = []end{bottomEnd, topEnd}
			m.exact = m.exact && given == bothEnds
		}
	} else if len(p.ends) > 0 && f.name != fromField && f.name != toField && f.needs&lenient == 0 {
		return // "Top section" is something else
	}
	if (f.needs&needsBound != 0) != (p.bound != noBound) && f.needs&perCombination == 0 ||
		ax != noAxis && f.needs&needsAxis == 0 {
		return
	}
	k := key{field: f.name}
	if f.needs&needsBound != 0 {
		k.bound = p.bound
	}
	for _, a := range axes {
		for _, e := range ends {
			k.axis, k.end = a, e
			m.keys = append(m.keys, k)
		}
	}
}

func (p *phrase) end() end {
	e := noEnd
	for _, x := range p.ends {
		if e != noEnd && e != x {
			return bothEnds
		}
		e = x
	}
	return e
}
