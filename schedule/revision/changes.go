package revision

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"stanchion/design"
)

// Kind is what a change is about.
type Kind uint8

// The kinds of change.
const (
	Load Kind = iota
	Length
	Restraint
	Quantity
	Choice // what the section may be: family, grade, limits, group, splice
	InFire
	Steel // the section or the grade that the member has
)

// String names the kind.
func (k Kind) String() string {
	return [...]string{"loads", "length", "restraint", "quantity", "choice of section", "fire", "section"}[k]
}

// Change is one thing that differs between two issues of a member.
type Change struct {
	Kind Kind
	Text string // "N_Ed ULS1 1556 → 1710 kN (+9.9 %)"
}

// Changes lists what differs between two issues of a column, its section apart.
func Changes(a, b *design.Column) []Change {
	c := &changes{}
	c.loads(a.Combinations, b.Combinations)
	c.number(Length, "length", "m", a.Length/1e3, b.Length/1e3)
	c.hold("y-y", &a.Y, &b.Y)
	c.hold("z-z", &a.Z, &b.Z)
	c.torsion(&a.Torsion, &b.Torsion)
	c.number(Quantity, "quantity", "", float64(a.Quantity), float64(b.Quantity))
	c.choice(a, b)
	c.fire(&a.Fire, &b.Fire)
	return c.list
}

// same reports whether nothing differs.
func same(a, b *design.Column) bool { return len(Changes(a, b)) == 0 }

// Has reports whether any change is of a kind.
func Has(list []Change, k Kind) bool {
	return slices.ContainsFunc(list, func(c Change) bool { return c.Kind == k })
}

// TextOf joins the changes for people.
func TextOf(list []Change) string {
	var parts []string
	for _, c := range list {
		parts = append(parts, c.Text)
	}
	return strings.Join(parts, "; ")
}

type changes struct{ list []Change }

func (c *changes) add(k Kind, format string, args ...any) {
	c.list = append(c.list, Change{k, fmt.Sprintf(format, args...)})
}

// equal reports whether two values of a schedule are the same: they are typed
// with a few digits, and converted between units.
func equal(a, b float64) bool {
	return a == b || math.Abs(a-b) <= 1e-9*max(math.Abs(a), math.Abs(b))
}

// number adds a change of a number. 0 stands for one that is not given.
func (c *changes) number(k Kind, name, unit string, a, b float64) {
	switch {
	case equal(a, b):
	case a == 0:
		c.add(k, "%s none → %s%s", name, figures(b), space(unit))
	case b == 0:
		c.add(k, "%s %s%s → none", name, figures(a), space(unit))
	default:
		c.add(k, "%s %s → %s%s", name, figures(a), figures(b), space(unit))
	}
}

func (c *changes) words(k Kind, name, a, b string) {
	if design.FoldName(a) == design.FoldName(b) {
		return
	}
	if a == "" {
		a = "none"
	}
	if b == "" {
		b = "none"
	}
	c.add(k, "%s %s → %s", name, a, b)
}

// figures writes a number with as many digits as people type.
func figures(x float64) string { return strconv.FormatFloat(x, 'f', decimalsFor(x), 64) }

// decimalsFor is how many decimals show x to six digits, without zeros that
// say nothing.
func decimalsFor(x float64) int {
	s := strconv.FormatFloat(x, 'g', 6, 64)
	y, err := strconv.ParseFloat(s, 64)
	if err != nil {
		return 0
	}
	_, part, _ := strings.Cut(strconv.FormatFloat(y, 'f', -1, 64), ".")
	return min(len(part), 9)
}

func space(unit string) string {
	if unit == "" {
		return ""
	}
	return " " + unit
}

func (c *changes) choice(a, b *design.Column) {
	c.words(Choice, "family", families(a), families(b))
	c.words(Choice, "grade", strings.Join(a.Grades, " "), strings.Join(b.Grades, " "))
	x, y := &a.Choice, &b.Choice
	for _, l := range []struct {
		name string
		a, b float64
	}{
		{"least depth", x.MinDepth, y.MinDepth}, {"greatest depth", x.MaxDepth, y.MaxDepth},
		{"least width", x.MinWidth, y.MinWidth}, {"greatest width", x.MaxWidth, y.MaxWidth},
		{"least thickness", x.MinThickness, y.MinThickness}, {"greatest thickness", x.MaxThickness, y.MaxThickness},
	} {
		c.number(Choice, l.name, "mm", l.a, l.b)
	}
	c.number(Choice, "utilisation limit", "", x.Limit, y.Limit)
	c.words(Choice, "group", a.Group, b.Group)
	if a.SpliceSaid && b.SpliceSaid && a.Splice != b.Splice {
		c.words(Choice, "splice above", yes(a.Splice), yes(b.Splice))
	}
}

func yes(b bool) string {
	if b {
		return "yes"
	}
	return "no"
}

func families(col *design.Column) string { return strings.Join(col.Choice.Families, ", ") }

func (c *changes) fire(a, b *design.Fire) {
	c.number(InFire, "L_fi,y", "m", a.LcrY/1e3, b.LcrY/1e3)
	c.number(InFire, "L_fi,z", "m", a.LcrZ/1e3, b.LcrZ/1e3)
	c.number(InFire, "eta_fi", "", a.LoadRatio, b.LoadRatio)
	c.number(InFire, "fire period", "min", a.Period, b.Period)
	c.number(InFire, "sides exposed", "", float64(a.Sides), float64(b.Sides))
	if a.Boxed != b.Boxed {
		c.words(InFire, "boxed", yes(a.Boxed), yes(b.Boxed))
	}
}
