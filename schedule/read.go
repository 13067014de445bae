package schedule

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"stanchion/design"
)

// value is what a cell says, in the units of design.
type value struct {
	set     bool
	num     float64
	text    string
	heights []height
	ends    [2]design.Condition // bottom, top
	row     int
}

// rowData is what one row says, by binding.
type rowData struct {
	number   int
	hidden   bool
	values   []value
	problems []*Problem
	notes    []string
	old      Earlier
}

// reader reads cells by the bindings of a plan.
type reader struct {
	plan     *Plan
	src      Source
	bindings []Binding
	names    *names
	old      []oldColumn
	heights  map[string][]height
	ends     map[string][2]design.Condition
	resolved map[nameCell]string
	sections map[nameCell]string // by name and families
}

// nameCell is the text of a name in a column of one kind.
type nameCell struct {
	field fieldName
	text  string
}

// remembered bounds how many texts a reader remembers the meaning of: those of
// a schedule repeat, those of a hostile one need not.
const remembered = 1 << 14

func newReader(r *rows) *reader {
	return &reader{plan: r.plan, src: r.src, bindings: r.plan.Header.Columns, names: r.names, old: r.old,
		heights: map[string][]height{}, ends: map[string][2]design.Condition{}, resolved: map[nameCell]string{}, sections: map[nameCell]string{}}
}

// read fills d with what a row says.
func (r *reader) read(row *Row, d *rowData) {
	d.number, d.hidden = row.Number, row.Hidden
	d.problems, d.notes, d.old = nil, nil, Earlier{}
	d.values = slices.Grow(d.values[:0], len(r.bindings))[:len(r.bindings)]
	for i := range r.bindings {
		b := &r.bindings[i]
		v := &d.values[i]
		*v = value{row: row.Number}
		cell := row.at(b.Col)
		if cell.empty() {
			continue
		}
		if p := r.cell(b, cell, v, d); p != nil {
			v.set = false
			r.place(p, b, row.Number, cell)
			d.problems = append(d.problems, p)
		}
	}
	for _, o := range r.old {
		d.old.take(o.name, row.at(o.col), r.plan.Decimal)
	}
}

func (r *reader) place(p *Problem, b *Binding, row int, cell *Cell) {
	p.File, p.Cell, p.Row, p.Col = r.src.Name(), r.src.Where(r.plan.Sheet, row, b.Col), row, b.Col
	p.Heading, p.Value = b.Heading, cell.text()
}

// cell reads one cell. The value counts where no problem is returned.
func (r *reader) cell(b *Binding, cell *Cell, v *value, d *rowData) *Problem {
	v.set = true
	switch cell.Kind {
	case Date:
		return &Problem{What: fmt.Sprintf("%s is a date, %s: the spreadsheet has turned what was typed into one", b.title(), trim(cell.Text)), Do: "format the cell as text and type it again"}
	case Fault:
		return &Problem{What: fmt.Sprintf("%s is the error %s", b.title(), trim(cell.Text)), Do: "mend the formula, or clear the row"}
	case Uncalculated:
		return &Problem{What: fmt.Sprintf("%s is a formula without a value, %s", b.title(), trim(cell.Text)), Do: "have the spreadsheet calculate it and save again"}
	}
	f := b.key.line()
	switch {
	case f.needs&isLabel != 0:
		v.text = cell.text()
		return nil
	case f.name == endsField:
		return r.endsCell(b, cell, v)
	case f.name == restraintsField || f.name == torsionField:
		return r.restraintsCell(b, cell, v, d)
	case f.name == heldAtField:
		return r.heldAtCell(b, cell, v)
	case f.name == spliceField || f.name == fireBoxField:
		return yesCell(b, cell, v)
	case f.of == noQuantity:
		return r.nameCell(b, cell, v)
	default:
		return r.numberCell(b, cell, v)
	}
}

// numberCell reads a number and holds it against what a column can have.
func (r *reader) numberCell(b *Binding, cell *Cell, v *value) *Problem {
	q := b.key.line().of
	switch cell.Kind {
	case Number:
		v.num = cell.Number * b.unit.factor
	default:
		x, err := parseNumber(cell.Text, r.plan.Decimal, q, b.unit)
		if err != nil {
			return notNumber(b, cell, err)
		}
		v.num = x
	}
	if p := outOfRange(b, v.num); p != nil {
		return p
	}
	if b.key.field == axialField && r.plan.Settings.Design.TensionPositive && v.num != 0 {
		v.num = -v.num
	}
	return nil
}

func notNumber(b *Binding, cell *Cell, err error) *Problem {
	p := &Problem{What: fmt.Sprintf("%s is %q", b.title(), cell.text())}
	if err != errNotNumber {
		p.What += ", " + err.Error()
	}
	p.Do = "give a number" + b.inUnit() + ", or clear the " + b.cellOrRow()
	return p
}

func (b *Binding) inUnit() string {
	if b.unit.name == "" {
		return ""
	}
	return " in " + b.unit.name
}

