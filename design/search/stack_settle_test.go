package search

import (
	"context"
	"fmt"
	"hash/fnv"
	"math/rand/v2"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// building returns lengths on column lines of two to six storeys, with beam
// reactions at every floor, in a random order; some share a group, some have
// their section given.
func building(r *rand.Rand, lines int, grouped bool) []design.Column {
	var cols []design.Column
	for k := range lines {
		storeys := 2 + r.IntN(5)
		n := make([]float64, 2)
		line := make([]design.Column, storeys)
		for f := storeys - 1; f >= 0; f-- {
			c := design.Column{Mark: fmt.Sprintf("C%d", k), Stack: fmt.Sprintf("G%d", k), Cell: fmt.Sprintf("A%d-%d", k, f),
				From: fmt.Sprintf("L%d", f), To: fmt.Sprintf("L%d", f+1), Quantity: 1, Length: between(r, 2800, 6500)}
			if grouped && r.IntN(3) == 0 {
				c.Group = fmt.Sprintf("g%d", r.IntN(3))
			}
			if r.IntN(15) == 0 {
				c.Given = "203x203x60 UKC"
			}
			for q := range n {
				cb := design.Combination{Name: fmt.Sprintf("ULS%d", q+1), HasReactions: true,
					FlangeA: between(r, 0, 250e3), FlangeB: between(r, 0, 250e3), WebA: between(r, 0, 80e3), WebB: between(r, 0, 80e3)}
				n[q] += cb.FlangeA + cb.FlangeB + cb.WebA + cb.WebB
				cb.NEd = n[q]
				c.Combinations = append(c.Combinations, cb)
			}
			line[f] = c
		}
		cols = append(cols, line...)
	}
	r.Shuffle(len(cols), func(i, j int) { cols[i], cols[j] = cols[j], cols[i] })
	return cols
}

// stackSettings draws settings under which lengths depend on each other.
func stackSettings(t *rapid.T) design.Settings {
	n, err := ec3.NationalSet(rapid.SampledFrom([]string{"UK", "EN", "DE"}).Draw(t, "national"))
	require.NoError(t, err)
	set := design.Settings{National: n, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1, Moments: design.MomentsSimple}
	set.Interaction = rapid.SampledFrom([]design.Interaction{design.AnnexB, design.SimpleInteraction}).Draw(t, "interaction")
	set.SelfWeight = rapid.SampledFrom([]float64{0, 1.35}).Draw(t, "self-weight")
	if rapid.Bool().Draw(t, "grades") {
		set.Grades = []string{"S355", "S275"}
	}
	return set
}

// upright is a settled building put together again from its results alone: its
// lengths by their place, found by the names of levels.
type upright struct {
	t       require.TestingT
	e       *Engine
	cols    []design.Column
	results []design.Result
	chosen  []*ec3.Candidate
}

func newUpright(t require.TestingT, e *Engine, cols []design.Column, results []design.Result) *upright {
	u := &upright{t: t, e: e, cols: cols, results: results, chosen: make([]*ec3.Candidate, len(cols))}
	for i := range cols {
		u.chosen[i] = u.candidate(i, results[i].Section, results[i].Grade)
	}
	return u
}

func (u *upright) candidate(i int, section, grade string) *ec3.Candidate {
	col := u.cols[i]
	col.Given, col.Grades = section, []string{grade}
	l, err := u.e.givenIn(&col)
	require.NoError(u.t, err)
	return l.Candidates[0]
}

func (u *upright) beside(i int, upper bool) int {
	for j := range u.cols {
		if u.cols[j].Stack == u.cols[i].Stack && (upper && u.cols[j].From == u.cols[i].To || !upper && u.cols[j].To == u.cols[i].From) {
			return j
		}
	}
	return -1
}

// utilisation assesses a length beside the sections of the lengths above and
// below, with the weight of all above.
func (u *upright) utilisation(i int) float64 {
	set := u.e.Settings()
	m, err := ec3.NewMember(&u.cols[i], &set)
	require.NoError(u.t, err)
	next := func(upper bool) *ec3.Neighbour {
		j := u.beside(i, upper)
		if j < 0 {
			return nil
		}
		return &ec3.Neighbour{Column: &u.cols[j], Section: u.chosen[j].Section}
	}
	m.Between(next(false), next(true))
	for j := u.beside(i, true); j >= 0; j = u.beside(j, true) {
		m.Carried += set.SelfWeight * design.Gravity * u.chosen[j].Section.Mass * u.cols[j].Length / 1000
	}
	var a ec3.Assessment
	m.Assess(u.chosen[i], &a)
	return a.Utilisation
}

// allPass reports whether every length that passed does.
func (u *upright) allPass() bool {
	for i := range u.cols {
		if u.results[i].Status == design.Passes && !ec3.Passes(u.utilisation(i), 1) {
			return false
		}
	}
	return true
}

// Every length passes beside the sections that its neighbours were given, with
// the utilisation that its result states; and no set of lengths could take an
// earlier candidate without that failing.
func TestSettledStacksAreConsistent(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := stackSettings(t)
		e, err := New(catalogue.Default(), set)
		require.NoError(t, err)
		cols := building(drawn(t), 1+rapid.IntRange(0, 2).Draw(t, "lines"), rapid.Bool().Draw(t, "grouped"))
		results, err := e.SizeAll(context.Background(), cols, 2, nil)
		require.NoError(t, err)
		u := newUpright(t, e, cols, results)
		for i := range cols {
			r := &results[i]
			require.NotEqual(t, design.NotRead, r.Status, "%v", r.Notes)
			// Own weight is added up in another order here.
			assert.InEpsilon(t, r.Utilisation, u.utilisation(i), 1e-12)
			assert.Equal(t, r.Status == design.Passes, ec3.Passes(r.Utilisation, 1), "%+v", r)
		}
		for i := range cols {
			if results[i].Status == design.Passes && cols[i].Given == "" {
				u.tryEarlier(i)
			}
		}
	})
}

