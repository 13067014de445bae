package working

import (
	"math"

	"stanchion/design/ec3"
	"stanchion/design/working/formula"
)

// bending writes everything that moments bring in: nothing where none acts.
func (w *writer) bending() {
	if w.m.AxialOnly || w.a.Section.Class == 0 {
		return
	}
	w.moments()
	w.nominal()
	w.shear()
	w.bentSection()
	w.lateral()
	w.interaction()
	w.simple()
}

// moments writes the end moments of every combination.
func (w *writer) moments() {
	w.start("Bending moments")
	t := Table{Head: []string{"combination", "M_y bottom kNm", "M_y top", "M_z bottom", "M_z top"}, Right: []bool{false, true, true, true, true}}
	for i := range w.m.Column.Combinations {
		name := w.combination(i)
		if name == "" {
			name = "as given"
		}
		row := []string{name}
		my, mz := w.m.EndMoments(w.c, i)
		for _, m := range [...]float64{my.Bottom, my.Top, mz.Bottom, mz.Top} {
			row = append(row, print(m, KNm, w.most).String())
		}
		t.Rows = append(t.Rows, row)
	}
	w.add(t)
	w.say("Ordinates of the diagram at the ends: equal signs bend in single curvature.")
}

// moduli returns the symbols of the section moduli that a class gives.
func moduli(class int) (wy, wz string) {
	switch {
	case class <= 2:
		return "W_pl,y", "W_pl,z"
	case class == 3:
		return "W_el,y", "W_el,z"
	}
	return "W_eff,y", "W_eff,z"
}

// modulus writes the section moduli of a class about the axes that are bent,
// unless they stand above.
func (w *writer) modulus(class int, y, z bool) {
	s := w.c.Section
	wy, wz := s.WplY, s.WplZ
	if class == 3 {
		wy, wz = s.WelY, s.WelZ
	}
	symbolY, symbolZ := moduli(class)
	unknown := func(symbol string) bool { _, ok := w.known[sym(symbol)]; return !ok }
	y, z = y && unknown(symbolY), z && unknown(symbolZ)
	if class == 4 {
		w.effectiveModuli(y, z)
		return
	}
	var list Values
	if y {
		list = append(list, w.value(symbolY, wy, Cm3))
	}
	if z {
		list = append(list, w.value(symbolZ, wz, Cm3))
	}
	if len(list) > 0 {
		w.add(list)
	}
}

// combinedClass writes the class under an axial force together with moments.
func (w *writer) combinedClass(web *ec3.Element, class int, nEd float64, bent bool) {
	if class == w.classedFor.class && *web == w.classedFor.web && nEd == w.classedFor.nEd {
		w.say("The section is class %d as above.", class)
		return
	}
	w.classedFor.class, w.classedFor.web, w.classedFor.nEd = class, *web, nEd
	if len(w.c.Elements) > 1 && bent && web.Limits != w.webInCompression(web) {
		w.webClass(web, nEd)
	}
	w.say("The section is class %d under the axial force with the moments.", class)
}

// webInCompression returns the limits that an element has in pure compression.
func (w *writer) webInCompression(web *ec3.Element) [3]float64 {
	for i := range w.c.Elements {
		if w.c.Elements[i].Name == web.Name {
			return w.c.Elements[i].Limits
		}
	}
	return [3]float64{}
}

// webClass writes the limit of the class of a web in bending and compression.
// EN 1993-1-1:2005 Table 5.2, sheet 1.
func (w *writer) webClass(web *ec3.Element, nEd float64) {
	c, t, webs := "c_w", "t_w", 1
	if len(w.c.Elements) > 1 && w.c.Elements[0].Name == web.Name {
		c, t, webs = "c_h", "t", 2
	}
	_, alpha, psi := ec3.WebLimits(nEd, w.c.Fy, web.C, web.T, w.c.Section.A, w.c.Eps, webs)
	class := min(web.Class, 3)
	source := ""
	switch {
	case class == 3:
		w.find("ψ_w", "min(2 N_Ed/(A f_y) - 1, 1)", psi, None, "Table 5.2").Note = "web, elastic"
		source = "42 ε/(0.67 + 0.33 ψ_w)"
		if psi <= -1 {
			source = "62 ε (1 - ψ_w) √(-ψ_w)"
		}
	case alpha <= 0:
		w.say("The web is all in tension: class 1.")
		return
	default:
		parts := ""
		if webs > 1 {
			parts = "2 "
		}
		w.find("α_w", "min(0.5 (1 + N_Ed/("+parts+"f_y "+c+" "+t+")), 1)", alpha, None, "Table 5.2").Note = "web, plastic"
		factors := [...][2]string{{"36", "396"}, {"41.5", "456"}}[class-1]
		source = factors[0] + " ε/α_w"
		if alpha > 0.5 {
			source = factors[1] + " ε/(13 α_w - 1)"
		}
	}
	limit := w.step(formula.Symbol{Base: "c/t", Sub: "lim"}, source, web.Limits[class-1], None, "Table 5.2")
	limit.Note = "class " + count3(class)
	s := w.step(left(c+"/"+t), c+"/"+t, web.Ratio, None, "")
	s.Formula = nil
	s.Limit, s.Within = "≤ "+limit.Result.Figures, web.Class < 4
	if web.Class == 4 {
		s.Limit, s.Note = "> "+limit.Result.Figures, "class 4"
	}
}

func count3(class int) string { return string(rune('0' + class)) }

func same(a, b float64) bool { return math.Abs(a-b) <= 1e-12*math.Max(math.Abs(a), math.Abs(b)) }
