package text

import (
	"bytes"
	"io"
	"strings"

	"stanchion/schedule"
)

// delimiters that a schedule may be parted by, the likelier first where
// nothing tells.
const delimiters = "\t;,"

// learnDialect finds line ends, delimiter and quoting.
func (f *File) learnDialect() error {
	f.newline, f.delim, f.lineEnd = '\n', ',', "\n"
	sample, err := io.ReadAll(io.LimitReader(f.section(0), sampleSize))
	if err != nil {
		return err
	}
	if len(bytes.TrimSpace(sample)) == 0 {
		return errNotText
	}
	i := bytes.IndexByte(sample, '\n')
	switch {
	case i > 0 && sample[i-1] == '\r':
		f.lineEnd = "\r\n"
	case i < 0 && bytes.IndexByte(sample, '\r') >= 0:
		f.newline, f.lineEnd = '\r', "\r"
	}
	if first := strings.ToLower(firstLine(sample)); strings.HasPrefix(first, "sep=") && len(first) == 5 {
		f.delim, f.sepLine = first[4], true
	} else if err := f.learnDelimiter(); err != nil {
		return err
	}
	return f.learnQuotes()
}

func firstLine(sample []byte) string {
	if i := bytes.IndexAny(sample, "\r\n"); i >= 0 {
		return string(sample[:i])
	}
	return string(sample)
}

// learnDelimiter takes the delimiter under which the file looks most like a
// schedule, and otherwise the one that parts its lines most evenly.
func (f *File) learnDelimiter() error {
	var found byte
	var best float64
	for _, d := range []byte(delimiters) {
		f.delim = d
		likeness, err := schedule.Likeness(f, "")
		if err != nil {
			continue // a quote is open under this delimiter
		}
		if likeness > best {
			found, best = d, likeness
		}
	}
	if best < likely {
		if even, ok := f.mostEven(); ok {
			found = even
		}
	}
	if found == 0 {
		found = ','
	}
	f.delim = found
	return nil
}

// likely is the likeness of a header with the needed fields; below it the file
// is no schedule as it stands, and may be one of settings.
const likely = 8

// mostEven returns the delimiter that gives the most lines the same number of
// fields, two at least.
func (f *File) mostEven() (byte, bool) {
	const lines = 100
	var found byte
	best := 0
	for _, d := range []byte(delimiters) {
		f.delim = d
		counts := map[int]int{}
		records := f.records()
		for range lines {
			rec, err := records.next()
			if err != nil {
				break
			}
			if n := len(split(string(rec.raw), d, nil)); n > 1 {
				counts[n]++
			}
		}
		for _, n := range counts {
			if n > best {
				found, best = d, n
			}
		}
	}
	return found, best > 0
}

// learnQuotes finds out whether the file quotes every field.
func (f *File) learnQuotes() error {
	records := f.records()
	var fields []field
	all, any := true, false
	for range 20 {
		rec, err := records.next()
		if err != nil {
			break // an open quote is reported when the rows are read
		}
		fields = split(string(rec.raw), f.delim, fields[:0])
		for i := range fields {
			if raw := fields[i].raw; raw != "" {
				any = true
				all = all && raw[0] == '"'
			}
		}
	}
	f.quotes = all && any
	return nil
}
