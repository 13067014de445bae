package material

import (
	"encoding/csv"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
)

func wall(t float64, f catalogue.Finish) *catalogue.Section {
	return &catalogue.Section{Tf: t, Finish: f}
}

// testdata/yield_strength.csv names the publication of each row. A band is
// checked just above its lower and at its upper thickness.
func TestStrengthOfPublishedBands(t *testing.T) {
	f, err := os.Open("testdata/yield_strength.csv")
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	require.Greater(t, len(lines), 10)
	for _, line := range lines[1:] {
		id, source, standard, grade := line[0], line[1], line[3], line[4]
		number := func(i int) float64 {
			v, err := strconv.ParseFloat(line[i], 64)
			require.NoError(t, err, id)
			return v
		}
		over, upTo, want := number(5), number(6), number(7)
		from := design.ProductStandard
		if source == "EN 1993-1-1:2005 Table 3.1" {
			from = design.Table31
		}
		finish := map[string]catalogue.Finish{"EN 10210-1": catalogue.HotFinished, "EN 10219-1": catalogue.ColdFormed}[standard]
		g, err := Parse(grade)
		require.NoError(t, err, id)
		for _, thickness := range []float64{over + 0.1, upTo} {
			got, err := g.Fy(from, wall(thickness, finish))
			require.NoError(t, err, "%s %s", id, source)
			assert.Equal(t, want, got, "%s (%s): %s, t = %g", id, source, grade, thickness)
		}
	}
}

// Values from memory of the standards named; they hold the choice of table,
// not an outside source.
func TestStrengthFollowsTheFamilyBehindTheSuffix(t *testing.T) {
	const open, hot, cold = catalogue.FinishNone, catalogue.HotFinished, catalogue.ColdFormed
	for _, c := range []struct {
		grade  string
		finish catalogue.Finish
		t      float64
		from   design.StrengthSource
		want   float64
	}{
		{"S355", open, 16, design.ProductStandard, 355},
		{"S355JR", open, 16.1, design.ProductStandard, 345},
		{"s355 j2", open, 150, design.ProductStandard, 295},
		{"S355K2+N", open, 150, design.ProductStandard, 295}, // +N is a delivery condition of EN 10025-2
		{"S355N", open, 100, design.ProductStandard, 315},
		{"S355ML", open, 100, design.ProductStandard, 325},
		{"S450J0", open, 63, design.ProductStandard, 410},
		{"S420", open, 63, design.ProductStandard, 390},
		{"S460", open, 30, design.ProductStandard, 440},
		{"S460M", open, 120, design.ProductStandard, 385},
		{"S355J2H", hot, 120, design.ProductStandard, 295},
		{"S355", hot, 12.5, design.ProductStandard, 355},
		{"S275JOH", hot, 20, design.ProductStandard, 265}, // the letter O for the figure
		{"S460", hot, 65, design.ProductStandard, 430},
		{"S420NLH", hot, 40, design.ProductStandard, 400},
		{"S355J2H", cold, 16.1, design.ProductStandard, 345},
		{"S460MH", cold, 16, design.ProductStandard, 460},
		{"S460", cold, 40, design.ProductStandard, 440},
		{"S355M", cold, 20, design.ProductStandard, 345},
		{"S235", open, 40.1, design.Table31, 215},
		{"S450", open, 40, design.Table31, 440},
		{"S420N", open, 41, design.Table31, 390},
		{"S355ML", open, 80, design.Table31, 335},
		{"S460NH", hot, 41, design.Table31, 430},
		{"S420MH", cold, 40, design.Table31, 420},
	} {
		g, err := Parse(c.grade)
		require.NoError(t, err, c.grade)
		got, err := g.Fy(c.from, wall(c.t, c.finish))
		require.NoError(t, err, c.grade)
		assert.Equal(t, c.want, got, "%s, t = %g", c.grade, c.t)
	}
}

func TestStrengthIsRefusedOutsideTheTables(t *testing.T) {
	for _, c := range []struct {
		grade  string
		finish catalogue.Finish
		t      float64
		from   design.StrengthSource
		reason string
	}{
		{"S355", catalogue.FinishNone, 150.1, design.ProductStandard, "beyond the last band"},
		{"S355", catalogue.FinishNone, 80.1, design.Table31, "beyond the last band"},
		{"S355NH", catalogue.HotFinished, 65.1, design.ProductStandard, "beyond the last band"},
		{"S235H", catalogue.ColdFormed, 40.1, design.Table31, "beyond the last band"},
		{"S355M", catalogue.HotFinished, 10, design.ProductStandard, "no M grade"},
		{"S460ML", catalogue.HotFinished, 10, design.Table31, "no M grade"},
		{"S450", catalogue.HotFinished, 10, design.ProductStandard, "no yield strength"},
		{"S450", catalogue.ColdFormed, 10, design.Table31, "no yield strength"},
		{"S355J2H", catalogue.FinishNone, 10, design.ProductStandard, "hollow sections"},
	} {
		g, err := Parse(c.grade)
		require.NoError(t, err, c.grade)
		_, err = g.Fy(c.from, wall(c.t, c.finish))
		var scope *ScopeError
		require.ErrorAs(t, err, &scope, "%s t = %g", c.grade, c.t)
		assert.Contains(t, err.Error(), c.reason)
	}
}

func TestParseNamesTheGradesItKnows(t *testing.T) {
	for _, name := range []string{"", "S", "S35", "S356", "355", "S355X", "S235N", "S450M", "S420JR", "S3555", "S355HH", "SABC", "S355+X", "S355é"} {
		_, err := Parse(name)
		var unknown *UnknownGradeError
		require.ErrorAs(t, err, &unknown, name)
		assert.Contains(t, err.Error(), "S355")
	}
	for _, name := range Names() {
		_, err := Parse(name)
		require.NoError(t, err)
	}
}

// A thicker section is never stronger, in any table.
func TestStrengthFallsWithThickness(t *testing.T) {
	for _, b := range []*bands{&en10025p2, &en10025p3, &en10025p4, &en10210, &en10210FineGrain, &en10219,
		&table31NonAlloy, &table31FineGrain, &table31Hot, &table31Cold} {
		for nominal, fy := range b.fy {
			require.Len(t, fy, len(b.upTo), "%s %d", b.standard, nominal)
			for i := 1; i < len(fy); i++ {
				assert.LessOrEqual(t, fy[i], fy[i-1])
				assert.Greater(t, b.upTo[i], b.upTo[i-1])
			}
		}
	}
}

// FuzzParse: whatever is typed for a grade, Parse answers with a grade that
// reads back the same, or an error.
func FuzzParse(f *testing.F) {
	for _, s := range []string{"S355", "s275 jr", "S355J2+N", "S460NLH", "S 420-M", "", "S999", "S355J2H+AR"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, name string) {
		g, err := Parse(name)
		if err != nil {
			return
		}
		again, err := Parse(g.String())
		require.NoError(t, err)
		assert.Equal(t, g, again)
	})
}
