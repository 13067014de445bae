package working

import (
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
)

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

// bentSection writes 6.2.9 where its utilisation is the greatest.
func (w *writer) bentSection() {
	x := &w.a.Section
	w.start("Cross-section in bending and axial force")
	where := ""
	if c := w.worst(design.CrossSection); c != nil {
		where = "at " + metres(c.From) + " m"
		if name := w.combination(c.Combination); name != "" {
			where += ", " + name
		}
	}
	w.acts(x.NEd, x.MyEd, x.MzEd, where)
	w.combinedClass(&x.Web, x.Class, x.NEd, x.MyEd > 0)
	w.modulus(x.Class, x.MyEd > 0, x.MzEd > 0)
	wy, wz := w.sheared()
	w.axialOf()
	if x.MyEd > 0 {
		w.find("M_c,y,Rd", wy+" f_y/γ_M0", x.MplY, KNm, "6.2.5(2)")
	}
	if x.MzEd > 0 {
		w.find("M_c,z,Rd", wz+" f_y/γ_M0", x.MplZ, KNm, "6.2.5(2)")
	}
	if x.Linear {
		w.linear()
		return
	}
	w.reducedMoments()
	w.criterion()
}

// acts writes the forces of a check.
func (w *writer) acts(n, my, mz float64, where string) {
	list := Values{w.noted("N_Ed", n, KN, where)}
	if my > 0 {
		list = append(list, w.value("M_y,Ed", my, KNm))
	}
	if mz > 0 {
		list = append(list, w.value("M_z,Ed", mz, KNm))
	}
	w.add(list)
}

// sheared writes the moduli reduced for shear, where it is above half of its
// resistance, and returns the symbols of those that are left.
func (w *writer) sheared() (wy, wz string) {
	x := &w.a.Section
	wy, wz = moduli(x.Class)
	if x.RhoZ == 0 && x.RhoY == 0 {
		return wy, wz
	}
	if w.c.Section.Shape == catalogue.ShapeCHS {
		return w.shearedTube()
	}
	reduce := func(axis string, v, rd, rho float64) {
		if rho > 0 {
			w.add(Values{w.value("V_"+axis+",Ed", v, KN), w.value("V_pl,"+axis+",Rd", rd, KN)})
			w.find("ρ_"+axis, "(2 min(V_"+axis+",Ed, V_pl,"+axis+",Rd)/V_pl,"+axis+",Rd - 1)^2", rho, None, "6.2.8(3)")
		} else {
			w.add(Values{w.noted("ρ_"+axis, 0, None, "V_Ed up to half of V_pl,Rd")})
		}
	}
	reduce("z", x.VzEd, x.VzRd, x.RhoZ)
	reduce("y", x.VyEd, x.VyRd, x.RhoY)
	sourceY, sourceZ := wy+" (1 - ρ_z)", wz+" (1 - ρ_y)"
	switch w.c.Section.Shape {
	case catalogue.ShapeI:
		sourceY = wy + " - ρ_z ((h - 2 t_f) t_w)^2/(4 t_w)"
	case catalogue.ShapeRHS:
		sourceY = wy + " - ρ_z (A h/(b + h))^2/(8 t)"
		sourceZ = wz + " - ρ_y (A b/(b + h))^2/(8 t)"
	}
	if x.MyEd > 0 {
		w.find("W_V,y", sourceY, x.WY, Cm3, "(6.30)")
		wy = "W_V,y"
	}
	if x.MzEd > 0 {
		w.find("W_V,z", sourceZ, x.WZ, Cm3, "6.2.8(3)")
		wz = "W_V,z"
	}
	return wy, wz
}

// shearedTube reduces the modulus of a tube for the resultant shear.
func (w *writer) shearedTube() (wy, wz string) {
	x := &w.a.Section
	symbol, from := "W_V", "W_pl,y"
	if x.Class > 2 {
		from = "W_el,y"
	}
	if x.MyEd == 0 {
		from = from[:5] + "z"
	}
	w.add(Values{w.value("V_z,Ed", x.VzEd, KN), w.value("V_y,Ed", x.VyEd, KN), w.value("V_pl,Rd", x.VzRd, KN)})
	w.derive("V_Ed", "√(V_z,Ed^2 + V_y,Ed^2)", KN, "")
	w.find("ρ", "(2 min(V_Ed, V_pl,Rd)/V_pl,Rd - 1)^2", x.RhoZ, None, "6.2.8(3)")
	w.find(symbol, from+" (1 - ρ)", x.WY, Cm3, "6.2.8(3)")
	return symbol, symbol
}

// axialOf writes the resistance to the axial force, and n.
func (w *writer) axialOf() {
	x := &w.a.Section
	area, symbol := "A", "N_Rd"
	if x.Class == 4 && x.NEd >= 0 {
		area = w.areaOf(x.Class)
	}
	w.find(symbol, area+" f_y/γ_M0", x.NplRd, KN, "6.2.9")
	w.find("n", "abs(N_Ed)/N_Rd", x.N, None, "")
}

