package markup

import (
	"bytes"
	"strconv"
	"unicode/utf8"
)

// Attr is one attribute of a tag.
type Attr struct {
	Name, Value []byte // the value with its entities as they stand
}

// Attrs goes through the attributes of a tag without allocating.
type Attrs struct {
	rest []byte
	Attr
}

// Attrs returns the attributes of a start or empty tag.
func (t *Token) Attrs() Attrs { return Attrs{rest: t.Raw[1+len(t.Name):]} }

// Next moves to the next attribute.
func (a *Attrs) Next() bool {
	b := a.rest
	for len(b) > 0 && (b[0] <= ' ' || b[0] == '/' || b[0] == '>') {
		b = b[1:]
	}
	n := nameLength(b)
	if n == 0 {
		return false
	}
	a.Name, b = b[:n], b[n:]
	for len(b) > 0 && (b[0] <= ' ' || b[0] == '=') {
		b = b[1:]
	}
	if len(b) == 0 || b[0] != '"' && b[0] != '\'' {
		return false
	}
	end := bytes.IndexByte(b[1:], b[0])
	if end < 0 {
		return false
	}
	a.Value, a.rest = b[1:1+end], b[2+end:]
	return true
}

// Attr returns the value of an attribute by its name without prefix, entities
// resolved.
func (t *Token) Attr(name string) (string, bool) {
	for a := t.Attrs(); a.Next(); {
		if string(local(a.Name)) == name {
			return string(AppendText(nil, a.Value)), true
		}
	}
	return "", false
}

// AppendText appends raw text with entities resolved, line ends as XML has
// them, and what is not UTF-8 replaced.
func AppendText(to, raw []byte) []byte {
	if bytes.IndexByte(raw, '&') < 0 && bytes.IndexByte(raw, '\r') < 0 {
		return appendValid(to, raw)
	}
	for len(raw) > 0 {
		i := bytes.IndexAny(raw, "&\r")
		if i < 0 {
			return appendValid(to, raw)
		}
		to = appendValid(to, raw[:i])
		raw = raw[i:]
		if raw[0] == '\r' {
			to = append(to, '\n')
			raw = bytes.TrimPrefix(raw[1:], []byte("\n"))
			continue
		}
		end := bytes.IndexByte(raw[:min(len(raw), 12)], ';')
		if r, ok := entity(raw[1:max(1, end)]); ok {
			to = utf8.AppendRune(to, r)
			raw = raw[end+1:]
			continue
		}
		to = append(to, '&')
		raw = raw[1:]
	}
	return to
}

func appendValid(to, raw []byte) []byte {
	if utf8.Valid(raw) {
		return append(to, raw...)
	}
	return append(to, bytes.ToValidUTF8(raw, []byte("\uFFFD"))...)
}

func entity(name []byte) (rune, bool) {
	switch string(name) {
	case "amp":
		return '&', true
	case "lt":
		return '<', true
	case "gt":
		return '>', true
	case "quot":
		return '"', true
	case "apos":
		return '\'', true
	}
	if len(name) < 2 || name[0] != '#' {
		return 0, false
	}
	digits, base := string(name[1:]), 10
	if digits[0] == 'x' {
		digits, base = digits[1:], 16
	}
	n, err := strconv.ParseUint(digits, base, 32)
	if err != nil || n == 0 || !utf8.ValidRune(rune(n)) {
		return 0, false
	}
	return rune(n), true
}

// AppendCData appends the content of a CDATA token.
func AppendCData(to, raw []byte) []byte {
	return appendValid(to, raw[len("<![CDATA["):len(raw)-len("]]>")])
}

// AppendEscaped appends s as the text of an element or an attribute's value.
// What XML cannot hold at all is replaced.
func AppendEscaped(to []byte, s string) []byte {
	for _, r := range s {
		switch {
		case r == '&':
			to = append(to, "&amp;"...)
		case r == '<':
			to = append(to, "&lt;"...)
		case r == '>':
			to = append(to, "&gt;"...)
		case r == '"':
			to = append(to, "&quot;"...)
		case r == '\n' || r == '\r' || r == '\t':
			to = append(to, "&#"...)
			to = strconv.AppendInt(to, int64(r), 10)
			to = append(to, ';')
		case r < ' ' || r == 0xFFFE || r == 0xFFFF:
			to = utf8.AppendRune(to, utf8.RuneError)
		default:
			to = utf8.AppendRune(to, r)
		}
	}
	return to
}

// Escaped returns s as the text of an element or an attribute's value.
func Escaped(s string) string { return string(AppendEscaped(nil, s)) }
