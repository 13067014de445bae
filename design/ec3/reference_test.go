package ec3_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// The reference below goes the plain way: one function from section and column
// to the greatest utilisation, every rule spelt out, nothing reused, the
// critical load of coupled modes as an eigenvalue. It shares the reading of
// the standard with the package, so it holds the wiring, not the clauses;
// published_test.go holds those.

type reference struct {
	s       *catalogue.Section
	nominal int
	fy      float64
	gM0     float64
	gM1     float64
}

func (r reference) class() int {
	eps := math.Sqrt(235 / r.fy)
	s := r.s
	grade := func(ratio, c1, c2, c3 float64) int {
		switch {
		case ratio <= c1:
			return 1
		case ratio <= c2:
			return 2
		case ratio <= c3:
			return 3
		}
		return 4
	}
	web := func(c, t float64) int { return grade(c/t, 33*eps, 38*eps, 42*eps) }
	flange := func(c, t float64) int { return grade(c/t, 9*eps, 10*eps, 14*eps) }
	switch s.Shape {
	case catalogue.ShapeI:
		return max(web(s.H-2*s.Tf-2*s.R, s.Tw), flange((s.B-s.Tw)/2-s.R, s.Tf))
	case catalogue.ShapeChannel:
		return max(web(s.H-2*s.Tf-2*s.R, s.Tw), flange(s.B-s.Tw-s.R, s.Tf))
	case catalogue.ShapeRHS:
		return max(web(s.H-3*s.Tw, s.Tw), web(s.B-3*s.Tw, s.Tw))
	case catalogue.ShapeCHS:
		return grade(s.H/s.Tw, 50*eps*eps, 70*eps*eps, 90*eps*eps)
	}
	if s.H/s.Tw <= 15*eps && (s.B+s.H)/(2*s.Tw) <= 11.5*eps {
		return 3
	}
	return 4
}

// area returns A or A_eff; 0 where class 4 is not covered.
func (r reference) area() float64 {
	s := r.s
	if r.class() < 4 {
		return s.A
	}
	eps := math.Sqrt(235 / r.fy)
	webLoss := func(c, t float64) float64 {
		l := c / t / (28.4 * eps * 2)
		if l <= 0.5+math.Sqrt(0.03) {
			return 0
		}
		return (1 - (l-0.22)/(l*l)) * c * t
	}
	switch s.Shape {
	case catalogue.ShapeI:
		a := s.A - webLoss(s.H-2*s.Tf-2*s.R, s.Tw)
		c := (s.B-s.Tw)/2 - s.R
		if l := c / s.Tf / (28.4 * eps * math.Sqrt(0.43)); l > 0.748 {
			a -= 4 * (1 - math.Min(1, (l-0.188)/(l*l))) * c * s.Tf
		}
		return a
	case catalogue.ShapeRHS:
		return s.A - 2*webLoss(s.H-3*s.Tw, s.Tw) - 2*webLoss(s.B-3*s.Tw, s.Tw)
	}
	return 0
}

// alphas returns the imperfection factors about y-y and z-z; 0 where there is
// no curve.
func (r reference) alphas() (y, z float64) {
	const a0, a, b, c, d = 0.13, 0.21, 0.34, 0.49, 0.76
	s := r.s
	pick := func(y, z, y460, z460 float64) (float64, float64) {
		if r.nominal == 460 {
			return y460, z460
		}
		return y, z
	}
	switch s.Shape {
	case catalogue.ShapeI:
		switch {
		case s.H > 1.2*s.B && s.Tf > 100:
			return 0, 0
		case s.H > 1.2*s.B && s.Tf > 40:
			return pick(b, c, a, a)
		case s.H > 1.2*s.B:
			return pick(a, b, a0, a0)
		case s.Tf > 100:
			return pick(d, d, c, c)
		}
		return pick(b, c, a, a)
	case catalogue.ShapeAngle:
		return b, b
	case catalogue.ShapeCHS, catalogue.ShapeRHS:
		if s.Finish == catalogue.HotFinished {
			return pick(a, a, a0, a0)
		}
	}
	return c, c
}

