package takeoff

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math/big"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"
	"pgregory.net/rapid"

	"stanchion/design"
	"stanchion/schedule/internal/golden"
	"stanchion/schedule/workbook"
)

// small is a schedule with splices, quantities, a member that fails, one that
// is left out, and steel without a rate.
func small(t testing.TB) *TakeOff {
	items := []Item{
		item(t, "A1-1", "A1", "L0", "L1", 1, 6200, "254x254x89 UKC"),
		item(t, "A1-2", "A1", "L1", "L2", 1, 4000, "254x254x89 UKC"),
		item(t, "A1-3", "A1", "L2", "Roof", 1, 3600.5, "203x203x46 UKC"),
		item(t, "P1", "Canopy", "L0", "L1", 4, 4800, "CHS 139.7x6.3 CF"),
	}
	for i := range items[:3] {
		items[i].SpliceSaid = true
	}
	items[1].Splice, items[2].Failing, items[3].Remark = true, true, "the grade is open (S275, S355): S355 is counted"
	return Of(items, []LeftOut{{"B1 L0 to L1", "Columns!A9", "it has no section"}}, Options{
		Rates:       design.Rates{CostPerTonne: map[string]float64{"UKC": 1500}, CarbonPerKg: map[string]float64{"": 1.75}},
		Connections: 0.06, Waste: 0.025, Transport: 10_000,
	})
}

func TestCSV(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, small(t).WriteCSV(&b, '.'))
	golden.Equal(t, "small.csv", strings.ReplaceAll(b.String(), "\r\n", "\n"))
	first, _, _ := strings.Cut(b.String(), "\n")
	assert.True(t, IsCSV(first))
	assert.False(t, IsCSV("Mark,Length"))
	b.Reset()
	require.NoError(t, small(t).WriteCSV(&b, ','))
	assert.Contains(t, b.String(), "section;UKC;203x203x46 UKC;S355;;;;1;1;3,6005;46,1;165,983;")
}

// The tables of the CSV add up to its total to the last digit.
func TestCSVAddsUp(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		var b bytes.Buffer
		require.NoError(rt, Of(drawItems(rt), nil, Options{Rates: ratesForTest}).WriteCSV(&b, '.'))
		rows, err := csv.NewReader(&b).ReadAll()
		require.NoError(rt, err)
		sums := map[string]*big.Rat{}
		for _, row := range rows[1:] {
			for col, name := range csvHeader {
				switch name {
				case "length_m", "mass_kg", "painted_m2", "cost", "carbon_kg":
				default:
					continue
				}
				key := row[0] + " " + name
				if sums[key] == nil {
					sums[key] = new(big.Rat)
				}
				if x, ok := new(big.Rat).SetString(row[col]); ok {
					sums[key].Add(sums[key], x)
				}
			}
		}
		for _, name := range []string{"length_m", "mass_kg", "painted_m2", "cost", "carbon_kg"} {
			for _, table := range []string{"section", "level", "family", "cut"} {
				assert.Zero(rt, sums["total "+name].Cmp(sums[table+" "+name]), "%s of table %s", name, table)
			}
		}
	})
}

func TestSheets(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, workbook.WriteNew(&b, small(t).Sheets("depot-sized.xlsx")))
	f, err := excelize.OpenReader(&b)
	require.NoError(t, err)
	defer f.Close()
	var lines []string
	for _, sheet := range f.GetSheetList() {
		rows, err := f.GetRows(sheet)
		require.NoError(t, err)
		for r, row := range rows {
			for c, text := range row {
				if text != "" {
					cell, _ := excelize.CoordinatesToCellName(c+1, r+1)
					lines = append(lines, fmt.Sprintf("%s!%s = %s", sheet, cell, text))
				}
			}
		}
	}
	golden.Equal(t, "small.txt", strings.Join(lines, "\n")+"\n")
}

// Another program reads the same numbers, to the last gram.
func TestSheetsInAnotherProgram(t *testing.T) {
	office, err := exec.LookPath("soffice")
	if err != nil || testing.Short() {
		t.Skip("LibreOffice (soffice) is not installed, or the tests are to be short")
	}
	dir := t.TempDir()
	in := filepath.Join(dir, "steel.xlsx")
	f, err := os.Create(in)
	require.NoError(t, err)
	require.NoError(t, workbook.WriteNew(f, small(t).Sheets("depot-sized.xlsx")))
	require.NoError(t, f.Close())
	text, err := exec.Command(office, "-env:UserInstallation=file://"+filepath.ToSlash(filepath.Join(dir, "profile")),
		"--headless", "--convert-to", "csv", "--outdir", dir, in).CombinedOutput()
	require.NoError(t, err, string(text))
	got, err := os.ReadFile(filepath.Join(dir, "steel.csv"))
	require.NoError(t, err)
	for _, line := range []string{
		"net,,,6,7,33.0005,,1.470203,28.041741,1609.1445,2.57285525",
		"UKC,254x254x89 UKC,S355,1,2,10.2,88.9,0.90678,15.334644,1360.17,1.586865",
		"CHS CF,CHS 139.7x6.3 CF,S355,4,4,19.2,20.7,0.39744,8.426504,no rate,0.69552",
		"all,,,6,7,33.0005,,1.470203,28.041741,1609.1445,2.57285525",
	} {
		assert.Contains(t, string(got), line)
	}
}

func TestEmptySheets(t *testing.T) {
	var b bytes.Buffer
	require.NoError(t, workbook.WriteNew(&b, Of(nil, nil, Options{}).Sheets("x.csv")))
}

func TestDecimals(t *testing.T) {
	for _, c := range []struct {
		n             int64
		places, least int
		want          string
	}{
		{0, 3, 3, "0.000"}, {5, 6, 3, "0.000005"}, {5_000_000, 6, 3, "5.000"}, {1234, 0, 0, "1234"}, {-1500, 3, 0, "-1.5"}, {1000, 3, 0, "1"},
	} {
		assert.Equal(t, c.want, decimals(c.n, c.places, c.least, '.'))
	}
	rapid.Check(t, func(rt *rapid.T) {
		n := rapid.Int64Range(-1e15, 1e15).Draw(rt, "n")
		places := rapid.IntRange(0, 6).Draw(rt, "places")
		x, ok := new(big.Rat).SetString(decimals(n, places, rapid.IntRange(0, places).Draw(rt, "least"), '.'))
		require.True(rt, ok)
		scale := new(big.Int).Exp(big.NewInt(10), big.NewInt(int64(places)), nil)
		assert.Zero(rt, x.Cmp(new(big.Rat).SetFrac(big.NewInt(n), scale)))
	})
}

func TestPercent(t *testing.T) {
	for part, want := range map[float64]string{0.06: "6 %", 0.025: "2.5 %", 0.5: "50 %", 0.0625: "6.25 %"} {
		assert.Equal(t, want, Percent(part))
	}
}

func TestShortList(t *testing.T) {
	assert.Equal(t, "A; B", shortList([]string{"A", "B"}))
	marks := make([]string, 1000)
	for i := range marks {
		marks[i] = fmt.Sprint("C", i)
	}
	s := shortList(marks)
	assert.Less(t, len(s), 1300)
	assert.Contains(t, s, "C0; C1; ")
	assert.Regexp(t, `C\d+ and \d+ more$`, s)
	long := strings.Repeat("x", 2000)
	assert.Equal(t, long, shortList([]string{long}))
}
