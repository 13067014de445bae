package ec3_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design/ec3"
)

// Section factors of published tables; rows and their provenance in testdata.
func TestPublishedSectionFactors(t *testing.T) {
	for _, r := range published(t, "section_factors.csv") {
		s := &catalogue.Section{Shape: catalogue.ShapeI, H: r.must(t, "h_mm"), B: r.must(t, "b_mm"),
			Properties: catalogue.Properties{A: r.must(t, "A_cm2") * 100, Perimeter: r.must(t, "surface_m2_per_m") * 1000}}
		boxed := strings.HasPrefix(r["exposure"], "box")
		require.Contains(t, r["exposure"], "4 sides")
		r.near(t, "A_m_over_V_per_m", s.SectionFactor(catalogue.Exposure{Boxed: boxed}))
	}
}

// Three sides: the outside of one flange is covered (EN 1993-1-2 Table 4.2).
func TestSectionFactorOnThreeSides(t *testing.T) {
	s := hot260()
	assert.InEpsilon(t, (1484.0-260)/8.68, s.SectionFactor(catalogue.Exposure{ThreeSides: true}), 1e-12)
	assert.InEpsilon(t, (2*250.0+260)/8.68, s.SectionFactor(catalogue.Exposure{ThreeSides: true, Boxed: true}), 1e-12)
	assert.InEpsilon(t, 0.9*(2*250.0+260)/(1484-260), ec3.ShadowFactor(s, true), 1e-12)
	assert.InEpsilon(t, 0.9*1020/1484, ec3.ShadowFactor(s, false), 1e-12)

	round := &catalogue.Section{Shape: catalogue.ShapeCHS, H: 200, B: 200, Tw: 10, Tf: 10,
		Properties: catalogue.Properties{A: 5969, Perimeter: math.Pi * 200}}
	for _, three := range []bool{false, true} {
		for _, boxed := range []bool{false, true} {
			assert.InEpsilon(t, math.Pi*200/5.969, round.SectionFactor(catalogue.Exposure{ThreeSides: three, Boxed: boxed}), 1e-12)
		}
	}
	assert.Equal(t, 1.0, ec3.ShadowFactor(round, false))

	channel := &catalogue.Section{Shape: catalogue.ShapeChannel, H: 200, B: 75,
		Properties: catalogue.Properties{A: 2990, Perimeter: 660}}
	assert.InEpsilon(t, 550.0/660, ec3.ShadowFactor(channel, false), 1e-12)
}

// EN 1991-1-2 (3.4), values of the standard curve from memory.
func TestStandardFire(t *testing.T) {
	for minutes, want := range map[float64]float64{0: 20, 15: 739, 30: 842, 60: 945, 90: 1006, 120: 1049} {
		assert.InDelta(t, want, ec3.StandardFire(60*minutes), 0.6)
	}
}

// EN 1993-1-2 3.4.1.2: 440 J/kgK at 20 C (from memory), a peak of 5000 at
// 735 C, and the pieces join.
func TestSpecificHeat(t *testing.T) {
	assert.InDelta(t, 440, ec3.SpecificHeat(20), 1)
	assert.InEpsilon(t, 5000, ec3.SpecificHeat(735), 0.001)
	assert.Equal(t, 650.0, ec3.SpecificHeat(1000))
	for _, joint := range []float64{600, 735, 900} {
		assert.InEpsilon(t, ec3.SpecificHeat(joint-1e-9), ec3.SpecificHeat(joint), 0.005, "at %g", joint)
	}
}

// Temperatures of unprotected steel under the standard fire, k_sh 1, as tables
// of design guides to EN 1993-1-2 print them (from memory; a degree or two
// apart from guide to guide).
func TestUnprotectedHeating(t *testing.T) {
	for _, c := range []struct{ AmV, minutes, theta float64 }{
		{100, 15, 566}, {100, 30, 767}, {200, 15, 683}, {200, 30, 828},
	} {
		seconds, ok := ec3.TimeToReach(c.theta, c.AmV, 1)
		require.True(t, ok)
		assert.InEpsilon(t, c.minutes, seconds/60, 0.015)
	}
}

// The standard's 5 s against the differential equation (midpoint rule, steps of
// 0.05 s): they part by no more than a step and a half, 7.5 s.
func TestHeatingConverges(t *testing.T) {
	for _, AmV := range []float64{20, 100, 300} {
		for _, theta := range []float64{350, 550, 700} {
			seconds, ok := ec3.TimeToReach(theta, AmV, 0.7)
			require.True(t, ok)
			assert.InDelta(t, fineHeating(theta, AmV, 0.7), seconds, 7.5)
		}
	}
}

func fineHeating(theta, AmV, ksh float64) float64 {
	const dt = 0.05
	rate := func(t, steel float64) float64 {
		gas := 20 + 345*math.Log10(8*t/60+1)
		flux := 25*(gas-steel) + 0.7*5.67e-8*(math.Pow(gas+273, 4)-math.Pow(steel+273, 4))
		return ksh * AmV * flux / ec3.SpecificHeat(steel) / 7850
	}
	steel, t := 20.0, 0.0
	for steel < theta {
		half := steel + rate(t, steel)*dt/2
		steel += rate(t+dt/2, half) * dt
		t += dt
	}
	return t
}

func TestHeatingOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		theta := rapid.Float64Range(100, 900).Draw(t, "theta")
		AmV := rapid.Float64Range(10, 400).Draw(t, "AmV")
		time := func(theta, AmV, ksh float64) float64 {
			seconds, ok := ec3.TimeToReach(theta, AmV, ksh)
			require.True(t, ok)
			return seconds
		}
		before := time(theta, AmV, 1)
		require.LessOrEqual(t, time(theta, AmV*1.2, 1), before)
		require.GreaterOrEqual(t, time(theta+20, AmV, 1), before)
		require.GreaterOrEqual(t, time(theta, AmV, 0.8), before)
	})
	// 10 1/m is the least section factor (4.2.5.1).
	least, ok := ec3.TimeToReach(500, 10, 1)
	require.True(t, ok)
	same, ok := ec3.TimeToReach(500, 1, 1)
	require.True(t, ok)
	assert.Equal(t, least, same)
	_, ok = ec3.TimeToReach(1290, 100, 1)
	assert.False(t, ok)
}