func (r reference) resists(alpha, ncr float64) float64 {
	n := r.area() * r.fy
	l := math.Sqrt(n / ncr)
	if l <= 0.2 {
		return n / r.gM1
	}
	phi := (1 + alpha*(l-0.2) + l*l) / 2
	return n / r.gM1 / (phi + math.Sqrt(phi*phi-l*l))
}

type span struct{ from, to, lcr float64 }

// spans cuts a column about an axis by method segment.
func spans(h *design.Hold, length float64) []span {
	if h.Lcr > 0 {
		return []span{{0, length, h.Lcr}}
	}
	if h.K > 0 {
		return []span{{0, length, h.K * length}}
	}
	points := append(append([]float64{0}, h.Restraints...), length)
	var list []span
	for i := 1; i < len(points); i++ {
		ends := [2]design.Condition{}
		if i == 1 {
			ends[0] = h.Bottom.Condition
		}
		if i == len(points)-1 {
			ends[1] = h.Top.Condition
		}
		k := 1.0
		switch ends {
		case [2]design.Condition{design.Fixed, design.Fixed}:
			k = 0.7
		case [2]design.Condition{design.PartlyFixed, design.PartlyFixed}:
			k = 0.85
		default:
			if ends[0] == design.Fixed || ends[1] == design.Fixed {
				k = 0.85
			}
		}
		list = append(list, span{points[i-1], points[i], k * (points[i] - points[i-1])})
	}
	return list
}

func twistSpans(col *design.Column) []span {
	switch t, z := &col.Torsion, &col.Z; {
	case t.LT > 0:
		return []span{{0, col.Length, t.LT}}
	case t.Given:
		return spans(&design.Hold{Restraints: t.Restraints}, col.Length)
	case z.Lcr > 0:
		return []span{{0, col.Length, z.Lcr}}
	case z.K > 0:
		return []span{{0, col.Length, max(1, z.K) * col.Length}}
	}
	return spans(&design.Hold{Restraints: col.Z.Restraints}, col.Length)
}

// coupled returns the least load at which flexure about y-y and z-z (u-u and
// v-v) and twist buckle together.
func coupled(ny, nz, nt, y0, z0, i0 float64) float64 {
	m := mat.NewSymDense(3, nil)
	m.SetSym(0, 0, 1/ny)
	m.SetSym(1, 1, 1/nz)
	m.SetSym(2, 2, 1/nt)
	m.SetSym(0, 2, y0/i0/math.Sqrt(ny*nt))
	m.SetSym(1, 2, z0/i0/math.Sqrt(nz*nt))
	var e mat.EigenSym
	if !e.Factorize(m, false) {
		return math.NaN()
	}
	return 1 / e.Values(nil)[2]
}

