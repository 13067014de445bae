package revision

import (
	"fmt"
	"math"
	"slices"

	"stanchion/design"
)

// loads compares two sets of combinations by their names.
func (c *changes) loads(a, b []design.Combination) {
	if len(a) == 0 || len(b) == 0 {
		if len(a) != len(b) {
			c.add(Load, "loads %s → %s", presence(a), presence(b))
		}
		return
	}
	// One combination each is the same one, whatever its name.
	if len(a) == 1 && len(b) == 1 {
		c.combination(nameOfBoth(&a[0], &b[0]), &a[0], &b[0])
		return
	}
	for i := range b {
		j := slices.IndexFunc(a, func(o design.Combination) bool { return design.FoldName(o.Name) == design.FoldName(b[i].Name) })
		if j < 0 {
			c.add(Load, "combination %s is new: N_Ed %s kN", named(b[i].Name), figures(b[i].NEd/1e3))
			continue
		}
		c.combination(b[i].Name, &a[j], &b[i])
	}
	for i := range a {
		if !slices.ContainsFunc(b, func(o design.Combination) bool { return design.FoldName(o.Name) == design.FoldName(a[i].Name) }) {
			c.add(Load, "combination %s is gone: N_Ed was %s kN", named(a[i].Name), figures(a[i].NEd/1e3))
		}
	}
}

func nameOfBoth(a, b *design.Combination) string {
	if design.FoldName(a.Name) == design.FoldName(b.Name) {
		return b.Name
	}
	return ""
}

func named(name string) string {
	if name == "" {
		return "without a name"
	}
	return name
}

func presence(list []design.Combination) string {
	if len(list) == 0 {
		return "none"
	}
	return "given"
}

// combination compares the actions of one combination.
func (c *changes) combination(name string, a, b *design.Combination) {
	of := ""
	if name != "" {
		of = " " + name
	}
	c.action("N_Ed"+of, "kN", 1e3, a.NEd, b.NEd)
	c.steps(of, a, b)
	for _, m := range []struct {
		name string
		a, b float64
	}{
		{"M_y,Ed bottom", a.My.Bottom, b.My.Bottom}, {"M_y,Ed top", a.My.Top, b.My.Top},
		{"M_z,Ed bottom", a.Mz.Bottom, b.Mz.Bottom}, {"M_z,Ed top", a.Mz.Top, b.Mz.Top},
	} {
		c.action(m.name+of, "kNm", 1e6, m.a, m.b)
	}
	for _, r := range []struct {
		name string
		a, b float64
	}{
		{"reaction flange A", a.FlangeA, b.FlangeA}, {"reaction flange B", a.FlangeB, b.FlangeB},
		{"reaction web A", a.WebA, b.WebA}, {"reaction web B", a.WebB, b.WebB},
	} {
		c.action(r.name+of, "kN", 1e3, r.a, r.b)
	}
}

// steps compares the forces in the parts above heights.
func (c *changes) steps(of string, a, b *design.Combination) {
	if slices.EqualFunc(a.Steps, b.Steps, func(x, y design.Step) bool { return equal(x.Height, y.Height) && equal(x.NEd, y.NEd) }) {
		return
	}
	c.add(Load, "N_Ed%s above %s → %s", of, stepsOf(a), stepsOf(b))
}

func stepsOf(c *design.Combination) string {
	if len(c.Steps) == 0 {
		return "none"
	}
	s := ""
	for i, step := range c.Steps {
		if i > 0 {
			s += ", "
		}
		s += fmt.Sprintf("%s m %s kN", figures(step.Height/1e3), figures(step.NEd/1e3))
	}
	return s
}

// action adds a change of an action, with the change in per cent.
func (c *changes) action(name, unit string, factor, a, b float64) {
	if equal(a, b) {
		return
	}
	c.add(Load, "%s %s → %s %s%s", name, figures(a/factor), figures(b/factor), unit, percent(a, b))
}

// percent writes by how much a value grew: " (+9.9 %)". Where it changed its
// sign, or was nothing, that says nothing.
func percent(a, b float64) string {
	if a == 0 || b == 0 || (a < 0) != (b < 0) {
		return ""
	}
	return fmt.Sprintf(" (%+.1f %%)", 100*(b/a-1))
}

// GreatestNEd returns the axial force, N, that is greatest in size over the
// combinations and parts of a column, with its sign.
func GreatestNEd(col *design.Column) float64 {
	n := 0.0
	take := func(x float64) {
		if math.Abs(x) > math.Abs(n) {
			n = x
		}
	}
	for i := range col.Combinations {
		take(col.Combinations[i].NEd)
		for _, s := range col.Combinations[i].Steps {
			take(s.NEd)
		}
	}
	return n
}
