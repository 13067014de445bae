package ec3

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"stanchion/design"
)

// leastByEigenvalues finds the critical load from the equilibrium conditions of
// the buckled member (Timoshenko and Gere, art. 5.6) without the cubic: in
// displacements scaled by the root of their loads, the inverse loads 1/N are
// the eigenvalues of a symmetric matrix, which a library finds.
func leastByEigenvalues(t require.TestingT, ny, nz, nt, qy, qz float64) float64 {
	sy, sz := math.Sqrt(qy), math.Sqrt(qz)
	c := mat.NewSymDense(3, []float64{
		1 / ny, 0, sy / math.Sqrt(ny*nt),
		0, 1 / nz, -sz / math.Sqrt(nz*nt),
		sy / math.Sqrt(ny*nt), -sz / math.Sqrt(nz*nt), 1 / nt,
	})
	var e mat.EigenSym
	require.True(t, e.Factorize(c, false))
	values := e.Values(nil)
	return 1 / values[len(values)-1]
}

func TestTorsionalFlexuralLoadIsTheLeastEigenvalue(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		load := func(name string) float64 { return math.Exp(rapid.Float64Range(5, 20).Draw(t, name)) }
		ny, nz, nt := load("Ny"), load("Nz"), load("NT")
		// qy + qz = 1 - (iy2 + iz2)/i0^2 < 1
		sum := rapid.Float64Range(0, 0.9).Draw(t, "sum")
		qy := sum * rapid.Float64Range(0, 1).Draw(t, "share")
		qz := sum - qy
		got := ncrGeneral(ny, nz, nt, qy, qz)
		assert.InEpsilon(t, leastByEigenvalues(t, ny, nz, nt, qy, qz), got, 1e-9)
		assert.LessOrEqual(t, got, min(ny, nz, nt)*(1+1e-12))

		closed := ncrSymmetric(ny, nt, sum)
		assert.InEpsilon(t, leastByEigenvalues(t, ny, 1e30, nt, sum, 0), closed, 1e-9)
	})
}

// Without an offset of the shear centre the modes do not couple.
func TestTorsionalFlexuralLoadWithoutOffset(t *testing.T) {
	assert.InEpsilon(t, 200.0, ncrSymmetric(200, 300, 0), 1e-12)
	assert.InEpsilon(t, 100.0, ncrGeneral(200, 100, 300, 0, 0), 1e-12)
}

// heldAtPoints is the critical load of a doubly symmetric section, held against
// twist and deflection at its ends and against deflection at the distance e
// from the shear centre at heights xs, by the energy method: sine series for
// deflection and twist, the restraints as stiff springs.
func heldAtPoints(t require.TestingT, c *Candidate, L, e float64, xs []float64) float64 {
	const terms = 40
	stiffness := mat.NewSymDense(2*terms, nil)
	weight := make([]float64, 2*terms)
	for i := range terms {
		n := float64(i+1) * math.Pi / L
		bend := c.EulerZ / (math.Pi * math.Pi) * n * n * n * n
		turn := c.GIt*n*n + c.EulerW/(math.Pi*math.Pi)*n*n*n*n
		weight[i], weight[terms+i] = math.Sqrt(n*n), math.Sqrt(c.I0Sq*n*n)
		stiffness.SetSym(i, i, bend/(n*n))
		stiffness.SetSym(terms+i, terms+i, turn/(c.I0Sq*n*n))
	}
	stiff := 100 * c.EulerZ * math.Pi * math.Pi / (L * L * L) * 1e3
	for _, x := range xs {
		held := make([]float64, 2*terms)
		for i := range terms {
			s := math.Sin(float64(i+1) * math.Pi * x / L)
			held[i], held[terms+i] = s/weight[i], -e*s/weight[terms+i]
		}
		for i := range held {
			for j := i; j < len(held); j++ {
				stiffness.SetSym(i, j, stiffness.At(i, j)+stiff*held[i]*held[j]*2/L)
			}
		}
	}
	var eigen mat.EigenSym
	require.True(t, eigen.Factorize(stiffness, false))
	return eigen.Values(nil)[0]
}

// Equally spaced points that hold a flange come as near to a line that holds it
// as the comment on NcrD says: many points reach it, and one or two never give
// less than 93 % of the lesser of N_cr,D and the flexural load between them.
func TestRestrainedAxisAgainstTheEnergyMethod(t *testing.T) {
	// Printed properties of a 203x203x60 UC and of an IPE 300, from memory.
	for name, p := range map[string][5]float64{
		"203x203x60": {7640, 6125e4, 2065e4, 47.2e4, 197e9},
		"IPE 300":    {5381, 8356e4, 604e4, 20.1e4, 125.9e9},
	} {
		h := map[string]float64{"203x203x60": 209.6, "IPE 300": 300}[name]
		const euler = math.Pi * math.Pi * design.E
		c := &Candidate{EulerZ: euler * p[2], GIt: design.G * p[3], EulerW: euler * p[4],
			I0Sq: (p[1] + p[2]) / p[0], Torsion: TorsionDoublySymmetric}
		for _, L := range []float64{4000, 6000, 9000} {
			for _, points := range []int{1, 2, 3, 9} {
				var xs []float64
				for i := range points {
					xs = append(xs, L*float64(i+1)/float64(points+1))
				}
				spacing := L / float64(points+1)
				closed := min(c.NcrD(L, h/2), c.EulerZ/(spacing*spacing))
				exact := heldAtPoints(t, c, L, h/2, xs)
				assert.GreaterOrEqual(t, exact, 0.93*closed, "%s L %g points %d", name, L, points)
				if points == 9 {
					assert.InEpsilon(t, c.NcrD(L, h/2), exact, 0.001, "%s L %g", name, L)
				}
			}
			// Held at the shear centre, the axis is enforced on the twist alone.
			assert.InEpsilon(t, c.NcrT(L), c.NcrD(L, 0), 1e-12)
		}
	}
}
