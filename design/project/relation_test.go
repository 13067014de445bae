package project

import (
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestStandingThatIsNoOrder(t *testing.T) {
	p := &Problem{Sizes: 3, MayStand: func(below, above int) bool { return above == below+1 }}
	p.Chains = []Chain{{Nodes: []Node{{make([]float64, 3)}}}}
	assert.EqualError(t, p.Validate(), "size 2 may stand on 1 and that on 0, but not the first on the last")
}

// TestSweepsAgreeWithEveryPairTried hands costs on over random orders, of which
// some sizes share all measures, and looks at every pair of sizes instead.
func TestSweepsAgreeWithEveryPairTried(t *testing.T) {
	shared := 0
	for seed := range uint64(200) {
		rng := rand.New(rand.NewPCG(seed, 5))
		m := 1 + rng.IntN(20)
		measures := make([][3]int, m)
		for j := range measures {
			measures[j] = [3]int{rng.IntN(4), rng.IntN(4), rng.IntN(3)}
		}
		p := &Problem{Sizes: m, MayStand: func(below, above int) bool {
			a, b := measures[above], measures[below]
			return a[0] <= b[0] && a[1] <= b[1] && a[2] <= b[2]
		}}
		r := p.relationOf(p.all())
		_, _, _, broken := r.broken()
		require.False(t, broken)
		k := newRanking(r)
		if k.up.more != nil {
			shared++
		}
		for _, down := range []bool{false, true} {
			cost, to := make([]float64, m), make([]float64, m)
			for j := range cost {
				cost[j] = math.Round(10 * rng.Float64())
				if rng.IntN(4) == 0 {
					cost[j] = math.Inf(1)
				}
			}
			splice := float64(rng.IntN(3))
			sweep, stands := &k.up, func(i, j int) bool { return r.mayStand(int32(i), int32(j)) }
			if down {
				sweep, stands = &k.down, func(i, j int) bool { return r.mayStand(int32(j), int32(i)) }
			}
			sweep.handOn(cost, to, make([]uint64, m), splice)
			for j := range to {
				want := cost[j]
				for i := range cost {
					if i != j && stands(i, j) {
						want = min(want, cost[i]+splice)
					}
				}
				require.Equal(t, want, to[j], "seed %d, size %d, down %v", seed, j, down)
			}
		}
	}
	assert.Greater(t, shared, 50, "orders in which sizes share a rank")
}
