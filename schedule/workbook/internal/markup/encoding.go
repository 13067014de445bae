package markup

import (
	"bufio"
	"bytes"
	"fmt"
	"io"
	"strings"

	"golang.org/x/net/html/charset"
	"golang.org/x/text/encoding/unicode"
	"golang.org/x/text/transform"
)

const declaration = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>`

// UTF8 returns the document as UTF-8. One that is UTF-8 already, as nearly all
// are, comes back byte for byte; another gets a new XML declaration.
func UTF8(r io.Reader) (io.Reader, error) {
	b := bufio.NewReaderSize(r, 4096)
	head, err := b.Peek(200)
	if err != nil && err != io.EOF && err != bufio.ErrBufferFull {
		return nil, err
	}
	switch {
	case bytes.HasPrefix(head, []byte("\xfe\xff")), bytes.HasPrefix(head, []byte("\x00<")),
		bytes.HasPrefix(head, []byte("\xff\xfe")), bytes.HasPrefix(head, []byte("<\x00")):
		return utf16(b, head)
	}
	name := declared(head)
	switch strings.ToLower(name) {
	case "", "utf-8", "utf8", "us-ascii", "ascii":
		return b, nil
	}
	decoded, err := charset.NewReaderLabel(name, b)
	if err != nil {
		return nil, fmt.Errorf("%w: unknown encoding %q", ErrSyntax, name)
	}
	return redeclare(decoded)
}

func utf16(b *bufio.Reader, head []byte) (io.Reader, error) {
	order := unicode.LittleEndian
	if head[0] == 0xfe || head[0] == 0 {
		order = unicode.BigEndian
	}
	decoder := unicode.UTF16(order, unicode.UseBOM).NewDecoder()
	if head[0] == 0 || head[0] == '<' {
		decoder = unicode.UTF16(order, unicode.IgnoreBOM).NewDecoder()
	}
	return redeclare(transform.NewReader(b, decoder))
}

// declared returns the encoding that an XML declaration names.
func declared(head []byte) string {
	head = bytes.TrimPrefix(head, []byte("\xef\xbb\xbf"))
	end := bytes.Index(head, []byte("?>"))
	if !bytes.HasPrefix(head, []byte("<?xml")) || end < 0 {
		return ""
	}
	t := Token{Raw: head[:end+1], Name: head[1:5]}
	for a := t.Attrs(); a.Next(); {
		if string(a.Name) == "encoding" {
			return string(a.Value)
		}
	}
	return ""
}

// redeclare takes the declaration of another encoding off a document.
func redeclare(r io.Reader) (io.Reader, error) {
	b := bufio.NewReaderSize(r, 4096)
	head, err := b.Peek(200)
	if err != nil && err != io.EOF && err != bufio.ErrBufferFull {
		return nil, err
	}
	if !bytes.HasPrefix(head, []byte("<?xml")) {
		return b, nil
	}
	if end := bytes.Index(head, []byte("?>")); end >= 0 {
		if _, err := b.Discard(end + 2); err != nil {
			return nil, err
		}
	}
	return io.MultiReader(strings.NewReader(declaration), b), nil
}
