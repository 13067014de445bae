package ec3

import "math"

// ncrGeneral returns the least root N of the general equation of
// torsional-flexural buckling,
//
//	(N - Ny)(N - Nz)(N - NT) - N2 qy (N - Nz) - N2 qz (N - Ny) = 0,
//
// with qy = (y0/i0)2 and qz = (z0/i0)2: flexure about y-y moves the section
// along z, as twist does where the shear centre lies off along y, so that Ny
// couples with y0 and Nz with z0. Timoshenko and Gere, Theory of Elastic
// Stability, art. 5.6.
func ncrGeneral(ny, nz, nt, qy, qz float64) float64 {
	f := func(n float64) float64 {
		return (n-ny)*(n-nz)*(n-nt) - n*n*(qy*(n-nz)+qz*(n-ny))
	}
	// The least root lies below the least of the three loads: f is negative
	// at 0 and not negative there.
	low, high := 0.0, math.Min(ny, math.Min(nz, nt))
	for range 200 {
		mid := 0.5 * (low + high)
		if mid <= low || mid >= high {
			break
		}
		if f(mid) < 0 {
			low = mid
		} else {
			high = mid
		}
	}
	return low
}
