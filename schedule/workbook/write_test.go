package workbook

import (
	"bytes"
	"fmt"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
	"stanchion/schedule/internal/golden"
)

// Result columns as the program writes them, in short.
func someColumns() []schedule.ResultColumn {
	return []schedule.ResultColumn{
		{Name: "status", Width: 12, Group: "Outcome"},
		{Name: "section", Width: 18, Group: "Outcome"},
		{Name: "utilisation", Decimals: 3, Numeric: true, Width: 8, Group: "Outcome"},
		{Name: "N_b,y,Rd", Unit: "kN", Decimals: 1, Numeric: true, Width: 8, Group: "Resistance"},
		{Name: "N_b,z,Rd", Unit: "kN", Decimals: 1, Numeric: true, Width: 8, Group: "Resistance"},
		{Name: "note", Width: 30, Group: "Remarks"},
	}
}

func someValues(row int) []schedule.Value {
	text := func(s string) schedule.Value { return schedule.Value{Kind: schedule.Text, Text: s} }
	num := func(n float64) schedule.Value { return schedule.Value{Kind: schedule.Number, Number: n} }
	words := []string{"passes", "fails", "no section", "not read"}
	return []schedule.Value{
		text(words[row%4]), text("203x203x60 UKC"), num(float64(row) / 37), num(1000.25 + float64(row)), num(800.5),
		text(fmt.Sprintf("row %d: a < b & \"c\"", row)),
	}
}

// simple is a schedule with a title block, a header over two rows, a row of
// units and members in rows 6 to last.
func simple(t testing.TB, last int) *excelize.File {
	t.Helper()
	f := excelize.NewFile()
	const s = "Columns"
	require.NoError(t, f.SetSheetName("Sheet1", s))
	head, err := f.NewStyle(&excelize.Style{Font: &excelize.Font{Bold: true}, Fill: excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{"DDEBF7"}},
		Border: []excelize.Border{{Type: "bottom", Color: "000000", Style: 1}}})
	require.NoError(t, err)
	for ref, v := range map[string]any{
		"A1": "Riverside depot: column schedule",
		"A3": "Mark", "B3": "Length", "C3": "Axial load", "E3": "Section",
		"C4": "ULS1", "D4": "ULS2", "B5": "m", "C5": "kN", "D5": "kN",
	} {
		require.NoError(t, f.SetCellValue(s, ref, v))
	}
	require.NoError(t, f.SetCellStyle(s, "A3", "E5", head))
	require.NoError(t, f.MergeCell(s, "A1", "E1"))
	require.NoError(t, f.MergeCell(s, "C3", "D3"))
	landscape, one, fit := "landscape", 1, true
	require.NoError(t, f.SetPageLayout(s, &excelize.PageLayoutOptions{Orientation: &landscape, FitToWidth: &one}))
	require.NoError(t, f.SetSheetProps(s, &excelize.SheetPropsOptions{FitToPage: &fit}))
	for r := 6; r <= last; r++ {
		for c, v := range []any{fmt.Sprintf("C%d", r), 3.5, 100 * r, 90 * r, "203x203x46 UKC"} {
			require.NoError(t, f.SetCellValue(s, cellName(c, r), v))
		}
	}
	return f
}

func simpleBlock(last int) Block {
	return Block{
		Sheet:   "Columns",
		Header:  schedule.Header{First: 3, Last: 4, UnitRow: 5, Width: 5},
		LastRow: last,
		Title:   "Results",
		Columns: someColumns(),
		Cells: func(row int) []schedule.Value {
			if row < 6 || row == 8 {
				return nil
			}
			return someValues(row)
		},
	}
}

func annotate(t testing.TB, data []byte, block Block, sheets ...Sheet) []byte {
	t.Helper()
	b, err := OpenBytes("loads.xlsx", data)
	require.NoError(t, err)
	defer b.Close()
	p, err := b.Plan(block)
	require.NoError(t, err)
	var out bytes.Buffer
	require.NoError(t, p.WriteTo(&out, sheets))
	return out.Bytes()
}

func TestAnnotatedSchedule(t *testing.T) {
	golden.Equal(t, "simple.txt", dump(t, annotate(t, packed(t, simple(t, 9)), simpleBlock(9), ownSheets()...))+"\n")
}
