package workbook

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/schedule"
)

// screenSheet is a schedule of three members below one row of headings.
const screenRows = `<row r="1"><c r="A1" t="inlineStr"><is><t>Mark</t></is></c><c r="B1" t="inlineStr"><is><t>N_Ed</t></is></c></row>` +
	`<row r="2"><c r="A2"><v>1</v></c><c r="B2"><v>5</v></c></row><row r="3"><c r="A3"><v>2</v></c><c r="B3"><v>5</v></c></row><row r="4"><c r="A4"><v>3</v></c><c r="B4"><v>5</v></c></row>`

func screenBlock(last int) Block {
	b := simpleBlock(last)
	b.Header = schedule.Header{First: 1, Last: 1, Width: 2, Columns: []schedule.Binding{{Col: 0, Field: "Mark"}, {Col: 1, Field: "N_Ed"}}}
	return b
}

func TestScheduleStaysInViewAndCanBeFiltered(t *testing.T) {
	once := annotate(t, handmade(worksheet(screenRows, ""), nil).bytes(t), screenBlock(4))
	got := unpack(t, once)
	sheet, book := got["xl/worksheets/sheet1.xml"], got["xl/workbook.xml"]
	assert.Contains(t, sheet, `<pane xSplit="1" ySplit="1" topLeftCell="B2" activePane="bottomRight" state="frozen"/>`)
	assert.Contains(t, sheet, `<autoFilter ref="A1:H4"/>`)
	assert.Contains(t, book, `<definedName name="_xlnm._FilterDatabase" localSheetId="0" hidden="1">'Columns'!$A$1:$H$4<`)
	assert.Contains(t, book, `<definedName name="_xlnm.Print_Area" localSheetId="0">'Columns'!$A:$B<`)

	again := screenBlock(4)
	again.Header.Old = []int{2, 3, 4, 5, 6, 7}
	requireSame(t, once, annotate(t, once, again))

	// A member less, and the results begin a column further: all follow.
	fewer := screenBlock(3)
	fewer.Header.Old, fewer.Header.Width = again.Header.Old, 2
	fewer.Columns = fewer.Columns[:5]
	got = unpack(t, annotate(t, once, fewer))
	assert.Contains(t, got["xl/worksheets/sheet1.xml"], `<autoFilter ref="A1:G3"/>`)
	assert.Contains(t, got["xl/workbook.xml"], `'Columns'!$A:$B<`)
}

func TestWhatTheUserSetForTheScreenStays(t *testing.T) {
	block := screenBlock(4)
	for name, c := range map[string]struct{ before, behind, not string }{
		"panes":            {before: `<sheetViews><sheetView workbookViewId="0"><pane ySplit="3" state="frozen"/></sheetView></sheetViews>`, not: `ySplit="1"`},
		"scrolled":         {before: `<sheetViews><sheetView topLeftCell="A3" workbookViewId="0"/></sheetViews>`, not: "<pane"},
		"as printed":       {before: `<sheetViews><sheetView view="pageLayout" workbookViewId="0"/></sheetViews>`, not: "<pane"},
		"two windows":      {before: `<sheetViews><sheetView workbookViewId="0"/><sheetView workbookViewId="1"/></sheetViews>`, not: "<pane"},
		"merged in it":     {behind: `<mergeCells count="1"><mergeCell ref="A2:A3"/></mergeCells>`, not: "<autoFilter"},
		"protected":        {behind: `<sheetProtection sheet="1"/>`, not: "<autoFilter"},
		"high title block": {before: `<sheetFormatPr defaultRowHeight="15"/>`, not: "<pane"},
	} {
		rows := screenRows
		if name == "high title block" {
			rows = strings.Replace(rows, `<row r="1">`, `<row r="1" ht="300" customHeight="1">`, 1)
		}
		sheet := strings.Replace(worksheet(rows, c.behind), "<sheetData>", c.before+"<sheetData>", 1)
		got := unpack(t, annotate(t, handmade(sheet, nil).bytes(t), block))["xl/worksheets/sheet1.xml"]
		assert.NotContains(t, got, c.not, name)
	}

	// An empty view is opened for the panes.
	sheet := strings.Replace(worksheet(screenRows, ""), "<sheetData>", `<sheetViews><sheetView workbookViewId="0"/></sheetViews><sheetData>`, 1)
	got := unpack(t, annotate(t, handmade(sheet, nil).bytes(t), block))["xl/worksheets/sheet1.xml"]
	assert.Contains(t, got, `<sheetView workbookViewId="0"><pane xSplit="1"`)

	// What stands to the right of the schedule is on paper as before.
	beyond := screenRows + `<row r="9"><c r="Z9"><v>1</v></c></row>`
	book := unpack(t, annotate(t, handmade(worksheet(beyond, ""), nil).bytes(t), block))["xl/workbook.xml"]
	assert.NotContains(t, book, "_xlnm.Print_Area")
}
