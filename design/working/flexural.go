package working

import (
	"fmt"

	"stanchion/design"
)

// buckling writes the resistance to buckling about every axis.
func (w *writer) buckling() {
	first, second := w.axes()
	w.flexural(first, &w.a.Y)
	w.flexural(second, &w.a.Z)
	if w.a.HasT {
		w.twist()
	}
}

// flexural writes flexural buckling about an axis.
func (w *writer) flexural(axis string, b *design.Buckling) {
	if b.Curve == "" {
		return
	}
	w.start(fmt.Sprintf("Flexural buckling about %s-%s", axis, axis))
	w.add(Values{w.noted("L_cr,"+axis, b.Lcr, Mm, b.How), w.noted("α_"+axis, b.Alpha, None, "curve "+b.Curve+", Table 6.2")})
	w.find("N_cr,"+axis, w.fill("π^2 E I_#/L_cr,#^2", axis), b.Ncr, KN, "6.3.1.2(1)")
	w.reduction(axis, axis, b)
}

// reduction writes the way from an elastic critical load to the resistance and
// the utilisation. The critical load has the subscript of, the rest axis.
func (w *writer) reduction(axis, of string, b *design.Buckling) {
	slenderness, resistance := "(6.50)", "(6.47)"
	if w.c.Class == 4 {
		slenderness, resistance = "(6.51)", "(6.48)"
	}
	w.find("λ̄_"+axis, w.fill("√(@ f_y/N_cr,"+of+")", axis), b.LambdaBar, None, slenderness)
	w.find("Φ_"+axis, w.fill("0.5 (1 + α_# (λ̄_# - 0.2) + λ̄_#^2)", axis), b.Phi, None, "6.3.1.2(1)")
	w.chi(axis, b.LambdaBar, b.Chi)
	w.find("N_b,"+axis+",Rd", w.fill("χ_# @ f_y/γ_M1", axis), b.NbRd, KN, resistance)
	if b.NEd > 0 {
		w.pressed(b.NEd, b.From, b.To, b.Combination)
		w.ratio(w.fill("N_Ed/N_b,#,Rd", axis), b.Utilisation(), "(6.46)")
	}
	w.sheet.Points = append(w.sheet.Points, Point{axis, b.Curve, b.LambdaBar, b.Chi})
}

// chi writes the reduction factor.
func (w *writer) chi(axis string, lambdaBar, chi float64) {
	if lambdaBar <= 0.2 {
		w.add(Values{w.noted("χ_"+axis, chi, None, "λ̄ ≤ 0.2, 6.3.1.2")})
		return
	}
	w.find("χ_"+axis, w.fill("1/(Φ_# + √(Φ_#^2 - λ̄_#^2))", axis), chi, None, "(6.49)")
}
