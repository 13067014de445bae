package building

import (
	"bufio"
	"context"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/search"
)

// The few sizes of mid-size buildings, with stacks, splices that cost, groups
// and given sections, against a general-purpose solver of mixed-integer
// problems that is given the same choice as an LP file. The two share what
// passes and what it weighs, and nothing of how the least is found.
func TestFewSizesAgainstGeneralSolver(t *testing.T) {
	glpsol, err := exec.LookPath("glpsol")
	if err != nil {
		t.Skip("glpsol is not here: install glpk-utils to have few sizes solved another way")
	}
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	set := design.Settings{National: uk, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1}
	e, err := search.New(catalogue.Default(), set)
	require.NoError(t, err)
	for seed, tc := range []struct {
		columns, most int
		options       Options
	}{
		{60, 4, Options{}},
		{40, 3, Options{Splices: EveryNth, Every: 2}},
		{28, 4, Options{Splices: WhereItPays, SpliceCost: 40}},
		{80, 6, Options{}},
	} {
		t.Run(fmt.Sprintf("%d columns, %d sizes, %s", tc.columns, tc.most, [...]string{"as scheduled", "counted", "where it pays"}[tc.options.Splices]), func(t *testing.T) {
			cols := midSize(rand.New(rand.NewPCG(uint64(seed), 7)), tc.columns)
			p := problemOf(t, e, cols, tc.options)
			solutions, err := p.FewSizes(context.Background(), tc.most)
			require.NoError(t, err)
			for _, s := range solutions {
				if s.K < 2 {
					continue // seen by hand
				}
				require.True(t, s.Proven, "%d sizes", s.K)
				want, feasible := solved(t, glpsol, p, s.K)
				require.Equal(t, feasible, s.Choice != nil, "%d sizes", s.K)
				if feasible {
					// The solver stops within 1e-7 of its bound (its default) and prints nine digits.
					assert.InEpsilon(t, want, s.Cost, 1e-6, "%d sizes", s.K)
				}
			}
		})
	}
}

// midSize is a building of stacks of up to six lengths.
func midSize(r *rand.Rand, columns int) []design.Column {
	var cols []design.Column
	for s := 0; len(cols) < columns; s++ {
		n, length, top := 3e5+4e6*r.Float64(), 3000+2000*r.Float64(), 1+r.IntN(6)
		for level := range top {
			c := length1(fmt.Sprintf("S%d", s), level, n*float64(top-level)/float64(top), length)
			c.Choice = design.Choice{}
			c.Splice, c.SpliceSaid = r.IntN(2) == 0, true
			c.Quantity = 1 + r.IntN(3)
			if r.IntN(10) == 0 {
				c.Group = [...]string{"G1", "G2"}[r.IntN(2)]
			}
			if c.Group == "" && r.IntN(15) == 0 {
				c.Given = "203x203x60 UKC"
			}
			c.Cell = fmt.Sprintf("Columns!A%d", len(cols)+2)
			cols = append(cols, c)
		}
	}
	return cols
}

// problemOf makes the problem that Size would solve.
func problemOf(t *testing.T, e *search.Engine, cols []design.Column, o Options) *problem {
	t.Helper()
	o.MostSizes = 1 // few sizes: every set is decided on
	set := e.Settings()
	all, notes := stacks(cols, &o, &set)
	r := &run{engine: e, cols: cols, options: &o, plan: tie(cols, all), workers: 1, doubts: notes, notes: map[int]string{}}
	options, err := r.mayHave(context.Background())
	require.NoError(t, err)
	b := &builder{engine: e, cols: cols, plan: r.plan, options: options}
	silent := b.silent()
	links := r.sound(b, r.plan.bridge(silent))
	p := b.build(r.wanted(silent, links), r.spliceCost(), links, false)
	require.NoError(t, r.servable(p))
	return p
}

