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
func (g grid) only(cols []int32, workers int) grid {
	o := newGrid(g.rows(), len(cols))
	g.runs(workers, func(from, to int) {
		for i := from; i < to; i++ {
			had, row := g.row(i), o.row(i)
			for k, j := range cols {
				row[k] = had[j]
			}
		}
	})
	return o
}

// copy takes the values of from, which has the same shape.
func (g grid) copy(from grid, workers int) {
	g.runs(workers, func(a, b int) { copy(g.flat[a*g.m:b*g.m], from.flat[a*g.m:b*g.m]) })
}

// runs parts the rows among the workers where that is worth the trouble.
func (g grid) runs(workers int, work func(from, to int)) {
	const worth = 1 << 16 // numbers
	n := min(16, 1+len(g.flat)/worth)
	each(workers, n, func(_, i int) { work(g.rows()*i/n, g.rows()*(i+1)/n) })
}
