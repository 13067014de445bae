package ec3

import (
	"math"
)

// Axial holds the values of a candidate that the quick axial check reads:
// floats alone, side by side, so that a table of them runs through the cache.
type Axial struct {
	NcRd, NplRd    float64 // N
	NbRk           float64 // NRk/gammaM1: N_b,Rd at chi = 1, N
	LambdaY        float64 // lambdaBar per mm of buckling length
	LambdaZ        float64
	AlphaY, AlphaZ float64
	Mass           float64 // kg/m
}

func newAxial(c *Candidate) Axial {
	return Axial{
		NcRd: c.NcRd, NplRd: c.NplRd, NbRk: c.NRk / c.GammaM1,
		LambdaY: math.Sqrt(c.NRk / c.EulerY), LambdaZ: math.Sqrt(c.NRk / c.EulerZ),
		AlphaY: c.AlphaY, AlphaZ: c.AlphaZ, Mass: c.Section.Mass,
	}
}
