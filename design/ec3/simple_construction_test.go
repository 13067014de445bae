package ec3_test

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// shaken is a storey with end moments, N mm.
func shaken(n float64, my, mz design.EndMoments) *design.Column {
	col := loaded(4000, n)
	col.Combinations[0].My, col.Combinations[0].Mz = my, mz
	return col
}

// double is double curvature of a moment m at the top.
func double(m float64) design.EndMoments { return design.EndMoments{Bottom: -0.5 * m, Top: m} }

func kinds(a *ec3.Assessment) []design.Kind {
	var list []design.Kind
	for _, check := range a.Checks {
		if !slices.Contains(list, check.Kind) {
			list = append(list, check.Kind)
		}
	}
	return list
}

// The criterion from its own resistances: 203x203x46 UKC in S355, by hand.
// N_b,z,Rd over 4 m: lambdaBar_z = 4000/(51.3 x 76.41) = 1.020, curve c, chi =
// 0.528, x 58.7 cm2 x 355 = 1101 kN. M_z: 1.5 x 5/(231 cm3 x 355) = 0.0915. The
// room of 0.2 % is that of three figures.
func TestSimpleConstruction(t *testing.T) {
	set := settings()
	set.Interaction = design.SimpleInteraction
	c := candidate(t, section(t, "203x203x46 UKC"), "S355", set)
	a := assess(t, shaken(600e3, double(20e6), double(5e6)), c, set)
	x := a.Simple
	assert.InEpsilon(t, 1101e3, x.NbMinRd, 0.002)
	assert.Equal(t, a.Z.NbRd, x.NbMinRd)
	assert.Equal(t, a.Y.NbRd, x.NbyRd)
	assert.Equal(t, a.Lateral.MbRd, x.MbRd)
	assert.InEpsilon(t, 0.0915, x.TermZ, 0.002)
	assert.InDelta(t, 600e3/x.NbMinRd+20e6/x.MbRd+1.5*5e6/x.MczRd, x.Utilisation, 1e-12)
	assert.Equal(t, x.Utilisation, a.Utilisation)
	assert.Equal(t, design.SimpleConstruction, a.Governing.Kind)
	assert.NotContains(t, kinds(a), design.Interaction661)
	assert.NotContains(t, kinds(a), design.SimpleConstructionY)
	assert.Empty(t, a.Governing.Reason)
}

// Outside the scope (6.61) and (6.62) take the criterion's place and say why.
func TestScopeOfSimpleConstruction(t *testing.T) {
	set := settings()
	set.Interaction = design.SimpleInteraction
	uc := section(t, "203x203x46 UKC")
	given := func(change func(*design.Column)) *design.Column {
		col := shaken(600e3, double(20e6), double(5e6))
		change(col)
		return col
	}
	single := design.EndMoments{Bottom: 2e6, Top: 20e6}
	for _, tc := range []struct {
		name    string
		section *catalogue.Section
		col     *design.Column
		reason  string
	}{
		{"tube", section(t, "CHS 168.3x10.0"), given(func(*design.Column) {}), "it covers I and H"},
		{"class 4", section(t, "RHS 400x150x6.3"), given(func(*design.Column) {}), "class 4"},
		{"sway", uc, given(func(c *design.Column) { c.Y.K = 1.5 }), "sways"},
		{"held between", uc, given(func(c *design.Column) { c.Z.Restraints = []float64{2000} }), "held between"},
		{"single curvature", uc, given(func(c *design.Column) { c.Combinations[0].My = single }), "psi_y is above -0.11"},
		{"about z-z", uc, given(func(c *design.Column) { c.Combinations[0].Mz = single }), "psi_z is above -0.11"},
		{"just above the limit", uc, given(func(c *design.Column) {
			c.Combinations[0].My = design.EndMoments{Bottom: -2.19e6, Top: 20e6}
		}), "psi_y"},
		{"a fixed base has no moment by chance", uc, given(func(c *design.Column) {
			c.Combinations[0].My = design.EndMoments{Top: 20e6}
			c.Y.Bottom.Condition = design.Fixed
		}), "psi_y"},
		{"moment at the base alone", uc, given(func(c *design.Column) { c.Combinations[0].My = design.EndMoments{Bottom: 20e6} }), "psi_y"},
	} {
		a := assess(t, tc.col, candidate(t, tc.section, "S355", set), set)
		assert.NotContains(t, kinds(a), design.SimpleConstruction, tc.name)
		for _, check := range a.Checks {
			if check.Kind == design.Interaction661 || check.Kind == design.Interaction662 {
				assert.Contains(t, check.Reason, "outside NCCI SN048", tc.name)
				assert.Contains(t, check.Reason, tc.reason, tc.name)
			}
		}
		require.Contains(t, kinds(a), design.Interaction662, tc.name)
		require.Len(t, a.Notes(), 1, tc.name)
		assert.Contains(t, a.Notes()[0], tc.reason, tc.name)
		plain := settings()
		assert.Equal(t, assess(t, tc.col, candidate(t, tc.section, "S355", plain), plain).Utilisation, a.Utilisation, tc.name)
	}
	for name, col := range map[string]*design.Column{
		"at the limit":  given(func(c *design.Column) { c.Combinations[0].My = design.EndMoments{Bottom: -2.2e6, Top: 20e6} }),
		"about y-y":     given(func(c *design.Column) { c.Combinations[0].Mz = design.EndMoments{} }),
		"about z-z":     given(func(c *design.Column) { c.Combinations[0].My = design.EndMoments{} }),
		"a length of k": given(func(c *design.Column) { c.Z.K = 0.85 }),
	} {
		a := assess(t, col, candidate(t, uc, "S355", set), set)
		assert.Contains(t, kinds(a), design.SimpleConstruction, name)
		assert.Empty(t, a.Notes(), name)
	}
	tension := assess(t, given(func(c *design.Column) { c.Combinations[0].NEd = -600e3 }), candidate(t, uc, "S355", set), set)
	for _, kind := range []design.Kind{design.SimpleConstruction, design.Interaction661, design.Interaction662} {
		assert.NotContains(t, kinds(tension), kind, "tension")
	}
}

