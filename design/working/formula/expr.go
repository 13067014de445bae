package formula

// Expr is a formula: one of the types below.
type Expr interface{ expr() }

// The parts of a formula.
type (
	// Symbol is a letter with a subscript: N and "cr,y".
	Symbol struct{ Base, Sub string }

	// Number is a value as printed: figures times a power of ten.
	Number struct {
		Figures  string // "6122.9"; a minus sign is "-"
		Exponent int

		filler int // noughts at its end that stand for figures left out
	}

	// Sum adds its terms.
	Sum struct{ Terms []Term }

	// Product multiplies its factors.
	Product struct{ Factors []Expr }

	// Quotient divides Above by Below.
	Quotient struct{ Above, Below Expr }

	// Power raises Base.
	Power struct{ Base, Exponent Expr }

	// Root is a square root.
	Root struct{ Of Expr }

	// Call is a named function: min, max, abs.
	Call struct {
		Name string
		Args []Expr
	}
)

// Term is one term of a Sum.
type Term struct {
	Minus bool
	Of    Expr
}

func (Symbol) expr()   {}
func (Number) expr()   {}
func (Sum) expr()      {}
func (Product) expr()  {}
func (Quotient) expr() {}
func (Power) expr()    {}
func (Root) expr()     {}
func (Call) expr()     {}

// Put returns the formula with numbers in place of the symbols that the
// function knows.
func Put(e Expr, number func(Symbol) (Number, bool)) Expr {
	put := func(e Expr) Expr { return Put(e, number) }
	switch e := e.(type) {
	case Symbol:
		if n, ok := number(e); ok {
			return n
		}
	case Sum:
		terms := make([]Term, len(e.Terms))
		for i, t := range e.Terms {
			terms[i] = Term{t.Minus, put(t.Of)}
		}
		return Sum{terms}
	case Product:
		return Product{putAll(e.Factors, put)}
	case Quotient:
		return Quotient{put(e.Above), put(e.Below)}
	case Power:
		return Power{put(e.Base), put(e.Exponent)}
	case Root:
		return Root{put(e.Of)}
	case Call:
		return Call{e.Name, putAll(e.Args, put)}
	}
	return e
}

func putAll(list []Expr, put func(Expr) Expr) []Expr {
	out := make([]Expr, len(list))
	for i, e := range list {
		out[i] = put(e)
	}
	return out
}
