package revision

import (
	"bytes"
	"fmt"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/internal/golden"
	"stanchion/schedule/workbook"
)

// twoIssues are issues with one member of every kind.
func twoIssues(t testing.TB) *Comparison {
	old := []Member{
		with(t, col("C1 A L0 L1 900"), "203x203x46 UKC"),
		with(t, col("C1 A L1 L2 700"), "254x254x89 UKC"),
		with(t, col("C2 B L0 L1 500"), "203x203x60 UKC"),
		with(t, col("C3 C L0 L1 900"), "203x203x46 UKC"),
		with(t, col("C4 D L0 L1 300"), "254x254x73 UKC"),
		col("C5 F L0 L1 900"),
		with(t, col("C6 G L0 L1 900"), "203x203x46 UKC"),
	}
	new := []Member{
		with(t, col("C1 A L0 L1 2500"), "203x203x46 UKC"),
		with(t, col("C1 A L1 L2 700"), "254x254x89 UKC"),
		with(t, col("C2a B L0 L1 500"), "203x203x60 UKC"),
		with(t, col("C3 C L0 L1 900"), "203x203x46 UKC"),
		with(t, col("C4 D L0 L1 300"), "254x254x73 UKC"),
		col("C5 F L0 L1 900"),
	}
	new[4].Column.Choice.MaxWidth = 210
	new[5].Problems = []*schedule.Problem{{What: "N_Ed is missing", Do: "give it in kN"}}
	for i := range new {
		new[i].Rows, new[i].Column.Cell = []int{i + 2}, fmt.Sprintf("Columns!A%d", i+2)
	}
	for i := range old {
		old[i].Column.Cell = fmt.Sprintf("Columns!A%d", i+2)
	}
	return compared(t, old, new)
}

func TestSheets(t *testing.T) {
	c := twoIssues(t)
	info := &Info{Program: "stanchion", Standard: "EN 1993-1-1", National: "UK", OldFile: "P01.xlsx", NewFile: "P02.xlsx", Sheet: "Columns",
		Settings: []Change{{Text: "grade S355 → S275"}}, Cautions: []string{"Results are design aids."}}
	var b bytes.Buffer
	require.NoError(t, workbook.WriteNew(&b, c.Sheets(info)))
	f, err := excelize.OpenReader(&b)
	require.NoError(t, err)
	defer f.Close()
	var lines []string
	for _, sheet := range f.GetSheetList() {
		rows, err := f.GetRows(sheet)
		require.NoError(t, err)
		for r, row := range rows {
			for k, text := range row {
				if text == "" {
					continue
				}
				cell, _ := excelize.CoordinatesToCellName(k+1, r+1)
				link, target, _ := f.GetCellHyperLink(sheet, cell)
				if link {
					text += " (to " + target + ")"
				}
				lines = append(lines, fmt.Sprintf("%s!%s = %s", sheet, cell, text))
			}
		}
	}
	golden.Equal(t, "sheets.txt", strings.Join(lines, "\n")+"\n")
}

// The columns beside the new issue, row by row.
func TestColumns(t *testing.T) {
	c := twoIssues(t)
	cols := c.Columns()
	var lines []string
	for i := range c.Rows {
		m := &schedule.Member{Rows: c.Rows[i].New.Rows}
		var cells []string
		for k, v := range schedule.Cells(nil, cols, m, nil) {
			if text := v.Format(&cols[k], '.'); text != "" {
				cells = append(cells, cols[k].Heading()+" = "+text)
			}
		}
		lines = append(lines, c.Rows[i].New.Name()+"\n  "+strings.Join(cells, "\n  "))
	}
	golden.Equal(t, "columns.txt", strings.Join(lines, "\n")+"\n")
}

// Each word that needs a look of its own has one.
func TestWordsAreDrawn(t *testing.T) {
	words := Words()
	for v := Stays; v <= Barred; v++ {
		assert.Contains(t, words, v.String())
	}
	for _, w := range []string{wordChanged, wordNew, wordNotRead, design.Passes.String(), design.Fails.String(), design.NoSection.String()} {
		assert.Contains(t, words, w)
	}
}

func TestRefusedSections(t *testing.T) {
	r := &Row{New: &Member{}, Check: &design.Result{Section: "CHS 508x5.0", Utilisation: math.Inf(1), Governing: design.Check{Kind: design.Refused, Reason: "beyond class 3"}}}
	assert.True(t, math.IsNaN(r.Utilisation()))
	assert.Equal(t, "not covered: beyond class 3", r.Governs())
}

func TestEmptyComparison(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, workbook.WriteNew(&b, compared(t, nil, nil).Sheets(&Info{})))
}
