package working

import (
	"math"

	"stanchion/design/ec3"
)

// annexA writes the interaction factors of Annex A, Tables A.1 and A.2.
func (w *writer) annexA(bentY, bentZ bool) {
	x, v := &w.a.Interaction, &w.a.Interaction.AnnexA
	w.critical("y", x.NY, x.NcrY)
	w.critical("z", x.NZ, x.NcrZ)
	w.find("μ_y", "(1 - r_y)/(1 - χ_y r_y)", v.MuY, None, "Table A.1")
	w.find("μ_z", "(1 - r_z)/(1 - χ_z r_z)", v.MuZ, None, "Table A.1")
	if bentY {
		w.uniform("y", "C_my,0", x.PsiY, v.CmY0, x.SwayY)
	}
	if bentZ {
		w.uniform("z", "C_mz", x.PsiZ, x.CmZ, x.SwayZ)
	}
	if bentY {
		w.annexATorsion(x)
	}
	if x.Class <= 2 {
		w.annexAPlastic(bentY, bentZ)
	}
	w.annexAFactors(bentY, bentZ)
}

// critical writes N_Ed over an elastic critical load.
func (w *writer) critical(axis string, n, ncr float64) {
	if n == 0 || math.IsInf(ncr, 1) {
		w.add(Values{w.noted("r_"+axis, 0, None, "N_Ed/N_cr,"+axis+": no compression")})
		return
	}
	w.add(Values{w.value("N_Ed", n, KN), w.value("N_cr,"+axis, ncr, KN)})
	w.find("r_"+axis, "N_Ed/N_cr,"+axis, n/ncr, None, "")
}

// uniform writes C_mi,0 of a linear diagram. Table A.2 knows no sway axis: the
// 0.9 of Table B.3 is the least there.
func (w *writer) uniform(axis, symbol string, psi, cm float64, sway bool) {
	w.add(Values{w.noted("ψ_"+axis, psi, None, "in its segment")})
	source := w.fill("0.79 + 0.21 ψ_# + 0.36 (ψ_# - 0.33) r_#", axis)
	if sway {
		source = "max(" + source + ", 0.9)"
	}
	w.find(symbol, source, cm, None, "Table A.2")
}

// annexATorsion writes C_my and C_mLT.
func (w *writer) annexATorsion(x *ec3.Interaction) {
	v := &x.AnnexA
	w.find("a_LT", "max(1 - I_t/I_y, 0)", w.torsionShare(v), None, "Table A.1")
	lambda0 := "0"
	if x.LT.Mcr0 > 0 {
		w.find("M_cr,0", "M_cr/C_1", x.LT.Mcr0, KNm, "uniform moment")
		wy, _ := moduli(x.Class)
		lambda0 = "√(" + wy + " f_y/M_cr,0)"
	}
	w.find("λ̄_0", lambda0, v.Lambda0, None, "Table A.1")
	third := ""
	if !math.IsInf(x.NcrT, 1) {
		w.critical("T", x.NZ, x.NcrT)
		third = " (1 - r_T)"
	}
	w.add(Values{w.value("C_1", x.LT.C1, None)})
	w.find("λ̄_0,lim", "0.2 √(C_1) ((1 - r_z)"+third+")^0.25", v.Lambda0Lim, None, "Table A.1")
	if v.Lambda0 <= v.Lambda0Lim {
		w.say("λ̄_0 is not above its limit: twist does not count.")
		w.find("C_my", "C_my,0", x.CmY, None, "Table A.1")
		w.add(Values{w.value("C_mLT", x.CmLT, None)})
		return
	}
	w.twistCounts(x, third)
}

// torsionShare returns a_LT.
func (w *writer) torsionShare(v *ec3.AnnexAValues) float64 {
	if w.c.Section.Iw == 0 {
		w.add(Values{w.value("I_t", w.c.Section.It, Cm4)})
	}
	return v.ALT
}

func (w *writer) twistCounts(x *ec3.Interaction, third string) {
	v := &x.AnnexA
	if x.NY > 0 && x.My661 > 0 {
		area, modulus := "A", "W_el,y"
		value := w.c.Section.WelY
		if x.Class == 4 {
			area, modulus, value = w.areaOf(4), "W_eff,y", w.c.WEffY
		}
		w.add(Values{w.noted("M_y,Ed", x.My661, KNm, "y-y segment"), w.value("N_Ed", x.NY, KN), w.value(modulus, value, Cm3)})
		w.find("ε_y", "M_y,Ed "+area+"/(N_Ed "+modulus+")", v.EpsY, None, "Table A.1")
		w.find("C_my", "C_my,0 + (1 - C_my,0) √(ε_y) a_LT/(1 + √(ε_y) a_LT)", x.CmY, None, "Table A.1")
	} else {
		w.add(Values{w.value("C_my", x.CmY, None)})
	}
	w.find("C_mLT", "max(C_my^2 a_LT/√((1 - r_z)"+third+"), 1)", x.CmLT, None, "Table A.1")
}

