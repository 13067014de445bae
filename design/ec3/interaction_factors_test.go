package ec3

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
)

// publishedInteraction reads the rows of testdata/combined_axial_bending.csv.
func publishedInteraction(t *testing.T) map[string]func(column string) float64 {
	t.Helper()
	f, err := os.Open("testdata/combined_axial_bending.csv")
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	rows := map[string]func(string) float64{}
	for _, line := range lines[1:] {
		rows[line[0]] = func(column string) float64 {
			for i, name := range lines[0] {
				if name == column {
					v, err := strconv.ParseFloat(line[i], 64)
					require.NoError(t, err, column)
					return v
				}
			}
			t.Fatalf("no column %s", column)
			return 0
		}
	}
	return rows
}

// The portal column of Steel Buildings in Europe, Single-Storey Part 4, p.
// 4-102 (read): k_zy by Table B.2 and (6.62) from its printed resistances.
func TestPublishedAnnexB(t *testing.T) {
	v := publishedInteraction(t)["CB-01"]
	c := &Candidate{Section: &catalogue.Section{Shape: catalogue.ShapeI}, GammaM1: 1}
	x := &Interaction{Class: 1, LambdaZ: v("lambda_bar_z"), RatioZ: v("N_Ed_kN") / v("N_b_z_Rd_kN"), PsiLT: 0}
	c.annexB(x)
	room := v("tolerance_pct") / 100
	assert.InEpsilon(t, v("C_mLT"), x.CmLT, room)
	assert.InEpsilon(t, v("k_zy"), x.Kzy, room)
	x.My662, x.ChiLT, x.MyRk, x.MzRk = v("M_y_Ed_kNm"), 1, v("M_b_Rd_kNm"), 1
	x.terms(1)
	assert.InEpsilon(t, v("util_6_62"), x.U662, room)
}

// The pair of angles in a truss of Steel Buildings in Europe, Single-Storey
// Part 5, p. 5-41 (read): the elastic column of Table A.1. Its C_mz is that of
// a uniform load, put in as printed, and the reduced area goes with chi, in mu
// as in the resistances.
func TestPublishedAnnexA(t *testing.T) {
	v := publishedInteraction(t)["CB-03"]
	c := &Candidate{Section: &catalogue.Section{Shape: catalogue.ShapeRHS,
		Properties: catalogue.Properties{WplY: 1, WelY: 1, WplZ: 1, WelZ: 1, It: 1, Iy: 1}}, GammaM1: 1}
	x := &Interaction{Class: 3, NY: v("N_Ed_kN"), NZ: v("N_Ed_kN"), NcrY: v("N_cr_y_kN"), NcrZ: v("N_cr_z_kN"), NcrT: math.Inf(1),
		ChiY: v("chi_y") * v("area_ratio"), ChiZ: v("chi_z") * v("area_ratio"), NRk: v("A_cm2") * v("fy_N_mm2") / 10, PsiY: 1, PsiZ: 1, ChiLT: 1}
	c.annexA(x, &Lateral{C1: 1})
	room := v("tolerance_pct") / 100
	assert.InEpsilon(t, v("mu_y"), x.AnnexA.MuY, room)
	assert.InEpsilon(t, v("mu_z"), x.AnnexA.MuZ, room)
	x.Kyz *= v("C_mz") / x.CmZ
	x.Kzz *= v("C_mz") / x.CmZ
	assert.InEpsilon(t, v("k_yz"), x.Kyz, room)
	assert.InEpsilon(t, v("k_zz"), x.Kzz, room)
	x.RatioY, x.RatioZ = x.NY/(x.ChiY*x.NRk), x.NZ/(x.ChiZ*x.NRk)
	x.Mz, x.MzRk, x.MyRk = v("M_z_Ed_kNm"), v("M_z_Rd_kNm"), 1
	x.terms(1)
	assert.InEpsilon(t, v("util_6_61"), x.U661, room)
	assert.InEpsilon(t, v("util_6_62"), x.U662, room)
}

