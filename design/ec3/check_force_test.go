package ec3_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// Every check carries the axial force that it rests on: growth and own weight
// included, tension negative. 46.1 kg/m over 4 m with a factor of 1.35 and
// g = 9.80665 m/s2 comes to 2441 N at the foot, and half of that at half height.
func TestForceOfEveryCheck(t *testing.T) {
	set := settings()
	set.SelfWeight, set.Growth = 1.35, 1.1
	uc := section(t, "203x203x46 UKC")
	col := loaded(4000, 500e3)
	col.Combinations[0].My = design.EndMoments{Bottom: 10e6, Top: 20e6}
	a := assess(t, col, candidate(t, uc, "S355", set), set)
	seen := map[design.Kind]bool{}
	for _, c := range a.Checks {
		assert.InDelta(t, 550e3+2441, c.NEd, 2, "%v", c.Kind)
		seen[c.Kind] = true
	}
	for _, k := range []design.Kind{design.Compression, design.ShearZ, design.CrossSection, design.FlexuralY, design.FlexuralZ, design.Torsional,
		design.LateralTorsional, design.Interaction661, design.Interaction662} {
		assert.True(t, seen[k], "%v", k)
	}

	col = loaded(4000, 500e3)
	col.Z.Restraints = []float64{2000}
	a = assess(t, col, candidate(t, uc, "S355", set), set)
	for _, c := range a.Checks {
		if c.Kind == design.FlexuralZ && c.From == 2000 {
			assert.InDelta(t, 550e3+2441./2, c.NEd, 2)
		}
	}

	a = assess(t, loaded(4000, -500e3), candidate(t, uc, "S355", set), set)
	require.Equal(t, design.Tension, a.Governing.Kind)
	assert.InDelta(t, -550e3, a.Governing.NEd, 1e-3)
	assert.InDelta(t, 550e3, a.Governing.Ed, 1e-3)

	set.Interaction = design.SimpleInteraction
	col = loaded(4000, 500e3)
	col.Combinations[0].My = design.EndMoments{Top: 20e6}
	a = assess(t, col, candidate(t, uc, "S355", set), set)
	require.Equal(t, design.SimpleConstruction, a.Governing.Kind)
	assert.InDelta(t, 550e3+2441, a.Governing.NEd, 2)
}

// A rule that does not cover the member in the section is a check that names
// the clause and the reason.
func TestRefusalIsACheck(t *testing.T) {
	set := settings()
	col := loaded(4000, 100e3)
	col.Combinations[0].My = design.EndMoments{Top: 5e6}
	a := assess(t, col, candidate(t, channel(200, 90, 7, 14, 12), "S275", set), set)
	require.Equal(t, design.Refused, a.Governing.Kind)
	assert.Contains(t, a.Governing.Reason, "moments on channels")
	assert.Equal(t, "6.3.3", a.Governing.Clause)
	assert.Zero(t, a.Governing.NEd)
}
