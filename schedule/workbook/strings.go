package workbook

import (
	"bytes"
	"io"
	"strconv"
	"unicode/utf16"
	"unicode/utf8"

	"stanchion/schedule/workbook/internal/markup"
)

// sharedStrings is the table of texts that the cells of a workbook share.
type sharedStrings struct {
	all  string
	ends []int
}

// at returns the text of an index.
func (t *sharedStrings) at(i int) (string, bool) {
	if i < 0 || i >= len(t.ends) {
		return "", false
	}
	from := 0
	if i > 0 {
		from = t.ends[i-1]
	}
	return t.all[from:t.ends[i]], true
}

// loadStrings reads the shared texts, once.
func (b *Book) loadStrings() error {
	if b.strings != nil {
		return nil
	}
	t := &sharedStrings{}
	if rel := b.relOf("sharedStrings"); rel != nil && b.pkg.Has(rel.Target) {
		r, err := b.pkg.Stream(rel.Target)
		if err != nil {
			return err
		}
		defer r.Close()
		if err := t.read(r); err != nil {
			return err
		}
	}
	b.strings = t
	return nil
}

func (t *sharedStrings) read(r io.Reader) error {
	scan := markup.NewScanner(r)
	var all []byte
	for {
		token, err := scan.Next()
		if err == io.EOF {
			t.all = string(all)
			return nil
		}
		if err != nil {
			return err
		}
		if scan.Depth() > 2 || string(token.Local()) != "si" {
			continue
		}
		switch token.Kind {
		case markup.Empty:
			t.ends = append(t.ends, len(all))
		case markup.Start:
			if all, err = appendString(all, scan); err != nil {
				return err
			}
			t.ends = append(t.ends, len(all))
		}
	}
}

// appendString appends the text of the open string element, up to and with its
// end tag: its runs joined, without what tells how to pronounce them.
func appendString(to []byte, scan *markup.Scanner) ([]byte, error) {
	depth := scan.Depth()
	from := len(to)
	var reading, sounding int // depths of the open t and rPh, 0: none
	for {
		t, err := scan.Next()
		if err != nil {
			return to, err
		}
		switch t.Kind {
		case markup.Start:
			switch string(t.Local()) {
			case "t":
				reading = scan.Depth()
			case "rPh":
				sounding = scan.Depth()
			}
		case markup.End:
			if scan.Depth() < depth {
				return unescape(to, from), nil
			}
			if scan.Depth() < reading {
				reading = 0
			}
			if scan.Depth() < sounding {
				sounding = 0
			}
		case markup.Text:
			if reading > 0 && sounding == 0 {
				to = markup.AppendText(to, t.Raw)
			}
		case markup.CData:
			if reading > 0 && sounding == 0 {
				to = markup.AppendCData(to, t.Raw)
			}
		}
	}
}

// unescape resolves, in what stands behind from, the escapes by which a
// workbook writes characters that XML has no way to write: _x000D_.
func unescape(b []byte, from int) []byte {
	if !bytes.Contains(b[from:], []byte("_x")) {
		return b
	}
	in := b[from:]
	var out []byte
	for len(in) > 0 {
		if unit, ok := escape(in); ok {
			r := rune(unit)
			in = in[7:]
			if low, ok := escape(in); ok && utf16.IsSurrogate(r) {
				r = utf16.DecodeRune(r, rune(low))
				in = in[7:]
			}
			out = utf8.AppendRune(out, r)
			continue
		}
		out = append(out, in[0])
		in = in[1:]
	}
	return append(b[:from], out...)
}

func escape(b []byte) (uint16, bool) {
	if len(b) < 7 || b[0] != '_' || b[1] != 'x' || b[6] != '_' {
		return 0, false
	}
	n, err := strconv.ParseUint(string(b[2:6]), 16, 16)
	return uint16(n), err == nil
}
