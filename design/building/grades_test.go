package building

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/search"
)

// graded is one stack with every section in every grade, for trying every
// combination.
type graded struct {
	cols       []design.Column
	candidates []*ec3.Candidate
	passes     [][]bool // by column and candidate
	objective  func(*ec3.Candidate) float64
}

func newGraded(t *testing.T, e *search.Engine, cols []design.Column) *graded {
	t.Helper()
	set := e.Settings()
	l, err := e.List(&cols[0].Choice, nil)
	require.NoError(t, err)
	g := &graded{cols: cols, candidates: l.Candidates, objective: e.Objective}
	for i := range cols {
		g.passes = append(g.passes, passing(t, &cols[i], &set, l.Candidates))
	}
	return g
}

// least is the least total, a splice wherever section or grade changes, with
// at most so many sections (0: any number).
func (g *graded) least(splice float64, most int) float64 {
	best := math.Inf(1)
	var try func(i int, below *ec3.Candidate, sections []string, sum float64)
	try = func(i int, below *ec3.Candidate, sections []string, sum float64) {
		if sum >= best {
			return
		}
		if i == len(g.cols) {
			best = sum
			return
		}
		for j, c := range g.candidates {
			if !g.passes[i][j] || below != nil && below.Section != c.Section && !mayStand(below.Section, c.Section) {
				continue
			}
			now := sections
			if below == nil || below.Section != c.Section { // none comes back: each is lighter or smaller
				now = append(sections[:len(sections):len(sections)], c.Section.Name())
			}
			if most > 0 && len(now) > most {
				continue
			}
			cost := g.objective(c) * g.cols[i].Length / 1000
			if below != nil && below != c {
				cost += splice
			}
			try(i+1, c, now, sum+cost)
		}
	}
	try(0, nil, nil, 0)
	return best
}

// comesTo is what a decision costs, counted in the same way.
func (g *graded) comesTo(t *testing.T, d *Decision, splice float64) float64 {
	t.Helper()
	sum := 0.0
	var below *ec3.Candidate
	for i := range g.cols {
		r := &d.Results[i]
		require.Equal(t, design.Passes, r.Status)
		for _, c := range g.candidates {
			if c.Section.Name() != r.Section || c.Grade.Name != r.Grade {
				continue
			}
			sum += g.objective(c) * g.cols[i].Length / 1000
			if below != nil && below != c {
				sum += splice
			}
			below = c
			break
		}
	}
	return sum
}

// rated prices S355 a little above S275, so that a change of grade can pay.
func rated(s *design.Settings) {
	s.Grades = []string{"S275", "S355"}
	s.Families = []string{"UKC"}
	s.Rates = design.Rates{Objective: design.ByCost, CostPerTonne: map[string]float64{"S275": 1800, "S355": 1990}}
}

// Where a splice may stand above any length, a change of grade is one: the
// total is the least of every combination of sections and grades.
func TestAChangeOfGradeIsASplice(t *testing.T) {
	if testing.Short() {
		t.Skip("tries every combination: long, and nothing runs side by side")
	}
	for name, change := range map[string]func(*design.Settings){
		"mass": func(s *design.Settings) { s.Grades, s.Families = []string{"S275", "S355"}, []string{"UKC"} },
		"cost": rated,
	} {
		e := engineOf(t, change)
		for seed := range uint64(30) {
			r := rand.New(rand.NewPCG(seed, 7))
			var cols []design.Column
			for level := range 4 {
				c := length1("S", level, (1.2e6-2.5e5*float64(level))*(0.4+0.5*r.Float64()), 2800+1500*r.Float64())
				c.Cell = fmt.Sprintf("Columns!A%d", level+2)
				cols = append(cols, c)
			}
			o := Options{Splices: WhereItPays, SpliceCost: []float64{5, 30}[seed%2]}
			g := newGraded(t, e, cols)
			d := size(t, e, cols, o)
			require.InEpsilon(t, g.least(o.SpliceCost, 0), g.comesTo(t, d, o.SpliceCost), 1e-9, "%s, seed %d: sums in another order", name, seed)

			o.MostSizes = 3
			d = size(t, e, cols, o)
			for _, trade := range d.Curve {
				least := g.least(o.SpliceCost, trade.Most)
				require.LessOrEqual(t, trade.Bound, least*(1+1e-9), "%s, seed %d, %d sizes", name, seed, trade.Most)
				if trade.Proven {
					require.InEpsilon(t, least, trade.Total, 1e-9, "%s, seed %d, %d sizes", name, seed, trade.Most)
				}
			}
			last := d.Curve[len(d.Curve)-1]
			require.InEpsilon(t, last.Total, g.comesTo(t, d, o.SpliceCost), 1e-9, "%s, seed %d", name, seed)
		}
	}
}

// One section runs through in one grade where that costs nothing.
func TestAGradeRunsThrough(t *testing.T) {
	e := engineOf(t, func(s *design.Settings) { s.Grades = []string{"S275", "S355"} })
	cols := tall(1.05e6, 1.0e6)
	d := size(t, e, cols, Options{Splices: WhereItPays, SpliceCost: 50})
	require.Equal(t, d.Results[0].Section, d.Results[1].Section)
	assert.Equal(t, d.Results[0].Grade, d.Results[1].Grade)
}
