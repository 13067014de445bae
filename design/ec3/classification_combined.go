package ec3

import (
	"math"

	"stanchion/catalogue"
)

// WebLimits returns the class 1, 2 and 3 limits of c/t for a web under an axial
// force nEd (N, compression positive) and bending about y-y, with the
// parameters behind them: alpha, the part of the web in compression where it
// is fully plastic, and psi, the ratio of the elastic edge stresses. webs is
// the number of webs, area the section's, mm2.
// EN 1993-1-1:2005 Table 5.2, sheet 1.
func WebLimits(nEd, fy, c, t, area, eps float64, webs int) (limits [3]float64, alpha, psi float64) {
	alpha = min(1, 0.5*(1+nEd/(float64(webs)*fy*c*t)))
	psi = min(1, 2*nEd/(area*fy)-1)
	switch {
	case alpha <= 0: // the whole web is in tension
		limits[0], limits[1] = math.Inf(1), math.Inf(1)
	case alpha > 0.5:
		limits[0], limits[1] = 396*eps/(13*alpha-1), 456*eps/(13*alpha-1)
	default:
		limits[0], limits[1] = 36*eps/alpha, 41.5*eps/alpha
	}
	if psi > -1 {
		limits[2] = 42 * eps / (0.67 + 0.33*psi)
	} else {
		limits[2] = 62 * eps * (1 - psi) * math.Sqrt(-psi)
	}
	return limits, alpha, psi
}

// CombinedClass returns the class of the cross-section under N_Ed (N, compression
// positive) together with bending about the axes named, and the web's element
// as it was classified. Flanges are taken in uniform compression; so are webs
// under bending about z-z alone and, for RHS, under bending about both axes.
// Circular tubes keep the class of Table 5.2, sheet 3, which covers bending too.
func (c *Candidate) CombinedClass(nEd float64, bendsY, bendsZ bool) (class int, web Element) {
	s := c.Section
	web = c.Elements[0]
	if len(c.Elements) < 2 {
		return c.Class, web
	}
	// Elements stand as flange, web for I and H and as side h, side b for RHS.
	flange, webs := c.Elements[0], 1
	web = c.Elements[1]
	if s.Shape == catalogue.ShapeRHS {
		web, flange, webs = c.Elements[0], c.Elements[1], 2
	}
	if bendsY && !(s.Shape == catalogue.ShapeRHS && bendsZ) {
		web.Limits, _, _ = WebLimits(nEd, c.Fy, web.C, web.T, s.A, c.Eps, webs)
		web = web.classified()
	}
	return max(flange.Class, web.Class), web
}
