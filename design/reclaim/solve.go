package reclaim

import (
	"context"
	"slices"
)

// mostNodes ends the branch and bound: the best so far stands then, with its
// bound. It is counted in relaxations, not in time, so that the same problem
// has the same answer everywhere.
const mostNodes = 2_000

// Solve assigns pieces to rows: it serves the most pieces that no new section
// can serve, then saves the most of new steel, and takes little steel at hand
// for it (the least, where every row is of one piece). The only error is that
// of ctx.
func (p *Problem) Solve(ctx context.Context) (*Solution, error) { return p.solve(ctx, mostNodes) }

func (p *Problem) solve(ctx context.Context, most int) (*Solution, error) {
	s := &solver{problem: p, classes: p.classes(), most: most}
	s.entries = p.entries(s.classes)
	for i := range p.Rows {
		r := &p.Rows[i]
		v := gain{saved: int64(r.Saves*scale + 0.5)}
		if r.Only {
			v[rescued] = 1
		}
		s.value = append(s.value, v)
	}
	if err := s.branch(ctx); err != nil {
		return nil, err
	}
	return s.solution(), nil
}

// solver is one branch and bound.
type solver struct {
	problem *Problem
	classes []class
	entries [][]int
	value   []gain
	most    int

	best    *flow // the best assignment so far
	bound   gain  // of what was left open
	open    bool
	sum     gain
	started bool
}

// node is a part of the search: the entries that rows may still use, and the
// rows that must be served.
type node struct {
	entries [][]int
	must    []bool
	bound   gain
}

// branch searches depth first, a row wholly served before one that is not.
func (s *solver) branch(ctx context.Context) error {
	stack := []node{{entries: s.entries, must: make([]bool, len(s.problem.Rows)), bound: gain{rescued: 1 << 60}}}
	for n := 0; len(stack) > 0; n++ {
		if err := ctx.Err(); err != nil {
			return err
		}
		top := stack[len(stack)-1]
		stack = stack[:len(stack)-1]
		if s.started && top.bound.worth(s.sum) <= 0 {
			continue
		}
		if n >= s.most {
			s.leaveOpen(top.bound)
			continue
		}
		stack = append(stack, s.explore(&top)...)
	}
	return nil
}

// explore solves the relaxation of a node and returns what it falls into, the
// part to look into first last.
func (s *solver) explore(n *node) []node {
	f := newFlow(s.problem.Rows, s.classes, n.entries, s.values(n.must))
	f.solve()
	need := 0
	for i, must := range n.must {
		if must {
			need += s.problem.Rows[i].Pieces
		}
	}
	if f.sum[forced] < int64(need) {
		return nil
	}
	bound := f.sum
	row, slot := f.split()
	if row < 0 {
		s.keep(f)
		return nil
	}
	s.keep(s.rounded(f, n))
	if s.started && bound.worth(s.sum) <= 0 {
		return nil
	}
	with, without := slices.Clone(n.entries), slices.Clone(n.entries)
	with[row] = []int{n.entries[row][slot]}
	without[row] = slices.Delete(slices.Clone(n.entries[row]), slot, slot+1)
	must := slices.Clone(n.must)
	must[row] = true
	return []node{{without, n.must, bound}, {with, must, bound}}
}

// values are those of the rows, with what must be served before all others.
func (s *solver) values(must []bool) []gain {
	out := slices.Clone(s.value)
	for i := range out {
		if must[i] {
			out[i][forced] = 1
		}
	}
	return out
}

// rounded is an assignment near a relaxation: the rows that it serves wholly
// keep their kind, and no others are served.
func (s *solver) rounded(f *flow, n *node) *flow {
	entries := make([][]int, len(f.rows))
	for i := range f.rows {
		for k, sent := range f.sent[i] {
			if sent == f.rows[i].Pieces {
				entries[i] = []int{f.entries[i][k]}
			}
		}
	}
	g := newFlow(f.rows, s.classes, entries, s.values(n.must))
	g.solve()
	if row, _ := g.split(); row >= 0 {
		return nil
	}
	return g
}

// keep takes an assignment that is better than the best so far. What must be
// served in one part of the search need not be in another.
func (s *solver) keep(f *flow) {
	if f == nil {
		return
	}
	sum := f.sum
	sum[forced] = 0
	if !s.started || sum.compare(s.sum) > 0 {
		s.best, s.sum, s.started = f, sum, true
	}
}

// leaveOpen notes the bound of a part that is not looked into.
func (s *solver) leaveOpen(bound gain) {
	if !s.open || bound.worth(s.bound) > 0 {
		s.bound, s.open = bound, true
	}
}

// solution reads the assignment off the best flow.
func (s *solver) solution() *Solution {
	rows := s.problem.Rows
	out := &Solution{Kind: make([]int, len(rows)), Uses: make([][]Use, len(rows)), Proven: true}
	byClass := make([][]int, len(s.classes)) // rows served through each class
	for i := range rows {
		out.Kind[i] = -1
		for k, sent := range s.best.sent[i] {
			if sent > 0 {
				c := s.best.entries[i][k]
				out.Kind[i] = s.classes[c].kind
				byClass[c] = append(byClass[c], i)
				out.Saved += rows[i].Saves * float64(rows[i].Pieces)
			}
		}
	}
	s.handOut(byClass, out)
	out.Bound = out.Saved
	if s.open && s.bound.worth(s.sum) > 0 {
		out.Proven, out.Bound = false, max(out.Saved, float64(s.bound[saved])/scale)
	}
	return out
}

// handOut gives every row its pieces: of each kind the longest row first, the
// shortest pieces that are long enough.
func (s *solver) handOut(byClass [][]int, out *Solution) {
	free := make([]int, len(s.problem.Lots))
	for i := range s.problem.Lots {
		free[i] = s.problem.Lots[i].Number
	}
	taken := slices.Clone(s.best.used)
	for c := len(s.classes) - 1; c >= 0; c-- {
		for _, i := range byClass[c] {
			need := s.problem.Rows[i].Pieces
			for d := c; need > 0 && d < len(s.classes) && s.classes[d].kind == s.classes[c].kind; d++ {
				for _, lot := range s.classes[d].lots {
					n := min(need, free[lot], taken[d])
					if n > 0 {
						free[lot] -= n
						taken[d] -= n
						need -= n
						out.Uses[i] = append(out.Uses[i], Use{lot, n})
					}
				}
			}
		}
	}
}
