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
	Lengths []Length
	Rule    building.Options // for splices
}

// Length is a length of a stack: one with a sheet, or one that has none and
// leaves a gap.
type Length struct {
	Sheet   *working.Sheet // nil: Missing says why
	Missing *Missing
}

func (l *Length) column() *design.Column {
	if l.Sheet != nil {
		return l.Sheet.Column
	}
	return l.Missing.Column
}

// Stacks puts sheets together whose columns stand on each other, in the order
// of the schedule. Lengths that have no sheet leave a gap where their levels
// say that they stand. Splices are drawn by the rule.
func Stacks(sheets []*working.Sheet, missing []Missing, rule building.Options) []*Stack {
	var names []string
	lines := map[string][]Length{}
	add := func(l Length) {
		name := lineOf(l.column())
		if lines[name] == nil {
			names = append(names, name)
		}
		lines[name] = append(lines[name], l)
	}
	for _, s := range sheets {
		add(Length{Sheet: s})
	}
	for i := range missing {
		if c := missing[i].Column; lines[lineOf(c)] != nil && c.From != "" && c.To != "" {
			add(Length{Missing: &missing[i]})
		}
	}
	var stacks []*Stack
	for _, name := range names {
		for _, lengths := range standing(lines[name]) {
			c := lengths[0].column()
			s := &Stack{Name: c.Stack, Lengths: lengths, Rule: rule}
			if s.Name == "" {
				s.Name = c.Mark
			}
			stacks = append(stacks, s)
		}
	}
	return stacks
}

// lineOf tells the columns apart that may stand on each other.
func lineOf(c *design.Column) string { return design.LineOf(c.Stack, c.Mark) }

// standing puts the lengths of a column line, those with a sheet first, on each
// other. Gaps are left out that would take apart what stands together without
// them: their levels are not to be relied on.
func standing(line []Length) [][]Length {
	sheets := 0
	for sheets < len(line) && line[sheets].Sheet != nil {
		sheets++
	}
	below, above := stand(line[:sheets])
	withBelow, withAbove := stand(line)
	if joinsMore(below, withBelow) && joinsMore(above, withAbove) {
		below, above = withBelow, withAbove
	}
	var stacks [][]Length
	for i := range below {
		if below[i] >= 0 || above[i] < 0 {
			continue
		}
		var lengths []Length
		read := false
		for k := i; k >= 0; k = above[k] {
			lengths = append(lengths, line[k])
			read = read || line[k].Sheet != nil
		}
		if read {
			stacks = append(stacks, lengths)
		}
	}
	return stacks
}

// joinsMore reports whether all that is joined is joined alike with others.
func joinsMore(alone, with []int) bool {
	for i, j := range alone {
		if j >= 0 && with[i] != j {
			return false
		}
	}
	return true
}

func stand(line []Length) (below, above []int) {
	cols := make([]design.Column, len(line))
	for i := range line {
		cols[i] = *line[i].column()
	}
	return search.Stand(cols)
}

// spliced reports whether a splice stands below length i: where section, grade
// or number change (changes), or where the rule has one. Beside a gap nobody
// knows.
func (s *Stack) spliced(i int) (splice, changes bool) {
	below, above := s.Lengths[i-1].Sheet, s.Lengths[i].Sheet
	if below == nil || above == nil {
		return false, false
	}
	storey := 0 // of the length below, from the last gap
	for k := i - 2; k >= 0 && s.Lengths[k].Sheet != nil; k-- {
		storey++
	}
	changes = below.Section != above.Section || below.Grade != above.Grade
	c := below.Column
	return changes || c.Quantity != above.Column.Quantity || !s.Rule.Through(c.SpliceSaid, c.Splice, storey), changes
}

// heights are those of the lengths, mm. One that could not be read is drawn as
// high as the others are on average.
func (s *Stack) heights() []float64 {
	list, known, sum := make([]float64, len(s.Lengths)), 0, 0.0
	for i := range s.Lengths {
		if list[i] = s.Lengths[i].column().Length; list[i] > 0 {
			known, sum = known+1, sum+list[i]
		}
	}
	for i := range list {
		if !(list[i] > 0) {
			list[i] = sum / float64(known)
		}
	}
	return list
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
