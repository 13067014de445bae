package schedule

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

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
