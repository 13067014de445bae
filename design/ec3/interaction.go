package ec3

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
)

// Interaction holds the values behind (6.61) and (6.62) for one set of
// overlapping segments. EN 1993-1-1:2005 6.3.3.
type Interaction struct {
	Combination        int
	FromY, ToY         float64 // the y-y segment of (6.61), mm
	FromZ, ToZ         float64 // the z-z segment
	FromLT, ToLT       float64 // the lateral-torsional segment
	Class              int
	Web                Element
	NY, NZ             float64 // N_Ed in the y-y and the z-z segment, N
	My661, My662       float64 // greatest in the y-y and the lateral-torsional segment, N mm
	Mz                 float64 // greatest in the z-z segment, N mm
	PsiY, PsiZ, PsiLT  float64
	NRk, MyRk, MzRk    float64 // N, N mm, of the class
	LambdaY, LambdaZ   float64 // with N_Rk of the class
	ChiY, ChiZ, ChiLT  float64
	NcrY, NcrZ, NcrT   float64 // N
	RatioY, RatioZ     float64 // n_y = N_Ed/(chi_y N_Rk/gammaM1), n_z
	SwayY, SwayZ       bool    // C_m 0.9 about a sway axis
	CmY, CmZ, CmLT     float64
	Kyy, Kyz, Kzy, Kzz float64
	LT                 Lateral // behind ChiLT
	AnnexA             AnnexAValues
	U661, U662         float64
	Undefined          bool // Annex A beyond a critical load: no factors
}

// terms fills in the utilisations from the factors.
func (x *Interaction) terms(gammaM1 float64) {
	mb, mz := x.ChiLT*x.MyRk/gammaM1, x.MzRk/gammaM1
	x.U661 = x.RatioY + x.Kyy*x.My661/mb + x.Kyz*x.Mz/mz // (6.61)
	x.U662 = x.RatioZ + x.Kzy*x.My662/mb + x.Kzz*x.Mz/mz // (6.62)
}

// worst is the greater of the two utilisations.
func (x *Interaction) worst() float64 { return max(x.U661, x.U662) }

// susceptible reports whether the section is susceptible to torsional
// deformations: I and H are, hollow sections are not.
func susceptible(s *catalogue.Section) bool {
	return s.Shape != catalogue.ShapeCHS && s.Shape != catalogue.ShapeRHS
}

// ncrOf returns pi2 EI/L_cr2, N. A length without compression has none by the
// elastic method, and no critical load.
func ncrOf(euler, lcr float64) float64 {
	if lcr == 0 {
		return math.Inf(1)
	}
	return euler / (lcr * lcr)
}

// interact works out (6.61) and (6.62) of overlapping segments in a
// combination. (6.61) takes the greatest M_y, its psi and N_Ed of the y-y
// segment; (6.62) N_Ed of the z-z segment and the greatest M_y, M_b and C_mLT
// of the lateral-torsional segment; M_z and C_mz are those of the z-z segment.
// The class is that under the greater N_Ed with the moments.
func (m *Member) interact(c *Candidate, y, z, t *Segment, actions *bending) (x Interaction) {
	x = Interaction{Combination: y.Combination, FromY: y.From, ToY: y.To, FromZ: z.From, ToZ: z.To, FromLT: t.From, ToLT: t.To}
	x.NY = max(0, y.NEd+m.ownWeight(c.Section.Mass, y.From))
	x.NZ = max(0, z.NEd+m.ownWeight(c.Section.Mass, z.From))
	inY, inZ := between(actions.my, y.From, y.To, m.Length), between(actions.mz, z.From, z.To, m.Length)
	inLT := between(actions.my, t.From, t.To, m.Length)
	x.My661, x.My662, x.Mz = greatest(inY), greatest(inLT), greatest(inZ)
	x.PsiY, x.PsiZ, x.PsiLT = Psi(inY), Psi(inZ), Psi(inLT)
	x.SwayY, x.SwayZ = m.swayY, m.swayZ

	x.Class, x.Web = c.CombinedClass(max(x.NY, x.NZ), x.My661 > 0 || x.My662 > 0, x.Mz > 0)
	wy, wz := c.modulus(x.Class)
	x.NRk, x.MyRk, x.MzRk = c.resistanceNRk(x.Class), wy*c.Fy, wz*c.Fy
	x.NcrY, x.NcrZ = ncrOf(c.EulerY, y.Lcr), ncrOf(c.EulerZ, z.Lcr)
	x.LambdaY, x.LambdaZ = math.Sqrt(x.NRk/x.NcrY), math.Sqrt(x.NRk/x.NcrZ)
	x.ChiY, x.ChiZ = Chi(c.AlphaY, x.LambdaY), Chi(c.AlphaZ, x.LambdaZ)
	x.RatioY, x.RatioZ = x.NY*c.GammaM1/(x.ChiY*x.NRk), x.NZ*c.GammaM1/(x.ChiZ*x.NRk)

	lt := m.lateral(c, t, inLT, x.Class)
	x.LT, x.ChiLT = lt, lt.ChiMod
	if m.Settings.Interaction == design.AnnexA {
		x.NcrT = math.Inf(1)
		if c.Torsion != TorsionNone {
			x.NcrT = c.NcrT(t.Lcr)
		}
		c.annexA(&x, &lt)
	} else {
		c.annexB(&x)
	}
	x.terms(c.GammaM1)
	return x
}
