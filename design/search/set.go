package search

import (
	"fmt"

	"stanchion/design"
)

// Set is columns that share one section, by their index among the columns at
// hand. Name stands in messages: `group "G1"`, `stack "B2"`; a column that
// stands alone needs none.
type Set struct {
	Name    string
	Columns []int
}

// GroupName is the name of a group's Set.
func GroupName(group string) string { return fmt.Sprintf("group %q", group) }

// GroupError says that a column of a group came by Stream, which cannot size
// groups.
type GroupError struct{ Group, Cell string }

// Error names the first such column.
func (e *GroupError) Error() string {
	return fmt.Sprintf("%s: members of group %q share one section: all columns must be held to size them", e.Cell, e.Group)
}

// partition parts columns into those that stand alone and the groups, both in
// the order of the schedule. In a check every column stands alone: its section
// is given.
func partition(cols []design.Column, mode Mode) (single []int, groups []Set) {
	place := map[string]int{}
	for i := range cols {
		group := cols[i].Group
		if group == "" || mode == Check {
			single = append(single, i)
			continue
		}
		k, ok := place[group]
		if !ok {
			k = len(groups)
			place[group] = k
			groups = append(groups, Set{Name: GroupName(group)})
		}
		groups[k].Columns = append(groups[k].Columns, i)
	}
	return single, groups
}
