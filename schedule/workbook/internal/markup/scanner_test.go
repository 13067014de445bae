package markup

import (
	"bytes"
	"errors"
	"io"
	"strings"
	"testing"
	"testing/iotest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"golang.org/x/text/encoding/charmap"
	"golang.org/x/text/encoding/unicode"
)

const sample = "\xef\xbb\xbf<?xml version=\"1.0\"?>\r\n<!-- a > b </row> -->" +
	`<x:worksheet a='1>2' xmlns:x="u"><row r="1"><c r="A1"/><c r="B1" t="s" ><v>1 &amp; 2</v></c >` +
	`</row><row><![CDATA[</row><v>]]></row><?p </row>?></x:worksheet>` + "\n"

func tokens(t *testing.T, r io.Reader) (kinds []Kind, raw string, err error) {
	t.Helper()
	s := NewScanner(r)
	for {
		token, err := s.Next()
		if err == io.EOF {
			return kinds, raw, nil
		}
		if err != nil {
			return kinds, raw, err
		}
		kinds = append(kinds, token.Kind)
		raw += string(token.Raw)
	}
}

func TestTokensAreTheDocument(t *testing.T) {
	for name, r := range map[string]io.Reader{
		"at once":      strings.NewReader(sample),
		"byte by byte": iotest.OneByteReader(strings.NewReader(sample)),
	} {
		kinds, raw, err := tokens(t, r)
		require.NoError(t, err, name)
		assert.Equal(t, sample, raw, name)
		assert.Equal(t, []Kind{Other, Other, Other, Other, Start, Start, Empty, Start, Start, Text, End, End, End,
			Start, CData, End, Other, End, Other}, kinds, name)
	}
}

func TestAttributes(t *testing.T) {
	s := NewScanner(strings.NewReader(`<x:c r="A1" p:t='s &gt; "1"'  s = "3"/>`))
	token, err := s.Next()
	require.NoError(t, err)
	assert.Equal(t, "c", string(token.Local()))
	for name, want := range map[string]string{"r": "A1", "t": `s > "1"`, "s": "3"} {
		got, ok := token.Attr(name)
		assert.True(t, ok, name)
		assert.Equal(t, want, got, name)
	}
	_, ok := token.Attr("q")
	assert.False(t, ok)
}

func TestDamage(t *testing.T) {
	for _, doc := range []string{
		"", "   ", "x", "<a", "<a>", "<a><b></a>", "</a>", "<a/><b/>", "<a/>x", "<a b='", "<!DOCTYPE a><a/>",
		"<a b=\"<\"/>", "<a <b/>", "<>", "</>", "<a><!-- </a>", "<a><![CDATA[ </a>", "<![CDATA[x]]><a/>", "<a:/>",
	} {
		_, _, err := tokens(t, strings.NewReader(doc))
		assert.ErrorIs(t, err, ErrSyntax, doc)
	}
	_, _, err := tokens(t, strings.NewReader(strings.Repeat("<a>", maxDepth+1)))
	assert.ErrorContains(t, err, "nested")
}

func TestReadErrorsComeThrough(t *testing.T) {
	broken := errors.New("broken")
	_, _, err := tokens(t, io.MultiReader(strings.NewReader("<a><b>"), iotest.ErrReader(broken)))
	assert.ErrorIs(t, err, broken)
}

func TestSkim(t *testing.T) {
	long := strings.Repeat("<c><v>1</v></c>", 20_000)
	for _, content := range []string{
		"", "<c/>", "text", "<!-- </row> --><c/>", "<![CDATA[</row>]]>", "<rows></rows>", "<rows></rows>", "a!b", "!", long + "!",
		"<?p </row>?>", long, long + "<!-- </row> -->" + long,
	} {
		for name, r := range map[string]func(string) io.Reader{
			"at once":      func(s string) io.Reader { return strings.NewReader(s) },
			"byte by byte": func(s string) io.Reader { return iotest.OneByteReader(strings.NewReader(s)) },
		} {
			if name == "byte by byte" && len(content) > 1000 {
				continue
			}
			s := NewScanner(r("<row>" + content + "</row>"))
			_, err := s.Next()
			require.NoError(t, err)
			var got bytes.Buffer
			require.NoError(t, s.Skim(&got), content)
			assert.Equal(t, content, got.String(), name)
			token, err := s.Next()
			require.NoError(t, err)
			assert.Equal(t, "</row>", string(token.Raw))
			_, err = s.Next()
			assert.Equal(t, io.EOF, err)
		}
	}
}

