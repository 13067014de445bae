package working

import (
	"stanchion/design"
	"stanchion/design/ec3"
)

// lateral writes lateral-torsional buckling where its utilisation is greatest.
func (w *writer) lateral() {
	x := &w.a.Lateral
	if x.Class == 0 || w.worst(design.LateralTorsional) == nil {
		return
	}
	w.start("Lateral-torsional buckling")
	w.add(Values{w.noted("M_y,Ed", x.MyEd, KNm, "greatest in "+w.where(x.From, x.To, x.Combination))})
	w.say("The section is class %d under the axial force with the moments.", x.Class)
	w.modulus(x.Class, true, false)
	w.chiLT(x)
	wy, _ := moduli(x.Class)
	w.find("M_b,Rd", w.reducedBy(x)+" "+wy+" f_y/γ_M1", x.MbRd, KNm, "(6.55)")
	w.ratio("M_y,Ed/M_b,Rd", x.Utilisation, "(6.54)")
}

// reducedBy returns the symbol of the reduction factor in use.
func (w *writer) reducedBy(x *ec3.Lateral) string {
	if x.Alpha == 0 || w.m.Settings.LTB == design.LTBGeneral {
		return "χ_LT"
	}
	return "χ_LT,mod"
}

// chiLT writes the way to the reduction factor of a segment.
func (w *writer) chiLT(x *ec3.Lateral) {
	if x.Alpha == 0 {
		w.add(Values{w.noted("χ_LT", 1, None, "the section does not buckle laterally")})
		return
	}
	wy, _ := moduli(x.Class)
	w.add(Values{w.value("L_LT", x.L, Mm), w.noted("ψ_LT", x.Psi, None, "ratio of the moments at its ends"),
		w.noted("C_1", x.C1, None, c1Source(x))})
	source := "C_1 π^2 E I_z/L_LT^2 √(I_w/I_z + L_LT^2 G I_t/(π^2 E I_z))"
	if w.c.Section.Iw == 0 {
		source = "C_1 π^2 E I_z/L_LT^2 √(L_LT^2 G I_t/(π^2 E I_z))"
		w.add(Values{w.value("I_t", w.c.Section.It, Cm4)})
	}
	w.find("M_cr", source, x.Mcr, KNm, "NCCI SN003")
	w.find("λ̄_LT", "√("+wy+" f_y/M_cr)", x.LambdaBar, None, "6.3.2.2(1)")
	w.add(Values{w.noted("α_LT", x.Alpha, None, "curve "+x.Curve.String())})
	if w.m.Settings.LTB == design.LTBGeneral {
		w.find("Φ_LT", "0.5 (1 + α_LT (λ̄_LT - 0.2) + λ̄_LT^2)", x.Phi, None, "6.3.2.2(1)")
		w.find("χ_LT", "min(1/(Φ_LT + √(Φ_LT^2 - λ̄_LT^2)), 1)", x.Chi, None, "(6.56)")
		return
	}
	w.rolled(x)
}

// c1Source says where C_1 is from.
func c1Source(x *ec3.Lateral) string {
	if x.Beyond {
		return "an end free to twist: below NCCI SN003"
	}
	return "NCCI SN003"
}

// rolled writes the method for rolled sections. EN 1993-1-1:2005 6.3.2.3.
func (w *writer) rolled(x *ec3.Lateral) {
	w.find("Φ_LT", "0.5 (1 + α_LT (λ̄_LT - 0.4) + 0.75 λ̄_LT^2)", x.Phi, None, "6.3.2.3(1)")
	if x.LambdaBar <= 0.4 {
		w.add(Values{w.noted("χ_LT", 1, None, "λ̄_LT ≤ 0.4")})
	} else {
		w.find("χ_LT", "min(1/(Φ_LT + √(Φ_LT^2 - 0.75 λ̄_LT^2)), 1/λ̄_LT^2, 1)", x.Chi, None, "(6.57)")
	}
	kc := "1/(1.33 - 0.33 ψ_LT)"
	clause := "Table 6.6"
	switch {
	case w.m.Settings.National.KcFromC1:
		kc, clause = "1/√(C_1)", "UK NA"
	case x.Beyond:
		kc, clause = "1/√(C_1)", ""
	}
	w.find("k_c", kc, x.Kc, None, clause)
	w.find("f", "min(1 - 0.5 (1 - k_c) (1 - 2 (λ̄_LT - 0.8)^2), 1)", x.F, None, "6.3.2.3(2)")
	w.find("χ_LT,mod", "min(χ_LT/f, 1/λ̄_LT^2, 1)", x.ChiMod, None, "(6.58)")
}
