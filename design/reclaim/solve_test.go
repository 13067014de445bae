package reclaim

import (
	"context"
	"math/rand/v2"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// small draws a problem that can be tried in every way.
func small(t *rapid.T, most int) *Problem {
	p := &Problem{}
	for range rapid.IntRange(1, 5).Draw(t, "lots") {
		p.Lots = append(p.Lots, Lot{
			Kind: rapid.IntRange(0, 2).Draw(t, "kind"), Length: 1000 * float64(rapid.IntRange(3, 6).Draw(t, "length")),
			Number: rapid.IntRange(0, 3).Draw(t, "number"),
		})
	}
	for i := range p.Lots {
		p.Lots[i].Mass = p.Lots[i].Length / 1000 * float64(20+10*p.Lots[i].Kind)
	}
	for range rapid.IntRange(0, 5).Draw(t, "rows") {
		r := Row{Pieces: rapid.IntRange(1, most).Draw(t, "pieces"), Length: 1000 * float64(rapid.IntRange(2, 6).Draw(t, "needed")),
			Saves: float64(rapid.IntRange(1, 9).Draw(t, "saves")), Only: rapid.IntRange(0, 5).Draw(t, "only") == 0}
		for k := range 3 {
			if rapid.Bool().Draw(t, "passes") {
				r.Kinds = append(r.Kinds, k)
			}
		}
		p.Rows = append(p.Rows, r)
	}
	return p
}

// tried is the best of every assignment: pieces are handed out one by one, and
// no use is made of classes or flows.
func tried(p *Problem) gain {
	free := make([]int, len(p.Lots))
	for i := range free {
		free[i] = p.Lots[i].Number
	}
	var best gain
	var sum gain
	var row func(i int)
	var piece func(i, kind, n, from int)
	row = func(i int) {
		if i == len(p.Rows) {
			if sum.compare(best) > 0 {
				best = sum
			}
			return
		}
		row(i + 1)
		for _, k := range p.Rows[i].Kinds {
			piece(i, k, p.Rows[i].Pieces, 0)
		}
	}
	piece = func(i, kind, n, from int) {
		if n == 0 {
			g := gain{saved: int64(p.Rows[i].Saves*scale) * int64(p.Rows[i].Pieces)}
			if p.Rows[i].Only {
				g[rescued] = int64(p.Rows[i].Pieces)
			}
			sum = sum.plus(g)
			row(i + 1)
			sum = sum.minus(g)
			return
		}
		for l := from; l < len(p.Lots); l++ {
			if p.Lots[l].Kind != kind || free[l] == 0 || p.Lots[l].Length < p.Rows[i].Length {
				continue
			}
			free[l]--
			sum[left] -= int64(p.Lots[l].Mass * scale)
			piece(i, kind, n-1, l)
			sum[left] += int64(p.Lots[l].Mass * scale)
			free[l]++
		}
	}
	row(0)
	return best
}

// worth adds a solution up from its pieces alone, and holds it against the
// rules: no piece twice, every piece long enough, of the row's kind, which
// passes, and a row served wholly or not at all.
func worth(t require.TestingT, p *Problem, s *Solution) gain {
	var g gain
	taken := make([]int, len(p.Lots))
	for i := range p.Rows {
		r, n := &p.Rows[i], 0
		for _, u := range s.Uses[i] {
			l := &p.Lots[u.Lot]
			require.Positive(t, u.Number)
			require.Equal(t, s.Kind[i], l.Kind)
			require.GreaterOrEqual(t, l.Length, r.Length-slack)
			taken[u.Lot] += u.Number
			n += u.Number
			g[left] -= int64(l.Mass*scale) * int64(u.Number)
		}
		if s.Kind[i] < 0 {
			require.Zero(t, n)
			continue
		}
		require.True(t, slices.Contains(r.Kinds, s.Kind[i]))
		require.Equal(t, r.Pieces, n)
		g[saved] += int64(r.Saves*scale) * int64(n)
		if r.Only {
			g[rescued] += int64(n)
		}
	}
	for l := range taken {
		require.LessOrEqual(t, taken[l], p.Lots[l].Number, "a piece twice")
	}
	return g
}

func TestSinglePiecesAgainstEveryAssignment(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := small(t, 1)
		s, err := p.Solve(context.Background())
		require.NoError(t, err)
		require.True(t, s.Proven)
		require.Equal(t, tried(p), worth(t, p, s), "%+v", p)
	})
}

func TestRowsOfSeveralPiecesAgainstEveryAssignment(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		p := small(t, 3)
		s, err := p.Solve(context.Background())
		require.NoError(t, err)
		require.True(t, s.Proven)
		got, want := worth(t, p, s), tried(p)
		require.Equal(t, want[rescued:left], got[rescued:left], "%+v", p)
		require.InDelta(t, float64(got[saved])/scale, s.Saved, 1e-9)
	})
}

// yard is a problem of a size that occurs: many rows against a few hundred
// pieces.
func yard(rows, lots, most int) *Problem {
	r := rand.New(rand.NewPCG(1, 2))
	p := &Problem{}
	const kinds = 25
	for range lots {
		k := r.IntN(kinds)
		length := 500 * float64(5+r.IntN(20))
		p.Lots = append(p.Lots, Lot{Kind: k, Length: length, Number: 1 + r.IntN(4), Mass: length / 1000 * float64(20+8*k)})
	}
	for range rows {
		row := Row{Pieces: 1 + r.IntN(most), Length: 2800 + 4000*r.Float64(), Saves: 60 + 500*r.Float64()}
		for k := r.IntN(kinds); k < kinds; k++ {
			if r.IntN(8) > 0 {
				row.Kinds = append(row.Kinds, k)
			}
		}
		p.Rows = append(p.Rows, row)
	}
	return p
}

// More at hand never saves less, and what is left open is said.
func TestLargeYard(t *testing.T) {
	last := 0.0
	for _, lots := range []int{20, 60} {
		p := yard(300, lots, 3)
		s, err := p.solve(context.Background(), 100)
		require.NoError(t, err)
		worth(t, p, s)
		t.Logf("%d lots: saved %.0f of at most %.0f, proven %v", lots, s.Saved, s.Bound, s.Proven)
		assert.GreaterOrEqual(t, s.Bound, s.Saved)
		assert.False(t, s.Proven, "so few relaxations prove nothing here")
		assert.Greater(t, s.Saved, last)
		last = s.Saved
	}
}

func TestCancel(t *testing.T) {
	ctx, stop := context.WithCancel(context.Background())
	stop()
	_, err := yard(10, 10, 1).Solve(ctx)
	assert.ErrorIs(t, err, context.Canceled)
}

func BenchmarkSinglePieces(b *testing.B) {
	p := yard(2000, 200, 1)
	for b.Loop() {
		if _, err := p.Solve(context.Background()); err != nil {
			b.Fatal(err)
		}
	}
}
