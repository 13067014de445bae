package schedule

import (
	"fmt"
	"strings"
)

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
