package project

// strand is a chain made ready for the work: where its nodes lie in the grid of
// costs, and the order in which they hand on.
type strand struct {
	first, count int
	visits       []visit // nil where the links close rings
	links        []Link  // where they close rings
}

// strand makes a chain ready whose nodes lie in the grid from first on.
func (c *Chain) strand(first int) strand {
	st := strand{first: first, count: len(c.Nodes)}
	switch {
	case c.Links == nil:
		for n := range c.Nodes {
			st.visits = append(st.visits, visit{node: n, to: n + 1, splice: c.SpliceCost})
		}
	case c.isTree():
		st.visits = c.visits()
	default:
		st.links = c.Links
	}
	return st
}

// longest is the number of nodes of the longest strand.
func longest(strands []strand) int {
	n := 0
	for i := range strands {
		n = max(n, strands[i].count)
	}
	return n
}