func TestSkimOfWhatBreaksOff(t *testing.T) {
	s := NewScanner(strings.NewReader("<row><c/>"))
	_, err := s.Next()
	require.NoError(t, err)
	assert.ErrorIs(t, s.Skim(io.Discard), ErrSyntax)
}

func TestText(t *testing.T) {
	for raw, want := range map[string]string{
		"a &lt;&gt;&quot;&apos;&amp; b": `a <>"'& b`,
		"&#65;&#x42;&#x1F600;":          "AB😀",
		"a\r\nb\rc\nd":                  "a\nb\nc\nd",
		"&unknown; & &#0; &#xD800;":     "&unknown; & &#0; &#xD800;",
		"\xff":                          "\uFFFD",
		"&":                             "&",
	} {
		assert.Equal(t, want, string(AppendText(nil, []byte(raw))), raw)
	}
	odd := "a<b>&\"c\"\n\t\x00é😀"
	assert.Equal(t, "a<b>&\"c\"\n\t\uFFFDé😀", string(AppendText(nil, AppendEscaped(nil, odd))))
}

func TestEncodings(t *testing.T) {
	doc := `<?xml version="1.0" encoding="%"?><a>é</a>`
	plain := `<?xml version="1.0" encoding="UTF-8" standalone="yes"?><a>é</a>`
	for name, enc := range map[string]interface{ String(string) (string, error) }{
		"UTF-16":       unicode.UTF16(unicode.LittleEndian, unicode.UseBOM).NewEncoder(),
		"utf-16":       unicode.UTF16(unicode.BigEndian, unicode.UseBOM).NewEncoder(),
		"UTF-16LE":     unicode.UTF16(unicode.LittleEndian, unicode.IgnoreBOM).NewEncoder(),
		"windows-1252": charmap.Windows1252.NewEncoder(),
	} {
		b, err := enc.String(strings.Replace(doc, "%", name, 1))
		require.NoError(t, err)
		r, err := UTF8(strings.NewReader(b))
		require.NoError(t, err, name)
		got, err := io.ReadAll(r)
		require.NoError(t, err, name)
		assert.Equal(t, plain, string(got), name)
	}
	r, err := UTF8(strings.NewReader(sample))
	require.NoError(t, err)
	got, err := io.ReadAll(r)
	require.NoError(t, err)
	assert.Equal(t, sample, string(got))
	_, err = UTF8(strings.NewReader(`<?xml version="1.0" encoding="no such"?><a/>`))
	assert.ErrorIs(t, err, ErrSyntax)
}

func FuzzScanner(f *testing.F) {
	f.Add([]byte(sample))
	f.Add([]byte("<a><!-- --><b c='d'/></a>"))
	f.Fuzz(func(t *testing.T, doc []byte) {
		_, raw, err := tokens(t, bytes.NewReader(doc))
		require.True(t, bytes.HasPrefix(doc, []byte(raw)))
		if err == nil {
			require.Equal(t, string(doc), raw)
		}
		if root, err := Parse(doc); err == nil {
			require.NotNil(t, root)
			root.Attr("x")
			root.Text()
		}
	})
}

func BenchmarkScanner(b *testing.B) {
	row := `<row r="1" spans="1:30">` + strings.Repeat(`<c r="AB123" s="4"><v>1234.5</v></c>`, 30) + `</row>`
	doc := []byte("<sheetData>" + strings.Repeat(row, 1000) + "</sheetData>")
	b.Run("tokens", func(b *testing.B) {
		b.SetBytes(int64(len(doc)))
		for b.Loop() {
			s := NewScanner(bytes.NewReader(doc))
			for {
				if _, err := s.Next(); err != nil {
					break
				}
			}
		}
	})
	b.Run("skim", func(b *testing.B) {
		b.SetBytes(int64(len(doc)))
		for b.Loop() {
			s := NewScanner(bytes.NewReader(doc))
			s.Next()
			s.Skim(io.Discard)
		}
	})
}
