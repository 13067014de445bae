package search

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"
)

// Every force and length is covered by a point that is kept, no point is
// covered by another, and no point is made up.
func TestWorstCoversAll(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		few := rapid.Float64Range(-1, 4)
		whole := rapid.Map(rapid.IntRange(-1, 4), func(i int) float64 { return float64(i) })
		either := rapid.OneOf(few, whole)
		all := rapid.SliceOf(rapid.Custom(func(t *rapid.T) point {
			return point{either.Draw(t, "n"), either.Draw(t, "l")}
		})).Draw(t, "all")
		var kept []point
		for _, p := range all {
			kept = worst(kept, p.n, p.l)
		}
		covers := func(a, b point) bool { return a.n >= b.n && a.l >= b.l }
		for _, p := range all {
			found := p.n <= 0
			for _, k := range kept {
				found = found || covers(k, p)
			}
			assert.True(t, found, "%v is not covered by %v", p, kept)
		}
		for i, k := range kept {
			assert.Contains(t, all, k)
			for j, other := range kept {
				assert.False(t, i != j && covers(other, k), "%v covers %v", other, k)
			}
		}
	})
}
