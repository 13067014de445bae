package ec3

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// The values are from memory of the annexes: this holds the table against
// slips, not against the annexes.
func TestNationalSets(t *testing.T) {
	uk, err := NationalSet(" uk ")
	require.NoError(t, err)
	assert.Equal(t, "UK", NationalSets()[0].Name, "the default stands first")
	assert.Equal(t, design.ProductStandard, uk.Strength)
	assert.True(t, uk.KcFromC1)
	for name, want := range map[string][2]float64{"UK": {1, 1}, "EN": {1, 1}, "DE": {1, 1.1}, "IE": {1, 1},
		"IT": {1.05, 1.05}, "ES": {1.05, 1.05}, "NO": {1.05, 1.05}, "DK": {1.1, 1.2}} {
		n, err := NationalSet(name)
		require.NoError(t, err)
		assert.Equal(t, want, [2]float64{n.GammaM0, n.GammaM1}, name)
		if name != "UK" {
			assert.Equal(t, design.Table31, n.Strength, name)
			assert.Equal(t, design.LTBCurvesEN, n.LTB, name)
			assert.False(t, n.KcFromC1, name)
		}
	}
	_, err = NationalSet("XX")
	assert.ErrorContains(t, err, "UK, EN, DE, IE, IT, ES, NO, DK")
}

func TestEveryNationalValueHasASource(t *testing.T) {
	for _, n := range NationalSets() {
		values := NationalValues(&n)
		assert.Len(t, values, len(NationalParameters()))
		for _, v := range values {
			assert.NotEmpty(t, v.Source, "%s %s", n.Name, v.Name)
			assert.NotEmpty(t, v.Value, "%s %s", n.Name, v.Name)
			assert.Contains(t, v.Source, "from memory")
		}
	}
}

func TestSetNationalLeavesTheBuiltInSetAlone(t *testing.T) {
	n := NationalSets()[0]
	require.NoError(t, SetNational(&n, "Gamma M1", "1,10", "given"))
	require.NoError(t, SetNational(&n, "strength", "Table31", "given"))
	require.NoError(t, SetNational(&n, "kc", "table 6.6", "given"))
	require.NoError(t, SetNational(&n, "LTB curves", "table 6.5", "given"))
	assert.Equal(t, 1.1, n.GammaM1)
	assert.Equal(t, design.Table31, n.Strength)
	assert.Equal(t, design.LTBCurvesEN, n.LTB)
	assert.False(t, n.KcFromC1)
	assert.Equal(t, NationalValue{"gamma_M1", "1.10", "6.1(1)", "partial factor, resistance of members to buckling", "given"}, NationalValues(&n)[1])
	assert.NotContains(t, NationalSets()[0].Sources["gamma_M1"], "given")

	for name, value := range map[string]string{"gamma_M0": "0", "gamma_M1": "one", "strength": "guess", "gamma_M,fi": "NaN"} {
		assert.Error(t, SetNational(&n, name, value, "given"), name)
	}
	assert.ErrorContains(t, SetNational(&n, "gamma_M9", "1", "given"), "gamma_M0")
}

// FuzzSetNational: whatever is typed, the set stays usable.
func FuzzSetNational(f *testing.F) {
	f.Add("gamma_M0", "1.05")
	f.Add("k_c", "from C1")
	f.Add("strength", "product")
	f.Fuzz(func(t *testing.T, name, value string) {
		n := NationalSets()[0]
		_ = SetNational(&n, name, value, "given")
		for _, g := range []float64{n.GammaM0, n.GammaM1, n.GammaMfi} {
			assert.True(t, g >= 0.5 && g <= 3)
		}
		assert.Len(t, NationalValues(&n), len(NationalParameters()))
	})
}
