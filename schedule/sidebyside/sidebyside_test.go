package sidebyside

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/schedule/workbook"
)

func table() *Table {
	t := &Table{File: "depot.csv", Rows: []Row{
		{Name: "as given", Passing: 9, Tonnes: 10, Sizes: 5, HasCost: true, Cost: 15000},
		{Name: "weak", Changes: "grade S275", Passing: 8, NoSection: 1, Tonnes: 11, Sizes: 6, HasCost: true, Unpriced: true},
		{Name: "one", Changes: "sizes 1", Why: "it cannot be"},
	}}
	t.Measure()
	return t
}

func TestText(t *testing.T) {
	headings, rows := table().Text()
	assert.Equal(t, []string{"Scenario", ">Pass", ">Fail", ">No section", ">Not read", ">Steel t", ">against the first", ">Sizes", ">Cost"}, headings)
	assert.Equal(t, []string{"as given", "9", "0", "0", "0", "10.00", "", "5", "15000"}, rows[0])
	assert.Equal(t, []string{"weak", "8", "0", "1", "0", "11.00", "+10.0 %", "6", ""}, rows[1], "a cost of part of the steel is none")
	assert.Equal(t, strings.Repeat(",", 8), strings.Join(rows[2][1:], ",")+",", "nothing came of it")
	assert.Equal(t, []string{"weak: 1 member has no section, and its steel is not counted", "weak: some of its steel has no cost rate", "one: it cannot be"}, table().Remarks())
}

// What holds for every scenario is said once.
func TestRemarksOnEveryScenario(t *testing.T) {
	t1 := table()
	t1.Rows = t1.Rows[:2]
	t1.Rows[0].NoSection, t1.Rows[0].NotRead, t1.Rows[1].NotRead = 2, 6, 6
	assert.Equal(t, []string{
		"as given: 2 members have no section, and their steel is not counted",
		"every scenario: 6 members could not be read, and their steel is not counted",
		"weak: 1 member has no section, and its steel is not counted",
		"weak: some of its steel has no cost rate",
	}, t1.Remarks())
	t1.Rows = t1.Rows[:1]
	assert.Equal(t, "as given: 6 members could not be read, and their steel is not counted", t1.Remarks()[1])
}

func TestForms(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, table().WriteCSV(&b, '.'))
	lines := strings.Split(b.String(), "\r\n")
	assert.True(t, IsCSV(lines[0]))
	assert.Equal(t, "weak,grade S275,8,0,1,0,11.000000,0.100000,6,,", lines[2])
	assert.Equal(t, "one,sizes 1,,,,,,,,,it cannot be", lines[3])

	b.Reset()
	page := table().Page()
	require.NoError(t, workbook.WriteNew(&b, []workbook.Sheet{page}))
	f, err := excelize.OpenReader(bytes.NewReader(b.Bytes()))
	require.NoError(t, err)
	defer f.Close()
	series := page.Charts[0].Chart.Series[0]
	assert.Equal(t, "'Scenarios side by side'!$F$4:$F$6", series.Values)
	for cell, want := range map[string]string{"A4": "as given", "F3": "Steel [t]", "F4": "10", "F5": "11", "G5": "0.1", "A6": "one"} {
		v, err := f.GetCellValue(Sheet, cell, excelize.Options{RawCellValue: true})
		require.NoError(t, err)
		assert.Equal(t, want, v, cell)
	}
}
