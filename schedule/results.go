package schedule

import "stanchion/design"

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
	Width    int // characters that its values usually need
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

// Value is one result cell: a number, a text or, where both are absent, blank.
type Value struct {
	Text   string
	Number float64
	Kind   Kind // Blank, Text or Number
}

// ResultOptions say which result columns are asked for beyond the usual ones.
type ResultOptions struct {
	Reserve bool // by how much the load could still grow
	Fire    bool // critical temperature
}
