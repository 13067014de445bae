package workbook

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule/workbook/internal/opc"
)

// chartsOf returns the charts that a sheet leads to, by the way of its drawing.
func chartsOf(t *testing.T, data []byte, sheet string) []string {
	t.Helper()
	b, err := OpenBytes("out.xlsx", data)
	require.NoError(t, err)
	defer b.Close()
	var out []string
	var follow func(pkg *opc.Package, part string)
	follow = func(pkg *opc.Package, part string) {
		rels, err := pkg.Rels(part)
		require.NoError(t, err)
		for _, r := range rels {
			switch {
			case r.Is("drawing"):
				follow(pkg, r.Target)
			case r.Is("chart"):
				require.True(t, pkg.Has(r.Target), r.Target)
				out = append(out, r.Target)
			}
		}
	}
	for _, s := range b.sheets {
		if s.name == sheet {
			follow(b.pkg, s.part)
		}
	}
	return out
}

// A chart of the user's on the schedule and one on another sheet stay as they
// are beside those of our sheets, when the schedule is annotated and when it is
// annotated again.
func TestChartsOfTheUsersStayBesideOurs(t *testing.T) {
	f := simple(t, 14)
	_, err := f.NewSheet("Notes")
	require.NoError(t, err)
	for sheet, cell := range map[string]string{"Columns": "A20", "Notes": "C3"} {
		require.NoError(t, f.AddChart(sheet, cell, &excelize.Chart{Type: excelize.Col, Series: []excelize.ChartSeries{{Values: "Columns!$C$6:$C$14", Categories: "Columns!$A$6:$A$14"}}}))
	}
	in := packed(t, f)
	out := annotate(t, in, richBlock(), ownSheets()...)
	again := richBlock()
	again.Header.Old = []int{5, 6, 7, 8, 9, 10}
	twice := annotate(t, out, again, ownSheets()...)
	before := unpack(t, in)
	for name, data := range map[string][]byte{"once": out, "twice": twice} {
		seen := map[string]bool{}
		for _, sheet := range []string{"Columns", "Notes", "Summary"} {
			list := chartsOf(t, data, sheet)
			require.Len(t, list, 1, "%s: %s", name, sheet)
			assert.False(t, seen[list[0]], "%s: a part of its own", list[0])
			seen[list[0]] = true
		}
		after := unpack(t, data)
		kept := 0
		for part, content := range before {
			if strings.HasPrefix(part, "xl/charts/") || strings.HasPrefix(part, "xl/drawings/") {
				kept++
				assert.Equal(t, content, after[part], "%s: %s", name, part)
			}
		}
		assert.GreaterOrEqual(t, kept, 4)
		opened, err := excelize.OpenReader(bytes.NewReader(data))
		require.NoError(t, err)
		require.NoError(t, opened.Close())
	}
	assert.True(t, bytes.Equal(out, twice))
}
