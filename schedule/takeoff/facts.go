package takeoff

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"stanchion/design"
)

// Facts are what there is to say of the whole beside its amounts, as pairs of
// a name and a value.
func (t *TakeOff) Facts() [][2]string {
	var list [][2]string
	add := func(name, format string, args ...any) {
		list = append(list, [2]string{name, fmt.Sprintf(format, args...)})
	}
	add("splices", "%d", t.SpliceCount())
	if p := t.Longest; p != nil {
		add("longest piece", "%s m: %s, %s %s", Metres(p.Length), p.Name(), p.Section.Name(), p.Grade)
	}
	switch n := len(t.TooLong); {
	case t.Transport > 0 && n == 0:
		add("transport", "no piece is longer than %s m", Metres(whole(t.Transport*1e3)))
	case n > 0:
		add("transport", "✗ %s longer than %s m: %s", plural(pieceCount(t.TooLong), "piece is", "pieces are"), Metres(whole(t.Transport*1e3)), longNames(t.TooLong))
	}
	if m := t.Unpriced.Mass; t.HasCost() && m > 0 {
		add("cost", "✗ no rate for %s t of it", decimals(m, 6, 3, '.'))
	}
	if m := t.Unrated.Mass; t.HasCarbon() && m > 0 {
		add("carbon", "✗ no factor for %s t of it", decimals(m, 6, 3, '.'))
	}
	return list
}

func pieceCount(pieces []Piece) (n int64) {
	for i := range pieces {
		n += pieces[i].Number
	}
	return n
}

// longNames names the first few pieces with their lengths.
func longNames(pieces []Piece) string {
	const shown = 4
	var names []string
	for i := range pieces[:min(shown, len(pieces))] {
		names = append(names, pieces[i].markOf()+" "+Metres(pieces[i].Length)+" m")
	}
	s := strings.Join(names, ", ")
	if more := len(pieces) - shown; more > 0 {
		s += fmt.Sprintf(" and %d more", more)
	}
	return s
}

func plural(n int64, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}

// Metres writes a length in micrometres in m, to the mm or as exactly as it is.
func Metres(micrometres int64) string { return decimals(micrometres, 6, 3, '.') }

// SpliceKinds gathers the splices that join the same sections at one level.
func (t *TakeOff) SpliceKinds() []Splice {
	type kind struct{ level, lower, upper string }
	place := map[kind]int{}
	var list []Splice
	for _, s := range t.Splices {
		k := kind{design.FoldLevel(s.Level), s.Lower, s.Upper}
		n, ok := place[k]
		if !ok {
			n = len(list)
			place[k] = n
			list = append(list, Splice{Level: s.Level, Lower: s.Lower, Upper: s.Upper})
		}
		list[n].Number += s.Number
	}
	rank := map[string]int{}
	for i := range t.Levels {
		rank[design.FoldLevel(t.Levels[i].To)] = i
	}
	slices.SortStableFunc(list, func(a, b Splice) int {
		return cmp.Or(cmp.Compare(rank[design.FoldLevel(a.Level)], rank[design.FoldLevel(b.Level)]), strings.Compare(a.Lower, b.Lower), strings.Compare(a.Upper, b.Upper))
	})
	return list
}
