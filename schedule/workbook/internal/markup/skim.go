package markup

import (
	"bytes"
	"io"
)

// Skim passes the content of the innermost open element to w without looking
// into it, and stops before its end tag. It is quicker than going from token
// to token, and meant for an element that cannot hold another of its name.
func (s *Scanner) Skim(w io.Writer) error {
	if s.err == nil {
		s.err = s.skim(w)
	}
	return s.err
}

func (s *Scanner) skim(w io.Writer) error {
	depth := len(s.ends)
	if depth == 0 {
		return s.fault("nothing is open")
	}
	from := 0
	if depth > 1 {
		from = s.ends[depth-2]
	}
	mark := append([]byte("</"), s.open[from:]...)
	for {
		held := s.buf[s.pos:s.end]
		i := bytes.Index(held, mark)
		found := i >= 0
		if !found {
			if i = bytes.LastIndexByte(held, '<'); i < 0 {
				i = len(held)
			}
		}
		if j := oddity(held[:i]); j >= 0 {
			if err := s.passOddity(w, j); err != nil {
				return err
			}
			continue
		}
		if err := s.pass(w, i); err != nil {
			return err
		}
		more := s.end - s.pos
		if found {
			more = len(mark)
		}
		c, err := s.at(more)
		if err != nil {
			return err
		}
		if found && (c == '>' || c <= ' ') {
			return nil
		}
		if found { // the end tag of a longer name
			if err := s.pass(w, len(mark)); err != nil {
				return err
			}
		}
	}
}

func (s *Scanner) pass(w io.Writer, n int) error {
	_, err := w.Write(s.buf[s.pos : s.pos+n])
	s.pos += n
	return err
}

// passOddity passes n bytes and the comment, CDATA or processing instruction
// behind them, in which what looks like an end tag is none.
func (s *Scanner) passOddity(w io.Writer, n int) error {
	if err := s.pass(w, n); err != nil {
		return err
	}
	if err := s.next(); err != nil {
		return err
	}
	_, err := w.Write(s.token.Raw)
	return err
}

// oddity finds the first <! or <?; -1 where there is none.
func oddity(b []byte) int {
	i, j := behind(b, '!'), behind(b, '?')
	if i < 0 || j >= 0 && j < i {
		return j
	}
	return i
}

// behind finds the first < before a mark. The marks are rare, < is not.
func behind(b []byte, mark byte) int {
	for at := 0; ; {
		i := bytes.IndexByte(b[at:], mark)
		if i < 0 {
			return -1
		}
		if at += i; at > 0 && b[at-1] == '<' {
			return at - 1
		}
		at++
	}
}
