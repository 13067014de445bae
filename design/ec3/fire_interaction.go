package ec3

import "math"

// The parts of the interaction of compression and bending in fire,
// EN 1993-1-2:2005 4.2.3.5, whose symbols stand in the names. Expressions from
// memory.

// FireBetaM returns the equivalent uniform moment factor of a diagram that is
// straight between end moments of ratio psi. EN 1993-1-2:2005 Figure 4.2.
func FireBetaM(psi float64) float64 { return 1.8 - 0.7*psi }

// FireKLT returns k_LT; n is N_fi,Ed over the resistance to buckling about z-z
// at the temperature of lambdaZ.
func FireKLT(lambdaZ, betaMLT, n float64) float64 {
	mu := math.Min(0.15*lambdaZ*betaMLT-0.15, 0.9)
	return math.Min(1-mu*n, 1)
}

// FireKy returns k_y; n is N_fi,Ed over the resistance to buckling about y-y
// at the temperature of lambdaY.
func FireKy(lambdaY, betaMy, n float64) float64 {
	mu := math.Min((1.2*betaMy-3)*lambdaY+0.44*betaMy-0.29, 0.8)
	return math.Min(1-mu*n, 3)
}

// FireKz returns k_z; n is N_fi,Ed over the resistance to buckling about z-z at
// the temperature of lambdaZ.
func FireKz(lambdaZ, betaMz, n float64) float64 {
	mu := math.Min((2*betaMz-5)*math.Min(lambdaZ, 1.1)+0.44*betaMz-0.29, 0.8)
	return math.Min(1-mu*n, 3)
}
