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
	p.Do = "give a " + b.number() + b.inUnit() + ", or clear the " + b.cellOrRow()
	return p
}

func (b *Binding) number() string {
	if b.key.line().of == count {
		return "whole number"
	}
	return "number"
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
	minFireRatio         = 0.01        // eta_fi
	minK, maxK           = 0.1, 20     // effective-length factor
	maxQuantity          = 1_000_000   // pieces
	maxMinutes           = 360         // fire period
	minLimit, maxLimit   = 0.01, 1.5   // utilisation
)

// inRange reports whether low <= x <= high. A bound that is typed must pass
// when its unit is converted, so the last places do not count.
func inRange(x, low, high float64) bool {
	const slack = 1e-9
	return x >= low-slack*math.Abs(low) && x <= high+slack*math.Abs(high)
}

// bounds returns what a column can hold, and how a person is told of it.
func (b *Binding) bounds() (low, high float64, remark string) {
	switch b.key.field {
	case factorField:
		return minK, maxK, ""
	case etaField:
		return 0, 1, ""
	case limitField:
		return minLimit, maxLimit, ""
	case fireRatioField:
		return minFireRatio, 1, ""
	case firePeriodField:
		return 1, maxMinutes, ""
	case fireSidesField:
		return 3, 4, ""
	case quantityField:
		return 1, maxQuantity, ""
	}
	switch b.key.line().of {
	case length:
		return minLength, maxLength, ", outside 0.3 to 60 m"
	case force:
		return -maxForce, maxForce, ", above 200 MN"
	case moment:
		return -maxMoment, maxMoment, ", above 1000 MNm"
	case size:
		return minSize, maxSize, ", outside 1 mm to 3 m"
	case stiffness:
		return 0, math.MaxFloat64, ", below 0"
	}
	return -math.MaxFloat64, math.MaxFloat64, ""
}

// outOfRange says why a value cannot be true; nil where it can.
func outOfRange(b *Binding, x float64) *Problem {
	low, high, remark := b.bounds()
	whole := b.key.line().of == count
	if inRange(x, low, high) && (!whole || x == math.Trunc(x)) {
		return nil
	}
	p := &Problem{What: fmt.Sprintf("%s is %s%s", b.title(), b.show(x), remark)}
	switch {
	case whole:
		p.Do = fmt.Sprintf("give a whole number from %s to %s", plainNumber(low), plainNumber(high))
	case remark == "":
		p.Do = fmt.Sprintf("give a number from %s to %s", plainNumber(low), plainNumber(high))
	default:
		p.Do = fmt.Sprintf("give its unit in the heading, the unit row or the cell (it is read in %s), or correct it", b.unit.name)
	}
	return p
}

// show writes a value of design in the column's unit.
func (b *Binding) show(x float64) string {
	return strings.TrimSpace(plainNumber(x/b.unit.factor) + " " + b.unit.name)
}

// plainNumber writes a number without exponent, to seven digits.
func plainNumber(x float64) string {
	rounded, err := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 7, 64), 64)
	if err != nil {
		rounded = x
	}
	return strconv.FormatFloat(rounded, 'f', -1, 64)
}
