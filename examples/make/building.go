package main

import "math"

// storey is one storey of the depot, with what its upper floor carries.
type storey struct {
	from, to string
	height   float64 // m
	g, q     float64 // permanent and imposed load of the upper floor, kN/m2
	wind     float64 // vertical force that the bracing below the upper floor adds, kN
}

// storeys from the ground up. The loads are invented, of the size usual for
// such uses.
var storeys = []storey{
	{"L0", "L1", 6.2, 5.2, 7.5, 118}, // bus hall below, parts store above
	{"L1", "L2", 4.0, 5.0, 5.0, 96},  // workshop above
	{"L2", "L3", 3.6, 4.8, 3.5, 74},  // offices above
	{"L3", "L4", 3.6, 4.8, 3.5, 52},
	{"L4", "Roof", 4.2, 3.0, 2.0, 31}, // plant on the roof
}

const (
	facade = 1.6 // kN/m2 of elevation
	own    = 1.2 // kN/m, column and casing

	// Factors of EN 1990 (6.10b) with the UK annex: 0.925 x 1.35 on permanent
	// actions, 1.5 on the leading and 0.7 x 1.5 on the accompanying one.
	gammaG, gammaQ, psiQ = 1.25, 1.5, 0.7 * 1.5
)

// stack is one column line from the ground to the roof.
type stack struct {
	grid      string
	area      float64 // carried at each floor, m2
	perimeter float64 // length of facade carried, m
	braced    float64 // share of the bracing's vertical force; negative: the side that wind lifts
	opening   bool    // passes through the double-height hall: no floor at L1
}

// The grid: A to D at 8.4, 9.6 and 8.4 m, 1 to 3 at 9.0 m.
var stacks = []stack{
	{grid: "A1", area: 18.9, perimeter: 8.7, braced: 1},
	{grid: "A2", area: 37.8, perimeter: 9.0, braced: -1},
	{grid: "A3", area: 18.9, perimeter: 8.7},
	{grid: "B1", area: 40.5, perimeter: 9.0},
	{grid: "B2", area: 81.0, opening: true},
	{grid: "B3", area: 40.5, perimeter: 9.0},
	{grid: "C1", area: 40.5, perimeter: 9.0},
	{grid: "C2", area: 81.0, opening: true},
	{grid: "C3", area: 40.5, perimeter: 9.0},
	{grid: "D1", area: 18.9, perimeter: 8.7},
	{grid: "D2", area: 37.8, perimeter: 9.0, braced: -1},
	{grid: "D3", area: 18.9, perimeter: 8.7, braced: 1},
}

// forces returns the axial force, kN, in the length below the upper floor of
// storey i: gravity with imposed load leading, and with wind leading. plant
// multiplies what stands on the roof.
func (s *stack) forces(i int, plant float64) (uls1, uls2 float64) {
	for j := i; j < len(storeys); j++ {
		f := &storeys[j]
		g, q := f.g, f.q
		if f.to == "Roof" {
			g, q = g*plant, q*plant
		}
		area := s.area
		if f.to == "L1" && s.opening {
			area = 0
		}
		permanent := gammaG * (g*area + facade*f.height*s.perimeter + own*f.height)
		uls1 += permanent + gammaQ*q*area
		uls2 += permanent + psiQ*q*area + s.braced*gammaQ*f.wind
	}
	return math.Round(uls1), math.Round(uls2)
}
