package working

import (
	"fmt"
	"math"
	"strings"

	"stanchion/catalogue"
	"stanchion/design/ec3"
	"stanchion/design/working/formula"
)

// writer fills a sheet. It remembers what every symbol stands for: the exact
// value, and the number as it was printed.
type writer struct {
	sheet *Sheet
	block *Block
	known map[formula.Symbol]known

	most int  // the greatest number of figures of a value
	weak bool // a result has fewer figures than enough

	classedFor struct { // the last classification under axial force and moments
		class int
		web   ec3.Element
		nEd   float64
	}

	c *ec3.Candidate
	m *ec3.Member
	a *ec3.Assessment
}

type known struct {
	exact   float64 // N, mm, MPa
	printed formula.Number
}

// start opens a block.
func (w *writer) start(title string) {
	w.sheet.Blocks = append(w.sheet.Blocks, Block{Title: title})
	w.block = &w.sheet.Blocks[len(w.sheet.Blocks)-1]
}

func (w *writer) add(i Item) { w.block.Items = append(w.block.Items, i) }

func (w *writer) say(format string, args ...any) { w.add(Words(fmt.Sprintf(format, args...))) }

// A value has five figures. Where a result is left with fewer than enough of
// them by the numbers before it, the whole sheet is written with more, and no
// more than ever.
const (
	usual  = 5
	enough = 4
	ever   = 9
)

// print returns a value, N, mm, MPa, as a number in a unit.
func print(exact float64, u Unit, figures int) formula.Number {
	return formula.Round(exact/math.Pow10(u.Exponent), figures)
}

// know remembers what a symbol stands for and how it is printed.
func (w *writer) know(symbol formula.Symbol, exact float64, printed formula.Number, u Unit) {
	printed.Exponent = u.Exponent
	w.known[symbol] = known{exact, printed}
}

// value returns a value to start from, and remembers it.
func (w *writer) value(symbol string, exact float64, u Unit) Value {
	return w.noted(symbol, exact, u, "")
}

func (w *writer) noted(symbol string, exact float64, u Unit, note string) Value {
	v := Value{formula.Must(symbol), print(exact, u, w.most), u, note}
	if s, ok := v.Left.(formula.Symbol); ok {
		w.know(s, exact, v.Number, u)
	}
	return v
}

// sym reads a symbol.
func sym(s string) formula.Symbol { return formula.Sym(s) }

func (w *writer) exact(s formula.Symbol) (float64, bool) {
	k, ok := w.known[s]
	return k.exact, ok
}

func (w *writer) printed(s formula.Symbol) (formula.Number, bool) {
	k, ok := w.known[s]
	return k.printed, ok
}

// find writes a step whose value the assessment has.
func (w *writer) find(symbol, source string, exact float64, u Unit, clause string) *Step {
	return w.step(formula.Sym(symbol), source, exact, u, clause)
}

// derive writes a step whose value follows from the ones before it.
func (w *writer) derive(symbol, source string, u Unit, clause string) *Step {
	exact, err := formula.Eval(formula.Must(source), w.exact)
	if err != nil {
		w.off(symbol, err.Error())
	}
	return w.find(symbol, source, exact, u, clause)
}

// ratio writes a utilisation against its limit: a ratio, or a sum U.
func (w *writer) ratio(source string, exact float64, clause string) *Step {
	left := formula.Must(source)
	_, plain := left.(formula.Quotient)
	if !plain {
		left = formula.Symbol{Base: "U"} // a sum
	}
	s := w.step(left, source, exact, None, clause)
	if plain {
		s.Formula = nil
	}
	s.Result = shortest(s, exact)
	s.Limit, s.Within = "≤ "+fixed(w.sheet.Limit, 2), ec3.Passes(exact, w.sheet.Limit)
	return s
}

// shortest returns the result of a utilisation with three decimals at most.
func shortest(s *Step, exact float64) formula.Number {
	if s.Result.Step() < 1e-3 {
		return formula.Number{Figures: Utilisation(exact)}
	}
	return s.Result
}

// Utilisation writes a utilisation to three decimals.
func Utilisation(u float64) string {
	if math.IsInf(u, 1) {
		return "∞"
	}
	return fixed(u, 3)
}

// step writes a step and remembers its symbol.
func (w *writer) step(left formula.Expr, source string, exact float64, u Unit, clause string) *Step {
	f := formula.Must(source)
	s := &Step{Left: left, Formula: f, Unit: u, Clause: clause}
	w.hold(left, f, exact)
	s.Numbers = w.numbers(f, exact, u)
	s.Result = w.supported(s.Numbers, exact, u)
	if _, alone := f.(formula.Symbol); alone {
		s.Numbers = nil // the same number twice
	}
	if symbol, ok := left.(formula.Symbol); ok {
		w.know(symbol, exact, s.Result, u)
	}
	w.add(s)
	return s
}

