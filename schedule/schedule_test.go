package schedule

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

func TestPlainSchedule(t *testing.T) {
	s := readAll(t, sheetOf(`
Foundry Lane Depot|
Column schedule, issue P2|

Mark | Grid | Level from | Level to | No off | Length (m) | N_Ed (kN) | Restraints z-z | Section | Grade | Remarks
C1   | A1   | GF | L1 | #2 | #4.5 | #1200 | #2.25 |             |      | braced
C2   | A2   | GF | L1 |    | #4.5 | #800  | mid   | 203x203x60 UKC | S275 |
`))
	require.Len(t, s.Members, 2)
	assert.Equal(t, design.Column{
		Mark: "C1", Stack: "A1", From: "GF", To: "L1", Quantity: 2, Length: 4500, Z: design.Hold{Restraints: []float64{2250}},
		Combinations: []design.Combination{{NEd: 1.2e6}}, Cell: "Columns!A5",
	}, s.Members[0].Column)
	assert.Equal(t, []int{6}, s.Members[1].Rows)
	c := s.Members[1].Column
	assert.Equal(t, "203x203x60 UKC", c.Given)
	assert.Equal(t, []string{"S275"}, c.Grades)
	assert.Equal(t, []float64{2250}, c.Z.Restraints)
	assert.Equal(t, 1, c.Quantity)
	assert.Equal(t, Header{First: 4, Last: 4, Columns: s.Header.Columns, Width: 11, Cells: 11}, s.Header)
	assert.Equal(t, []Seen{{Cell: "Columns!K4", Heading: "Remarks"}}, s.Summary.Other)
}

// A sheet as wide as a spreadsheet goes is read, or refused, at once.
func TestAbsurdlyWideSheets(t *testing.T) {
	row := "Mark | Length" + strings.Repeat(" | N_Ed", 4_000)
	r := refused(t, sheetOf(strings.Repeat(row+"\n", 70)))
	assert.ErrorContains(t, r, "two headers for one field")
	assert.ErrorContains(t, r, "more")
	assert.Less(t, len(r.Error()), 4000)
}

func TestHeaderOverThreeRows(t *testing.T) {
	s := readAll(t, sheetOf(`
Geometry | ^ | ULS1 | ^ | ^ | ULS2 | ^
Mark | Height | N_Ed | Moment y-y | ^ | N_Ed | Moment y-y | ^
"    | "      | "    | top | bottom | "   | top | bottom
-    | m      | kN   | kNm | kNm    | kN  | kNm | kNm
(1) | (2) | (3) | (4) | (5) | (6) | (7) | (8)
C1 | #3.6 | #900 | #10 | #-5 | #700 | #25 |
`))
	require.Len(t, s.Members, 1)
	assert.Empty(t, s.Members[0].Problems)
	assert.Equal(t, 4, s.Header.UnitRow)
	assert.Equal(t, []design.Combination{
		{Name: "ULS1", NEd: 900e3, My: design.EndMoments{Bottom: -5e6, Top: 10e6}},
		{Name: "ULS2", NEd: 700e3, My: design.EndMoments{Top: 25e6}},
	}, s.Members[0].Column.Combinations)
}

// A CSV keeps of merged headings the first cell alone.
func TestHeaderWithoutMerges(t *testing.T) {
	c := good(t, `
Mark | Length | N_Ed | Moment y-y |        | Moment z-z |        | Grade
     | m      | kN   | top        | bottom | top        | bottom |
C1   | 3.6    | 900  | 10         | -5     | 1          | 2      | S355
`)
	assert.Equal(t, design.EndMoments{Bottom: -5e6, Top: 10e6}, c.Combinations[0].My)
	assert.Equal(t, design.EndMoments{Bottom: 2e6, Top: 1e6}, c.Combinations[0].Mz)
	assert.Equal(t, []string{"S355"}, c.Grades)
}

