package formula

import (
	"math"
	"strconv"
	"strings"
)

// Figures writes a value to a number of significant figures, one more where
// the first is a 1, so that the step of the last figure is much the same part
// of every value. Figures before the decimal point all stand. A value that
// needs fewer figures is written with as few as it needs.
func Figures(v float64, most int) string {
	if v == 0 || math.IsNaN(v) || math.IsInf(v, 0) {
		return strconv.FormatFloat(v, 'f', -1, 64)
	}
	exact := strconv.FormatFloat(v, 'f', -1, 64)
	if len(strings.Trim(strings.Replace(exact, ".", "", 1), "-0")) <= most {
		return exact
	}
	scientific := strconv.FormatFloat(math.Abs(v), 'e', most-1, 64)
	mantissa, power, _ := strings.Cut(scientific, "e")
	exponent, _ := strconv.Atoi(power)
	if mantissa[0] == '1' {
		most++
	}
	return strconv.FormatFloat(v, 'f', max(0, most-1-exponent), 64)
}

// Step returns the step of the last figure of a number as printed.
func (n Number) Step() float64 {
	decimals := 0
	if i := strings.IndexByte(n.Figures, '.'); i >= 0 {
		decimals = len(n.Figures) - i - 1
	}
	return math.Pow(10, float64(n.Exponent-decimals))
}
