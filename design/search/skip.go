package search

import "sort"

// stairs holds the running maximum of a quantity over candidates in their
// order. Area is not monotonic in nominal mass, but its running maximum is, so
// bisection on it finds the first candidate that can possibly have enough.
type stairs []float64

func climb(n int, of func(i int) float64) stairs {
	s := make(stairs, n)
	top := 0.0
	for i := range s {
		top = max(top, of(i))
		s[i] = top
	}
	return s
}

// from returns the first i at which the running maximum reaches need; every
// candidate before it has less.
func (s stairs) from(need float64) int {
	return sort.SearchFloat64s(s, need)
}

// skipTable passes over the candidates that are too small for a column by
// necessary conditions alone: N_Ed <= limit A fy/gM0 and, as chi is at most
// 1/lambdaBar^2, N_Ed <= limit N_cr/gM1 about each axis.
type skipTable struct {
	strength       stairs // A_eff fy/max(gM0, gM1), N
	stiffZ, stiffY stairs // N_cr L_cr^2/gM1, N mm2
}

func newSkipTable(rows []axialRow, ratio float64) skipTable {
	stiff := func(c, k float64) float64 { return 1 / (c * k * k) }
	return skipTable{
		strength: climb(len(rows), func(i int) float64 { return 1 / (rows[i].c * max(1, ratio)) }),
		stiffZ:   climb(len(rows), func(i int) float64 { return stiff(rows[i].c, rows[i].kz) }),
		stiffY:   climb(len(rows), func(i int) float64 { return stiff(rows[i].c, rows[i].ky) }),
	}
}

// start returns the first candidate that the necessary conditions let through.
func (t *skipTable) start(d *demand) int {
	const slack = 1 - guard
	i := t.strength.from(d.n * slack)
	for _, p := range d.z {
		i = max(i, t.stiffZ.from(p.n*p.l*p.l*slack))
	}
	for _, p := range d.y {
		i = max(i, t.stiffY.from(p.n*p.l*p.l*slack))
	}
	return i
}
