package project

// visit is a node of a chain in the order of the work: it hands its cost on to
// another, which comes later.
type visit struct {
	node, to int
	down     bool    // the other stands below
	splice   float64 // cost of a change of section between the two
}

// visits orders the nodes of a chain with links so that each comes before the
// one that it hands on to; the last, node 0, hands on to none.
func (c *Chain) visits() []visit {
	byNode := make([][]int, len(c.Nodes))
	for i, l := range c.Links {
		byNode[l.Below] = append(byNode[l.Below], i)
		byNode[l.Above] = append(byNode[l.Above], i)
	}
	seen := make([]bool, len(c.Nodes))
	seen[0] = true
	outward := []visit{{}} // from node 0 outwards: the order of the work, turned round
	for at := 0; at < len(outward); at++ {
		n := outward[at].node
		for _, i := range byNode[n] {
			l := &c.Links[i]
			v := visit{node: l.Below, to: l.Above, splice: l.SpliceCost}
			if v.to != n {
				v = visit{node: l.Above, to: l.Below, down: true, splice: l.SpliceCost}
			}
			if !seen[v.node] {
				seen[v.node] = true
				outward = append(outward, v)
			}
		}
	}
	for i, j := 0, len(outward)-1; i < j; i, j = i+1, j-1 {
		outward[i], outward[j] = outward[j], outward[i]
	}
	return outward
}

// isTree reports whether links that join all nodes close no ring.
func (c *Chain) isTree() bool { return len(c.Links) == len(c.Nodes)-1 }

// joined reports whether the links, where there are any, join all nodes.
func (c *Chain) joined() bool {
	if c.Links == nil {
		return true
	}
	for _, l := range c.Links {
		if l.Below < 0 || l.Above < 0 || l.Below >= len(c.Nodes) || l.Above >= len(c.Nodes) || l.Below == l.Above {
			return false
		}
	}
	return len(c.visits()) == len(c.Nodes)
}