// A length on a nominally pinned base, with no moment there, is in scope, and
// N_Ed/N_b,y,Rd is limited to 0.83. The same length on another is not.
func TestSimpleConstructionOnAPinnedBase(t *testing.T) {
	set := settings()
	set.Interaction = design.SimpleInteraction
	uc := section(t, "203x203x46 UKC")
	c := candidate(t, uc, "S355", set)
	col := shaken(1500e3, design.EndMoments{Top: 1e6}, design.EndMoments{})
	col.Z.Lcr = 300 // y-y governs
	a := assess(t, col, c, set)
	assert.Equal(t, design.SimpleConstructionY, a.Governing.Kind)
	assert.InDelta(t, 1500e3/(0.83*a.Y.NbRd), a.Utilisation, 1e-12)
	assert.InDelta(t, 0.83*a.Y.NbRd, a.Governing.Rd, 1e-6)

	m, err := ec3.NewMember(col, set)
	require.NoError(t, err)
	m.Between(&ec3.Neighbour{Column: loaded(4000, 1500e3), Section: uc}, nil)
	m.Assess(c, a)
	assert.NotContains(t, kinds(a), design.SimpleConstruction)
	assert.Contains(t, kinds(a), design.Interaction661)
}

// Inside its scope the criterion is on the safe side of (6.61) and (6.62) with
// Annex B: what its derivation claims.
func TestSimpleConstructionAgainstAnnexB(t *testing.T) {
	sections := slices.DeleteFunc(bendable(t), func(s *catalogue.Section) bool {
		return s.Shape != catalogue.ShapeI || s.Family != "UKC" && s.Family != "HEA" && s.Family != "HEB"
	})
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		set.Interaction = design.SimpleInteraction
		c := anyBendableCandidate(t, sections, set)
		m := rapid.Float64Range(0, 0.3)
		psi := rapid.Float64Range(-1, -0.11)
		moments := func(w float64) design.EndMoments {
			top := m.Draw(t, "m") * w * c.Fy
			return design.EndMoments{Bottom: top * psi.Draw(t, "psi"), Top: top}
		}
		col := shaken(rapid.Float64Range(0.05, 0.9).Draw(t, "n")*c.NplRd, moments(c.Section.WplY), moments(c.Section.WplZ))
		col.Length = rapid.Float64Range(2500, 6000).Draw(t, "length")
		simple := assess(t, col, c, set)
		if simple.Utilisation > 1 || simple.Simple.Class == 0 {
			return
		}
		plain := *set
		plain.Interaction = design.AnnexB
		full := assess(t, col, c, &plain)
		assert.LessOrEqual(t, full.Utilisation, 1.001)
	})
}
