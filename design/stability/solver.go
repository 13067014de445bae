package stability

import (
	"math"

	"gonum.org/v1/gonum/blas"
	"gonum.org/v1/gonum/blas/blas64"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/lapack64"

	"stanchion/design"
)

// solver finds the lowest critical load of a prismatic member by the exact
// stiffness matrix of its parts. It keeps its memory between members.
//
// Everything is without dimension: lengths over L, stiffnesses over EI/L, and
// the load factor lambda in EI/L2 on the reference force.
type solver struct {
	parts    []part
	dofs     int
	springs  []dofSpring
	scale    []float64 // scales the matrix to a unit diagonal without load
	k        []float64 // the matrix, upper triangle
	eigen    []float64
	work     []float64
	known    map[uniformShape]float64
	heights  []float64
	stepsAt  []float64
	forces   []float64
	restrain []bool
}

// part is a stretch of constant force between two nodes. Its displacements are
// the deflection and rotation of its lower, then of its upper node; -1 marks
// one that is held.
type part struct {
	length, n float64
	dof       [4]int
}

type dofSpring struct {
	dof int
	k   float64
}

// snap is the distance, over L, below which a step of the force is taken to
// act at the neighbouring node: closer nodes would only lose figures.
const snap = 1e-4

// uniformShape is what the critical load of a uniformly loaded member depends
// on, for members of few restraints.
type uniformShape struct {
	ends    ends
	count   int
	heights [6]float64
}

// remembered is the number of shapes kept by a solver.
const remembered = 512

// uniform returns lambda for the same force all along the member.
func (s *solver) uniform(m *ends, restraints []float64, L float64) float64 {
	if len(restraints) == 0 && m.pinned() {
		return math.Pi * math.Pi
	}
	shape := uniformShape{ends: *m, count: len(restraints)}
	fits := len(restraints) <= len(shape.heights)
	if fits {
		for i, x := range restraints {
			shape.heights[i] = x / L
		}
		if lambda, ok := s.known[shape]; ok {
			return lambda
		}
	}
	s.begin(restraints, L)
	s.build(m, 1, nil, nil)
	lambda := s.lowest()
	if fits {
		s.remember(shape, lambda)
	}
	return lambda
}

func (m *ends) pinned() bool {
	return !m.sways[0] && !m.sways[1] && m.spring[0] == 0 && m.spring[1] == 0
}

func (s *solver) remember(shape uniformShape, lambda float64) {
	if s.known == nil || len(s.known) >= remembered {
		s.known = make(map[uniformShape]float64)
	}
	s.known[shape] = lambda
}

// stepped returns lambda for the forces of a combination over the reference
// force, at least one of them compression.
func (s *solver) stepped(m *ends, restraints []float64, L float64, c *design.Combination, reference float64) float64 {
	s.begin(restraints, L)
	s.stepsAt, s.forces = s.stepsAt[:0], s.forces[:0]
	for _, step := range c.Steps {
		x := step.Height / L
		if x > 0 && x < 1 {
			s.stepsAt = append(s.stepsAt, s.node(x))
			s.forces = append(s.forces, step.NEd/reference)
		}
	}
	s.build(m, c.NEdAt(0)/reference, s.stepsAt, s.forces)
	return s.lowest()
}

// begin lays the nodes at the ends and the restraints.
func (s *solver) begin(restraints []float64, L float64) {
	s.heights, s.restrain = append(s.heights[:0], 0), append(s.restrain[:0], false)
	for _, x := range restraints {
		s.heights, s.restrain = append(s.heights, x/L), append(s.restrain, true)
	}
	s.heights, s.restrain = append(s.heights, 1), append(s.restrain, false)
}