// tryEarlier puts every earlier candidate in the place of the one that the set
// of length i has.
func (u *upright) tryEarlier(i int) {
	var set []int
	for j := range u.cols {
		if j == i || u.cols[i].Group != "" && u.cols[j].Group == u.cols[i].Group {
			if u.cols[j].Given != "" {
				return
			}
			set = append(set, j)
		}
	}
	l, err := u.e.List(&u.cols[i].Choice, u.cols[i].Grades)
	require.NoError(u.t, err)
	had := slices.Clone(u.chosen)
	at := slices.Index(l.Candidates, had[i])
	require.GreaterOrEqual(u.t, at, 0)
	for _, c := range l.Candidates[:at] {
		for _, j := range set {
			u.chosen[j] = c
		}
		require.False(u.t, u.allPass(), "%s at %s would do in place of %s", nameIn(c), u.cols[i].Cell, nameIn(had[i]))
	}
	u.chosen = had
}

// The order of the rows and the number of workers decide nothing.
func TestSettlingDoesNotDependOnTheOrderOfRows(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := stackSettings(t)
		e, err := New(catalogue.Default(), set)
		require.NoError(t, err)
		r := drawn(t)
		cols := building(r, 3, true)
		results, err := e.SizeAll(context.Background(), cols, 1, nil)
		require.NoError(t, err)
		order := r.Perm(len(cols))
		turned := make([]design.Column, len(cols))
		for i, j := range order {
			turned[i] = cols[j]
		}
		again, err := e.SizeAll(context.Background(), turned, 3, nil)
		require.NoError(t, err)
		for i, j := range order {
			assert.Equal(t, results[j].Section, again[i].Section)
			assert.Equal(t, results[j].Grade, again[i].Grade)
			assert.Equal(t, results[j].Utilisation, again[i].Utilisation)
			assert.Equal(t, results[j].Status, again[i].Status)
		}
	})
}

