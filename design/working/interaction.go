package working

import (
	"fmt"
	"math"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/working/formula"
)

// interaction writes (6.61) and (6.62) of the set of segments where the greater
// of the two is greatest.
func (w *writer) interaction() {
	x := &w.a.Interaction
	if x.Class == 0 {
		return
	}
	w.start("Interaction of buckling and bending")
	w.say("Segments: y-y %s, z-z %s-%s m, lateral-torsional %s-%s m.",
		w.where(x.FromY, x.ToY, x.Combination), metres(x.FromZ), metres(x.ToZ), metres(x.FromLT), metres(x.ToLT))
	bentY, bentZ := x.My661 > 0 || x.My662 > 0, x.Mz > 0
	w.force(max(x.NY, x.NZ), "greatest in these segments")
	w.combinedClass(&x.Web, x.Class, max(x.NY, x.NZ), bentY)
	w.modulus(x.Class, bentY, bentZ)
	w.characteristic(bentY, bentZ)
	w.ratioOf("y", x.NcrY, x.LambdaY, x.ChiY, x.NY, x.RatioY)
	w.ratioOf("z", x.NcrZ, x.LambdaZ, x.ChiZ, x.NZ, x.RatioZ)
	if bentY {
		w.chiOfInteraction()
	}
	if w.m.Settings.Interaction == design.AnnexA {
		w.annexA(bentY, bentZ)
	} else {
		w.annexB(bentY, bentZ)
	}
	w.sums(bentY, bentZ)
}

// characteristic writes N_Rk, M_y,Rk and M_z,Rk of the class.
func (w *writer) characteristic(bentY, bentZ bool) {
	x := &w.a.Interaction
	wy, wz := moduli(x.Class)
	w.find("N_Rk", w.areaOf(x.Class)+" f_y", x.NRk, KN, "Table 6.7")
	if bentY {
		w.find("M_y,Rk", wy+" f_y", x.MyRk, KNm, "Table 6.7")
	}
	if bentZ {
		w.find("M_z,Rk", wz+" f_y", x.MzRk, KNm, "Table 6.7")
	}
}

// ratioOf writes n about an axis: N_Ed over the resistance to buckling, in full
// where its values are not those of the check in compression.
func (w *writer) ratioOf(axis string, ncr, lambda, chi, nEd, n float64) {
	first := &w.a.Y
	alpha := w.c.AlphaY
	if axis == "z" {
		first, alpha = &w.a.Z, w.c.AlphaZ
	}
	switch {
	case math.IsInf(ncr, 1):
		w.add(Values{w.noted("λ̄_"+axis, 0, None, "no compression"), w.value("χ_"+axis, 1, None)})
	case first.Curve != "" && same(first.LambdaBar, lambda):
		w.add(Values{w.noted("λ̄_"+axis, lambda, None, "as above"), w.value("χ_"+axis, chi, None)})
	default:
		w.chain(axis, ncr, alpha, lambda, chi)
	}
	if k, ok := w.known[formula.Sym("N_Ed")]; !ok || k.exact != nEd {
		w.force(nEd, fmt.Sprintf("greatest in the %s-%s segment", axis, axis))
	}
	w.find("n_"+axis, w.fill("N_Ed/(χ_# N_Rk/γ_M1)", axis), n, None, "")
}

// chain writes the way from the length to the reduction factor, with N_Rk of
// the class under the moments.
func (w *writer) chain(axis string, ncr, alpha, lambda, chi float64) {
	w.add(Values{w.value("L_cr,"+axis, math.Sqrt(math.Pi*math.Pi*design.E*w.inertia(axis)/ncr), Mm), w.value("α_"+axis, alpha, None)})
	w.find("N_cr,"+axis, w.fill("π^2 E I_#/L_cr,#^2", axis), ncr, KN, "6.3.1.2(1)")
	w.find("λ̄_"+axis, "√(N_Rk/N_cr,"+axis+")", lambda, None, "(6.50)")
	w.derive("Φ_"+axis, w.fill("0.5 (1 + α_# (λ̄_# - 0.2) + λ̄_#^2)", axis), None, "6.3.1.2(1)")
	w.chi(axis, lambda, chi)
}

func (w *writer) inertia(axis string) float64 {
	if axis == "z" {
		return w.c.Section.Iz
	}
	return w.c.Section.Iy
}

// chiOfInteraction writes the reduction factor of the lateral-torsional
// segment, in full where it is not that of the check of bending alone.
func (w *writer) chiOfInteraction() {
	w.chiLTOnce(&w.a.Interaction.LT)
}

// chiLTOnce writes the reduction factor of a lateral-torsional segment, in full
// where it is not that of the check of bending alone.
func (w *writer) chiLTOnce(x *ec3.Lateral) {
	l := &w.a.Lateral
	if x.Alpha > 0 && l.Class == x.Class && l.From == x.From && l.To == x.To && l.Combination == x.Combination {
		w.add(Values{w.noted(w.reducedBy(x), x.ChiMod, None, "as above")})
		return
	}
	w.chiLT(x)
}

// equivalent writes C_m of a linear diagram. EN 1993-1-1:2005 Table B.3.
func (w *writer) equivalent(axis string, psi, cm float64, sway bool) {
	if sway {
		w.add(Values{w.noted("C_m"+axis, cm, None, "sway axis, Table B.3")})
		return
	}
	w.add(Values{w.noted("ψ_"+axis, psi, None, "in its segment")})
	w.find("C_m"+axis, "max(0.6 + 0.4 ψ_"+axis+", 0.4)", cm, None, "Table B.3")
}

// sums writes (6.61) and (6.62).
func (w *writer) sums(bentY, bentZ bool) {
	x := &w.a.Interaction
	one := func(my float64, n, ky, kz string, u float64, clause, note string) {
		source := n
		var list Values
		if bentY {
			list = append(list, w.noted("M_y,Ed", my, KNm, note))
			source += " + " + ky + " M_y,Ed/(" + w.reducedBy(&x.LT) + " M_y,Rk/γ_M1)"
		}
		if bentZ {
			list = append(list, w.noted("M_z,Ed", x.Mz, KNm, "z-z segment"))
			source += " + " + kz + " M_z,Ed/(M_z,Rk/γ_M1)"
		}
		w.add(list)
		w.ratio(source, u, clause)
	}
	one(x.My661, "n_y", "k_yy", "k_yz", x.U661, "(6.61)", "y-y segment")
	one(x.My662, "n_z", "k_zy", "k_zz", x.U662, "(6.62)", "lateral-torsional segment")
}
