package stability

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
)

// solved is the relative width to which the critical load is enclosed, with a
// margin for rounding in the matrix.
const solved = 1e-8

// lambdaOf returns N_cr L2/EI of a uniformly loaded column.
func lambdaOf(t *testing.T, col *design.Column) float64 {
	t.Helper()
	s := elasticSegments(t, col, nil)[0]
	return s.NcrOverEI() * col.Length * col.Length
}

// Closed forms of a prismatic column under end load (Timoshenko and Gere,
// Theory of Elastic Stability, 2nd ed., art. 2.1-2.2).
func TestElasticClosedForms(t *testing.T) {
	// The first root of tan u = u, from memory, recomputed: 4.493409457909064.
	const propped = 4.493409457909064
	require.InDelta(t, propped, math.Tan(propped), 1e-12)
	pi2 := math.Pi * math.Pi

	assert.InEpsilon(t, pi2, lambdaOf(t, rigidEnds(4000, "pinned", "pinned")), solved)
	assert.InEpsilon(t, propped*propped, lambdaOf(t, rigidEnds(4000, "fixed", "pinned")), solved)
	assert.InEpsilon(t, propped*propped, lambdaOf(t, rigidEnds(4000, "pinned", "fixed")), solved)
	assert.InEpsilon(t, 4*pi2, lambdaOf(t, rigidEnds(4000, "fixed", "fixed")), solved)
	assert.InEpsilon(t, pi2/4, lambdaOf(t, rigidEnds(4000, "fixed", "free")), solved)
	assert.InEpsilon(t, pi2/4, lambdaOf(t, rigidEnds(4000, "free", "fixed")), solved)

	guided := rigidEnds(4000, "fixed", "free")
	guided.Y.Top.Eta = ptr(0)
	assert.InEpsilon(t, pi2, lambdaOf(t, guided), solved)
	guided.Y.Bottom = design.End{}
	assert.InEpsilon(t, pi2/4, lambdaOf(t, guided), solved)
}

// A column pinned at its ends on an intermediate support: the rotations of the
// two spans at the support agree where
// 1/a + 1/b = k (cot ka + cot kb), k2 = N/EI
// (Timoshenko and Gere, 2nd ed., art. 2.6).
func TestElasticTwoSpans(t *testing.T) {
	const L = 1000.0
	for _, a := range []float64{10, 150, 333.3, 400, 499} {
		b := L - a
		want := rootOf(math.Pi/b, math.Min(2*math.Pi/b, math.Pi/a)*(1-1e-12), func(k float64) float64 {
			return k*(1/math.Tan(k*a)+1/math.Tan(k*b)) - 1/a - 1/b
		})
		col := rigidEnds(L, "pinned", "pinned")
		col.Y.Restraints = []float64{a}
		assert.InEpsilon(t, want*want*L*L, lambdaOf(t, col), solved, "a = %g", a)
	}
}

// A column pinned at the base and held again at a, free above it:
// k = tan kb (1/a - k cot ka) (equilibrium and continuity at the support,
// derived for this test).
func TestElasticOverhang(t *testing.T) {
	const L = 1000.0
	for _, a := range []float64{100, 300, 500, 800, 950} {
		b := L - a
		want := rootOf(1e-9, math.Min(math.Pi/2/b, math.Pi/a)*(1-1e-12), func(k float64) float64 {
			return math.Tan(k*b)*(1/a-k/math.Tan(k*a)) - k
		})
		col := rigidEnds(L, "pinned", "free")
		col.Y.Restraints = []float64{a}
		assert.InEpsilon(t, want*want*L*L, lambdaOf(t, col), solved, "a = %g", a)
	}
}

// rootOf bisects between a and b.
func rootOf(a, b float64, f func(float64) float64) float64 {
	sign := math.Signbit(f(a + (b-a)*1e-9))
	for range 200 {
		if m := (a + b) / 2; math.Signbit(f(m)) == sign {
			a = m
		} else {
			b = m
		}
	}
	return a
}

// Under a force that steps, the length of each part belongs to its own force.
func TestElasticLengthsBelongToTheirOwnForce(t *testing.T) {
	col := ended(design.Pinned, design.Pinned, 3000)
	c := &design.Combination{NEd: 900, Steps: []design.Step{{Height: 3000, NEd: 300}}}
	s := elasticSegments(t, col, c)
	require.Len(t, s, 2)
	lower, upper := s[0].NcrOverEI(), s[1].NcrOverEI()
	assert.InEpsilon(t, 3, lower/upper, solved)
	// The lower span is held by the upper: stronger than on its own, weaker
	// than with a clamped end.
	assert.Greater(t, lower, math.Pow(math.Pi/3000, 2))
	assert.Less(t, lower, 20.19/3000/3000)
}

