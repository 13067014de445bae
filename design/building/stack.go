package building

import (
	"cmp"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"stanchion/design"
)

// stack is the lengths of one column line that are decided on together, from
// the bottom up.
type stack struct {
	name    string
	lengths []int  // columns
	splice  []bool // the section may change above the length
}

// stacks finds the stacks whose lengths are joined, in the order of the
// schedule, and notes for columns whose place in a stack is in doubt.
func stacks(cols []design.Column, o *Options, set *design.Settings) (all []stack, notes map[int]string) {
	notes = map[int]string{}
	for _, line := range lines(cols, o) {
		parts, doubt := ordered(cols, line)
		for _, i := range line {
			if doubt != "" {
				notes[i] = fmt.Sprintf("stack %q: %s", cols[i].Stack, doubt)
			}
		}
		for _, lengths := range parts {
			if len(lengths) > 1 {
				all = append(all, stack{cols[lengths[0]].Stack, lengths, spliced(cols, lengths, o, set, notes)})
			}
		}
	}
	return all, notes
}

// lines returns the columns of each stack that the rule for splices joins, in
// the order of the schedule.
func lines(cols []design.Column, o *Options) [][]int {
	place := map[string]int{}
	var all [][]int
	for i := range cols {
		c := &cols[i]
		if c.Stack == "" || o.Splices == AsScheduled && !c.SpliceSaid {
			continue
		}
		name := design.FoldName(c.Stack)
		k, ok := place[name]
		if !ok {
			k = len(all)
			place[name] = k
			all = append(all, nil)
		}
		all[k] = append(all[k], i)
	}
	return all
}

// spliced says above which lengths the section may change. A rule that counts
// lengths gives way where two of them can have no section in common.
func spliced(cols []design.Column, lengths []int, o *Options, set *design.Settings, notes map[int]string) []bool {
	splice := make([]bool, len(lengths))
	for k, i := range lengths {
		switch o.Splices {
		case EveryNth:
			splice[k] = (k+1)%o.Every == 0
			if k+1 == len(lengths) || splice[k] {
				continue
			}
			if why := apart(&cols[i], &cols[lengths[k+1]], set); why != "" {
				splice[k] = true
				note(notes, lengths[k+1], fmt.Sprintf("stack %q: a splice stands below this length too: %s", cols[i].Stack, why))
			}
		case WhereItPays:
			splice[k] = true
		default:
			splice[k] = cols[i].Splice
		}
	}
	return splice
}

// note adds to the note of a column.
func note(notes map[int]string, i int, text string) {
	if notes[i] != "" {
		text = notes[i] + "; " + text
	}
	notes[i] = text
}

// apart says why two lengths can have no section in common; empty: they can.
func apart(a, b *design.Column, set *design.Settings) string {
	switch {
	case a.Given != "" && b.Given != "":
		if a.Given != b.Given {
			return "other sections are given"
		}
	case a.Given != "" || b.Given != "": // the given one stands for both
	case !common(a.Choice.Families, b.Choice.Families, set.Families):
		return "other families are given"
	case !common(a.Grades, b.Grades, set.Grades):
		return "other grades are given"
	}
	return ""
}

// common reports whether two lists share a value; an empty one is the
// settings' own.
func common(a, b, own []string) bool {
	if len(a) == 0 && len(b) == 0 {
		return true
	}
	if len(a) == 0 {
		a = own
	}
	if len(b) == 0 {
		b = own
	}
	return slices.ContainsFunc(a, func(s string) bool { return slices.Contains(b, s) })
}

