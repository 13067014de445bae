package working

import (
	"strings"

	"stanchion/catalogue"
	"stanchion/design/ec3"
)

// effectiveModuli writes the effective section moduli of class 4, each in
// bending about its axis alone. EN 1993-1-5:2006 4.4.
func (w *writer) effectiveModuli(y, z bool) {
	switch w.c.Section.Shape {
	case catalogue.ShapeI:
		if y {
			w.effectiveBeam(&beam{axis: "y", depth: "h", flange: "c_f", flangeT: "t_f", outstands: true, web: "c_w", webT: "t_w", webs: 1})
		}
		if z {
			w.effectiveTips()
		}
	case catalogue.ShapeRHS:
		if y {
			w.effectiveBeam(&beam{axis: "y", depth: "h", flange: "c_b", flangeT: "t", web: "c_h", webT: "t", webs: 2})
		}
		if z {
			w.effectiveBeam(&beam{axis: "z", depth: "b", flange: "c_h", flangeT: "t", web: "c_b", webT: "t", webs: 2})
		}
	}
}

// beam is a section bent across its webs: the symbols of its parts.
type beam struct {
	axis, depth     string
	flange, flangeT string
	outstands       bool // the flange is two outstands, else one internal part
	web, webT       string
	webs            int
}

// fill puts the symbols into a formula: D the depth, F and T the flange's width
// and thickness, W and U the web's, # the axis.
func (b *beam) fill(source string) string {
	return strings.NewReplacer("D", b.depth, "F", b.flange, "T", b.flangeT, "W", b.web, "U", b.webT, "#", b.axis).Replace(source)
}

// of returns the value that a symbol stands for.
func (w *writer) of(symbol string) float64 {
	v, _ := w.exact(sym(symbol))
	return v
}

// effectiveBeam takes the ineffective parts of the compression flange and then
// of the webs away.
func (w *writer) effectiveBeam(b *beam) {
	w.say("Effective section in bending about %s-%s: first the compression flange, then the web.", b.axis, b.axis)
	flange := w.flangeStrip(b)
	compressed := "W/2"
	if flange {
		w.derive("s_1", "A_1 z_1/(A - A_1)", Mm, "").Note = "shift of the centroid"
		compressed = "W/2 + s_1"
	}
	w.derive("b_t", b.fill(compressed), Mm, "").Note = "web in compression"
	web := w.webStrip(b)
	area, moment, second := "A", "", "I_#"
	if flange {
		area, moment, second = area+" - A_1", "A_1 z_1", second+" - A_1 (z_1^2 + T^2/12)"
	}
	if web {
		area, moment, second = area+" - A_2", strings.TrimPrefix(moment+" + A_2 z_2", " + "), second+" - A_2 (z_2^2 + d_2^2/12)"
	}
	if !flange && !web {
		w.find("W_eff,"+b.axis, b.fill("I_#/(D/2)"), w.effective(b.axis), Cm3, "").Note = "all of it is effective"
		return
	}
	w.derive("A_r", area, Mm2, "")
	w.derive("s_2", "("+moment+")/A_r", Mm, "")
	w.derive("I_r", b.fill(second+" - A_r s_2^2"), Cm4, "")
	w.find("W_eff,"+b.axis, b.fill("I_r/(D/2 + s_2)"), w.effective(b.axis), Cm3, "6.2.2.5")
}

func (w *writer) effective(axis string) float64 {
	if axis == "z" {
		return w.c.WEffZ
	}
	return w.c.WEffY
}

// flangeStrip writes what the compression flange loses: area A_1 at z_1 from
// the middle of the section. It reports whether it loses any.
func (w *writer) flangeStrip(b *beam) bool {
	ratio := w.of(b.flange) / w.of(b.flangeT)
	k, strips := "4", ""
	lambdaP := ec3.LambdaP(ratio, w.c.Eps, 4)
	rho, source, clause := ec3.RhoInternal(lambdaP, 1), "(λ̄_p,1 - 0.22)/λ̄_p,1^2", "EN 1993-1-5 (4.2)"
	if b.outstands {
		k, strips = "0.43", "2 "
		lambdaP = ec3.LambdaP(ratio, w.c.Eps, 0.43)
		rho, source, clause = ec3.RhoOutstand(lambdaP), "(λ̄_p,1 - 0.188)/λ̄_p,1^2", "EN 1993-1-5 (4.3)"
	}
	w.find("λ̄_p,1", b.fill("F/T/(28.4 ε √("+k+"))"), lambdaP, None, "EN 1993-1-5 4.4(2)").Note = "flange"
	if !w.reductionOf("ρ_1", source, rho, clause) {
		return false
	}
	w.derive("A_1", b.fill(strips+"(1 - ρ_1) F T"), Mm2, "")
	w.derive("z_1", b.fill("(D - T)/2"), Mm, "")
	return true
}

