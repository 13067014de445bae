package workbook

import (
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

const benchRows, benchCols = 20_000, 30

// longSchedule writes a schedule of 20 000 rows and 30 columns, about a third
// of them texts.
func longSchedule(tb testing.TB) string {
	tb.Helper()
	path := filepath.Join(tb.TempDir(), "long.xlsx")
	f := excelize.NewFile()
	require.NoError(tb, f.SetSheetName("Sheet1", "Columns"))
	style, err := f.NewStyle(&excelize.Style{NumFmt: 2})
	require.NoError(tb, err)
	w, err := f.NewStreamWriter("Columns")
	require.NoError(tb, err)
	row := make([]any, benchCols)
	for i := range row {
		row[i] = fmt.Sprintf("Heading %d", i+1)
	}
	require.NoError(tb, w.SetRow("A1", row))
	for r := 2; r <= benchRows+1; r++ {
		for i := range row {
			switch i % 3 {
			case 0:
				row[i] = fmt.Sprintf("C%d-%d", r, i)
			default:
				row[i] = excelize.Cell{StyleID: style, Value: float64((r*7919+i*104729)%100_000) / 10}
			}
		}
		require.NoError(tb, w.SetRow(cellName(0, r), row))
	}
	require.NoError(tb, w.Flush())
	require.NoError(tb, f.SaveAs(path))
	require.NoError(tb, f.Close())
	return path
}

func BenchmarkRead(b *testing.B) {
	path := longSchedule(b)
	info, err := os.Stat(path)
	require.NoError(b, err)
	b.SetBytes(info.Size())
	b.ReportAllocs()
	for b.Loop() {
		book, err := Open(path)
		require.NoError(b, err)
		n := 0
		for row, err := range book.Rows("Columns") {
			if err != nil {
				b.Fatal(err)
			}
			n += len(row.Cells)
		}
		require.Equal(b, (benchRows+1)*benchCols, n)
		book.Close()
	}
}
