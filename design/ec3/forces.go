package ec3

import (
	"fmt"
	"math"

	"stanchion/design"
)

// Force is the extent of the axial force along the member in one combination,
// own weight left out, N, and the part of the member where each is reached.
type Force struct {
	Combination    int
	Greatest       float64 // greatest compression; negative where all is tension
	Least          float64 // greatest tension as a negative number; positive where there is none
	From, To       float64 // the part under Greatest, mm
	FromLow, ToLow float64 // the part under Least, mm
}

// finite refuses actions that are no numbers, so that nothing later compares
// with one.
func finite(c *design.Combination) error {
	if !isFinite(c.NEd) {
		return fmt.Errorf("N_Ed of combination %q is not a finite number", c.Name)
	}
	for _, s := range c.Steps {
		if !isFinite(s.NEd) || !isFinite(s.Height) {
			return fmt.Errorf("N_Ed of a segment of combination %q is not a finite number", c.Name)
		}
	}
	for _, v := range [...]float64{c.My.Bottom, c.My.Top, c.Mz.Bottom, c.Mz.Top, c.FlangeA, c.FlangeB, c.WebA, c.WebB} {
		if !isFinite(v) {
			return fmt.Errorf("a moment or reaction of combination %q is not a finite number", c.Name)
		}
	}
	return nil
}

func isFinite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// part returns the force in part k of a combination, growth left out, and
// where it acts: part 0 lies below the first step.
func part(c *design.Combination, k int, length float64) (n, from, to float64) {
	n, to = c.NEd, length
	if k > 0 {
		n, from = c.Steps[k-1].NEd, c.Steps[k-1].Height
	}
	if k < len(c.Steps) {
		to = c.Steps[k].Height
	}
	return n, from, to
}

// extent finds the greatest and least force of a combination.
func extent(c *design.Combination, index int, length, growth float64) Force {
	n, from, to := part(c, 0, length)
	f := Force{Combination: index, Greatest: n, Least: n, From: from, To: to, FromLow: from, ToLow: to}
	for k := 1; k <= len(c.Steps); k++ {
		n, from, to := part(c, k, length)
		if n > f.Greatest {
			f.Greatest, f.From, f.To = n, from, to
		}
		if n < f.Least {
			f.Least, f.FromLow, f.ToLow = n, from, to
		}
	}
	f.Greatest *= growth
	f.Least *= growth
	return f
}

// press returns the greatest compression in a combination, own weight of a
// section of this mass per metre included, and the part under it.
func (m *Member) press(index int, mass float64) (n, from, to float64) {
	f := &m.Forces[index]
	if m.WeightPerMass == 0 {
		return f.Greatest, f.From, f.To
	}
	c := &m.Column.Combinations[index]
	for k := 0; k <= len(c.Steps); k++ {
		force, low, high := part(c, k, m.Length)
		force = m.Growth*force + m.ownWeight(mass, low)
		if k == 0 || force > n {
			n, from, to = force, low, high
		}
	}
	return n, from, to
}

// ownWeight returns the weight, N, of a section of this mass per metre above a
// height and of the lengths that stand on it, with its load factor; 0 where
// self-weight is left out.
func (m *Member) ownWeight(mass, height float64) float64 {
	return m.WeightPerMass*(m.Length-height)*mass + m.Carried
}

// Weight returns the own weight, N, that the member in a section of this mass
// per metre hands to what it stands on: its own and what it carries.
func (m *Member) Weight(mass float64) float64 { return m.ownWeight(mass, 0) }
