package workbook

import (
	"bytes"
	"fmt"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule/workbook/internal/markup"
)

// BenchmarkOwnSheet makes a sheet of ours as long as a schedule of which every
// row has a problem.
func BenchmarkOwnSheet(b *testing.B) {
	s := Sheet{Name: "Problems", Rows: [][]Cell{{{Value: "Cell", Look: Look{Role: Heading}}}}}
	for r := range 20_000 {
		row := []Cell{{Value: fmt.Sprintf("Columns!A%d", r+7), Link: fmt.Sprintf("'Columns'!A%d", r+7)}}
		for c := range 7 {
			row = append(row, Cell{Value: fmt.Sprintf("value %d", c), Look: Look{Wrap: true}})
		}
		s.Rows = append(s.Rows, row)
	}
	plan := planFor(b, packed(b, simple(b, 14)), simpleBlock(14))
	for b.Loop() {
		require.NoError(b, plan.WriteTo(io.Discard, []Sheet{s}))
	}
}

func TestLinksOfOwnSheets(t *testing.T) {
	sheets := ownSheets()
	sheets[0].Rows[0][0].Link = "'It''s & more'!A1"
	var alone bytes.Buffer
	require.NoError(t, WriteNew(&alone, sheets))
	for name, data := range map[string][]byte{"grafted": annotate(t, rich(t), richBlock(), sheets...), "alone": alone.Bytes()} {
		f, err := excelize.OpenReader(bytes.NewReader(data))
		require.NoError(t, err)
		for cell, want := range map[string]string{"A1": "'It''s & more'!A1", "A3": "Columns!A6"} {
			linked, target, err := f.GetCellHyperLink("Summary", cell)
			require.NoError(t, err)
			assert.True(t, linked, name)
			assert.Equal(t, want, target, name)
		}
	}
}

func TestMoreLinksThanASheetHolds(t *testing.T) {
	l := lateLinks(make([]link, maxLinks+1))
	var out bytes.Buffer
	l.before(&out, &markup.Token{Kind: markup.End}, 0)
	assert.Equal(t, maxLinks, strings.Count(out.String(), "<hyperlink "))
}

func TestTextsInParts(t *testing.T) {
	look := Look{Role: Result, Bold: true}
	text := Rich{{Text: "N", Letter: true}, {Text: "cr,y", Subscript: true}, {Text: " = π² < 4 "}}
	var out bytes.Buffer
	require.NoError(t, WriteNew(&out, []Sheet{{Name: "Parts", Rows: [][]Cell{{{Value: text, Look: look}, {Value: Rich{{Text: strings.Repeat("x", 40_000)}}}, {Value: Rich{}}}}}}))
	f, err := excelize.OpenReader(&out)
	require.NoError(t, err)
	whole, err := f.GetCellValue("Parts", "A1")
	require.NoError(t, err)
	assert.Equal(t, "Ncr,y = π² < 4 ", whole)
	runs, err := f.GetCellRichText("Parts", "A1")
	require.NoError(t, err)
	require.Len(t, runs, 3)
	assert.True(t, runs[0].Font.Italic)
	assert.Equal(t, "subscript", runs[1].Font.VertAlign)
	assert.Equal(t, []any{"Calibri", 11.0, true, false, ""}, []any{runs[2].Font.Family, runs[2].Font.Size, runs[2].Font.Bold, runs[2].Font.Italic, runs[2].Font.VertAlign})
	long, err := f.GetCellValue("Parts", "B1")
	require.NoError(t, err)
	assert.Len(t, []rune(long), maxText)
}
