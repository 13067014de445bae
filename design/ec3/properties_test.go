package ec3_test

import (
	"math"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// rounding is the room for floating-point rounding in comparisons of results
// that physics orders.
const rounding = 1e-9

func assess(t require.TestingT, col *design.Column, c *ec3.Candidate, set *design.Settings) *ec3.Assessment {
	m, err := ec3.NewMember(col, set)
	require.NoError(t, err)
	a := new(ec3.Assessment)
	m.Assess(c, a)
	return a
}

func anySettings(t *rapid.T) *design.Settings {
	set := settings()
	set.National = rapid.SampledFrom(ec3.NationalSets()).Draw(t, "national")
	set.Growth = rapid.SampledFrom([]float64{0, 1, 1.1}).Draw(t, "growth")
	set.SelfWeight = rapid.SampledFrom([]float64{0, 0, 1.35}).Draw(t, "self-weight")
	set.Limit = rapid.SampledFrom([]float64{1, 0.8, 1.03}).Draw(t, "limit")
	set.Method = rapid.SampledFrom([]design.Method{design.MethodSegment, design.MethodSegment, design.MethodElastic}).Draw(t, "method")
	return set
}

func TestChiLiesBetweenZeroAndOne(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		curve := rapid.SampledFrom([]ec3.Curve{ec3.CurveA0, ec3.CurveA, ec3.CurveB, ec3.CurveC, ec3.CurveD}).Draw(t, "curve")
		lambda := rapid.Float64Range(0, 1000).Draw(t, "lambda")
		chi := ec3.Chi(curve.Alpha(), lambda)
		assert.Greater(t, chi, 0.0)
		assert.LessOrEqual(t, chi, 1.0)
		assert.LessOrEqual(t, chi*lambda*lambda, 1+rounding, "never above the critical load")
		assert.LessOrEqual(t, ec3.Chi(curve.Alpha(), lambda*1.01), chi, "longer is never stronger")
		if curve < ec3.CurveD {
			assert.LessOrEqual(t, ec3.Chi((curve+1).Alpha(), lambda), chi, "the next curve is never better")
		}
	})
}

// A stocky member has its cross-section's resistance, in every shape.
func TestShortMembersReachTheCrossSection(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		c := anyCandidate(t, set)
		a := assess(t, &design.Column{Length: 1, Combinations: []design.Combination{{NEd: 1e3}}}, c, set)
		want := c.NRk / c.GammaM1
		assert.Equal(t, 1.0, a.Y.Chi)
		assert.Equal(t, want, a.Y.NbRd)
		assert.Equal(t, want, a.Z.NbRd)
		if c.Class < 4 {
			assert.InEpsilon(t, c.Section.A*c.Fy, c.NcRd*c.GammaM0, rounding)
		} else {
			assert.Less(t, c.AEff, c.Section.A)
			assert.Greater(t, c.AEff, 0.0)
		}
		if a.HasT && a.T.Chi < 1 { // St Venant torsion has no length to be short of
			return
		}
		assert.Equal(t, design.Compression, a.Governing.Kind, "among equals the first check in the order of the standard")
	})
}

func TestLongerIsNeverStronger(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		c := anyCandidate(t, set)
		load := []design.Combination{{NEd: 1e5}}
		L := rapid.Float64Range(100, 20000).Draw(t, "length")
		short := assess(t, &design.Column{Length: L, Combinations: load}, c, set)
		long := assess(t, &design.Column{Length: L * rapid.Float64Range(1, 3).Draw(t, "by"), Combinations: load}, c, set)
		assert.LessOrEqual(t, long.Y.NbRd, short.Y.NbRd*(1+rounding))
		assert.LessOrEqual(t, long.Z.NbRd, short.Z.NbRd*(1+rounding))
		assert.Equal(t, short.HasT, long.HasT)
		assert.LessOrEqual(t, long.T.NbRd, short.T.NbRd*(1+rounding))
		assert.LessOrEqual(t, short.Utilisation, long.Utilisation*(1+rounding))
	})
}

