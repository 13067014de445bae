package workbook

import (
	"bytes"
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
	"pgregory.net/rapid"

	"stanchion/schedule"
)

func planFor(t testing.TB, data []byte, block Block) *Plan {
	t.Helper()
	b, err := OpenBytes("loads.xlsx", data)
	require.NoError(t, err)
	t.Cleanup(func() { b.Close() })
	p, err := b.Plan(block)
	require.NoError(t, err)
	return p
}

func TestBlockStandsRightOfEverything(t *testing.T) {
	for name, c := range map[string]struct {
		add  func(f *excelize.File) error
		want string
	}{
		"nothing":       {func(*excelize.File) error { return nil }, "F"},
		"a value":       {func(f *excelize.File) error { return f.SetCellValue("Columns", "H9", "mine") }, "I"},
		"a value above": {func(f *excelize.File) error { return f.SetCellValue("Columns", "H1", "Rev C") }, "F"},
		"a value below": {func(f *excelize.File) error { return f.SetCellValue("Columns", "H40", "total") }, "F"},
		"merged cells":  {func(f *excelize.File) error { return f.MergeCell("Columns", "G8", "J9") }, "K"},
		"a table": {func(f *excelize.File) error {
			return f.AddTable("Columns", &excelize.Table{Range: "H10:I12"})
		}, "J"},
		"a chart": {func(f *excelize.File) error {
			return f.AddChart("Columns", "H8", &excelize.Chart{Type: excelize.Col, Series: []excelize.ChartSeries{{Values: "Columns!$C$6:$C$9"}}})
		}, "P"},
		"a styled cell": {func(f *excelize.File) error {
			id, err := f.NewStyle(&excelize.Style{Font: &excelize.Font{Bold: true}})
			if err != nil {
				return err
			}
			return f.SetCellStyle("Columns", "G7", "G7", id)
		}, "H"},
		"a row styled to the end": {func(f *excelize.File) error {
			id, err := f.NewStyle(&excelize.Style{Font: &excelize.Font{Bold: true}})
			if err != nil {
				return err
			}
			return f.SetCellStyle("Columns", "G7", "CZ7", id)
		}, "F"},
	} {
		f := simple(t, 14)
		require.NoError(t, c.add(f), name)
		p := planFor(t, packed(t, f), simpleBlock(14))
		assert.Equal(t, c.want, p.Column(0), name)
	}
}

// A drawing that has its size, and no cell where it ends, is as wide as its
// columns are: 5 760 000 parts are 604.7 pixels of 9 525 (ECMA-376, 20.1.2.1),
// which is 8 columns of 71 pixels and half of another, and of 141 pixels 4.
func TestBlockStandsRightOfDrawingsThatHaveTheirSize(t *testing.T) {
	const rels = `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/drawing" Target="../drawings/drawing1.xml"/></Relationships>`
	const from = `<oneCellAnchor><from><col>6</col><colOff>0</colOff><row>7</row><rowOff>0</rowOff></from><ext cx="5760000" cy="2700000"/></oneCellAnchor>`
	// 7 columns of 64 pixels and 7 rows of 20 pixels.
	const at = `<absoluteAnchor><pos x="4267200" y="1333500"/><ext cx="5760000" cy="2700000"/></absoluteAnchor>`
	const cols = `<cols><col min="7" max="30" width="10.14" customWidth="1"/></cols>`
	const wide = `<cols><col min="7" max="8" width="20.14" customWidth="1"/><col min="9" max="30" width="20.14" customWidth="1"/></cols>`
	const above = `<oneCellAnchor><from><col>6</col><colOff>0</colOff><row>0</row><rowOff>0</rowOff></from><ext cx="5760000" cy="190500"/></oneCellAnchor>`
	for name, c := range map[string]struct{ cols, drawing, want string }{
		"from a cell":        {cols, from, "P"},
		"over wide columns":  {wide, from, "L"},
		"usual columns":      {"", from, "Q"},
		"from a point":       {"", at, "R"},
		"above the headings": {cols, above, "F"},
	} {
		sheet := strings.Replace(worksheet("", `<drawing r:id="rId1"/>`), "<sheetData>", c.cols+"<sheetData>", 1)
		p := planFor(t, handmade(sheet, parts{
			"xl/worksheets/_rels/sheet1.xml.rels": rels,
			"xl/drawings/drawing1.xml":            `<wsDr xmlns="http://schemas.openxmlformats.org/drawingml/2006/spreadsheetDrawing">` + c.drawing + `</wsDr>`,
		}).bytes(t), simpleBlock(14))
		assert.Equal(t, c.want, p.Column(0), name)
	}
}

