package building

import (
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/search"
)

// engineOf chooses from a dozen small UKC and UKB sections, so that every
// combination can be tried.
func engineOf(t testing.TB, change func(*design.Settings)) *search.Engine {
	t.Helper()
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	set := design.Settings{National: uk, Grades: []string{"S355"}, Families: []string{"UKC", "UKB"}, Limit: 1, Growth: 1}
	if change != nil {
		change(&set)
	}
	e, err := search.New(catalogue.Default(), set)
	require.NoError(t, err)
	return e
}

// tower is a building of a few stacks whose load falls from level to level,
// with splices, groups and given sections thrown in.
func tower(r *rand.Rand, most int) []design.Column {
	var cols []design.Column
	for s := 0; len(cols) < most; s++ {
		n := 2e5 + 1e6*r.Float64()
		length := 3000 + 2500*r.Float64()
		for level := range 1 + r.IntN(4) {
			c := length1(fmt.Sprintf("S%d", s), level, n*(1-0.25*float64(level)), length)
			c.Splice, c.SpliceSaid = r.IntN(2) == 0, true
			c.Quantity = 1 + r.IntN(3)
			if r.IntN(4) == 0 {
				c.Group = [...]string{"G1", "G2"}[r.IntN(2)]
			}
			if r.IntN(12) == 0 {
				c.Given = [...]string{"203x203x60 UKC", "152x152x30 UKC"}[r.IntN(2)]
				c.Group = ""
			}
			cols = append(cols, c)
		}
	}
	r.Shuffle(len(cols), func(i, j int) { cols[i], cols[j] = cols[j], cols[i] })
	for i := range cols {
		cols[i].Cell = fmt.Sprintf("Columns!A%d", i+2)
	}
	return cols
}

// length1 is a length of a stack from one level to the next.
func length1(stack string, level int, n, length float64) design.Column {
	return design.Column{
		Mark: stack + fmt.Sprint(level), Stack: stack, From: fmt.Sprintf("L%d", level), To: fmt.Sprintf("L%d", level+1),
		Quantity: 1, Length: length, Combinations: []design.Combination{{NEd: n}},
		Choice: design.Choice{MaxDepth: 225, MinWidth: 100},
	}
}

// total is the mass of all pieces.
func total(cols []design.Column, results []design.Result) float64 {
	sum := 0.0
	for i := range results {
		sum += results[i].Mass * float64(cols[i].Quantity)
	}
	return sum
}

// rules is the building as it is stated, for trying every combination: no use
// is made of sets, links or chains.
type rules struct {
	cols     []design.Column
	above    []int // the length that stands on it, -1: none
	sections []*catalogue.Section
	passes   [][]bool // by column and section
}

func newRules(t *testing.T, e *search.Engine, cols []design.Column, o *Options) *rules {
	t.Helper()
	ru := &rules{cols: cols}
	set := e.Settings()
	l, err := e.List(&cols[0].Choice, nil)
	require.NoError(t, err)
	for _, c := range l.Candidates {
		ru.sections = append(ru.sections, c.Section)
	}
	for i := range cols {
		row := passing(t, &cols[i], &set, l.Candidates)
		if cols[i].Given != "" {
			for j, c := range l.Candidates {
				row[j] = c.Section.Name() == cols[i].Given
			}
		}
		ru.passes = append(ru.passes, row)
		up := -1
		for k := range cols {
			if cols[k].Stack == cols[i].Stack && cols[k].From == cols[i].To {
				up = k
			}
		}
		ru.above = append(ru.above, up)
	}
	return ru
}

// passing says which candidates a column may have.
func passing(t *testing.T, col *design.Column, set *design.Settings, candidates []*ec3.Candidate) []bool {
	t.Helper()
	m, err := ec3.NewMember(col, set)
	require.NoError(t, err)
	var a ec3.Assessment
	out := make([]bool, len(candidates))
	for j, c := range candidates {
		m.Assess(c, &a)
		out[j] = ec3.Passes(a.Utilisation, 1)
	}
	return out
}

// splice says whether the section may change above a length.
func (ru *rules) splice(i int, o *Options) bool {
	switch o.Splices {
	case EveryNth:
		var level int
		fmt.Sscanf(ru.cols[i].From, "L%d", &level)
		return (level+1)%o.Every == 0
	case WhereItPays:
		return true
	}
	return ru.cols[i].Splice
}

// fits says whether a choice for two columns is allowed.
func (ru *rules) fits(i, j, si, sj int, o *Options) bool {
	if g := ru.cols[i].Group; g != "" && g == ru.cols[j].Group && si != sj {
		return false
	}
	if ru.above[i] == j {
		return ru.stands(i, si, sj, o)
	}
	if ru.above[j] == i {
		return ru.stands(j, sj, si, o)
	}
	return true
}

func (ru *rules) stands(below, sb, sa int, o *Options) bool {
	b, a := ru.sections[sb], ru.sections[sa]
	return sb == sa || ru.splice(below, o) && a.Mass <= b.Mass &&
		serialOf(a).depth <= serialOf(b).depth && serialOf(a).width <= serialOf(b).width
}

// least tries every combination and returns the least total, splices counted,
// with at most so many sections (0: any number); +Inf where there is none.
func (ru *rules) least(o *Options, most int) float64 {
	best := math.Inf(1)
	pick := make([]int, len(ru.cols))
	used := map[int]int{}
	var try func(i int, sum float64)
	try = func(i int, sum float64) {
		if sum >= best {
			return
		}
		if i == len(pick) {
			best = sum
			return
		}
		for j, s := range ru.sections {
			if !ru.passes[i][j] || most > 0 && used[j] == 0 && len(used) == most {
				continue
			}
			allowed, cost := true, s.Mass*ru.cols[i].Length/1000*float64(ru.cols[i].Quantity)
			for k := 0; k < i && allowed; k++ {
				allowed = ru.fits(k, i, pick[k], j, o)
				if o.Splices == WhereItPays && pick[k] != j && (ru.above[k] == i || ru.above[i] == k) {
					below := k
					if ru.above[i] == k {
						below = i
					}
					cost += o.SpliceCost * float64(ru.cols[below].Quantity)
				}
			}
			if !allowed {
				continue
			}
			pick[i] = j
			used[j]++
			try(i+1, sum+cost)
			if used[j]--; used[j] == 0 {
				delete(used, j)
			}
		}
	}
	try(0, 0)
	return best
}

func size(t testing.TB, e *search.Engine, cols []design.Column, o Options) *Decision {
	t.Helper()
	d, err := Size(context.Background(), e, cols, o, 2, nil)
	require.NoError(t, err)
	return d
}
