package ec3

import (
	"math"

	"stanchion/catalogue"
)

// modulus returns W_y and W_z, mm3, that the class gives: plastic in class 1
// and 2, elastic in 3, effective in 4. EN 1993-1-1:2005 6.2.5(2).
func (c *Candidate) modulus(class int) (wy, wz float64) {
	s := c.Section
	switch {
	case class <= 2:
		return s.WplY, s.WplZ
	case class == 3:
		return s.WelY, s.WelZ
	}
	return c.WEffY, c.WEffZ
}

// resistanceNRk returns N_Rk, N, that the class gives: A fy, in class 4 A_eff fy
// with A_eff of uniform compression. EN 1993-1-1:2005 Table 6.7.
func (c *Candidate) resistanceNRk(class int) float64 {
	if class < 4 {
		return c.Section.A * c.Fy
	}
	return c.NRk
}

// effectiveModuli returns W_eff, mm3, about both axes, each under bending about
// that axis alone, for the compression edge. EN 1993-1-1:2005 6.2.2.5 and
// EN 1993-1-5:2006 4.4: first the compression flange is reduced, then the web by
// the stress ratio that the section with the reduced flange has (4.4(3)). Where
// nothing is slender these are the elastic moduli.
func (c *Candidate) effectiveModuli() (wy, wz float64) {
	s := c.Section
	switch s.Shape {
	case catalogue.ShapeI:
		return c.effectiveIY(), c.effectiveIZ()
	case catalogue.ShapeRHS:
		return effectiveRHS(s.H, s.B, s.Tw, s.A, s.Iy, s.WelY, c.Eps), effectiveRHS(s.B, s.H, s.Tw, s.A, s.Iz, s.WelZ, c.Eps)
	}
	return s.WelY, s.WelZ
}

// strip is a part of a section taken away: its area, its distance from the
// middle of the section towards the compression edge, and its own second
// moment.
type strip struct{ a, z, i float64 }

// reduced returns the elastic modulus for the compression edge of a symmetric
// section of depth h that lacks strips.
func reduced(a, i, h float64, strips ...strip) (w, edge float64) {
	area, moment, second := a, 0.0, i
	for _, s := range strips {
		area -= s.a
		moment -= s.a * s.z
		second -= s.i + s.a*s.z*s.z
	}
	centroid := moment / area // negative: the neutral axis moves away from the compression edge
	second -= area * centroid * centroid
	edge = h/2 - centroid
	return second / edge, edge
}

// hole returns the ineffective part of a web of clear width cw, whose middle is
// that of the section and whose compressed part reaches over bc from its
// compression edge, rho being effective: 0.4 and 0.6 of the effective width
// stay at the edge and at the neutral axis. EN 1993-1-5:2006 Table 4.1.
func hole(cw, bc, t, rho float64) strip {
	effective := rho * bc
	from := cw/2 - 0.4*effective // from the middle of the section
	to := cw/2 - bc + 0.6*effective
	d := from - to
	if d <= 0 {
		return strip{}
	}
	return strip{d * t, (from + to) / 2, t * d * d * d / 12}
}

// kSigmaBending is the buckling factor of an internal part with stress ratio
// psi <= 1. EN 1993-1-5:2006 Table 4.1.
func kSigmaBending(psi float64) float64 {
	switch {
	case psi >= 0:
		return 8.2 / (1.05 + psi)
	case psi > -1:
		return 7.81 - 6.29*psi + 9.78*psi*psi
	default:
		psi = math.Max(psi, -3)
		return 5.98 * (1 - psi) * (1 - psi)
	}
}

// webHole returns the ineffective part of a web in bending, the compression
// edge of the section being edge away from the neutral axis.
func webHole(cw, t, h, edge, eps float64) strip {
	inset := (h - cw) / 2
	top := edge - inset // from the neutral axis to the web's compression edge
	psi := (top - cw) / top
	lambdaP := LambdaP(cw/t, eps, kSigmaBending(psi))
	rho := RhoInternal(lambdaP, max(psi, -3))
	if rho >= 1 {
		return strip{}
	}
	return hole(cw, min(top, cw), t, rho)
}

func (c *Candidate) effectiveIY() float64 {
	s := c.Section
	flange, web := &c.Elements[0], &c.Elements[1]
	_, rho := flange.Rho(c.Eps)
	lost := 2 * (1 - rho) * flange.C
	cut := strip{lost * s.Tf, (s.H - s.Tf) / 2, lost * s.Tf * s.Tf * s.Tf / 12}
	_, edge := reduced(s.A, s.Iy, s.H, cut)
	w, _ := reduced(s.A, s.Iy, s.H, cut, webHole(web.C, s.Tw, s.H, edge, c.Eps))
	return w
}

// effectiveIZ reduces the two outstands on the compression side at their tips,
// by the factor for the greatest compression at the free edge.
// EN 1993-1-5:2006 Table 4.2.
func (c *Candidate) effectiveIZ() float64 {
	s := c.Section
	flange := &c.Elements[0]
	psi := (s.Tw/2 + s.R) / (s.B / 2)
	kSigma := 0.57 - 0.21*psi + 0.07*psi*psi
	rho := RhoOutstand(LambdaP(flange.Ratio, c.Eps, kSigma))
	lost := (1 - rho) * flange.C
	w, edge := reduced(s.A, s.Iz, s.B, strip{2 * lost * s.Tf, s.B/2 - lost/2, 2 * s.Tf * lost * lost * lost / 12})
	// The tips do not work: the compression edge is where the effective flange
	// ends; the tension edge of the gross flange may now be the further one.
	return w * edge / max(edge-lost, s.B-edge)
}

// effectiveRHS returns W_eff for bending that compresses the side of width b of
// a hollow section of depth h, wall t.
func effectiveRHS(h, b, t, a, i, wel, eps float64) float64 {
	cf, cw := b-3*t, h-3*t
	lambdaP := LambdaP(cf/t, eps, kSigmaInternal)
	lost := (1 - RhoInternal(lambdaP, 1)) * cf
	cut := strip{lost * t, (h - t) / 2, lost * t * t * t / 12}
	_, edge := reduced(a, i, h, cut)
	web := webHole(cw, t, h, edge, eps)
	if lost == 0 && web.a == 0 {
		return wel
	}
	web.a, web.i = 2*web.a, 2*web.i
	w, _ := reduced(a, i, h, cut, web)
	return w
}
