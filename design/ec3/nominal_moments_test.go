package ec3_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

func section(t testing.TB, name string) *catalogue.Section {
	t.Helper()
	s, err := catalogue.Default().Find(name, catalogue.FindOptions{})
	require.NoError(t, err)
	return s
}

func simpleSettings() *design.Settings {
	set := settings()
	set.Moments, set.Interaction = design.MomentsSimple, design.SimpleInteraction
	return set
}

// propped is a storey with beam reactions at its top, N.
func propped(n, flangeA, flangeB, webA, webB float64) *design.Column {
	col := loaded(4000, n)
	k := &col.Combinations[0]
	k.HasReactions = true
	k.FlangeA, k.FlangeB, k.WebA, k.WebB = flangeA, flangeB, webA, webB
	return col
}

// Reactions act 100 mm outside the face of the flange or web, of a hollow
// section the wall.
func TestEccentricities(t *testing.T) {
	for name, want := range map[string][2]float64{
		"203x203x46 UKC":   {203.2/2 + 100, 7.2/2 + 100},
		"RHS 200x100x10.0": {200, 150},
		"CHS 168.3x10.0":   {84.15 + 100, 84.15 + 100},
	} {
		y, z := ec3.Eccentricities(section(t, name))
		assert.InDelta(t, want[0], y, 1e-9, name)
		assert.InDelta(t, want[1], z, 1e-9, name)
	}
}

func TestShare(t *testing.T) {
	assert.Equal(t, 0.5, ec3.Share(1, 1))
	assert.Equal(t, 0.5, ec3.Share(1.5, 1))
	assert.Equal(t, 0.5, ec3.Share(1, 1.5))
	assert.InDelta(t, 1.51/2.51, ec3.Share(1.51, 1), 1e-12)
	assert.InDelta(t, 0.25, ec3.Share(1, 3), 1e-12)
}

// A roof, a floor shared equally, a floor shared by stiffness, and a base, all
// worked by hand. 203x203x46 UKC: h 203.2, tw 7.2, Iy 4568 cm4, Iz 1548 cm4;
// 254x254x107 UKC: h 266.7, tw 12.8, Iy 17510 cm4, Iz 5928 cm4 (printed; to
// 0.3 %).
func TestNominalMoments(t *testing.T) {
	small, large := section(t, "203x203x46 UKC"), section(t, "254x254x107 UKC")
	set := simpleSettings()
	set.Growth = 1.1
	moments := func(own *catalogue.Section, col *design.Column, below, above *ec3.Neighbour) (design.EndMoments, design.EndMoments) {
		m, err := ec3.NewMember(col, set)
		require.NoError(t, err)
		m.Between(below, above)
		return m.EndMoments(candidate(t, own, "S355", set), 0)
	}
	const eY, eZ = 0.2016, 0.1036 // m, of the small section
	upper, lower := propped(200e3, 100e3, 40e3, 30e3, 0), propped(400e3, 120e3, 20e3, 0, 10e3)

	// The roof: all of it goes to the length below.
	my, mz := moments(small, upper, nil, nil)
	near := func(want, got float64) { t.Helper(); assert.InDelta(t, want, got, 0.003*max(1e6, want, -want)) }
	near(1.1*60*eY*1e6, my.Top)
	near(1.1*30*eZ*1e6, mz.Top)
	assert.Zero(t, my.Bottom)

	// A floor between alike lengths: halves, in opposite senses, with the
	// eccentricity of the section below it.
	on := &ec3.Neighbour{Column: lower, Section: small}
	my, mz = moments(small, upper, on, nil)
	near(-1.1*0.5*100*eY*1e6, my.Bottom)
	near(1.1*0.5*10*eZ*1e6, mz.Bottom)
	near(1.1*60*eY*1e6, my.Top)

	// On a larger section: I/L of 4568/17510 and 1548/5928, shares of 0.2069 and
	// 0.2071, eccentricities of 266.7/2 + 100 and 12.8/2 + 100.
	on.Section = large
	my, mz = moments(small, upper, on, nil)
	near(-1.1*0.2069*100*233.35e3, my.Bottom)
	near(1.1*0.2071*10*106.4e3, mz.Bottom)

	// The same floor seen from below.
	under := &ec3.Neighbour{Column: upper, Section: small}
	my, mz = moments(large, lower, nil, under)
	near(1.1*(1-0.2069)*100*233.35e3, my.Top)
	near(-1.1*(1-0.2071)*10*106.4e3, mz.Top)
	assert.Zero(t, my.Bottom, "nothing comes in at the base")

	// End moments that are given stand beside the nominal ones.
	both := propped(200e3, 100e3, 40e3, 0, 0)
	both.Combinations[0].My = design.EndMoments{Bottom: 7e6, Top: -2e6}
	my, _ = moments(small, both, nil, nil)
	near(1.1*(60*eY-2)*1e6, my.Top)
	assert.InDelta(t, 7.7e6, my.Bottom, 1)

	// Analysis takes no notice of reactions.
	set.Moments = design.MomentsAnalysis
	my, _ = moments(small, both, on, nil)
	assert.InDelta(t, -2.2e6, my.Top, 1)
	assert.InDelta(t, 7.7e6, my.Bottom, 1)
	m, err := ec3.NewMember(both, set)
	require.NoError(t, err)
	require.Len(t, m.Notes, 1, "and says so")
	assert.Contains(t, m.Notes[0], "beam reactions are given and do not count")
}

