package main

import (
	"bufio"
	"encoding/json"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

const depot = "../../examples/ottermere-depot.xlsx"

// sizedDepot sizes the example into a folder and returns the workbook and the
// lines of JSON.
func sizedDepot(t *testing.T) (path string, members []map[string]any) {
	t.Helper()
	dir := t.TempDir()
	path = filepath.Join(dir, "depot.xlsx")
	size(t, depot, "-o", path, "--json", filepath.Join(dir, "depot.jsonl"))
	f, err := os.Open(filepath.Join(dir, "depot.jsonl"))
	require.NoError(t, err)
	defer f.Close()
	for lines := bufio.NewScanner(f); lines.Scan(); {
		var m map[string]any
		require.NoError(t, json.Unmarshal(lines.Bytes(), &m))
		members = append(members, m)
	}
	require.Len(t, members, 60)
	return path, members
}

// sheetRows reads a sheet as numbers and texts, without number formats.
func sheetRows(t *testing.T, f *excelize.File, sheet string) [][]string {
	t.Helper()
	rows, err := f.GetRows(sheet, excelize.Options{RawCellValue: true})
	require.NoError(t, err)
	return rows
}

func openBook(t *testing.T, path string) *excelize.File {
	t.Helper()
	f, err := excelize.OpenFile(path)
	require.NoError(t, err)
	t.Cleanup(func() { f.Close() })
	return f
}

// office has LibreOffice convert a file.
func office(t *testing.T, path, to string) string {
	t.Helper()
	program, err := exec.LookPath("soffice")
	if err != nil {
		t.Skip("LibreOffice (soffice) is not installed")
	}
	dir := t.TempDir()
	cmd := exec.Command(program, "-env:UserInstallation=file://"+filepath.ToSlash(filepath.Join(dir, "profile")),
		"--headless", "--convert-to", to, "--outdir", dir, path)
	said, err := cmd.CombinedOutput()
	require.NoError(t, err, string(said))
	return filepath.Join(dir, strings.TrimSuffix(filepath.Base(path), filepath.Ext(path))+"."+to)
}

// total returns the cell below a heading in the row of a table that opens with
// a word, the first such row behind the heading.
func total(t *testing.T, rows [][]string, heading, word string) float64 {
	t.Helper()
	col := -1
	for _, row := range rows {
		for c, text := range row {
			if text == heading {
				col = c
			}
		}
		if col >= 0 && len(row) > col && row[0] == word {
			x, err := strconv.ParseFloat(row[col], 64)
			require.NoError(t, err)
			return x
		}
	}
	t.Fatalf("no row %q below %q", word, heading)
	return 0
}

func TestTheSheetsAddUpToTheMembers(t *testing.T) {
	path, members := sizedDepot(t)
	f := openBook(t, path)
	grams, pieces := int64(0), 0.0
	for _, m := range members {
		n := m["quantity"].(float64)
		pieces += n
		// kg/m times m, to the gram as steel is taken off. The lengths and the
		// published masses of the example have so few decimals that this is exact.
		grams += int64(n) * int64(m["mass_kg"].(float64)*1000+0.5)
	}
	tonnes := float64(grams) / 1e6
	exact := func(got float64, what string) { assert.InDelta(t, tonnes, got, 5e-7, what) } // half a gram
	exact(total(t, sheetRows(t, f, "Take-off"), "Mass [t]", "with allowances"), "Take-off")
	exact(total(t, sheetRows(t, f, "Sizes used"), "Mass [t]", "all"), "Sizes used")
	exact(total(t, sheetRows(t, f, "Cutting list"), "Mass [t]", "all"), "Cutting list")
	assert.Equal(t, pieces, total(t, sheetRows(t, f, "Sizes used"), "Pieces", "all"))

	// The charts are drawn from the same sums.
	data := sheetRows(t, f, "Chart data")
	for _, heading := range []string{"Section", "Level"} {
		exact(sumBeside(t, data, heading), "chart by "+heading)
	}
}

// sumBeside sums the column to the right of a heading in the third row.
func sumBeside(t *testing.T, rows [][]string, heading string) (sum float64) {
	t.Helper()
	for c, text := range rows[2] {
		if text != heading {
			continue
		}
		for _, row := range rows[3:] {
			if len(row) > c+1 && row[c+1] != "" {
				x, err := strconv.ParseFloat(row[c+1], 64)
				require.NoError(t, err)
				sum += x
			}
		}
		return sum
	}
	t.Fatalf("no heading %q", heading)
	return 0
}

func TestChartsPointAtCellsThatHoldSomething(t *testing.T) {
	path, _ := sizedDepot(t)
	f := openBook(t, path)
	refs := regexp.MustCompile(`<f>&#39;([^&]+)&#39;!\$([A-Z]+)\$(\d+)(?::\$([A-Z]+)\$(\d+))?</f>`)
	charts, found := 0, 0
	f.Pkg.Range(func(name, content any) bool {
		if !strings.HasPrefix(name.(string), "xl/charts/chart") {
			return true
		}
		charts++
		text := string(content.([]byte))
		matches := refs.FindAllStringSubmatch(text, -1)
		assert.Equal(t, strings.Count(text, "<f>"), len(matches), "%s: every reference is of the kind that is looked at", name)
		for _, m := range matches {
			found++
			first, err := f.GetCellValue(m[1], m[2]+m[3])
			require.NoError(t, err)
			if m[5] == "" {
				assert.NotEmpty(t, first, "%s: %s", name, m[0])
				continue
			}
			filled := false
			from, _ := strconv.Atoi(m[3])
			to, _ := strconv.Atoi(m[5])
			for r := from; r <= to && !filled; r++ {
				text, err := f.GetCellValue(m[1], fmt.Sprint(m[2], r))
				require.NoError(t, err)
				filled = text != ""
			}
			// Nothing fails in the example, so that series alone is empty.
			assert.True(t, filled || m[2] == "C", "%s: %s", name, m[0])
		}
		return true
	})
	assert.Equal(t, 4, charts)
	assert.Greater(t, found, 30)
}

func TestAnotherProgramReadsTheSameResults(t *testing.T) {
	if testing.Short() {
		t.Skip("another program opens what was written: long, and nothing runs side by side")
	}
	path, members := sizedDepot(t)
	f := openBook(t, office(t, path, "xlsx"))
	assert.Equal(t, []string{"Columns", "Settings", "Summary", "Problems", "Results", "Working", "Sizes used", "Take-off", "Splices", "Cutting list", "Charts", "Chart data"}, f.GetSheetList())
	rows := sheetRows(t, f, "Results")
	require.Equal(t, []string{"Row", "Mark"}, rows[3][:2])
	for i, m := range members {
		row := rows[4+i]
		assert.Equal(t, m["mark"], row[1])
		assert.Equal(t, m["status"], row[6])
		assert.Equal(t, m["section"], row[7])
		for col, key := range map[int]string{9: "utilisation", 13: "N_b_y_Rd_kN", 14: "N_b_z_Rd_kN", 17: "chi_y", 20: "mass_kg"} {
			x, err := strconv.ParseFloat(row[col], 64)
			require.NoError(t, err)
			assert.InEpsilon(t, m[key], x, 1e-9, "%s of %s", key, m["mark"])
		}
		cell := strings.TrimPrefix(m["cell"].(string), "Columns!")
		assert.Equal(t, cell, row[0])
		linked, to, err := f.GetCellHyperLink("Results", fmt.Sprint("A", 5+i))
		require.NoError(t, err)
		assert.True(t, linked)
		assert.Equal(t, "Columns!"+cell, strings.ReplaceAll(strings.ReplaceAll(strings.TrimPrefix(to, "#"), "'", ""), "$", ""))
	}
	drawn := 0
	f.Pkg.Range(func(name, _ any) bool {
		if strings.HasPrefix(name.(string), "xl/charts/chart") {
			drawn++
		}
		return true
	})
	assert.Equal(t, 4, drawn, "the charts live on as charts")
}

func TestThePrintedWorkbook(t *testing.T) {
	if testing.Short() {
		t.Skip("another program opens what was written: long, and nothing runs side by side")
	}
	path, members := sizedDepot(t)
	pdf := office(t, path, "pdf")
	program, err := exec.LookPath("pdftotext")
	if err != nil {
		t.Skip("pdftotext is not installed")
	}
	out, err := exec.Command(program, "-layout", pdf, "-").Output()
	require.NoError(t, err)
	pages := strings.Split(string(out), "\f")
	assert.NotContains(t, pages[0], "Result:", "the schedule prints as it did")
	var results string
	for _, page := range pages {
		if strings.Contains(page, "Governing check") && strings.Contains(page, "chi_y") {
			results += page
		}
	}
	for _, m := range members {
		line := regexp.MustCompile(`(?m)^.*\b` + regexp.QuoteMeta(m["mark"].(string)) + `\b.*$`).FindString(results)
		assert.Contains(t, line, m["section"])
		shown, err := strconv.ParseFloat(regexp.MustCompile(`\d\.\d{3}\b`).FindString(line), 64)
		require.NoError(t, err)
		assert.InDelta(t, m["utilisation"], shown, 0.0005001, "to the digits shown, a half either way")
		assert.Contains(t, line, "✓ passes", "a mark and a word")
	}
	for _, title := range []string{"Utilisation by member", "Steel by section", "Steel by level", "Members on the buckling curves", "SHA-256 of the schedule"} {
		assert.Contains(t, string(out), title)
	}
}

// place splits where a link leads to, however the program that wrote it spells
// it.
func place(to string) (sheet, cell string) {
	sheet, cell, _ = strings.Cut(strings.NewReplacer("'", "", "$", "", "#", "").Replace(to), "!")
	return sheet, cell
}

// follow returns what stands where the link of a cell leads to, and the link of
// that.
func follow(t *testing.T, f *excelize.File, sheet, cell string) (text, back string) {
	t.Helper()
	linked, to, err := f.GetCellHyperLink(sheet, cell)
	require.NoError(t, err)
	require.True(t, linked, "%s!%s", sheet, cell)
	sheet, cell = place(to)
	text, err = f.GetCellValue(sheet, cell)
	require.NoError(t, err)
	_, back, err = f.GetCellHyperLink(sheet, cell)
	require.NoError(t, err)
	return text, back
}

// below returns the column of a sheet that has a heading.
func below(t *testing.T, rows [][]string, heading string) string {
	t.Helper()
	for _, row := range rows {
		if c := slices.Index(row, heading); c >= 0 {
			name, err := excelize.ColumnNumberToName(c + 1)
			require.NoError(t, err)
			return name
		}
	}
	t.Fatalf("no heading %q", heading)
	return ""
}

func TestMembersAndWorkingsLeadToEachOther(t *testing.T) {
	if testing.Short() {
		t.Skip("another program opens what was written: long, and nothing runs side by side")
	}
	path, members := sizedDepot(t)
	for _, path := range []string{path, office(t, path, "xlsx")} {
		f := openBook(t, path)
		check := below(t, sheetRows(t, f, "Columns"), "Result: governing check")
		for i, m := range members {
			cell := strings.TrimPrefix(m["cell"].(string), "Columns!")
			row := strings.TrimLeft(cell, "ABCDEFGHIJKLMNOPQRSTUVWXYZ")
			for _, from := range [][2]string{{"Columns", check + row}, {"Results", fmt.Sprint("K", 5+i)}} {
				text, back := follow(t, f, from[0], from[1])
				assert.True(t, strings.HasPrefix(text, m["mark"].(string)+", "), "%s: %s", from, text)
				sheet, to := place(back)
				assert.Equal(t, "Columns!"+cell, sheet+"!"+to)
			}
		}
	}
}

// workingOf returns the rows of a member on the sheet of workings, and the rows
// behind them.
func workingOf(t *testing.T, rows [][]string, mark string) (own, rest [][]string) {
	t.Helper()
	heads := func(row []string) bool {
		return len(row) > 6 && row[2] != "" && row[1] == "" && row[0] != "" && row[4] == ""
	}
	for i, row := range rows {
		if !heads(row) || !strings.HasPrefix(row[0], mark+", ") {
			continue
		}
		end := i + 1
		for end < len(rows) && !heads(rows[end]) {
			end++
		}
		return rows[i:end], rows[end:]
	}
	t.Fatalf("no working of %s", mark)
	return nil, nil
}

// The sheet of workings, read by another program, holds the numbers of the JSON
// lines.
func TestTheSheetOfWorkings(t *testing.T) {
	path, members := sizedDepot(t)
	rest := sheetRows(t, openBook(t, office(t, path, "xlsx")), "Working")
	var own [][]string
	for _, m := range members {
		own, rest = workingOf(t, rest, m["mark"].(string))
		assert.Equal(t, m["section"].(string)+"  "+m["grade"].(string), own[0][2])
		assert.Equal(t, m["status"], own[0][6])
		u, err := strconv.ParseFloat(own[0][3], 64)
		require.NoError(t, err)
		assert.InDelta(t, m["utilisation"], u, 0.0005001, "three decimals, a half either way")
		found := 0
		for _, row := range own[1:] {
			key := map[string]string{"Nb,y,Rd": "N_b_y_Rd_kN", "Nb,z,Rd": "N_b_z_Rd_kN", "χy": "chi_y", "χz": "chi_z", "λ̄y": "lambda_bar_y", "λ̄z": "lambda_bar_z", "fy": "fy_MPa"}[first(row)]
			if key == "" {
				continue
			}
			x, err := strconv.ParseFloat(row[3], 64)
			require.NoError(t, err)
			assert.InEpsilon(t, m[key], x, 5e-4, "%s of %s: four figures at least, a half either way", key, m["mark"])
			found++
		}
		assert.GreaterOrEqual(t, found, 7, m["mark"])
	}
}

func first(row []string) string {
	if len(row) == 0 {
		return ""
	}
	return row[0]
}
