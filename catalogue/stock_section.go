package catalogue

import (
	"errors"
	"fmt"
	"math"
	"strings"
)

// density of steel, kg/mm2 m: 7850 kg/m3.
const density = 7850e-6

// dimension is a cell of a stock list that gives a dimension of a section.
type dimension struct {
	column string
	text   string
	to     *float64
	zero   bool // 0 is a value: a radius
}

// stockSection finds the section that a line names, or builds it from the
// line's dimensions; nil for a blank line.
func (c *Catalogue) stockSection(r *stockRow) (*Section, error) {
	given := r.given()
	switch {
	case r.Name == "" && len(given) == 0 && r.Family == "":
		return nil, nil
	case r.Name == "" && len(given) == 0:
		return nil, errors.New("names no section and gives no dimensions")
	case r.Name == "":
		return r.ownSection()
	}
	s, err := c.Find(strings.TrimSpace(r.Name+" "+r.Finish), FindOptions{Families: nonEmpty(r.Family)})
	if len(given) == 0 {
		if err == nil {
			err = r.ofFamily(s)
		}
		return s, err
	}
	if err != nil {
		return r.ownSection()
	}
	if differs := differs(s, given); differs != "" {
		return nil, fmt.Errorf("%s; give a section of your own another name", differs)
	}
	return s, r.ofFamily(s)
}

func nonEmpty(s string) []string {
	if s == "" {
		return nil
	}
	return []string{s}
}

// ofFamily holds the section that a name stands for against the line's family.
func (r *stockRow) ofFamily(s *Section) error {
	specs, err := parseAll(nonEmpty(r.Family))
	if err != nil || len(specs) == 0 {
		return err
	}
	for _, spec := range specs {
		if spec.Family == s.Family {
			return nil
		}
	}
	return fmt.Errorf("%q is of the family %s, not %s: correct one of them", r.Name, s.Family, r.Family)
}

// given are the dimensions that a line gives, of whatever shape.
func (r *stockRow) given() []dimension {
	var out []dimension
	for _, d := range []dimension{
		{column: "h_mm", text: r.H}, {column: "b_mm", text: r.B}, {column: "tw_mm", text: r.Tw}, {column: "tf_mm", text: r.Tf}, {column: "r_mm", text: r.R},
		{column: "d_mm", text: r.D}, {column: "t_mm", text: r.T}, {column: "r1_mm", text: r.R1}, {column: "r2_mm", text: r.R2},
	} {
		if d.text != "" {
			out = append(out, d)
		}
	}
	return out
}

// differs says which dimension of a line is not that of the section it names.
// Tables round to 0.1 mm.
func differs(s *Section, given []dimension) string {
	own := map[string]float64{"h_mm": s.H, "b_mm": s.B, "tw_mm": s.Tw, "tf_mm": s.Tf, "r_mm": s.R, "d_mm": s.H, "t_mm": s.Tf, "r1_mm": s.R, "r2_mm": s.R2}
	for _, d := range given {
		if v, err := number(d.text); err != nil || math.Abs(v-own[d.column]) > 0.1 {
			return fmt.Sprintf("%s is %q, and %s has %g in the catalogue", d.column, d.text, s.Name(), own[d.column])
		}
	}
	return ""
}

// ownSection builds a section from a line's dimensions, and refuses those that
// no section can have.
func (r *stockRow) ownSection() (*Section, error) {
	d, err := r.ownFamily()
	if err != nil {
		return nil, err
	}
	if err := r.dimensions(d); err != nil {
		return nil, err
	}
	if err := d.possible(); err != nil {
		return nil, err
	}
	s := d.section()
	if !s.rolledProportions() {
		return nil, errors.New("these dimensions are far from those of a rolled section, and the expressions for its torsion do not hold for them: check thicknesses and radii")
	}
	if s.Designation == "" {
		s.Designation = s.madeName()
	}
	s.Nominal = fmt.Sprintf("%gx%g", math.Round(s.H), math.Round(s.B))
	fromArea := s.A * density
	switch {
	case s.Mass == 0:
		s.Mass = threeFigures(fromArea)
	case math.Abs(s.Mass/fromArea-1) > 0.05:
		return nil, fmt.Errorf("mass_kg_m is %q, and the dimensions give %.1f kg/m: check both", r.Mass, fromArea)
	}
	return s, nil
}

// rolledProportions tells whether an open section's torsion constant is within
// reach of the sum of its plates'. The expressions were fitted to rolled
// sections; in the catalogue they give 0.94 to 1.92 times that sum.
func (s *Section) rolledProportions() bool {
	var plates float64
	switch s.Shape {
	case ShapeI, ShapeChannel:
		plates = (2*s.B*cube(s.Tf) + (s.H-2*s.Tf)*cube(s.Tw)) / 3
	case ShapeAngle:
		plates = (s.H + s.B - s.Tw) * cube(s.Tw) / 3
	default:
		return true
	}
	return s.It > 0.85*plates && s.It < 2.5*plates && s.Iw >= 0
}

// threeFigures rounds as tables of masses do.
func threeFigures(v float64) float64 {
	unit := math.Pow(10, math.Floor(math.Log10(v))-2)
	return math.Round(v/unit) * unit
}

