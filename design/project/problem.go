package project

import (
	"fmt"
	"math"
)

// Node is one decision: a column length, or lengths that must have one section.
type Node struct {
	Cost []float64 // by size; +Inf where the size does not pass every check
}

// Chain is a stack of nodes from the bottom up between which the section may
// change. A node that stands alone is a chain of one. Where groups tie several
// stacks together, Links say which node stands on which.
type Chain struct {
	Nodes []Node
	// SpliceCost is added where the section of a node differs from the one
	// below, in the units of Cost.
	SpliceCost float64
	// Links, if not nil, replace the order of the nodes and SpliceCost. They
	// join all nodes, and may close rings.
	Links []Link
}

// Link says that one node of a chain stands on another, and what a change of
// section between them costs.
type Link struct {
	Below, Above int
	SpliceCost   float64
}

// Problem is a project: its chains, and which size may stand on which.
type Problem struct {
	Sizes  int
	Chains []Chain
	// MayStand reports whether size above may stand on size below at a splice;
	// it is not asked for above == below. Nil allows every pair. It must be an
	// order: what may stand on a size may stand on whatever that may stand on.
	MayStand func(below, above int) bool
	// Workers is the number of goroutines that FewSizes may use, 0 for one a
	// processor. The answers do not depend on it.
	Workers int
}

// Choice is a size for every node, chain by chain.
type Choice [][]int

// Solution is the answer to a problem with at most K sizes.
type Solution struct {
	K      int
	Sizes  []int   // the sizes in use, rising
	Choice Choice  // nil where no K sizes can serve every node
	Cost   float64 // +Inf where Choice is nil
	Bound  float64 // no solution costs less
	Proven bool    // Cost is the optimum, or it is proven that there is none
}

// Gap returns what the solution may cost above the optimum, as a part of its cost.
func (s *Solution) Gap() float64 {
	if s.Proven || math.IsInf(s.Cost, 1) || s.Cost == 0 {
		return 0
	}
	return (s.Cost - s.Bound) / s.Cost
}

// Validate reports the first thing that is wrong with the problem's shape: a
// chain without nodes, a cost list of the wrong length, a cost that is negative
// or not a number, links that do not join the nodes, or sizes whose standing on
// each other is no order.
func (p *Problem) Validate() error {
	for c, chain := range p.Chains {
		if len(chain.Nodes) == 0 {
			return fmt.Errorf("chain %d has no nodes", c)
		}
		if !chain.joined() {
			return fmt.Errorf("chain %d: its links do not join its nodes", c)
		}
		for n, node := range chain.Nodes {
			if len(node.Cost) != p.Sizes {
				return fmt.Errorf("chain %d, node %d: %d costs for %d sizes", c, n, len(node.Cost), p.Sizes)
			}
			for j, v := range node.Cost {
				if math.IsNaN(v) || v < 0 {
					return fmt.Errorf("chain %d, node %d, size %d: cost %v", c, n, j, v)
				}
			}
		}
	}
	if a, b, c, found := p.relationOf(p.all()).broken(); found {
		return fmt.Errorf("size %d may stand on %d and that on %d, but not the first on the last", c, b, a)
	}
	return nil
}

// all lists every size.
func (p *Problem) all() []int {
	sizes := make([]int, p.Sizes)
	for j := range sizes {
		sizes[j] = j
	}
	return sizes
}
