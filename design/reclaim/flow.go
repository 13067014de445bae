package reclaim

import "slices"

// flow is the relaxation: rows may be served in part, and from several kinds.
// Its nodes are the classes and, behind them, the rows.
type flow struct {
	rows    []Row
	classes []class
	entries [][]int // by row: the classes through which it may be served
	value   []gain  // by row: of one piece
	order   []int   // rows of the greatest value first

	sent [][]int   // by row and entry: pieces
	rest []int     // by row: pieces not served
	used []int     // by class: pieces taken
	up   []int     // by class: pieces of longer classes that stand in for it
	in   [][]entry // by class: the rows that may enter there
	hold [][]entry // by class: the rows that are served through it
	sum  gain

	dist   []gain
	known  []bool
	from   []step
	queue  []int
	queued []bool
}

// entry is a row's place in a class.
type entry struct{ row, slot int }

// step is how a node was reached.
type step struct {
	node int // -1: from the source
	slot int // of a row's entry: along it, or back where back is set
	back bool
}

func newFlow(rows []Row, classes []class, entries [][]int, value []gain) *flow {
	n := len(classes) + len(rows)
	f := &flow{rows: rows, classes: classes, entries: entries, value: value,
		sent: make([][]int, len(rows)), rest: make([]int, len(rows)), used: make([]int, len(classes)), up: make([]int, len(classes)),
		in: make([][]entry, len(classes)), hold: make([][]entry, len(classes)), dist: make([]gain, n), known: make([]bool, n), from: make([]step, n), queued: make([]bool, n)}
	for i := range rows {
		f.rest[i] = rows[i].Pieces
		f.sent[i] = make([]int, len(entries[i]))
		f.order = append(f.order, i)
	}
	slices.SortStableFunc(f.order, func(a, b int) int { return value[b].compare(value[a]) })
	for _, i := range f.order {
		for s, c := range entries[i] {
			f.in[c] = append(f.in[c], entry{i, s})
		}
	}
	return f
}

// solve sends flow along paths of the greatest gain while there is any.
func (f *flow) solve() {
	for {
		end, g := f.search()
		if end < 0 || g.compare(gain{}) <= 0 {
			return
		}
		f.augment(end, g)
	}
}

// search finds the path of the greatest gain from the source to a class with a
// piece left (Bellman and Ford: gains may be negative). It returns that class.
func (f *flow) search() (end int, g gain) {
	clear(f.known)
	f.queue = f.queue[:0]
	for c := range f.classes {
		for len(f.in[c]) > 0 && f.rest[f.in[c][0].row] == 0 {
			f.in[c] = f.in[c][1:] // a row that is served stays so
		}
		if len(f.in[c]) > 0 {
			e := f.in[c][0]
			f.relax(c, f.value[e.row], step{node: -1, slot: e.slot})
		}
	}
	for len(f.queue) > 0 {
		n := f.queue[0]
		f.queue = f.queue[1:]
		f.queued[n] = false
		if n < len(f.classes) {
			f.fromClass(n)
		} else {
			f.fromRow(n)
		}
	}
	end = -1
	for c := range f.classes {
		if !f.known[c] || f.used[c] == f.classes[c].number {
			continue
		}
		if v := f.dist[c].minus(gain{left: f.classes[c].mass}); end < 0 || v.compare(g) > 0 {
			end, g = c, v
		}
	}
	return end, g
}

// relax reaches a node with a gain, if none greater is known.
func (f *flow) relax(n int, g gain, by step) {
	if f.known[n] && f.dist[n].compare(g) >= 0 {
		return
	}
	f.known[n], f.dist[n], f.from[n] = true, g, by
	if !f.queued[n] {
		f.queued[n] = true
		f.queue = append(f.queue, n)
	}
}

// fromClass goes on to longer pieces, back to shorter ones that longer stand in
// for, takes a piece back, or takes it from a row that has one here.
func (f *flow) fromClass(c int) {
	g := f.dist[c]
	if c+1 < len(f.classes) && f.classes[c+1].kind == f.classes[c].kind {
		f.relax(c+1, g, step{node: c})
	}
	if c > 0 && f.up[c-1] > 0 {
		f.relax(c-1, g, step{node: c, back: true})
	}
	for _, e := range f.hold[c] {
		f.relax(len(f.classes)+e.row, g.minus(f.value[e.row]), step{node: c, slot: e.slot, back: true})
	}
}

// fromRow serves a row, from which a piece was taken, through another class.
func (f *flow) fromRow(n int) {
	i := n - len(f.classes)
	for s, c := range f.entries[i] {
		f.relax(c, f.dist[n].plus(f.value[i]), step{node: n, slot: s})
	}
}

// augment sends one piece along the path that ends in a class.
func (f *flow) augment(end int, g gain) {
	f.used[end]++
	f.sum = f.sum.plus(g)
	for n := end; ; {
		by := f.from[n]
		switch {
		case by.node < 0: // from the source through a row
			row := f.in[n][0].row
			f.rest[row]--
			f.send(row, by.slot, 1)
			return
		case n >= len(f.classes): // a row gives a piece of its class back
			f.send(n-len(f.classes), by.slot, -1)
		case by.node >= len(f.classes): // a row takes another
			f.send(by.node-len(f.classes), by.slot, 1)
		case by.back:
			f.up[n]--
		default:
			f.up[by.node]++
		}
		n = by.node
	}
}

// send changes what a row gets through an entry.
func (f *flow) send(row, slot, pieces int) {
	before := f.sent[row][slot]
	f.sent[row][slot] += pieces
	c := f.entries[row][slot]
	switch {
	case before == 0:
		f.hold[c] = append(f.hold[c], entry{row, slot})
	case f.sent[row][slot] == 0:
		f.hold[c] = slices.DeleteFunc(f.hold[c], func(e entry) bool { return e == entry{row, slot} })
	}
}

// split returns the first row, the most valuable first, that is served in part
// or from several kinds, and the entry through which it has the most; -1: there
// is none, and the flow is an assignment.
func (f *flow) split() (row, slot int) {
	for _, i := range f.order {
		best, total := 0, 0
		for s, n := range f.sent[i] {
			total += n
			if n > f.sent[i][best] {
				best = s
			}
		}
		if total > 0 && f.sent[i][best] < f.rows[i].Pieces {
			return i, best
		}
	}
	return -1, -1
}
