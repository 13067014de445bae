package ec3_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"

	"stanchion/design"
	"stanchion/design/ec3"
)

// cantileverMoment returns the elastic critical value of the greater end moment
// of a cantilever of length 1 that is free at x = 1, over that of uniform
// moment, when its moment is m(x) of it. Without a support to hold it there, u
// follows the twist: E Iz d2u/dx2 = -M phi, and the energy that is left is
//
//	1/2 int(E Iw phi''2 + G It phi'2) - 1/2 int(M2 phi2)/(E Iz)
//
// (Timoshenko and Gere, Theory of Elastic Stability, art. 6.1 to 6.3), solved
// by Ritz's method with the quarter waves of a twist held at x = 0 and free at
// x = 1; warping = E Iw/(G It L2). Those waves leave the held end free to warp,
// which is the lower bound of what it can be.
func cantileverMoment(warping float64, m func(x float64) float64) float64 {
	const terms, points = 24, 600
	wave := func(i int) float64 { return (float64(i) + 0.5) * math.Pi }
	a := mat.NewSymDense(terms, nil)
	for i := range terms {
		for j := i; j < terms; j++ {
			sum := 0.0
			for p := range points {
				x := (float64(p) + 0.5) / points
				sum += m(x) * m(x) * math.Sin(wave(i)*x) * math.Sin(wave(j)*x) / points
			}
			stiff := func(i int) float64 { k2 := wave(i) * wave(i); return (k2 + warping*k2*k2) / 2 }
			a.SetSym(i, j, sum/math.Sqrt(stiff(i)*stiff(j)))
		}
	}
	var e mat.EigenSym
	if !e.Factorize(a, false) {
		return math.NaN()
	}
	k2 := math.Pi * math.Pi / 4
	return 1 / math.Sqrt(e.Values(nil)[terms-1]) / math.Sqrt(k2+warping*k2*k2)
}

// The factor of 4.013 on a strip with a load at its free end: Timoshenko and
// Gere, Theory of Elastic Stability, art. 6.3 (from memory), and uniform moment.
func TestCantileverMoment(t *testing.T) {
	tip := func(x float64) float64 { return 1 - x }
	assert.InEpsilon(t, 4.013/(math.Pi/2), cantileverMoment(0, tip), 5e-4)
	assert.InEpsilon(t, 1, cantileverMoment(0.3, func(float64) float64 { return 1 }), 1e-9)
}

// C1Free is on the safe side of the theory at any share of warping, and not far
// from it where the greater moment is at the free end: what a straight line
// leaves of the curve.
func TestC1FreeIsSafe(t *testing.T) {
	for psi := 1.0; psi >= -1; psi -= 0.125 {
		for _, warping := range []float64{0, 0.003, 0.03, 0.1, 0.3, 1, 4} {
			atFree := cantileverMoment(warping, func(x float64) float64 { return psi + (1-psi)*x })
			atHeld := cantileverMoment(warping, func(x float64) float64 { return 1 + (psi-1)*x })
			assert.LessOrEqual(t, ec3.C1Free(psi, true), atFree*(1+1e-9), "psi %v, warping %v", psi, warping)
			assert.LessOrEqual(t, ec3.C1Free(psi, false), atHeld*(1+1e-9), "psi %v, warping %v", psi, warping)
			assert.Greater(t, ec3.C1Free(psi, true), 0.915*atFree, "psi %v, warping %v", psi, warping)
		}
	}
}

// The branches of C1Free meet, and the table stands where it is safe.
func TestC1FreeMeets(t *testing.T) {
	assert.InDelta(t, 1, ec3.C1Free(1, true), 1e-12)
	assert.InDelta(t, ec3.C1Free(-1, false), ec3.C1Free(-1, true), 1e-12)
	assert.InDelta(t, ec3.C1(-0.5), ec3.C1Free(-0.5-1e-12, false), 1e-9)
	for psi := 1.0; psi >= -0.5; psi -= 0.25 {
		assert.Equal(t, ec3.C1(psi), ec3.C1Free(psi, false))
	}
}

// A column free about z-z at its top with a moment there: M_cr by the theory,
// and in every set k_c from the same C1. Held by a given length instead, the
// words for its ends do not count.
func TestFreeEndBends(t *testing.T) {
	col := loaded(4000, 100e3)
	col.Z.Bottom.Condition, col.Z.Top.Condition = design.Fixed, design.Free
	col.Combinations[0].My = design.EndMoments{Bottom: -50e6, Top: 100e6}
	for _, national := range []string{"UK", "EN"} {
		set := settings()
		n, err := ec3.NationalSet(national)
		require.NoError(t, err)
		set.National = n
		c := candidate(t, section(t, "457x191x67 UKB"), "S355", set)

		lt := assess(t, col, c, set).Lateral
		s := c.Section
		warping := design.E * s.Iw / (design.G * s.It * 4000 * 4000)
		uniform := math.Pi / 2 / 4000 * math.Sqrt(design.E*s.Iz*design.G*s.It*(1+math.Pi*math.Pi/4*warping))
		theory := uniform * cantileverMoment(warping, func(x float64) float64 { return -0.5 + 1.5*x })
		assert.LessOrEqual(t, lt.Mcr, theory)
		assert.Greater(t, lt.Mcr, 0.915*theory)
		assert.True(t, lt.Beyond)
		assert.Contains(t, strings.Join(assess(t, col, c, set).Notes(), "; "), "free to twist")
		assert.InDelta(t, 1.45, lt.C1, 1e-12)
		assert.InDelta(t, 1/math.Sqrt(1.45), lt.Kc, 1e-12)

		given := *col
		given.Z.Lcr = 8000
		lt = assess(t, &given, c, set).Lateral
		assert.False(t, lt.Beyond)
		assert.Empty(t, assess(t, &given, c, set).Notes())
		assert.InDelta(t, 2.33, lt.C1, 1e-12)
	}
}
