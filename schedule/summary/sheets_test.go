package summary

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

func texts(s *workbook.Sheet, column int) (out []any) {
	for _, row := range s.Rows {
		if column < len(row) {
			out = append(out, row[column].Value)
		}
	}
	return out
}

func TestSheets(t *testing.T) {
	y := NewTally(10, func(string) string { return "UKC" })
	lines := []Line{
		{Member: &schedule.Member{Column: design.Column{Mark: "A", Cell: "C'1!A2", Quantity: 1, Length: 4000}}, Working: "'Working'!A4",
			Result: design.Result{Status: design.Passes, Governing: design.Check{Kind: design.Compression}, Section: "203x203x46 UKC", Mass: 184.4, Utilisation: 0.9}},
		{Member: &schedule.Member{Column: design.Column{Mark: "B", Cell: "C'1!A3", Quantity: 1, Length: 4000}}, Working: "'Working'!A9",
			Result: design.Result{Status: design.Fails, Governing: design.Check{Kind: design.Compression}, Section: "203x203x46 UKC", Mass: 184.4, Utilisation: math.Inf(1), Notes: []string{"outside the rules"}}},
		{Member: &schedule.Member{Column: design.Column{Mark: "C", Cell: "C'1!A4"}, Problems: []*schedule.Problem{{Cell: "C'1!C4", What: "N_Ed is missing", Do: "give it"}}},
			Result: design.Result{Status: design.NotRead}},
	}
	for i := range lines {
		y.Add(lines[i].Member, &lines[i].Result)
	}
	info := &Info{Program: "stanchion devel", File: "loads.xlsx", Sheet: "C'1", National: &design.National{Name: "UK", Source: "the annex"},
		Settings: []schedule.SettingLine{{Name: "limit", Value: "1.00", From: "default"}}, Cautions: []string{"Check it."},
		Reading: &schedule.Summary{Rows: 3, Totals: 1, Notes: []string{"a note"}}}
	steel := takeoff.Of(nil, nil, takeoff.Options{})
	own := NewSheets(info, y, lines, steel)

	assert.Subset(t, texts(&own.Summary, 1), []any{"loads.xlsx", "C'1", "UK: the annex", 1.0, 3.0, "1.00"})
	assert.Subset(t, texts(&own.Summary, 0), []any{"passes", "fails", "no section", "not read", "UKC", "limit", "total rows passed over", "note", "Check it."})

	failing, unread := own.Problems.Rows[3], own.Problems.Rows[4] // below title, blank, headings
	assert.Equal(t, "'C''1'!A3", failing[0].Link)
	assert.Equal(t, "A3", failing[0].Value, "a cell of the schedule's own sheet, which may have a long name")
	assert.Len(t, own.Summary.Tables, 5, "each kept on one printed page")
	assert.Equal(t, "'Results'!G6", failing[4].Link)
	assert.Equal(t, "", failing[5].Value, "an endless utilisation is no number")
	assert.Equal(t, "outside the rules", failing[7].Value)
	assert.Equal(t, "'C''1'!C4", unread[0].Link, "to the cell that could not be read")
	assert.Equal(t, "not read", unread[3].Value)
	assert.Equal(t, []any{"N_Ed is missing", "give it"}, []any{unread[7].Value, unread[8].Value})
	assert.Subset(t, texts(&own.Problems, 0), []any{"Passed over", "total rows passed over", "note: a note"})

	to, problem := own.Place(0)
	assert.Equal(t, "'Results'!G5", to)
	assert.False(t, problem)
	to, problem = own.Place(1)
	assert.Equal(t, "'Problems'!A4", to)
	assert.True(t, problem)
	assert.Equal(t, "'Problems'!A4", own.Results.Rows[5][markColumn].Link)
	assert.Equal(t, "outside the rules", own.Results.Rows[5][statusColumn].Note)
	assert.Equal(t, "passes", own.Results.Rows[4][statusColumn].Value)

	assert.Equal(t, "'Working'!A9", failing[6].Link)
	for i, want := range []string{"'Working'!A4", "'Working'!A9", ""} {
		assert.Equal(t, want, own.Results.Rows[4+i][10].Link)
	}
}
