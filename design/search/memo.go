package search

import (
	"slices"

	"stanchion/design"
)

// remembered is how many lists a worker keeps at hand. The rows of a schedule
// choose from few.
const remembered = 16

// memo keeps the lists that a worker's last columns chose from, so that the
// engine's own table, whose keys have to be spelled out, is seldom asked.
type memo struct {
	kept []memoEntry
	next int // the one to be replaced when all are in use
}

type memoEntry struct {
	given  string
	choice design.Choice
	grades []string
	list   *List
	err    error
}

// list returns what find finds for a column, from memory where it has been
// found for the like.
func (m *memo) list(col *design.Column, find func(*design.Column) (*List, error)) (*List, error) {
	for i := range m.kept {
		if e := &m.kept[i]; e.serves(col) {
			return e.list, e.err
		}
	}
	// The column's memory may be used again for another: its slices are copied.
	e := memoEntry{given: col.Given, choice: col.Choice, grades: slices.Clone(col.Grades)}
	e.choice.Families = slices.Clone(e.choice.Families)
	e.list, e.err = find(col)
	if len(m.kept) < remembered {
		m.kept = append(m.kept, e)
	} else {
		m.kept[m.next] = e
		m.next = (m.next + 1) % remembered
	}
	return e.list, e.err
}

// serves reports whether a column chooses from the same candidates.
func (e *memoEntry) serves(col *design.Column) bool {
	a, b := &e.choice, &col.Choice
	return e.given == col.Given &&
		a.MinDepth == b.MinDepth && a.MaxDepth == b.MaxDepth &&
		a.MinWidth == b.MinWidth && a.MaxWidth == b.MaxWidth &&
		a.MinThickness == b.MinThickness && a.MaxThickness == b.MaxThickness &&
		slices.Equal(a.Families, b.Families) && slices.Equal(e.grades, col.Grades)
}
