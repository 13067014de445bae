package calcsheet

import (
	"stanchion/design/working"
)

// setValue is a given value set in type.
type setValue struct {
	symbol, value, together box
	note                    []box
}

func (s *setter) ofValue(v *working.Value) *setValue {
	if t, ok := s.given[v]; ok {
		return t
	}
	t := &setValue{symbol: typeset(v.Left), value: row(textBox("=", upright, 1), gap(space), resultBox(v.Number, v.Unit))}
	t.together = row(t.symbol, gap(space), t.value)
	if v.Note != "" {
		t.note = words("("+v.Note+")", upright)
	}
	s.given[v] = t
	return t
}

// values sets given values, as many on a line as find room.
func (s *setter) values(list working.Values, left float64) []line {
	f := filler{width: s.width, indent: 0}
	for i := range list {
		t := s.ofValue(&list[i])
		if i == 0 || f.at+1.2+t.together.w > f.width {
			f.start(0)
			f.put(&t.symbol)
			f.at = max(left, t.symbol.w+space)
			f.put(&t.value)
		} else {
			f.at += 1.2
			f.put(&t.together)
		}
		if len(t.note) == 0 {
			continue
		}
		f.at += space
		f.indent = left
		for k := range t.note {
			f.place(&t.note[k])
		}
		f.indent = 0
	}
	return f.lines
}
