package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

// Pieces are counted in offices with a word behind the number.
func TestCountsWithTheirWord(t *testing.T) {
	for cell, want := range map[string]int{"2 no.": 2, "3 No": 3, "4 off": 4, "2x": 2, "12 nr": 12, "1 no. off": 1, "5 pcs": 5, "#6": 6} {
		assert.Equal(t, want, good(t, "Mark | Qty | Length | N_Ed\nC1 | "+cell+" | 3.6 | 900").Quantity, cell)
	}
	for _, cell := range []string{"two", "2 (no.)", "2 no. tbc", "2 kN", "1.5"} {
		assert.Contains(t, problem(t, "Mark | Qty | Length | N_Ed\nC1 | "+cell+" | 3.6 | 900").Error(), "give a whole number", cell)
	}
	problem(t, "Mark | Length | N_Ed\nC1 | 3.6 | 900 no.")
}

// Forces in N that are read in kN are suspected where a column could not carry
// them, and the bound of what is read lies far above.
func TestForcesInNewtons(t *testing.T) {
	const header = "Mark | Length | N_Ed"
	for _, rows := range []string{"\nC1 | 3.6 | #95000\nC2 | 3.6 | #87000\nC3 | 3.6 | 900", "\nC1 | 3.6 | 95000"} {
		notes := readAll(t, sheetOf(header+rows)).Summary.Notes
		assert.Len(t, notes, 1)
		assert.Contains(t, notes[0], "N_Ed [N]")
	}
	assert.Empty(t, readAll(t, sheetOf(header+" (kN)\nC1 | 3.6 | #95000")).Summary.Notes)
	assert.Empty(t, readAll(t, sheetOf(header+"\nC1 | 3.6 | #95000\nC2 | 3.6 | 900")).Summary.Notes)
}

// hinted is a source whose form makes a decimal comma likely.
type hinted struct{ Source }

func (hinted) DecimalHint() byte { return ',' }

func TestCommaThatNothingTellsOf(t *testing.T) {
	notes := func(rows string) []string {
		return readAll(t, hinted{sheetOf("Mark | Length | N_Ed" + rows)}).Summary.Notes
	}
	unsure := notes("\nC1 | 4 | 1,200\nC2 | 4 | 900")
	assert.Len(t, unsure, 1)
	assert.Contains(t, unsure[0], `"1,200" is read with the decimal mark ','`)
	point := readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 506.400\nC2 | 4 | 900")).Summary.Notes
	assert.Len(t, point, 1)
	assert.Contains(t, point[0], `"506.400" is read with the decimal mark '.'`)
	assert.Empty(t, readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 4.2 | 506.400")).Summary.Notes)
	assert.Empty(t, notes("\nC1 | 4,2 | 1,200\nC2 | 4 | 900"))
	assert.Empty(t, notes("\nC1 | 4,200 | 1,200\nC2 | 4 | 900"), "the length tells")
	assert.Empty(t, readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 1,200")).Summary.Notes, "read as 1200, which is safe")
}

// A spacing is one number, so that its comma is a decimal mark.
func TestSpacingTellsTheDecimalMark(t *testing.T) {
	s := readAll(t, sheetOf("Mark | Length (mm) | N_Ed (N) | Restraints z-z\nC1 | 6000 | 199.900 | every 1,5"))
	assert.Empty(t, s.Members[0].Problems)
	assert.Equal(t, []float64{1500, 3000, 4500}, s.Members[0].Column.Z.Restraints)
	assert.InDelta(t, 199900, s.Members[0].Column.Combinations[0].NEd, 1e-6)
	s = readAll(t, sheetOf("Mark | Length | N_Ed | Restraints z-z\nC1 | 6 | 900 | 1.5, 3, 4.5"))
	assert.Equal(t, []float64{1500, 3000, 4500}, s.Members[0].Column.Z.Restraints)
}

func TestGradesByTheirStrength(t *testing.T) {
	c := good(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | #355")
	assert.Equal(t, []string{"S355"}, c.Grades)
	c = good(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | 275 / 355")
	assert.Equal(t, []string{"S275", "S355"}, c.Grades)
	problem(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | 350")
}
