package workbook

import (
	"bytes"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

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

// look returns how the cells of a column are drawn.
func (p *Plan) look(i int, role Role) Look {
	c := &p.block.Columns[i]
	l := Look{Role: role, Align: alignOf(c), Edge: p.edge(i)}
	if c.Numeric && role == Result {
		l.Format = Decimals(c.Decimals)
	}
	return l
}

// rowWriter passes the rows of the schedule's sheet through, and adds the
// block's cells to them.
type rowWriter struct {
	plan     *Plan
	grafting *grafting
	before   []byte
	behind   []byte
	prefix   string
	headings map[int][]headingCell // by row
	styles   []columnStyles

	out   io.Writer
	scan  *markup.Scanner
	last  int // the last row written
	cells []byte
	held  bytes.Buffer
}

// columnStyles are the style ids of a column's cells.
type columnStyles struct {
	result   int
	outcomes map[string]int
}

func (p *Plan) newRowWriter(g *grafting) (*rowWriter, error) {
	w := &rowWriter{plan: p, grafting: g, prefix: p.layout.data.Prefix, headings: map[int][]headingCell{}}
	var err error
	if w.before, w.behind, err = p.frames(); err != nil {
		return nil, err
	}
	cells, _ := p.headings()
	for _, c := range cells {
		w.headings[c.row] = append(w.headings[c.row], c)
	}
	for i := range p.block.Columns {
		s := columnStyles{result: g.styles[p.look(i, Result)], outcomes: map[string]int{}}
		for word, role := range outcomes {
			s.outcomes[word] = g.styles[p.look(i, role)]
		}
		w.styles = append(w.styles, s)
	}
	return w, nil
}

// write writes the whole sheet.
func (w *rowWriter) write(to io.Writer) error {
	in, err := w.plan.book.pkg.Stream(w.plan.sheet.part)
	if err != nil {
		return explain(w.plan.book.name, err)
	}
	defer in.Close()
	w.out, w.scan, w.last = to, markup.NewScanner(in), 0
	if err := w.rows(); err != nil {
		return err
	}
	_, err = to.Write(w.behind)
	return err
}

// rows writes what stands before the rows, and the rows.
func (w *rowWriter) rows() error {
	if _, err := w.out.Write(w.before); err != nil {
		return err
	}
	if empty, err := w.seek(); err != nil || empty {
		return orElse(err, func() error { return w.missing(maxRows + 1) })
	}
	for {
		t, err := w.scan.Next()
		if err != nil {
			return explain(w.plan.book.name, err)
		}
		switch {
		case t.Kind == markup.End && w.scan.Depth() < 2:
			return w.missing(maxRows + 1)
		case (t.Kind == markup.Start || t.Kind == markup.Empty) && string(t.Local()) == "row":
			err = w.row(t)
		default:
			_, err = w.out.Write(t.Raw)
		}
		if err != nil {
			return err
		}
	}
}

func orElse(err error, next func() error) error {
	if err != nil {
		return err
	}
	return next()
}

// seek goes to the first row; it reports whether there is none.
func (w *rowWriter) seek() (empty bool, err error) {
	for {
		t, err := w.scan.Next()
		if err != nil {
			return false, explain(w.plan.book.name, err)
		}
		if string(t.Local()) == "sheetData" && (t.Kind == markup.Start || t.Kind == markup.Empty) {
			return t.Kind == markup.Empty, nil
		}
	}
}

// missing writes the rows before the next one that the sheet does not have and
// the block needs.
func (w *rowWriter) missing(next int) error {
	last := w.plan.place.rows.lastRow
	for row := w.last + 1; row < next && row <= last; row++ {
		if !w.fill(row) {
			continue
		}
		tag := w.tall(fmt.Sprintf(`<%srow r="%d">`, w.prefix, row), row)
		if err := w.emit(tag, nil); err != nil {
			return err
		}
	}
	return nil
}

// emit writes a row: its tag, what it held, the block's cells, its end.
func (w *rowWriter) emit(tag string, held []byte) error {
	w.cells = append(w.cells, "</"...)
	w.cells = append(w.cells, w.prefix...)
	w.cells = append(w.cells, "row>"...)
	for _, b := range [][]byte{[]byte(tag), held, w.cells} {
		if _, err := w.out.Write(b); err != nil {
			return err
		}
	}
	return nil
}

// row passes one row through.
func (w *rowWriter) row(t *markup.Token) error {
	number := w.last + 1
	if v, ok := t.Attr("r"); ok {
		n, ok := parseInt([]byte(v))
		if !ok || n <= w.last {
			return explain(w.plan.book.name, fmt.Errorf("%w: row %q stands behind row %d", markup.ErrSyntax, v, w.last))
		}
		number = n
	}
	tag, empty := w.tall(string(t.Raw), number), t.Kind == markup.Empty
	if err := w.missing(number); err != nil {
		return err
	}
	w.last = number
	filled, swept := w.fill(number), w.sweeps(number)
	switch {
	case !filled && (empty || !swept):
		return w.pass(tag)
	case empty:
		return w.emit(strings.TrimRight(w.spanned(tag), "/> \t\r\n")+">", nil)
	case swept || w.crowded(number):
		return w.merge(tag, number, filled)
	}
	w.held.Reset()
	if err := w.scan.Skim(&w.held); err != nil {
		return explain(w.plan.book.name, err)
	}
	if _, err := w.scan.Next(); err != nil { // the end tag, which emit writes
		return explain(w.plan.book.name, err)
	}
	held := w.held.Bytes()
	if i := w.extension(held); i >= 0 {
		w.cells = append(w.cells, held[i:]...)
		held = held[:i]
	}
	return w.emit(w.spanned(tag), held)
}

// extension finds the extension that stands behind the cells of a row; -1 where
// there is none, as nearly always.
func (w *rowWriter) extension(row []byte) int {
	if !bytes.HasSuffix(bytes.TrimSpace(row), []byte("extLst>")) {
		return -1
	}
	return bytes.LastIndex(row, []byte("<"+w.prefix+"extLst"))
}

// pass writes a row's tag; its content follows as it is.
func (w *rowWriter) pass(tag string) error {
	if _, err := io.WriteString(w.out, tag); err != nil {
		return err
	}
	if strings.HasSuffix(tag, "/>") {
		return nil
	}
	return explain(w.plan.book.name, w.scan.Skim(w.out))
}

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

// spanned returns a row's tag with the columns that it says it spans, if it
// says so, widened.
func (w *rowWriter) spanned(tag string) string {
	if !strings.Contains(tag, "spans") {
		return tag
	}
	t := markup.Token{Raw: []byte(tag), Name: []byte(w.prefix + "row")}
	v, ok := t.Attr("spans")
	from, to, cut := strings.Cut(v, ":")
	n, err := strconv.Atoi(to)
	if !ok || !cut || err != nil || n > w.plan.place.rows.lastCol {
		return tag
	}
	return markup.SetAttrs(t.Raw, "spans", from+":"+strconv.Itoa(w.plan.place.rows.lastCol+1))
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