// node returns the height of the node at x, laying one unless a node stands
// within the snapping distance.
func (s *solver) node(x float64) float64 {
	i := 0
	for s.heights[i] < x {
		i++
	}
	switch {
	case s.heights[i]-x < snap:
		return s.heights[i]
	case x-s.heights[i-1] < snap:
		return s.heights[i-1]
	}
	s.heights = append(s.heights, 0)
	copy(s.heights[i+1:], s.heights[i:])
	s.heights[i] = x
	s.restrain = append(s.restrain, false)
	copy(s.restrain[i+1:], s.restrain[i:])
	s.restrain[i] = false
	return x
}

// build numbers the free displacements and makes the parts, with the force n
// at the bottom and the given forces above the given heights.
func (s *solver) build(m *ends, n float64, stepsAt, forces []float64) {
	s.parts, s.springs, s.dofs = s.parts[:0], s.springs[:0], 0
	lower := [2]int{}
	for i, x := range s.heights {
		here := s.free(m, i)
		if i > 0 {
			from := s.heights[i-1]
			for j, at := range stepsAt {
				if at <= from {
					n = forces[j]
				}
			}
			s.parts = append(s.parts, part{x - from, n, [4]int{lower[0], lower[1], here[0], here[1]}})
		}
		lower = here
	}
	s.grow()
}

// free numbers the free displacements of node i and notes an end's spring.
func (s *solver) free(m *ends, i int) (dof [2]int) {
	dof = [2]int{-1, -1}
	next := func() int { s.dofs++; return s.dofs - 1 }
	end := -1
	switch i {
	case 0:
		end = 0
	case len(s.heights) - 1:
		end = 1
	}
	if end >= 0 && m.sways[end] || end < 0 && !s.restrain[i] {
		dof[0] = next()
	}
	if end >= 0 && math.IsInf(m.spring[end], 1) {
		return dof
	}
	dof[1] = next()
	if end >= 0 && m.spring[end] > 0 {
		s.springs = append(s.springs, dofSpring{dof[1], m.spring[end]})
	}
	return dof
}

// grow makes room for the matrix and finds the scale.
func (s *solver) grow() {
	n := s.dofs
	if cap(s.k) < n*n {
		s.k = make([]float64, n*n)
	}
	if cap(s.eigen) < n {
		s.eigen, s.scale = make([]float64, n), make([]float64, n)
		s.work = make([]float64, 40*n)
	}
	s.k, s.eigen, s.scale = s.k[:n*n], s.eigen[:n], s.scale[:n]
	for i := range s.scale {
		s.scale[i] = 1
	}
	s.assemble(0)
	for i := range s.scale {
		s.scale[i] = 1 / math.Sqrt(s.k[i*n+i])
	}
}

// assemble fills the matrix for load factor lambda.
func (s *solver) assemble(lambda float64) {
	clear(s.k)
	for i := range s.parts {
		p := &s.parts[i]
		l := p.length
		q := lambda * p.n * l * l
		f, fc := stabilityFunctions(q)
		a, b := (f+fc)/(l*l), (2*(f+fc)-q)/(l*l*l)
		s.add(p, [10]float64{b, a, -b, a, f / l, -a, fc / l, b, -a, f / l})
	}
	for _, sp := range s.springs {
		s.k[sp.dof*s.dofs+sp.dof] += sp.k * s.scale[sp.dof] * s.scale[sp.dof]
	}
}

// add adds a part's matrix, its upper triangle row by row.
func (s *solver) add(p *part, k [10]float64) {
	at := 0
	for i, row := range p.dof {
		for _, col := range p.dof[i:] {
			if row >= 0 && col >= 0 {
				s.k[row*s.dofs+col] += k[at] * s.scale[row] * s.scale[col]
			}
			at++
		}
	}
}

// least returns the lowest eigenvalue of the stiffness matrix at lambda: zero
// at a critical load, positive below the lowest.
func (s *solver) least(lambda float64) float64 {
	s.assemble(lambda)
	if s.dofs == 1 {
		return s.k[0]
	}
	a := blas64.Symmetric{N: s.dofs, Stride: s.dofs, Data: s.k, Uplo: blas.Upper}
	lapack64.Syev(lapack.EVNone, a, s.eigen, s.work, len(s.work))
	return s.eigen[0]
}
