package workbook

import (
	"bytes"
	"fmt"
	"sort"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
)

// dump returns a workbook as sorted lines "Sheet!Cell = value | style", so that
// what is compared is what a person would see.
func dump(t testing.TB, data []byte) string {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(data))
	require.NoError(t, err)
	defer f.Close()
	var lines []string
	for _, sheet := range f.GetSheetList() {
		lines = append(lines, dumpSheet(t, f, sheet)...)
	}
	sort.Strings(lines)
	return strings.Join(lines, "\n")
}

func dumpSheet(t testing.TB, f *excelize.File, sheet string) []string {
	t.Helper()
	var lines []string
	rows, err := f.GetRows(sheet)
	require.NoError(t, err)
	for r := range rows {
		for c := range rows[r] {
			ref := cellName(c, r+1)
			value := rows[r][c]
			if formula, err := f.GetCellFormula(sheet, ref); err == nil && formula != "" {
				value += " =" + formula
			}
			if value == "" {
				continue
			}
			value = strings.ReplaceAll(value, "\n", "⏎")
			lines = append(lines, fmt.Sprintf("%s!%s = %s | %s", sheet, ref, value, describe(t, f, sheet, ref)))
		}
	}
	merged, err := f.GetMergeCells(sheet)
	require.NoError(t, err)
	for _, m := range merged {
		lines = append(lines, fmt.Sprintf("%s!%s merged to %s", sheet, m.GetStartAxis(), m.GetEndAxis()))
	}
	return lines
}

// describe returns a cell's style in a few words.
func describe(t testing.TB, f *excelize.File, sheet, ref string) string {
	t.Helper()
	id, err := f.GetCellStyle(sheet, ref)
	require.NoError(t, err)
	s, err := f.GetStyle(id)
	require.NoError(t, err)
	var words []string
	if s.Font != nil {
		if s.Font.Bold {
			words = append(words, "bold")
		}
		if s.Font.Color != "" && s.Font.Color != inkDark {
			words = append(words, "ink "+s.Font.Color)
		}
	}
	if len(s.Fill.Color) > 0 {
		words = append(words, "fill "+s.Fill.Color[0])
	}
	if s.CustomNumFmt != nil {
		words = append(words, "format "+*s.CustomNumFmt)
	} else if s.NumFmt != 0 {
		words = append(words, fmt.Sprintf("format %d", s.NumFmt))
	}
	if s.Alignment != nil && s.Alignment.Horizontal != "" {
		words = append(words, s.Alignment.Horizontal)
	}
	return strings.Join(words, ", ")
}
