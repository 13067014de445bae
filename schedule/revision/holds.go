package revision

import (
	"fmt"
	"slices"
	"strings"

	"stanchion/design"
)

// hold compares what holds a column about one axis.
func (c *changes) hold(axis string, a, b *design.Hold) {
	c.words(Restraint, "ends "+axis, endsOf(a), endsOf(b))
	if !slices.EqualFunc(a.Restraints, b.Restraints, equal) {
		c.add(Restraint, "restraints %s %s → %s", axis, heights(a.Restraints), heights(b.Restraints))
	}
	letter := axis[:1]
	c.number(Restraint, "L_cr,"+letter, "m", a.Lcr/1e3, b.Lcr/1e3)
	c.number(Restraint, "k_"+letter, "", a.K, b.K)
}

// endsOf writes the ends of a column, the bottom first: with the stiffness or
// the distribution factor where one is given.
func endsOf(h *design.Hold) string { return endOf(&h.Bottom) + "-" + endOf(&h.Top) }

func endOf(e *design.End) string {
	switch {
	case e.Stiffness != nil:
		return figures(*e.Stiffness/1e6) + " kNm/rad"
	case e.Eta != nil:
		return "eta " + figures(*e.Eta)
	}
	return e.Condition.String()
}

// heights writes heights in m.
func heights(list []float64) string {
	if len(list) == 0 {
		return "none"
	}
	var parts []string
	for _, h := range list {
		parts = append(parts, figures(h/1e3))
	}
	return strings.Join(parts, ", ") + " m"
}

// torsion compares what holds a column against twist.
func (c *changes) torsion(a, b *design.Torsion) {
	if a.Given != b.Given || !slices.EqualFunc(a.Restraints, b.Restraints, equal) {
		c.add(Restraint, "restraints torsion %s → %s", twistOf(a), twistOf(b))
	}
	c.number(Restraint, "L_T", "m", a.LT/1e3, b.LT/1e3)
	if a.EccentricFlange != b.EccentricFlange || !equal(a.Eccentric, b.Eccentric) {
		c.add(Restraint, "z-z held at %s → %s", heldAt(a), heldAt(b))
	}
}

func twistOf(t *design.Torsion) string {
	switch {
	case !t.Given:
		return "where z-z is held"
	case len(t.Restraints) == 0:
		return "ends"
	}
	return heights(t.Restraints)
}

func heldAt(t *design.Torsion) string {
	switch {
	case t.EccentricFlange:
		return "one flange"
	case t.Eccentric != 0:
		return fmt.Sprintf("%s mm", figures(t.Eccentric))
	}
	return "the shear centre"
}

// likeness writes down the length, the restraint and the loads of a column, so
// that two columns alike have one text.
func likeness(col *design.Column) string {
	var b strings.Builder
	fmt.Fprintf(&b, "%.6g %s %s %v %.6g %s %s %s %.6g %.6g %.6g %.6g %.6g", col.Length, endsOf(&col.Y), endsOf(&col.Z), col.Torsion.Given, col.Torsion.LT,
		heights(col.Y.Restraints), heights(col.Z.Restraints), heights(col.Torsion.Restraints), col.Y.Lcr, col.Z.Lcr, col.Y.K, col.Z.K, float64(col.Quantity))
	for i := range col.Combinations {
		c := &col.Combinations[i]
		fmt.Fprintf(&b, "|%s %.6g %s %.6g %.6g %.6g %.6g %.6g %.6g %.6g %.6g", design.FoldName(c.Name), c.NEd, stepsOf(c), c.My.Bottom, c.My.Top, c.Mz.Bottom, c.Mz.Top,
			c.FlangeA, c.FlangeB, c.WebA, c.WebB)
	}
	return b.String()
}
