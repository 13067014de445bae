package search

import (
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// settingsOf are those of most tests, S355 in UKC and UKB by a national set.
func settingsOf(t testing.TB, national string) design.Settings {
	t.Helper()
	n, err := ec3.NationalSet(national)
	require.NoError(t, err)
	return design.Settings{National: n, Grades: []string{"S355"}, Families: []string{"UKC", "UKB"}, Limit: 1, Growth: 1}
}

func engineOf(t testing.TB, set design.Settings) *Engine {
	t.Helper()
	e, err := New(catalogue.Default(), set)
	require.NoError(t, err)
	return e
}

// everyFamily is the whole catalogue.
var everyFamily = []string{"UKC", "UKB", "UKBP", "HEA", "HEB", "HEM", "HEAA", "HD", "IPE", "IPEA", "IPEO",
	"UKPFC", "UPE", "CHS", "SHS", "RHS", "L equal", "L unequal"}

// random returns a source of random numbers for a test. rapid's own numbers
// lean towards simple ones; members that are spread evenly find more here.
func random(seed uint64) *rand.Rand { return rand.New(rand.NewPCG(seed, 1993)) }

// drawn is random from a seed that rapid draws.
func drawn(t *rapid.T) *rand.Rand { return random(rapid.Uint64().Draw(t, "seed")) }

// columns returns n columns.
func columns(r *rand.Rand, n int, moments bool) []design.Column {
	cols := make([]design.Column, n)
	for i := range cols {
		cols[i] = column(r, moments)
	}
	return cols
}

// column returns a column as a building has them: one to three combinations,
// most of them compression alone; ends, restraints, given lengths and factors;
// now and then a beam that lands between the ends, tension, end moments, a
// twist that is held elsewhere than z-z, or a limit of its own.
func column(r *rand.Rand, moments bool) design.Column {
	col := design.Column{Mark: "C", Cell: "A1", Quantity: 1, Length: between(r, 1500, 14000)}
	col.Y, col.Z = hold(r, col.Length), hold(r, col.Length)
	switch r.IntN(10) {
	case 0:
		col.Torsion.Given = true
	case 1:
		col.Torsion.LT = between(r, 1000, 14000)
	case 2:
		col.Torsion.EccentricFlange = true
	case 3: // a stub, where the cross-section governs
		col.Y, col.Z = design.Hold{Lcr: 300}, design.Hold{Lcr: 300}
	}
	if r.IntN(6) == 0 {
		col.Choice.Limit = between(r, 0.5, 1.1)
	}
	most := [...]float64{5e5, 2e6, 6e6, 2e7}[r.IntN(4)]
	for range 1 + r.IntN(3) {
		col.Combinations = append(col.Combinations, combination(r, col.Length, most, moments))
	}
	return col
}

func between(r *rand.Rand, lo, hi float64) float64 { return lo + (hi-lo)*r.Float64() }

func combination(r *rand.Rand, length, most float64, moments bool) design.Combination {
	cb := design.Combination{NEd: between(r, 0, most)}
	switch r.IntN(8) {
	case 0:
		cb.NEd = -cb.NEd
	case 1:
		cb.Steps = []design.Step{{Height: length / 2, NEd: cb.NEd * between(r, -0.2, 1)}}
	}
	if moments && r.IntN(2) == 0 {
		m := most * 50
		cb.My = design.EndMoments{Bottom: between(r, -m, m), Top: between(r, -m, m)}
		if r.IntN(2) == 0 {
			cb.Mz = design.EndMoments{Bottom: between(r, -m, m) / 5, Top: between(r, -m, m) / 5}
		}
	}
	return cb
}

func hold(r *rand.Rand, length float64) design.Hold {
	var h design.Hold
	switch r.IntN(7) {
	case 0:
		h.Lcr = length * between(r, 0.4, 1.2)
	case 1:
		h.K = between(r, 0.5, 2)
	case 2:
		h.Bottom.Condition = design.Fixed
	case 3:
		h.Restraints = []float64{length * between(r, 0.2, 0.8)}
	case 4:
		h.Restraints = []float64{length / 3, length * 2 / 3}
	case 5:
		k := between(r, 0, 1e11)
		h.Bottom.Stiffness = &k
	}
	return h
}