// ownFamily starts a section with the family and the finish of its line.
func (r *stockRow) ownFamily() (*row, error) {
	if r.Family == "" {
		return nil, fmt.Errorf("a section with its own dimensions needs its family: give one of %s", strings.Join(FamilyNames(), ", "))
	}
	specs, err := ParseFamilies(r.Family + " " + r.Finish)
	if err != nil {
		return nil, err
	}
	if len(specs) != 1 {
		return nil, fmt.Errorf("family %q stands for several: give one of %s", r.Family, strings.Join(FamilyNames(), ", "))
	}
	d := &row{Designation: r.Name, Family: specs[0].Family, Standard: "own dimensions"}
	finish, named := specs[0].Finish, readSpelling(r.Name).finish
	if finish == FinishNone {
		finish = named
	}
	switch hollow := families[d.Family].shape.hollow(); {
	case hollow && named != FinishNone && named != finish:
		return nil, fmt.Errorf("the name %q says another finish than the line: correct one of them", r.Name)
	case hollow && finish == HotFinished:
		d.Finish = "hot"
	case hollow && finish == ColdFormed:
		d.Finish = "cold"
		d.Designation = withoutFinish(d.Designation)
	case hollow:
		return nil, errors.New("a hollow section with its own dimensions needs its finish: hot or cold")
	case r.Finish != "":
		return nil, fmt.Errorf("finish is %q: only hollow sections have one", r.Finish)
	}
	return d, nil
}

// withoutFinish takes the mark of a cold-formed section off its designation:
// Name writes it again.
func withoutFinish(name string) string {
	if n := len(name) - len(" CF"); n > 0 && strings.EqualFold(name[n:], " CF") {
		return name[:n]
	}
	return name
}

// dimensions reads the columns that the shape needs.
func (r *stockRow) dimensions(d *row) error {
	var needs []dimension
	switch families[d.Family].shape {
	case ShapeI, ShapeChannel:
		needs = []dimension{{"h_mm", r.H, &d.H, false}, {"b_mm", r.B, &d.B, false}, {"tw_mm", r.Tw, &d.Tw, false}, {"tf_mm", r.Tf, &d.Tf, false}, {"r_mm", r.R, &d.R, true}}
	case ShapeCHS:
		needs = []dimension{{"d_mm", r.D, &d.D, false}, {"t_mm", r.T, &d.T, false}}
	case ShapeRHS:
		needs = []dimension{{"h_mm", r.H, &d.H, false}, {"b_mm", r.B, &d.B, false}, {"t_mm", r.T, &d.T, false}}
	case ShapeAngle:
		needs = []dimension{{"h_mm", r.H, &d.H, false}, {"b_mm", r.B, &d.B, false}, {"t_mm", r.T, &d.T, false}, {"r1_mm", r.R1, &d.R1, true}, {"r2_mm", r.R2, &d.R2, true}}
	}
	if r.Mass != "" {
		needs = append(needs, dimension{"mass_kg_m", r.Mass, &d.Mass, false})
	}
	for _, n := range needs {
		v, err := number(n.text)
		if err != nil || v < 0 || v == 0 && !n.zero || v > 5000 {
			return fmt.Errorf("%s is %q: a %s section with its own dimensions needs it as a number of mm (kg/m for the mass)", n.column, n.text, d.Family)
		}
		*n.to = v
	}
	return nil
}

// possible refuses dimensions that leave no section.
func (d *row) possible() error {
	switch families[d.Family].shape {
	case ShapeI:
		if d.H <= 2*(d.Tf+d.R) || d.B <= d.Tw+2*d.R {
			return errors.New("these dimensions make no section: h_mm must exceed twice tf_mm and r_mm, b_mm must exceed tw_mm and twice r_mm")
		}
	case ShapeChannel:
		if d.H <= 2*(d.Tf+d.R) || d.B <= d.Tw+d.R {
			return errors.New("these dimensions make no section: h_mm must exceed twice tf_mm and r_mm, b_mm must exceed tw_mm and r_mm")
		}
	case ShapeCHS:
		if d.D <= 2*d.T {
			return errors.New("these dimensions make no section: d_mm must exceed twice t_mm")
		}
	case ShapeRHS:
		return d.possibleRHS()
	case ShapeAngle:
		return d.possibleAngle()
	}
	return nil
}

func (d *row) possibleRHS() error {
	finish := HotFinished
	if d.Finish == "cold" {
		finish = ColdFormed
	}
	outer, inner := cornerRadii(finish, d.T)
	switch {
	case d.Family == "SHS" && d.H != d.B:
		return errors.New("h_mm and b_mm of a square hollow section are the same: check them, or give the family RHS")
	case d.H < d.B:
		return errors.New("h_mm is the greater side of a hollow section: exchange h_mm and b_mm")
	case d.B <= 2*outer || d.B-2*d.T <= 2*inner:
		return fmt.Errorf("these dimensions make no section: the corners of radius %g mm leave no wall between them", outer)
	}
	return nil
}

func (d *row) possibleAngle() error {
	switch {
	case d.Family == "L equal" && d.H != d.B:
		return errors.New("h_mm and b_mm of an equal angle are the same: check them, or give the family L unequal")
	case d.H < d.B:
		return errors.New("h_mm is the longer leg of an angle: exchange h_mm and b_mm")
	case d.B <= d.T+d.R1+d.R2 || d.R2 > d.T:
		return errors.New("these dimensions make no section: b_mm must exceed t_mm with both radii, t_mm must not be less than r2_mm")
	}
	return nil
}

// madeName is a name for a section that a stock list gives by dimensions alone.
func (s *Section) madeName() string {
	switch s.Shape {
	case ShapeCHS:
		return fmt.Sprintf("CHS %gx%g", s.H, s.Tw)
	case ShapeRHS, ShapeAngle:
		return fmt.Sprintf("%s %gx%gx%g", strings.Fields(s.Family)[0], s.H, s.B, s.Tw)
	default:
		return fmt.Sprintf("%s %gx%gx%gx%g", s.Family, s.H, s.B, s.Tw, s.Tf)
	}
}
