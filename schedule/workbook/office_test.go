package workbook

import (
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// throughOffice has LibreOffice open a workbook and save it in another format.
func throughOffice(t testing.TB, data []byte, ext, to string) string {
	t.Helper()
	office, err := exec.LookPath("soffice")
	if err != nil {
		t.Skip("LibreOffice (soffice) is not installed")
	}
	dir := t.TempDir()
	in := filepath.Join(dir, "in"+ext)
	require.NoError(t, os.WriteFile(in, data, 0o600))
	out := filepath.Join(dir, "out")
	cmd := exec.Command(office, "-env:UserInstallation=file://"+filepath.ToSlash(filepath.Join(dir, "profile")),
		"--headless", "--convert-to", to, "--outdir", out, in)
	text, err := cmd.CombinedOutput()
	require.NoError(t, err, string(text))
	return filepath.Join(out, "in."+to)
}

func TestOpensInAnotherProgram(t *testing.T) {
	path := throughOffice(t, annotate(t, rich(t), richBlock(), ownSheets()...), ".xlsm", "xlsx")
	f, err := excelize.OpenFile(path)
	require.NoError(t, err)
	defer f.Close()
	for ref, want := range map[string]string{
		"Columns!A1":  "Riverside depot: column schedule",
		"Columns!A14": "C14", "Columns!C14": "1400", "Columns!E6": "203x203x46 UKC",
		"Columns!B15": "31.5", // calculated there
		"Columns!F2":  "Results", "Columns!F3": "Outcome", "Columns!F4": "Result: status", "Columns!I5": "kN",
		"Columns!F9": "✗ fails", "Columns!G9": "203x203x60 UKC", "Columns!H9": "0.243", "Columns!I9": "1009.3",
		"Columns!K14": `row 14: a < b & "c"`,
		"Notes!A1":    "All loads factored.", "Data!B2": "2",
		"Summary!B2":    "9", // calculated there
		"Sizes used!B2": "4",
	} {
		sheet, cell, _ := strings.Cut(ref, "!")
		got, err := f.GetCellValue(sheet, cell)
		require.NoError(t, err, ref)
		assert.Equal(t, want, got, ref)
	}
	assert.Equal(t, []string{"Columns", "Notes", "Data", "Secret", "Summary", "Sizes used"}, f.GetSheetList())
	visible, err := f.GetColVisible("Columns", "K")
	require.NoError(t, err)
	assert.True(t, visible)
	visible, err = f.GetColVisible("Columns", "L")
	require.NoError(t, err)
	assert.False(t, visible)
}