// Adding a restraint, about either axis or against twist, held centrally or at
// one flange, never lowers a resistance.
func TestAddingARestraintNeverWeakens(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		set.Method = rapid.SampledFrom([]design.Method{design.MethodSegment, design.MethodElastic}).Draw(t, "method")
		c := anyCandidate(t, set)
		col := design.Column{Length: rapid.Float64Range(1000, 15000).Draw(t, "length"),
			Combinations: []design.Combination{{NEd: 1e5}}}
		col.Y.Restraints = anyHeights(t, "y-y", col.Length)
		col.Z.Restraints = anyHeights(t, "z-z", col.Length)
		if rapid.Bool().Draw(t, "torsion given") {
			col.Torsion = design.Torsion{Given: true, Restraints: anyHeights(t, "torsion", col.Length)}
			col.Torsion.EccentricFlange = c.Section.Shape == catalogue.ShapeI && rapid.Bool().Draw(t, "flange")
		}
		before := assess(t, &col, c, set)
		more := col
		x := col.Length * rapid.Float64Range(0.05, 0.95).Draw(t, "x")
		switch rapid.IntRange(0, 2).Draw(t, "which") {
		case 0:
			more.Y.Restraints = inserted(col.Y.Restraints, x)
		case 1:
			more.Z.Restraints = inserted(col.Z.Restraints, x)
		case 2:
			if !col.Torsion.Given {
				t.Skip("the twist follows z-z")
			}
			more.Torsion.Restraints = inserted(col.Torsion.Restraints, x)
		}
		after := assess(t, &more, c, set)
		// The elastic analysis is exact to about 1e-9 of the load factor.
		const room = 1e-6
		assert.LessOrEqual(t, after.Utilisation, before.Utilisation*(1+room))
		least := func(a *ec3.Assessment) float64 {
			n := min(a.Y.NbRd, a.Z.NbRd)
			if a.HasT {
				n = min(n, a.T.NbRd)
			}
			return n
		}
		assert.GreaterOrEqual(t, least(after), least(before)*(1-room))
	})
}

func inserted(heights []float64, x float64) []float64 {
	if slices.ContainsFunc(heights, func(h float64) bool { return math.Abs(h-x) < 1 }) {
		return heights
	}
	heights = append(slices.Clone(heights), x)
	slices.Sort(heights)
	return heights
}

// For a uniform force and pinned ends, continuity over the restraints can only
// help.
func TestElasticIsNeverBelowSegment(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		c := anyCandidate(t, set)
		col := design.Column{Length: rapid.Float64Range(1000, 15000).Draw(t, "length"),
			Combinations: []design.Combination{{NEd: 1e5}}}
		col.Y.Restraints = anyHeights(t, "y-y", col.Length)
		col.Z.Restraints = anyHeights(t, "z-z", col.Length)
		bySegment := assess(t, &col, c, set)
		set.Method = design.MethodElastic
		elastic := assess(t, &col, c, set)
		const room = 1e-6 // accuracy of the elastic analysis
		assert.GreaterOrEqual(t, elastic.Y.NbRd, bySegment.Y.NbRd*(1-room))
		assert.GreaterOrEqual(t, elastic.Z.NbRd, bySegment.Z.NbRd*(1-room))
	})
}

// More force is never less utilisation, and N_b,Rd does not depend on it.
func TestUtilisationGrowsWithForce(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := settings()
		c := anyCandidate(t, set)
		col := design.Column{Length: rapid.Float64Range(300, 15000).Draw(t, "length")}
		n := rapid.Float64Range(1, 1e7).Draw(t, "NEd")
		by := rapid.Float64Range(1, 5).Draw(t, "by")
		col.Combinations = []design.Combination{{NEd: n}}
		less := assess(t, &col, c, set)
		col.Combinations = []design.Combination{{NEd: n * by}}
		more := assess(t, &col, c, set)
		assert.InEpsilon(t, less.Utilisation*by, more.Utilisation, rounding)
		assert.Equal(t, less.Z.NbRd, more.Z.NbRd)
	})
}

// S460 has a curve at least as good as lower grades have.
func TestS460CurvesAreNoWorse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := anySection(t)
		y, z, refusal := ec3.Curves(s, 355)
		hy, hz, again := ec3.Curves(s, 460)
		assert.Equal(t, refusal == nil, again == nil)
		if refusal == nil {
			assert.LessOrEqual(t, hy, y)
			assert.LessOrEqual(t, hz, z)
			assert.LessOrEqual(t, y, z)
		}
	})
}
