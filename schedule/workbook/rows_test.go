package workbook

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

const sharedType = `<Override PartName="/xl/sharedStrings.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sharedStrings+xml"/>`

// withStrings adds a table of shared texts to the usual parts.
func withStrings(si string) parts {
	usual := handmade("", nil)
	return parts{
		"xl/sharedStrings.xml": `<sst xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main">` + si + `</sst>`,
		"xl/_rels/workbook.xml.rels": insertBefore(usual["xl/_rels/workbook.xml.rels"], "</Relationships>",
			`<Relationship Id="rId3" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/sharedStrings" Target="/xl/sharedStrings.xml"/>`),
		"[Content_Types].xml": insertBefore(usual["[Content_Types].xml"], "</Types>", sharedType),
	}
}

func TestCellTypes(t *testing.T) {
	more := withStrings(`<si><t>mark</t></si><si><r><rPr><b/></rPr><t xml:space="preserve">N</t></r><r><t>Ed</t></r><rPh sb="0" eb="1"><t>sound</t></rPh></si><si/><si><t>a_x000D_b_x005F_c &amp; d</t></si>`)
	b := handmade(worksheet(`<row r="2" hidden="1"><c r="A2" t="s"><v>0</v></c><c r="B2" t="s"><v>1</v></c><c r="C2" t="s"><v>2</v></c><c r="D2" t="s"><v>3</v></c><c r="E2" t="s"><v>99</v></c></row>`+
		`<row><c><v>1.50</v></c><c><v> </v></c><c t="b"><v>1</v></c><c t="b"><v>0</v></c><c t="e"><v>#VALUE!</v></c></row>`+
		`<row r="5"><c r="B5" t="inlineStr"><is><t>12 </t></is></c><c r="D5" t="str"><f>A1&amp;"x"</f><v>&lt;x&gt;</v></c><c r="E5" t="str"><f>""</f><v></v></c><c r="F5" t="d"><v>2026-01-02</v></c><c r="G5"><f>1+1</f><v>2</v></c><c r="H5"><v>1E+400</v></c><c r="I5" s="0"/></row>`+
		`<row r="6"><c r="A6" s="1"/></row><row r="7"/>`, ""), more).open(t)
	got := all(t, b, "Columns")
	assert.Len(t, got, 3, "rows without anything are left out")

	assert.Equal(t, []schedule.Cell{
		{Kind: schedule.Text, Text: "mark"},
		{Kind: schedule.Text, Text: "NEd"},
		{},
		{Kind: schedule.Text, Text: "a\rb_c & d"},
		{Kind: schedule.Fault, Text: `missing text "99"`},
	}, got[2])
	assert.Equal(t, []schedule.Cell{
		{Kind: schedule.Number, Number: 1.5, Text: "1.50"},
		{Kind: schedule.Text, Text: " "},
		{Kind: schedule.Bool, Text: "TRUE"},
		{Kind: schedule.Bool, Text: "FALSE"},
		{Kind: schedule.Fault, Text: "#VALUE!"},
	}, got[3])
	assert.Equal(t, []schedule.Cell{
		{},
		{Kind: schedule.Text, Text: "12 "},
		{},
		{Kind: schedule.Text, Text: "<x>", Formula: true},
		{Kind: schedule.Blank, Formula: true},
		{Kind: schedule.Date, Text: "2026-01-02"},
		{Kind: schedule.Number, Number: 2, Text: "2", Formula: true},
		{Kind: schedule.Text, Text: "1E+400"},
	}, got[5])
	for row, err := range b.Rows("Columns") {
		require.NoError(t, err)
		assert.Equal(t, row.Number == 2, row.Hidden)
	}
}

