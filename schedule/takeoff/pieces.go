package takeoff

import (
	"cmp"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
)

// Piece is a piece of steel as it is delivered: one column length, or several
// of a stack that run through between splices.
type Piece struct {
	Section *catalogue.Section
	Grade   string
	Number  int64   // alike
	Length  int64   // micrometres, of one
	Amounts Amounts // of all
	Items   []int   // from the bottom, by index into the items

	Marks []string // of the items, from the bottom
	Stack string
}

// Name names the piece for people: its marks.
func (p *Piece) Name() string { return strings.Join(p.Marks, " + ") }

// Splice is a joint between two pieces of a stack.
type Splice struct {
	Stack, Level string
	Lower, Upper string // sections with their grades
	Number       int64
}

// assemble puts column lengths together to pieces, and finds the splices
// between those of one stack.
func assemble(items []Item, one []Amounts, o *Options) (pieces []Piece, splices []Splice) {
	above := stackLinks(items)
	storey := storeys(above)
	lower := make([]bool, len(items)) // something stands below, in the same piece
	for i := range items {
		if j := above[i]; j >= 0 && o.runsThrough(&items[i], &items[j], storey[i]) {
			lower[j] = true
		}
	}
	for i := range items {
		if lower[i] {
			continue
		}
		p := Piece{Section: items[i].Section, Grade: items[i].Grade, Number: int64(items[i].Quantity), Stack: items[i].Stack}
		last := i
		for j := i; j >= 0; j = next(above, lower, j) {
			p.Items, p.Marks = append(p.Items, j), append(p.Marks, items[j].Mark)
			p.Length += one[j].Length
			p.Amounts.Add(one[j].times(p.Number))
			last = j
		}
		pieces = append(pieces, p)
		if j := above[last]; j >= 0 {
			splices = append(splices, spliceOf(&items[last], &items[j]))
		}
	}
	return pieces, splices
}

// next is the length above, if it belongs to the same piece.
func next(above []int, lower []bool, i int) int {
	if j := above[i]; j >= 0 && lower[j] {
		return j
	}
	return -1
}

func spliceOf(lower, upper *Item) Splice {
	return Splice{
		Stack: lower.Stack, Level: lower.To, Number: int64(min(lower.Quantity, upper.Quantity)),
		Lower: lower.Section.Name() + " " + lower.Grade, Upper: upper.Section.Name() + " " + upper.Grade,
	}
}

// runsThrough reports whether one piece goes through two lengths: their
// section is one, and the rule for splices has none between them. storey counts
// the lower length from the bottom of its line, from 0.
func (o *Options) runsThrough(lower, upper *Item, storey int) bool {
	if lower.Section != upper.Section || lower.Grade != upper.Grade || lower.Quantity != upper.Quantity {
		return false
	}
	rule := building.Options{Splices: o.Splices, Every: o.Every}
	return rule.Through(lower.SpliceSaid, lower.Splice, storey)
}

// storeys counts the lengths of every line from its bottom.
func storeys(above []int) []int {
	stands := make([]bool, len(above))
	for _, j := range above {
		if j >= 0 {
			stands[j] = true
		}
	}
	storey := make([]int, len(above))
	for i := range above {
		if stands[i] {
			continue
		}
		for j, n := i, 0; j >= 0; j, n = above[j], n+1 {
			storey[j] = n
		}
	}
	return storey
}

// line names the column line that a length belongs to: its stack or, where
// there is none, its mark.
func (it *Item) line() string { return design.LineOf(it.Stack, it.Mark) }

// stackLinks finds, for every length, the one that stands on it: of the same
// column line, and starting at the level where this one ends. -1: none. Where
// several could stand there, nothing is joined.
func stackLinks(items []Item) []int {
	type foot struct{ line, level string }
	feet := map[foot]int{}
	const several = -2
	heads := map[foot]int{}
	count := func(m map[foot]int, f foot, i int) {
		if _, ok := m[f]; ok {
			i = several
		}
		m[f] = i
	}
	for i := range items {
		it := &items[i]
		if it.From == "" || it.To == "" || design.FoldLevel(it.From) == design.FoldLevel(it.To) {
			continue
		}
		count(feet, foot{it.line(), design.FoldLevel(it.From)}, i)
		count(heads, foot{it.line(), design.FoldLevel(it.To)}, i)
	}
	above := make([]int, len(items))
	for i := range items {
		above[i] = -1
		place := foot{items[i].line(), design.FoldLevel(items[i].To)}
		if j, ok := feet[place]; ok && j >= 0 && heads[place] == i {
			above[i] = j
		}
	}
	breakRings(above)
	return above
}

// breakRings parts lengths that stand on each other in a ring.
func breakRings(above []int) {
	state := make([]int, len(above)) // 0 not seen, else the walk that saw it
	for i := range above {
		for j := i; j >= 0 && state[j] == 0; j = above[j] {
			state[j] = i + 1
			if k := above[j]; k >= 0 && state[k] == i+1 {
				above[j] = -1
			}
		}
	}
}

// comparePieces orders pieces by section and grade, the longest first.
func comparePieces(a, b *Piece) int {
	return cmp.Or(
		compareSections(a.Section, b.Section), strings.Compare(a.Grade, b.Grade),
		cmp.Compare(b.Length, a.Length),
	)
}

// compareSections orders sections by family, then as the catalogue does.
func compareSections(a, b *catalogue.Section) int {
	return cmp.Or(strings.Compare(FamilyName(a), FamilyName(b)), catalogue.Compare(a, b))
}

// cuts gathers the pieces of equal section, grade and length.
func cuts(pieces []Piece) []Cut {
	order := make([]*Piece, len(pieces))
	for i := range pieces {
		order[i] = &pieces[i]
	}
	slices.SortStableFunc(order, comparePieces)
	var list []Cut
	for i, p := range order {
		if i == 0 || comparePieces(order[i-1], p) != 0 {
			list = append(list, Cut{Section: p.Section, Grade: p.Grade, Length: p.Length})
		}
		c := &list[len(list)-1]
		c.Number += p.Number
		c.Amounts.Add(p.Amounts)
		c.Marks = append(c.Marks, p.markOf())
	}
	return list
}
