package text

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"slices"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
)

// Writer writes the user's columns to the letter and the result columns to
// their right, in the dialect of the input.
type Writer struct {
	f       *File
	plan    *schedule.Plan
	cols    []schedule.ResultColumn
	records *recordReader
	enc     io.WriteCloser
	w       *bufio.Writer
	old     []int
	width   int            // fields of the user's own in a full row
	waiting map[int]string // result fields of rows further down, by line
	blank   string         // result fields of a row that has none
	values  []schedule.Value
	fields  []field
	delim   string
}

// NewWriter returns a writer of the annotated schedule to w. The file stays
// open until the writer is closed.
func (f *File) NewWriter(w io.Writer, plan *schedule.Plan, cols []schedule.ResultColumn) (*Writer, error) {
	if _, err := w.Write(f.form.bom); err != nil {
		return nil, err
	}
	enc := f.form.encoder(w)
	return &Writer{
		f: f, plan: plan, cols: cols, records: f.records(), enc: enc, w: bufio.NewWriterSize(enc, 256<<10),
		old: plan.Header.Old, width: plan.Header.Cells - len(plan.Header.Old), waiting: map[int]string{},
		blank: strings.Repeat(string(f.delim), len(cols)), delim: string(f.delim),
	}, nil
}

// Write writes the rows up to and including the first row of a member; members
// come in the order of Plan.Members.
func (w *Writer) Write(m *schedule.Member, r *design.Result) error {
	for {
		rec, err := w.records.next()
		if err == io.EOF {
			return fmt.Errorf("%s: the file has changed while it was read", w.f.name)
		}
		if err != nil {
			return err
		}
		if rec.line != m.Rows[0] {
			if err := w.other(&rec); err != nil {
				return err
			}
			continue
		}
		w.values = schedule.Cells(w.values[:0], w.cols, m, r)
		if len(m.Rows) > 1 {
			w.wait(m, r)
		}
		return w.row(&rec, w.render(w.values))
	}
}

// wait keeps the fields of a member's further rows until they come.
func (w *Writer) wait(m *schedule.Member, r *design.Result) {
	text := w.render(schedule.ContinuedCells(nil, w.cols, m, r))
	for _, line := range m.Rows[1:] {
		w.waiting[line] = text
	}
}

// render writes result fields, each with the delimiter before it.
func (w *Writer) render(values []schedule.Value) string {
	var b strings.Builder
	for i := range values {
		b.WriteByte(w.f.delim)
		if v := &values[i]; v.Kind != schedule.Blank {
			b.WriteString(quote(v.Format(&w.cols[i], w.plan.Decimal), w.f.delim, w.f.quotes))
		}
	}
	return b.String()
}

// other writes a row that opens no member.
func (w *Writer) other(rec *record) error {
	if text, ok := w.waiting[rec.line]; ok {
		delete(w.waiting, rec.line)
		return w.row(rec, text)
	}
	if rec.line == w.plan.Header.Last {
		return w.row(rec, w.headings())
	}
	full := bytes.Count(rec.raw, []byte(w.delim))+1 >= w.width && len(bytes.TrimSpace(rec.raw)) > 0 && !(w.f.sepLine && rec.pos == 0)
	if full && len(split(string(rec.raw), w.f.delim, nil)) >= w.width {
		return w.row(rec, w.blank)
	}
	return w.raw(string(rec.raw), string(rec.term))
}

func (w *Writer) headings() string {
	var b strings.Builder
	for i := range w.cols {
		b.WriteByte(w.f.delim)
		b.WriteString(quote(w.cols[i].Heading(), w.f.delim, w.f.quotes))
	}
	return b.String()
}

// row writes the user's fields of a record, without those of an earlier run,
// and result fields behind them.
func (w *Writer) row(rec *record, results string) error {
	raw := string(rec.raw)
	w.fields = split(raw, w.f.delim, w.fields[:0])
	n := len(w.fields)
	if len(w.old) > 0 {
		raw, n = w.withoutOld()
	}
	if missing := w.width - n; missing > 0 {
		raw += strings.Repeat(w.delim, missing)
	}
	return w.raw(raw, results, string(rec.term))
}

// withoutOld joins the fields that no earlier run wrote.
func (w *Writer) withoutOld() (string, int) {
	var b strings.Builder
	n := 0
	for i := range w.fields {
		if slices.Contains(w.old, i) {
			continue
		}
		if n > 0 {
			b.WriteByte(w.f.delim)
		}
		b.WriteString(w.fields[i].raw)
		n++
	}
	return b.String(), n
}

func (w *Writer) raw(parts ...string) error {
	for _, p := range parts {
		if _, err := w.w.WriteString(p); err != nil {
			return err
		}
	}
	return nil
}

// Close writes the rows below the last member. It closes neither the file nor
// what it writes to.
func (w *Writer) Close() error {
	for {
		rec, err := w.records.next()
		if err == io.EOF {
			break
		}
		if err != nil {
			return err
		}
		if err := w.other(&rec); err != nil {
			return err
		}
	}
	if err := w.w.Flush(); err != nil {
		return err
	}
	return w.enc.Close()
}
