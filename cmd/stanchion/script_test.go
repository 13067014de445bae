package main

import (
	"encoding/csv"
	"errors"
	"flag"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
	"testing"

	"github.com/rogpeppe/go-internal/testscript"
	"github.com/xuri/excelize/v2"
)

var update = flag.Bool("update", false, "rewrite the expected output in the scripts")

func TestMain(m *testing.M) {
	testscript.Main(m, map[string]func(){
		"stanchion": func() { os.Exit(runMain()) },
	})
}

// TestScripts runs the program as its users do: one script a behaviour.
func TestScripts(t *testing.T) {
	testscript.Run(t, testscript.Params{
		Dir:                 "testdata/script",
		UpdateScripts:       *update,
		RequireExplicitExec: true,
		Setup: func(e *testscript.Env) error {
			examples, err := filepath.Abs("../../examples")
			e.Setenv("EXAMPLES", examples)
			if err != nil {
				return err
			}
			independent, err := filepath.Abs("testdata/independent")
			e.Setenv("INDEPENDENT", independent)
			return err
		},
		Cmds: map[string]func(*testscript.TestScript, bool, []string){
			"exits":  scriptExits,
			"book":   scriptBook,
			"dump":   scriptDump,
			"rows":   scriptRows,
			"parts":  scriptParts,
			"same":   scriptSame,
			"addsup": scriptAddsUp,
			"agrees": scriptAgrees,
			"type":   scriptType,
		},
	})
}

// scriptExits runs a program and wants an exit status: exits 3 stanchion ...
// Its output is there for stdout and stderr.
func scriptExits(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 {
		ts.Fatalf("usage: exits STATUS PROGRAM [ARG]...")
	}
	want, err := strconv.Atoi(args[0])
	ts.Check(err)
	status := 0
	if err := ts.Exec(args[1], args[2:]...); err != nil {
		var exit *exec.ExitError
		if !errors.As(err, &exit) {
			ts.Fatalf("%v", err)
		}
		status = exit.ExitCode()
	}
	if status != want {
		ts.Fatalf("exit status %d, want %d", status, want)
	}
}

// scriptBook makes a workbook of one sheet from text: book OUT IN [SHEET
// [PASSWORD]]. A cell that is a number is written as one.
func scriptBook(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 2 || len(args) > 4 {
		ts.Fatalf("usage: book OUT IN [SHEET [PASSWORD]]")
	}
	sheet, opts := "Columns", excelize.Options{}
	if len(args) > 2 {
		sheet = args[2]
	}
	if len(args) > 3 {
		opts.Password = args[3]
	}
	rows, err := csv.NewReader(strings.NewReader(ts.ReadFile(args[1]))).ReadAll()
	ts.Check(err)
	f := excelize.NewFile()
	defer f.Close()
	ts.Check(f.SetSheetName("Sheet1", sheet))
	for r, row := range rows {
		for c, text := range row {
			cell, err := excelize.CoordinatesToCellName(c+1, r+1)
			ts.Check(err)
			var value any = text
			if x, err := strconv.ParseFloat(text, 64); err == nil {
				value = x
			}
			if text != "" {
				ts.Check(f.SetCellValue(sheet, cell, value))
			}
		}
	}
	ts.Check(f.SaveAs(ts.MkAbs(args[0]), opts))
}

// scriptDump prints the cells of a workbook, one a line, so that a golden file
// shows what has changed: dump FILE [SHEET]...
func scriptDump(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) == 0 {
		ts.Fatalf("usage: dump FILE [SHEET]...")
	}
	f, err := excelize.OpenFile(ts.MkAbs(args[0]))
	ts.Check(err)
	defer f.Close()
	sheets := args[1:]
	if len(sheets) == 0 {
		sheets = f.GetSheetList()
	}
	for _, sheet := range sheets {
		rows, err := f.GetRows(sheet, excelize.Options{RawCellValue: true})
		ts.Check(err)
		for r, row := range rows {
			for c, text := range row {
				if cell, err := excelize.CoordinatesToCellName(c+1, r+1); err == nil && text != "" {
					fmt.Fprintf(ts.Stdout(), "%s!%s = %s\n", sheet, cell, text)
				}
			}
		}
	}
}

// scriptSame wants two files to have the same bytes, and prints neither.
func scriptSame(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: same FILE FILE")
	}
	if ts.ReadFile(args[0]) != ts.ReadFile(args[1]) {
		ts.Fatalf("%s and %s differ", args[0], args[1])
	}
}

// scriptType fills in cells of a workbook, as a person does: type FILE SHEET
// CELL=VALUE... A sheet that is not there is added.
func scriptType(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) < 3 {
		ts.Fatalf("usage: type FILE SHEET CELL=VALUE...")
	}
	f, err := excelize.OpenFile(ts.MkAbs(args[0]))
	ts.Check(err)
	defer f.Close()
	if i, err := f.GetSheetIndex(args[1]); err == nil && i < 0 {
		_, err := f.NewSheet(args[1])
		ts.Check(err)
	}
	for _, a := range args[2:] {
		cell, text, _ := strings.Cut(a, "=")
		var value any = text
		if x, err := strconv.ParseFloat(text, 64); err == nil {
			value = x
		}
		ts.Check(f.SetCellValue(args[1], cell, value))
	}
	ts.Check(f.Save())
}

// scriptRows writes a schedule of many rows: rows OUT NUMBER.
func scriptRows(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) != 2 {
		ts.Fatalf("usage: rows OUT NUMBER")
	}
	n, err := strconv.Atoi(args[1])
	ts.Check(err)
	ts.Check(os.WriteFile(ts.MkAbs(args[0]), []byte(manyRows(n)), 0o666))
}

// manyRows is a schedule of n members that all pass.
func manyRows(n int) string {
	var b strings.Builder
	b.WriteString("Mark,Length [m],N_Ed [kN],Restraints z-z [m]\n")
	for i := range n {
		fmt.Fprintf(&b, "C%d,%.1f,%d,%s\n", i+1, 3+0.1*float64(i%40), 100+(i*7919)%3000, []string{"", "mid", "thirds"}[i%3])
	}
	return b.String()
}

// scriptParts wants a folder to hold these files and no others.
func scriptParts(ts *testscript.TestScript, neg bool, args []string) {
	if neg || len(args) == 0 {
		ts.Fatalf("usage: parts FOLDER [FILE]...")
	}
	entries, err := os.ReadDir(ts.MkAbs(args[0]))
	ts.Check(err)
	var have []string
	for _, e := range entries {
		have = append(have, e.Name())
	}
	want := append([]string(nil), args[1:]...)
	sort.Strings(want)
	if strings.Join(have, " ") != strings.Join(want, " ") {
		ts.Fatalf("%s holds %v, want %v", args[0], have, want)
	}
}
