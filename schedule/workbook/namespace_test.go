package workbook

import (
	"bytes"
	"encoding/xml"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// Some programs declare the prefix of relationships on every sheet element and
// not on the root of the workbook part.
func TestPrefixDeclaredOnEverySheet(t *testing.T) {
	p := unpack(t, rich(t))
	const declaration = ` xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"`
	book := p["xl/workbook.xml"]
	require.Contains(t, book, declaration)
	book = strings.Replace(book, declaration, "", 1)
	book = strings.ReplaceAll(book, "<sheet ", "<sheet"+declaration+" ")
	book = strings.Replace(book, "<externalReferences>", "<externalReferences"+declaration+">", 1)
	p["xl/workbook.xml"] = book

	data := annotate(t, p.bytes(t), richBlock(), ownSheets()...)
	for name, part := range unpack(t, data) {
		if strings.HasSuffix(name, ".xml") || strings.HasSuffix(name, ".rels") {
			assertPrefixesDeclared(t, name, part)
		}
	}
	f, err := excelize.OpenReader(bytes.NewReader(data))
	require.NoError(t, err)
	defer f.Close()
	got, err := f.GetCellValue("Summary", "A1")
	require.NoError(t, err)
	assert.Equal(t, "Summary", got)
}

// assertPrefixesDeclared fails where a part uses a prefix that nothing declares:
// encoding/xml then leaves the prefix itself as the name's space.
func assertPrefixesDeclared(t *testing.T, name, part string) {
	t.Helper()
	d := xml.NewDecoder(strings.NewReader(part))
	for {
		token, err := d.Token()
		if err == io.EOF {
			return
		}
		require.NoError(t, err, name)
		start, ok := token.(xml.StartElement)
		if !ok {
			continue
		}
		spaces := []string{start.Name.Space}
		for _, a := range start.Attr {
			spaces = append(spaces, a.Name.Space)
		}
		for _, s := range spaces {
			if s != "" && s != "xml" && s != "xmlns" {
				assert.True(t, strings.Contains(s, ":"), "%s: prefix %q of <%s> is not declared", name, s, start.Name.Local)
			}
		}
	}
}
