package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// c1Psi and c1Values are C1 for linear moment diagrams with ends that are free
// to warp and to turn on plan. Access Steel NCCI SN003a, Table 3.1 (from memory).
var (
	c1Psi    = [...]float64{-1, -0.75, -0.5, -0.25, 0, 0.25, 0.5, 0.75, 1}
	c1Values = [...]float64{2.55, 2.57, 2.33, 2.05, 1.77, 1.52, 1.31, 1.14, 1.00}
)

// C1 returns the factor of the critical moment for a linear diagram with the
// ratio psi of its end moments, by linear interpolation of NCCI SN003a.
func C1(psi float64) float64 {
	psi = max(-1, min(1, psi))
	i := min(int((psi+1)*4), len(c1Psi)-2)
	return c1Values[i] + (c1Values[i+1]-c1Values[i])*(psi-c1Psi[i])*4
}

// Lateral holds the values behind M_b,Rd of one lateral-torsional segment.
type Lateral struct {
	From, To    float64 // mm
	Combination int
	Class       int
	MyEd        float64 // greatest in the segment, N mm
	Psi, C1, Kc float64
	Beyond      bool    // C1 is not from the table of NCCI SN003a: see C1Free
	L           float64 // mm
	Mcr         float64 // N mm; 0: the section does not buckle laterally
	Mcr0        float64 // under uniform moment, N mm
	LambdaBar   float64 // lambdaBar_LT
	Lambda0     float64 // under uniform moment: lambdaBar_0 of Annex A
	Curve       Curve
	Alpha       float64 // of the curve; 0: the section does not buckle laterally
	Phi         float64
	Chi         float64 // before f
	F           float64 // 1 by the general case
	ChiMod      float64 // chi_LT,mod, by which M_b,Rd is found
	WY          float64 // mm3
	MbRd        float64 // N mm
	Utilisation float64
}

// Mcr returns the elastic critical moment for lateral-torsional buckling of a
// doubly symmetric section over the length l, mm, under a linear diagram, N mm.
// Access Steel NCCI SN003a, (2), with k = kw = 1.
func (c *Candidate) Mcr(c1, l float64) float64 {
	s := c.Section
	ncr := c.EulerZ / (l * l)
	return c1 * ncr * math.Sqrt(s.Iw/s.Iz+c.GIt/ncr)
}

// bucklesLaterally reports whether lateral-torsional buckling is checked: not
// for tubes and square and nearly square hollow sections, h/b <= 2.
func bucklesLaterally(s *catalogue.Section) bool {
	switch s.Shape {
	case catalogue.ShapeCHS:
		return false
	case catalogue.ShapeRHS:
		return s.H > 2*s.B
	}
	return true
}

// CurveLT returns the lateral-torsional buckling curve. EN: Table 6.5 with the
// rolled sections' method, Table 6.4 with the general case. UK: NA.2.17 to
// 6.3.2.3(1), and Table 6.4 with the general case (NA.2.16, from memory).
// Hollow sections above h/b = 2 are in no row of Table 6.5: they take the UK
// curves, c hot finished and d cold formed, in every set, and "other
// cross-sections" of Table 6.4 with the general case.
func CurveLT(s *catalogue.Section, curves design.LTBCurves, method design.LTBMethod) Curve {
	ratio := s.H / s.B
	if s.Shape == catalogue.ShapeRHS {
		if method == design.LTBGeneral || s.Finish == catalogue.ColdFormed {
			return CurveD
		}
		return CurveC
	}
	switch {
	case method == design.LTBGeneral && ratio <= 2:
		return CurveA
	case method == design.LTBGeneral:
		return CurveB
	case ratio <= 2:
		return CurveB
	case curves == design.LTBCurvesUK && ratio > 3.1:
		return CurveD
	}
	return CurveC
}

// Kc returns the correction factor for the moment distribution: 1/sqrt(C1) by
// the UK NA (NA.2.18), else Table 6.6 for a linear diagram. Table 6.6 goes with
// lengths held against twist at both ends: beyond it 1/sqrt(C1) is used too.
func Kc(psi, c1 float64, fromC1 bool) float64 {
	if fromC1 {
		return 1 / math.Sqrt(c1)
	}
	return 1 / (1.33 - 0.33*psi)
}

// ChiLT returns Phi_LT and chi_LT of rolled sections, with lambdaBar_LT,0 = 0.4
// and beta = 0.75. EN 1993-1-1:2005 (6.57).
func ChiLT(alpha, lambdaBar float64) (phi, chi float64) {
	const plateau, beta = 0.4, 0.75
	phi = 0.5 * (1 + alpha*(lambdaBar-plateau) + beta*lambdaBar*lambdaBar)
	if lambdaBar <= plateau {
		return phi, 1
	}
	chi = 1 / (phi + math.Sqrt(phi*phi-beta*lambdaBar*lambdaBar))
	return phi, min(chi, 1, 1/(lambdaBar*lambdaBar))
}

// lateral works out M_b,Rd of a segment of the member at the class that the
// section has there, the moment about y-y having the ordinates my at the ends
// of the segment, N mm. EN 1993-1-1:2005 6.3.2.
func (m *Member) lateral(c *Candidate, s *Segment, my design.EndMoments, class int) (x Lateral) {
	x = Lateral{From: s.From, To: s.To, Combination: s.Combination, Class: class,
		MyEd: greatest(my), Psi: Psi(my), L: s.Lcr, Chi: 1, F: 1, ChiMod: 1}
	x.WY, _ = c.modulus(class)
	x.C1 = C1(x.Psi)
	if free, atFree := m.freeEnd(s, my); free {
		x.C1, x.Beyond = C1Free(x.Psi, atFree), beyondTable(x.Psi, atFree)
	}
	if bucklesLaterally(c.Section) {
		c.reduceLaterally(&x, m.Settings)
	}
	x.MbRd = x.ChiMod * x.WY * c.Fy / c.GammaM1 // (6.55)
	x.Utilisation = x.MyEd / x.MbRd             // (6.54)
	return x
}

func (c *Candidate) reduceLaterally(x *Lateral, set *design.Settings) {
	x.Mcr, x.Mcr0 = c.Mcr(x.C1, x.L), c.Mcr(1, x.L)
	x.LambdaBar, x.Lambda0 = math.Sqrt(x.WY*c.Fy/x.Mcr), math.Sqrt(x.WY*c.Fy/x.Mcr0)
	x.Curve = CurveLT(c.Section, set.National.LTB, set.LTB)
	x.Alpha = x.Curve.Alpha()
	if set.LTB == design.LTBGeneral {
		// 6.3.2.2: the plateau of (6.56) is that of flexural buckling.
		x.Phi = Phi(x.Alpha, x.LambdaBar)
		x.Chi = Chi(x.Alpha, x.LambdaBar)
		x.ChiMod = x.Chi
		return
	}
	x.Kc = Kc(x.Psi, x.C1, set.National.KcFromC1 || x.Beyond)
	x.Phi, x.Chi = ChiLT(x.Alpha, x.LambdaBar)
	d := x.LambdaBar - 0.8
	x.F = min(1, 1-0.5*(1-x.Kc)*(1-2*d*d))
	x.ChiMod = min(x.Chi/x.F, 1, 1/(x.LambdaBar*x.LambdaBar)) // (6.58)
}
