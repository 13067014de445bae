package workbook

import (
	"bytes"
	"os"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// What the program leaves in a workbook to know its own again. Names that
// belong to a sheet move with it, whatever it is renamed to, and keep up when
// rows and columns are inserted.
const (
	sheetName   = "_stanchion_sheet"   // on a sheet of ours: what it is
	resultsName = "_stanchion_results" // on the schedule: where the results stand
	// mark stands as a comment in the workbook part. A spreadsheet program
	// drops it on saving, so it tells a file that is as we wrote it from one
	// that somebody has worked on since.
	mark = "<!--written by stanchion-->"
)

// WrittenByUs reports whether a file is a workbook as an earlier run wrote it,
// not saved by any other program since.
func WrittenByUs(path string) bool {
	info, err := os.Stat(path)
	if err != nil || !info.Mode().IsRegular() {
		return false
	}
	b, err := Open(path)
	if err != nil {
		return false
	}
	defer b.Close()
	return bytes.Contains(b.doc[:b.root.From], []byte(mark))
}

// definedNames returns the defined names of the workbook.
func (b *Book) definedNames() []*markup.Element {
	return b.root.Child("definedNames").All("definedName")
}

// localTo returns the sheet that a defined name belongs to, nil where it
// belongs to the workbook.
func (b *Book) localTo(name *markup.Element) *sheet {
	if !name.HasAttr("localSheetId") {
		return nil
	}
	i := number(name, "localSheetId")
	if i < 0 || i >= len(b.sheets) {
		return nil
	}
	return b.sheets[i]
}

// findOwn finds the sheets that an earlier run added. A copy that somebody
// made of one is a sheet of theirs.
func (b *Book) findOwn() {
	taken := map[string]bool{}
	for _, n := range b.definedNames() {
		if n.Attr("name") != sheetName {
			continue
		}
		role := strings.ReplaceAll(strings.Trim(n.Text(), `"`), `""`, `"`)
		if s := b.localTo(n); s != nil && s.grid && !taken[role] {
			s.own = role
			taken[role] = true
		}
	}
}

// oldResults returns where an earlier run left results on a sheet.
func (b *Book) oldResults(s *sheet) (area, bool) {
	for _, n := range b.definedNames() {
		if n.Attr("name") != resultsName || b.localTo(n) != s {
			continue
		}
		if _, cells, ok := splitRef(n.Text()); ok {
			return parseArea(cells)
		}
	}
	return area{}, false
}