// A second row that names combinations belongs to the header, even where a CSV
// has lost the merge above it: a combination must not go unread.
func TestCombinationsUnderOneHeading(t *testing.T) {
	for _, names := range [][2]string{{"ULS1", "ULS2"}, {"Comb A", "Comb B"}, {"Wind X", "Wind Y"}, {"1.35G+1.5Q", "1.0G+1.5Q"}, {"Persistent", "Accidental"}} {
		for _, units := range []string{"", " | m | kN | kN |\n"} {
			c := good(t, "Mark | Length | Axial load | | Grade\n | | "+names[0]+" | "+names[1]+" |\n"+units+"C1 | 4 | 900 | 1500 | S355")
			assert.Equal(t, []design.Combination{{Name: names[0], NEd: 900e3}, {Name: names[1], NEd: 1500e3}}, c.Combinations)
		}
	}
	// Numbers under no heading at all are named.
	s := readAll(t, sheetOf("Mark | Length | Axial load |\n | | Gravity | Uplift\nC1 | 4 | 900 | #-200\nC2 | 4 | 900 | -1,200 kN"))
	assert.Contains(t, s.Summary.Notes[0], "Columns!D3: numbers stand in 2 rows under no heading, and are not read")
}

// What is to be signed below a schedule is no member of it.
func TestSignOffRows(t *testing.T) {
	s := readAll(t, sheetOf("Mark | Grid | Length | N_Ed\nC1 | A | 4 | 900\nMade by: AB | | Checked: |\nRoof | B | 4 | tbc\nDrawn | CD | Date: | 3 May"))
	assert.Len(t, s.Members, 3)
	assert.Equal(t, 1, s.Summary.Footnotes)
}

func TestUnits(t *testing.T) {
	for name, text := range map[string]string{
		"heading":  "Length (mm) | N_Ed [MN]\n3600 | 0.9",
		"unit row": "Length | N_Ed\nmm | N\n3600 | 900000",
		"default":  "Length | N_Ed\n3.6 | 900",
		"cell":     "Length | N_Ed\n3600 mm | 900 kN",
		"slash":    "Length / cm | N_Ed in N\n360 | 900000",
		"numbers":  "Length | N_Ed\n#3.6 | #900",
	} {
		c := good(t, text)
		assert.InDelta(t, 3600, c.Length, 1e-9, name)
		assert.InDelta(t, 900e3, c.Combinations[0].NEd, 1e-6, name)
	}
}

func TestUnitsThatAreRefused(t *testing.T) {
	r := refused(t, sheetOf("Mark | Length (ft) | N_Ed\nC1 | 12 | 900"))
	assert.ErrorContains(t, r, "Columns!B1")
	assert.ErrorContains(t, r, "the unit ft is not read for Length")
	r = refused(t, sheetOf("Mark | Length | N_Ed\n | m | t\nC1 | 3.6 | 90"))
	assert.ErrorContains(t, r, "Columns!C2")
	r = refused(t, sheetOf("Mark | Length | N_Ed (kN)\n | m | N\nC1 | 3.6 | 90"))
	assert.ErrorContains(t, r, "make them agree")
}

func TestNumbersThatAreNotRead(t *testing.T) {
	for cell, want := range map[string]string{
		"tbc":        `loads.xlsx, Columns!C2: N_Ed is "tbc": give a number in kN, or clear the row`,
		"1200 (tbc)": `loads.xlsx, Columns!C2: N_Ed is "1200 (tbc)", more than a number: "(tbc)" follows it: give a number in kN, or clear the row`,
		"(450)":      `loads.xlsx, Columns!C2: N_Ed is "(450)": give a number in kN, or clear the row`,
		"~900":       `loads.xlsx, Columns!C2: N_Ed is "~900": give a number in kN, or clear the row`,
		"1200 kNm":   `loads.xlsx, Columns!C2: N_Ed is "1200 kNm", in kNm, which is not a unit of it: give a number in kN, or clear the row`,
		"#250000":    `loads.xlsx, Columns!C2: N_Ed is 250000 kN, above 200 MN: give its unit in the heading, the unit row or the cell (it is read in kN), or correct it`,
		"!#VALUE!":   `loads.xlsx, Columns!C2: N_Ed is the error #VALUE!: mend the formula, or clear the row`,
		"=B2*2":      `loads.xlsx, Columns!C2: N_Ed is a formula without a value, =B2*2: have the spreadsheet calculate it and save again`,
		"@1-Feb":     `loads.xlsx, Columns!C2: N_Ed is a date, 1-Feb: the spreadsheet has turned what was typed into one: format the cell as text and type it again`,
		"":           `loads.xlsx, Columns!C2: N_Ed is missing: give it in kN, or clear the row`,
	} {
		p := problem(t, "Mark | Length | N_Ed\nC1 | 3.6 | "+cell)
		assert.Equal(t, want, p.Error())
	}
	p := problem(t, "Mark | Length | N_Ed\nC1 | #3600 | 900")
	assert.Contains(t, p.Error(), "Length is 3600 m, outside 0.3 to 60 m")
	assert.Equal(t, "Length", p.Heading)
	problem(t, "Mark | Length | N_Ed\nC1 | 0 | 900")
	problem(t, "Mark | Length | N_Ed\nC1 | -3 | 900")
	problem(t, "Mark | Length | N_Ed\nC1 | 0.29 | 900")
	good(t, "Mark | Length (mm) | N_Ed\nC1 | 300 | 900")
	good(t, "Mark | Length | N_Ed\nC1 | 60 | 200 MN")
}

