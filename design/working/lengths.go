package working

import (
	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/stability"
)

// lengths writes the segments about every axis and how their buckling lengths
// were found: those of the combinations that decide.
func (w *writer) lengths() {
	w.start("Buckling lengths")
	t := Table{Head: []string{"axis", "segment m", "L mm", "how found", "L_cr mm"}, Right: []bool{false, false, true, false, true}}
	add := func(axis, name string, segments []ec3.Segment, b *design.Buckling) {
		for i := range segments {
			s := &segments[i]
			if s.Combination != b.Combination || s.Lcr == 0 {
				continue
			}
			t.Rows = append(t.Rows, []string{name, metres(s.From) + "-" + metres(s.To), trimmed(s.Length()), s.How(), print(s.Lcr, Mm, w.most).Figures})
			w.sheet.Lengths = append(w.sheet.Lengths, Length{axis, s.From, s.To, s.Lcr, s.From == b.From && s.To == b.To})
		}
	}
	add("y", "y-y", w.a.SegY, &w.a.Y)
	add("z", "z-z", w.a.SegZ, &w.a.Z)
	if w.a.HasT {
		add("T", "torsion", w.a.SegT, &w.a.T)
	}
	w.add(t)
	w.distribution("y", w.a.SegY, &w.a.Y)
	w.distribution("z", w.a.SegZ, &w.a.Z)
}

// distribution writes how the buckling length of the segment that decides was
// found from distribution factors. Access Steel NCCI SN008a.
func (w *writer) distribution(axis string, segments []ec3.Segment, b *design.Buckling) {
	for i := range segments {
		s := &segments[i]
		if s.Combination != b.Combination || s.From != b.From || s.To != b.To || s.Basis != stability.Distribution {
			continue
		}
		bottom, top, sway := s.Etas()
		mode, source := "non-sway", "(1 + 0.145 (η_1 + η_2) - 0.265 η_1 η_2)/(2 - 0.364 (η_1 + η_2) - 0.247 η_1 η_2)"
		if sway {
			mode, source = "sway", "√((1 - 0.2 (η_1 + η_2) - 0.12 η_1 η_2)/(1 - 0.8 (η_1 + η_2) + 0.6 η_1 η_2))"
		}
		w.add(Values{w.noted("η_1", bottom, None, "column stiffness over that of the joint, bottom"), w.noted("η_2", top, None, "top"), w.value("L_seg", s.Length(), Mm)})
		w.stiffness(axis, s)
		w.find("k_"+axis, source, s.Factor, None, "NCCI SN008").Note = mode
		w.find("L_cr,"+axis, "k_"+axis+" L_seg", s.Lcr, Mm, "")
	}
}

// stiffness writes how the distribution factor of an end follows from its
// rotational stiffness.
func (w *writer) stiffness(axis string, s *ec3.Segment) {
	hold, inertia := &w.m.Column.Y, "I_y"
	if axis == "z" {
		hold, inertia = &w.m.Column.Z, "I_z"
	}
	bottom, top, _ := s.Etas()
	for _, e := range []struct {
		end    *design.End
		at     bool
		symbol string
		eta    float64
	}{{&hold.Bottom, s.From == 0, "η_1", bottom}, {&hold.Top, s.To == w.m.Length, "η_2", top}} {
		if e.at && e.end.Stiffness != nil {
			if w.angle() {
				w.add(Values{w.noted(inertia, w.inertia(axis), Cm4, "parallel to a leg")})
			}
			w.add(Values{w.noted("S", *e.end.Stiffness, KNm, "a radian, of what the end is joined to")})
			w.find(e.symbol, "(4 E "+inertia+"/L_seg)/(4 E "+inertia+"/L_seg + S)", e.eta, None, "NCCI SN008")
		}
	}
}