// reductionOf writes the effective part of a width, and reports whether it is
// less than all.
func (w *writer) reductionOf(symbol, source string, rho float64, clause string) bool {
	if rho >= 1 {
		w.add(Values{w.noted(symbol, 1, None, "all of it is effective")})
		return false
	}
	w.find(symbol, source, rho, None, clause)
	return true
}

// webStrip writes what the webs lose between their effective parts: area A_2 at
// z_2, over the depth d_2. It reports whether they lose any.
func (w *writer) webStrip(b *beam) bool {
	s := w.derive("ψ_2", b.fill("(b_t - W)/b_t"), None, "")
	s.Note = "stress ratio of the web"
	psi := w.of("ψ_2")
	k := "7.81 - 6.29 ψ_2 + 9.78 ψ_2^2"
	if psi <= -1 {
		k = "5.98 (1 - ψ_2)^2"
		if psi < -3 {
			w.add(Values{w.noted("ψ_2", -3, None, "not less")})
			psi = -3
		}
	}
	w.derive("k_σ", k, None, "EN 1993-1-5 Table 4.1")
	lambdaP := ec3.LambdaP(w.of(b.web)/w.of(b.webT), w.c.Eps, w.of("k_σ"))
	w.find("λ̄_p,2", b.fill("W/U/(28.4 ε √(k_σ))"), lambdaP, None, "EN 1993-1-5 4.4(2)").Note = "web"
	if !w.reductionOf("ρ_2", "(λ̄_p,2 - 0.055 (3 + ψ_2))/λ̄_p,2^2", ec3.RhoInternal(lambdaP, psi), "EN 1993-1-5 (4.2)") {
		return false
	}
	webs := ""
	if b.webs > 1 {
		webs = count(b.webs) + " "
	}
	w.derive("b_c", b.fill("min(b_t, W)"), Mm, "")
	w.derive("d_2", "(1 - ρ_2) b_c", Mm, "EN 1993-1-5 Table 4.1")
	w.derive("A_2", b.fill(webs+"d_2 U"), Mm2, "")
	w.derive("z_2", b.fill("W/2 - 0.4 ρ_2 b_c - d_2/2"), Mm, "")
	return true
}

// effectiveTips writes an I or H bent about z-z: its outstands lose their tips
// on the compression side.
func (w *writer) effectiveTips() {
	s := w.c.Section
	w.say("Effective section in bending about z-z: the outstands lose their tips on the compression side.")
	psi := (s.Tw/2 + s.R) / (s.B / 2)
	w.find("ψ_1", "(t_w/2 + r)/(b/2)", psi, None, "").Note = "stress ratio, root to tip"
	w.derive("k_σ", "0.57 - 0.21 ψ_1 + 0.07 ψ_1^2", None, "EN 1993-1-5 Table 4.2")
	lambdaP := ec3.LambdaP(w.c.Elements[0].Ratio, w.c.Eps, w.of("k_σ"))
	w.find("λ̄_p,1", "c_f/t_f/(28.4 ε √(k_σ))", lambdaP, None, "EN 1993-1-5 4.4(2)")
	if !w.reductionOf("ρ_1", "(λ̄_p,1 - 0.188)/λ̄_p,1^2", ec3.RhoOutstand(lambdaP), "EN 1993-1-5 (4.3)") {
		w.find("W_eff,z", "I_z/(b/2)", w.c.WEffZ, Cm3, "").Note = "all of it is effective"
		return
	}
	w.derive("l_1", "(1 - ρ_1) c_f", Mm, "")
	w.derive("A_1", "2 l_1 t_f", Mm2, "")
	w.derive("z_1", "(b - l_1)/2", Mm, "")
	w.derive("A_r", "A - A_1", Mm2, "")
	w.derive("s_1", "A_1 z_1/A_r", Mm, "")
	w.derive("I_r", "I_z - A_1 (z_1^2 + l_1^2/12) - A_r s_1^2", Cm4, "")
	w.find("W_eff,z", "I_r/max(b/2 + s_1 - l_1, b/2 - s_1)", w.c.WEffZ, Cm3, "6.2.2.5")
}
