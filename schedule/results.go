package schedule

import (
	"bytes"
	"math"
	"strconv"

	"stanchion/design"
)

// ResultMark opens every heading of the result columns, so that the program
// knows its own columns again wherever they stand: they are replaced by a new
// run and never read as given.
const ResultMark = "Result: "

// ResultColumn is one column of the result block.
type ResultColumn struct {
	Name     string // "N_b,y,Rd"
	Unit     string // "kN"; empty: none
	Decimals int    // shown
	Numeric  bool
	Width    int    // characters that its values usually need
	Group    string // heading over neighbouring columns of one subject; empty: none
	// Repeated columns are shown on the further rows of a member too. The
	// others (mass) stand on its first row alone, so that sums stay right.
	Repeated bool

	value func(*Member, *design.Result) Value
}

// Heading returns the heading as it stands in the file: "Result: N_b,y,Rd [kN]".
func (c *ResultColumn) Heading() string {
	if c.Unit == "" {
		return ResultMark + c.Name
	}
	return ResultMark + c.Name + " [" + c.Unit + "]"
}

// IsResultHeading reports whether a heading is one of an earlier run's results.
func IsResultHeading(s string) bool {
	_, ok := resultName(s)
	return ok
}

// Value is one result cell: a number, a text or, where both are absent, blank.
type Value struct {
	Text   string
	Number float64
	Kind   Kind // Blank, Text or Number
}

// significant is how many digits of a result are written: differences between
// processors lie far below, and the accuracy of any check far above.
const significant = 6

// Format writes a number as the result columns of a text schedule hold it: its
// column's decimals, and more where they are needed for five digits.
func (v *Value) Format(c *ResultColumn, decimal byte) string {
	if v.Kind != Number {
		return v.Text
	}
	decimals := c.Decimals
	if x := math.Abs(v.Number); decimals > 0 && x > 0 {
		decimals = min(max(decimals, significant-2-int(math.Floor(math.Log10(x)))), 9)
	}
	buf := strconv.AppendFloat(make([]byte, 0, 24), Round(v.Number), 'f', decimals, 64)
	for decimals > c.Decimals && buf[len(buf)-1] == '0' {
		buf, decimals = buf[:len(buf)-1], decimals-1
	}
	if i := bytes.IndexByte(buf, '.'); i >= 0 {
		buf[i] = decimal
	}
	return string(buf)
}

// Round rounds a result to the digits that are written.
func Round(x float64) float64 {
	if !usable(x) {
		return x
	}
	y, err := strconv.ParseFloat(strconv.FormatFloat(x, 'g', significant, 64), 64)
	if err != nil {
		return x
	}
	return y
}

// usable reports whether x is a number that says something.
func usable(x float64) bool { return x != 0 && finite(x) }

func finite(x float64) bool { return !math.IsNaN(x) && !math.IsInf(x, 0) }

// ResultOptions say which result columns are asked for beyond the usual ones.
type ResultOptions struct {
	Reserve bool // by how much the load could still grow
	Fire    bool // critical temperature
	AtHand  bool // of which pieces at hand members are made
	// StatusFirst puts the status before all else, where a person looks first;
	// programs that read text find it before the note.
	StatusFirst bool
}
