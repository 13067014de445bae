package project

// momentum is the part of the last step's direction that the next one keeps
// (Camerini, Fratta and Maffioli, Mathematical Programming Study 3 (1975),
// 26-34): plain subgradients zigzag.
const momentum = 0.9

// rest forgets the direction of earlier steps.
func (d *dual) rest() {
	d.uStep = make([]float64, len(d.u))
	d.levelStep, d.priceStep = nil, nil
	for _, l := range d.level {
		d.levelStep = append(d.levelStep, make([]float64, len(l)))
	}
	d.priceStep = clonePrices(d.price)
	for _, chain := range d.priceStep {
		for _, steps := range chain {
			clear(steps)
		}
	}
}

// step moves the multipliers along the subgradient by Polyak's length: the
// distance to the target over the gradient's square. It reports false where the
// gradient is nil.
func (d *dual) step(s *search, distance float64) bool {
	norm := 0.0
	for i, offers := range s.offers {
		g := 1.0
		for _, o := range offers {
			if o.cost >= d.u[i] {
				break
			}
			if d.pick[o.size] {
				g--
			}
		}
		g = momentum*d.uStep[i] + g*s.rowScale[i]
		d.uStep[i] = g
		norm += g * g
	}
	if d.level != nil {
		norm += d.levelGradient(s)
	} else {
		d.eachPrice(func(c, n, j int, g float64) {
			g = momentum*d.priceStep[c][n][j] + g*s.nodeScale[c][n]
			d.priceStep[c][n][j] = g
			norm += g * g
		})
	}
	if norm == 0 {
		return false
	}
	t := distance / norm
	for i, g := range d.uStep {
		d.u[i] += t * g * s.rowScale[i]
	}
	for c := range d.level {
		for n, g := range d.levelStep[c] {
			d.level[c][n] += t * g * s.nodeScale[c][n]
		}
	}
	if d.level != nil {
		return true
	}
	for c, chain := range d.price {
		for n, price := range chain {
			scaled := t * s.nodeScale[c][n]
			for j, g := range d.priceStep[c][n] {
				price[j] = max(0, price[j]+scaled*g)
			}
		}
	}
	return true
}

// levelGradient is the subgradient where one level a node sets its prices.
func (d *dual) levelGradient(s *search) float64 {
	norm := 0.0
	for c, levels := range d.level {
		for n, u := range levels {
			cost, g := s.r.chains[c].Nodes[n].Cost, 0.0
			if cost[d.taken[c][n]] < u {
				g = 1
			}
			for j, in := range d.pick {
				if in && cost[j] < u {
					g--
				}
			}
			g = momentum*d.levelStep[c][n] + g*s.nodeScale[c][n]
			d.levelStep[c][n] = g
			norm += g * g
		}
	}
	return norm
}

// eachPrice calls f with the subgradient of every chain price: up where a node
// takes a size that is not among the K, down where a size is open and the node
// pays for it without taking it.
func (d *dual) eachPrice(f func(c, n, j int, g float64)) {
	for c, chain := range d.price {
		for n, price := range chain {
			taken := d.taken[c][n]
			for j, in := range d.pick {
				switch {
				case j == taken && !in:
					f(c, n, j, 1)
				case j != taken && in && price[j] > 0:
					f(c, n, j, -1)
				default:
					f(c, n, j, 0)
				}
			}
		}
	}
}