// annexAPlastic writes the plasticity factors of class 1 and 2.
func (w *writer) annexAPlastic(bentY, bentZ bool) {
	x, v := &w.a.Interaction, &w.a.Interaction.AnnexA
	s := w.c.Section
	w.add(Values{w.value("W_pl,y", s.WplY, Cm3), w.value("W_el,y", s.WelY, Cm3), w.value("W_pl,z", s.WplZ, Cm3), w.value("W_el,z", s.WelZ, Cm3)})
	w.find("w_y", "min(W_pl,y/W_el,y, 1.5)", v.WY, None, "Table A.1")
	w.find("w_z", "min(W_pl,z/W_el,z, 1.5)", v.WZ, None, "Table A.1")
	w.force(max(x.NY, x.NZ), "the greater of the segments")
	w.find("n_pl", "N_Ed/(N_Rk/γ_M1)", v.Npl, None, "Table A.1")
	w.find("λ̄_max", "max(λ̄_y, λ̄_z)", v.LambdaMax, None, "Table A.1")
	bLT, cLT, dLT, eLT := "", "", "", ""
	if bentY {
		w.add(Values{w.noted("M_y,Ed", x.My661, KNm, "y-y segment")})
		w.derive("m_y", "M_y,Ed/("+w.reducedBy(&x.LT)+" M_y,Rk/γ_M1)", None, "Table A.1")
		w.find("c_LT", "10 a_LT λ̄_0^2/(5 + λ̄_z^4) m_y/C_my", v.CLT, None, "Table A.1")
		w.find("e_LT", "1.7 a_LT λ̄_0/(0.1 + λ̄_z^4) m_y/C_my", v.ELT, None, "Table A.1")
		cLT, eLT = " - c_LT", " - e_LT"
	}
	if bentY && bentZ {
		w.add(Values{w.noted("M_z,Ed", x.Mz, KNm, "z-z segment")})
		w.derive("m_z", "M_z,Ed/(M_z,Rk/γ_M1)", None, "Table A.1")
		w.find("b_LT", "0.5 a_LT λ̄_0^2 m_y m_z", v.BLT, None, "Table A.1")
		w.find("d_LT", "2 a_LT λ̄_0/(0.1 + λ̄_z^4) m_y/C_my m_z/C_mz", v.DLT, None, "Table A.1")
		bLT, dLT = " - b_LT", " - d_LT"
	}
	if bentY {
		w.find("C_yy", "max(1 + (w_y - 1) ((2 - 1.6/w_y C_my^2 (λ̄_max + λ̄_max^2)) n_pl"+bLT+"), W_el,y/W_pl,y)", v.Cyy, None, "Table A.1")
		w.find("C_zy", "max(1 + (w_y - 1) ((2 - 14 C_my^2 λ̄_max^2/w_y^5) n_pl"+dLT+"), 0.6 √(w_y/w_z) W_el,y/W_pl,y)", v.Czy, None, "Table A.1")
	}
	if bentZ {
		w.find("C_yz", "max(1 + (w_z - 1) ((2 - 14 C_mz^2 λ̄_max^2/w_z^5) n_pl"+cLT+"), 0.6 √(w_z/w_y) W_el,z/W_pl,z)", v.Cyz, None, "Table A.1")
		w.find("C_zz", "max(1 + (w_z - 1) (2 - 1.6/w_z C_mz^2 (λ̄_max + λ̄_max^2)"+eLT+") n_pl, W_el,z/W_pl,z)", v.Czz, None, "Table A.1")
	}
}

// annexAFactors writes k_yy to k_zz.
func (w *writer) annexAFactors(bentY, bentZ bool) {
	x := &w.a.Interaction
	factor := func(symbol, top, load, plastic, cross string, value float64) {
		source := top + "/(1 - " + load + ")"
		if x.Class <= 2 {
			source = top + "/((1 - " + load + ") " + plastic + ")" + cross
		}
		w.find(symbol, source, value, None, "Table A.1")
	}
	if bentY {
		factor("k_yy", "C_my C_mLT μ_y", "r_y", "C_yy", "", x.Kyy)
		factor("k_zy", "C_my C_mLT μ_z", "r_y", "C_zy", " 0.6 √(w_y/w_z)", x.Kzy)
	}
	if bentZ {
		factor("k_yz", "C_mz μ_y", "r_z", "C_yz", " 0.6 √(w_z/w_y)", x.Kyz)
		factor("k_zz", "C_mz μ_z", "r_z", "C_zz", "", x.Kzz)
	}
}