func TestDecimalMarkIsDecidedOnce(t *testing.T) {
	s := readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 3,6 | 1.200,5\nC2 | 4,2 | 1.200\nC3 | 3,5 | 1 200"))
	assert.Equal(t, byte(','), s.Decimal)
	assert.Equal(t, 1200.5e3, s.Members[0].Column.Combinations[0].NEd)
	assert.Equal(t, 1200e3, s.Members[1].Column.Combinations[0].NEd)
	assert.Equal(t, 1200e3, s.Members[2].Column.Combinations[0].NEd)
	s = readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 3.6 | 1,200\nC2 | 4.2 | 1'200"))
	assert.Equal(t, 1200e3, s.Members[0].Column.Combinations[0].NEd)
	assert.Equal(t, 1200e3, s.Members[1].Column.Combinations[0].NEd)
	// Only lengths tell: 3500 m would be none.
	s = readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 3,500 | 1,200"))
	assert.Equal(t, byte(','), s.Decimal)
	assert.Equal(t, 3500.0, s.Members[0].Column.Length)
	assert.InDelta(t, 1.2e3, s.Members[0].Column.Combinations[0].NEd, 1e-9)
	// One that does not fit is not read.
	s = readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 3.6 | 900.5\nC2 | 3,6 | 900.5\nC3|3.5|1.5"))
	assert.Len(t, s.Members[1].Problems, 1)
	assert.Contains(t, s.Summary.Notes[0], "1 number does not fit the decimal mark")
}

func TestTwoHeadersForOneField(t *testing.T) {
	r := refused(t, sheetOf("Mark | Length | N_Ed (kN) | Axial load (kN)\nC1 | 3.6 | 900 | 800"))
	assert.Equal(t, `loads.xlsx, Columns!A1: two headers for one field: rename one, or map one with the setting map HEADING (to ignore, to leave it alone)
  Columns!C1: "N_Ed (kN)" is N_Ed
  Columns!D1: "Axial load (kN)" is N_Ed`, r.Error())
	// A mapping settles it.
	text := "Mark | Length | N_Ed (kN) | Axial load (kN)\nC1 | 3.6 | 900 | 800"
	assert.Equal(t, 800e3, good(t, text, "map Axial load=N_Ed").Combinations[0].NEd)
	assert.Equal(t, 900e3, good(t, text, "map Axial load=ignore").Combinations[0].NEd)
}

func TestNeededHeaders(t *testing.T) {
	r := refused(t, sheetOf("Mark | Length | Section | Remarks\nC1 | 3.6 | 203x203x60 UKC | new"))
	assert.ErrorContains(t, r, "nothing stands for N_Ed")
	assert.ErrorContains(t, r, `"Length" is Length`)
	assert.ErrorContains(t, r, `"Remarks" is not read`)
	assert.ErrorContains(t, r, "Length and N_Ed (Mark and the others are optional)")
	r = refused(t, sheetOf("some | words\nand | figures"))
	assert.ErrorContains(t, r, `Columns!B1: "words" is not read`)
	refused(t, sheetOf("Mark | Length | Unfactored axial\nC1 | 3.6 | 500"))
	refused(t, sheetOf("Mark | Length | N_Ed\nTotal | | 0"))
	// A take-off needs no loads.
	s, err := Read(sheetOf("Mark | Length | Section\nC1 | 3.6 | 203x203x60 UKC"), Options{National: options().National, LoadsOptional: true})
	require.NoError(t, err)
	assert.Empty(t, s.Members[0].Problems)
}

