package ec3

import (
	"math"

	"stanchion/catalogue"
)

// Section629 holds the values behind the resistance of a cross-section to
// bending and axial force. EN 1993-1-1:2005 6.2.9.
type Section629 struct {
	NEd, MyEd, MzEd   float64 // N (tension negative), N mm, without sign for the moments
	Class             int
	Web               Element // as classified under these actions
	WY, WZ            float64 // mm3, reduced for shear
	NplRd, MplY, MplZ float64 // N, N mm: of the class, reduced for shear
	N                 float64 // |N_Ed|/N_Rd
	Aw, Af            float64 // a of I and H, a_w and a_f of RHS
	MNY, MNZ          float64 // reduced for axial force, N mm
	Alpha, Beta       float64 // exponents of (6.41); 0: not used
	VzEd, VyEd        float64 // N
	VzRd, VyRd        float64 // V_pl,Rd, N
	RhoZ, RhoY        float64 // reductions for shear
	Utilisation       float64
	Linear            bool // (6.42) or (6.44): a sum
}

// bendSection checks the cross-section under nEd (N, compression positive) and
// moments (N mm, without sign). In class 1 and 2 it is (6.31) about one axis and
// (6.41) about both; in class 3 and 4 the linear sum. The utilisation is the
// larger of n and the criterion's sum; where n reaches 1 no moment can be
// carried, and the utilisation is given as the linear sum, above 1.
func (c *Candidate) bendSection(nEd, my, mz, vz, vy float64) (x Section629) {
	x = Section629{NEd: nEd, MyEd: my, MzEd: mz, VzEd: vz, VyEd: vy}
	x.Class, x.Web = c.CombinedClass(nEd, my > 0, mz > 0)
	avZ, avY := ShearAreas(c.Section)
	x.VzRd, x.VyRd = VplRd(avZ, c.Fy, c.GammaM0), VplRd(avY, c.Fy, c.GammaM0)
	x.RhoZ, x.RhoY = shearRho(vz, x.VzRd), shearRho(vy, x.VyRd)
	if c.Section.Shape == catalogue.ShapeCHS { // the resultant shears a tube
		x.RhoZ, x.RhoY = shearRho(math.Hypot(vz, vy), x.VzRd), 0
	}
	x.WY, x.WZ = c.modulus(x.Class)
	x.NplRd = c.resistanceNRk(x.Class) / c.GammaM0
	if nEd < 0 {
		x.NplRd = c.NplRd // tension: the gross section
	}
	if x.RhoZ > 0 || x.RhoY > 0 {
		c.sheared(&x)
	}
	x.MplY, x.MplZ = x.WY*c.Fy/c.GammaM0, x.WZ*c.Fy/c.GammaM0
	x.N = math.Abs(nEd) / x.NplRd
	linear := x.N + my/x.MplY + mz/x.MplZ
	if x.Class > 2 || x.N >= 1 {
		x.Linear, x.Utilisation = true, linear
		return x
	}
	c.reduceForAxial(&x)
	x.Utilisation = math.Max(x.N, x.criterion(c.Section.Shape))
	return x
}

// reduceForAxial fills in M_N,y,Rd and M_N,z,Rd. EN 1993-1-1:2005 6.2.9.1(5).
func (c *Candidate) reduceForAxial(x *Section629) {
	s, n := c.Section, x.N
	switch s.Shape {
	case catalogue.ShapeCHS:
		x.MNY = x.MplY * (1 - math.Pow(n, 1.7))
		x.MNZ = x.MNY
	case catalogue.ShapeRHS:
		x.Aw = min(0.5, (s.A-2*s.B*s.Tw)/s.A)
		x.Af = min(0.5, (s.A-2*s.H*s.Tw)/s.A)
		x.MNY = min(x.MplY, x.MplY*(1-n)/(1-0.5*x.Aw)) // (6.39)
		x.MNZ = min(x.MplZ, x.MplZ*(1-n)/(1-0.5*x.Af)) // (6.40)
		x.Alpha = 6
		if d := 1 - 1.13*n*n; d > 0 {
			x.Alpha = min(6, 1.66/d)
		}
		x.Beta = x.Alpha
	default:
		x.Aw = min(0.5, (s.A-2*s.B*s.Tf)/s.A)
		x.MNY = min(x.MplY, x.MplY*(1-n)/(1-0.5*x.Aw)) // (6.36)
		x.MNZ = x.MplZ                                 // (6.37)
		if n > x.Aw {
			r := (n - x.Aw) / (1 - x.Aw)
			x.MNZ = x.MplZ * (1 - r*r) // (6.38)
		}
		x.Alpha, x.Beta = 2, max(1, 5*n)
	}
}

// criterion is (6.31) about one axis, (6.41) about both; a tube takes the
// resultant of the moments.
func (x *Section629) criterion(shape catalogue.Shape) float64 {
	switch {
	case shape == catalogue.ShapeCHS:
		return math.Hypot(x.MyEd, x.MzEd) / x.MNY
	case x.MzEd == 0:
		x.Alpha, x.Beta = 0, 0
		return x.MyEd / x.MNY
	case x.MyEd == 0:
		x.Alpha, x.Beta = 0, 0
		return x.MzEd / x.MNZ
	}
	return math.Pow(x.MyEd/x.MNY, x.Alpha) + math.Pow(x.MzEd/x.MNZ, x.Beta)
}
