package ec3_test

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// Published columns again, this time from nothing but the section's name, the
// grade and the buckling length: catalogue, strength, class, curve and all.
// The row's tolerance stands, widened by the 0.5 % to which the catalogue's
// computed properties agree with printed ones.
func TestPublishedColumnsFromTheirNames(t *testing.T) {
	rows := append(published(t, "flexural_open_sections.csv"), published(t, "flexural_hollow_sections.csv")...)
	checked, gross := 0, 0
	for _, r := range rows {
		name, _ := strings.CutSuffix(r["section"], " hot-finished")
		s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
		lcr, ok := r.number(t, "L_cr_mm")
		if err != nil || !ok {
			continue // a tee, a pair of angles
		}
		set := nationalFor(t, s, r)
		c := candidate(t, s, r["grade"], set)
		require.Equal(t, r.must(t, "fy_N_mm2"), c.Fy, r)
		col := loaded(lcr, 1)
		a := assess(t, col, c, set)
		b := a.Y
		if r["axis"] == "z" {
			b = a.Z
		}
		assert.Equal(t, r["curve"], b.Curve, r)
		if _, reduced := r.number(t, "A_eff_cm2"); !reduced && c.Class == 4 {
			// The publication classifies these rafters and portal columns under
			// their moments too, and so has the gross area.
			b = ec3.Reduce(c.NplRk(), b.Ncr, c.GammaM1, curveNamed(t, b.Curve))
			gross++
		}
		for column, got := range map[string]float64{"N_cr_kN": b.Ncr / 1000, "lambda_bar": b.LambdaBar,
			"chi": b.Chi, "N_b_Rd_kN": b.NbRd / 1000, "A_eff_cm2": c.AEff / 100} {
			if want, ok := r.number(t, column); ok {
				assert.InEpsilon(t, want, got, r.must(t, "tolerance_pct")/100+0.005, "%s: %s", r, column)
			}
		}
		checked++
	}
	assert.Equal(t, 12, checked)
	assert.Equal(t, 3, gross)
}

// nationalFor returns the settings whose source of strength the publication
// used.
func nationalFor(t *testing.T, s *catalogue.Section, r row) *design.Settings {
	for _, n := range ec3.NationalSets()[:2] {
		fy, err := grade(t, r["grade"]).Fy(n.Strength, s)
		if err == nil && fy == r.must(t, "fy_N_mm2") {
			set := settings()
			set.National = n
			return set
		}
	}
	t.Fatalf("%s: no source gives the strength", r)
	return nil
}

// Every section of the catalogue in every grade and set is a candidate with
// values that are numbers, or is refused with a clause and a reason.
func TestEverySectionIsACandidateOrRefused(t *testing.T) {
	reasons := map[string]int{}
	candidates := 0
	for _, national := range ec3.NationalSets()[:3] {
		set := settings()
		set.National = national
		for _, name := range []string{"S235", "S275", "S355", "S420", "S450", "S460", "S355M", "S460N"} {
			g := grade(t, name)
			for _, s := range catalogue.Default().Sections() {
				c, err := ec3.NewCandidate(s, g, set)
				if err != nil {
					var refusal *ec3.Refusal
					require.ErrorAs(t, err, &refusal)
					require.NotEmpty(t, refusal.Clause)
					require.NotEmpty(t, refusal.Reason)
					reasons[refusal.Clause]++
					continue
				}
				candidates++
				require.True(t, c.NcRd > 0 && c.NcRd <= c.NplRd, s.Name())
				require.True(t, c.I0Sq > 0 && c.EulerY >= c.EulerZ, s.Name())
				require.True(t, c.Class >= 1 && c.Class <= 4, s.Name())
				if c.Torsion != ec3.TorsionNone {
					require.Greater(t, c.NcrT(3000), 0.0, s.Name())
				}
			}
		}
	}
	assert.Greater(t, candidates, 20_000)
	for _, clause := range []string{"3.2.1", "6.3.1.1(2)", "Table 5.2", "Table 6.2"} {
		assert.Positive(t, reasons[clause], clause)
	}
}

// Equal angles have one axis of symmetry, unequal ones none.
func TestTorsionRulesOfTheCatalogue(t *testing.T) {
	for name, want := range map[string]ec3.TorsionRule{
		"203x203x60 UKC": ec3.TorsionDoublySymmetric, "UKPFC 200x90x30": ec3.TorsionSymmetricY,
		"L 100x100x12": ec3.TorsionSymmetricY, "L 100x75x12": ec3.TorsionGeneral,
		"SHS 100x100x5.0": ec3.TorsionNone, "CHS 168.3x8.0": ec3.TorsionNone,
	} {
		s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
		require.NoError(t, err, name)
		assert.Equal(t, want, candidate(t, s, "S275", settings()).Torsion, name)
	}
}