// cellOrRow is what is to be cleared where a value cannot be given.
func (b *Binding) cellOrRow() string {
	if b.key.field == lengthField || b.key.field == axialField && b.above == nil {
		return "row"
	}
	return "cell"
}

// The bounds of what is read without doubt about its unit, in the units of
// design: lengths and forces as users are told, the others as wide as no
// column ever needs.
const (
	minLength, maxLength = 300, 60_000 // mm
	maxForce             = 200e6       // N
	maxMoment            = 1e12        // N mm
	minSize, maxSize     = 1, 3000     // mm
	minK, maxK           = 0.1, 20     // effective-length factor
	maxQuantity          = 1_000_000   // pieces
	maxMinutes           = 360         // fire period
	minLimit, maxLimit   = 0.01, 1.5   // utilisation
)

func inRange(x, low, high float64) bool {
	const slack = 1e-9 // a bound that is typed must pass when its unit is converted
	return x >= low*(1-slack) && x <= high*(1+slack)
}

// outOfRange says why a value cannot be true.
func outOfRange(b *Binding, x float64) *Problem {
	is := fmt.Sprintf("%s is %s", b.title(), b.show(x))
	switch q := b.key.line().of; {
	case math.IsNaN(x) || math.IsInf(x, 0):
		return &Problem{What: is, Do: "give a number"}
	case q == length && !inRange(x, minLength, maxLength):
		return &Problem{What: is + ", outside 0.3 to 60 m", Do: "give its unit in the heading, the unit row or the cell (it is read in " + b.unit.name + "), or correct it"}
	case q == force && math.Abs(x) > maxForce:
		return &Problem{What: is + ", above 200 MN", Do: "give its unit in the heading, the unit row or the cell (it is read in " + b.unit.name + "), or correct it"}
	case q == moment && math.Abs(x) > maxMoment:
		return &Problem{What: is + ", above 1000 MNm", Do: "give its unit in the heading, the unit row or the cell (it is read in " + b.unit.name + "), or correct it"}
	case q == size && !inRange(x, minSize, maxSize):
		return &Problem{What: is + ", outside 1 mm to 3 m", Do: "give it in " + b.unit.name}
	case q == stiffness && x < 0:
		return &Problem{What: is, Do: "give a stiffness of 0 or more"}
	}
	return ratioOutOfRange(b, x, is)
}

func ratioOutOfRange(b *Binding, x float64, is string) *Problem {
	low, high := 0.0, 0.0
	switch b.key.field {
	case factorField:
		low, high = minK, maxK
	case etaField:
		low, high = 0, 1
	case limitField:
		low, high = minLimit, maxLimit
	case fireRatioField:
		low, high = 0.01, 1
	case firePeriodField:
		low, high = 1, maxMinutes
	case fireSidesField:
		low, high = 3, 4
	case quantityField:
		low, high = 1, maxQuantity
	default:
		return nil
	}
	if !inRange(x, low, high) {
		return &Problem{What: is, Do: fmt.Sprintf("give a number from %s to %s", plainNumber(low), plainNumber(high))}
	}
	if b.key.line().of == count && x != math.Trunc(x) {
		return &Problem{What: is, Do: "give a whole number"}
	}
	return nil
}

// show writes a value of design in the column's unit.
func (b *Binding) show(x float64) string {
	return strings.TrimSpace(plainNumber(x/b.unit.factor) + " " + b.unit.name)
}

func plainNumber(x float64) string { return strconv.FormatFloat(x, 'g', 7, 64) }

// endsCell reads the conditions of both ends, or of one where the heading
// names it.
func (r *reader) endsCell(b *Binding, cell *Cell, v *value) *Problem {
	text := cell.text()
	if c, ok := r.ends[text]; ok && b.key.end == noEnd {
		v.ends = c
		return nil
	}
	var err error
	if b.key.end == noEnd {
		v.ends[0], v.ends[1], err = parseEnds(text)
		if err == nil && len(r.ends) < remembered {
			r.ends[strings.Clone(text)] = v.ends
		}
	} else {
		v.ends[0], err = parseCondition(text)
	}
	if err != nil {
		return &Problem{What: fmt.Sprintf("%s: %s", b.title(), err), Do: "give pinned-pinned, fixed-pinned, fixed-fixed, partly fixed, fixed-guided, fixed-partly guided or fixed-free, the bottom first"}
	}
	return nil
}

