package text

import (
	"bytes"
	"errors"
	"io"
	"unicode/utf8"

	"golang.org/x/text/encoding"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
	"golang.org/x/text/transform"
)

// form is how the characters of a file are written.
type form struct {
	name string
	enc  encoding.Encoding // nil: UTF-8
	bom  []byte            // the mark that the file opens with
}

var (
	utf16LE = unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM)
	utf16BE = unicode.UTF16(unicode.BigEndian, unicode.IgnoreBOM)
)

// boms open files of a known form.
var boms = []form{
	{"UTF-8", nil, []byte{0xef, 0xbb, 0xbf}},
	{"UTF-16", utf16LE, []byte{0xff, 0xfe}},
	{"UTF-16", utf16BE, []byte{0xfe, 0xff}},
}

// sampleSize is how much of a file its form is first judged by.
const sampleSize = 64 << 10

// errNotText says that a file holds something else.
var errNotText = errors.New("not a text file: save the schedule as CSV (comma, semicolon or tab), or give the workbook itself")

// detect finds the form of a file. Without a byte order mark it is UTF-16
// where every other byte of the sample is 0, UTF-8 where the whole file is
// valid as such, and else Windows-1252.
func detect(r io.ReaderAt, size int64) (form, error) {
	sample := make([]byte, min(size, sampleSize))
	if _, err := io.ReadFull(io.NewSectionReader(r, 0, size), sample); err != nil {
		return form{}, err
	}
	if bytes.HasPrefix(sample, []byte("PK\x03\x04")) || bytes.HasPrefix(sample, []byte("\xd0\xcf\x11\xe0")) {
		return form{}, errors.New("not a text file: it looks like a workbook: give it as a file with the ending .xlsx")
	}
	for _, f := range boms {
		if bytes.HasPrefix(sample, f.bom) {
			return f, nil
		}
	}
	if f, ok := zeros(sample); ok {
		return f, nil
	}
	if bytes.IndexByte(sample, 0) >= 0 {
		return form{}, errNotText
	}
	valid, err := validUTF8(io.NewSectionReader(r, 0, size))
	if valid || err != nil {
		return form{name: "UTF-8"}, err
	}
	return form{name: "Windows-1252", enc: charmap.Windows1252}, nil
}

// zeros tells UTF-16 by its zero bytes: Latin text has one in each pair.
func zeros(sample []byte) (form, bool) {
	var at [2]int
	for i, b := range sample {
		if b == 0 {
			at[i%2]++
		}
	}
	pairs := len(sample) / 2
	switch {
	case pairs == 0:
	case at[1] > pairs*2/3 && at[0] == 0:
		return form{name: "UTF-16", enc: utf16LE}, true
	case at[0] > pairs*2/3 && at[1] == 0:
		return form{name: "UTF-16", enc: utf16BE}, true
	}
	return form{}, false
}

func validUTF8(r io.Reader) (bool, error) {
	buf := make([]byte, sampleSize)
	kept := 0
	for {
		n, err := r.Read(buf[kept:])
		data := buf[:kept+n]
		end := len(data)
		if err == nil {
			end = wholeRunes(data)
		}
		if !utf8.Valid(data[:end]) {
			return false, nil
		}
		kept = copy(buf, data[end:])
		if err == io.EOF {
			return kept == 0, nil
		}
		if err != nil {
			return false, err
		}
	}
}

// wholeRunes returns how much of data ends with a whole character.
func wholeRunes(data []byte) int {
	for back := 1; back < utf8.UTFMax && back <= len(data); back++ {
		if b := data[len(data)-back]; utf8.RuneStart(b) {
			if !utf8.FullRune(data[len(data)-back:]) {
				return len(data) - back
			}
			break
		}
	}
	return len(data)
}

// decoder reads r as UTF-8.
func (f *form) decoder(r io.Reader) io.Reader {
	if f.enc == nil {
		return r
	}
	return transform.NewReader(r, f.enc.NewDecoder())
}

// encoder writes UTF-8 to w in this form. Characters that the form does not
// have are replaced. Close flushes it, and leaves w open.
func (f *form) encoder(w io.Writer) io.WriteCloser {
	if f.enc == nil {
		return nopCloser{w}
	}
	return transform.NewWriter(w, encoding.ReplaceUnsupported(f.enc.NewEncoder()))
}

type nopCloser struct{ io.Writer }

func (nopCloser) Close() error { return nil }
