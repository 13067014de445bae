package workbook

import (
	"bytes"
	"fmt"
	"io"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

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
		for word, role := range p.words() {
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
