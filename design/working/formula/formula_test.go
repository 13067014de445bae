package formula

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func TestText(t *testing.T) {
	for source, want := range map[string]string{
		"π^2 E I_y/L_cr,y^2":            "π² E I_y / L_cr,y²",
		"√(A f_y/N_cr,y)":               "√(A f_y / N_cr,y)",
		"0.5 (1 + α (λ̄_y-0.2)+λ̄_y^2)": "0.5 (1 + α (λ̄_y − 0.2) + λ̄_y²)",
		"(b - t_w - 2 r)/2":             "(b − t_w − 2 r) / 2",
		"a/(b c)":                       "a / (b c)",
		"a/b c":                         "a / b c",
		"min(a_x, b)":                   "min(a_x, b)",
		"-a + b":                        "−a + b",
		"(a b)^2 (c/d)":                 "(a b)² (c / d)",
		"a^(2 n)":                       "a^(2 n)",
		"4 (1 - ρ) c_f t_f":             "4 (1 − ρ) c_f t_f",
		"5 × 10^-3":                     "",
	} {
		e, err := Parse(source)
		if want == "" {
			assert.Error(t, err, source)
			continue
		}
		require.NoError(t, err, source)
		assert.Equal(t, want, Text(e))
	}
}

func TestNumbersPutIn(t *testing.T) {
	numbers := map[string]Number{"E": {Figures: "210000"}, "I_y": {Figures: "6122.9", Exponent: 4}, "L": {Figures: "3500"}, "N": {Figures: "10365", Exponent: 3},
		"A": {Figures: "7637.1"}, "ψ": {Figures: "-0.5"}}
	number := func(s Symbol) (Number, bool) { n, ok := numbers[s.String()]; return n, ok }
	for source, want := range map[string]string{
		"π^2 E I_y/L^2":   "π² × 210000 × 6122.9×10⁴ / 3500²",
		"√(A/N)":          "√(7637.1 / (10365×10³))",
		"1.5 (1 + 2 A)":   "1.5 × (1 + 2 × 7637.1)",
		"0.6 + 0.4 ψ":     "0.6 + 0.4 × (−0.5)",
		"1 + ψ":           "1 + (−0.5)",
		"ψ^2 - N^2":       "(−0.5)² − (10365×10³)²",
		"2 (A + E) (A/E)": "2 × (7637.1 + 210000) × (7637.1 / 210000)",
	} {
		put := Put(Must(source), number)
		assert.Equal(t, want, Text(put))

		// What is printed means what was meant.
		value, err := Eval(put, nil)
		require.NoError(t, err)
		again, err := Parse(want)
		require.NoError(t, err, want)
		read, err := Eval(again, nil)
		require.NoError(t, err)
		assert.InEpsilon(t, value, read, 1e-12, want)
	}
}

func TestSpans(t *testing.T) {
	assert.Equal(t, []Span{{"1 − ", Upright}, {"N", Letter}, {"cr,y", Subscript}, {"² / (2 ", Upright}, {"λ̄", Letter}, {")", Upright}},
		Spans(Must("1 - N_cr,y^2/(2 λ̄)")))
}

// anyExpr draws a formula of symbols and numbers.
func anyExpr(t *rapid.T, depth int) Expr {
	kind := rapid.IntRange(0, 7).Draw(t, "kind")
	if depth == 0 {
		kind %= 2
	}
	sub := func() Expr { return anyExpr(t, depth-1) }
	switch kind {
	case 0:
		return Number{Figures: Figures(rapid.Float64Range(-20, 20).Draw(t, "x"), 4), Exponent: rapid.SampledFrom([]int{0, 0, 3, -2}).Draw(t, "e")}
	case 1:
		return Sym(rapid.SampledFrom([]string{"a", "λ̄_y", "N_b,z,Rd", "C_1"}).Draw(t, "s"))
	case 2:
		return Sum{[]Term{{rapid.Bool().Draw(t, "m"), sub()}, {rapid.Bool().Draw(t, "m"), sub()}}}
	case 3:
		return Product{[]Expr{sub(), sub(), sub()}}
	case 4:
		return Quotient{sub(), sub()}
	case 5:
		return Power{sub(), Number{Figures: "2"}}
	case 6:
		return Root{sub()}
	}
	return Call{"max", []Expr{sub(), sub()}}
}

// A printed formula, read again, has the value of the one that was printed.
func TestPrintedFormulaIsTheFormula(t *testing.T) {
	values := map[string]float64{"a": 1.7, "λ̄_y": -0.4, "N_b,z,Rd": 12, "C_1": 0.3}
	value := func(s Symbol) (float64, bool) { v, ok := values[s.String()]; return v, ok }
	rapid.Check(t, func(t *rapid.T) {
		e := anyExpr(t, 3)
		want, err := Eval(e, value)
		require.NoError(t, err)
		again, err := Parse(Text(e))
		require.NoError(t, err, Text(e))
		got, err := Eval(again, value)
		require.NoError(t, err)
		if want != want {
			assert.True(t, got != got)
			return
		}
		assert.InDelta(t, want, got, 1e-9*max(1, want, -want), Text(e))
	})
}

func FuzzParse(f *testing.F) {
	f.Add("π^2 E I_y/L_cr,y^2")
	f.Add("√((a")
	f.Add("5²³ 10⁻³×")
	f.Fuzz(func(t *testing.T, s string) {
		if e, err := Parse(s); err == nil {
			_ = Text(e)
		}
	})
}

func TestFigures(t *testing.T) {
	for _, c := range []struct {
		v    float64
		want string
	}{{3500, "3500"}, {345, "345"}, {0.34, "0.34"}, {210000, "210000"}, {7637.1234, "7637.1"}, {10365.123, "10365.1"},
		{0.504321, "0.50432"}, {0.13578123, "0.135781"}, {3127.00004, "3127.0"}, {1036512.7, "1036510"}, {841023.4, "841020"}, {209.6 - 28.4 - 20.4, "160.8"}, {-0.1122334, "-0.112233"}, {0, "0"}} {
		assert.Equal(t, c.want, Figures(c.v, 5))
	}
	assert.Equal(t, 1e2, Number{Figures: "6122.9", Exponent: 3}.Step())
	assert.Equal(t, 10.0, Number{Figures: "3500", Exponent: 1}.Step())
	assert.Equal(t, 10.0, Round(841023.4, 5).Step())
	assert.Equal(t, 1.0, Round(84102, 5).Step())
}