func TestHeadingsFitTheRoomThereIs(t *testing.T) {
	rows := func(p *Plan) [4]int { return [4]int{p.place.title, p.place.group, p.place.heading, p.place.unit} }

	two := simpleBlock(14)
	assert.Equal(t, [4]int{2, 3, 4, 5}, rows(planFor(t, packed(t, simple(t, 14)), two)))

	f := simple(t, 14)
	require.NoError(t, f.SetCellValue("Columns", "F2", "mine"))
	assert.Equal(t, [4]int{0, 3, 4, 5}, rows(planFor(t, packed(t, f), two)), "no room for the title")

	f = simple(t, 14)
	require.NoError(t, f.MergeCell("Columns", "A2", "Z2"))
	assert.Equal(t, [4]int{0, 3, 4, 5}, rows(planFor(t, packed(t, f), two)), "a merged title of the user's")

	f = excelize.NewFile()
	require.NoError(t, f.SetSheetName("Sheet1", "Columns"))
	require.NoError(t, f.SetCellValue("Columns", "A1", "Mark"))
	one := simpleBlock(14)
	one.Header = schedule.Header{First: 1, Last: 1, Width: 1}
	p := planFor(t, packed(t, f), one)
	assert.Equal(t, [4]int{0, 0, 1, 0}, rows(p))
	cells, merges := p.headings()
	assert.Empty(t, merges)
	assert.Equal(t, "Result: N_b,y,Rd [kN]", cells[3].text, "the unit stands in the heading")
	assert.Equal(t, "'Columns'!$B$2:$B$14", p.Range(0))
}

func TestRunAgain(t *testing.T) {
	once := annotate(t, packed(t, simple(t, 14)), simpleBlock(14))
	narrow := simpleBlock(14)
	narrow.Columns = narrow.Columns[:4]
	wide := simpleBlock(14)
	wide.Columns = append(wide.Columns, schedule.ResultColumn{Name: "more", Width: 8}, schedule.ResultColumn{Name: "and more", Width: 8})
	old := []int{5, 6, 7, 8, 9, 10}

	for name, block := range map[string]Block{"narrower": narrow, "wider": wide} {
		block.Header.Old = old
		assert.Equal(t, "F", planFor(t, once, block).Column(0), name)
		fresh := block
		fresh.Header.Old = nil
		want := annotate(t, packed(t, simple(t, 14)), fresh)
		assert.Equal(t, dump(t, want), dump(t, annotate(t, once, block)), "%s: as if there had been no earlier run", name)
	}

	shorter := simpleBlock(9)
	shorter.Header.Old = old
	got := dump(t, annotate(t, once, shorter))
	assert.NotContains(t, got, "row 12", "what the earlier run said of rows that are gone")
	assert.Contains(t, got, "Columns!C12 = 1200", "and nothing else")
}

func TestRunAgainBesideTheUsersColumns(t *testing.T) {
	once := annotate(t, packed(t, simple(t, 14)), simpleBlock(14))
	f, err := excelize.OpenReader(bytes.NewReader(once))
	require.NoError(t, err)
	require.NoError(t, f.SetCellValue("Columns", "L4", "Checked by"))
	require.NoError(t, f.SetCellValue("Columns", "L9", "me"))
	require.NoError(t, f.SetCellValue("Columns", "G30", "below the results"))
	worked := packed(t, f)

	same := simpleBlock(14)
	same.Header.Old, same.Header.Width = []int{5, 6, 7, 8, 9, 10}, 12
	got := dump(t, annotate(t, worked, same))
	assert.Contains(t, got, "Columns!F4 = Result: status", "in the old place")
	assert.Contains(t, got, "Columns!L9 = me")
	assert.Contains(t, got, "Columns!G30 = below the results")

	wide := same
	wide.Columns = append(someColumns(), schedule.ResultColumn{Name: "more", Width: 8})
	got = dump(t, annotate(t, worked, wide))
	assert.Contains(t, got, "Columns!M4 = Result: status", "right of everything")
	assert.Contains(t, got, "Columns!L4 = Checked by")
	assert.NotContains(t, got, "Columns!F", "the old results are gone")
	assert.NotContains(t, got, "Columns!K")
}