// A length without reactions of its own is bent by those of the floor that it
// stands on.
func TestMomentsFromTheFloorBelowAlone(t *testing.T) {
	set := simpleSettings()
	m, err := ec3.NewMember(loaded(3500, 100e3), set)
	require.NoError(t, err)
	assert.True(t, m.AxialOnly)
	below := &ec3.Neighbour{Column: propped(300e3, 50e3, 0, 0, 0), Section: section(t, "203x203x46 UKC")}
	m.Between(below, nil)
	assert.False(t, m.AxialOnly)
	var a ec3.Assessment
	m.Assess(candidate(t, section(t, "203x203x46 UKC"), "S355", set), &a)
	assert.NotZero(t, worstOf(&a, design.CrossSection))
	m.Between(nil, nil)
	assert.True(t, m.AxialOnly)
}

// Combinations of two lengths go together by name.
func TestCombinationsMeetByName(t *testing.T) {
	set := simpleSettings()
	upper, lower := propped(100e3, 0, 0, 0, 0), propped(200e3, 0, 0, 0, 0)
	upper.Combinations = []design.Combination{{Name: "ULS2", NEd: 1}, {Name: "ULS3", NEd: 1}}
	lower.Combinations = []design.Combination{{Name: "ULS1", NEd: 1, HasReactions: true, FlangeA: 10e3},
		{Name: "ULS2", NEd: 1, HasReactions: true, FlangeA: 20e3}}
	m, err := ec3.NewMember(upper, set)
	require.NoError(t, err)
	s := section(t, "203x203x46 UKC")
	m.Between(&ec3.Neighbour{Column: lower, Section: s}, nil)
	c := candidate(t, s, "S355", set)
	my, _ := m.EndMoments(c, 0)
	assert.InDelta(t, -0.5*20e3*201.6, my.Bottom, 1)
	my, _ = m.EndMoments(c, 1)
	assert.Zero(t, my.Bottom)
	assert.Contains(t, m.Notes[len(m.Notes)-1], "no combination ULS3")
}

// Own weight goes down the line: a length carries what stands on it.
func TestOwnWeightOfTheLengthsAbove(t *testing.T) {
	set := settings()
	set.SelfWeight = 1.35
	s := section(t, "203x203x46 UKC") // 46.1 kg/m
	c := candidate(t, s, "S355", set)
	upper, err := ec3.NewMember(loaded(4000, 100e3), set)
	require.NoError(t, err)
	own := 1.35 * 9.81 * 46.1 * 4
	assert.InDelta(t, own, upper.Weight(s.Mass), 1e-6)
	lower, err := ec3.NewMember(loaded(4000, 300e3), set)
	require.NoError(t, err)
	lower.Carried = upper.Weight(s.Mass)
	var a ec3.Assessment
	lower.Assess(c, &a)
	assert.InDelta(t, 300e3+2*own, a.Z.NEd, 1e-6)
	assert.InDelta(t, (300e3+2*own)/c.NcRd, worstOf(&a, design.Compression), 1e-12)
}

// Beside a length whose section is not known the floor's moment comes in whole:
// never less than beside any section that could stand there.
func TestUnknownSectionBelowBringsTheWholeMoment(t *testing.T) {
	set := simpleSettings()
	below := propped(900e3, 200e3, 50e3, 80e3, 0)
	c := candidate(t, section(t, "203x203x60 UKC"), "S355", set)
	bottom := func(s *catalogue.Section) (y, z float64) {
		m, err := ec3.NewMember(loaded(3600, 500e3), set)
		require.NoError(t, err)
		m.Between(&ec3.Neighbour{Column: below, Section: s}, nil)
		my, mz := m.EndMoments(c, 0)
		return my.Bottom, mz.Bottom
	}
	y, z := bottom(nil)
	assert.InEpsilon(t, -150e3*(209.6/2+100), y, 1e-12)
	assert.InEpsilon(t, -80e3*(9.4/2+100), z, 1e-12)
	for _, name := range []string{"152x152x23 UKC", "203x203x60 UKC", "254x254x107 UKC"} {
		sy, sz := bottom(section(t, name))
		assert.Less(t, -sy, -y, name)
		assert.Less(t, -sz, -z, name)
	}
}