func TestExactBeatsSuggested(t *testing.T) {
	s := readAll(t, sheetOf("Mark | ID | Level from | Level to | Lift | Length | N_Ed\nC1 | 77 | L1 | L2 | L1-L2 | 3.6 | 900"))
	c := s.Members[0].Column
	assert.Equal(t, "C1", c.Mark)
	assert.Equal(t, [2]string{"L1", "L2"}, [2]string{c.From, c.To})
	assert.Equal(t, 3600.0, c.Length)
	var left []string
	for _, l := range s.Summary.LeftAlone {
		left = append(left, l.Heading)
	}
	assert.Equal(t, []string{"ID", "Lift"}, left)
	c = *good(t, "Mark | Lift | Length | N_Ed\nC1 | L1 to L2 | 3.6 | 900")
	assert.Equal(t, [2]string{"L1", "L2"}, [2]string{c.From, c.To})
}

// Length, Height and Storey height name the field with the same right: which
// of them is meant is not for the program to choose.
func TestTwoHeadersForTheLength(t *testing.T) {
	for _, pair := range []string{"Length | Height", "Storey height | L", "Height (mm) | Storey height (m)"} {
		r := refused(t, sheetOf("Mark | "+pair+" | N_Ed\nC1 | 3.6 | 4.0 | 900"))
		assert.ErrorContains(t, r, "two headers for one field")
		assert.ErrorContains(t, r, "Columns!B1")
		assert.ErrorContains(t, r, "Columns!C1")
	}
}

func TestHiddenColumnsAndRows(t *testing.T) {
	src := sheetOf("Mark | Length | N_Ed (kN) | Axial load (kN)\nC1 | 3.6 | 900 | 800\nC2 | 3.6 | 700 | 600")
	src.hidden, src.hide = map[int]bool{2: true}, map[int]bool{3: true}
	s := readAll(t, src)
	assert.Equal(t, 800e3, s.Members[0].Column.Combinations[0].NEd)
	assert.Equal(t, "N_Ed (kN)", s.Summary.LeftAlone[0].Heading)
	assert.Contains(t, s.Summary.LeftAlone[0].Why, "hidden")
	assert.Empty(t, s.Members[0].Column.Notes)
	assert.Equal(t, []string{"the row is hidden"}, s.Members[1].Column.Notes)
	assert.Equal(t, 1, s.Summary.Hidden)
	// A field that nothing visible supplies comes from the hidden column.
	src = sheetOf("Mark | Length | N_Ed | Grade\nC1 | 3.6 | 900 | S275")
	src.hidden = map[int]bool{3: true}
	assert.Equal(t, []string{"S275"}, readAll(t, src).Members[0].Column.Grades)
}

func TestOldNotationIsNotGuessed(t *testing.T) {
	r := refused(t, sheetOf("Mark | Length | N_Ed | Lcr x-x | Lcr y-y\nC1 | 3.6 | 900 | 3 | 2"))
	assert.ErrorContains(t, r, "y-y is the major axis")
	// Torsion beside both bending moments is left alone.
	s := readAll(t, sheetOf("Mark | Length | N_Ed | Mx top | My top | Mz top\nC1 | 3.6 | 900 | 1 | 2 | 3"))
	assert.Equal(t, "Mx top", s.Summary.LeftAlone[0].Heading)
	assert.Equal(t, 2e6, s.Members[0].Column.Combinations[0].My.Top)
	refused(t, sheetOf("Mark | Length | N_Ed | Moment top\nC1 | 3.6 | 900 | 3"))
}

func TestMergedMarks(t *testing.T) {
	s := readAll(t, sheetOf(`
Mark | Level from | Level to | Combination | Length | N_Ed
C1   | GF         | L1       | ULS1        | #4     | #900
"    | "          | "        | ULS2        | "      | #700
C2   | GF         | L1       | ULS1        | #4     | #500
"    | "          | "        | ULS2        |        | #400
"    |            |          |             |        |
`))
	require.Len(t, s.Members, 2)
	for _, m := range s.Members {
		assert.Empty(t, m.Problems)
		assert.Len(t, m.Column.Combinations, 2)
	}
	assert.Equal(t, []int{2, 3}, s.Members[0].Rows)
}

