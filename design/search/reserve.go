package search

import (
	"math"

	"stanchion/design"
	"stanchion/design/ec3"
)

// reserver finds by how much the axial force of a column could still grow in
// its section. It designs copies of the column under other axial forces; the
// moments stay.
type reserver struct {
	base      *ec3.Member
	candidate *ec3.Candidate

	col    design.Column // the copy
	steps  []design.Step // of all its combinations, one after another
	member ec3.Member
	assess ec3.Assessment
}

// findReserve fills the reserve of the column that was assessed last:
//
//   - Reserve, the factor on every axial force at which the first check reaches
//     the limit: below 1 where the column fails as it is, 0 where there is no
//     axial force or no factor helps;
//   - ReserveN, the compression that could be added to every part of every
//     combination until then, N, before growth. Where the column fails it is
//     negative, what would have to come off, or 0 if it still fails when the
//     part with the least compression has none left;
//   - ReserveCheck, the check that gives way first under the added compression.
func (w *worker) findReserve(m *ec3.Member, a *ec3.Assessment, res *design.Result) {
	limit := ec3.Limit(m.Column, m.Settings)
	least, most := forces(m.Column)
	low := -max(least, 0)
	if axialOnly(m) && uniform(m.Column) {
		linearReserve(m, a, limit, low, res)
		return
	}
	r := &w.reserve
	r.base, r.candidate = m, a.Candidate
	enough := 2 * limit * a.Candidate.NplRd / m.Growth // N_Ed above limit N_c,Rd never passes
	if top := max(most, -least); top > 0 {
		res.Reserve = reach(func(f float64) float64 { return r.utilisation(f, 0) }, limit, 0, 1, 2+enough/top)
	}
	res.ReserveN = reach(func(n float64) float64 { return r.utilisation(1, n) }, limit, low, 0, enough-least)
	r.utilisation(1, res.ReserveN)
	res.ReserveCheck = r.assess.Governing.Kind
}

// linearReserve is findReserve where every utilisation is the axial force over
// a resistance that does not depend on it.
func linearReserve(m *ec3.Member, a *ec3.Assessment, limit, low float64, res *design.Result) {
	if a.Utilisation > 0 {
		res.Reserve = limit / a.Utilisation
	}
	for i := range a.Checks {
		c := &a.Checks[i]
		if n := (limit*c.Rd - c.Ed) / m.Growth; i == 0 || n < res.ReserveN {
			res.ReserveN, res.ReserveCheck = n, c.Kind
		}
	}
	if res.ReserveN < low {
		res.ReserveN = 0
	}
}

// forces returns the least and the greatest axial force of a column, N.
func forces(col *design.Column) (least, most float64) {
	least, most = math.Inf(1), math.Inf(-1)
	for i := range col.Combinations {
		c := &col.Combinations[i]
		least, most = min(least, c.NEd), max(most, c.NEd)
		for _, s := range c.Steps {
			least, most = min(least, s.NEd), max(most, s.NEd)
		}
	}
	return least, most
}

// uniform reports whether the axial force is the same along the column in
// every combination.
func uniform(col *design.Column) bool {
	for i := range col.Combinations {
		if len(col.Combinations[i].Steps) > 0 {
			return false
		}
	}
	return true
}

// utilisation returns that of the column with its axial forces times f plus n.
func (r *reserver) utilisation(f, n float64) float64 {
	r.load(f, n)
	if r.member.Reset(&r.col, r.base.Settings) != nil {
		return math.Inf(1)
	}
	r.member.StandLike(r.base)
	r.member.Assess(r.candidate, &r.assess)
	return r.assess.Utilisation
}

// load makes the copy of the column with its axial forces times f plus n.
func (r *reserver) load(f, n float64) {
	combinations := r.col.Combinations[:0]
	r.col = *r.base.Column
	r.steps = r.steps[:0]
	for _, c := range r.base.Column.Combinations {
		from := len(r.steps)
		for _, s := range c.Steps {
			r.steps = append(r.steps, design.Step{Height: s.Height, NEd: s.NEd*f + n})
		}
		c.NEd = c.NEd*f + n
		c.Steps = r.steps[from:len(r.steps):len(r.steps)]
		combinations = append(combinations, c)
	}
	r.col.Combinations = combinations
}

// reach returns the greatest x up to which u stays within a limit, for a
// utilisation u that does not fall from where it is least: it is looked for
// above start if u(start) is within the limit, else between low and start.
// high is an x at which u is beyond the limit for certain. It returns 0 if u
// is beyond the limit at low and at start alike.
func reach(u func(float64) float64, limit, low, start, high float64) float64 {
	lo, hi := start, high
	if !ec3.Passes(u(start), limit) {
		if low >= start || !ec3.Passes(u(low), limit) {
			return 0
		}
		lo, hi = low, start
	}
	return crossing(func(x float64) float64 { return u(x) - limit }, lo, hi)
}

// precision is the relative width to which a crossing is closed in: five
// digits more than are shown.
const precision = 1e-9

// crossing returns a root of f between lo, where f is not above 0, and hi,
// where it is, by false position with the Illinois modification, and by
// bisection whenever that fails to halve the bracket in three steps. It
// returns the lower end of the last bracket.
func crossing(f func(float64) float64, lo, hi float64) float64 {
	flo, fhi := f(lo), f(hi)
	width, slow, side := hi-lo, 0, 0
	for range 200 {
		if hi-lo <= precision*max(math.Abs(lo), math.Abs(hi)) {
			break
		}
		x := lo - flo*(hi-lo)/(fhi-flo)
		if slow >= 3 || !(x > lo && x < hi) {
			x, slow = lo+(hi-lo)/2, 0
		}
		if fx := f(x); fx <= 0 {
			if side < 0 {
				fhi /= 2
			}
			lo, flo, side = x, fx, -1
		} else {
			if side > 0 {
				flo /= 2
			}
			hi, fhi, side = x, fx, 1
		}
		slow++
		if hi-lo <= width/2 {
			width, slow = hi-lo, 0
		}
	}
	return lo
}
