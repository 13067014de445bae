package text

import (
	"bytes"
	"fmt"
	"io"
	"strings"
)

// maxRecord bounds a record, in bytes: beyond it a quote was opened and never
// closed, or the file is no schedule.
const maxRecord = 1 << 20

// record is one record of the file: a line, or several where a quoted field
// holds line ends.
type record struct {
	raw  []byte // without its line end
	term []byte // its line end; empty at the end of the file
	line int    // from 1, where it begins
	pos  int64
}

// recordReader reads records. A record is valid until the next one.
type recordReader struct {
	r       io.Reader
	delim   byte
	newline byte // '\n', or '\r' in a file that knows no other
	buf     []byte
	at, end int // what of buf is still to come
	pos     int64
	line    int
	eof     bool
}

func newRecordReader(r io.Reader, delim, newline byte, size int) *recordReader {
	return &recordReader{r: r, delim: delim, newline: newline, buf: make([]byte, size), line: 1}
}

// next returns the next record; io.EOF after the last.
func (r *recordReader) next() (record, error) {
	n, err := r.find()
	if err != nil {
		return record{}, err
	}
	whole := r.buf[r.at : r.at+n]
	rec := record{raw: bytes.TrimSuffix(whole, []byte{r.newline}), line: r.line, pos: r.pos}
	if r.newline == '\n' && len(rec.raw) < len(whole) {
		rec.raw = bytes.TrimSuffix(rec.raw, []byte{'\r'})
	}
	rec.term = whole[len(rec.raw):]
	r.line += bytes.Count(whole, []byte{r.newline})
	r.at += n
	r.pos += int64(n)
	return rec, nil
}

// find returns the length of the next record with its line end.
func (r *recordReader) find() (int, error) {
	from := 0 // how far the search has come
	for {
		data := r.buf[r.at:r.end]
		if i := bytes.IndexByte(data[from:], r.newline); i >= 0 {
			n := from + i + 1
			if bytes.IndexByte(data[:n], '"') < 0 {
				return n, nil
			}
			if n, ok := r.quoted(data); ok {
				return n, nil
			}
			from = 0
		} else {
			from = len(data)
		}
		if r.eof {
			return r.last(data)
		}
		if len(data) > maxRecord {
			return 0, fmt.Errorf("line %d is longer than a schedule's: is a quote opened and not closed? Close it, or take it out", r.line)
		}
		if err := r.fill(); err != nil {
			return 0, err
		}
	}
}

// last returns the record that ends with the file.
func (r *recordReader) last(data []byte) (int, error) {
	if len(data) == 0 {
		return 0, io.EOF
	}
	if n, ok := r.quoted(data); ok {
		return n, nil
	}
	if openQuote(data, r.delim, r.newline) {
		return 0, fmt.Errorf("line %d: a quote is opened and not closed before the file ends: close it, or take it out", r.line)
	}
	return len(data), nil
}

// quoted finds the end of a record that may hold quoted fields.
func (r *recordReader) quoted(data []byte) (int, bool) {
	inside, start := false, true
	for i := 0; i < len(data); i++ {
		switch b := data[i]; {
		case inside:
			if b == '"' {
				if i+1 < len(data) && data[i+1] == '"' {
					i++
				} else {
					inside = false
				}
			}
			continue
		case b == '"' && start:
			inside = true
		case b == r.newline:
			return i + 1, true
		}
		start = data[i] == r.delim
	}
	return 0, false
}

// openQuote reports whether a quoted field is still open at the end of data.
func openQuote(data []byte, delim, newline byte) bool {
	inside, start := false, true
	for _, b := range data {
		switch {
		case b == '"' && (inside || start):
			inside = !inside
			start = false
			continue
		}
		start = !inside && (b == delim || b == newline)
	}
	return inside
}

// fill reads more of the file, moving what is still to come to the front.
func (r *recordReader) fill() error {
	if r.at > 0 {
		copy(r.buf, r.buf[r.at:r.end])
		r.at, r.end = 0, r.end-r.at
	}
	if r.end == len(r.buf) {
		r.buf = append(r.buf, make([]byte, len(r.buf))...)
	}
	n, err := r.r.Read(r.buf[r.end:])
	r.end += n
	if err == io.EOF {
		r.eof = true
		return nil
	}
	return err
}

// field is one field of a record.
type field struct {
	raw  string // as it stands in the file
	text string // without quotes
}

// split parts a record into fields. It keeps every letter: the raw fields,
// joined by the delimiter, are the record.
func split(raw string, delim byte, to []field) []field {
	if strings.IndexByte(raw, '"') < 0 {
		for {
			i := strings.IndexByte(raw, delim)
			if i < 0 {
				return append(to, field{raw, raw})
			}
			to = append(to, field{raw[:i], raw[:i]})
			raw = raw[i+1:]
		}
	}
	for {
		n := fieldEnd(raw, delim)
		to = append(to, field{raw[:n], unquote(raw[:n])})
		if n == len(raw) {
			return to
		}
		raw = raw[n+1:]
	}
}

// fieldEnd returns where the first field of a record ends.
func fieldEnd(s string, delim byte) int {
	i := 0
	if s != "" && s[0] == '"' {
		i = closing(s)
	}
	if n := strings.IndexByte(s[i:], delim); n >= 0 {
		return i + n
	}
	return len(s)
}

// closing returns what follows the closing quote of the field that s opens.
func closing(s string) int {
	for i := 1; i < len(s); i++ {
		if s[i] != '"' {
			continue
		}
		if i+1 < len(s) && s[i+1] == '"' {
			i++
			continue
		}
		return i + 1
	}
	return len(s)
}

// unquote takes the quotes off a field that opens with one. What stands
// behind the closing quote is kept.
func unquote(s string) string {
	if s == "" || s[0] != '"' {
		return s
	}
	end := closing(s)
	inner := strings.TrimSuffix(s[1:end], `"`)
	return strings.ReplaceAll(inner, `""`, `"`) + s[end:]
}

// quote writes a text as a field.
func quote(s string, delim byte, always bool) string {
	if always || strings.IndexByte(s, delim) >= 0 || strings.ContainsAny(s, "\"\r\n") {
		return `"` + strings.ReplaceAll(s, `"`, `""`) + `"`
	}
	return s
}
