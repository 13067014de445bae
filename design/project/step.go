package project

// momentum is the part of the last step's direction that the next one keeps
// (Camerini, Fratta and Maffioli, Mathematical Programming Study 3 (1975),
// 26-34): plain subgradients zigzag.
const momentum = 0.9

// direction is that of the last step. Beside a turn of its own, every price of a
// node that is not nil moves with the node's shift: what is short of columns that
// the node pays, as with the u of a row, without which each column's price would
// have to find its way alone. Of the many turns few change at a time, while
// momentum fades all: they are kept as if nothing had faded, 1/fade times too
// large, and their square beside them. An ascent takes hundreds of steps, so that
// fade stays far above the smallest number.
type direction struct {
	multipliers           // u, and the turns of prices
	shift       []float64 // by node
	fade        float64
	square      []float64 // by part, of the turns
}

// ahead is no direction yet.
func (m *multipliers) ahead(parts int) direction {
	return direction{m.zero(), make([]float64, m.price.rows()), 1, make([]float64, parts)}
}

// rest forgets the direction.
func (d *direction) rest() {
	clear(d.u)
	clear(d.shift)
	clear(d.price.flat)
	clear(d.square)
	d.fade = 1
}

// only keeps the prices of these columns.
func (d *direction) only(cols []int32, s *search) direction {
	o := direction{d.multipliers.only(cols, s.workers), d.shift, d.fade, make([]float64, len(d.square))}
	each(s.workers, len(s.parts), func(_, i int) {
		from, to := s.parts[i].nodes(s.f.strands)
		for n := from; n < to; n++ {
			for _, g := range o.price.row(n) {
				o.square[i] += g * g * o.fade * o.fade
			}
		}
	})
	return o
}

// step turns the direction by the subgradient where the places are spread over
// nearly equal columns, and sets the length of the step that the next bound takes
// along it by Polyak's rule: the distance to the target over the square of the
// direction. It reports false where that is nil.
func (r *relaxation) step(state []int8, d *direction, distance float64) bool {
	r.spread(state, distance)
	d.fade *= momentum
	each(r.s.workers, len(r.tasks), func(_, i int) { r.turn(d, i) })
	square := 0.0
	for i := range r.tasks {
		square += r.tasks[i].square + d.square[i]
	}
	if square == 0 {
		return false
	}
	r.due, r.along = distance/square, d
	return true
}

// turn adds the subgradient of one part to the direction, and takes its square.
func (r *relaxation) turn(d *direction, part int) {
	p, t := &r.s.parts[part], &r.tasks[part]
	t.square = 0
	for i := p.rows[0]; i < p.rows[1]; i++ {
		g := momentum*d.u[i] + r.s.rowScale[i]*r.shortOf(i)
		d.u[i] = g
		t.square += g * g
	}
	d.square[part] *= momentum * momentum
	from, to := p.nodes(r.f.strands)
	for i := from; i < to; i++ {
		g := momentum*d.shift[i] + r.s.nodeScale[i]*r.nodeShortOf(i)
		d.shift[i] = g
		t.square += g * g
		d.square[part] += r.turnPrices(i, d, r.s.nodeScale[i])
	}
}

// shortOf is a row's subgradient: one, less the shares of columns that it pays.
func (r *relaxation) shortOf(row int) float64 {
	g := 1.0
	for _, o := range r.f.offers[row] {
		if o.cost >= r.u[row] {
			break
		}
		g -= r.share[o.col]
	}
	return g
}

// nodeShortOf is the same of a node: one if it pays the column that it takes,
// less the shares of columns that it pays.
func (r *relaxation) nodeShortOf(node int) float64 {
	price, g := r.price.row(node), 0.0
	if price[r.taken[node]] > 0 {
		g = 1
	}
	for _, j := range r.shared {
		if price[j] > 0 {
			g -= r.share[j]
		}
	}
	return g
}

// turnPrices turns the prices of a node: up by what is short of the column that
// it takes, down by the shares of columns that it pays without taking them. It
// returns what that adds to the square of the direction.
func (r *relaxation) turnPrices(node int, d *direction, scale float64) (square float64) {
	turn, price, taken := d.price.row(node), r.price.row(node), r.taken[node]
	add := func(j int32, g float64) {
		had := turn[j] * d.fade
		turn[j] += g / d.fade
		square += (had+g)*(had+g) - had*had
	}
	for _, j := range r.shared {
		if j != taken && price[j] > 0 {
			add(j, -scale*r.share[j])
		}
	}
	if short := 1 - r.share[taken]; short > 0 {
		add(taken, scale*short)
	}
	return square
}
