package project

// grid is a table of numbers, one row a node and one column a size, in one
// piece of memory.
type grid struct {
	m    int
	flat []float64
}

func newGrid(rows, m int) grid { return grid{m, make([]float64, rows*m)} }

func (g grid) row(i int) []float64 { return g.flat[i*g.m : (i+1)*g.m : (i+1)*g.m] }

func (g grid) rows() int {
	if g.m == 0 {
		return 0
	}
	return len(g.flat) / g.m
}

// only is the grid with these columns of it.
func (g grid) only(cols []int32) grid {
	o := newGrid(g.rows(), len(cols))
	for i := range g.rows() {
		from, to := g.row(i), o.row(i)
		for k, j := range cols {
			to[k] = from[j]
		}
	}
	return o
}
