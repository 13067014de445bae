package ec3_test

import (
	"encoding/csv"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
)

// row is one line of a table of published values; each names its source and
// its tolerance.
type row map[string]string

// published reads a table of testdata.
func published(t *testing.T, name string) []row {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	var rows []row
	for _, line := range lines[1:] {
		r := row{}
		for i, column := range lines[0] {
			r[column] = line[i]
		}
		rows = append(rows, r)
	}
	require.NotEmpty(t, rows)
	return rows
}

func (r row) String() string { return r["id"] + " (" + r["source"] + ", " + r["provenance"] + ")" }

// number returns a value, and false where the publication prints none.
func (r row) number(t *testing.T, column string) (float64, bool) {
	t.Helper()
	if r[column] == "" {
		return 0, false
	}
	v, err := strconv.ParseFloat(r[column], 64)
	require.NoError(t, err, "%s %s", r, column)
	return v, true
}

func (r row) must(t *testing.T, column string) float64 {
	t.Helper()
	v, ok := r.number(t, column)
	require.True(t, ok, "%s has no %s", r, column)
	return v
}

// near compares a value with the printed one, if there is one, within the
// row's tolerance, which is the least of 0.5, 1 and 1.5 % that covers the
// rounding inside the publication (half a unit in the last place of tables).
func (r row) near(t *testing.T, column string, got float64) {
	t.Helper()
	if want, ok := r.number(t, column); ok {
		assert.InEpsilon(t, want, got, r.must(t, "tolerance_pct")/100, "%s: %s", r, column)
	}
}

func curveNamed(t *testing.T, name string) ec3.Curve {
	t.Helper()
	for c := ec3.CurveA0; c <= ec3.CurveD; c++ {
		if c.String() == name {
			return c
		}
	}
	t.Fatalf("no curve %q", name)
	return 0
}

func TestFlexuralBucklingOfPublishedColumns(t *testing.T) {
	rows := append(published(t, "flexural_open_sections.csv"), published(t, "flexural_hollow_sections.csv")...)
	for _, r := range rows {
		area := r.must(t, "A_cm2") * 100
		if eff, ok := r.number(t, "A_eff_cm2"); ok {
			area = eff * 100
		}
		ncr, _ := r.number(t, "N_cr_kN")
		ncr *= 1000
		if lcr, ok := r.number(t, "L_cr_mm"); ok {
			ncr = pi2E * r.must(t, "I_cm4") * 1e4 / (lcr * lcr)
		}
		b := ec3.Reduce(area*r.must(t, "fy_N_mm2"), ncr, r.must(t, "gamma_M1"), curveNamed(t, r["curve"]))
		r.near(t, "N_cr_kN", b.Ncr/1000)
		r.near(t, "lambda_bar", b.LambdaBar)
		r.near(t, "chi", b.Chi)
		r.near(t, "N_b_Rd_kN", b.NbRd/1000)
	}
}

const pi2E = 9.869604401089358 * design.E

func TestReductionFactorsOfPublishedTable(t *testing.T) {
	for _, r := range published(t, "chi_table.csv") {
		r.near(t, "chi", ec3.Chi(curveNamed(t, r["curve"]).Alpha(), r.must(t, "lambda_bar")))
	}
}

func TestEffectiveAreaOfPublishedSections(t *testing.T) {
	for _, r := range published(t, "class4_effective_area.csv") {
		require.Equal(t, "internal", r["element"])
		eps := ec3.Eps(r.must(t, "fy_N_mm2"))
		c, thick := r.must(t, "c_mm"), r.must(t, "t_mm")
		lambdaP := ec3.LambdaP(c/thick, eps, r.must(t, "k_sigma"))
		rho := ec3.RhoInternal(lambdaP, 1)
		r.near(t, "lambda_p", lambdaP)
		r.near(t, "rho", rho)
		r.near(t, "A_eff_cm2", r.must(t, "A_cm2")-r.must(t, "n_elements")*(1-rho)*c*thick/100)
	}
}
