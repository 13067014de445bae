package workbook

import (
	"bytes"
	"context"
	"errors"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

func oneRowBlock() Block {
	b := simpleBlock(4)
	b.Title = ""
	b.Header = schedule.Header{First: 1, Last: 1, Width: 2}
	b.Cells = func(row int) []schedule.Value { return someValues(row) }
	return b
}

func TestSheetsWrittenInOddWays(t *testing.T) {
	strict := "http://purl.oclc.org/ooxml/spreadsheetml/main"
	strictBook := parts{
		"xl/workbook.xml":            `<x:workbook xmlns:x="` + strict + `" xmlns:q="http://purl.oclc.org/ooxml/officeDocument/relationships" conformance="strict"><x:sheets><x:sheet name="Columns" sheetId="1" q:id="rId1"/></x:sheets></x:workbook>`,
		"xl/_rels/workbook.xml.rels": strings.ReplaceAll(handmade("", nil)["xl/_rels/workbook.xml.rels"], "http://schemas.openxmlformats.org/officeDocument/2006/relationships", "http://purl.oclc.org/ooxml/officeDocument/relationships"),
		"xl/styles.xml":              `<x:styleSheet xmlns:x="` + strict + `"><x:fonts count="1"><x:font><x:sz val="10"/><x:name val="Arial"/></x:font></x:fonts><x:fills count="2"><x:fill><x:patternFill patternType="none"/></x:fill><x:fill><x:patternFill patternType="gray125"/></x:fill></x:fills><x:borders count="1"><x:border/></x:borders><x:cellStyleXfs count="1"><x:xf/></x:cellStyleXfs><x:cellXfs count="1"><x:xf xfId="0"/></x:cellXfs></x:styleSheet>`,
	}
	noStyles := parts{"xl/_rels/workbook.xml.rels": strings.Replace(handmade("", nil)["xl/_rels/workbook.xml.rels"], "styles", "none", 1)}
	for name, c := range map[string]struct {
		sheet string
		more  parts
	}{
		"no references":    {worksheet(`<row><c><v>1</v></c><c><v>2</v></c></row><row/><row r="4"><c><v>3</v></c></row>`, ""), nil},
		"cells in the way": {worksheet(`<row r="1"><c r="A1"><v>1</v></c><c r="C1" s="0"/><c r="Z1"><v>26</v></c></row><row r="2"><c r="D2"/><c r="Z2"/></row>`, ""), nil},
		"no cells":         {`<worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetData/></worksheet>`, nil},
		"empty data":       {worksheet("", `<mergeCells count="1"><mergeCell ref="A8:A9"/></mergeCells>`), nil},
		"extension in row": {worksheet(`<row r="2"><c r="A2"><v>1</v></c><extLst><ext uri="u"/></extLst></row>`, ""), nil},
		"strict, prefixed": {`<x:worksheet xmlns:x="` + strict + `"><x:sheetData><x:row r="2"><x:c r="A2"><x:v>1</x:v></x:c></x:row></x:sheetData></x:worksheet>`, strictBook},
		"no styles":        {worksheet(`<row r="2"><c r="A2"><v>1</v></c></row>`, ""), noStyles},
	} {
		in := handmade(c.sheet, c.more).bytes(t)
		block := oneRowBlock()
		out := annotate(t, in, block, ownSheets()...)
		requireGrid(t, in, out, block)
		b, err := OpenBytes("out.xlsx", out)
		require.NoError(t, err, name)
		assert.Equal(t, "Result: status", all(t, b, "Columns")[1][planFor(t, in, block).place.rows.firstCol].Text, name)
		assert.Equal(t, "Summary", all(t, b, "Summary")[1][0].Text, name)
		if name == "extension in row" {
			assert.Contains(t, unpack(t, out)["xl/worksheets/sheet1.xml"], `</c><extLst><ext uri="u"/></extLst></row>`)
		}
		if name == "strict, prefixed" {
			for part, content := range unpack(t, out) {
				assert.NotContains(t, content, "http://schemas.openxmlformats.org/spreadsheetml", part)
			}
		}
		again := block
		again.Header.Old = nil
		for i := range block.Columns {
			again.Header.Old = append(again.Header.Old, planFor(t, in, block).place.rows.firstCol+i)
		}
		twice := annotate(t, out, again, ownSheets()...)
		if name == "no references" { // they are put in where cells are gone through one by one
			assert.Equal(t, dump(t, out), dump(t, twice))
			continue
		}
		requireSame(t, out, twice)
	}
}

func TestStrictWorkbookOpensInAnotherProgram(t *testing.T) {
	sheet := strings.ReplaceAll(worksheet(`<row r="2"><c r="A2"><v>1</v></c></row>`, ""), "http://schemas.openxmlformats.org/spreadsheetml/2006/main", "http://purl.oclc.org/ooxml/spreadsheetml/main")
	p := handmade(sheet, nil)
	for _, name := range []string{"xl/workbook.xml", "xl/styles.xml", "xl/_rels/workbook.xml.rels", "_rels/.rels", "xl/worksheets/sheet1.xml"} {
		p[name] = strictNames.Replace(p[name])
	}
	path := throughOffice(t, annotate(t, p.bytes(t), oneRowBlock(), ownSheets()...), ".xlsx", "xlsx")
	f, err := excelize.OpenFile(path)
	require.NoError(t, err)
	defer f.Close()
	got, err := f.GetCellValue("Columns", "C2")
	require.NoError(t, err)
	assert.Equal(t, "✗ no section", got)
	got, err = f.GetCellValue("Summary", "A1")
	require.NoError(t, err)
	assert.Equal(t, "Summary", got)
}

func TestOwnSheetsOfAnEarlierRun(t *testing.T) {
	once := annotate(t, rich(t), richBlock(), ownSheets()...)
	p := unpack(t, once)
	// Somebody renames the summary, moves it to the front, and stands on the
	// schedule.
	book := p["xl/workbook.xml"]
	summary := regexp.MustCompile(`<sheet name="Summary"[^>]*>`).FindString(book)
	require.NotEmpty(t, summary)
	book = strings.Replace(book, summary, "", 1)
	book = strings.Replace(book, "<sheets>", `<sheets>`+strings.Replace(summary, "Summary", "Overview", 1), 1)
	for from, to := range map[string]string{"0": "1 ", "1": "2 ", "2": "3 ", "3": "4 ", "4": "0 "} {
		book = strings.ReplaceAll(book, `localSheetId="`+from+`"`, `localSheetId="`+to+`"`)
	}
	book = strings.ReplaceAll(book, ` " `, `" `)
	book = strings.ReplaceAll(book, ` ">`, `">`)
	p["xl/workbook.xml"] = strings.Replace(book, "<workbookView ", `<workbookView activeTab="1" `, 1)
	moved := p.bytes(t)

	block := richBlock()
	block.Header.Old = []int{5, 6, 7, 8, 9, 10}
	b, err := OpenBytes("loads.xlsx", moved)
	require.NoError(t, err)
	assert.Equal(t, []string{"Columns", "Notes", "Data"}, b.Sheets())

	plan, err := b.Plan(block)
	require.NoError(t, err)
	assert.Equal(t, "Overview", plan.SheetName("Summary"), "it keeps the name that it was given")
	assert.Equal(t, "Sizes used", plan.SheetName("Sizes used"))

	again := annotate(t, moved, block, ownSheets()...)
	f, err := excelize.OpenReader(bytes.NewReader(again))
	require.NoError(t, err)
	assert.Equal(t, []string{"Overview", "Columns", "Notes", "Data", "Secret", "Sizes used"}, f.GetSheetList())
	requirePartsOnce(t, again)

	// A run that makes no summary takes it away; what belongs to the others
	// moves with them.
	less := annotate(t, moved, block, ownSheets()[1])
	f, err = excelize.OpenReader(bytes.NewReader(less))
	require.NoError(t, err)
	assert.Equal(t, []string{"Columns", "Notes", "Data", "Secret", "Sizes used"}, f.GetSheetList())
	assert.Equal(t, 0, f.GetActiveSheetIndex())
	for _, n := range f.GetDefinedName() {
		switch n.Name {
		case "_xlnm.Print_Area":
			assert.Equal(t, "Columns", n.Scope)
			assert.Equal(t, "Columns!$A$1:$E$14", n.RefersTo)
		case "_stanchion_sheet":
			assert.Equal(t, "Sizes used", n.Scope)
		}
	}
	requirePartsOnce(t, less)
}

// requirePartsOnce requires that every worksheet, chart and drawing part is
// joined to something.
func requirePartsOnce(t *testing.T, data []byte) {
	t.Helper()
	b, err := OpenBytes("out.xlsx", data)
	require.NoError(t, err)
	joined := map[string]bool{}
	for _, name := range append(b.pkg.Names(), "") {
		rels, err := b.pkg.Rels(name)
		require.NoError(t, err)
		for _, r := range rels {
			joined[partKey(r.Target)] = true
		}
	}
	for _, name := range b.pkg.Names() {
		if !strings.HasSuffix(name, ".rels") && name != "[Content_Types].xml" {
			assert.True(t, joined[partKey(name)], name)
		}
	}
}

func TestCopyOfAnOwnSheetIsTheUsers(t *testing.T) {
	p := unpack(t, annotate(t, rich(t), richBlock(), ownSheets()...))
	p["xl/worksheets/sheet9.xml"] = worksheet(`<row r="1"><c r="A1" t="inlineStr"><is><t>mine</t></is></c></row>`, "")
	p["xl/workbook.xml"] = insertBefore(p["xl/workbook.xml"], "</sheets>", `<sheet name="Summary (mine)" sheetId="99" r:id="rId199"/>`)
	p["xl/workbook.xml"] = insertBefore(p["xl/workbook.xml"], "</definedNames>", `<definedName name="_stanchion_sheet" localSheetId="6">"Summary"</definedName>`)
	p["xl/_rels/workbook.xml.rels"] = insertBefore(p["xl/_rels/workbook.xml.rels"], "</Relationships>", `<Relationship Id="rId199" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet" Target="worksheets/sheet9.xml"/>`)
	p["[Content_Types].xml"] = insertBefore(p["[Content_Types].xml"], "</Types>", `<Override PartName="/xl/worksheets/sheet9.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml"/>`)
	block := richBlock()
	block.Header.Old = []int{5, 6, 7, 8, 9, 10}
	out := annotate(t, p.bytes(t), block, ownSheets()...)
	assert.Contains(t, dump(t, out), "Summary (mine)!A1 = mine")
	requirePartsOnce(t, out)

	b, err := OpenBytes("loads.xlsx", out)
	require.NoError(t, err)
	block.Sheet = "Summary"
	_, err = b.Plan(block)
	assert.ErrorContains(t, err, "was written by an earlier run")
}

func TestNamesOfOwnSheets(t *testing.T) {
	f := simple(t, 14)
	for _, name := range []string{"summary", "Summary (2)"} {
		_, err := f.NewSheet(name)
		require.NoError(t, err)
	}
	p := planFor(t, packed(t, f), simpleBlock(14))
	assert.Equal(t, "Summary (3)", p.SheetName("Summary"))
	assert.Equal(t, "Working of C1-C2 -ground floor-", p.SheetName("Working of C1/C2 [ground floor] and more"))
	assert.Equal(t, "a", p.SheetName("'a'"))
}

func TestCalculationOrderIsDroppedWhereCellsGo(t *testing.T) {
	more := parts{
		"xl/calcChain.xml":           `<calcChain xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><c r="A2" i="1"/></calcChain>`,
		"xl/_rels/workbook.xml.rels": insertBefore(handmade("", nil)["xl/_rels/workbook.xml.rels"], "</Relationships>", `<Relationship Id="rId9" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/calcChain" Target="calcChain.xml"/>`),
	}
	in := handmade(worksheet(`<row r="2"><c r="A2"><f>1+1</f><v>2</v></c></row>`, ""), more).bytes(t)
	once := annotate(t, in, oneRowBlock())
	assert.Contains(t, unpack(t, once), "xl/calcChain.xml")
	assert.Contains(t, unpack(t, once)["xl/workbook.xml"], `<calcPr fullCalcOnLoad="1"/>`)
	again := oneRowBlock()
	again.Header.Old = []int{2, 3, 4, 5, 6, 7}
	twice := unpack(t, annotate(t, once, again))
	assert.NotContains(t, twice, "xl/calcChain.xml")
	assert.NotContains(t, twice["xl/_rels/workbook.xml.rels"], "calcChain")
}

func TestWrite(t *testing.T) {
	dir := t.TempDir()
	plan := planFor(t, rich(t), richBlock())
	path := filepath.Join(dir, "loads-sized.xlsm")
	require.NoError(t, plan.Write(context.Background(), path, ownSheets()))
	assert.True(t, WrittenByUs(path))

	f, err := excelize.OpenFile(path)
	require.NoError(t, err)
	require.NoError(t, f.Save())
	assert.False(t, WrittenByUs(path), "another program has saved it")
	assert.False(t, WrittenByUs(dir))
	assert.False(t, WrittenByUs(filepath.Join(dir, "none.xlsx")))

	err = plan.Write(context.Background(), filepath.Join(dir, "loads.xlsx"), nil)
	assert.EqualError(t, err, "loads.xlsx: holds macros, and a file named .xlsx does not go with that: name the output .xlsm")
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	assert.ErrorIs(t, plan.Write(ctx, filepath.Join(dir, "stopped.xlsm"), nil), context.Canceled)
	entries, err := os.ReadDir(dir)
	require.NoError(t, err)
	assert.Len(t, entries, 1, "nothing else is left")
}

func TestExtensions(t *testing.T) {
	p := handmade(worksheet("", ""), nil)
	b := p.open(t)
	assert.Equal(t, ".xlsx", b.Extension())
	d, err := b.newDraft()
	require.NoError(t, err)
	require.NoError(t, d.fitExtension(".xltx"))
	assert.Contains(t, string(d.types.apply()), workbookTypes[".xltx"])
	assert.NoError(t, d.fitExtension(".data"))
	assert.ErrorContains(t, d.fitExtension(".xlsm"), "holds no macros")
}

func TestSignedWorkbookWarns(t *testing.T) {
	p := handmade(worksheet("", ""), parts{"_xmlsignatures/sig1.xml": "<a/>"})
	assert.Len(t, planFor(t, p.bytes(t), oneRowBlock()).Warnings(), 1)
	assert.Empty(t, planFor(t, rich(t), richBlock()).Warnings())
}

func TestWritingErrorsComeThrough(t *testing.T) {
	full := errors.New("full")
	err := planFor(t, rich(t), richBlock()).WriteTo(failing{full}, nil)
	assert.ErrorIs(t, err, full)
}

type failing struct{ err error }

func (f failing) Write([]byte) (int, error) { return 0, f.err }

func TestValuesThatCellsCannotHold(t *testing.T) {
	block := oneRowBlock()
	nan := 0.0
	block.Cells = func(row int) []schedule.Value {
		v := someValues(row)
		v[1].Text = strings.Repeat("😀", maxText)
		v[2].Number = nan / nan
		v[5].Text = "a\x00b_x000D_\nc "
		return v[:6]
	}
	b, err := OpenBytes("out.xlsx", annotate(t, handmade(worksheet("", ""), nil).bytes(t), block))
	require.NoError(t, err)
	row := all(t, b, "Columns")[3]
	assert.Equal(t, (maxText-1)/2+1, len([]rune(row[3].Text)))
	assert.True(t, strings.HasSuffix(row[3].Text, "…"))
	assert.Equal(t, schedule.Blank, row[4].Kind)
	assert.Equal(t, "a\uFFFDb_x000D_\nc ", row[7].Text)
}

// FuzzAnnotate writes results into sheets of any content: a workbook that opens
// again, or an error.
func FuzzAnnotate(f *testing.F) {
	f.Add(worksheet(`<row r="1"><c r="A1" t="s"><v>0</v></c></row>`, `<mergeCells><mergeCell ref="A1:B2"/></mergeCells>`), "", 2)
	f.Add(worksheet(`<row><c/><c r="F1"/></row><row r="9"/>`, `<autoFilter ref="A1:B9"/>`), `<definedNames><definedName name="_xlnm.Print_Area" localSheetId="0">Columns!$A$1:$B$9</definedName></definedNames>`, 1)
	f.Fuzz(func(t *testing.T, sheet, names string, width int) {
		p := handmade(sheet, nil)
		p["xl/workbook.xml"] = insertBefore(p["xl/workbook.xml"], "</workbook>", names)
		b, err := OpenBytes("loads.xlsx", p.bytes(t))
		if err != nil {
			return
		}
		defer b.Close()
		block := oneRowBlock()
		block.Header.Width = min(max(1, width), 100)
		plan, err := b.Plan(block)
		if err != nil {
			requireForeseen(t, err)
			return
		}
		var out bytes.Buffer
		if err := plan.WriteTo(&out, ownSheets()[1:]); err != nil {
			requireForeseen(t, err)
			return
		}
		after, err := OpenBytes("out.xlsx", out.Bytes())
		require.NoError(t, err)
		defer after.Close()
		for _, err := range after.Rows("Columns") {
			require.NoError(t, err)
		}
	})
}

// requireForeseen requires that an error is not a panic that was caught.
func requireForeseen(t *testing.T, err error) {
	t.Helper()
	require.NotContains(t, err.Error(), "runtime error")
}
