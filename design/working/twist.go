package working

import (
	"math"

	"stanchion/design"
	"stanchion/design/ec3"
)

// twist writes torsional, torsional-flexural or restrained-axis buckling.
func (w *writer) twist() {
	a, b, t := w.a, &w.a.T, &w.a.Twist
	switch a.TKind {
	case design.Torsional:
		w.start("Torsional buckling")
	case design.TorsionalFlexural:
		w.start("Torsional-flexural buckling")
	case design.RestrainedAxis:
		w.start("Buckling about the restrained axis")
	default:
		return
	}
	w.add(Values{w.noted("L_T", t.LT, Mm, b.How), w.noted("α_T", b.Alpha, None, "curve "+b.Curve+", as z-z")})
	w.polar()
	of := "T"
	switch a.TKind {
	case design.RestrainedAxis:
		of = "D"
		w.add(Values{w.noted("e", t.E, Mm, "shear centre to the line that is held")})
		w.find("N_cr,D", "(G I_t + π^2 E (I_w + I_z e^2)/L_T^2)/(i_0^2 + e^2)", b.Ncr, KN, "6.3.1.4(2)").Note = "enforced axis"
	case design.Torsional:
		w.torsional(t)
	default:
		w.torsional(t)
		w.coupled(t, b.Ncr)
		of = "TF"
	}
	w.reduction("T", of, b)
}

// polar writes the polar radius of gyration about the shear centre.
func (w *writer) polar() {
	source := "√((I_y + I_z)/A)"
	switch {
	case w.angle() && w.c.Torsion == ec3.TorsionGeneral:
		source = "√((I_u + I_v)/A + u_0^2 + v_0^2)"
	case w.angle():
		source = "√((I_u + I_v)/A + u_0^2)"
	case w.c.Torsion == ec3.TorsionSymmetricY:
		source = "√((I_y + I_z)/A + y_0^2)"
	}
	w.find("i_0", source, math.Sqrt(w.c.I0Sq), Mm, "6.3.1.4")
}

func (w *writer) torsional(t *ec3.Twist) {
	source := "(G I_t + π^2 E I_w/L_T^2)/i_0^2"
	if w.c.EulerW == 0 {
		source = "G I_t/i_0^2"
	}
	w.find("N_cr,T", source, t.NcrT, KN, "6.3.1.4(2)")
}

// coupled writes the load of torsional-flexural buckling, over the flexural
// lengths that the twist is coupled with.
func (w *writer) coupled(t *ec3.Twist, ncr float64) {
	first, second := w.axes()
	offset := map[string]string{"y": "y_0", "u": "u_0"}[first]
	w.add(Values{w.noted("L_cr,"+first, t.LcrY, Mm, "coupled with the twist")})
	w.find("N_cr,"+first, w.fill("π^2 E I_#/L_cr,#^2", first), t.NcrY, KN, "")
	if w.c.Torsion == ec3.TorsionGeneral {
		w.add(Values{w.value("L_cr,"+second, t.LcrZ, Mm)})
		w.find("N_cr,"+second, w.fill("π^2 E I_#/L_cr,#^2", second), t.NcrZ, KN, "")
		w.say("N_cr,TF is the least root N of (N − N_cr,u)(N − N_cr,v)(N − N_cr,T) − N² (u_0/i_0)² (N − N_cr,v) − N² (v_0/i_0)² (N − N_cr,u) = 0:")
		w.add(Values{w.noted("N_cr,TF", ncr, KN, "6.3.1.4(2)")})
		return
	}
	w.find("β", "1 - ("+offset+"/i_0)^2", 1-w.c.Y0*w.c.Y0/w.c.I0Sq, None, "")
	w.derive("r_T", "N_cr,T/N_cr,"+first, None, "")
	w.find("N_cr,TF", w.fill("2 N_cr,T/(1 + r_T + √((1 - r_T)^2 + 4 (1 - β) r_T))", first), ncr, KN, "6.3.1.4(2)")
}