// utilisation returns the greatest over everything.
func (r reference) utilisation(col *design.Column, set *design.Settings) float64 {
	s, u := r.s, 0.0
	growth := set.Growth
	if growth == 0 {
		growth = 1
	}
	alphaY, alphaZ := r.alphas()
	euler := func(i, lcr float64) float64 { return math.Pi * math.Pi * design.E * i / (lcr * lcr) }
	for k := range col.Combinations {
		c := &col.Combinations[k]
		heights, forces := []float64{0}, []float64{c.NEd}
		for _, step := range c.Steps {
			heights, forces = append(heights, step.Height), append(forces, step.NEd)
		}
		heights = append(heights, col.Length)
		// greatest compression between two heights, own weight at the lower
		// one; within the parts, own weight at the foot of each.
		press := func(from, to float64) float64 {
			n := math.Inf(-1)
			for i, f := range forces {
				if heights[i] < to && heights[i+1] > from {
					n = max(n, growth*f)
				}
			}
			return n + set.SelfWeight*9.81/1000*s.Mass*(col.Length-from)
		}
		for i, f := range forces {
			u = max(u, -growth*f/(s.A*r.fy/r.gM0))
			u = max(u, press(heights[i], heights[i+1])/(r.area()*r.fy/r.gM0))
		}
		ys, zs := spans(&col.Y, col.Length), spans(&col.Z, col.Length)
		if s.Shape == catalogue.ShapeAngle {
			for _, y := range ys {
				for _, z := range zs {
					if y.from < z.to && z.from < y.to {
						n, lcr := max(press(y.from, y.to), press(z.from, z.to)), max(y.lcr, z.lcr)
						u = max(u, n/r.resists(alphaY, euler(s.Iu, lcr)), n/r.resists(alphaZ, euler(s.Iv, lcr)))
					}
				}
			}
		} else {
			for _, y := range ys {
				u = max(u, press(y.from, y.to)/r.resists(alphaY, euler(s.Iy, y.lcr)))
			}
			for _, z := range zs {
				u = max(u, press(z.from, z.to)/r.resists(alphaZ, euler(s.Iz, z.lcr)))
			}
		}
		if s.Shape == catalogue.ShapeCHS || s.Shape == catalogue.ShapeRHS {
			continue
		}
		for _, t := range twistSpans(col) {
			longest := func(spans []span) float64 {
				l := 0.0
				for _, x := range spans {
					if x.from < t.to && t.from < x.to {
						l = max(l, x.lcr)
					}
				}
				return l
			}
			y0, z0, iy, iz, ly, lz := s.Y0, 0.0, s.Iy, s.Iz, longest(ys), longest(zs)
			if s.Shape == catalogue.ShapeAngle {
				y0, z0, iy, iz = s.U0, s.V0, s.Iu, s.Iv
				ly = max(ly, lz)
				lz = ly
			}
			i0 := math.Sqrt((s.Iy+s.Iz)/s.A + y0*y0 + z0*z0)
			nt := (design.G*s.It + euler(s.Iw, t.lcr)) / (i0 * i0)
			u = max(u, press(t.from, t.to)/r.resists(alphaZ, coupled2(s, euler(iy, ly), euler(iz, lz), nt, y0, z0, i0)))
		}
	}
	return u
}

// coupled2 leaves flexure about an axis without offset out of the coupling: it
// is checked on its own.
func coupled2(s *catalogue.Section, ny, nz, nt, y0, z0, i0 float64) float64 {
	if s.Shape == catalogue.ShapeI {
		return nt
	}
	if z0 == 0 {
		nz = 1e30
	}
	return coupled(ny, nz, nt, y0, z0, i0)
}

func TestAssessAgainstThePlainWay(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := anySettings(t)
		set.Method = design.MethodSegment
		s := anySection(t)
		g := grade(t, rapid.SampledFrom([]string{"S235", "S275", "S355", "S420", "S460"}).Draw(t, "grade"))
		c, err := ec3.NewCandidate(s, g, set)
		fy, noStrength := g.Fy(set.National.Strength, s)
		if noStrength != nil {
			require.Error(t, err)
			return
		}
		r := reference{s, g.Nominal, fy, set.National.GammaM0, set.National.GammaM1}
		if y, _ := r.alphas(); y == 0 || r.area() == 0 {
			var refusal *ec3.Refusal
			require.ErrorAs(t, err, &refusal)
			return
		}
		require.NoError(t, err)
		assert.Equal(t, r.class(), c.Class)
		assert.InEpsilon(t, r.area(), c.AEff, 1e-12)
		col := anyColumn(t)
		want := r.utilisation(col, set)
		got := assess(t, col, c, set).Utilisation
		// Rounding alone; nearly equal eigenvalues cost half the figures.
		assert.InDelta(t, want, got, 1e-8*(1+want))
	})
}
