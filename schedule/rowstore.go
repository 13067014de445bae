package schedule

import "strings"

// rowStore keeps the cells that are read of the rows of members, for a source
// that cannot seek.
type rowStore struct {
	wanted []int // columns, each once
	rows   []keptRow
	width  int
}

type keptRow struct {
	number int
	hidden bool
	cells  []keptCell
}

type keptCell struct {
	col int
	Cell
}

func newRowStore(l *layout) *rowStore {
	s := &rowStore{}
	for i := range l.bindings {
		s.want(l.bindings[i].Col)
	}
	for _, o := range l.old {
		s.want(o.col)
	}
	return s
}

func (s *rowStore) want(col int) {
	for _, w := range s.wanted {
		if w == col {
			return
		}
	}
	s.wanted = append(s.wanted, col)
	s.width = max(s.width, col+1)
}

func (s *rowStore) add(r *Row) {
	k := keptRow{number: r.Number, hidden: r.Hidden}
	n := 0
	for _, col := range s.wanted {
		if r.at(col).Kind != Blank {
			n++
		}
	}
	k.cells = make([]keptCell, 0, n)
	for _, col := range s.wanted {
		if c := r.at(col); c.Kind != Blank {
			k.cells = append(k.cells, keptCell{col, *c})
			k.cells[len(k.cells)-1].Text = strings.Clone(c.Text)
		}
	}
	s.rows = append(s.rows, k)
}

// row fills to with a kept row and returns it.
func (s *rowStore) row(i int, to *Row) *Row {
	k := &s.rows[i]
	to.Number, to.Hidden = k.number, k.hidden
	if cap(to.Cells) < s.width {
		to.Cells = make([]Cell, s.width)
	}
	to.Cells = to.Cells[:s.width]
	clear(to.Cells)
	for _, c := range k.cells {
		to.Cells[c.col] = c.Cell
	}
	return to
}
