package working

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// fire writes the way to the critical temperature.
func (w *writer) fire() {
	f := &w.sheet.Result.Fire
	if !f.Asked {
		return
	}
	w.start("Fire, EN 1993-1-2")
	if f.Reason != "" {
		w.say("No critical temperature: %s.", f.Reason)
	}
	if f.CriticalTemperature > 0 {
		w.atCritical(f)
	}
	w.exposure(f)
	for _, note := range f.Notes {
		w.say("%s.", strings.ToUpper(note[:1])+note[1:])
	}
}

// atCritical writes the resistance at the critical temperature.
func (w *writer) atCritical(f *design.FireResult) {
	g := &f.Governing
	gamma := w.m.Settings.National.GammaMfi
	if gamma == 0 {
		gamma = 1
	}
	w.add(Values{w.noted("η_fi", f.LoadRatio, None, w.where(g.From, g.To, g.Combination)), w.value("N_fi,Ed", g.Ed, KN), w.value("γ_M,fi", gamma, None)})
	w.add(Values{w.noted("θ_cr", f.CriticalTemperature, Celsius, g.Clause)})
	if f.Chi == 0 {
		return
	}
	w.add(Values{w.noted("L_fi", f.Lcr, Mm, f.How), w.noted("λ̄", f.LambdaBar, None, "over L_fi at 20 °C, gross section"),
		w.value("k_y,θ", f.Ky, None), w.noted("k_E,θ", f.KE, None, "at θ_cr, Table 3.1")})
	w.derive("α_fi", "0.65 √(235/f_y)", None, "4.2.3.2(2)")
	w.find("λ̄_θ", "λ̄ √(k_y,θ/k_E,θ)", f.LambdaTheta, None, "(4.7)")
	w.derive("Φ_θ", "0.5 (1 + α_fi λ̄_θ + λ̄_θ^2)", None, "4.2.3.2(2)")
	w.find("χ_fi", "1/(Φ_θ + √(Φ_θ^2 - λ̄_θ^2))", f.Chi, None, "(4.6)")
	w.derive("N_b,fi,Rd", "χ_fi A k_y,θ f_y/γ_M,fi", KN, "(4.5)").Note = "equals N_fi,Ed at θ_cr"
}

// exposure writes the section factor and the time without protection.
func (w *writer) exposure(f *design.FireResult) {
	w.add(Values{w.noted("A_m/V", f.SectionFactor, PerM, "Tables 4.2, 4.3"), w.noted("k_sh", f.ShadowFactor, None, "4.2.5.1")})
	if f.TimeToCritical > 0 {
		w.say("%s", fmt.Sprintf("Unprotected steel reaches θ_cr after %s min of the standard fire (4.25), in steps of 5 s.", fixed(f.TimeToCritical, 1)))
	}
}
