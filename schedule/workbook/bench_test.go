package workbook

import (
	"context"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
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

const benchResults = 27

func benchBlock() Block {
	var columns []schedule.ResultColumn
	for i := range benchResults {
		columns = append(columns, schedule.ResultColumn{Name: fmt.Sprintf("value %d", i), Numeric: i%3 > 0, Decimals: 2, Width: 8})
	}
	values := make([]schedule.Value, benchResults)
	return Block{
		Sheet:   "Columns",
		Header:  schedule.Header{First: 1, Last: 1, Width: benchCols},
		LastRow: benchRows + 1,
		Columns: columns,
		Cells: func(row int) []schedule.Value {
			if row < 2 {
				return nil
			}
			for i := range values {
				if i%3 > 0 {
					values[i] = schedule.Value{Kind: schedule.Number, Number: math.Round(float64(row*i)/7*1000) / 1000}
				} else {
					values[i] = schedule.Value{Kind: schedule.Text, Text: "203x203x60 UKC"}
				}
			}
			return values
		},
	}
}

// BenchmarkAnnotate measures reading a schedule of 20 000 rows twice, as
// finding its members does, and writing the annotated workbook, against what
// the library alone needs to open it, read every cell, set as many result
// cells one by one and save.
func BenchmarkAnnotate(b *testing.B) {
	path := longSchedule(b)
	out := filepath.Join(b.TempDir(), "out.xlsx")
	var ours, library time.Duration
	for b.Loop() {
		start := time.Now()
		annotateLong(b, path, out)
		ours += time.Since(start)
		start = time.Now()
		libraryAlone(b, path, out)
		library += time.Since(start)
	}
	b.ReportMetric(ours.Seconds()/library.Seconds(), "of-library")
	b.ReportMetric(ours.Seconds()/float64(b.N), "s/ours")
	b.ReportMetric(library.Seconds()/float64(b.N), "s/library")
}

func annotateLong(tb testing.TB, path, out string) {
	book, err := Open(path)
	require.NoError(tb, err)
	defer book.Close()
	for range 2 {
		for _, err := range book.Rows("Columns") {
			require.NoError(tb, err)
		}
	}
	plan, err := book.Plan(benchBlock())
	require.NoError(tb, err)
	require.NoError(tb, plan.Write(context.Background(), out, nil))
}

func libraryAlone(tb testing.TB, path, out string) {
	f, err := excelize.OpenFile(path)
	require.NoError(tb, err)
	defer f.Close()
	rows, err := f.GetRows("Columns")
	require.NoError(tb, err)
	block := benchBlock()
	for r := 2; r <= len(rows); r++ {
		for i, v := range block.Cells(r) {
			ref := cellName(benchCols+i, r)
			if v.Kind == schedule.Number {
				err = f.SetCellFloat("Columns", ref, v.Number, -1, 64)
			} else {
				err = f.SetCellStr("Columns", ref, v.Text)
			}
			if err != nil {
				tb.Fatal(err)
			}
		}
	}
	require.NoError(tb, f.SaveAs(out))
}