func TestRunAgainAfterColumnsWereInserted(t *testing.T) {
	once := annotate(t, packed(t, simple(t, 14)), simpleBlock(14))
	f, err := excelize.OpenReader(bytes.NewReader(once))
	require.NoError(t, err)
	require.NoError(t, f.InsertCols("Columns", "H", 1))
	require.NoError(t, f.SetCellValue("Columns", "H9", "mine"))
	block := simpleBlock(14)
	block.Header.Old, block.Header.Width = []int{5, 6, 8, 9, 10, 11}, 8
	got := dump(t, annotate(t, packed(t, f), block))
	assert.Contains(t, got, "Columns!H9 = mine")
	assert.Contains(t, got, "Columns!I4 = Result: status")
	assert.Equal(t, 1, strings.Count(got, "Result: status"))
}

// tableSchedule is a schedule in a table, with results expected from column D.
func tableSchedule(t testing.TB) *excelize.File {
	f := excelize.NewFile()
	require.NoError(t, f.SetSheetName("Sheet1", "Columns"))
	for c, h := range []string{"Mark", "Length", "NEd"} {
		require.NoError(t, f.SetCellValue("Columns", cellName(c, 3), h))
		for r := 4; r <= 9; r++ {
			require.NoError(t, f.SetCellValue("Columns", cellName(c, r), r*10+c))
		}
	}
	require.NoError(t, f.AddTable("Columns", &excelize.Table{Range: "A3:C9", Name: "Loads", StyleName: "TableStyleMedium2"}))
	return f
}

func tableBlock() Block {
	b := simpleBlock(9)
	b.Header = schedule.Header{First: 3, Last: 3, Width: 3}
	b.Cells = func(row int) []schedule.Value { return someValues(row) }
	return b
}

func TestTableTakesInTheResults(t *testing.T) {
	in := packed(t, tableSchedule(t))
	once := annotate(t, in, tableBlock())
	f, err := excelize.OpenReader(bytes.NewReader(once))
	require.NoError(t, err)
	tables, err := f.GetTables("Columns")
	require.NoError(t, err)
	require.Len(t, tables, 1)
	assert.Equal(t, "A3:I9", tables[0].Range)
	requireTableHeadings(t, once)

	again := tableBlock()
	again.Header.Old = []int{3, 4, 5, 6, 7, 8}
	requireSame(t, once, annotate(t, once, again))

	again.Columns = append(someColumns()[1:], schedule.ResultColumn{Name: "more"}, schedule.ResultColumn{Name: "most"})
	requireTableHeadings(t, annotate(t, once, again))
	again.Columns = again.Columns[:2]
	requireTableHeadings(t, annotate(t, once, again))
}

// requireTableHeadings requires what spreadsheet programs require of a table:
// that its columns are named as the cells of its first row, in its range.
func requireTableHeadings(t *testing.T, data []byte) {
	t.Helper()
	b, err := OpenBytes("out.xlsx", data)
	require.NoError(t, err)
	tables, err := b.tables(b.find("Columns"))
	require.NoError(t, err)
	require.Len(t, tables, 1)
	table := tables[0]
	cells := all(t, b, "Columns")[table.firstRow]
	list := table.root.Child("tableColumns")
	columns := list.All("tableColumn")
	require.Len(t, columns, table.lastCol-table.firstCol+1)
	assert.Equal(t, fmt.Sprint(len(columns)), list.Attr("count"))
	assert.Equal(t, table.area.String(), table.root.Child("autoFilter").Attr("ref"))
	ids := map[string]bool{}
	for i, c := range columns {
		assert.Equal(t, cells[table.firstCol+i].Text, c.Attr("name"))
		assert.False(t, ids[c.Attr("id")], "ids differ")
		ids[c.Attr("id")] = true
	}
}

