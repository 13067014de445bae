package working

import (
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
)

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

// axialOf writes the resistance to the axial force, and n.
func (w *writer) axialOf() {
	x := &w.a.Section
	area, symbol := "A", "N_Rd"
	if x.Class == 4 && x.NEd >= 0 {
		area = w.areaOf(x.Class)
	}
	source := area + " f_y/γ_M0"
	if x.RhoZ > 0 || x.RhoY > 0 {
		source = "max(" + source + " - (ρ_z A_v,z + ρ_y A_v,y) f_y/γ_M0, " + source + "/1000)"
	}
	w.find(symbol, source, x.NplRd, KN, "6.2.9")
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
