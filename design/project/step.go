package project

// momentum is the part of the last step's direction that the next one keeps
// (Camerini, Fratta and Maffioli, Mathematical Programming Study 3 (1975),
// 26-34): plain subgradients zigzag.
const momentum = 0.9

// step moves the multipliers along the subgradient, and the direction of the
// last step, by Polyak's length: the distance to the target over the square of
// the direction. It reports false where that is nil.
func (r *relaxation) step(s *search, direction *multipliers, distance float64) bool {
	each(r.at.workers, len(r.tasks), func(_, i int) { r.turn(s, direction, &r.at.parts[i], &r.tasks[i]) })
	square := 0.0
	for i := range r.tasks {
		square += r.tasks[i].square
	}
	if square == 0 {
		return false
	}
	t := distance / square
	each(r.at.workers, len(r.tasks), func(_, i int) { r.move(s, direction, &r.at.parts[i], t) })
	return true
}

// turn adds the subgradient of one part to the direction, and takes its square.
func (r *relaxation) turn(s *search, direction *multipliers, p *part, t *task) {
	t.square = 0
	for i := p.rows[0]; i < p.rows[1]; i++ {
		g := momentum*direction.u[i] + s.rowScale[i]*r.shortOf(i)
		direction.u[i] = g
		t.square += g * g
	}
	from, to := r.nodes(p)
	for i := from; i < to; i++ {
		if len(r.level) > 0 {
			g := momentum*direction.level[i] + s.nodeScale[i]*r.levelShortOf(i)
			direction.level[i] = g
			t.square += g * g
			continue
		}
		t.square += r.turnPrices(i, direction.price.row(i), s.nodeScale[i])
	}
}

// shortOf is a row's subgradient: one, less the open columns that pay it.
func (r *relaxation) shortOf(row int) float64 {
	g := 1.0
	for _, o := range r.f.offers[row] {
		if o.cost >= r.u[row] {
			break
		}
		if r.pick[o.col] {
			g--
		}
	}
	return g
}

// levelShortOf is the same for a node of a strand while one level sets its
// prices: nothing, less the open columns, where it takes a column that it does
// not pay for.
func (r *relaxation) levelShortOf(node int) float64 {
	cost, level, g := r.f.cost.row(node), r.level[node], 0.0
	if cost[r.taken[node]] < level {
		g = 1
	}
	for _, j := range r.picked {
		if cost[j] < level {
			g--
		}
	}
	return g
}

// turnPrices is the same where every price of a node moves on its own: up where
// it takes a column that is not among the K, down where a column is open and
// the node pays for it without taking it.
func (r *relaxation) turnPrices(node int, direction []float64, scale float64) float64 {
	for j := range direction {
		direction[j] *= momentum
	}
	price, taken := r.price.row(node), r.taken[node]
	for _, j := range r.picked {
		if j != taken && price[j] > 0 {
			direction[j] -= scale
		}
	}
	if !r.pick[taken] {
		direction[taken] += scale
	}
	square := 0.0
	for _, g := range direction {
		square += g * g
	}
	return square
}

// move goes t times the direction in one part.
func (r *relaxation) move(s *search, direction *multipliers, p *part, t float64) {
	for i := p.rows[0]; i < p.rows[1]; i++ {
		r.u[i] += t * direction.u[i] * s.rowScale[i]
	}
	from, to := r.nodes(p)
	for i := from; i < to; i++ {
		scaled := t * s.nodeScale[i]
		if len(r.level) > 0 {
			r.level[i] += scaled * direction.level[i]
			continue
		}
		price, step := r.price.row(i), direction.price.row(i)
		for j := range price {
			price[j] = max(0, price[j]+scaled*step[j])
		}
	}
}

// nodes are those of a part's strands.
func (r *relaxation) nodes(p *part) (from, to int) {
	if p.strands[0] == p.strands[1] {
		return 0, 0
	}
	last := &r.f.strands[p.strands[1]-1]
	return r.f.strands[p.strands[0]].first, last.first + last.count
}
