package markup

import (
	"bytes"
)

// tag takes a start tag, an end tag or an empty element.
func (s *Scanner) tag() error {
	n, err := s.tagLength()
	if err != nil {
		return err
	}
	raw := s.buf[s.pos : s.pos+n]
	kind, inner := Start, raw[1:n-1]
	switch {
	case inner[0] == '/':
		kind, inner = End, inner[1:]
	case inner[len(inner)-1] == '/':
		kind, inner = Empty, inner[:len(inner)-1]
	}
	name := inner[:nameLength(inner)]
	if len(name) == 0 || name[len(name)-1] == ':' {
		return s.fault("a tag without a name")
	}
	if err := s.nest(kind, name); err != nil {
		return err
	}
	s.take(kind, n)
	s.token.Name = name
	return nil
}

// tagLength finds the end of a tag: the first > outside quotes.
func (s *Scanner) tagLength() (int, error) {
	i := 1
	var quote byte
	for {
		b := s.buf[s.pos:s.end]
		for ; i < len(b); i++ {
			c := b[i]
			switch {
			case quote != 0:
				if c == quote {
					quote = 0
				} else if c == '<' {
					return 0, s.fault("< in an attribute")
				}
			case c == '>':
				if i == 1 || i == 2 && b[1] == '/' {
					return 0, s.fault("a tag without a name")
				}
				return i + 1, nil
			case c == '"' || c == '\'':
				quote = c
			case c == '<':
				return 0, s.fault("< in a tag")
			}
		}
		if _, err := s.at(i); err != nil {
			return 0, err
		}
	}
}

func nameLength(b []byte) int {
	for i, c := range b {
		if c <= ' ' || c == '/' || c == '=' || c == '"' || c == '\'' {
			return i
		}
	}
	return len(b)
}

// nest keeps the list of open elements.
func (s *Scanner) nest(kind Kind, name []byte) error {
	depth := len(s.ends)
	switch kind {
	case Start, Empty:
		if depth == 0 && s.started {
			return s.fault("a second root element")
		}
		if depth >= maxDepth {
			return s.fault("elements are nested more than %d deep", maxDepth)
		}
		s.started = true
		if kind == Start {
			s.open = append(s.open, name...)
			s.ends = append(s.ends, len(s.open))
		}
	case End:
		if depth == 0 {
			return s.fault("</%s> closes nothing", name)
		}
		from := 0
		if depth > 1 {
			from = s.ends[depth-2]
		}
		if !bytes.Equal(s.open[from:], name) {
			return s.fault("</%s> closes <%s>", name, s.open[from:])
		}
		s.open, s.ends = s.open[:from], s.ends[:depth-1]
	}
	return nil
}