// Tables B.1 and B.2 worked by hand: lambdaBar_y 0.6, lambdaBar_z 0.9 (and
// values at the limits), n_y 0.3, n_z 0.4, C_my 0.6, C_mz 0.4, C_mLT 0.6.
func TestAnnexBByHand(t *testing.T) {
	at := func(shape catalogue.Shape, class int, ly, lz float64) *Interaction {
		x := &Interaction{Class: class, LambdaY: ly, LambdaZ: lz, RatioY: 0.3, RatioZ: 0.4, PsiY: 0, PsiZ: -1, PsiLT: 0}
		(&Candidate{Section: &catalogue.Section{Shape: shape}}).annexB(x)
		return x
	}
	for _, tc := range []struct {
		name               string
		x                  *Interaction
		kyy, kyz, kzy, kzz float64
	}{
		{"I, class 1", at(catalogue.ShapeI, 1, 0.6, 0.9), 0.6 * 1.12, 0.6 * 0.4 * 1.48, 1 - 0.09*0.4/0.35, 0.4 * 1.48},
		{"I, class 2, beyond lambdaBar 1", at(catalogue.ShapeI, 2, 1.2, 1.5), 0.6 * 1.24, 0.6 * 0.4 * 1.56, 1 - 0.1*0.4/0.35, 0.4 * 1.56},
		{"I, lambdaBar_z below 0.4", at(catalogue.ShapeI, 1, 0.6, 0.3), 0.6 * 1.12, 0.6 * 0.4, 0.9, 0.4},
		{"I, just below 0.4", at(catalogue.ShapeI, 1, 0.6, 0.399), 0.6 * 1.12, 0.6 * 0.4 * 1.0792, 1 - 0.0399*0.4/0.35, 0.4 * 1.0792},
		{"I, class 3", at(catalogue.ShapeI, 3, 0.6, 0.9), 0.6 * 1.108, 0.4 * 1.216, 1 - 0.045*0.4/0.35, 0.4 * 1.216},
		{"I, class 4, beyond 1", at(catalogue.ShapeI, 4, 2, 2), 0.6 * 1.18, 0.4 * 1.24, 1 - 0.05*0.4/0.35, 0.4 * 1.24},
		{"RHS, class 1", at(catalogue.ShapeRHS, 1, 0.6, 0.9), 0.6 * 1.12, 0.6 * 0.4 * 1.28, 0.36 * 1.12, 0.4 * 1.28},
		{"RHS, beyond 1", at(catalogue.ShapeRHS, 2, 1.2, 1.5), 0.6 * 1.24, 0.6 * 0.4 * 1.32, 0.36 * 1.24, 0.4 * 1.32},
		{"CHS, class 3", at(catalogue.ShapeCHS, 3, 0.6, 0.9), 0.6 * 1.108, 0.4 * 1.216, 0.48 * 1.108, 0.4 * 1.216},
	} {
		assert.InDelta(t, tc.kyy, tc.x.Kyy, 1e-12, "%s: k_yy", tc.name)
		assert.InDelta(t, tc.kyz, tc.x.Kyz, 1e-12, "%s: k_yz", tc.name)
		assert.InDelta(t, tc.kzy, tc.x.Kzy, 1e-12, "%s: k_zy", tc.name)
		assert.InDelta(t, tc.kzz, tc.x.Kzz, 1e-12, "%s: k_zz", tc.name)
	}
}

// C_m of Table B.3: linear diagrams, and 0.9 about an axis that sways.
func TestUniformMomentFactors(t *testing.T) {
	assert.Equal(t, 1.0, cmLinear(1))
	assert.Equal(t, 0.6, cmLinear(0))
	assert.InDelta(t, 0.4, cmLinear(-0.5), 1e-12)
	assert.Equal(t, 0.4, cmLinear(-1))
	x := &Interaction{Class: 1, PsiY: 1, PsiZ: -1, PsiLT: -1, SwayY: true, SwayZ: true}
	(&Candidate{Section: &catalogue.Section{}}).annexB(x)
	assert.Equal(t, []float64{0.9, 0.9, 0.4}, []float64{x.CmY, x.CmZ, x.CmLT})
}
