package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// A column headed Type is one of families where all that it holds is families.
func TestTypeColumn(t *testing.T) {
	const header = "Mark | Type | Length | N_Ed\n - | - | m | kN\n"
	s := readAll(t, sheetOf(header+"C1 | HEB | 3.6 | 900\nC2 | | 3.6 | 900\nC3 | SHS | 3.6 | 900\nTotal | 3 types | | 2700\nMark | Type | Length | N_Ed\nC4 | UC | 3.6 | 900"))
	var families [][]string
	for _, m := range s.Members {
		assert.Empty(t, m.Problems)
		families = append(families, m.Column.Choice.Families)
	}
	assert.Equal(t, [][]string{{"HEB"}, nil, {"SHS"}, {"UKC"}}, families)
	assert.Equal(t, []string{`Columns!B1 ("Type") is read as Family`}, s.Summary.Notes)

	// Otherwise it stays what it was, and is named.
	s = readAll(t, sheetOf(header+"C1 | Internal | 3.6 | 900\nC2 | Edge | 3.6 | 900"))
	assert.Nil(t, s.Members[0].Column.Choice.Families)
	assert.Equal(t, []Seen{{Cell: "Columns!B1", Heading: "Type"}}, s.Summary.Other)
	s = readAll(t, sheetOf(header+"C1 | UC | 3.6 | 900\nC2 | Concrete | 3.6 | 900"))
	assert.Nil(t, s.Members[0].Column.Choice.Families)
	assert.Contains(t, s.Summary.LeftAlone[0].Why, `"Concrete"`)

	// A heading that names the field beats it; two that do not are one too many.
	s = readAll(t, sheetOf("Mark | Type | Family | Length | N_Ed\nC1 | HEB | UC | 3.6 | 900"))
	assert.Equal(t, []string{"UKC"}, s.Members[0].Column.Choice.Families)
	assert.Equal(t, []Seen{{Cell: "Columns!B1", Heading: "Type"}}, s.Summary.Other)
	r := refused(t, sheetOf("Mark | Type | Member type | Length | N_Ed\nC1 | HEB | UC | 3.6 | 900"))
	assert.ErrorContains(t, r, "two headers for one field")
}

// What is not understood and measures an action is named louder than a remark,
// and so is a hidden column that something is read from.
func TestHeadingsThatMayMatter(t *testing.T) {
	src := sheetOf("Mark | Length | N_Ed | M (kNm) | P [kN] | Remarks\nC1 | 3.6 | 900 | 20 | 30 | as drawn")
	src.hidden = map[int]bool{2: true}
	s := readAll(t, src)
	assert.Len(t, s.Summary.LeftAlone, 2)
	assert.Contains(t, s.Summary.LeftAlone[0].Why, "it is in kNm")
	assert.Contains(t, s.Summary.LeftAlone[1].Why, "it is in kN,")
	assert.Equal(t, []Seen{{Cell: "Columns!F1", Heading: "Remarks"}}, s.Summary.Other)
	assert.Equal(t, []string{`Columns!C1 ("N_Ed") is hidden, and N_Ed is read from it`}, s.Summary.Notes)
}
