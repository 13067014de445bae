package workbook

import (
	"archive/zip"
	"bytes"
	"io"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

// parts is a package written by hand: name and content.
type parts map[string]string

// handmade returns a small workbook whose sheet is written by hand. Parts given
// replace or add to the usual ones.
func handmade(sheet string, more parts) parts {
	p := parts{
		"[Content_Types].xml": `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml"/><Override PartName="/xl/worksheets/sheet1.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml"/><Override PartName="/xl/styles.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.styles+xml"/></Types>`,
		"_rels/.rels":                `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/officeDocument" Target="xl/workbook.xml"/></Relationships>`,
		"xl/workbook.xml":            `<workbook xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"><sheets><sheet name="Columns" sheetId="1" r:id="rId1"/></sheets></workbook>`,
		"xl/_rels/workbook.xml.rels": `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet" Target="worksheets/sheet1.xml"/><Relationship Id="rId2" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/styles" Target="styles.xml"/></Relationships>`,
		"xl/styles.xml":              `<styleSheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><fonts count="1"><font><sz val="11"/><name val="Calibri"/></font></fonts><fills count="2"><fill><patternFill patternType="none"/></fill><fill><patternFill patternType="gray125"/></fill></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf/></cellStyleXfs><cellXfs count="1"><xf xfId="0"/></cellXfs></styleSheet>`,
		"xl/worksheets/sheet1.xml":   sheet,
	}
	for name, content := range more {
		p[name] = content
	}
	return p
}

// worksheet wraps the rows of a sheet.
func worksheet(rows, behind string) string {
	return `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>
<worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"><sheetData>` + rows + `</sheetData>` + behind + `</worksheet>`
}

// bytes packs the parts, content types first.
func (p parts) bytes(t testing.TB) []byte {
	t.Helper()
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for _, name := range sortedKeys(p) {
		w, err := z.Create(name)
		require.NoError(t, err)
		_, err = io.WriteString(w, p[name])
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return b.Bytes()
}

func (p parts) open(t testing.TB) *Book {
	t.Helper()
	b, err := OpenBytes("loads.xlsx", p.bytes(t))
	require.NoError(t, err)
	t.Cleanup(func() { b.Close() })
	return b
}

// saved opens a workbook made with excelize.
func saved(t testing.TB, f *excelize.File) *Book {
	t.Helper()
	b, err := OpenBytes("loads.xlsx", packed(t, f))
	require.NoError(t, err)
	t.Cleanup(func() { b.Close() })
	return b
}

func packed(t testing.TB, f *excelize.File) []byte {
	t.Helper()
	var buf bytes.Buffer
	require.NoError(t, f.Write(&buf))
	require.NoError(t, f.Close())
	return buf.Bytes()
}

// all reads a sheet into a table by row and column.
func all(t testing.TB, b *Book, sheet string) map[int][]schedule.Cell {
	t.Helper()
	out := map[int][]schedule.Cell{}
	for row, err := range b.Rows(sheet) {
		require.NoError(t, err)
		out[row.Number] = append([]schedule.Cell(nil), row.Cells...)
	}
	return out
}
