package project

// field is a reduced problem in which only some sizes are still open: one
// column a size.
type field struct {
	sizes    []int32   // by column: the size in the reduced problem
	rows     grid      // cost of the nodes that stand alone
	offers   [][]offer // of each row, the columns that serve it, cheapest first
	cost     grid      // cost of the nodes of strands
	strands  []strand
	relation *relation
	ranking  *ranking
	longest  int // nodes of the longest strand
}

// offer is a column that serves a row, and its cost there.
type offer struct {
	col  int32
	cost float64
}

// only is the field with these columns of it, given rising.
func (f *field) only(cols []int32, workers int) *field {
	o := &field{rows: f.rows.only(cols, workers), cost: f.cost.only(cols, workers), strands: f.strands, longest: f.longest}
	place := make([]int32, len(f.sizes))
	for j := range place {
		place[j] = -1
	}
	for k, j := range cols {
		place[j] = int32(k)
		o.sizes = append(o.sizes, f.sizes[j])
	}
	for _, offers := range f.offers {
		var kept []offer
		for _, had := range offers {
			if k := place[had.col]; k >= 0 {
				kept = append(kept, offer{k, had.cost})
			}
		}
		o.offers = append(o.offers, kept)
	}
	o.relate(f.relation.only(cols))
	return o
}

// relate sets which column may stand on which, where that is ever asked.
func (f *field) relate(r *relation) {
	f.relation = r
	if f.longest > 1 {
		f.ranking = newRanking(r)
	}
}

// solvers makes a solver of the field's strands for each worker.
func (f *field) solvers(workers int) []*chainSolver {
	out := make([]*chainSolver, workers)
	for w := range out {
		out[w] = newChainSolver(f.relation, f.ranking, f.longest)
	}
	return out
}

// sizesOf carries columns to the reduced problem's sizes.
func (f *field) sizesOf(cols []int32) []int32 {
	out := make([]int32, len(cols))
	for k, j := range cols {
		out[k] = f.sizes[j]
	}
	return out
}