// hold compares a formula, with exact values put in, to the assessment.
func (w *writer) hold(left, f formula.Expr, exact float64) {
	v, err := formula.Eval(f, w.exact)
	switch {
	case err != nil:
		w.off(formula.Text(left), err.Error())
	case math.IsInf(exact, 0) && v == exact:
	case !(math.Abs(v-exact) <= 1e-6*math.Abs(exact)+1e-9):
		w.off(formula.Text(left), fmt.Sprintf("%s gives %.9g, the assessment has %.9g", formula.Text(f), v, exact))
	}
}

func (w *writer) off(what, why string) { w.sheet.Off = append(w.sheet.Off, what+": "+why) }

// numbers puts the printed numbers into a formula so that its value comes out
// in the unit: as they stand where that is enough (kN over kN), else in N and
// mm with their powers of ten.
func (w *writer) numbers(f formula.Expr, exact float64, u Unit) formula.Expr {
	bare := formula.Put(f, func(s formula.Symbol) (formula.Number, bool) {
		n, ok := w.printed(s)
		return formula.Number{Figures: n.Figures}, ok
	})
	plain, err := formula.Eval(f, func(s formula.Symbol) (float64, bool) {
		k, ok := w.known[s]
		return k.exact / math.Pow10(k.printed.Exponent), ok
	})
	if want := exact / math.Pow10(u.Exponent); err == nil && math.Abs(plain-want) <= 1e-9*math.Abs(want) {
		return bare
	}
	scaled := formula.Put(f, w.printed)
	if u.Exponent == 0 {
		return scaled
	}
	ten := formula.Number{Figures: "1", Exponent: -u.Exponent}
	if p, ok := scaled.(formula.Product); ok {
		return formula.Product{Factors: append(append([]formula.Expr(nil), p.Factors...), ten)}
	}
	return formula.Product{Factors: []formula.Expr{scaled, ten}}
}

// supported prints a result to as many figures as the printed numbers give
// back within one step of the last.
func (w *writer) supported(numbers formula.Expr, exact float64, u Unit) formula.Number {
	again, err := formula.Eval(numbers, nil)
	for figures := w.most; ; figures-- {
		n := print(exact, u, figures)
		if err != nil || figures <= 1 || !(math.Abs(again-n.Value()) > n.Step()*1.0001) {
			w.weak = w.weak || figures < enough
			return n
		}
	}
}

// fixed writes a number with a fixed number of decimals.
func fixed(v float64, decimals int) string { return fmt.Sprintf("%.*f", decimals, v) }

// metres writes mm as m for people.
func metres(mm float64) string {
	s := strings.TrimRight(fmt.Sprintf("%.3f", mm/1000), "0")
	if strings.HasSuffix(s, ".") {
		s += "0"
	}
	return s
}

// combination names a combination for people.
func (w *writer) combination(i int) string {
	if i < 0 || i >= len(w.m.Column.Combinations) {
		return ""
	}
	if name := w.m.Column.Combinations[i].Name; name != "" {
		return Short(name)
	}
	if len(w.m.Column.Combinations) == 1 {
		return ""
	}
	return fmt.Sprintf("combination %d", i+1)
}

// Short cuts a name that would not stand on a line.
func Short(name string) string {
	const most = 24
	if runes := []rune(name); len(runes) > most {
		return string(runes[:most-1]) + "…"
	}
	return name
}

// where names a segment in a combination for people.
func (w *writer) where(from, to float64, combination int) string {
	s := metres(from) + "-" + metres(to) + " m"
	if name := w.combination(combination); name != "" {
		s += ", " + name
	}
	return s
}

func (w *writer) angle() bool { return w.c.Section.Shape == catalogue.ShapeAngle }

// axes returns the letters of the axes that the section buckles about.
func (w *writer) axes() (string, string) {
	if w.angle() {
		return "u", "v"
	}
	return "y", "z"
}

// area returns the symbol of the area in compression.
func (w *writer) area() string {
	if w.c.Class == 4 {
		return "A_eff"
	}
	return "A"
}

// fill puts letters into a formula: # is the axis, @ the area in compression.
func (w *writer) fill(source, axis string) string {
	return strings.NewReplacer("#", axis, "@", w.area()).Replace(source)
}
