package working

import "stanchion/design"

// crossSection writes the resistance of the cross-section to axial force.
func (w *writer) crossSection() {
	w.start("Cross-section in axial force")
	if t := w.worst(design.Tension); t != nil {
		w.find("N_pl,Rd", "A f_y/γ_M0", w.c.NplRd, KN, "(6.6)")
		w.force(t.Ed, "tension, "+w.where(t.From, t.To, t.Combination))
		w.ratio("N_Ed/N_pl,Rd", t.Utilisation, "6.2.3(1)")
	}
	if t := w.worst(design.Compression); t != nil {
		clause := "(6.10)"
		if w.c.Class == 4 {
			clause = "(6.11)"
		}
		w.find("N_c,Rd", w.fill("@ f_y/γ_M0", ""), w.c.NcRd, KN, clause)
		w.pressed(t.Ed, t.From, t.To, t.Combination)
		w.ratio("N_Ed/N_c,Rd", t.Utilisation, "6.2.4(1)")
	}
}

// worst returns the check of a kind with the greatest utilisation, nil where
// there is none.
func (w *writer) worst(kind design.Kind) *design.Check {
	var worst *design.Check
	for i := range w.a.Checks {
		if c := &w.a.Checks[i]; c.Kind == kind && (worst == nil || c.Utilisation > worst.Utilisation) {
			worst = c
		}
	}
	return worst
}

func (w *writer) force(n float64, note string) { w.add(Values{w.noted("N_Ed", n, KN, note)}) }

// pressed writes the compression of a segment: as given, or with the own
// weight of the column above the segment's foot.
func (w *writer) pressed(n, from, to float64, combination int) {
	where := w.where(from, to, combination)
	if w.m.WeightPerMass == 0 || n <= 0 {
		w.force(n, where)
		return
	}
	weight := w.m.WeightPerMass*(w.m.Length-from)*w.c.Section.Mass + w.m.Carried
	list := Values{w.noted("N", n-weight, KN, where), w.value("x", from, Mm)}
	source := "N + γ_G 9.81 m (L - x)/1000"
	if w.m.Carried > 0 {
		list = append(list, w.noted("G_above", w.m.Carried, KN, "own weight of the lengths above"))
		source += " + G_above"
	}
	w.add(list)
	w.find("N_Ed", source, n, KN, "").Note = "own weight above x"
}
