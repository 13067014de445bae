package workbook

import "stanchion/schedule"

// merging repeats the first cell of merged ranges in the others.
type merging struct {
	all    []area // by rising first row
	next   int    // the first of all that has not begun
	active []merge
}

// merge is a merged range that has begun, and what its first cell holds.
type merge struct {
	area
	value schedule.Cell
}

// Bounds that no schedule comes near, and that keep a hostile file from
// keeping the program busy.
const (
	maxMergedWidth  = 256    // columns over which a value is repeated
	maxMergedActive = 16_384 // merged ranges in one row
)

// apply fills the merged cells of a row. Rows must come in order. A row that
// holds nothing itself is only looked at: merging makes no rows.
func (m *merging) apply(row *schedule.Row, filled bool) {
	m.begin(row)
	kept := m.active[:0]
	for _, a := range m.active {
		if a.lastRow < row.Number {
			continue
		}
		kept = append(kept, a)
		if filled {
			a.fill(row)
		}
	}
	m.active = kept
}

// begin takes up the ranges whose first row has come. One whose first row has
// been passed over, being blank, repeats nothing.
func (m *merging) begin(row *schedule.Row) {
	for ; m.next < len(m.all) && m.all[m.next].firstRow <= row.Number; m.next++ {
		a := m.all[m.next]
		if a.firstRow < row.Number || a.firstCol >= len(row.Cells) || len(m.active) >= maxMergedActive {
			continue
		}
		if v := row.Cells[a.firstCol]; v.Kind != schedule.Blank {
			v.Merged = true
			m.active = append(m.active, merge{a, v})
		}
	}
}

func (m *merge) fill(row *schedule.Row) {
	last := min(m.lastCol, m.firstCol+maxMergedWidth-1)
	for len(row.Cells) <= last {
		row.Cells = append(row.Cells, schedule.Cell{})
	}
	for col := m.firstCol; col <= last; col++ {
		if col == m.firstCol && row.Number == m.firstRow {
			continue
		}
		row.Cells[col] = m.value
	}
}
