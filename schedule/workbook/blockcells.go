package workbook

import (
	"math"
	"strconv"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
)

// outcomes are the words by which a cell is known to hold a status.
var outcomes = map[string]Role{
	design.Passes.String():    Passes,
	design.Fails.String():     Fails,
	design.NoSection.String(): NoSection,
	design.NotRead.String():   NotRead,
}

// words are the texts by which cells of the block are known to need a look of
// their own.
func (p *Plan) words() map[string]Role {
	if p.block.Words != nil {
		return p.block.Words
	}
	return outcomes
}

// look returns how the cells of a column are drawn.
func (p *Plan) look(i int, role Role) Look {
	c := &p.block.Columns[i]
	l := Look{Role: role, Align: alignOf(c), Edge: p.edge(i)}
	if c.Numeric && role == Result {
		l.Format = Decimals(c.Decimals)
	}
	return l
}

// columnStyles are the style ids of a column's cells.
type columnStyles struct {
	result   int
	outcomes map[string]int
}

// tall gives the heading row, where it has no height of its own, the height
// that its text needs. Not every spreadsheet program finds that by itself.
func (w *rowWriter) tall(tag string, row int) string {
	p := w.plan
	if _, given := p.sheet.extent.heights[row]; given || row != p.place.heading {
		return tag
	}
	height := math.Ceil(headingLines * lineHeight * p.letters.size)
	return markup.SetAttrs([]byte(tag), "ht", strconv.FormatFloat(height, 'f', -1, 64))
}

// fill makes the block's cells of a row, and reports whether there are any.
func (w *rowWriter) fill(row int) bool {
	w.cells = w.cells[:0]
	if cells, ok := w.headings[row]; ok {
		for _, c := range cells {
			w.textCell(c.col, row, w.grafting.styles[c.look], c.text)
		}
		return true
	}
	if row <= w.plan.place.heading || row > w.plan.block.LastRow {
		return false
	}
	values := w.plan.block.Cells(row)
	if len(values) == 0 {
		return false
	}
	for i := range w.plan.block.Columns {
		v := schedule.Value{}
		if i < len(values) {
			v = values[i]
		}
		w.value(i, row, v)
	}
	return true
}

func (w *rowWriter) value(i, row int, v schedule.Value) {
	col, s := w.plan.place.rows.firstCol+i, &w.styles[i]
	switch v.Kind {
	case schedule.Number:
		if math.IsNaN(v.Number) || math.IsInf(v.Number, 0) {
			v.Text = ""
			break
		}
		w.open(col, row, s.result)
		w.cells = append(w.cells, "><"...)
		w.cells = append(w.cells, w.prefix...)
		w.cells = append(w.cells, "v>"...)
		w.cells = strconv.AppendFloat(w.cells, v.Number, 'g', -1, 64)
		w.cells = append(w.cells, "</"...)
		w.cells = append(w.cells, w.prefix...)
		w.cells = append(w.cells, "v>"...)
		w.close()
		return
	case schedule.Blank:
		v.Text = ""
	}
	style := s.result
	if id, ok := s.outcomes[v.Text]; ok && !w.plan.block.Columns[i].Numeric {
		style = id
	}
	w.textCell(col, row, style, v.Text)
}

// textCell makes a cell that holds a text itself; an empty one where there is
// none.
func (w *rowWriter) textCell(col, row, style int, text string) {
	w.open(col, row, style)
	if text == "" {
		w.cells = append(w.cells, "/>"...)
		return
	}
	w.cells = append(w.cells, ` t="inlineStr">`...)
	w.cells = appendInline(w.cells, w.prefix, clip(text))
	w.close()
}

func (w *rowWriter) open(col, row, style int) {
	w.cells = append(w.cells, '<')
	w.cells = append(w.cells, w.prefix...)
	w.cells = append(w.cells, `c r="`...)
	w.cells = appendCell(w.cells, col, row)
	w.cells = append(w.cells, '"')
	if style > 0 {
		w.cells = append(w.cells, ` s="`...)
		w.cells = strconv.AppendInt(w.cells, int64(style), 10)
		w.cells = append(w.cells, '"')
	}
}

func (w *rowWriter) close() {
	w.cells = append(w.cells, "</"...)
	w.cells = append(w.cells, w.prefix...)
	w.cells = append(w.cells, "c>"...)
}
