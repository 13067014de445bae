package search

import (
	"cmp"
	"fmt"
	"slices"

	"stanchion/design"
)

// standing says which length of a column line stands on which, by index among
// the columns at hand.
type standing struct {
	below []int    // the length that each stands on, -1 if none
	above []int    // the length that stands on each, -1 if none
	notes []string // by length: why its line could not be put in order
}

// stand puts the lengths of every column line in order by their levels: a
// length stands on the one whose upper level is its lower level. A line is the
// lengths with one grid reference, or where there is none with one mark, that
// give their levels. Where a line does not give them all, the axial force tells
// the order if it grows downwards in every combination. Nothing is guessed: a
// line that neither tells, or whose levels are doubled or go round in a ring,
// is taken apart. Notes say what was done.
func stand(cols []design.Column) standing {
	s := standing{below: slices.Repeat([]int{-1}, len(cols)), above: slices.Repeat([]int{-1}, len(cols)),
		notes: make([]string, len(cols))}
	lines := map[string][]int{}
	for i := range cols {
		if name := lineOf(&cols[i]); name != "" {
			lines[name] = append(lines[name], i)
		}
	}
	for _, line := range lines {
		if len(line) > 1 {
			s.order(cols, nameOf(&cols[line[0]]), line)
		}
	}
	return s
}

// Stand returns which length of a column line each column stands on and which
// stands on it, by index, -1 for none: the order in which SizeAll and CheckAll
// settle the lines.
func Stand(cols []design.Column) (below, above []int) {
	s := stand(cols)
	return s.below, s.above
}

// lineOf tells the column line of a length; empty where it is in none.
func lineOf(col *design.Column) string {
	if col.Stack == "" && (col.Mark == "" || col.From == "" || col.To == "") {
		return ""
	}
	return design.LineOf(col.Stack, col.Mark)
}

// nameOf names the column line of a length as the schedule does.
func nameOf(col *design.Column) string {
	if col.Stack != "" {
		return "stack " + col.Stack
	}
	return "mark " + col.Mark
}

// order joins the lengths of one line.
func (s *standing) order(cols []design.Column, name string, line []int) {
	ends := map[string]int{} // the length that ends at a level
	for _, i := range line {
		c := &cols[i]
		if c.From == "" || c.To == "" {
			s.byForce(cols, name, line)
			return
		}
		if _, taken := ends[design.FoldLevel(c.To)]; taken {
			s.apart(line, fmt.Sprintf("%s: two lengths end at level %s: each is designed on its own", name, c.To))
			return
		}
		ends[design.FoldLevel(c.To)] = i
	}
	bases := 0
	for _, i := range line {
		j, ok := ends[design.FoldLevel(cols[i].From)]
		if !ok {
			bases++
			continue
		}
		if s.above[j] >= 0 || j == i {
			s.apart(line, fmt.Sprintf("%s: two lengths begin at level %s: each is designed on its own", name, cols[i].From))
			return
		}
		s.below[i], s.above[j] = j, i
	}
	switch {
	case bases == 0:
		s.apart(line, name+": its levels go round in a ring: each length is designed on its own")
	case bases > 1:
		s.note(line, fmt.Sprintf("%s: its levels do not join: it is designed as %d columns", name, bases))
	}
}

// byForce joins the lengths of a line that does not give all its levels by
// their axial force.
func (s *standing) byForce(cols []design.Column, name string, line []int) {
	line = slices.Clone(line)
	slices.SortStableFunc(line, func(i, j int) int { return cmp.Compare(footForce(&cols[j]), footForce(&cols[i])) })
	for k := 1; k < len(line); k++ {
		if !lighter(&cols[line[k]], &cols[line[k-1]]) {
			s.apart(line, name+": neither levels nor axial forces tell which length stands on which: each is designed on its own")
			return
		}
	}
	for k := 1; k < len(line); k++ {
		s.below[line[k]], s.above[line[k-1]] = line[k-1], line[k]
	}
	s.note(line, name+": not every length gives its levels: they are put in order by their axial forces, the greatest at the bottom")
}

// footForce is the axial force at the foot of a length in its first
// combination.
func footForce(col *design.Column) float64 {
	if len(col.Combinations) == 0 {
		return 0
	}
	return col.Combinations[0].NEd
}

// lighter reports whether one length carries less than another in every
// combination, and in the same ones.
func lighter(upper, lower *design.Column) bool {
	if len(upper.Combinations) == 0 || len(upper.Combinations) != len(lower.Combinations) {
		return false
	}
	for i := range upper.Combinations {
		u, l := &upper.Combinations[i], &lower.Combinations[i]
		if u.Name != l.Name || !(u.NEd < l.NEd) {
			return false
		}
	}
	return true
}

// apart takes a line to pieces.
func (s *standing) apart(line []int, why string) {
	for _, i := range line {
		s.below[i], s.above[i] = -1, -1
	}
	s.note(line, why)
}

// tell puts the notes into the results.
func (s *standing) tell(results []design.Result) {
	for i, text := range s.notes {
		if text != "" {
			results[i].Notes = append(results[i].Notes, text)
		}
	}
}

func (s *standing) note(line []int, text string) {
	for _, i := range line {
		s.notes[i] = text
	}
}