func TestTableWithTheUsersColumnsBehindTheResults(t *testing.T) {
	once := annotate(t, packed(t, tableSchedule(t)), tableBlock())
	p := unpack(t, once)
	table := p["xl/tables/table1.xml"]
	table = strings.ReplaceAll(table, "A3:I9", "A3:J9")
	table = strings.Replace(table, `count="9"`, `count="10"`, 1)
	p["xl/tables/table1.xml"] = insertBefore(table, "</tableColumns>", `<tableColumn id="40" name="Mine"/>`)
	p["xl/worksheets/sheet1.xml"] = strings.Replace(p["xl/worksheets/sheet1.xml"], `</is></c></row><row r="4"`, `</is></c><c r="J3" t="inlineStr"><is><t>Mine</t></is></c></row><row r="4"`, 1)
	data := p.bytes(t)

	block := tableBlock()
	block.Header.Old, block.Header.Width = []int{3, 4, 5, 6, 7, 8}, 10
	block.Columns[0].Name = "outcome"
	requireTableHeadings(t, annotate(t, data, block))

	block.Columns = block.Columns[:3]
	b, err := OpenBytes("loads.xlsx", data)
	require.NoError(t, err)
	plan, err := b.Plan(block)
	require.NoError(t, err)
	assert.ErrorContains(t, plan.WriteTo(&bytes.Buffer{}, nil), `stand in the middle of the table "Loads"`)
}

func TestTooFarRight(t *testing.T) {
	f := simple(t, 14)
	require.NoError(t, f.SetCellValue("Columns", "XFA9", 1))
	b, err := OpenBytes("loads.xlsx", packed(t, f))
	require.NoError(t, err)
	_, err = b.Plan(simpleBlock(14))
	assert.ErrorContains(t, err, "is used up to column XFA")
}

func TestHeadingWidths(t *testing.T) {
	for _, c := range []struct {
		text  string
		lines int
		want  int
	}{
		{"Result: status", 1, 14}, {"Result: status", 2, 7}, {"Result: governing combination", 2, 17},
		{"Result: governing combination", 3, 11}, {"word", 5, 4}, {"", 1, 0},
	} {
		assert.Equal(t, c.want, wrapped(c.text, c.lines), "%q in %d", c.text, c.lines)
	}
}

// TestAnyGrid annotates sheets of any shape and requires that every cell of
// the user's is where it was, and every result where the plan says.
func TestAnyGrid(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		f := excelize.NewFile()
		require.NoError(t, f.SetSheetName("Sheet1", "Columns"))
		cells := rapid.SliceOfN(rapid.Custom(func(t *rapid.T) [2]int {
			return [2]int{rapid.IntRange(0, 12).Draw(t, "col"), rapid.IntRange(1, 20).Draw(t, "row")}
		}), 1, 40).Draw(rt, "cells")
		width := 1
		for i, c := range cells {
			require.NoError(t, f.SetCellValue("Columns", cellName(c[0], c[1]), fmt.Sprintf("cell %d", i)))
			width = max(width, c[0]+1)
		}
		head := rapid.IntRange(1, 6).Draw(rt, "header")
		block := simpleBlock(rapid.IntRange(head, 25).Draw(rt, "last"))
		block.Header = schedule.Header{First: head, Last: head, Width: width}
		every := rapid.IntRange(1, 5).Draw(rt, "every")
		block.Cells = func(row int) []schedule.Value {
			if row%every > 0 {
				return nil
			}
			return someValues(row)
		}
		in := packed(t, f)
		out := annotate(t, in, block)
		requireGrid(t, in, out, block)
	})
}

func requireGrid(t *testing.T, in, out []byte, block Block) {
	t.Helper()
	before, err := OpenBytes("in.xlsx", in)
	require.NoError(t, err)
	after, err := OpenBytes("out.xlsx", out)
	require.NoError(t, err)
	old, got := all(t, before, "Columns"), all(t, after, "Columns")
	for row, cells := range old {
		for col, c := range cells {
			if c.Kind != schedule.Blank {
				require.Equal(t, c, got[row][col], cellName(col, row))
			}
		}
	}
	start := planFor(t, in, block).place.rows.firstCol
	for row := block.Header.Last + 1; row <= block.LastRow; row++ {
		for i, v := range block.Cells(row) {
			c := got[row][start+i]
			require.Equal(t, v.Kind, c.Kind)
			require.Equal(t, v.Number, c.Number)
			if v.Kind == schedule.Text {
				require.Equal(t, v.Text, c.Text)
			}
		}
	}
}
