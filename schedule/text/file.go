package text

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"iter"
	"os"

	"stanchion/schedule"
)

// File is an open text schedule. It is a schedule.Source that can seek, and
// never holds more than a record.
type File struct {
	name    string
	file    *os.File // UTF-8 behind its byte order mark
	temp    string   // of a file that had to be copied; empty: it is the user's own
	start   int64
	end     int64
	form    form
	delim   byte
	newline byte
	lineEnd string // of its first line
	quotes  bool   // every field is quoted
	sepLine bool   // the first line names the delimiter: sep=;

	again  *recordReader // of RowAt
	fields []field
	row    schedule.Row
}

var (
	_ schedule.Source        = (*File)(nil)
	_ schedule.Seeker        = (*File)(nil)
	_ schedule.RowNamer      = (*File)(nil)
	_ schedule.DecimalHinter = (*File)(nil)
)

// Stdin is the name of standard input.
const Stdin = "-"

// Open opens a text schedule; "-" is standard input.
func Open(name string) (*File, error) {
	if name == Stdin {
		return OpenReader(os.Stdin, "standard input")
	}
	file, err := os.Open(name)
	if err != nil {
		return nil, refusal(name, cause(err))
	}
	info, err := file.Stat()
	switch {
	case err != nil:
		file.Close()
		return nil, refusal(name, cause(err))
	case info.IsDir():
		file.Close()
		return nil, refusal(name, errors.New("it is a folder: give a file"))
	case !info.Mode().IsRegular():
		defer file.Close()
		return OpenReader(file, name)
	}
	f := &File{name: name, file: file, end: info.Size()}
	return f.opened()
}

// refusal says that a file cannot be read.
func refusal(name string, err error) error {
	return &schedule.Refusal{Problem: schedule.Problem{File: name, What: err.Error(), Col: -1}}
}

// cause takes the path, which the message names already, off an error.
func cause(err error) error {
	var path *os.PathError
	if errors.As(err, &path) {
		return path.Err
	}
	return err
}

// OpenReader opens a text schedule that can be read only once, by way of a
// temporary file.
func OpenReader(r io.Reader, name string) (*File, error) {
	f := &File{name: name}
	if err := f.spool(r); err != nil {
		return nil, refusal(name, err)
	}
	return f.opened()
}

// spool copies what it reads into a temporary file and makes that the file.
func (f *File) spool(r io.Reader) error {
	temp, err := os.CreateTemp("", "schedule-*.csv")
	if err != nil {
		return err
	}
	n, err := io.Copy(temp, r)
	if err != nil {
		temp.Close()
		os.Remove(temp.Name())
		return err
	}
	f.Close()
	f.file, f.temp, f.start, f.end = temp, temp.Name(), 0, n
	return nil
}

// opened finds out how the file is written.
func (f *File) opened() (*File, error) {
	if err := f.learn(); err != nil {
		f.Close()
		return nil, refusal(f.name, err)
	}
	return f, nil
}

func (f *File) learn() (err error) {
	if f.end == 0 {
		return errors.New("the file is empty: give one that holds a schedule")
	}
	if f.form, err = detect(f.file, f.end); err != nil {
		return err
	}
	f.start = int64(len(f.form.bom))
	if f.form.enc != nil {
		if err := f.spool(f.form.decoder(io.NewSectionReader(f.file, f.start, f.end-f.start))); err != nil {
			return err
		}
	}
	return f.learnDialect()
}

// section reads the file from a position on.
func (f *File) section(pos int64) io.Reader {
	return io.NewSectionReader(f.file, f.start+pos, f.end-f.start-pos)
}

// records reads the file's records from the first.
func (f *File) records() *recordReader {
	return newRecordReader(f.section(0), f.delim, f.newline, 256<<10)
}

// Name returns the file's name as given.
func (f *File) Name() string { return f.name }

// Sheets returns the one sheet of a text file, which has no name.
func (f *File) Sheets() []string { return []string{""} }

// HiddenColumns returns none: text hides nothing.
func (f *File) HiddenColumns(string) map[int]bool { return nil }

// DecimalHint returns a comma for a file parted by semicolons: they are
// written where the comma is the decimal mark.
func (f *File) DecimalHint() byte {
	if f.delim == ';' {
		return ','
	}
	return 0
}

// Where names a cell: "line 12, column 6".
func (f *File) Where(_ string, row, col int) string {
	return fmt.Sprintf("line %d, column %d", row, col+1)
}

// WhereRow names a row: "line 12".
func (f *File) WhereRow(_ string, row int) string { return fmt.Sprintf("line %d", row) }

// Rows yields the file's records as rows, by the line on which each begins.
// Blank lines are left out.
func (f *File) Rows(string) iter.Seq2[*schedule.Row, error] {
	return func(yield func(*schedule.Row, error) bool) {
		var fields []field
		row := &schedule.Row{}
		records := f.records()
		for {
			rec, err := records.next()
			if err == io.EOF {
				return
			}
			if err != nil {
				yield(nil, refusal(f.name, err))
				return
			}
			if f.sepLine && rec.pos == 0 || len(bytes.TrimSpace(rec.raw)) == 0 {
				continue
			}
			fields = f.fill(row, &rec, fields)
			if !yield(row, nil) {
				return
			}
		}
	}
}

// fill makes a row of a record.
func (f *File) fill(row *schedule.Row, rec *record, fields []field) []field {
	fields = split(string(rec.raw), f.delim, fields[:0])
	row.Number, row.Pos = rec.line, rec.pos
	row.Cells = row.Cells[:0]
	for i := range fields {
		cell := schedule.Cell{}
		if fields[i].text != "" {
			cell.Kind, cell.Text = schedule.Text, fields[i].text
		}
		row.Cells = append(row.Cells, cell)
	}
	return fields
}

// RowAt reads again the row that begins at a position.
func (f *File) RowAt(_ string, pos int64) (*schedule.Row, error) {
	if f.again == nil {
		f.again = newRecordReader(nil, f.delim, f.newline, 4<<10)
	}
	r := f.again
	r.r, r.at, r.end, r.pos, r.line, r.eof = f.section(pos), 0, 0, pos, 0, false
	rec, err := r.next()
	if err != nil {
		return nil, refusal(f.name, err)
	}
	f.fields = f.fill(&f.row, &rec, f.fields)
	return &f.row, nil
}

// Close closes the file and removes its temporary copy.
func (f *File) Close() error {
	if f.file == nil {
		return nil
	}
	err := f.file.Close()
	f.file = nil
	if f.temp != "" {
		err = errors.Join(err, os.Remove(f.temp))
		f.temp = ""
	}
	return err
}
