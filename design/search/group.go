package search

import (
	"fmt"

	"stanchion/design"
)

// GroupError says that a column of a group came by Stream, which cannot size
// groups.
type GroupError struct{ Group, Cell string }

// Error names the first such column.
func (e *GroupError) Error() string {
	return fmt.Sprintf("%s: members of group %q share one section: all columns must be held to size them", e.Cell, e.Group)
}

// group is the columns that share one section, by index.
type group struct {
	name    string
	members []int
}

// partition parts columns into those that stand alone and the groups, both in
// the order of the schedule. In a check every column stands alone: its section
// is given.
func partition(cols []design.Column, mode Mode) (single []int, groups []group) {
	place := map[string]int{}
	for i := range cols {
		name := cols[i].Group
		if name == "" || mode == Check {
			single = append(single, i)
			continue
		}
		k, ok := place[name]
		if !ok {
			k = len(groups)
			place[name] = k
			groups = append(groups, group{name: name})
		}
		groups[k].members = append(groups[k].members, i)
	}
	return single, groups
}

// of returns the name, columns and results of the group.
func (g *group) of(cols []design.Column, results []design.Result) (string, []*design.Column, []*design.Result) {
	c := make([]*design.Column, len(g.members))
	r := make([]*design.Result, len(g.members))
	for k, i := range g.members {
		c[k], r[k] = &cols[i], &results[i]
	}
	return g.name, c, r
}
