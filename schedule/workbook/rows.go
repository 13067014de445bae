package workbook

import (
	"fmt"
	"io"
	"iter"
	"strconv"

	"stanchion/schedule"
	"stanchion/schedule/workbook/internal/markup"
)

// Rows yields the rows of a sheet that hold anything, in order, merged cells
// repeated. The row is valid until the next one.
func (b *Book) Rows(name string) iter.Seq2[*schedule.Row, error] {
	return func(yield func(*schedule.Row, error) bool) {
		r, err := b.reader(name)
		if err != nil {
			yield(nil, explain(b.name, err))
			return
		}
		defer r.close()
		for {
			row, err := r.next()
			if err == io.EOF {
				r.sheet.extent = r.extent
				return
			}
			if err != nil {
				yield(nil, explain(b.name, err))
				return
			}
			if !yield(row, nil) {
				return
			}
		}
	}
}

// extent is how far the rows of a sheet reach to the right: by row from 1, the
// column behind the last cell.
type extent struct {
	complete bool
	valued   []uint16        // that has a value or a formula
	styled   []uint16        // that has a style of its own
	formulas bool            // there is a formula
	heights  map[int]float64 // of the first rows, where the file gives them, in points
}

func note(in []uint16, row, col int) []uint16 {
	for len(in) <= row {
		in = append(in, 0)
	}
	in[row] = max(in[row], uint16(col+1))
	return in
}

// furthest returns the greatest of the rows from first to last.
func furthest(in []uint16, first, last int) int {
	right := uint16(0)
	for row := first; row <= last && row < len(in); row++ {
		right = max(right, in[row])
	}
	return int(right)
}

// extentOf reads a sheet through where that has not been done.
func (b *Book) extentOf(s *sheet) (*extent, error) {
	if !s.extent.complete {
		for _, err := range b.Rows(s.name) {
			if err != nil {
				return nil, err
			}
		}
	}
	return &s.extent, nil
}

// reader reads the rows of one sheet.
type reader struct {
	book   *Book
	sheet  *sheet
	merged merging
	stream io.Closer
	scan   *markup.Scanner
	inData bool

	row    schedule.Row
	filled bool // the row holds something
	rowNo  int  // of the last row
	cell   cellReader
	extent extent
}

// reader opens a sheet.
func (b *Book) reader(name string) (r *reader, err error) {
	defer func() {
		if p := recover(); p != nil {
			err = damaged(b.name, fmt.Errorf("%v", p))
		}
	}()
	s := b.find(name)
	if s == nil {
		return nil, refuse(b.name, fmt.Sprintf("has no sheet %q that holds cells", name), "name one that it has")
	}
	l, err := b.layoutOf(s)
	if err != nil {
		return nil, err
	}
	if err := b.loadFormats(); err != nil {
		return nil, err
	}
	if err := b.loadStrings(); err != nil {
		return nil, err
	}
	stream, err := b.pkg.Stream(s.part)
	if err != nil {
		return nil, err
	}
	r = &reader{book: b, sheet: s, merged: merging{all: l.merged}, stream: stream, scan: markup.NewScanner(stream)}
	r.cell.reader = r
	r.extent = extent{complete: true, heights: map[int]float64{}}
	return r, nil
}

func (r *reader) close() { r.stream.Close() }

// next returns the next row that holds anything, io.EOF behind the last.
func (r *reader) next() (row *schedule.Row, err error) {
	defer func() {
		if p := recover(); p != nil {
			err = damaged(r.book.name, fmt.Errorf("%v", p))
		}
	}()
	for {
		found, err := r.nextRow()
		if err != nil {
			return nil, r.wrap(err)
		}
		if !found {
			return nil, io.EOF
		}
		if r.filled {
			return &r.row, nil
		}
	}
}

func (r *reader) wrap(err error) error {
	if err == io.EOF {
		err = io.ErrUnexpectedEOF
	}
	return fmt.Errorf("%s: %w", r.sheet.part, err)
}

// nextRow reads one row element, whatever it holds.
func (r *reader) nextRow() (bool, error) {
	for {
		t, err := r.scan.Next()
		if err == io.EOF && !r.inData {
			return false, nil // a sheet without cells
		}
		if err != nil {
			return false, err
		}
		switch t.Kind {
		case markup.Start, markup.Empty:
			local := string(t.Local())
			if local == "sheetData" && r.scan.Depth() <= 2 {
				if t.Kind == markup.Empty {
					return false, nil
				}
				r.inData = true
				continue
			}
			if r.inData && local == "row" && r.scan.Depth() <= 3 {
				return true, r.readRow(t)
			}
		case markup.End:
			if r.inData && r.scan.Depth() < 2 {
				return false, nil
			}
		}
	}
}

// readRow reads the row whose tag is t.
func (r *reader) readRow(t *markup.Token) error {
	number, hidden := r.rowNo+1, false
	for a := t.Attrs(); a.Next(); {
		switch string(a.Name) {
		case "r":
			n, ok := parseInt(a.Value)
			if !ok || n <= r.rowNo || n > maxRows {
				return fmt.Errorf("%w: row %q stands behind row %d", markup.ErrSyntax, a.Value, r.rowNo)
			}
			number = n
		case "hidden":
			hidden = isTrue(string(a.Value))
		case "ht":
			r.noteHeight(number, a.Value)
		}
	}
	r.rowNo = number
	r.row.Number, r.row.Hidden = number, hidden
	r.row.Cells = r.row.Cells[:0]
	r.filled = false
	if t.Kind == markup.Empty {
		return nil
	}
	if err := r.cell.readAll(); err != nil {
		return err
	}
	r.merged.apply(&r.row, r.filled)
	return nil
}

// maxHeights is how far down heights are kept: as far as headers stand.
const maxHeights = 200

func (r *reader) noteHeight(row int, value []byte) {
	if h, err := strconv.ParseFloat(string(value), 64); err == nil && row <= maxHeights {
		r.extent.heights[row] = h
	}
}

// parseInt reads a whole number without allocating.
func parseInt(b []byte) (n int, ok bool) {
	if len(b) == 0 || len(b) > 9 {
		return 0, false
	}
	for _, c := range b {
		if c < '0' || c > '9' {
			return 0, false
		}
		n = n*10 + int(c-'0')
	}
	return n, true
}
