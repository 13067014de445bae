package project

import (
	"context"
	"math"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/require"
)

// TestFewestAgreesWithEverySetTried looks for the first number of sizes for
// which any set at all serves every node.
func TestFewestAgreesWithEverySetTried(t *testing.T) {
	for seed := range uint64(200) {
		rng := rand.New(rand.NewPCG(seed, 2))
		p := &Problem{Sizes: 3 + rng.IntN(7)}
		for range 2 + rng.IntN(10) {
			cost := make([]float64, p.Sizes)
			for j := range cost {
				cost[j] = math.Inf(1)
				if rng.Float64() < 0.35 {
					cost[j] = 1 + rng.Float64()
				}
			}
			p.Chains = append(p.Chains, Chain{Nodes: []Node{{cost}}})
		}
		want := 1
		for want <= p.Sizes && math.IsInf(bruteForce(p, want), 1) {
			want++
		}
		got, err := p.FewSizes(context.Background(), p.Sizes)
		require.NoError(t, err)
		for _, s := range got {
			require.True(t, s.Proven)
			require.Equal(t, s.K < want, s.Choice == nil, "seed %d, K %d, least %d", seed, s.K, want)
		}
	}
}
