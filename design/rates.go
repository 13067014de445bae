package design

// Rate returns what the objective makes least, per kg of steel: 1 by mass, the
// cost (per kg, from the rate per tonne) or the embodied carbon (per kg). A
// rate for "family grade" goes before one for the family, that before one for
// the grade, and that before the one for every other. It reports whether there
// is one.
func (r *Rates) Rate(family, grade string) (float64, bool) {
	switch r.Objective {
	case ByCost:
		v, ok := lookUp(r.CostPerTonne, family, grade)
		return v / 1000, ok
	case ByCarbon:
		return lookUp(r.CarbonPerKg, family, grade)
	}
	return 1, true
}

// Cost returns the cost of a tonne of steel and whether there is a rate for it.
func (r *Rates) Cost(family, grade string) (float64, bool) {
	return lookUp(r.CostPerTonne, family, grade)
}

// Carbon returns the embodied carbon of a kg of steel and whether there is a
// factor for it.
func (r *Rates) Carbon(family, grade string) (float64, bool) {
	return lookUp(r.CarbonPerKg, family, grade)
}

func lookUp(rates map[string]float64, family, grade string) (float64, bool) {
	for _, key := range [...]string{family + " " + grade, family, grade, ""} {
		if v, ok := rates[key]; ok {
			return v, true
		}
	}
	return 0, false
}
