package ec3

import (
	"math"

	"stanchion/catalogue"
)

// Buckling factors of plates in uniform compression (psi = 1).
// EN 1993-1-5:2006 Tables 4.1 and 4.2.
const (
	kSigmaInternal = 4.0
	kSigmaOutstand = 0.43
)

// LambdaP returns the plate slenderness. EN 1993-1-5:2006 4.4(2).
func LambdaP(ratio, eps, kSigma float64) float64 {
	return ratio / (28.4 * eps * math.Sqrt(kSigma))
}

// RhoInternal returns the reduction factor of an internal part with stress
// ratio psi. EN 1993-1-5:2006 (4.2).
func RhoInternal(lambdaP, psi float64) float64 {
	if lambdaP <= 0.5+math.Sqrt(0.085-0.055*psi) {
		return 1
	}
	return min(1, (lambdaP-0.055*(3+psi))/(lambdaP*lambdaP))
}

// RhoOutstand returns the reduction factor of an outstand part.
// EN 1993-1-5:2006 (4.3).
func RhoOutstand(lambdaP float64) float64 {
	if lambdaP <= 0.748 {
		return 1
	}
	return min(1, (lambdaP-0.188)/(lambdaP*lambdaP))
}

// Rho returns the plate slenderness of an element in uniform compression and
// the part of its width that is effective. EN 1993-1-5:2006 4.4(2).
func (e *Element) Rho(eps float64) (lambdaP, rho float64) {
	if e.Internal {
		lambdaP = LambdaP(e.Ratio, eps, kSigmaInternal)
		return lambdaP, RhoInternal(lambdaP, 1)
	}
	lambdaP = LambdaP(e.Ratio, eps, kSigmaOutstand)
	return lambdaP, RhoOutstand(lambdaP)
}

// effectiveArea returns A_eff, mm2, of a class 4 section in uniform
// compression: the gross area less the ineffective parts of all its elements.
// EN 1993-1-1:2005 6.2.2.5 and EN 1993-1-5:2006 4.4. It covers sections whose
// centroid does not move: doubly symmetric ones of flat parts.
func effectiveArea(s *catalogue.Section, elements []Element, eps float64) (float64, *Refusal) {
	switch s.Shape {
	case catalogue.ShapeCHS:
		return 0, &Refusal{"Table 5.2", "class 4 in compression (d/t above 90 eps2): the wall is a shell to EN 1993-1-6"}
	case catalogue.ShapeChannel, catalogue.ShapeAngle:
		return 0, &Refusal{"6.3.1.1(2)", "class 4 in compression: the centroid of the effective section moves, and the moment N e_N is not covered"}
	}
	area := s.A
	for i := range elements {
		e := &elements[i]
		_, rho := e.Rho(eps)
		area -= float64(e.Count) * (1 - rho) * e.C * e.T
	}
	return area, nil
}
