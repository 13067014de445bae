package main

import (
	"bytes"
	"context"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"testing"
	"time"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

const benchRows = 20_000

// longWorkbook writes a schedule of 20 000 rows as an office would have it.
func longWorkbook(b *testing.B) string {
	b.Helper()
	path := filepath.Join(b.TempDir(), "loads.xlsx")
	f := excelize.NewFile()
	defer f.Close()
	require.NoError(b, f.SetSheetName("Sheet1", "Columns"))
	w, err := f.NewStreamWriter("Columns")
	require.NoError(b, err)
	require.NoError(b, w.SetRow("A1", []any{"Mark", "Grid", "Level from", "Level to", "Length [m]", "Qty", "N_Ed ULS1 [kN]", "N_Ed ULS2 [kN]",
		"Ends y-y", "Ends z-z", "Restraints z-z [m]", "Remarks"}))
	for i := range benchRows {
		require.NoError(b, w.SetRow(fmt.Sprintf("A%d", i+2), []any{
			fmt.Sprintf("C%d", i+1), fmt.Sprintf("%c%d", 'A'+i%20, i%40), fmt.Sprintf("L%d", i%9), fmt.Sprintf("L%d", i%9+1), 3 + 0.1*float64(i%40), 1,
			100 + (i*7919)%3000, 90 + (i*5407)%2500, "pinned-pinned", "pinned-pinned", []string{"", "mid", "thirds"}[i%3], "as drawn",
		}))
	}
	require.NoError(b, w.Flush())
	require.NoError(b, f.SaveAs(path))
	return path
}

// size runs the command in this process.
func size(tb testing.TB, args ...string) {
	tb.Helper()
	var said bytes.Buffer
	con := &console{in: bytes.NewReader(nil), out: &said, err: &said}
	require.Zero(tb, execute(context.Background(), con, append([]string{"size", "--quiet", "--force"}, args...)), said.String())
}

// excelizeAlone does with the library alone what sizing a workbook comes to
// without any designing: open it, read every cell, set as many result cells one
// by one, and save.
func excelizeAlone(tb testing.TB, path, out string, cols int) {
	tb.Helper()
	f, err := excelize.OpenFile(path)
	require.NoError(tb, err)
	defer f.Close()
	rows, err := f.GetRows("Columns")
	require.NoError(tb, err)
	for r := range rows {
		for c := range cols {
			cell, err := excelize.CoordinatesToCellName(len(rows[0])+c+1, r+1)
			require.NoError(tb, err)
			if c%3 == 0 {
				err = f.SetCellStr("Columns", cell, "203x203x60 UKC")
			} else {
				err = f.SetCellFloat("Columns", cell, float64(r*c), -1, 64)
			}
			require.NoError(tb, err)
		}
	}
	require.NoError(tb, f.SaveAs(out))
}

// BenchmarkSizeWorkbook times size on a workbook of 20 000 rows against the
// library alone, in turn, and reports the ratio.
func BenchmarkSizeWorkbook(b *testing.B) {
	path := longWorkbook(b)
	out := filepath.Join(b.TempDir(), "out.xlsx")
	const resultColumns = 27
	var ours, theirs time.Duration
	for b.Loop() {
		begin := time.Now()
		size(b, path, "-o", out)
		ours += time.Since(begin)
		begin = time.Now()
		excelizeAlone(b, path, out, resultColumns)
		theirs += time.Since(begin)
	}
	b.ReportMetric(float64(ours.Seconds())/float64(b.N), "s/size")
	b.ReportMetric(ours.Seconds()/theirs.Seconds(), "of-excelize")
}

// BenchmarkSizeText sizes a text schedule of a million rows in a process of its
// own and reports the most memory that it held.
func BenchmarkSizeText(b *testing.B) {
	dir := b.TempDir()
	path := filepath.Join(dir, "loads.csv")
	require.NoError(b, os.WriteFile(path, []byte(manyRows(1_000_000)), 0o666))
	var peak int64
	for b.Loop() {
		run := exec.Command("stanchion", "size", path, "--quiet", "--force")
		run.Stderr = os.Stderr
		require.NoError(b, run.Start())
		ended := make(chan error, 1)
		go func() { ended <- run.Wait() }()
		for done := false; !done; {
			select {
			case err := <-ended:
				require.NoError(b, err)
				done = true
			case <-time.After(20 * time.Millisecond):
				peak = max(peak, peakMemory(run.Process.Pid))
			}
		}
	}
	b.ReportMetric(float64(peak)/1024, "MB-peak")
}