// solved returns the least cost that the general solver finds with k sizes, and
// whether there is a choice.
func solved(t *testing.T, glpsol string, p *problem, k int) (cost float64, feasible bool) {
	t.Helper()
	dir := t.TempDir()
	lp, out := filepath.Join(dir, "sizes.lp"), filepath.Join(dir, "sizes.out")
	require.NoError(t, os.WriteFile(lp, []byte(lpFile(p, k)), 0o666))
	log, err := exec.Command(glpsol, "--lp", lp, "--cuts", "--tmlim", "100", "--output", out).CombinedOutput()
	require.NoError(t, err, "%s", log)
	text, err := os.ReadFile(out)
	require.NoError(t, err)
	status := regexp.MustCompile(`(?m)^Status: +(.*)$`).FindStringSubmatch(string(text))
	require.NotNil(t, status, "%s", text)
	switch strings.TrimSpace(status[1]) {
	case "INTEGER OPTIMAL":
	case "INTEGER EMPTY", "INFEASIBLE (FINAL)", "UNDEFINED", "INTEGER UNDEFINED":
		require.Contains(t, string(log), "HAS NO", "the solver says so")
		return 0, false
	default:
		require.Fail(t, "the solver did not finish", status[1])
	}
	found := regexp.MustCompile(`(?m)^Objective: +\S+ = (\S+)`).FindStringSubmatch(string(text))
	require.NotNil(t, found, "%s", text)
	cost, err = strconv.ParseFloat(found[1], 64)
	require.NoError(t, err)
	return cost, true
}

// lpFile writes the problem in CPLEX LP form: y_j says that size j is in use,
// x_n_j that node n has it, s_l that there is a splice at link l.
func lpFile(p *problem, k int) string {
	var b strings.Builder
	w := bufio.NewWriter(&b)
	fmt.Fprintln(w, "Minimize\n cost:")
	var rows, binaries []string
	x := func(c, n, j int) string { return fmt.Sprintf("x_%d_%d_%d", c, n, j) }
	used := make([]bool, p.Sizes)
	for c, chain := range p.Chains {
		for n, node := range chain.Nodes {
			var one []string
			for j, v := range node.Cost {
				if math.IsInf(v, 1) {
					continue
				}
				used[j] = true
				fmt.Fprintf(w, " + %.9f %s\n", v, x(c, n, j))
				one = append(one, x(c, n, j))
				rows = append(rows, fmt.Sprintf("%s - y_%d <= 0", x(c, n, j), j))
				binaries = append(binaries, x(c, n, j))
			}
			rows = append(rows, strings.Join(one, " + ")+" = 1")
		}
		for l, link := range chain.Links {
			rows = append(rows, standing(p, c, l, x)...)
			if link.SpliceCost > 0 {
				s := fmt.Sprintf("s_%d_%d", c, l)
				fmt.Fprintf(w, " + %.9f %s\n", link.SpliceCost, s)
				for j, v := range chain.Nodes[link.Above].Cost {
					if math.IsInf(v, 1) {
						continue
					}
					row := x(c, link.Above, j) + " - " + s + " <= 0"
					if !math.IsInf(chain.Nodes[link.Below].Cost[j], 1) {
						row = x(c, link.Above, j) + " - " + x(c, link.Below, j) + " - " + s + " <= 0"
					}
					rows = append(rows, row)
				}
			}
		}
	}
	var all []string
	for j, ok := range used {
		if ok {
			all = append(all, fmt.Sprintf("y_%d", j))
		}
	}
	rows = append(rows, strings.Join(all, " + ")+fmt.Sprintf(" <= %d", k))
	fmt.Fprintln(w, "Subject To")
	for _, row := range rows {
		fmt.Fprintln(w, " "+strings.ReplaceAll(row, " + ", "\n + "))
	}
	fmt.Fprintln(w, "Binary\n "+strings.Join(append(binaries, all...), "\n "))
	fmt.Fprintln(w, "End")
	w.Flush()
	return b.String()
}

// standing says of a link which size may stand on which: a size above asks for
// one of those below on which it may stand.
func standing(p *problem, c, l int, x func(c, n, j int) string) (rows []string) {
	link := p.Chains[c].Links[l]
	above, below := p.Chains[c].Nodes[link.Above], p.Chains[c].Nodes[link.Below]
	for j, v := range above.Cost {
		if math.IsInf(v, 1) {
			continue
		}
		row := x(c, link.Above, j)
		for i, u := range below.Cost {
			if !math.IsInf(u, 1) && (i == j || p.MayStand(i, j)) {
				row += " - " + x(c, link.Below, i)
			}
		}
		rows = append(rows, row+" <= 0")
	}
	return rows
}
