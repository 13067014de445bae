package project

// near is the part of the distance to the target by which the worth of columns
// may differ that share the last of the K places.
const near = 0.1

// spread finds how far each column is open for the next step. The K worthiest
// are what the bound counts, but close to the optimum many are worth nearly the
// same, and pushing K of them down at a time takes long. Columns whose worth lies
// within a band about that of the last place share in it: their average over the
// choices that are nearly best is an epsilon-subgradient, that of the sum of the
// K largest smoothed over the band (Nesterov, Mathematical Programming 103
// (2005), 127-152).
func (r *relaxation) spread(state []int8, distance float64) {
	clear(r.share)
	r.shared = r.shared[:0]
	fixed := 0
	for fixed < len(r.picked) && state[r.f.sizes[r.picked[fixed]]] == opened {
		r.give(r.picked[fixed], 1)
		fixed++
	}
	free, places := r.order[fixed:], float64(len(r.picked)-fixed)
	band := near * distance
	if band <= 0 || len(r.order) == len(r.picked) {
		for _, j := range r.picked[fixed:] {
			r.give(j, 1)
		}
		return
	}
	foot := r.foot(free, places, band)
	for _, j := range free {
		r.give(j, shareAt(r.worth[j], foot, band))
	}
}

func (r *relaxation) give(j int32, share float64) {
	if share > 0 {
		r.share[j] = share
		r.shared = append(r.shared, j)
	}
}

// shareAt rises from 0 at the foot of the band to 1 at its head.
func shareAt(worth, foot, band float64) float64 { return min(1, max(0, (worth-foot)/band)) }

// foot is where the band begins for the shares of the columns, given by falling
// worth, to fill the places.
func (r *relaxation) foot(free []int32, places, band float64) float64 {
	low, high := r.worth[free[len(free)-1]]-band, r.worth[free[0]]
	for range 50 { // halves the range to less than the rounding of a worth
		foot, sum := (low+high)/2, 0.0
		for _, j := range free {
			v := shareAt(r.worth[j], foot, band)
			if v == 0 {
				break
			}
			sum += v
		}
		if sum > places {
			low = foot
		} else {
			high = foot
		}
	}
	return low
}