func TestRowsOfOneMember(t *testing.T) {
	s := readAll(t, sheetOf(`
Mark | Level from | Combination | Length | N_Ed | Restraints z-z
C1   | GF         | ULS1        | 4      | 900  | mid
C2   | GF         | ULS1        | 4      | 500  |
c1   | GF         | ULS2        | 4.0    | 700  | 1/2
C1   | L1         | ULS1        | 4      | 300  |
C2   | GF         | ULS2        | 3.9    | 500  |
`))
	require.Len(t, s.Members, 3)
	c := s.Members[0].Column
	assert.Equal(t, []int{2, 4}, s.Members[0].Rows)
	assert.Equal(t, []design.Combination{{Name: "ULS1", NEd: 900e3}, {Name: "ULS2", NEd: 700e3}}, c.Combinations)
	assert.Empty(t, s.Members[0].Problems)
	require.Len(t, s.Members[1].Problems, 1)
	assert.Equal(t, "loads.xlsx, Columns!D6: Length differs from row 3 of the same member: make the rows of one mark and level agree", s.Members[1].Problems[0].Error())
	assert.Equal(t, 3, s.Summary.Members)
	assert.Equal(t, 5, s.Summary.Rows)

	header := "Mark | Combination | Length | N_Ed | Section\n"
	c = *good(t, header+"C1 | ULS1 | 4 | 900 | UC 203x203x60\nC1 | ULS2 | | 700 | 203x203x60 UKC")
	assert.Len(t, c.Combinations, 2)
	p := problem(t, header+"C1 | ULS1 | 4 | 900 |\nC1 | ULS2 | 4 | |")
	assert.Contains(t, p.Error(), `Columns!D3: N_Ed of combination "ULS2" is missing`)
	// The second appearance of a combination is another member.
	s = readAll(t, sheetOf(header+"C1 | ULS1 | 4 | 900 |\nC1 | ULS2 | 4 | 800 |\nC1 | ULS1 | 4 | 700 |\nC1 | ULS2 | 4 | 600 |"))
	require.Len(t, s.Members, 2)
	assert.Equal(t, []int{4, 5}, s.Members[1].Rows)
	assert.Len(t, s.Members[1].Column.Combinations, 2)
	assert.Contains(t, s.Members[0].Column.Notes[0], "row 4")
}

func TestTwins(t *testing.T) {
	s := readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 900\nC1 | 4 | 700\n | 4 | 300\n | 4 | 200"))
	require.Len(t, s.Members, 4)
	assert.Equal(t, []string{"C1 stands in row 3 too, with nothing to tell them apart: two members"}, s.Members[0].Column.Notes)
	assert.Equal(t, []string{"C1 stands in row 2 too, with nothing to tell them apart: two members"}, s.Members[1].Column.Notes)
	assert.Equal(t, "Columns!A4", s.Members[2].Column.Mark)
	assert.Empty(t, s.Members[3].Column.Notes)
}

