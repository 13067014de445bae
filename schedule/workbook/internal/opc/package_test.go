package opc

import (
	"archive/zip"
	"bytes"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func archive(t *testing.T, parts ...string) []byte {
	t.Helper()
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for i := 0; i < len(parts); i += 2 {
		w, err := z.Create(parts[i])
		require.NoError(t, err)
		_, err = io.WriteString(w, parts[i+1])
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return b.Bytes()
}

func open(t *testing.T, b []byte) *Package {
	t.Helper()
	p, err := Open(bytes.NewReader(b), int64(len(b)))
	require.NoError(t, err)
	return p
}

func TestRelationships(t *testing.T) {
	p := open(t, archive(t,
		"_rels/.rels", `<Relationships><Relationship Id="a" Type="http://x/officeDocument" Target="/XL\Workbook.xml"/></Relationships>`,
		"xl/workbook.xml", "<workbook/>",
		"xl/_rels/workbook.xml.rels", `<p:Relationships xmlns:p="r"><p:Relationship Id="b" Type="http://x/worksheet" Target="worksheets/../s.xml"/>`+
			`<p:Relationship Id="c" Type="http://x/hyperlink" TargetMode="External" Target="../a b"/></p:Relationships>`))
	main, err := p.Main()
	require.NoError(t, err)
	assert.True(t, p.Has(main), main)
	rels, err := p.Rels("xl/workbook.xml")
	require.NoError(t, err)
	assert.Equal(t, []Rel{{"b", "http://x/worksheet", "xl/s.xml", false}, {"c", "http://x/hyperlink", "../a b", true}}, rels)
	assert.True(t, rels[0].Is("worksheet"))
	none, err := p.Rels("xl/none.xml")
	assert.NoError(t, err)
	assert.Empty(t, none)
	_, err = p.Read("xl/none.xml")
	assert.ErrorIs(t, err, ErrDamaged)
}

func TestRelsName(t *testing.T) {
	assert.Equal(t, "xl/_rels/workbook.xml.rels", RelsName("xl/workbook.xml"))
	assert.Equal(t, "_rels/a.xml.rels", RelsName("a.xml"))
}

func TestDamagedPackages(t *testing.T) {
	_, err := Open(strings.NewReader("PK\x03\x04 not"), 8)
	assert.ErrorIs(t, err, ErrDamaged)
	twice := archive(t, "a.xml", "<a/>", "A.xml", "<a/>")
	_, err = Open(bytes.NewReader(twice), int64(len(twice)))
	assert.ErrorContains(t, err, "twice")

	p := open(t, archive(t, "_rels/.rels", "<Relationships/>"))
	_, err = p.Main()
	assert.ErrorIs(t, err, ErrDamaged)

	whole := archive(t, "a.xml", strings.Repeat("<a>abcdefghij</a>", 100))
	whole[60] ^= 0xff // inside the compressed part
	_, err = open(t, whole).Read("a.xml")
	assert.ErrorIs(t, err, ErrDamaged)
}

func TestBomb(t *testing.T) {
	p := open(t, archive(t, "a.xml", strings.Repeat(" ", freeRide+1)))
	_, err := p.Read("a.xml")
	var size *SizeError
	assert.ErrorAs(t, err, &size)
}

func TestRewriteCopiesWhatIsNotChanged(t *testing.T) {
	b := archive(t, "[Content_Types].xml", "<Types/>", "folder/", "", "a.xml", "<a/>", "b.bin", "bytes", "c.xml", "<c/>")
	w := NewRewrite(open(t, b))
	w.Set("A.xml", []byte("<new/>"))
	w.Remove("c.xml")
	w.Set("d.xml", []byte("<d/>"))
	w.Set("e.xml", []byte("<e/>"))
	w.Remove("e.xml")
	assert.True(t, w.Has("d.xml"))
	assert.True(t, w.Has("b.bin"))
	assert.False(t, w.Has("c.xml"))
	assert.False(t, w.Has("e.xml"))
	var first, second bytes.Buffer
	require.NoError(t, w.Write(&first))
	require.NoError(t, w.Write(&second))
	assert.Equal(t, first.Bytes(), second.Bytes())
	p := open(t, first.Bytes())
	assert.Equal(t, []string{"[Content_Types].xml", "a.xml", "b.bin", "d.xml"}, p.Names())
	got, err := p.Read("a.xml")
	require.NoError(t, err)
	assert.Equal(t, "<new/>", string(got))

	var same bytes.Buffer
	require.NoError(t, NewRewrite(open(t, b)).Write(&same))
	assert.Equal(t, b, same.Bytes(), "nothing changed, nothing else either")
}