// The steps end whatever the checks say: here verdicts are drawn at random from
// the candidates of a length and its neighbours, with no sense in them at all,
// and more than half of them fails. The moves stay within the bound that the
// proof gives, and what is not put aside passes at the end.
func TestSettlingEndsWhateverTheVerdicts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		set := stackSettings(t)
		e, err := New(catalogue.Default(), set)
		require.NoError(t, err)
		cols := building(drawn(t), 2, rapid.Bool().Draw(t, "grouped"))
		seed := rapid.Uint64().Draw(t, "verdicts")
		share := rapid.Uint64Range(1, 60).Draw(t, "share of passes, %")
		lines := stand(cols)
		single, groups := partition(cols, Size)
		_, _, clusters := split(single, groups, &lines)
		require.NotEmpty(t, clusters)
		for _, cluster := range clusters {
			results := make([]design.Result, len(cols))
			s := &settling{worker: e.worker(Size, new(bugs))}
			s.join(sorted(cluster, cols, &lines), cols, results)
			s.link(cols, &lines)
			places, asked := 0, 0
			for _, n := range s.nodes {
				places += len(n.list.Candidates)
			}
			verdict := func(l *length) bool {
				h := fnv.New64a()
				fmt.Fprint(h, seed, l.col.Cell, l.node.at)
				for _, other := range []*length{l.below, l.above} {
					if other != nil {
						fmt.Fprint(h, " ", other.node.at)
					}
				}
				return h.Sum64()%100 < share
			}
			lengths := 0
			for _, n := range s.nodes {
				lengths += len(n.lengths) + len(n.touched)
			}
			s.verdict = func(l *length) bool {
				asked++
				// Raising tries every place once and sweeps once a move; each
				// lowering move costs at most one sweep over all places.
				require.Less(t, asked, 4*lengths*places*(places+len(s.nodes)+2))
				return verdict(l)
			}
			s.choose()
			for _, n := range s.nodes {
				if n.aside {
					continue
				}
				for _, l := range n.lengths {
					assert.True(t, verdict(l))
				}
			}
		}
	})
}

// Levels that do not tell what stands on what are not guessed at.
func TestLinesOutOfOrderAreTakenApart(t *testing.T) {
	named := func(stack, mark, from, to string) design.Column {
		return design.Column{Stack: stack, Mark: mark, From: from, To: to}
	}
	pressed := func(n ...float64) design.Column {
		col := named("A", "", "", "")
		for _, f := range n {
			col.Combinations = append(col.Combinations, design.Combination{NEd: f})
		}
		return col
	}
	for _, tc := range []struct {
		name  string
		cols  []design.Column
		below []int
		note  string
	}{
		{"in order, however spelt", []design.Column{named("A", "", "Level 1", "roof"), named("A", "", "Base", "level  1")}, []int{1, -1}, ""},
		{"by mark", []design.Column{named("", "C1", "0", "1"), named("", "C1", "1", "2"), named("", "C2", "1", "2")}, []int{-1, 0, -1}, ""},
		{"marks without levels", []design.Column{named("", "C1", "", ""), named("", "C1", "", "")}, []int{-1, -1}, ""},
		{"levels missing", []design.Column{named("A", "", "0", "1"), named("A", "", "", "2")}, []int{-1, -1}, "neither levels nor axial forces tell"},
		{"numbers", []design.Column{named("A", "", "+3.90", "7.8"), named("A", "", "0", "3.9")}, []int{1, -1}, ""},
		{"by force", []design.Column{pressed(1, 2), pressed(7, 8), pressed(4, 3)}, []int{2, -1, 1}, "in order by their axial forces"},
		{"forces that disagree", []design.Column{pressed(1, 2), pressed(7, 8), pressed(4, 9)}, []int{-1, -1, -1}, "neither levels nor axial forces tell"},
		{"equal forces", []design.Column{pressed(1, 2), pressed(1, 2)}, []int{-1, -1}, "neither levels nor axial forces tell"},
		{"doubled above", []design.Column{named("A", "", "0", "1"), named("A", "", "1", "2"), named("A", "", "1", "3")}, []int{-1, -1, -1}, "two lengths begin at level 1"},
		{"doubled below", []design.Column{named("A", "", "0", "1"), named("A", "", "1", "2"), named("A", "", "0.5", "1")}, []int{-1, -1, -1}, "two lengths end at level 1"},
		{"ring", []design.Column{named("A", "", "1", "2"), named("A", "", "2", "1")}, []int{-1, -1}, "ring"},
		{"itself", []design.Column{named("A", "", "1", "1"), named("A", "", "2", "3")}, []int{-1, -1}, "begin at level 1"},
		{"gap", []design.Column{named("A", "", "0", "1"), named("A", "", "1", "2"), named("A", "", "3", "4")}, []int{-1, 0, -1}, "do not join"},
	} {
		s := stand(tc.cols)
		assert.Equal(t, tc.below, s.below, tc.name)
		for _, note := range s.notes {
			if tc.note == "" {
				assert.Empty(t, note, tc.name)
			} else {
				assert.Contains(t, note, tc.note, tc.name)
			}
		}
	}
}

