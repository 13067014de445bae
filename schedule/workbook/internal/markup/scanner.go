// Package markup reads XML as a stream of tokens that keep their bytes: the
// raw tokens of a document, one after the other, are the document. So a part
// of a workbook can be changed in one place and stay as it was in every other,
// and a sheet of any length goes through a buffer of fixed size.
//
// It knows what the parts of a workbook use: elements, attributes, text, CDATA,
// comments and processing instructions, in UTF-8 (see UTF8). A document type
// declaration, which the package format forbids, is an error.
package markup

import (
	"bytes"
	"errors"
	"fmt"
	"io"
)

// Kind says what a token is.
type Kind uint8

// The kinds of token.
const (
	Text  Kind = iota // text between tags, entities as they stand
	Start             // <a b="c">
	End               // </a>
	Empty             // <a b="c"/>
	CData             // <![CDATA[ ]]>
	Other             // a comment, processing instruction or byte order mark
)

// maxToken bounds a single token, and so the buffer. The longest that a sheet
// may rightly hold (a list of ranges, an embedded string) stays far below.
const maxToken = 64 << 20

// maxDepth bounds the nesting of elements.
const maxDepth = 256

// ErrSyntax is behind every error about a document that is not XML, or breaks
// off.
var ErrSyntax = errors.New("damaged XML")

// Token is one piece of a document. It is valid until the next call.
type Token struct {
	Kind Kind
	Raw  []byte
	Name []byte // of an element, with its prefix
}

// Local returns an element's name without its prefix.
func (t *Token) Local() []byte { return local(t.Name) }

func local(name []byte) []byte { return name[bytes.IndexByte(name, ':')+1:] }

// Scanner reads tokens from a document.
type Scanner struct {
	r        io.Reader
	buf      []byte
	pos, end int
	ended    bool // r has no more
	offset   int64
	token    Token
	open     []byte // names of the open elements, one after the other
	ends     []int  // where each ends
	started  bool
	err      error
}

// NewScanner returns a scanner of the document that r holds.
func NewScanner(r io.Reader) *Scanner {
	return &Scanner{r: r, buf: make([]byte, 64<<10)}
}

// Depth returns how many elements are open.
func (s *Scanner) Depth() int { return len(s.ends) }

// Next returns the next token, or io.EOF behind the end of the document.
func (s *Scanner) Next() (*Token, error) {
	if s.err != nil {
		return nil, s.err
	}
	if err := s.next(); err != nil {
		s.err = err
		return nil, err
	}
	return &s.token, nil
}

func (s *Scanner) next() error {
	if s.pos == s.end {
		if err := s.fill(); err != nil {
			return s.finish(err)
		}
	}
	if s.buf[s.pos] != '<' {
		return s.text()
	}
	c, err := s.at(1)
	if err != nil {
		return err
	}
	switch c {
	case '!':
		return s.declaration()
	case '?':
		return s.until("?>", Other)
	}
	return s.tag()
}

// finish tells the end of a whole document from one that breaks off.
func (s *Scanner) finish(err error) error {
	if err == io.EOF && (len(s.ends) > 0 || !s.started) {
		return s.fault("it breaks off")
	}
	return err
}

func (s *Scanner) fault(format string, args ...any) error {
	return fmt.Errorf("%w at byte %d: %s", ErrSyntax, s.offset+int64(s.pos), fmt.Sprintf(format, args...))
}

// fill reads more behind what is held from pos on.
func (s *Scanner) fill() error {
	if s.ended {
		return io.EOF
	}
	if s.pos > 0 {
		s.offset += int64(s.pos)
		copy(s.buf, s.buf[s.pos:s.end])
		s.end -= s.pos
		s.pos = 0
	}
	if s.end == len(s.buf) {
		if len(s.buf) >= maxToken {
			return s.fault("a single tag or text is longer than %d MB", maxToken>>20)
		}
		s.buf = append(s.buf, make([]byte, len(s.buf))...)
	}
	for range 100 {
		n, err := s.r.Read(s.buf[s.end:])
		s.end += n
		if err == io.EOF {
			s.ended = true
			if n == 0 {
				return io.EOF
			}
			return nil
		}
		if err != nil {
			return err
		}
		if n > 0 {
			return nil
		}
	}
	return io.ErrNoProgress
}

// at returns the byte i behind pos.
func (s *Scanner) at(i int) (byte, error) {
	for s.pos+i >= s.end {
		if err := s.fill(); err != nil {
			if err == io.EOF {
				err = s.fault("it breaks off")
			}
			return 0, err
		}
	}
	return s.buf[s.pos+i], nil
}

// take makes a token of the next n bytes.
func (s *Scanner) take(kind Kind, n int) {
	s.token = Token{Kind: kind, Raw: s.buf[s.pos : s.pos+n]}
	s.pos += n
}

func (s *Scanner) text() error {
	from := 0
	for {
		if i := bytes.IndexByte(s.buf[s.pos+from:s.end], '<'); i >= 0 {
			s.take(Text, from+i)
			break
		}
		from = s.end - s.pos
		err := s.fill()
		if err == io.EOF {
			s.take(Text, from)
			break
		}
		if err != nil {
			return err
		}
	}
	return s.outside()
}

// outside lets nothing but white space and a byte order mark stand outside
// the root element.
func (s *Scanner) outside() error {
	if len(s.ends) > 0 {
		return nil
	}
	raw := s.token.Raw
	if !s.started {
		raw = bytes.TrimPrefix(raw, []byte("\xef\xbb\xbf"))
	}
	if len(bytes.TrimSpace(raw)) > 0 {
		return s.fault("text stands outside the root element")
	}
	s.token.Kind = Other
	return nil
}

func (s *Scanner) declaration() error {
	c, err := s.at(2)
	if err != nil {
		return err
	}
	if c == '-' {
		return s.until("-->", Other)
	}
	const open = "<![CDATA["
	if _, err := s.at(len(open)); err != nil {
		return err
	}
	if !bytes.HasPrefix(s.buf[s.pos:], []byte(open)) {
		return s.fault("a document type declaration is not allowed here")
	}
	if len(s.ends) == 0 {
		return s.fault("text stands outside the root element")
	}
	return s.until("]]>", CData)
}

// until takes a token up to and with a closing mark.
func (s *Scanner) until(mark string, kind Kind) error {
	from := 2
	for {
		if from <= s.end-s.pos {
			if i := bytes.Index(s.buf[s.pos+from:s.end], []byte(mark)); i >= 0 {
				s.take(kind, from+i+len(mark))
				return nil
			}
			from = max(2, s.end-s.pos-len(mark)+1)
		}
		if _, err := s.at(s.end - s.pos); err != nil {
			return err
		}
	}
}
