package working

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// actions writes the forces of every combination.
func (w *writer) actions() {
	w.start("Actions")
	m := w.m
	t := Table{Head: []string{"combination", "N_Ed kN"}, Right: []bool{false, false}}
	for i := range m.Column.Combinations {
		c := &m.Column.Combinations[i]
		name := w.combination(i)
		if name == "" {
			name = "as given"
		}
		t.Rows = append(t.Rows, []string{name, w.axial(c)})
	}
	w.add(t)
	if m.Growth != 1 {
		w.say("The given actions are multiplied by %s; the numbers above hold it.", trimmed(m.Growth))
	}
	if m.WeightPerMass > 0 {
		w.add(Values{w.value("L", m.Length, Mm), w.value("m", w.c.Section.Mass, KgM), w.noted("γ_G", m.Settings.SelfWeight, None, "on the column's own weight")})
	} else {
		w.add(Values{w.value("L", m.Length, Mm)})
	}
}

// axial writes the force of a combination, part by part.
func (w *writer) axial(c *design.Combination) string {
	parts := []string{print(w.m.Growth*c.NEd, KN, w.most).String()}
	for _, s := range c.Steps {
		parts = append(parts, fmt.Sprintf("%s above %s m", print(w.m.Growth*s.NEd, KN, w.most), metres(s.Height)))
	}
	return strings.Join(parts, ", ")
}