// A length that cannot be read is nobody's neighbour, and the others say so.
func TestSettlingWithoutWhatCannotBeRead(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Moments = design.MomentsSimple
	e := engineOf(t, set)
	cols := building(random(3), 1, false)
	bad := slices.IndexFunc(cols, func(c design.Column) bool { return c.From == "L1" })
	cols[bad].Length = -1
	results, err := e.SizeAll(context.Background(), cols, 1, nil)
	require.NoError(t, err)
	for i := range cols {
		switch cols[i].From {
		case "L1":
			assert.Equal(t, design.NotRead, results[i].Status)
		case "L0":
			assert.Contains(t, fmt.Sprint(results[i].Notes), "the length above, "+cols[bad].Mark+" ("+cols[bad].Cell+"), has no section")
		case "L2":
			assert.Contains(t, fmt.Sprint(results[i].Notes), "the length below, "+cols[bad].Mark+" ("+cols[bad].Cell+"), has no section")
		}
	}
}

// Check proves the sections given, each beside those given above and below; and
// sections decided on elsewhere are proved in the same way.
func TestCheckedStacksAreThoseThatWereSettled(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Moments, set.SelfWeight = design.MomentsSimple, 1.35
	e := engineOf(t, set)
	cols := building(random(11), 6, false)
	sized, err := e.SizeAll(context.Background(), cols, 2, nil)
	require.NoError(t, err)
	u := newUpright(t, e, cols, sized)
	given := slices.Clone(cols)
	var chosen []Chosen
	for i := range given {
		given[i].Given = sized[i].Section
		chosen = append(chosen, Chosen{Set: Set{Columns: []int{i}}, Candidate: u.chosen[i]})
	}
	checked, err := e.CheckAll(context.Background(), given, 2, nil)
	require.NoError(t, err)
	assigned := make([]design.Result, len(cols))
	require.NoError(t, e.Assign(context.Background(), cols, chosen, assigned, 2, nil))
	for i := range cols {
		assert.Equal(t, sized[i].Utilisation, checked[i].Utilisation)
		assert.Equal(t, sized[i].Utilisation, assigned[i].Utilisation)
		assert.Equal(t, sized[i].Status == design.Passes, checked[i].Status == design.Passes)
		if checked[i].Status == design.Passes {
			assert.Positive(t, checked[i].ReserveN)
		}
	}
	assert.Error(t, Stream(context.Background(), e, Size, 1, jobs(cols), func(*Job[int]) error { return nil }))
}

func BenchmarkSettle(b *testing.B) {
	set := settingsOf(b, "UK")
	set.Families, set.Moments = []string{"UKC"}, design.MomentsSimple
	e := engineOf(b, set)
	cols := building(random(7), 500, false)
	for b.Loop() {
		if _, err := e.SizeAll(context.Background(), cols, 1, nil); err != nil {
			b.Fatal(err)
		}
	}
	perSecond(b, len(cols))
}

// What a line may have beside the sections to which it settles holds what it
// settled to. (Lighter ones may be among it: they make a neighbour fail.)
func TestOptionsOfSettledLines(t *testing.T) {
	set := settingsOf(t, "UK")
	set.Families, set.Moments, set.SelfWeight = []string{"UKC"}, design.MomentsSimple, 1.35
	e := engineOf(t, set)
	cols := building(random(21), 8, true)
	results, err := e.SizeAll(context.Background(), cols, 2, nil)
	require.NoError(t, err)
	single, groups := partition(cols, Size)
	sets := groups
	for _, i := range single {
		sets = append(sets, Set{Columns: []int{i}})
	}
	options, err := e.Options(context.Background(), cols, sets, 2)
	require.NoError(t, err)
	u := newUpright(t, e, cols, results)
	passing := 0
	for k := range sets {
		i := sets[k].Columns[0]
		if results[i].Status != design.Passes || options[k].Given {
			continue
		}
		passing++
		at := slices.Index(options[k].List.Candidates, u.chosen[i])
		require.GreaterOrEqual(t, at, 0)
		assert.True(t, options[k].Pass[at], cols[i].Cell)
	}
	assert.Greater(t, passing, 15)
}
