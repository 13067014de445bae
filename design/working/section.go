package working

import (
	"fmt"

	"stanchion/catalogue"
	"stanchion/design"
)

// section writes the dimensions, properties and strength that the rest reads.
func (w *writer) section() {
	c := w.c
	w.start("Section and material")
	w.say("%s to %s, properties from the dimensions.", c.Section.Name(), c.Section.Standard)
	w.add(w.dimensions())
	w.add(w.properties())
	w.strength()
}

// dimensions are those of the product table.
func (w *writer) dimensions() Values {
	s := w.c.Section
	switch s.Shape {
	case catalogue.ShapeI, catalogue.ShapeChannel:
		return Values{w.value("h", s.H, Mm), w.value("b", s.B, Mm), w.value("t_w", s.Tw, Mm), w.value("t_f", s.Tf, Mm), w.value("r", s.R, Mm)}
	case catalogue.ShapeCHS:
		return Values{w.value("d", s.H, Mm), w.value("t", s.Tw, Mm)}
	}
	return Values{w.value("h", s.H, Mm), w.value("b", s.B, Mm), w.value("t", s.Tw, Mm)}
}

func (w *writer) properties() Values {
	s := w.c.Section
	list := Values{w.value("A", s.A, Mm2)}
	if w.angle() {
		list = append(list, w.value("I_u", s.Iu, Cm4), w.value("I_v", s.Iv, Cm4))
	} else {
		list = append(list, w.value("I_y", s.Iy, Cm4), w.value("I_z", s.Iz, Cm4))
	}
	switch s.Shape {
	case catalogue.ShapeI:
		list = append(list, w.value("I_t", s.It, Cm4), w.value("I_w", s.Iw, Mm6))
	case catalogue.ShapeChannel:
		list = append(list, w.value("I_t", s.It, Cm4), w.value("I_w", s.Iw, Mm6), w.value("y_0", s.Y0, Mm))
	case catalogue.ShapeAngle:
		list = append(list, w.value("I_t", s.It, Cm4), w.value("u_0", w.c.Y0, Mm), w.value("v_0", w.c.Z0, Mm))
	}
	return list
}

// strength writes the material of the section in its grade.
func (w *writer) strength() {
	c := w.c
	source := "Table 3.1"
	if w.m.Settings.National.Strength == design.ProductStandard {
		source = "product standard"
	}
	w.add(Values{
		w.noted("f_y", c.Fy, MPa, fmt.Sprintf("%s, t = %s mm, %s", c.Grade.Name, trimmed(c.Section.Thickness()), source)),
		w.value("E", design.E, MPa), w.value("G", design.G, MPa),
		w.value("γ_M0", c.GammaM0, None), w.noted("γ_M1", c.GammaM1, None, "national set "+w.m.Settings.National.Name)})
	w.find("ε", "√(235/f_y)", c.Eps, None, "Table 5.2")
}

func trimmed(v float64) string { return print(v, None, usual).Figures }
