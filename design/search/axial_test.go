package search

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"

	"stanchion/design/ec3"
)

// The form without square root must decide as the form of the standard does,
// at any slenderness and on every curve.
func TestPassDecidesAsChiDoes(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		alpha := ec3.Curve(rapid.IntRange(0, 4).Draw(t, "curve")).Alpha()
		lambdaBar := rapid.Float64Range(0, 6).Draw(t, "lambdaBar")
		chi := ec3.Chi(alpha, lambdaBar)
		// From far off down to a hair: 1e-11 is ten times the guard.
		off := math.Pow(10, rapid.Float64Range(-11, 0).Draw(t, "off"))
		assert.Equal(t, passes, pass(chi*(1-off), lambdaBar, alpha), "below chi")
		assert.Equal(t, fails, pass(chi*(1+off), lambdaBar, alpha), "above chi")
		assert.Equal(t, doubt, pass(chi, lambdaBar, alpha), "at chi")
	})
}

// Up to a slenderness of 0.2 chi is 1 and no more.
func TestPassAtStockySlenderness(t *testing.T) {
	for _, lambdaBar := range []float64{0, 0.1, 0.2} {
		assert.Equal(t, passes, pass(1-1e-11, lambdaBar, 0.49))
		assert.Equal(t, doubt, pass(1, lambdaBar, 0.49))
		assert.Equal(t, fails, pass(1+1e-11, lambdaBar, 0.49))
	}
}

// The cross-section has a partial factor of its own, and may govern.
func TestAxialCrossSection(t *testing.T) {
	row := axialRow{c: 1, tA: math.Inf(1), known: true}
	for n, want := range map[float64]verdict{0.79: passes, 0.8: doubt, 0.81: fails} {
		d := &demand{n: n, y: []point{{n, 0}}, z: []point{{n, 0}}, full: true}
		assert.Equal(t, want, row.axial(d, 1.25), "%v", n)
	}
}
