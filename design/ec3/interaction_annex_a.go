package ec3

import "math"

// AnnexAValues holds what leads to the interaction factors of Annex A.
type AnnexAValues struct {
	MuY, MuZ           float64
	WY, WZ             float64 // W_pl/W_el, at most 1.5
	CmY0, CmZ0         float64
	EpsY               float64
	ALT                float64 // a_LT
	Lambda0            float64 // lambdaBar_0
	Lambda0Lim         float64 // above it torsional deformations count
	LambdaMax          float64
	Npl                float64
	BLT, CLT, DLT, ELT float64
	Cyy, Cyz, Czy, Czz float64
}

// annexA fills in the interaction factors of Annex A, method 1, Tables A.1 and
// A.2 (from memory, with the corrections of AC:2009; in C_zz, e_LT stands with
// n_pl). Where N_Ed reaches a critical load it has no factors: the buckling
// check alone has failed before. Table A.2 knows no axis about which the member
// sways; its C_mi,0, which falls far below 1 in double curvature, is not taken
// below the 0.9 of Table B.3 there.
func (c *Candidate) annexA(x *Interaction, lt *Lateral) {
	s, v := c.Section, &x.AnnexA
	ry, rz, rt := x.NY/x.NcrY, x.NZ/x.NcrZ, x.NZ/x.NcrT
	if ry >= 1 || rz >= 1 || rt >= 1 {
		x.Undefined = true
		x.Kyy, x.Kyz, x.Kzy, x.Kzz = 0, 0, 0, 0
		return
	}
	v.MuY = (1 - ry) / (1 - x.ChiY*ry)
	v.MuZ = (1 - rz) / (1 - x.ChiZ*rz)
	v.WY, v.WZ = min(1.5, s.WplY/s.WelY), min(1.5, s.WplZ/s.WelZ)
	v.ALT = max(0, 1-s.It/s.Iy)
	v.Lambda0 = lt.Lambda0
	v.LambdaMax = max(x.LambdaY, x.LambdaZ)
	v.Npl = max(x.NY, x.NZ) / (x.NRk / c.GammaM1)

	v.CmY0 = 0.79 + 0.21*x.PsiY + 0.36*(x.PsiY-0.33)*ry // Table A.2, linear
	v.CmZ0 = 0.79 + 0.21*x.PsiZ + 0.36*(x.PsiZ-0.33)*rz
	v.Lambda0Lim = 0.2 * math.Sqrt(lt.C1) * math.Pow((1-rz)*(1-rt), 0.25)
	if x.SwayY {
		v.CmY0 = max(v.CmY0, cmSway)
	}
	if x.SwayZ {
		v.CmZ0 = max(v.CmZ0, cmSway)
	}
	x.CmY, x.CmZ, x.CmLT = v.CmY0, v.CmZ0, 1
	if v.Lambda0 > v.Lambda0Lim {
		c.annexATorsion(x, rz, rt)
	}
	if x.Class <= 2 {
		c.annexACij(x)
	} else {
		v.Cyy, v.Cyz, v.Czy, v.Czz = 1, 1, 1, 1
	}
	cross := func(w1, w2 float64) float64 {
		if x.Class > 2 {
			return 1
		}
		return 0.6 * math.Sqrt(w1/w2)
	}
	x.Kyy = x.CmY * x.CmLT * v.MuY / (1 - ry) / v.Cyy
	x.Kyz = x.CmZ * v.MuY / (1 - rz) / v.Cyz * cross(v.WZ, v.WY)
	x.Kzy = x.CmY * x.CmLT * v.MuZ / (1 - ry) / v.Czy * cross(v.WY, v.WZ)
	x.Kzz = x.CmZ * v.MuZ / (1 - rz) / v.Czz
}

// annexATorsion fills in C_my and C_mLT where the member twists. Without axial
// force eps_y is infinite, and C_my goes to 1.
func (c *Candidate) annexATorsion(x *Interaction, rz, rt float64) {
	v := &x.AnnexA
	area, wy := c.Section.A, c.Section.WelY
	if x.Class == 4 {
		area, wy = x.NRk/c.Fy, c.WEffY
	}
	root := math.Inf(1)
	if x.NY > 0 {
		v.EpsY = x.My661 / x.NY * area / wy
		root = math.Sqrt(v.EpsY) * v.ALT
	}
	share := 1.0
	if !math.IsInf(root, 1) {
		share = root / (1 + root)
	} else if x.My661 == 0 || v.ALT == 0 {
		share = 0
	}
	x.CmY = v.CmY0 + (1-v.CmY0)*share
	x.CmLT = max(1, x.CmY*x.CmY*v.ALT/math.Sqrt((1-rz)*(1-rt)))
}

// annexACij fills in the plasticity factors of class 1 and 2. The moments over
// resistances stand without gammaM1, as characteristic ones over gammaM1.
func (c *Candidate) annexACij(x *Interaction) {
	s, v := c.Section, &x.AnnexA
	my := x.My661 / (x.ChiLT * x.MyRk / c.GammaM1)
	mz := x.Mz / (x.MzRk / c.GammaM1)
	l0, lz4 := v.Lambda0, math.Pow(x.LambdaZ, 4)
	v.BLT = 0.5 * v.ALT * l0 * l0 * my * mz
	v.CLT = 10 * v.ALT * l0 * l0 / (5 + lz4) * my / x.CmY
	v.DLT = 2 * v.ALT * l0 / (0.1 + lz4) * my / x.CmY * mz / x.CmZ
	v.ELT = 1.7 * v.ALT * l0 / (0.1 + lz4) * my / x.CmY

	lm, lm2 := v.LambdaMax, v.LambdaMax*v.LambdaMax
	cy2, cz2 := x.CmY*x.CmY, x.CmZ*x.CmZ
	v.Cyy = 1 + (v.WY-1)*((2-1.6/v.WY*cy2*(lm+lm2))*v.Npl-v.BLT)
	v.Cyz = 1 + (v.WZ-1)*((2-14*cz2*lm2/math.Pow(v.WZ, 5))*v.Npl-v.CLT)
	v.Czy = 1 + (v.WY-1)*((2-14*cy2*lm2/math.Pow(v.WY, 5))*v.Npl-v.DLT)
	v.Czz = 1 + (v.WZ-1)*(2-1.6/v.WZ*cz2*(lm+lm2)-v.ELT)*v.Npl
	v.Cyy = max(v.Cyy, s.WelY/s.WplY)
	v.Cyz = max(v.Cyz, 0.6*math.Sqrt(v.WZ/v.WY)*s.WelZ/s.WplZ)
	v.Czy = max(v.Czy, 0.6*math.Sqrt(v.WY/v.WZ)*s.WelY/s.WplY)
	v.Czz = max(v.Czz, s.WelZ/s.WplZ)
}
