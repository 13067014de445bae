package working

import (
	"math"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// shear writes the shear that the moments bring.
func (w *writer) shear() {
	z, y := w.worst(design.ShearZ), w.worst(design.ShearY)
	if z == nil && y == nil {
		return
	}
	w.start("Shear from the moments")
	avZ, avY := ec3.ShearAreas(w.c.Section)
	if z != nil {
		w.shearAlong("z", avZ, z)
	}
	if y != nil {
		w.shearAlong("y", avY, y)
	}
}

// shearAlong writes the shear along an axis. The area is by 6.2.6(3).
func (w *writer) shearAlong(axis string, av float64, c *design.Check) {
	about := map[string]string{"z": "y", "y": "z"}[axis]
	my, mz := w.m.EndMoments(w.c, c.Combination)
	ends := map[string]design.EndMoments{"y": my, "z": mz}[about]
	w.add(Values{w.noted("M_bottom", ends.Bottom, KNm, strings.TrimSpace(about+"-"+about+" "+w.combination(c.Combination))), w.value("M_top", ends.Top, KNm)})
	w.find("V_"+axis+",Ed", "abs(M_top - M_bottom)/L", c.Ed, KN, "")
	w.find("A_v,"+axis, w.shearArea(axis), av, Mm2, "6.2.6(3)")
	vpl := ec3.VplRd(av, w.c.Fy, w.c.GammaM0)
	w.find("V_pl,"+axis+",Rd", "A_v,"+axis+" (f_y/√(3))/γ_M0", vpl, KN, "(6.18)")
	resistance := "V_pl," + axis + ",Rd"
	if c.Rd < vpl && !same(c.Rd, vpl) {
		w.webBuckles(axis, c.Rd)
		resistance = "V_b," + axis + ",Rd"
	}
	w.ratio("V_"+axis+",Ed/"+resistance, c.Utilisation, "(6.17)")
}

// webBuckles writes the resistance of slender webs to shear buckling.
// EN 1993-1-5:2006 5.2 and 5.3.
func (w *writer) webBuckles(axis string, rd float64) {
	s := w.c.Section
	height, thickness, webs := "h - 2 t_f", "t_w", ""
	hw, t := s.H-2*s.Tf, s.Tw
	if s.Shape == catalogue.ShapeRHS {
		height, thickness, webs = "h - 2 t", "t", "2 "
		if axis == "y" {
			height, hw = "b - 2 t", s.B-2*s.Tw
		}
	}
	w.find("h_w", height, hw, Mm, "")
	w.find("λ̄_w", "h_w/(86.4 "+thickness+" ε)", hw/(86.4*t*w.c.Eps), None, "EN 1993-1-5 (5.5)")
	w.derive("χ_w", "min(0.83/λ̄_w, 1)", None, "EN 1993-1-5 Table 5.1")
	w.find("V_b,"+axis+",Rd", "χ_w "+webs+"h_w "+thickness+" (f_y/√(3))/γ_M1", rd, KN, "EN 1993-1-5 (5.2)")
}

// shearArea returns the formula of the shear area along an axis.
// EN 1993-1-1:2005 6.2.6(3), eta = 1.0.
func (w *writer) shearArea(axis string) string {
	switch w.c.Section.Shape {
	case catalogue.ShapeI:
		if axis == "z" {
			return "max(A - 2 b t_f + (t_w + 2 r) t_f, (h - 2 t_f) t_w)"
		}
		return "A - (h - 2 t_f) t_w"
	case catalogue.ShapeRHS:
		if axis == "z" {
			return "A h/(b + h)"
		}
		return "A b/(b + h)"
	}
	return "2 A/π"
}

// sheared writes what shear above half of its resistance takes from the moduli
// and from the axial resistance, and returns the symbols of the moduli that are
// left. EN 1993-1-1:2005 6.2.8 and 6.2.10(3).
func (w *writer) sheared() (wy, wz string) {
	x := &w.a.Section
	wy, wz = moduli(x.Class)
	if x.RhoZ == 0 && x.RhoY == 0 {
		return wy, wz
	}
	avZ, avY := ec3.ShearAreas(w.c.Section)
	w.add(Values{w.value("A_v,z", avZ, Mm2), w.value("A_v,y", avY, Mm2)})
	tube := w.c.Section.Shape == catalogue.ShapeCHS
	if tube {
		w.add(Values{w.noted("V_z,Ed", math.Hypot(x.VzEd, x.VyEd), KN, "resultant"), w.value("V_pl,z,Rd", x.VzRd, KN)})
		w.noted("ρ_y", 0, None, "")
		w.rho("z", x.RhoZ)
	} else {
		w.add(Values{w.value("V_z,Ed", x.VzEd, KN), w.value("V_pl,z,Rd", x.VzRd, KN), w.value("V_y,Ed", x.VyEd, KN), w.value("V_pl,y,Rd", x.VyRd, KN)})
		w.rho("z", x.RhoZ)
		w.rho("y", x.RhoY)
	}
	left := func(symbol, whole, source string, exact float64) {
		w.find(symbol, "max(min("+whole+", "+source+"), "+whole+"/1000)", exact, Cm3, "6.2.8")
	}
	sourceY, sourceZ := w.leftModuli()
	s := w.c.Section
	w.add(Values{w.value("W_pl,y", s.WplY, Cm3), w.value("W_pl,z", s.WplZ, Cm3)})
	if x.MyEd > 0 {
		left("W_V,y", wy, sourceY, x.WY)
		wy = "W_V,y"
	}
	if x.MzEd > 0 {
		left("W_V,z", wz, sourceZ, x.WZ)
		wz = "W_V,z"
	}
	return wy, wz
}

// rho writes the reduction for shear along an axis.
func (w *writer) rho(axis string, rho float64) {
	if rho == 0 {
		w.add(Values{w.noted("ρ_"+axis, 0, None, "V_Ed up to half of V_pl,Rd")})
		return
	}
	rd := "V_pl," + axis + ",Rd"
	w.find("ρ_"+axis, "(2 min(V_"+axis+",Ed, "+rd+")/"+rd+" - 1)^2", rho, None, "6.2.8(3)")
}

// leftModuli returns the formulas of the plastic moduli that shear leaves.
func (w *writer) leftModuli() (y, z string) {
	switch w.c.Section.Shape {
	case catalogue.ShapeI:
		return "W_pl,y - ρ_z ((h - 2 t_f) t_w)^2/(4 t_w)", "W_pl,z (1 - ρ_y)"
	case catalogue.ShapeRHS:
		return "W_pl,y - ρ_z A_v,z^2/(8 t)", "W_pl,z - ρ_y A_v,y^2/(8 t)"
	}
	return "W_pl,y (1 - ρ_z)", "W_pl,z (1 - ρ_z)"
}
