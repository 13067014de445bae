package project

// relation says which of some sizes may stand on which: one table by the size
// below and the one above.
type relation struct {
	m     int
	bears []bool // bears[below*m+above]; nil where all nodes stand alone, and it is never asked
}

// relationOf tabulates the problem's rule for these sizes.
func (p *Problem) relationOf(sizes []int) *relation {
	r := &relation{m: len(sizes), bears: make([]bool, len(sizes)*len(sizes))}
	for i, below := range sizes {
		for j, above := range sizes {
			r.bears[i*r.m+j] = i == j || p.MayStand == nil || p.MayStand(below, above)
		}
	}
	return r
}

func (r *relation) mayStand(below, above int32) bool { return r.bears[int(below)*r.m+int(above)] }

// only is the relation between these columns of it.
func (r *relation) only(cols []int32) *relation {
	if r.bears == nil {
		return &relation{m: len(cols)}
	}
	o := &relation{m: len(cols), bears: make([]bool, len(cols)*len(cols))}
	for i, below := range cols {
		for j, above := range cols {
			o.bears[i*o.m+j] = r.mayStand(below, above)
		}
	}
	return o
}

// above is, for every size, the set of those that may stand on it.
func (r *relation) above() []bitset {
	sets := make([]bitset, r.m)
	for i := range sets {
		sets[i] = newBitset(r.m)
		for j := range int32(r.m) {
			if r.mayStand(int32(i), j) {
				sets[i].add(j)
			}
		}
	}
	return sets
}

// broken finds sizes a, b, c of which c may stand on b and b on a, but not c on
// a: what may stand where must be an order.
func (r *relation) broken() (a, b, c int32, found bool) {
	above := r.above()
	for a := range int32(r.m) {
		for b := range int32(r.m) {
			if !above[a].has(b) || above[b].within(above[a]) {
				continue
			}
			for c := range int32(r.m) {
				if above[b].has(c) && !above[a].has(c) {
					return a, b, c, true
				}
			}
		}
	}
	return 0, 0, 0, false
}
