package project

import (
	"sync/atomic"

	"golang.org/x/sync/errgroup"
)

// part is a run of rows and of strands that one worker prices at a time. Parts
// do not depend on the number of workers, and what they come to is added up in
// their order, so that neither do the answers.
type part struct {
	rows, strands [2]int // from, to
}

// A part is worth the trouble of handing it to another worker from so many rows
// or nodes on.
const (
	partRows  = 512
	partNodes = 48
)

// partsOf cuts a field into at most sixteen parts.
func partsOf(f *field) []part {
	rows, nodes := f.rows.rows(), f.cost.rows()
	n := min(16, max(1, rows/partRows+nodes/partNodes))
	parts := make([]part, n)
	for i := range parts {
		parts[i].rows = [2]int{rows * i / n, rows * (i + 1) / n}
		parts[i].strands = [2]int{len(f.strands) * i / n, len(f.strands) * (i + 1) / n}
	}
	return parts
}

// nodes are those of a part's strands.
func (p *part) nodes(strands []strand) (from, to int) {
	if p.strands[0] == p.strands[1] {
		return 0, 0
	}
	last := &strands[p.strands[1]-1]
	return strands[p.strands[0]].first, last.first + last.count
}

// each calls work for every i below n, on so many workers at once.
func each(workers, n int, work func(worker, i int)) {
	if workers = min(workers, n); workers < 2 {
		for i := range n {
			work(0, i)
		}
		return
	}
	var next atomic.Int64
	var g errgroup.Group
	for w := range workers {
		g.Go(func() error {
			for i := next.Add(1) - 1; i < int64(n); i = next.Add(1) - 1 {
				work(w, int(i))
			}
			return nil
		})
	}
	_ = g.Wait() // work cannot fail
}