// restraintsCell reads a list of heights. A single number that the spreadsheet
// shows as a fraction is one of the length.
func (r *reader) restraintsCell(b *Binding, cell *Cell, v *value, d *rowData) *Problem {
	if cell.Kind == Number {
		h := height{mm: cell.Number * b.unit.factor}
		if cell.Fraction && cell.Number > 0 && cell.Number < 1 {
			h = height{mm: cell.Number, fraction: true}
			d.notes = append(d.notes, fmt.Sprintf("%s %s is shown as a fraction, and read as that part of the length", b.title(), plainNumber(cell.Number)))
		}
		v.heights = []height{h}
		v.text = plainNumber(cell.Number)
		return nil
	}
	v.text = cell.text()
	key := b.unit.name + v.text
	if hs, ok := r.heights[key]; ok {
		v.heights = hs
		return nil
	}
	hs, err := parseRestraints(v.text, r.plan.Decimal, b.unit)
	if err != nil {
		return &Problem{What: fmt.Sprintf("%s is %q, and %s", b.title(), v.text, err), Do: restraintHelp}
	}
	v.heights = hs
	if len(r.heights) < remembered {
		r.heights[strings.Clone(key)] = hs
	}
	return nil
}

const restraintHelp = "give heights above the bottom in m (2.5; 5.0), fractions (1/3 2/3), mid, thirds, quarters or every 1.5"

// heldAtCell reads where z-z is held: at the face of a flange, at the shear
// centre, or at a distance from it.
func (r *reader) heldAtCell(b *Binding, cell *Cell, v *value) *Problem {
	v.num, v.text = 0, "" // held at the shear centre
	if cell.Kind == Number {
		v.num = cell.Number * b.unit.factor
		return outOfRange(b, v.num)
	}
	switch word := compact(cell.text()); word {
	case "no", "n", "false", "centre", "center", "shearcentre", "web", "centroid":
	case "yes", "y", "true", "x", "flange", "oneflange", "atflange":
		v.text = "flange"
	default:
		x, err := parseNumber(cell.Text, r.plan.Decimal, size, b.unit)
		if err != nil {
			return &Problem{What: fmt.Sprintf("%s is %q", b.title(), cell.text()), Do: "give yes, no, or the distance from the shear centre in mm"}
		}
		v.num = x
		return outOfRange(b, x)
	}
	return nil
}

// yesCell reads yes or no.
func yesCell(b *Binding, cell *Cell, v *value) *Problem {
	word := compact(cell.text())
	switch {
	case cell.Kind == Number && cell.Number == 1, oneOf(word, "yes", "y", "true", "x", "1", "ja", "oui", "si"), oneOf(cell.text(), "✓", "✔", "√"):
		v.num = 1
	case oneOf(word, "above", "splice", "spliced", "top") && b.key.field == spliceField, oneOf(word, "box", "boxed") && b.key.field == fireBoxField:
		v.num = 1
	case cell.Kind == Number && cell.Number == 0, oneOf(word, "no", "n", "false", "0", "none", "nein", "non"):
		v.num = 0
	case oneOf(word, "profile") && b.key.field == fireBoxField:
		v.num = 0
	default:
		return &Problem{What: fmt.Sprintf("%s is %q", b.title(), cell.text()), Do: "give yes or no"}
	}
	return nil
}

// nameCell reads a section, grade or family.
func (r *reader) nameCell(b *Binding, cell *Cell, v *value) *Problem {
	text := cell.text()
	id := nameCell{b.key.field, text}
	if name, ok := r.resolved[id]; ok {
		v.text = name
		return nil
	}
	name, err := r.resolve(b.key.field, text)
	if err != nil {
		return &Problem{What: fmt.Sprintf("%s is %q: %s", b.title(), text, err), Do: ""}
	}
	v.text = name
	if len(r.resolved) < remembered {
		id.text = strings.Clone(text)
		r.resolved[id] = name
	}
	return nil
}

// severalNames joins the families or grades of one cell.
const severalNames = "\x1f"

func (r *reader) resolve(f fieldName, text string) (string, error) {
	switch f {
	case sectionField:
		return text, nil // resolved with the member's families
	case familyField:
		list, err := parseFamilies(text)
		return strings.Join(list, severalNames), err
	default:
		list, err := r.grades(text)
		return strings.Join(list, severalNames), err
	}
}

// grades reads one grade, or several between commas, strokes or spaces.
func (r *reader) grades(text string) ([]string, error) {
	var list []string
	for _, part := range strings.FieldsFunc(text, func(c rune) bool { return c == ',' || c == ';' || c == '/' || c == '|' }) {
		name, err := parseGrade(trim(part))
		if err == nil {
			list = append(list, name)
			continue
		}
		words := strings.Fields(part)
		if len(words) < 2 {
			return nil, err
		}
		for _, w := range words {
			name, wordErr := parseGrade(w)
			if wordErr != nil {
				return nil, err
			}
			list = append(list, name)
		}
	}
	return list, nil
}

// Earlier is what an earlier run wrote into a row.
type Earlier struct {
	Section, Grade, Status string
	Utilisation            float64
}

func (e *Earlier) take(name string, cell *Cell, decimal byte) {
	if cell.empty() {
		return
	}
	switch name {
	case "section":
		e.Section = cell.text()
	case "grade":
		e.Grade = cell.text()
	case "status":
		e.Status = cell.text()
	case "utilisation":
		e.Utilisation = cell.Number
		if cell.Kind == Text {
			e.Utilisation, _, _ = splitNumber(cell.Text, decimal)
		}
	}
}