// ordered puts the lengths of a stack in order from the bottom up: by levels
// where one's top is the next one's bottom, else by the heights that stand for
// levels. Where levels leave a gap the lengths fall into parts, each a stack
// of its own. The note says what was done where it can be doubted.
func ordered(cols []design.Column, line []int) (parts [][]int, note string) {
	if !slices.ContainsFunc(line, func(i int) bool { return cols[i].From != "" || cols[i].To != "" }) {
		return [][]int{line}, "no levels are given: its lengths are taken as listed from the bottom up"
	}
	if twice := double(cols, line); twice != "" {
		return nil, twice + ": its lengths are sized one by one"
	}
	parts = joined(cols, line)
	if len(parts) == 1 {
		return parts, ""
	}
	if byHeight, ok := sortedByHeight(cols, line); ok {
		return [][]int{byHeight}, ""
	}
	return parts, "its levels do not join: " + spans(cols, parts) + " are sized each by itself"
}

// spans names parts of a stack by the levels from which to which they go.
func spans(cols []design.Column, parts [][]int) string {
	var names []string
	for _, part := range parts {
		names = append(names, fmt.Sprintf("%s to %s", named(cols[part[0]].From), named(cols[part[len(part)-1]].To)))
	}
	return strings.Join(names[:len(names)-1], ", ") + " and " + names[len(names)-1]
}

// named is a level, or what stands for one that is not given.
func named(level string) string {
	if level == "" {
		return "no level"
	}
	return level
}

// double names two lengths that begin or end at the same level.
func double(cols []design.Column, line []int) string {
	for _, of := range []func(*design.Column) string{
		func(c *design.Column) string { return c.From },
		func(c *design.Column) string { return c.To },
	} {
		first := map[string]int{}
		for _, i := range line {
			l := design.FoldLevel(of(&cols[i]))
			if l == "" {
				continue
			}
			if k, ok := first[l]; ok {
				return fmt.Sprintf("%s and %s stand at one level", cols[k].Cell, cols[i].Cell)
			}
			first[l] = i
		}
	}
	return ""
}

// joined follows the levels from each length that stands on no other. A ring
// of levels, which has no such length, falls into single lengths.
func joined(cols []design.Column, line []int) [][]int {
	from, to := map[string]int{}, map[string]bool{}
	for _, i := range line {
		if l := design.FoldLevel(cols[i].From); l != "" {
			from[l] = i
		}
		to[design.FoldLevel(cols[i].To)] = true
	}
	seen := map[int]bool{}
	var parts [][]int
	for _, i := range line {
		if l := design.FoldLevel(cols[i].From); l != "" && to[l] {
			continue // stands on another
		}
		var part []int
		for next, ok := i, true; ok && !seen[next]; {
			seen[next] = true
			part = append(part, next)
			l := design.FoldLevel(cols[next].To)
			next, ok = from[l]
			ok = ok && l != ""
		}
		parts = append(parts, part)
	}
	for _, i := range line {
		if !seen[i] {
			parts = append(parts, []int{i})
		}
	}
	return parts
}

// sortedByHeight sorts lengths by the number at which each begins, and reports
// whether every one begins at a number of its own.
func sortedByHeight(cols []design.Column, line []int) ([]int, bool) {
	height := map[int]float64{}
	for _, i := range line {
		v, err := strconv.ParseFloat(strings.TrimPrefix(strings.TrimSpace(cols[i].From), "+"), 64)
		if err != nil {
			return nil, false
		}
		height[i] = v
	}
	out := slices.Clone(line)
	slices.SortFunc(out, func(a, b int) int { return cmp.Compare(height[a], height[b]) })
	for k := 1; k < len(out); k++ {
		if height[out[k]] == height[out[k-1]] {
			return nil, false
		}
	}
	return out, true
}

// Tied says which columns share a section with others, or stand in a stack
// whose sections depend on one another: their sections are decided together.
func Tied(cols []design.Column, o *Options, set *design.Settings) []bool {
	out := make([]bool, len(cols))
	members := map[string]int{}
	for i := range cols {
		if g := cols[i].Group; g != "" {
			members[design.FoldName(g)]++
		}
	}
	for i := range cols {
		out[i] = members[design.FoldName(cols[i].Group)] > 1
	}
	all, _ := stacks(cols, o, set)
	for _, s := range all {
		for _, i := range s.lengths {
			out[i] = true
		}
	}
	return out
}
