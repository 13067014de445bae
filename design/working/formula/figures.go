package formula

import (
	"math"
	"strconv"
	"strings"
)

// Round writes a value to a number of significant figures, one more where the
// first is a 1, so that the step of the last figure is much the same part of
// every value. A value that needs fewer figures is written with as few as it
// needs.
func Round(v float64, most int) Number {
	switch {
	case math.IsInf(v, 0):
		return Number{Figures: "∞"}
	case math.IsNaN(v):
		return Number{Figures: "?"}
	case v == 0:
		return Number{Figures: "0"}
	}
	v = clean(v)
	exact := strconv.FormatFloat(v, 'f', -1, 64)
	if len(strings.Trim(strings.Replace(exact, ".", "", 1), "-0")) <= most {
		return Number{Figures: exact}
	}
	scientific := strconv.FormatFloat(math.Abs(v), 'e', most-1, 64)
	mantissa, power, _ := strings.Cut(scientific, "e")
	exponent, _ := strconv.Atoi(power)
	if mantissa[0] == '1' {
		most++
	}
	decimals := most - 1 - exponent
	if decimals >= 0 {
		return Number{Figures: strconv.FormatFloat(v, 'f', decimals, 64)}
	}
	unit := math.Pow10(-decimals)
	return Number{Figures: strconv.FormatFloat(math.Round(v/unit)*unit, 'f', 0, 64), filler: -decimals}
}

// Figures writes a value as Round does.
func Figures(v float64, most int) string { return Round(v, most).Figures }

// clean takes away the noise that floating-point arithmetic leaves behind
// short decimal numbers: 160.79999999999998 is 160.8.
func clean(v float64) float64 {
	short, err := strconv.ParseFloat(strconv.FormatFloat(v, 'g', 12, 64), 64)
	if err != nil {
		return v
	}
	return short
}

// Step returns the step of the last figure of a number as printed.
func (n Number) Step() float64 {
	decimals := 0
	if i := strings.IndexByte(n.Figures, '.'); i >= 0 {
		decimals = len(n.Figures) - i - 1
	}
	return math.Pow10(n.Exponent + n.filler - decimals)
}
