package takeoff

import "math"

// Amounts is an amount of steel in whole numbers.
type Amounts struct {
	Lengths int64 // column lengths: the schedule's quantities
	Length  int64 // micrometres
	Mass    int64 // g
	Area    int64 // painted area, mm2
	Cost    int64 // millionths of the currency of the rates
	Carbon  int64 // embodied carbon, mg of CO2e
}

// Add adds b to a.
func (a *Amounts) Add(b Amounts) {
	a.Lengths += b.Lengths
	a.Length += b.Length
	a.Mass += b.Mass
	a.Area += b.Area
	a.Cost += b.Cost
	a.Carbon += b.Carbon
}

// times returns n times a.
func (a Amounts) times(n int64) Amounts {
	return Amounts{a.Lengths * n, a.Length * n, a.Mass * n, a.Area * n, a.Cost * n, a.Carbon * n}
}

// share returns a part of mass, cost and carbon, each rounded: an allowance
// adds no length and no painted area.
func (a Amounts) share(part float64) Amounts {
	of := func(n int64) int64 { return int64(math.Round(float64(n) * part)) }
	return Amounts{Mass: of(a.Mass), Cost: of(a.Cost), Carbon: of(a.Carbon)}
}

// Metres returns the length in m.
func (a Amounts) Metres() float64 { return float64(a.Length) / 1e6 }

// Tonnes returns the mass in t.
func (a Amounts) Tonnes() float64 { return float64(a.Mass) / 1e6 }

// SquareMetres returns the painted area in m2.
func (a Amounts) SquareMetres() float64 { return float64(a.Area) / 1e6 }

// Money returns the cost in the currency of the rates.
func (a Amounts) Money() float64 { return float64(a.Cost) / 1e6 }

// TonnesCO2e returns the embodied carbon in t of CO2e.
func (a Amounts) TonnesCO2e() float64 { return float64(a.Carbon) / 1e9 }
