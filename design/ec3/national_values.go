package ec3

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"

	"stanchion/design"
)

// NationalValue is one nationally determined parameter as people read it.
type NationalValue struct {
	Name   string // by which SetNational knows it
	Value  string
	Clause string
	What   string
	Source string
}

// parameter is a nationally determined parameter.
type parameter struct {
	name, clause, what string
	get                func(*design.National) string
	set                func(*design.National, string) error
}

var parameters = []parameter{
	factor("gamma_M0", "6.1(1)", "partial factor, resistance of cross-sections", func(n *design.National) *float64 { return &n.GammaM0 }),
	factor("gamma_M1", "6.1(1)", "partial factor, resistance of members to buckling", func(n *design.National) *float64 { return &n.GammaM1 }),
	factor("gamma_M,fi", "EN 1993-1-2 2.3(1)", "partial factor in fire", func(n *design.National) *float64 { return &n.GammaMfi }),
	{"strength", "3.2.1(1)", "source of the yield strength",
		func(n *design.National) string { return strengthNames[n.Strength] },
		func(n *design.National, v string) error { return choose(&n.Strength, strengthNames[:], v) }},
	{"LTB curves", "6.3.2.3(1)", "lateral-torsional buckling curves of rolled sections",
		func(n *design.National) string { return ltbNames[n.LTB] },
		func(n *design.National, v string) error { return choose(&n.LTB, ltbNames[:], v) }},
	{"k_c", "6.3.2.3(2)", "correction factor of the moment distribution",
		func(n *design.National) string { return kcNames[kcIndex(n.KcFromC1)] },
		func(n *design.National, v string) error {
			var k uint8
			err := choose(&k, kcNames[:], v)
			if err == nil {
				n.KcFromC1 = k == 1
			}
			return err
		}},
}

var (
	strengthNames = [...]string{design.ProductStandard: "product", design.Table31: "table31"}
	ltbNames      = [...]string{design.LTBCurvesEN: "Table 6.5", design.LTBCurvesUK: "UK"}
	kcNames       = [...]string{"Table 6.6", "from C1"}
)

func kcIndex(fromC1 bool) int {
	if fromC1 {
		return 1
	}
	return 0
}

// factor is a parameter that is a partial factor.
func factor(name, clause, what string, at func(*design.National) *float64) parameter {
	return parameter{name, clause, what,
		func(n *design.National) string {
			text := strconv.FormatFloat(*at(n), 'f', -1, 64)
			return max(text, strconv.FormatFloat(*at(n), 'f', 2, 64)) // at least two decimals
		},
		func(n *design.National, text string) error {
			v, err := strconv.ParseFloat(strings.Replace(strings.TrimSpace(text), ",", ".", 1), 64)
			// Outside this range a number is a slip of the pen, not a partial factor.
			if err != nil || math.IsNaN(v) || v < 0.5 || v > 3 {
				return fmt.Errorf("%q is no partial factor: give a number from 0.5 to 3", text)
			}
			*at(n) = v
			return nil
		}}
}

// choose sets a value to the index of a name in a list, in any case and
// spacing.
func choose[T ~uint8](to *T, names []string, text string) error {
	for i, name := range names {
		if plain(name) == plain(text) {
			*to = T(i)
			return nil
		}
	}
	return fmt.Errorf("%q is not known: give one of %s", text, strings.Join(names, ", "))
}

// plain takes case, spaces and punctuation out of a name.
func plain(name string) string {
	return strings.NewReplacer(" ", "", "_", "", ",", "", "-", "", ".", "").Replace(strings.ToLower(name))
}

// NationalParameters returns the names that SetNational knows.
func NationalParameters() []string {
	var names []string
	for _, p := range parameters {
		names = append(names, p.name)
	}
	return names
}

// SetNational overrides one value of a set by the parameter's name and records
// where it comes from. The set may be a copy of a built-in one, which stays as
// it is.
func SetNational(n *design.National, name, value, source string) error {
	i := slices.IndexFunc(parameters, func(p parameter) bool { return plain(p.name) == plain(name) })
	if i < 0 {
		return fmt.Errorf("unknown national parameter %q: give one of %s", name, strings.Join(NationalParameters(), ", "))
	}
	p := parameters[i]
	if err := p.set(n, value); err != nil {
		return fmt.Errorf("%s: %w", p.name, err)
	}
	sources := maps.Clone(n.Sources)
	if sources == nil {
		sources = map[string]string{}
	}
	sources[p.name] = source
	n.Sources = sources
	return nil
}

// NationalValues lists the values of a set, each with its clause and source.
func NationalValues(n *design.National) []NationalValue {
	var values []NationalValue
	for _, p := range parameters {
		source, ok := n.Sources[p.name]
		if !ok {
			source = n.Source
		}
		values = append(values, NationalValue{p.name, p.get(n), p.clause, p.what, source})
	}
	return values
}