func TestNumberFormats(t *testing.T) {
	for _, c := range []struct {
		id             int
		code           string
		date, fraction bool
	}{
		{0, "", false, false}, {2, "", false, false}, {12, "", false, true}, {13, "", false, true},
		{14, "", true, false}, {22, "", true, false}, {46, "", true, false}, {49, "", false, false}, {9, "", false, false},
		{164, "# ?/?", false, true}, {164, "# ??/16", false, true}, {164, "d/m", true, false}, {164, "[h]:mm", true, false},
		{164, `0.0 "m/d"`, false, false}, {164, `#,##0.00\ "kN"`, false, false}, {164, "General", false, false},
		{164, "[$-809]dd mmmm yyyy;@", true, false}, {164, "[Red]0.0;[Blue]-0.0", false, false}, {164, "0.0_d", false, false},
		{164, "\x00[[[", false, false},
	} {
		f := classify(c.id, c.code)
		assert.Equal(t, c.date, f.date, "%d %q", c.id, c.code)
		assert.Equal(t, c.fraction, f.fraction, "%d %q", c.id, c.code)
	}
}

func TestDatesAndFractions(t *testing.T) {
	for _, on1904 := range []bool{false, true} {
		f := excelize.NewFile()
		require.NoError(t, f.SetWorkbookProps(&excelize.WorkbookPropsOptions{Date1904: &on1904}))
		set := func(cell string, v any, format string) {
			style, err := f.NewStyle(&excelize.Style{CustomNumFmt: &format})
			require.NoError(t, err)
			require.NoError(t, f.SetCellValue("Sheet1", cell, v))
			require.NoError(t, f.SetCellStyle("Sheet1", cell, cell, style))
		}
		day := 46055.0 // 2 February 2026, counted from 1900
		if on1904 {
			day -= 1462
		}
		set("A1", day, "d-mmm")
		set("B1", 0.5, "# ?/?")
		set("C1", 0.5, `0.00 "m"`)
		set("D1", day, "yyyy-mm-dd")
		row := all(t, saved(t, f), "Sheet1")[1]
		assert.Equal(t, schedule.Date, row[0].Kind)
		assert.Equal(t, "2-Feb", row[0].Text, "1904: %v", on1904)
		assert.Equal(t, schedule.Cell{Kind: schedule.Number, Number: 0.5, Text: "0.5", Fraction: true}, row[1])
		assert.Equal(t, schedule.Cell{Kind: schedule.Number, Number: 0.5, Text: "0.5"}, row[2])
		assert.Equal(t, "2026-02-02", row[3].Text)
	}
}

func TestMergedCellsAreRepeated(t *testing.T) {
	b := handmade(worksheet(
		`<row r="1"><c r="A1" t="inlineStr"><is><t>Axial</t></is></c></row>`+
			`<row r="2"><c r="A2" t="inlineStr"><is><t>C1</t></is></c><c r="B2"><v>1</v></c></row>`+
			`<row r="3"><c r="A3" s="1"/><c r="B3"><v>2</v></c></row>`+
			`<row r="4"><c r="A4" s="1"/></row>`+
			`<row r="6"><c r="B6"><v>3</v></c></row>`,
		`<mergeCells><mergeCell ref="A2:A6"/><mergeCell ref="A1:C1"/><mergeCell ref="D9:D10"/><mergeCell ref="F5:F6"/><mergeCell ref="G2"/><mergeCell ref="junk"/></mergeCells>`), nil).open(t)
	got := all(t, b, "Columns")
	axial := schedule.Cell{Kind: schedule.Text, Text: "Axial"}
	again := axial
	again.Merged = true
	assert.Equal(t, []schedule.Cell{axial, again, again}, got[1])
	mark := schedule.Cell{Kind: schedule.Text, Text: "C1", Merged: true}
	assert.Equal(t, mark, got[3][0])
	assert.Equal(t, mark, got[6][0])
	assert.NotContains(t, got, 4, "a row with nothing of its own is left out")
	assert.False(t, got[2][0].Merged)
}

func TestHugeMergeDoesNotFillTheSheet(t *testing.T) {
	b := handmade(worksheet(`<row r="1"><c r="A1"><v>1</v></c></row><row r="9"><c r="A9"><v>1</v></c></row>`,
		`<mergeCells><mergeCell ref="A1:XFD1048576"/></mergeCells>`), nil).open(t)
	assert.LessOrEqual(t, len(all(t, b, "Columns")[9]), maxMergedWidth)
}

