package formula

import (
	"fmt"
	"math"
	"strconv"
)

// Value returns the number that is printed.
func (n Number) Value() float64 {
	v, err := strconv.ParseFloat(n.Figures+"e"+strconv.Itoa(n.Exponent), 64)
	if err != nil {
		return math.NaN()
	}
	return v
}

// Eval works a formula out. The function gives the values of the symbols; π
// needs none.
func Eval(e Expr, value func(Symbol) (float64, bool)) (float64, error) {
	c := calculator{value: value}
	v := c.of(e)
	return v, c.err
}

type calculator struct {
	value func(Symbol) (float64, bool)
	err   error
}

func (c *calculator) of(e Expr) float64 {
	switch e := e.(type) {
	case Number:
		return e.Value()
	case Symbol:
		return c.symbol(e)
	case Sum:
		sum := 0.0
		for _, t := range e.Terms {
			if v := c.of(t.Of); t.Minus {
				sum -= v
			} else {
				sum += v
			}
		}
		return sum
	case Product:
		product := 1.0
		for _, f := range e.Factors {
			product *= c.of(f)
		}
		return product
	case Quotient:
		return c.of(e.Above) / c.of(e.Below)
	case Power:
		return math.Pow(c.of(e.Base), c.of(e.Exponent))
	case Root:
		return math.Sqrt(c.of(e.Of))
	case Call:
		return c.call(e)
	}
	return math.NaN()
}

func (c *calculator) symbol(s Symbol) float64 {
	if s == (Symbol{Base: "π"}) {
		return math.Pi
	}
	if c.value != nil {
		if v, ok := c.value(s); ok {
			return v
		}
	}
	if c.err == nil {
		c.err = fmt.Errorf("no value for %s", s)
	}
	return math.NaN()
}

func (c *calculator) call(e Call) float64 {
	if len(e.Args) == 0 {
		return math.NaN()
	}
	v := c.of(e.Args[0])
	for _, a := range e.Args[1:] {
		switch x := c.of(a); e.Name {
		case "min":
			v = math.Min(v, x)
		case "max":
			v = math.Max(v, x)
		}
	}
	if e.Name == "abs" {
		v = math.Abs(v)
	}
	return v
}
