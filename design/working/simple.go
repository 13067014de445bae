package working

import (
	"math"

	"stanchion/design"
	"stanchion/design/ec3"
)

// simple writes the criterion of columns in simple construction. Access Steel
// NCCI SN048.
func (w *writer) simple() {
	x := &w.a.Simple
	if x.Class == 0 {
		return
	}
	w.start("Simple construction, NCCI SN048")
	w.acts(x.NEd, x.MyEd, x.MzEd, w.combination(x.Combination))
	w.say("The section is class %d under the axial force with the moments.", x.Class)
	w.modulus(x.Class, x.MyEd > 0, x.MzEd > 0)
	w.find("N_Rk", w.areaOf(x.Class)+" f_y", w.characteristicOf(x.Class), KN, "Table 6.7")
	w.resistanceOf("y", &w.a.Y, w.a.SegY, w.c.EulerY, w.c.AlphaY)
	w.resistanceOf("z", &w.a.Z, w.a.SegZ, w.c.EulerZ, w.c.AlphaZ)
	w.find("N_b,min,Rd", "min(χ_y, χ_z) N_Rk/γ_M1", x.NbMinRd, KN, "(6.47)")
	source := "N_Ed/N_b,min,Rd"
	if x.MyEd > 0 {
		w.chiLTOnce(&x.LT)
		wy, _ := moduli(x.Class)
		w.find("M_b,Rd", w.reducedBy(&x.LT)+" "+wy+" f_y/γ_M1", x.MbRd, KNm, "(6.55)")
		source += " + M_y,Ed/M_b,Rd"
	}
	if x.MzEd > 0 {
		_, wz := moduli(x.Class)
		w.find("M_c,z,Rd", wz+" f_y/γ_M0", x.MczRd, KNm, "6.2.5(2)")
		source += " + 1.5 M_z,Ed/M_c,z,Rd"
	}
	if x.MyEd > 0 && !same(x.LT.MyEd, x.MyEd) {
		w.add(Values{w.noted("M_y,Ed", x.LT.MyEd, KNm, "greatest in the lateral-torsional segment")})
	}
	w.ratio(source, x.Utilisation, "NCCI SN048")
	w.pinnedBase()
}

// pinnedBase writes the limit on the axial force of a length on a pinned base.
func (w *writer) pinnedBase() {
	c := w.worst(design.SimpleConstructionY)
	x := &w.a.Simple
	if c == nil || c.Combination != x.Combination {
		return
	}
	w.find("N_b,y,Rd", "χ_y N_Rk/γ_M1", x.NbyRd, KN, "(6.47)")
	w.ratio("N_Ed/(0.83 N_b,y,Rd)", c.Utilisation, "NCCI SN048")
}

func (w *writer) characteristicOf(class int) float64 {
	if class < 4 {
		return w.c.NplRk()
	}
	return w.c.NRk
}

// resistanceOf writes the reduction factor about an axis: that of the check in
// compression where the class leaves it, else in full.
func (w *writer) resistanceOf(axis string, first *design.Buckling, segments []ec3.Segment, euler, alpha float64) {
	for i := range segments {
		s := &segments[i]
		if s.Combination != w.a.Simple.Combination || s.Lcr == 0 {
			continue
		}
		ncr := euler / (s.Lcr * s.Lcr)
		lambda := math.Sqrt(w.characteristicOf(w.a.Simple.Class) / ncr)
		chi := ec3.Chi(alpha, lambda)
		if first.Curve != "" && same(first.LambdaBar, lambda) {
			w.add(Values{w.noted("χ_"+axis, chi, None, "as above")})
		} else {
			w.chain(axis, ncr, alpha, lambda, chi)
		}
		return
	}
	w.add(Values{w.noted("χ_"+axis, 1, None, "no compression")})
}
