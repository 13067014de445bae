package workbook

import (
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/schedule/workbook/internal/markup"
)

// The order in which the standard has the children of a part's root element
// (ECMA-376 Part 1, 18.3.1.99, 18.2.27, 18.8.39). Spreadsheet programs take
// another order for damage.
var orders = map[string][]string{
	"worksheet": {"sheetPr", "dimension", "sheetViews", "sheetFormatPr", "cols", "sheetData", "sheetCalcPr", "sheetProtection",
		"protectedRanges", "scenarios", "autoFilter", "sortState", "dataConsolidate", "customSheetViews", "mergeCells", "phoneticPr",
		"conditionalFormatting", "dataValidations", "hyperlinks", "printOptions", "pageMargins", "pageSetup", "headerFooter",
		"rowBreaks", "colBreaks", "customProperties", "cellWatches", "ignoredErrors", "smartTags", "drawing", "legacyDrawing",
		"legacyDrawingHF", "picture", "oleObjects", "controls", "webPublishItems", "tableParts", "extLst"},
	"workbook": {"fileVersion", "fileSharing", "workbookPr", "workbookProtection", "bookViews", "sheets", "functionGroups",
		"externalReferences", "definedNames", "calcPr", "oleSize", "customWorkbookViews", "pivotCaches", "extLst"},
	"styleSheet": styleLists,
}

func TestElementsStandInTheOrderOfTheStandard(t *testing.T) {
	block := richBlock()
	block.Links = func(row int) []BlockLink { return []BlockLink{{0, "'Summary'!A1"}} }
	for name, in := range map[string][]byte{
		"rich": rich(t), "simple": packed(t, simple(t, 14)),
		"bare": handmade(worksheet(`<row r="2"/>`, `<pageMargins left="1" right="1" top="1" bottom="1" header="1" footer="1"/>`), nil).bytes(t),
	} {
		for part, content := range unpack(t, annotate(t, in, block, ownSheets()...)) {
			root, err := markup.Parse([]byte(content))
			if err != nil || orders[root.Name] == nil {
				continue
			}
			at := 0
			for _, c := range root.Children {
				i := slices.Index(orders[root.Name], c.Name)
				require.GreaterOrEqual(t, i, at, "%s, %s: %s", name, part, c.Name)
				at = i
			}
		}
	}
}

func TestLinksFromTheSchedule(t *testing.T) {
	block := richBlock()
	block.Links = func(row int) []BlockLink {
		if row%2 == 0 {
			return nil
		}
		return []BlockLink{{1, "'It''s'!A1"}, {4, "'Working'!A7"}}
	}
	once := annotate(t, rich(t), block)
	sheet := unpack(t, once)["xl/worksheets/sheet1.xml"]
	assert.Contains(t, sheet, `<hyperlink ref="G9" location="'It''s'!A1"/>`)
	assert.Contains(t, sheet, `<hyperlink ref="J9" location="'Working'!A7"/>`)
	assert.Contains(t, sheet, `ref="E6" location="Notes!A1"`, "the user's own")
	block.Header.Old = []int{5, 6, 7, 8, 9, 10}
	requireSame(t, once, annotate(t, once, block))
	block.Links = nil
	sheet = unpack(t, annotate(t, once, block))["xl/worksheets/sheet1.xml"]
	assert.Equal(t, 1, strings.Count(sheet, "<hyperlink "))
}
