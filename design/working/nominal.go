package working

import (
	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// nominal writes how the end moments follow from beam reactions, in the first
// combination that has any at each end. Access Steel NCCI SN005.
func (w *writer) nominal() {
	if w.m.Settings.Moments != design.MomentsSimple {
		return
	}
	for i := range w.m.Column.Combinations {
		if c := &w.m.Column.Combinations[i]; c.HasReactions {
			w.say("Nominal moments at the top%s: the beams' reactions act 100 mm outside the face.", in(w.combination(i)))
			w.floor(c, w.c.Section, w.m.Above, "top")
			break
		}
	}
	if below := w.m.Below; below != nil {
		for i := range below.Column.Combinations {
			if c := &below.Column.Combinations[i]; c.HasReactions {
				w.say("Nominal moments at the bottom%s, from the floor there, in the opposite sense:", in(c.Name))
				at := below.Section
				if at == nil {
					at = w.c.Section
				}
				w.floor(c, at, below, "bottom")
				break
			}
		}
	}
}

func in(combination string) string {
	if combination == "" {
		return ""
	}
	return " in " + combination
}

// floor writes the share of a floor's moments. at is the section whose
// eccentricities count, beside the length on the other side of the floor.
func (w *writer) floor(c *design.Combination, at *catalogue.Section, beside *ec3.Neighbour, end string) {
	if c.FlangeA != c.FlangeB {
		w.share("y", c.FlangeA, c.FlangeB, at, beside, end)
	}
	if c.WebA != c.WebB {
		w.share("z", c.WebA, c.WebB, at, beside, end)
	}
}

// share writes the moment about one axis.
func (w *writer) share(axis string, a, b float64, at *catalogue.Section, beside *ec3.Neighbour, end string) {
	ey, ez := ec3.Eccentricities(at)
	e, depth, half := ey, at.H, "D/2 + 100"
	if axis == "z" {
		e, depth = ez, at.Tw
		if at.Shape == catalogue.ShapeRHS || at.Shape == catalogue.ShapeCHS {
			depth = at.B
		}
	}
	w.add(Values{w.noted("R_A", a, KN, "reactions on the two sides"), w.value("R_B", b, KN), w.noted("D", depth, Mm, at.Name())})
	w.find("e_"+axis, half, e, Mm, "NCCI SN005")
	k := w.sharing(axis, beside)
	w.add(Values{w.noted("g", w.m.Growth, None, "growth")})
	source := "g k_share (R_A - R_B) e_" + axis
	moment := w.m.Growth * k * (a - b) * e
	if end == "bottom" {
		source, moment = "-"+source, -moment
	}
	w.find("M_"+axis+","+end, source, moment, KNm, "NCCI SN005")
}

// sharing writes the part of a floor's moment that goes to the column beside the
// length on the other side of the floor.
func (w *writer) sharing(axis string, beside *ec3.Neighbour) float64 {
	if beside == nil {
		w.add(Values{w.noted("k_share", 1, None, "nothing on the other side of the floor: all of it")})
		return 1
	}
	if beside.Section == nil {
		w.add(Values{w.noted("k_share", 1, None, "the section on the other side of the floor is not known: all of it")})
		return 1
	}
	own, other := w.c.Section.Iy, beside.Section.Iy
	if axis == "z" {
		own, other = w.c.Section.Iz, beside.Section.Iz
	}
	k := ec3.Share(own/w.m.Length, other/beside.Column.Length)
	w.add(Values{w.noted("I_o", other, Cm4, "of the length on the other side, "+beside.Section.Name()), w.value("L_o", beside.Column.Length, Mm)})
	w.derive("r_o", "(I_"+axis+"/L)/(I_o/L_o)", None, "")
	if k == 0.5 {
		w.add(Values{w.noted("k_share", k, None, "half: the stiffnesses differ by a factor up to 1.5")})
		return k
	}
	w.find("k_share", "r_o/(1 + r_o)", k, None, "NCCI SN005").Note = "by stiffness"
	return k
}
