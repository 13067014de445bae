// Package schedule turns the rows of a column schedule into columns to design
// and results back into columns of the schedule. It knows headings, units and
// restraint notation, and no clause of any standard. The packages below it
// read and write the files: workbook (.xlsx, .xlsm) and text (delimited).
package schedule

import "iter"

// Kind is what a cell of a schedule holds.
type Kind uint8

// The kinds of cell.
const (
	Blank        Kind = iota
	Text              // Text holds it, trimmed of nothing
	Number            // Number holds it; Text as the file has it
	Date              // a number that the spreadsheet shows as a date; Text as it would be shown
	Bool              // Text is TRUE or FALSE
	Fault             // an error value such as #VALUE!; Text holds it
	Uncalculated      // a formula with no cached value that could not be calculated; Text holds the formula
)

// Cell is one cell as the file holds it, without meaning.
type Cell struct {
	Kind     Kind
	Text     string
	Number   float64
	Fraction bool // shown with a fraction format (1/2)
	Formula  bool // the value is the cached result of a formula
	Merged   bool // the value is repeated here from the first cell of a merged range
}

// Row is one row of a sheet or one line of a text schedule.
type Row struct {
	Number int // from 1, as the spreadsheet or an editor counts
	Hidden bool
	Cells  []Cell // Cells[0] is column A; may be short
	Pos    int64  // where it stands in the file, for a Seeker; otherwise unused
}

// Source is a file that may hold a schedule.
type Source interface {
	// Name is the file's name as given, for messages.
	Name() string
	// Sheets names the sheets that hold cells, in the order of the workbook;
	// a text file has one, named "".
	Sheets() []string
	// Rows yields the rows of a sheet in order. It may be called again, and
	// the row and its cells are valid only until the next one. Blank rows may be left out.
	Rows(sheet string) iter.Seq2[*Row, error]
	// HiddenColumns gives the columns (0 is A) that the sheet hides.
	HiddenColumns(sheet string) map[int]bool
	// Where names a cell in a message and in `cell` of the results:
	// "Columns!F12" in a workbook, "line 12, column 6" in text.
	Where(sheet string, row, col int) string
	Close() error
}

// Seeker is a Source that can read single rows again. The rows of a source
// that cannot are held in memory.
type Seeker interface {
	// RowAt reads again the row that Rows yielded with this Pos, but for its
	// number. It is valid until the next call, apart from what Rows yields.
	RowAt(sheet string, pos int64) (*Row, error)
}

// RowNamer is a Source that names a row as a whole otherwise than by its
// first cell: "line 12".
type RowNamer interface {
	WhereRow(sheet string, row int) string
}

// SheetHider is a Source with hidden sheets, which Sheets leaves out: they are
// read when they are named, and for settings.
type SheetHider interface {
	HiddenSheets() []string
}

// DecimalHinter is a Source whose format makes one decimal mark likely where
// no number tells: a comma in a text parted by semicolons.
type DecimalHinter interface {
	DecimalHint() byte // '.' or ','; 0: none
}
