package calcsheet

import (
	"io"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/search"
	"stanchion/design/working"
)

// Stack is a column line: its lengths, the lowest first.
type Stack struct {
	Name    string
	Lengths []*working.Sheet
	Rule    building.Options // for splices
}

// Stacks puts sheets together whose columns stand on each other, in the order
// of the lowest. Splices are drawn by the rule.
func Stacks(sheets []*working.Sheet, rule building.Options) []*Stack {
	cols := make([]design.Column, len(sheets))
	for i, s := range sheets {
		cols[i] = *s.Column
	}
	below, above := search.Stand(cols)
	var stacks []*Stack
	for i := range sheets {
		if below[i] >= 0 || above[i] < 0 {
			continue
		}
		s := &Stack{Name: cols[i].Stack, Rule: rule}
		if s.Name == "" {
			s.Name = cols[i].Mark
		}
		for k := i; k >= 0; k = above[k] {
			s.Lengths = append(s.Lengths, sheets[k])
		}
		stacks = append(stacks, s)
	}
	return stacks
}

// spliced reports whether a splice stands below length i: where section, grade
// or number change (changes), or where the rule has one.
func (s *Stack) spliced(i int) (splice, changes bool) {
	below, above := s.Lengths[i-1], s.Lengths[i]
	changes = below.Section != above.Section || below.Grade != above.Grade
	c := below.Column
	return changes || c.Quantity != above.Column.Quantity || !s.Rule.Through(c.SpliceSaid, c.Splice, i-1), changes
}

// height is the height of the stack, mm.
func (s *Stack) height() float64 {
	h := 0.0
	for _, l := range s.Lengths {
		h += l.Column.Length
	}
	return h
}

// The size of the elevation of a stack in a file of its own, mm.
const (
	svgWidth  = 84.0
	svgLength = 27.0 // room for one length
	svgRoom   = 22.0 // above and below
)

// SVG writes the elevation of a stack: levels, sections, splices, utilisation.
func (s *Stack) SVG(w io.Writer) error {
	c := new(svgCanvas)
	h := svgRoom + svgLength*float64(len(s.Lengths))
	stackElevation(c, s, 3, 3, svgWidth-6, h-6)
	_, err := w.Write(c.bytes(svgWidth, h, "Stack "+s.Name))
	return err
}
