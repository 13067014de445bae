package project

import (
	"cmp"
	"encoding/binary"
	"math"
	"slices"
)

// reduce makes a field with the same optima for every K and less in it: nodes
// that stand alone and rule out the same sizes at proportional costs are added
// up, and sizes that another one can always replace are left out. live are the
// problem's sizes that are left. Their order is kept, so that equal costs fall
// the same way.
func (p *Problem) reduce() (live []int, f *field) {
	rows, chains := p.split()
	live = p.undominated(rows, chains)
	f = &field{rows: newGrid(len(rows), len(live)), sizes: columns(len(live))}
	for i, row := range rows {
		pickOut(f.rows.row(i), row, live)
		f.offers = append(f.offers, offersOf(f.rows.row(i)))
	}
	nodes := 0
	for _, c := range chains {
		f.strands = append(f.strands, c.strand(nodes))
		nodes += len(c.Nodes)
	}
	f.longest = longest(f.strands)
	f.cost = newGrid(nodes, len(live))
	for k, c := range chains {
		for n := range c.Nodes {
			pickOut(f.cost.row(f.strands[k].first+n), c.Nodes[n].Cost, live)
		}
	}
	r := &relation{m: len(live)}
	if f.longest > 1 {
		r = p.relationOf(live)
	}
	f.relate(r)
	return live, f
}

// pickOut writes the costs of the live sizes to row.
func pickOut(row, cost []float64, live []int) {
	for k, j := range live {
		row[k] = cost[j]
	}
}

// columns counts from 0.
func columns(n int) []int32 {
	cols := make([]int32, n)
	for j := range cols {
		cols[j] = int32(j)
	}
	return cols
}

// offersOf lists the columns that serve a row, cheapest first.
func offersOf(row []float64) []offer {
	var out []offer
	for j, v := range row {
		if !math.IsInf(v, 1) {
			out = append(out, offer{int32(j), v})
		}
	}
	slices.SortStableFunc(out, func(a, b offer) int { return cmp.Compare(a.cost, b.cost) })
	return out
}

// split adds up the lone nodes that are alike and returns them as rows, and the
// chains of several nodes as they are.
func (p *Problem) split() (rows [][]float64, chains []*Chain) {
	seen := map[string]int{}
	for c := range p.Chains {
		chain := &p.Chains[c]
		if len(chain.Nodes) > 1 {
			chains = append(chains, chain)
			continue
		}
		cost := chain.Nodes[0].Cost
		key := shapeOf(cost)
		if at, ok := seen[key]; ok {
			for j, v := range cost {
				rows[at][j] += v
			}
			continue
		}
		seen[key] = len(rows)
		rows = append(rows, append([]float64(nil), cost...))
	}
	return rows, chains
}

// shapeOf is equal for cost lists that differ by a factor alone, to nine
// digits: lists told apart by rounding merely stay two rows.
func shapeOf(cost []float64) string {
	least := math.Inf(1)
	for _, v := range cost {
		if v < least {
			least = v
		}
	}
	if math.IsInf(least, 1) || least == 0 {
		least = 1
	}
	key := make([]byte, 0, 8*len(cost))
	for _, v := range cost {
		scaled := math.Float64bits(v)
		if !math.IsInf(v, 1) {
			scaled = uint64(math.Round(v / least * 1e9))
		}
		key = binary.LittleEndian.AppendUint64(key, scaled)
	}
	return string(key)
}

// undominated leaves out every size that another serves all nodes at no greater
// cost. Chains keep a size that they could use, for what may stand on it.
func (p *Problem) undominated(rows [][]float64, chains []*Chain) []int {
	used := make([]bool, p.Sizes)
	for _, c := range chains {
		for _, n := range c.Nodes {
			for j, v := range n.Cost {
				used[j] = used[j] || !math.IsInf(v, 1)
			}
		}
	}
	var live []int
	for j := range p.Sizes {
		if used[j] || !dominated(rows, live, j, p.Sizes) {
			live = append(live, j)
		}
	}
	return live
}

func dominated(rows [][]float64, live []int, j, sizes int) bool {
	serves := false
	for _, row := range rows {
		serves = serves || !math.IsInf(row[j], 1)
	}
	if !serves {
		return true
	}
	isLive := make([]bool, sizes)
	for _, i := range live {
		isLive[i] = true
	}
	for i := range sizes {
		if i == j || i < j && !isLive[i] {
			continue
		}
		if replaces(rows, i, j) {
			return true
		}
	}
	return false
}

// replaces reports whether size i can stand in for j everywhere at no greater
// cost; of two that are equal everywhere the first replaces the second.
func replaces(rows [][]float64, i, j int) bool {
	equal := true
	for _, row := range rows {
		if row[i] > row[j] {
			return false
		}
		equal = equal && row[i] == row[j]
	}
	return !equal || i < j
}