func TestSheets(t *testing.T) {
	f := excelize.NewFile()
	odd := "It's £ 1 & <no>!"
	require.NoError(t, f.SetSheetName("Sheet1", odd))
	for _, name := range []string{"Hidden", "Very", "Last"} {
		_, err := f.NewSheet(name)
		require.NoError(t, err)
	}
	require.NoError(t, f.SetSheetVisible("Hidden", false))
	require.NoError(t, f.SetSheetVisible("Very", false, true))
	require.NoError(t, f.SetCellValue("Hidden", "B2", 7))
	require.NoError(t, f.SetCellValue(odd, "A1", "x"))
	require.NoError(t, f.SetColVisible(odd, "C:E", false))
	b := saved(t, f)
	assert.Equal(t, []string{odd, "Last"}, b.Sheets())
	assert.Equal(t, []string{"Hidden", "Very"}, b.HiddenSheets())
	assert.Equal(t, "7", all(t, b, "hidden")[2][1].Text, "named in another case")
	assert.Equal(t, odd+"!F12", b.Where(odd, 12, 5))
	assert.Equal(t, map[int]bool{2: true, 3: true, 4: true}, b.HiddenColumns(odd))
	assert.Empty(t, b.HiddenColumns("none"))
	for _, err := range b.Rows("none") {
		assert.ErrorContains(t, err, `loads.xlsx: has no sheet "none"`)
	}
}

func TestRowsCanBeReadAgainAndLeft(t *testing.T) {
	b := handmade(worksheet(`<row r="1"><c><v>1</v></c></row><row r="2"><c><v>2</v></c></row>`, ""), nil).open(t)
	for range b.Rows("Columns") {
		break
	}
	assert.Len(t, all(t, b, "Columns"), 2)
	assert.Len(t, all(t, b, "Columns"), 2)
}

func TestPrefixedAndStrictSheets(t *testing.T) {
	strict := "http://purl.oclc.org/ooxml/spreadsheetml/main"
	sheet := `<x:worksheet xmlns:x="` + strict + `"><x:cols><x:col min="2" max="2" hidden="true"/></x:cols><x:sheetData><x:row r="1"><x:c r="A1" t="inlineStr"><x:is><x:t>a</x:t></x:is></x:c><x:c r="B1"><x:f>1</x:f><x:v>2</x:v></x:c></x:row></x:sheetData><x:mergeCells><x:mergeCell ref="B1:C1"/></x:mergeCells></x:worksheet>`
	b := handmade(sheet, parts{
		"xl/workbook.xml":            `<x:workbook xmlns:x="` + strict + `" xmlns:q="http://purl.oclc.org/ooxml/officeDocument/relationships" conformance="strict"><x:sheets><x:sheet name="Columns" sheetId="1" q:id="rId1"/></x:sheets></x:workbook>`,
		"xl/_rels/workbook.xml.rels": `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://purl.oclc.org/ooxml/officeDocument/relationships/worksheet" Target="worksheets/sheet1.xml"/></Relationships>`,
	}).open(t)
	row := all(t, b, "Columns")[1]
	assert.Equal(t, schedule.Cell{Kind: schedule.Text, Text: "a"}, row[0])
	assert.Equal(t, schedule.Cell{Kind: schedule.Number, Number: 2, Text: "2", Formula: true}, row[1])
	assert.True(t, row[2].Merged)
	assert.Equal(t, map[int]bool{1: true}, b.HiddenColumns("Columns"))
}

