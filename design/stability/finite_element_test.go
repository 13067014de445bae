package stability

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"stanchion/design"
)

// finiteElements finds lambda (N_cr L2/EI of the force at which n = 1) by
// cubic beam elements with the consistent geometric stiffness, a method that
// shares nothing with the exact stiffness matrix but the nodes. Each stretch
// between restraints and steps is cut into elements by parts, from its length
// and force; the result lies above the exact one and approaches it with the
// fourth power of the number of elements.
func finiteElements(m ends, restraints, stepsAt, forces []float64, n float64, parts func(l, n float64) int) float64 {
	nodes, heldAt, force := mesh(restraints, stepsAt, forces, n, parts)
	size := 2 * len(nodes)
	K, G := mat.NewSymDense(size, nil), mat.NewSymDense(size, nil)
	for e := range len(nodes) - 1 {
		l := nodes[e+1] - nodes[e]
		addElement(K, 2*e, 1/(l*l*l), [10]float64{12, 6 * l, -12, 6 * l, 4 * l * l, -6 * l, 2 * l * l, 12, -6 * l, 4 * l * l})
		addElement(G, 2*e, force[e]/(30*l), [10]float64{36, 3 * l, -36, 3 * l, 4 * l * l, -3 * l, -l * l, 36, -3 * l, 4 * l * l})
	}
	var free []int
	for i := range nodes {
		end := map[int]int{0: 0, len(nodes) - 1: 1}
		at, isEnd := end[i]
		if isEnd && m.sways[at] || !isEnd && !heldAt[i] {
			free = append(free, 2*i)
		}
		if isEnd && math.IsInf(m.spring[at], 1) {
			continue
		}
		free = append(free, 2*i+1)
		if isEnd {
			K.SetSym(2*i+1, 2*i+1, K.At(2*i+1, 2*i+1)+m.spring[at])
		}
	}
	return lowestPositive(pick(K, free), pick(G, free))
}

func mesh(restraints, stepsAt, forces []float64, n float64, parts func(l, n float64) int) (nodes []float64, held []bool, force []float64) {
	breaks := map[float64]bool{0: false, 1: false}
	for _, x := range stepsAt {
		breaks[x] = false
	}
	for _, x := range restraints {
		breaks[x] = true
	}
	var heights []float64
	for x := range breaks {
		heights = append(heights, x)
	}
	sortFloats(heights)
	for i, x := range heights {
		nodes, held = append(nodes, x), append(held, breaks[x])
		if i+1 == len(heights) {
			break
		}
		for j, at := range stepsAt {
			if at <= x {
				n = forces[j]
			}
		}
		l := heights[i+1] - x
		count := parts(l, n)
		for p := range count {
			force = append(force, n)
			if p > 0 {
				nodes = append(nodes, x+l*float64(p)/float64(count))
				held = append(held, false)
			}
		}
	}
	return nodes, held, force
}

func sortFloats(x []float64) {
	for i := range x {
		for j := i; j > 0 && x[j] < x[j-1]; j-- {
			x[j], x[j-1] = x[j-1], x[j]
		}
	}
}

func addElement(m *mat.SymDense, first int, scale float64, k [10]float64) {
	at := 0
	for i := range 4 {
		for j := i; j < 4; j++ {
			m.SetSym(first+i, first+j, m.At(first+i, first+j)+scale*k[at])
			at++
		}
	}
}

func pick(m *mat.SymDense, free []int) *mat.SymDense {
	out := mat.NewSymDense(len(free), nil)
	for i, r := range free {
		for j := i; j < len(free); j++ {
			out.SetSym(i, j, m.At(r, free[j]))
		}
	}
	return out
}

// lowestPositive solves K v = lambda G v: with K = L Lt, the greatest
// eigenvalue of inv(L) G inv(Lt) is 1/lambda.
func lowestPositive(K, G *mat.SymDense) float64 {
	var chol mat.Cholesky
	if !chol.Factorize(K) {
		return 0
	}
	var L mat.TriDense
	chol.LTo(&L)
	var half, whole mat.Dense
	if err := half.Solve(&L, G); err != nil {
		return math.NaN()
	}
	if err := whole.Solve(&L, half.T()); err != nil {
		return math.NaN()
	}
	n := G.SymmetricDim()
	sym := mat.NewSymDense(n, nil)
	for i := range n {
		for j := i; j < n; j++ {
			sym.SetSym(i, j, (whole.At(i, j)+whole.At(j, i))/2)
		}
	}
	var eigen mat.EigenSym
	if !eigen.Factorize(sym, false) {
		return math.NaN()
	}
	values := eigen.Values(nil)
	return 1 / values[len(values)-1]
}

// exactly solves the same member by the package's own method.
func exactly(m ends, restraints, stepsAt, forces []float64, n float64) float64 {
	c := &design.Combination{NEd: n}
	for i, x := range stepsAt {
		c.Steps = append(c.Steps, design.Step{Height: x, NEd: forces[i]})
	}
	return new(solver).stepped(&m, restraints, 1, c, 1)
}

// Refining the mesh approaches the exact solution with the fourth power, from
// above.
func TestElasticConvergence(t *testing.T) {
	m := ends{sways: [2]bool{false, true}, spring: [2]float64{7, 0}}
	restraints, stepsAt, forces := []float64{0.25, 0.6}, []float64{0.4, 0.8}, []float64{0.7, 0.5}
	exact := exactly(m, restraints, stepsAt, forces, 1)
	previous := math.Inf(1)
	for _, parts := range []int{1, 2, 4, 8} {
		over := finiteElements(m, restraints, stepsAt, forces, 1, func(l, n float64) int { return parts })/exact - 1
		assert.Greater(t, over, 0.0)
		if parts > 2 {
			assert.InDelta(t, 16, previous/over, 1.5, "%d parts", parts)
		}
		previous = over
	}
}

// heights draws rising fractions of the length.
func heights(t *rapid.T, label string, most int) []float64 {
	const grid = 20
	at := rapid.SliceOfNDistinct(rapid.IntRange(1, grid-1), 0, most, rapid.ID[int]).Draw(t, label)
	var out []float64
	for i := 1; i < grid; i++ {
		for _, a := range at {
			if a == i {
				out = append(out, float64(i)/grid)
			}
		}
	}
	return out
}

// Random members, with springs, swaying ends, steps and parts in tension,
// agree with the finite elements.
func TestElasticAgainstFiniteElements(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := ends{
			sways: [2]bool{false, rapid.Bool().Draw(t, "sways")},
			spring: [2]float64{
				rapid.SampledFrom([]float64{0.5, 3.58, 20, math.Inf(1)}).Draw(t, "bottom"),
				rapid.SampledFrom([]float64{0, 1.05, 3.58, math.Inf(1)}).Draw(t, "top"),
			},
		}
		restraints := heights(t, "restraints", 3)
		stepsAt := heights(t, "steps", 3)
		n := rapid.Float64Range(0.3, 1).Draw(t, "n")
		var forces []float64
		for range stepsAt {
			forces = append(forces, rapid.Float64Range(-0.5, 1.5).Draw(t, "force"))
		}
		got := exactly(m, restraints, stepsAt, forces, n)
		// With the argument of the stability functions at most 0.4 in each
		// element, the error of cubic elements, its fourth power over 720, is
		// below 4e-5.
		want := finiteElements(m, restraints, stepsAt, forces, n, func(l, n float64) int {
			return 4 + int(math.Sqrt(math.Abs(got*n))*l/0.4)
		})
		assert.InEpsilon(t, want, got, 5e-5)
		assert.LessOrEqual(t, got, want*(1+1e-6))
	})
}
