package tradeoff

import (
	"bytes"
	"encoding/xml"
	"image"
	"image/png"
	"io"
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/schedule/workbook"
)

// curve is a trade-off: one size cannot serve, three are found without proof.
func curve() ([]building.Trade, *building.Trade) {
	return []building.Trade{
		{Most: 1, Total: math.Inf(1), Bound: math.Inf(1), Proven: true},
		{Most: 2, Sizes: []string{"A", "B"}, Total: 12000, Bound: 12000, Proven: true},
		{Most: 3, Sizes: []string{"A", "B", "C"}, Total: 10100, Bound: 10000},
		{Most: 4, Sizes: []string{"A", "B", "C", "D"}, Total: 10050, Bound: 10050, Proven: true},
	}, &building.Trade{Most: 5, Sizes: []string{"A", "B", "C", "D", "E"}, Total: 10000, Bound: 10000, Proven: true}
}

func table(by design.Objective) *Table {
	lines, any := curve()
	return Of("depot.csv", lines, any, by)
}

func TestTableSaysWhatSizesSave(t *testing.T) {
	y := table(design.ByMass)
	require.Len(t, y.Served(), 3)
	l := y.Served()[1]
	assert.InDelta(t, 10.1, l.Amount, 1e-9, "kg are shown in t")
	assert.InDelta(t, 0.01, l.Above, 1e-9)
	assert.InDelta(t, 1.9, l.Saves, 1e-9)
	assert.Zero(t, y.Served()[0].Saves)
	assert.Equal(t, "gap 0.99 %", l.Proof())
	assert.Equal(t, []string{
		"1 size cannot serve every column.", "From 3 sizes on, one more saves less than 1 %.", "With any number of sizes 5 are used.",
		"Where a gap stands, the search was given up before the least was proven: it lies no further below than the gap.",
	}, y.Remarks())
	assert.InDelta(t, 12000, table(design.ByCost).Served()[0].Amount, 0, "money as it is")
	y.NewOnly, y.Splices = true, true
	assert.Equal(t, "new steel and splices, t", y.Quantity())
	assert.Equal(t, "CO2e [t]", headingOf(table(design.ByCarbon).Quantity()))
}

func TestCSV(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, table(design.ByMass).WriteCSV(&b, ','))
	lines := strings.Split(b.String(), "\r\n")
	assert.True(t, IsCSV(lines[0]), lines[0])
	assert.False(t, IsCSV("Mark,Length,N_Ed"))
	assert.Equal(t, "1;;;;true;;", lines[1])
	assert.Equal(t, `3;10,100000;0,010000;1,900000;false;0,009901;"A; B; C"`, lines[3])
	assert.Equal(t, `any;10,000000;0,000000;;true;0,000000;"A; B; C; D; E"`, lines[5])
}

// The chart's ranges are the cells in which the numbers stand.
func TestSheetHasAChartOfItsNumbers(t *testing.T) {
	var b bytes.Buffer
	page := table(design.ByMass).Page(Sheet)
	require.NoError(t, workbook.WriteNew(&b, []workbook.Sheet{page}))
	f, err := excelize.OpenReader(bytes.NewReader(b.Bytes()))
	require.NoError(t, err)
	defer f.Close()
	require.Len(t, page.Charts, 1)
	for column, want := range map[string][]string{colMost: {"2", "3", "4"}, colAmount: {"12", "10.1", "10.05"}, colAny: {"10", "10", "10"}} {
		var cells []string
		for _, s := range page.Charts[0].Chart.Series {
			for _, ref := range []string{s.Categories, s.Values} {
				if !strings.HasPrefix(ref, "'Few sizes'!$"+column+"$") || len(cells) > 0 {
					continue
				}
				from, to, _ := strings.Cut(strings.ReplaceAll(strings.TrimPrefix(ref, "'Few sizes'!"), "$", ""), ":")
				_, first, err := excelize.CellNameToCoordinates(from)
				require.NoError(t, err)
				_, last, err := excelize.CellNameToCoordinates(to)
				require.NoError(t, err)
				for r := first; r <= last; r++ {
					name, err := excelize.CoordinatesToCellName(map[string]int{"A": 1, "B": 2, "C": 3}[column], r)
					require.NoError(t, err)
					v, err := f.GetCellValue(Sheet, name, excelize.Options{RawCellValue: true})
					require.NoError(t, err)
					cells = append(cells, v)
				}
			}
		}
		assert.Equal(t, want, cells, column)
	}
}

func TestChartBeginsBelowWhatItShows(t *testing.T) {
	assert.InDelta(t, 9, *table(design.ByMass).floor(), 1e-9) // 10 to 12 t
	lines, any := curve()
	lines[1].Total = 10000
	assert.Nil(t, Of("x", lines, any, design.ByMass).floor(), "nothing is saved")
}

func TestPictures(t *testing.T) {
	for format, begins := range map[string]string{"svg": "<?xml", "png": "\x89PNG"} {
		var a, b bytes.Buffer
		require.NoError(t, table(design.ByMass).WritePicture(&a, format))
		require.NoError(t, table(design.ByMass).WritePicture(&b, format))
		assert.True(t, strings.HasPrefix(a.String(), begins), format)
		assert.Equal(t, a.Bytes(), b.Bytes(), "the same table gives the same bytes")
		assert.True(t, IsPicture(a.Bytes()), "it is known again")
		if format == "png" {
			_, err := png.Decode(&a)
			require.NoError(t, err)
			continue
		}
		d := xml.NewDecoder(&a)
		for err := error(nil); err != io.EOF; _, err = d.Token() {
			require.NoError(t, err)
		}
	}
	var other bytes.Buffer
	require.NoError(t, png.Encode(&other, image.NewGray(image.Rect(0, 0, 2, 2))))
	for _, begins := range []string{"", "<?xml", other.String(), svgMark} {
		assert.False(t, IsPicture([]byte(begins)))
	}
	assert.Error(t, Of("x", nil, nil, design.ByMass).WritePicture(&bytes.Buffer{}, "svg"))
}