func TestDamagedSheets(t *testing.T) {
	for name, sheet := range map[string]string{
		"breaks off":    `<worksheet><sheetData><row r="1"><c>`,
		"rows in turns": worksheet(`<row r="2"/><row r="1"/>`, ""),
		"wrong row":     worksheet(`<row r="2"><c r="A3"/></row>`, ""),
		"no reference":  worksheet(`<row r="2"><c r="2"/></row>`, ""),
		"far right":     worksheet(`<row r="2"><c r="XFE2"/></row>`, ""),
		"far down":      worksheet(`<row r="1048577"/>`, ""),
		"no XML":        `nothing`,
		"DTD":           `<!DOCTYPE x [<!ENTITY a "b">]><worksheet/>`,
	} {
		b := handmade(sheet, nil).open(t)
		var last error
		for _, err := range b.Rows("Columns") {
			last = err
		}
		var refusal *schedule.Refusal
		if assert.ErrorAs(t, last, &refusal, name) {
			assert.Contains(t, last.Error(), "loads.xlsx: is damaged", name)
		}
		b.HiddenColumns("Columns")
	}
	b := handmade("", parts{"xl/worksheets/sheet1.xml": "<worksheet/>"}).open(t)
	assert.Empty(t, all(t, b, "Columns"))
}

func TestFormulasWithoutValues(t *testing.T) {
	b := handmade(worksheet(
		`<row r="1"><c r="A1"><v>2</v></c><c r="B1"><f>A1*3</f></c><c r="C1"><f>B1+B2</f><v></v></c><c r="D1"><f>1/0</f></c><c r="E1"><f>NOSUCH(1)</f></c><c r="F1" t="str"><f>"a"&amp;A1</f></c><c r="G1"><f>A1&gt;1</f></c><c r="H1"><f>NOW()</f></c></row>`+
			`<row r="2"><c r="A2"><v>5</v></c><c r="B2"><f t="shared" ref="B2:B3" si="0">A2*10</f></c></row>`+
			`<row r="3"><c r="A3"><v>6</v></c><c r="B3"><f t="shared" si="0"/></c><c r="C3"><f>SUM(B1:B3)</f></c></row>`, ""), nil).open(t)
	got := all(t, b, "Columns")
	number := func(n float64) schedule.Cell {
		return schedule.Cell{Kind: schedule.Number, Number: n, Text: fmt.Sprint(n), Formula: true}
	}
	assert.Equal(t, number(6), got[1][1])
	assert.Equal(t, number(56), got[1][2])
	assert.Equal(t, schedule.Cell{Kind: schedule.Fault, Text: "#DIV/0!", Formula: true}, got[1][3])
	assert.Equal(t, schedule.Uncalculated, got[1][4].Kind)
	assert.Equal(t, "=NOSUCH(1)", got[1][4].Text)
	assert.Equal(t, schedule.Cell{Kind: schedule.Text, Text: "a2", Formula: true}, got[1][5])
	assert.Equal(t, schedule.Cell{Kind: schedule.Bool, Text: "TRUE", Formula: true}, got[1][6])
	assert.Equal(t, schedule.Uncalculated, got[1][7].Kind)
	assert.Equal(t, number(50), got[2][1])
	assert.Equal(t, number(60), got[3][1])
	assert.Equal(t, number(116), got[3][2])
}

func TestGreedyFormulasAreNotCalculated(t *testing.T) {
	for _, formula := range []string{`REPT("x",1E9)`, `SUM(A1:XFD1048576)`, `SUM(INDIRECT("A1:XFD1048576"))`} {
		b := handmade(worksheet(`<row r="1"><c r="A1"><f>1+1</f></c></row><row r="2"><c r="A2"><f>`+formula+`</f></c></row>`, ""), nil).open(t)
		assert.Equal(t, schedule.Uncalculated, all(t, b, "Columns")[1][0].Kind, formula)
	}
}

func TestLongChainOfFormulas(t *testing.T) {
	const n = maxFormulas - 1
	rows := ""
	var buf []byte
	for i := 1; i <= n; i++ {
		buf = fmt.Appendf(buf, `<row r="%d"><c r="A%d"><f>IF(1&gt;0,SUM(A%d,1),0)</f></c></row>`, i, i, i+1)
	}
	rows = string(buf) + fmt.Sprintf(`<row r="%d"><c><v>1</v></c></row>`, n+1)
	b := handmade(worksheet(rows, ""), nil).open(t)
	for row, err := range b.Rows("Columns") {
		require.NoError(t, err)
		assert.Equal(t, float64(n+1), row.Cells[0].Number)
		break
	}
}