// linear writes the sum for class 3 and 4, and beyond n = 1.
func (w *writer) linear() {
	x := &w.a.Section
	sum := []string{"n"}
	if x.MyEd > 0 {
		sum = append(sum, "M_y,Ed/M_c,y,Rd")
	}
	if x.MzEd > 0 {
		sum = append(sum, "M_z,Ed/M_c,z,Rd")
	}
	clause := map[int]string{3: "(6.42)", 4: "(6.44)"}[x.Class]
	if clause == "" {
		clause = "(6.2)"
	}
	w.ratio(strings.Join(sum, " + "), x.Utilisation, clause)
}

// reducedMoments writes the moment resistances reduced for the axial force.
func (w *writer) reducedMoments() {
	x := &w.a.Section
	switch w.c.Section.Shape {
	case catalogue.ShapeCHS:
		w.find("M_N,Rd", w.tubeModulus()+" (1 - n^1.7)", x.MNY, KNm, "6.2.9.1(5)")
	case catalogue.ShapeRHS:
		if x.MyEd > 0 {
			w.find("a_w", "min((A - 2 b t)/A, 0.5)", x.Aw, None, "6.2.9.1(5)")
			w.find("M_N,y,Rd", "M_c,y,Rd min((1 - n)/(1 - 0.5 a_w), 1)", x.MNY, KNm, "(6.39)")
		}
		if x.MzEd > 0 {
			w.find("a_f", "min((A - 2 h t)/A, 0.5)", x.Af, None, "6.2.9.1(5)")
			w.find("M_N,z,Rd", "M_c,z,Rd min((1 - n)/(1 - 0.5 a_f), 1)", x.MNZ, KNm, "(6.40)")
		}
	default:
		w.find("a", "min((A - 2 b t_f)/A, 0.5)", x.Aw, None, "6.2.9.1(5)")
		if x.MyEd > 0 {
			w.find("M_N,y,Rd", "M_c,y,Rd min((1 - n)/(1 - 0.5 a), 1)", x.MNY, KNm, "(6.36)")
		}
		if x.MzEd > 0 {
			w.reducedMinor()
		}
	}
}

// tubeModulus is the moment resistance of a tube, whichever axis is bent.
func (w *writer) tubeModulus() string {
	if w.a.Section.MyEd > 0 {
		return "M_c,y,Rd"
	}
	return "M_c,z,Rd"
}

func (w *writer) reducedMinor() {
	x := &w.a.Section
	if x.N > x.Aw {
		w.find("M_N,z,Rd", "M_c,z,Rd (1 - ((n - a)/(1 - a))^2)", x.MNZ, KNm, "(6.38)")
		return
	}
	w.find("M_N,z,Rd", "M_c,z,Rd", x.MNZ, KNm, "(6.37)").Note = "n ≤ a"
}

// criterion writes (6.31) or (6.41). The utilisation is n where that is more.
func (w *writer) criterion() {
	x := &w.a.Section
	source, clause := "", "(6.31)"
	switch {
	case w.c.Section.Shape == catalogue.ShapeCHS:
		source = map[bool]string{true: "√(M_y,Ed^2 + M_z,Ed^2)/M_N,Rd", false: ""}[x.MyEd > 0 && x.MzEd > 0]
		if source == "" {
			source = map[bool]string{true: "M_y,Ed", false: "M_z,Ed"}[x.MyEd > 0] + "/M_N,Rd"
		}
	case x.MzEd == 0:
		source = "M_y,Ed/M_N,y,Rd"
	case x.MyEd == 0:
		source = "M_z,Ed/M_N,z,Rd"
	default:
		w.exponents()
		source, clause = "(M_y,Ed/M_N,y,Rd)^α + (M_z,Ed/M_N,z,Rd)^β_z", "(6.41)"
	}
	if x.N > 0 {
		source = "max(" + source + ", n)"
	}
	w.ratio(source, x.Utilisation, clause)
}

// exponents writes those of (6.41).
func (w *writer) exponents() {
	x := &w.a.Section
	if w.c.Section.Shape == catalogue.ShapeRHS {
		if x.Alpha < 6 {
			w.find("α", "min(1.66/(1 - 1.13 n^2), 6)", x.Alpha, None, "6.2.9.1(6)")
		} else {
			w.add(Values{w.noted("α", 6, None, "the greatest, 6.2.9.1(6)")})
		}
		w.find("β_z", "α", x.Beta, None, "6.2.9.1(6)")
		return
	}
	w.add(Values{w.noted("α", x.Alpha, None, "6.2.9.1(6)")})
	w.find("β_z", "max(5 n, 1)", x.Beta, None, "6.2.9.1(6)")
}

// areaOf returns the symbol of the area that a class gives. A_eff is that of
// uniform compression; where the section is not class 4 in compression, it is
// written here.
func (w *writer) areaOf(class int) string {
	if class < 4 {
		return "A"
	}
	if w.c.Class < 4 {
		w.add(Values{w.noted("A_eff", w.c.AEff, Mm2, "all of it is effective in uniform compression")})
	}
	return "A_eff"
}
