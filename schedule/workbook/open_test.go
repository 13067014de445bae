package workbook

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
)

func insertBefore(s, mark, text string) string {
	return strings.Replace(s, mark, text+mark, 1)
}

func TestRefusedFiles(t *testing.T) {
	dir := t.TempDir()
	write := func(name string, content []byte) string {
		path := filepath.Join(dir, name)
		require.NoError(t, os.WriteFile(path, content, 0o600))
		return path
	}
	var secret bytes.Buffer
	f := excelize.NewFile()
	require.NoError(t, f.Write(&secret, excelize.Options{Password: "secret"}))
	old := append([]byte{0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1}, make([]byte, 2000)...)
	whole := handmade(worksheet("", ""), nil).bytes(t)
	hidden := handmade(worksheet("", ""), nil)
	hidden["xl/workbook.xml"] = strings.Replace(hidden["xl/workbook.xml"], `sheetId="1"`, `sheetId="1" state="hidden"`, 1)
	bare := handmade(worksheet("", ""), nil)
	delete(bare, "xl/workbook.xml")

	for path, want := range map[string]string{
		filepath.Join(dir, "none.xlsx"):      "no such file",
		dir:                                  "is a folder",
		write("empty.xlsx", nil):             "is empty",
		write("secret.xlsx", secret.Bytes()): "is protected with a password",
		write("old.xls", old):                "is in the old .xls format",
		write("page.xls", []byte("<html><table></table></html>")):            "is not an .xlsx or .xlsm workbook",
		write("short.xlsx", []byte("PK")):                                    "is not an .xlsx or .xlsm workbook",
		write("cut.xlsx", whole[:len(whole)/2]):                              "is damaged",
		write("binary.xlsb", parts{"xl/workbook.bin": ""}.bytes(t)):          "is a binary .xlsb workbook",
		write("open.ods", parts{"mimetype": "", "content.xml": ""}.bytes(t)): "is an OpenDocument file",
		write("word.docx", parts{"word/document.xml": ""}.bytes(t)):          "is a document without sheets",
		write("some.zip", parts{"a.txt": "x"}.bytes(t)):                      "is an archive and not a workbook",
		write("hidden.xlsx", hidden.bytes(t)):                                "holds no visible sheet",
		write("bare.xlsx", bare.bytes(t)):                                    "is damaged",
	} {
		_, err := Open(path)
		var refusal *schedule.Refusal
		if assert.ErrorAs(t, err, &refusal, path) {
			assert.Contains(t, err.Error(), path+": "+want)
			assert.NotEmpty(t, refusal.Do)
		}
	}
}

func TestOtherNamesAreTakenByContent(t *testing.T) {
	path := filepath.Join(t.TempDir(), "loads.data")
	require.NoError(t, os.WriteFile(path, handmade(worksheet("", ""), nil).bytes(t), 0o600))
	assert.True(t, Is(path))
	b, err := Open(path)
	require.NoError(t, err)
	assert.Equal(t, path, b.Name())
	require.NoError(t, b.Close())

	text := filepath.Join(t.TempDir(), "loads.data")
	require.NoError(t, os.WriteFile(text, []byte("Mark;NEd"), 0o600))
	assert.False(t, Is(text))
	assert.True(t, Is("none.XLSX"))
	assert.False(t, Is("none.csv"))
}

func TestBombIsRefused(t *testing.T) {
	sheet := worksheet(`<row r="1">`+strings.Repeat("<c/>", 17<<20)+`</row>`, "")
	b := handmade(sheet, nil).open(t)
	var last error
	for _, err := range b.Rows("Columns") {
		last = err
	}
	assert.ErrorContains(t, last, "unpacks to more than 64 MB, far more than a schedule needs")
}

func FuzzOpen(f *testing.F) {
	f.Add(handmade(worksheet(`<row r="1"><c r="A1" t="s"><v>0</v></c><c><f>1+1</f></c></row>`, `<mergeCells><mergeCell ref="A1:B2"/></mergeCells>`), withStrings(`<si><t>x</t></si>`)).bytes(f))
	f.Add([]byte("PK\x05\x06"))
	f.Add([]byte{0xD0, 0xCF, 0x11, 0xE0, 0xA1, 0xB1, 0x1A, 0xE1})
	f.Fuzz(func(t *testing.T, data []byte) {
		read(t, data)
	})
}

// FuzzSheet fuzzes inside the archive, where the fuzzer does not get by itself.
func FuzzSheet(f *testing.F) {
	f.Add(worksheet(`<row r="1"><c r="A1" t="s"><v>0</v></c><c s="1"><f>A1*2</f></c></row>`, `<mergeCells><mergeCell ref="A1:B2"/></mergeCells>`), `<si><t>x</t></si>`, `<cellXfs><xf numFmtId="14"/><xf numFmtId="164"/></cellXfs>`)
	f.Fuzz(func(t *testing.T, sheet, si, styles string) {
		more := withStrings(si)
		more["xl/styles.xml"] = `<styleSheet><numFmts><numFmt numFmtId="164" formatCode="d/m"/></numFmts>` + styles + `</styleSheet>`
		read(t, handmade(sheet, more).bytes(t))
	})
}

// read reads everything there is: rows or an error of the right kind.
func read(t *testing.T, data []byte) {
	b, err := OpenBytes("loads.xlsx", data)
	var refusal *schedule.Refusal
	if err != nil {
		require.ErrorAs(t, err, &refusal)
		requireForeseen(t, err)
		return
	}
	defer b.Close()
	for _, sheet := range append(b.Sheets(), b.HiddenSheets()...) {
		b.HiddenColumns(sheet)
		last := 0
		for row, err := range b.Rows(sheet) {
			if err != nil {
				require.ErrorAs(t, err, &refusal)
				requireForeseen(t, err)
				break
			}
			require.Greater(t, row.Number, last)
			last = row.Number
		}
	}
}