// Parts in tension stiffen the column and carry no buckling length.
func TestElasticWithTension(t *testing.T) {
	col := ended(design.Pinned, design.Pinned, 3000)
	c := &design.Combination{NEd: 900, Steps: []design.Step{{Height: 3000, NEd: -1e8}}}
	s := elasticSegments(t, col, c)
	assert.Zero(t, s[1].Lcr)
	// Under an ever greater tension the upper span clamps the lower one; at
	// this one its stiffness, sqrt(N/EI), still lacks about 0.1 % of that.
	assert.InEpsilon(t, 20.19/3000/3000, s[0].NcrOverEI(), 0.002)

	// A free end in tension holds itself straight.
	col = ended(design.Fixed, design.Free)
	c = &design.Combination{NEd: 900, Steps: []design.Step{{Height: 3000, NEd: -1e9}}}
	s = elasticSegments(t, col, c)
	assert.False(t, math.IsNaN(s[0].Lcr))
	assert.Greater(t, s[0].NcrOverEI(), math.Pow(math.Pi/12000, 2))
}

// Where nothing is in compression the lengths are those of a uniform force.
func TestElasticAllTension(t *testing.T) {
	col := ended(design.Fixed, design.Pinned, 2500)
	c := &design.Combination{NEd: -900, Steps: []design.Step{{Height: 3000, NEd: -300}}}
	assert.Equal(t, elasticSegments(t, col, nil), elasticSegments(t, col, c))
}

// A step that changes nothing changes no length, wherever it stands.
func TestElasticIdleSteps(t *testing.T) {
	col := ended(design.Fixed, design.PartlyFixed, 2500)
	want := elasticSegments(t, col, nil)
	for _, x := range []float64{-5, 0, 0.1, 1, 500, 2499.9, 2500, 2500.2, 5999.9, 6000, 7000} {
		// The second step, past the top, makes the combination count as stepped.
		c := &design.Combination{NEd: 900, Steps: []design.Step{{Height: x, NEd: 900}, {Height: 6001, NEd: 1}}}
		got := elasticSegments(t, col, c)
		// Parts as short as the snapping distance cost figures.
		assert.InEpsilon(t, want[0].Lcr, got[0].Lcr, 1e-4, "at %g", x)
	}
}

// Only the shape of the force counts.
func TestElasticScalesWithForce(t *testing.T) {
	col := ended(design.Fixed, design.Free, 2500)
	small := &design.Combination{NEd: 9, Steps: []design.Step{{Height: 1000, NEd: 5}, {Height: 4000, NEd: 2}}}
	large := &design.Combination{NEd: 9e6, Steps: []design.Step{{Height: 1000, NEd: 5e6}, {Height: 4000, NEd: 2e6}}}
	a, b := elasticSegments(t, col, small), elasticSegments(t, col, large)
	for i := range a {
		assert.InEpsilon(t, a[i].Lcr, b[i].Lcr, solved)
	}
}

func TestStabilityFunctions(t *testing.T) {
	// At no force: 4 and 2, the stiffness and carry-over of a plain beam.
	s, sc := stabilityFunctions(0)
	assert.Equal(t, 4.0, s)
	assert.Equal(t, 2.0, sc)
	// At the Euler load the stiffness with the far end pinned vanishes.
	s, sc = stabilityFunctions(math.Pi * math.Pi)
	assert.InDelta(t, 0, s-sc*sc/s, 1e-12)
	// The series and the closed forms meet.
	for _, q := range []float64{0.02, -0.02} {
		in, inC := stabilityFunctions(q * (1 - 1e-9))
		out, outC := stabilityFunctions(q)
		assert.InEpsilon(t, in, out, 1e-9)
		assert.InEpsilon(t, inC, outC, 1e-9)
	}
	// A great tension does not overflow: s tends to sqrt(-q).
	s, sc = stabilityFunctions(-1e8)
	assert.InEpsilon(t, 1e4, s, 1e-3)
	assert.InDelta(t, 1, sc, 1e-3)
}

func BenchmarkFindSegment(b *testing.B) {
	col := ended(design.Fixed, design.Pinned, 2000, 4000)
	var l Lengths
	var segs []Segment
	b.ReportAllocs()
	for b.Loop() {
		if err := l.Find(col, AxisZ, design.MethodSegment); err != nil {
			b.Fatal(err)
		}
		segs = l.Segments(segs[:0], nil, 0)
	}
}

func BenchmarkFindElastic(b *testing.B) {
	col := ended(design.Fixed, design.Pinned, 2000, 4500)
	c := &design.Combination{NEd: 900, Steps: []design.Step{{Height: 2000, NEd: 700}, {Height: 4500, NEd: 300}}}
	bench := func(c *design.Combination, fresh bool) func(b *testing.B) {
		return func(b *testing.B) {
			var l Lengths
			var segs []Segment
			b.ReportAllocs()
			for b.Loop() {
				if fresh {
					// A shape that was not met before.
					col.Z.Restraints[0] += 1e-6
				}
				if err := l.Find(col, AxisZ, design.MethodElastic); err != nil {
					b.Fatal(err)
				}
				segs = l.Segments(segs[:0], c, 0)
			}
		}
	}
	b.Run("new shape", bench(nil, true))
	b.Run("known shape", bench(nil, false))
	b.Run("stepped", bench(c, false))
}
