package working

import (
	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/working/formula"
)

// Sheet is the working of one column.
type Sheet struct {
	Column   *design.Column
	Settings *design.Settings
	Section  *catalogue.Section // nil: no section, or one that the rules do not cover
	Grade    string
	Result   *design.Result // what the run says of the column
	Limit    float64        // utilisation limit

	Blocks []Block
	Notes  []string // what to know of how the row was taken

	// What the drawings show.
	Lengths []Length
	Points  []Point
	Diagram *Diagram

	Checks    []design.Check // every one
	Governing int            // index into Checks; -1: none

	// Off names the steps whose formula does not give the value of the
	// assessment: a defect of the program. It is empty.
	Off []string
}

// Block is one subject of the working.
type Block struct {
	Title string
	Items []Item
}

// Item is a part of a block: Values, Step, Table or Words.
type Item interface{ item() }

// Unit is a unit as printed: a value printed in it is 10^Exponent times as
// large in N, mm and MPa.
type Unit struct {
	Name     string
	Exponent int
}

// The units of the working.
var (
	None    = Unit{"", 0}
	Mm      = Unit{"mm", 0}
	Mm2     = Unit{"mm²", 0}
	Cm3     = Unit{"cm³", 3}
	Cm4     = Unit{"cm⁴", 4}
	Mm6     = Unit{"×10⁹ mm⁶", 9}
	MPa     = Unit{"N/mm²", 0}
	KN      = Unit{"kN", 3}
	KNm     = Unit{"kNm", 6}
	KgM     = Unit{"kg/m", 0}
	Celsius = Unit{"°C", 0}
	PerM    = Unit{"1/m", 0}
	Minutes = Unit{"min", 0}
)

// Value is a symbol, or a ratio, and what it stands for.
type Value struct {
	Left   formula.Expr
	Number formula.Number // as printed, in Unit: its exponent is 0
	Unit   Unit
	Note   string
}

// Values are values that a block starts from.
type Values []Value

// Step is one line of the working.
type Step struct {
	Left    formula.Expr // what is found: a symbol or a ratio
	Formula formula.Expr // nil: none to show
	Numbers formula.Expr // the formula with numbers; nil: none to show
	Result  formula.Number
	Unit    Unit
	Clause  string
	Note    string
	Limit   string // "≤ 1.00": what the result is held against; empty: nothing
	Within  bool   // the result is within the limit
}

// Table is a table of texts.
type Table struct {
	Head  []string
	Right []bool // columns of numbers
	Rows  [][]string
}

// Words is a sentence.
type Words string

func (Values) item() {}
func (*Step) item()  {}
func (Table) item()  {}
func (Words) item()  {}

// Length is a segment about an axis with its buckling length, mm.
type Length struct {
	Axis     string // "y", "z" or "T"
	From, To float64
	Lcr      float64
	Governs  bool // behind the resistance about its axis
}

// Point is the column on a buckling curve.
type Point struct {
	Axis      string // "y", "z" (u, v of an angle) or "T"
	Curve     string
	LambdaBar float64
	Chi       float64
}

// Diagram is the bending of the combination that governs: nil where nothing
// bends.
type Diagram struct{ My, Mz design.EndMoments }