func TestRowsThatAreNoMembers(t *testing.T) {
	s := readAll(t, sheetOf(`
Mark | Qty | Length | N_Ed | Remarks
Level 2 |
C1   | #1 | #4 | #900 |
C2   | #1 | #4 | #700 |
Sub-total | #2 | | #1600 |
Level 1
Mark | Qty | Length | N_Ed | Remarks
C3   | #1 | #4 | #700 | total load to be confirmed
     |    |    |      | see sketch
AVERAGE | | #4 | #766.7 |
Total | #3 | | #2300 |

* all loads are factored
1) restraints by others
Notes: see drawing
`))
	assert.Len(t, s.Members, 3)
	assert.Equal(t, 3, s.Summary.Totals)
	assert.Equal(t, 1, s.Summary.Repeated)
	assert.Equal(t, 6, s.Summary.Footnotes)
	for _, m := range s.Members {
		assert.Empty(t, m.Problems)
	}
	// A mark alone is a member that somebody forgot.
	s = readAll(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 900\nC2 | | "))
	assert.Len(t, s.Members, 2)
	assert.Len(t, s.Members[1].Problems, 2)
}

func TestSignConvention(t *testing.T) {
	text := "Mark | Length | N_Ed\nC1 | 4 | -900\nC2 | 4 | -700"
	r := refused(t, sheetOf(text))
	assert.ErrorContains(t, r, "compression")
	assert.Equal(t, 900e3, readAll(t, sheetOf(text), "compression=negative").Members[0].Column.Combinations[0].NEd)
	assert.Equal(t, -900e3, readAll(t, sheetOf(text), "compression=positive").Members[0].Column.Combinations[0].NEd)
	assert.Equal(t, -900e3, readAll(t, sheetOf(text+"\nC3 | 4 | 10")).Members[0].Column.Combinations[0].NEd)
}

func TestCombinationsByColumn(t *testing.T) {
	c := good(t, `
Mark | Length | N_Ed ULS1 | N_Ed ULS2 | N_Ed ULS3 | M_y,Ed top | M_z,Ed top ULS2 | N_Ed above 2.5 m | N_Ed ULS2 above mid
C1 | 4 | 900 | 700 | | 12 | 3 | 500 | 400
`)
	assert.Equal(t, []design.Combination{
		{Name: "ULS1", NEd: 900e3, My: design.EndMoments{Top: 12e6}, Steps: []design.Step{{Height: 2500, NEd: 500e3}}},
		{Name: "ULS2", NEd: 700e3, My: design.EndMoments{Top: 12e6}, Mz: design.EndMoments{Top: 3e6}, Steps: []design.Step{{Height: 2000, NEd: 400e3}, {Height: 2500, NEd: 500e3}}},
	}, c.Combinations)
	// Moments that name combinations, one N_Ed for all.
	c = good(t, "Mark | Length | N_Ed | M_y,Ed top ULS1 | M_y,Ed top ULS2\nC1 | 4 | 900 | 10 | 20")
	assert.Equal(t, []design.Combination{
		{Name: "ULS1", NEd: 900e3, My: design.EndMoments{Top: 10e6}},
		{Name: "ULS2", NEd: 900e3, My: design.EndMoments{Top: 20e6}},
	}, c.Combinations)
	p := problem(t, "Mark | Length | N_Ed ULS1 | N_Ed ULS2 | M_y,Ed top ULS2\nC1 | 4 | 900 | | 20")
	assert.Contains(t, p.Error(), `Columns!D2: N_Ed of combination "ULS2" is missing`)
	c = good(t, "Mark | Length | N_Ed | M_y,Ed\nC1 | 4 | 900 | 20")
	assert.Equal(t, design.EndMoments{Bottom: 20e6, Top: 20e6}, c.Combinations[0].My)
	c = good(t, "Mark | Length | N_Ed | Reaction flange A | Reaction web B\nC1 | 4 | 900 | 120 | 40")
	assert.True(t, c.Combinations[0].HasReactions)
	assert.Equal(t, 120e3, c.Combinations[0].FlangeA)
	assert.Equal(t, 40e3, c.Combinations[0].WebB)
	problem(t, "Mark | Length | N_Ed | N_Ed above 4.5 m\nC1 | 4 | 900 | 800")
	c = good(t, "Mark | Length | N_Ed\nC1 | 4 | 0")
	assert.Equal(t, []design.Combination{{}}, c.Combinations)
}

func TestEveryOtherField(t *testing.T) {
	c := good(t, `
Mark | Length | N_Ed | L_cr,y | L_cr,z | L_T | k_y | k_z | Ends y-y | Ends z-z | Torsion restraints | z-z held at flange | Family | Max depth | Min width | Max thickness | eta y-y bottom | Stiffness z-z top | L_fi,y | L_fi,z | eta_fi | Fire period | Sides exposed | Boxed | Utilisation limit | Group | Splice
C1 | 6 | 900 | 5 | 4 | 3.5 | 0.9 | 0.85 | fixed-pinned | fixed-free | quarters | yes | UKC, UKB | 300 | 150 | 20 | 0.3 | 5000 | 3 | 4.2 | 0.6 | 60 | 3 | box | 95% | G1 | yes
`)
	eta, k := 0.3, 5000e6
	want := design.Column{
		Mark: "C1", Length: 6000, Quantity: 1, Group: "G1", Splice: true, SpliceSaid: true, Cell: "Columns!A2",
		Y:            design.Hold{Bottom: design.End{Condition: design.Fixed, Eta: &eta}, Lcr: 5000, K: 0.9},
		Z:            design.Hold{Bottom: design.End{Condition: design.Fixed}, Top: design.End{Condition: design.Free, Stiffness: &k}, Lcr: 4000, K: 0.85},
		Torsion:      design.Torsion{Given: true, Restraints: []float64{1500, 3000, 4500}, LT: 3500, EccentricFlange: true},
		Combinations: []design.Combination{{NEd: 900e3}},
		Choice:       design.Choice{Families: []string{"UKC", "UKB"}, MaxDepth: 300, MinWidth: 150, MaxThickness: 20, Limit: 0.95},
		Fire:         design.Fire{LcrY: 3000, LcrZ: 4200, LoadRatio: 0.6, Period: 60, Sides: 3, Boxed: true},
	}
	assert.InDelta(t, 0.95, c.Choice.Limit, 1e-12)
	c.Choice.Limit = 0.95
	assert.Equal(t, want, *c)
	c = good(t, "Mark | Length | N_Ed | Torsion restraints | z-z held at flange\nC1 | 6 | 900 | ends | 150 mm")
	assert.True(t, c.Torsion.Given)
	assert.Empty(t, c.Torsion.Restraints)
	assert.Equal(t, 150.0, c.Torsion.Eccentric)
	c = good(t, "Mark | Length | N_Ed | Torsion restraints | Ends z-z | Effective length\nC1 | 6 | 900 | - | - | 5.5")
	assert.False(t, c.Torsion.Given)
	assert.Equal(t, 5500.0, c.Y.Lcr)
	assert.Equal(t, 5500.0, c.Z.Lcr)
}

func TestFractionFormat(t *testing.T) {
	c := good(t, "Mark | Length | N_Ed | Restraints z-z\nC1 | #6 | #900 | ~1/2=0.5")
	assert.Equal(t, []float64{3000}, c.Z.Restraints)
	assert.Contains(t, c.Notes[0], "shown as a fraction")
	c = good(t, "Mark | Length | N_Ed | Restraints z-z\nC1 | #6 | #900 | #0.5")
	assert.Equal(t, []float64{500}, c.Z.Restraints)
}

func TestGroups(t *testing.T) {
	s := readAll(t, sheetOf(`
Mark | Length | N_Ed | Group | Family | Grade
C1 | 4 | 900 | G1 | UKC |
C2 | 4 | 900 | G1 |     | S355
C3 | 4 | 900 | G2 | UKC |
C4 | 4 | 900 | g2 | HE  |
C5 | 4 | 900 | G3 |     | S275
C6 | 4 | 900 | G3 |     |
C7 | 4 | 900 |    | HE  |
`))
	assert.Empty(t, s.Members[0].Problems)
	assert.Empty(t, s.Members[1].Problems)
	require.Len(t, s.Members[2].Problems, 1)
	assert.Equal(t, `loads.xlsx, Columns!D4: group "G2" has more than one family: UKC in row 4; HEA, HEB, HEM in row 5: give a group one family and one grade`, s.Members[2].Problems[0].Error())
	assert.Contains(t, s.Members[5].Problems[0].Error(), "more than one grade: S275 in row 6; S355 in row 7")
	assert.Empty(t, s.Members[6].Problems)
}

func TestSheets(t *testing.T) {
	src := sheetOf("Mark | Length | Section\nB1 | 6 | 406x178x54 UKB")
	src.sheets, src.rows = nil, map[string][]*Row{}
	src.sheet("Beams", "Mark | Length | Section\nB1 | 6 | 406x178x54 UKB")
	src.sheet("Columns", "Mark | Length | N_Ed\nC1 | 4 | 900")
	src.sheet("Settings", "Setting | Value\ngrade | S275\nlimit | #0.95\nweather | fine")
	s := readAll(t, src)
	assert.Equal(t, "Columns", s.Sheet)
	assert.Equal(t, []string{"S275"}, s.Settings.Design.Grades)
	assert.Equal(t, 0.95, s.Settings.Design.Limit)
	assert.Contains(t, s.Summary.Notes[0], `Settings!B4: unknown setting "weather"`)
	r := refused(t, src, "weather=fine")
	assert.ErrorContains(t, r, "unknown setting")

	src.sheet("Columns rev A", "Mark | Length | N_Ed\nC1 | 4 | 950")
	r = refused(t, src)
	assert.ErrorContains(t, r, `"Columns" and "Columns rev A"`)
	o := options()
	o.Sheet = "columns REV A"
	got, err := Read(src, o)
	require.NoError(t, err)
	assert.Equal(t, 950e3, got.Members[0].Column.Combinations[0].NEd)
	o.Sheet = "Walls"
	_, err = Read(src, o)
	assert.ErrorContains(t, err, `there is no sheet "Walls"`)
}

func TestEarlierResultsAreNotRead(t *testing.T) {
	s := readAll(t, sheetOf(`
Mark | Length | N_Ed | Result: section | Result: L_cr,y [m] | Result: grade
C1 | 4 | 900 | 203x203x46 UKC | 4 | S355
`))
	assert.Empty(t, s.Members[0].Column.Given)
	assert.Zero(t, s.Members[0].Column.Y.Lcr)
	assert.Equal(t, []int{3, 4, 5}, s.Header.Old)
	assert.Equal(t, 3, s.Header.Width)
	assert.Equal(t, Earlier{Section: "203x203x46 UKC", Grade: "S355"}, s.Members[0].Earlier)
}

func TestMapping(t *testing.T) {
	c := good(t, "Kolonne | Lg. [mm] | Druck [N]\nC1 | 4000 | 900000", "map Lg.=Length", "map Druck=N_Ed")
	assert.Equal(t, 4000.0, c.Length)
	assert.Equal(t, 900e3, c.Combinations[0].NEd)
	r := refused(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 900"), "map Breite=Length")
	assert.ErrorContains(t, r, `no heading reads "Breite"`)
	r = refused(t, sheetOf("Mark | Length | N_Ed\nC1 | 4 | 900"), "map Mark=Colour")
	assert.ErrorContains(t, r, "is not a field")
}

func TestValuesThatNoColumnHas(t *testing.T) {
	for _, c := range []struct{ heading, cell, want string }{
		{"L_cr,y", "3500", "outside 0.3 to 60 m"}, {"L_T (mm)", "3.5", "L_T is 3.5 mm, outside 0.3 to 60 m"}, {"L_fi,z", "0", "outside"},
		{"k_y", "0", "from 0.1 to 20"}, {"k_z", "-1", "from 0.1 to 20"}, {"eta y-y top", "1.5", "from 0 to 1"}, {"Stiffness z-z top", "-5", "below 0"},
		{"Utilisation limit", "95", "from 0.01 to 1.5"}, {"Qty", "0", "whole number from 1"}, {"Qty", "1.5", "whole number"}, {"Qty", "-2", "whole number"}, {"Qty", "1 of 2", `Quantity is "1 of 2"`},
		{"Sides exposed", "5", "from 3 to 4"}, {"Max depth", "0.3", "Greatest depth is 0.3 mm, outside 1 mm to 3 m"}, {"eta_fi", "65", "from 0.01 to 1"}, {"Fire period", "600", "from 1 to 360"},
		{"M_y,Ed top", "5000000", "above 1000 MNm"}, {"Reaction flange A", "300000", "above 200 MN"}, {"Splice", "perhaps", "give yes or no"}, {"z-z held at flange", "maybe", "yes, no, or the distance"},
		{"Ends y-y", "welded", "bottom first"}, {"End y-y top", "welded", "not an end condition"}, {"Group", "@1-Feb", "is a date"}, {"Boxed", "#0.5", "give yes or no"},
	} {
		p := problem(t, "Mark | Length | N_Ed | "+c.heading+"\nC1 | 4 | 900 | "+c.cell)
		assert.Contains(t, p.Error(), c.want, c.heading)
		assert.Equal(t, "Columns!D2", p.Cell)
		assert.Equal(t, c.heading, p.Heading)
	}
	c := good(t, "Mark | Length | N_Ed | Utilisation limit | Qty | End y-y top | Splice | Boxed\nC1 | 4 | 900 | 90% | 1,000 | fixed | no | no")
	assert.InDelta(t, 0.9, c.Choice.Limit, 1e-12)
	assert.Equal(t, 1000, c.Quantity)
	assert.Equal(t, design.Fixed, c.Y.Top.Condition)
	assert.False(t, c.Splice)
}
