package summary

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

// members makes members of one section, each a hundredth further used than the
// one before it.
func members(n int) []Line {
	var lines []Line
	for i := range n {
		u := float64(i+1) / 100
		r := design.Result{Section: "203x203x46 UKC", Utilisation: u}
		if u > 1 {
			r.Status = design.Fails
		}
		r.Y = design.Buckling{LambdaBar: 0.5, Chi: 0.88, NEd: 90, NbRd: 100}
		r.Z = design.Buckling{LambdaBar: 0.9, Chi: 0.6, NEd: 90, NbRd: 80}
		lines = append(lines, Line{Member: &schedule.Member{Column: design.Column{Mark: fmt.Sprint("C", i+1), Quantity: 1}}, Result: r})
	}
	return lines
}

func charts(t *testing.T, lines []Line) (charts, data workbook.Sheet) {
	t.Helper()
	info := &Info{File: "loads.xlsx"}
	return chartSheets(info, lines, takeoff.Of(nil, nil, takeoff.Options{}))
}

// column returns the values below a heading of the data.
func column(t *testing.T, data *workbook.Sheet, heading string) (out []any) {
	t.Helper()
	for c, h := range data.Rows[dataTop-1] {
		if h.Value != heading {
			continue
		}
		for _, row := range data.Rows[dataTop:] {
			if c < len(row) && row[c].Value != nil && row[c].Value != "" {
				out = append(out, row[c].Value)
			}
		}
		return out
	}
	require.Fail(t, "no heading", heading)
	return nil
}

func TestFewMembersAreDrawnOneByOne(t *testing.T) {
	sheet, data := charts(t, members(80))
	require.Len(t, sheet.Charts, 2) // utilisation, buckling
	assert.Equal(t, "members in the order of the schedule", sheet.Rows[0][0].Value)
	assert.Len(t, column(t, &data, "Member"), 80)
	assert.Equal(t, 0.8, column(t, &data, "passes")[79])
	assert.Empty(t, column(t, &data, "does not pass"))
	assert.Equal(t, []int{32}, sheet.Breaks, "one chart a page")
}

func TestManyMembersAreCountedAndTheGreatestDrawn(t *testing.T) {
	sheet, data := charts(t, members(250))
	require.Len(t, sheet.Charts, 3)
	bands, pass, not := column(t, &data, "Utilisation"), column(t, &data, "pass"), column(t, &data, "do not pass")
	assert.Len(t, bands, 31)
	assert.Equal(t, []any{"0.00-0.05", "0.95-1.00", "1.00-1.05", "over 1.50"}, []any{bands[0], bands[19], bands[20], bands[30]})
	assert.Equal(t, []any{5.0, 5.0, 0.0}, pass[18:21], "1.00 belongs to the band that ends there")
	assert.Equal(t, []any{5.0, 100.0}, []any{not[20], not[30]})
	assert.Equal(t, "C250", column(t, &data, "Member")[0])
	assert.Len(t, column(t, &data, "Member"), greatest)
	assert.Equal(t, "of 250 members; bars are cut at 2, the greatest is 2.50", sheet.Rows[chartRows][0].Value)
}

func TestMembersStandOnTheCurvesAtTheBucklingThatIsNearest(t *testing.T) {
	lines := members(3)
	lines[1].Result.HasT = true
	lines[1].Result.T = design.Buckling{LambdaBar: 1.1, Chi: 0.45, NEd: 90, NbRd: 60}
	lines[2].Result.Z.NEd, lines[2].Result.Y.NEd = -5, -5 // tension has no place on them
	_, data := charts(t, lines)
	assert.Equal(t, []any{0.6}, column(t, &data, "z-z"))
	assert.Equal(t, []any{0.45}, column(t, &data, "torsional"))

	// EN 1993-1-1:2005 Figure 6.4 and (6.49): curve b at a slenderness of 1.0,
	// worked by hand: Phi = 0.5 (1 + 0.34 x 0.8 + 1) = 1.136, chi = 1/(1.136 + 0.5390) = 0.597.
	assert.InDelta(t, 0.597, column(t, &data, "curve b")[20], 0.0005)
	assert.Equal(t, 1.0, column(t, &data, "curve d")[4], "(6.49) gives 1 up to 0.2")
}

func TestPointsAtOnePlaceAreDrawnOnce(t *testing.T) {
	assert.Equal(t, []point{{0.5, 0.9}, {1, 0.6}}, once([]point{{1, 0.6}, {0.5, 0.9}, {1.001, 0.6001}, {0.5, 0.9}}))
}

func TestTheHeaviestSizesAreDrawn(t *testing.T) {
	var rows [][]workbook.Cell
	sum := 0.0
	for i := range 40 {
		x := float64((i * 7) % 40)
		sum += x
		rows = append(rows, bar(fmt.Sprint(i), x))
	}
	got := heaviest(rows)
	require.Len(t, got, maxBars)
	assert.Equal(t, "11 others", got[maxBars-1][0].Value)
	left := 0.0
	for _, row := range got {
		left += row[1].Value.(float64)
	}
	assert.Equal(t, sum, left)
	assert.Equal(t, "2", got[0][0].Value, "in their order; 0 and 1 are among the lightest")
	assert.Len(t, heaviest(rows[:30]), 30)
}

func TestNothingToDraw(t *testing.T) {
	sheet, _ := charts(t, nil)
	assert.Empty(t, sheet.Charts)
	assert.Contains(t, sheet.Rows[0][0].Value, "nothing to draw")
}
