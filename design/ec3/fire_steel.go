package ec3

import "sort"

// Temperatures of EN 1993-1-2:2005, C.
const (
	maxTemperature    = 1200 // the end of Table 3.1, where nothing is left
	class4Temperature = 350  // 4.2.3.6(2)
)

// fireEps lowers eps for the classification in fire. EN 1993-1-2:2005
// 4.2.2(1), (4.2).
const fireEps = 0.85

// reduction is a row of EN 1993-1-2:2005 Table 3.1: effective yield strength
// and slope of the elastic range at a temperature (C), over those at 20 C.
type reduction struct{ theta, ky, kE float64 }

var reductions = []reduction{
	{20, 1, 1}, {100, 1, 1}, {200, 1, 0.9}, {300, 1, 0.8}, {400, 1, 0.7}, {500, 0.78, 0.6}, {600, 0.47, 0.31},
	{700, 0.23, 0.13}, {800, 0.11, 0.09}, {900, 0.06, 0.0675}, {1000, 0.04, 0.045}, {1100, 0.02, 0.0225}, {1200, 0, 0},
}

// Ky returns the reduction factor of the effective yield strength at a steel
// temperature, C. EN 1993-1-2:2005 Table 3.1.
func Ky(theta float64) float64 {
	return reduce(theta, func(r *reduction) float64 { return r.ky })
}

// KE returns the reduction factor of the slope of the elastic range at a steel
// temperature, C. EN 1993-1-2:2005 Table 3.1.
func KE(theta float64) float64 {
	return reduce(theta, func(r *reduction) float64 { return r.kE })
}

// reduce interpolates Table 3.1 linearly.
func reduce(theta float64, factor func(*reduction) float64) float64 {
	i := sort.Search(len(reductions), func(i int) bool { return reductions[i].theta >= theta })
	switch i {
	case 0:
		return factor(&reductions[0])
	case len(reductions):
		return factor(&reductions[i-1])
	}
	low, high := &reductions[i-1], &reductions[i]
	return factor(low) + (factor(high)-factor(low))*(theta-low.theta)/(high.theta-low.theta)
}

// whereFalls returns the temperature, C, at which a resistance that never
// rises with temperature falls to an action, and false where it is short of it
// already at 20 C.
func whereFalls(resistance func(theta float64) float64, action float64) (float64, bool) {
	low, high := 20.0, float64(maxTemperature)
	if !Passes(action, resistance(low)) {
		return 0, false
	}
	for high-low > 1e-6 {
		if mid := (low + high) / 2; resistance(mid) >= action {
			low = mid
		} else {
			high = mid
		}
	}
	return low, true
}
