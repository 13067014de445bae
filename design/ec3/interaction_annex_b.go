package ec3

import "stanchion/catalogue"

// cmLinear is C_m of a linear diagram. EN 1993-1-1:2005 Table B.3.
func cmLinear(psi float64) float64 { return max(0.4, 0.6+0.4*psi) }

// cmSway is C_m about an axis about which the member sways.
// EN 1993-1-1:2005 Table B.3.
const cmSway = 0.9

// annexB fills in the interaction factors of Annex B, method 2: Table B.1 for
// hollow sections, Table B.2 for I and H, whose k_yy, k_yz and k_zz are those
// of Table B.1.
func (c *Candidate) annexB(x *Interaction) {
	x.CmY, x.CmZ, x.CmLT = cmLinear(x.PsiY), cmLinear(x.PsiZ), cmLinear(x.PsiLT)
	if x.SwayY {
		x.CmY = cmSway
	}
	if x.SwayZ {
		x.CmZ = cmSway
	}
	if x.Class <= 2 {
		c.annexBPlastic(x)
	} else {
		c.annexBElastic(x)
	}
}

// annexBPlastic holds for class 1 and 2.
func (c *Candidate) annexBPlastic(x *Interaction) {
	x.Kyy = x.CmY * (1 + min(x.LambdaY-0.2, 0.8)*x.RatioY)
	if c.Section.Shape == catalogue.ShapeI {
		x.Kzz = x.CmZ * (1 + min(2*x.LambdaZ-0.6, 1.4)*x.RatioZ)
	} else {
		x.Kzz = x.CmZ * (1 + min(x.LambdaZ-0.2, 0.8)*x.RatioZ)
	}
	x.Kyz = 0.6 * x.Kzz
	if !susceptible(c.Section) {
		x.Kzy = 0.6 * x.Kyy
		return
	}
	slope := 0.1 * x.RatioZ / (x.CmLT - 0.25)
	if x.LambdaZ < 0.4 {
		x.Kzy = min(0.6+x.LambdaZ, 1-slope*x.LambdaZ)
	} else {
		x.Kzy = 1 - slope*min(x.LambdaZ, 1)
	}
}

// annexBElastic holds for class 3 and 4.
func (c *Candidate) annexBElastic(x *Interaction) {
	x.Kyy = x.CmY * (1 + 0.6*min(x.LambdaY, 1)*x.RatioY)
	x.Kzz = x.CmZ * (1 + 0.6*min(x.LambdaZ, 1)*x.RatioZ)
	x.Kyz = x.Kzz
	if susceptible(c.Section) {
		x.Kzy = 1 - 0.05*min(x.LambdaZ, 1)*x.RatioZ/(x.CmLT-0.25)
	} else {
		x.Kzy = 0.8 * x.Kyy
	}
}
