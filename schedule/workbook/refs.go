package workbook

import (
	"strconv"
	"strings"
)

// Bounds of a sheet.
const (
	maxColumns = 16_384
	maxRows    = 1_048_576
)

// area is a rectangle of cells: rows from 1, columns from 0.
type area struct {
	firstRow, lastRow int
	firstCol, lastCol int
}

// contains reports whether other lies in a whole.
func (a area) contains(b area) bool {
	return a.firstRow <= b.firstRow && b.lastRow <= a.lastRow && a.firstCol <= b.firstCol && b.lastCol <= a.lastCol
}

// meets reports whether the two share a cell.
func (a area) meets(b area) bool {
	return a.firstRow <= b.lastRow && b.firstRow <= a.lastRow && a.firstCol <= b.lastCol && b.firstCol <= a.lastCol
}

// String returns the area as A1:B2, or A1 for one cell.
func (a area) String() string {
	first := cellName(a.firstCol, a.firstRow)
	if a.firstRow == a.lastRow && a.firstCol == a.lastCol {
		return first
	}
	return first + ":" + cellName(a.lastCol, a.lastRow)
}

// absolute returns the area as $A$1:$B$2.
func (a area) absolute() string {
	return "$" + columnName(a.firstCol) + "$" + strconv.Itoa(a.firstRow) + ":$" + columnName(a.lastCol) + "$" + strconv.Itoa(a.lastRow)
}

// ColumnName returns the letters of a column counted from 0.
func ColumnName(col int) string { return columnName(col) }

func columnName(col int) string {
	return string(appendColumn(nil, col))
}

func appendColumn(to []byte, col int) []byte {
	switch {
	case col >= 26*27:
		to = append(to, byte('A'+(col-26*27)/(26*26)))
		col -= 26 * 27
		col = col%(26*26) + 26
		return append(to, byte('A'+col/26-1), byte('A'+col%26))
	case col >= 26:
		return append(to, byte('A'+col/26-1), byte('A'+col%26))
	}
	return append(to, byte('A'+col))
}

func cellName(col, row int) string {
	return string(appendCell(nil, col, row))
}

func appendCell(to []byte, col, row int) []byte {
	return strconv.AppendInt(appendColumn(to, col), int64(row), 10)
}

// parseCell reads A1 or $A$1: the column from 0, the row from 1.
func parseCell(ref []byte) (col, row int, ok bool) {
	i := 0
	if i < len(ref) && ref[i] == '$' {
		i++
	}
	col, n := parseColumn(ref[i:])
	i += n
	if i < len(ref) && ref[i] == '$' {
		i++
	}
	digits := ref[i:]
	if n == 0 || len(digits) == 0 || len(digits) > 7 {
		return 0, 0, false
	}
	for _, c := range digits {
		if c < '0' || c > '9' {
			return 0, 0, false
		}
		row = row*10 + int(c-'0')
	}
	return col, row, row >= 1 && row <= maxRows && col < maxColumns
}

// parseColumn reads the letters of a column and returns how many there are.
func parseColumn(ref []byte) (col, n int) {
	for n < len(ref) && n < 4 {
		c := ref[n] &^ 0x20
		if c < 'A' || c > 'Z' {
			break
		}
		col = col*26 + int(c-'A') + 1
		n++
	}
	return col - 1, n
}

// parseArea reads A1:B2, A1, A:B (whole columns) or 1:2 (whole rows).
func parseArea(ref string) (area, bool) {
	from, to, ok := strings.Cut(strings.TrimSpace(ref), ":")
	if !ok {
		to = from
	}
	from, to = strings.ReplaceAll(from, "$", ""), strings.ReplaceAll(to, "$", "")
	a := area{firstRow: 1, lastRow: maxRows, lastCol: maxColumns - 1}
	if c1, r1, ok := parseCell([]byte(from)); ok {
		c2, r2, ok := parseCell([]byte(to))
		a = area{min(r1, r2), max(r1, r2), min(c1, c2), max(c1, c2)}
		return a, ok
	}
	if r1, err := strconv.Atoi(from); err == nil {
		r2, err := strconv.Atoi(to)
		a.firstRow, a.lastRow = min(r1, r2), max(r1, r2)
		return a, err == nil && a.firstRow >= 1 && a.lastRow <= maxRows
	}
	c1, n1 := parseColumn([]byte(from))
	c2, n2 := parseColumn([]byte(to))
	a.firstCol, a.lastCol = min(c1, c2), max(c1, c2)
	return a, n1 > 0 && n1 == len(from) && n2 > 0 && n2 == len(to) && a.lastCol < maxColumns
}

// Quoted returns a sheet's name as it stands in a formula.
func Quoted(sheet string) string { return quoted(sheet) }

func quoted(sheet string) string {
	return "'" + strings.ReplaceAll(sheet, "'", "''") + "'"
}

// splitRef splits a reference with a sheet's name, quoted or not.
func splitRef(ref string) (sheet, cells string, ok bool) {
	if !strings.HasPrefix(ref, "'") {
		i := strings.LastIndexByte(ref, '!')
		if i < 0 {
			return "", ref, true
		}
		return ref[:i], ref[i+1:], true
	}
	for i := 1; i < len(ref); i++ {
		if ref[i] != '\'' {
			continue
		}
		if i+1 < len(ref) && ref[i+1] == '\'' {
			i++
			continue
		}
		if i+1 < len(ref) && ref[i+1] == '!' {
			return strings.ReplaceAll(ref[1:i], "''", "'"), ref[i+2:], true
		}
		break
	}
	return "", "", false
}
