package workbook

import (
	"io"

	"stanchion/schedule/workbook/internal/markup"
)

// sweeps reports whether a row may hold results of an earlier run.
func (w *rowWriter) sweeps(row int) bool {
	o := &w.plan.place.old
	return len(o.columns) > 0 && o.area.firstRow <= row && row <= o.area.lastRow
}

// crowded reports whether a row holds cells where the block stands, or beyond.
func (w *rowWriter) crowded(row int) bool {
	e := &w.plan.sheet.extent
	return max(furthest(e.valued, row, row), furthest(e.styled, row, row)) > w.plan.place.rows.firstCol
}

// merge passes a row through cell by cell: what an earlier run left is dropped,
// and the block's cells take their place among the others.
func (w *rowWriter) merge(tag string, row int, filled bool) error {
	block := append([]byte(nil), w.cells...)
	w.held.Reset()
	pending := filled
	next := 0
	depth := w.scan.Depth()
	for {
		t, err := w.scan.Next()
		if err != nil {
			return explain(w.plan.book.name, err)
		}
		if t.Kind == markup.End && w.scan.Depth() < depth {
			break
		}
		cell := (t.Kind == markup.Start || t.Kind == markup.Empty) && string(t.Local()) == "c"
		if !cell {
			if pending && t.Kind != markup.Other && t.Kind != markup.Text {
				w.held.Write(block) // before anything that is no cell
				pending = false
			}
			w.held.Write(t.Raw)
			if t.Kind == markup.Start {
				err = w.rest(&w.held)
			}
		} else {
			col := next
			if v, ok := t.Attr("r"); ok {
				col, _, _ = parseCell([]byte(v))
			}
			next = col + 1
			if pending && col > w.plan.place.rows.lastCol {
				w.held.Write(block)
				pending = false
			}
			err = w.cell(t, row, col, filled)
		}
		if err != nil {
			return err
		}
	}
	w.cells = w.cells[:0]
	if pending {
		w.cells = block
	}
	if filled {
		tag = w.spanned(tag)
	}
	return w.emit(tag, w.held.Bytes())
}

// cell passes one cell of the user's through, or drops it.
func (w *rowWriter) cell(t *markup.Token, row, col int, filled bool) error {
	pl := &w.plan.place
	gone := pl.old.columns[col] && w.sweeps(row) || filled && pl.rows.firstCol <= col && col <= pl.rows.lastCol
	var to io.Writer = &w.held
	if gone {
		to = io.Discard
	}
	tag := string(t.Raw)
	if _, ok := t.Attr("r"); !ok { // its place may change
		tag = markup.SetAttrs(t.Raw, "r", cellName(col, row))
	}
	start := t.Kind == markup.Start
	if _, err := io.WriteString(to, tag); err != nil || !start {
		return err
	}
	return w.rest(to)
}

// rest passes the content and the end of the open element.
func (w *rowWriter) rest(to io.Writer) error {
	if err := w.scan.Skim(to); err != nil {
		return explain(w.plan.book.name, err)
	}
	t, err := w.scan.Next()
	if err != nil {
		return explain(w.plan.book.name, err)
	}
	_, err = to.Write(t.Raw)
	return err
}
