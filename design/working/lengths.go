package working

import (
	"stanchion/design"
	"stanchion/design/ec3"
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
}
