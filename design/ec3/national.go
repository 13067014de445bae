package ec3

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// The annexes behind the built-in sets. Everything is from memory.
const (
	fromMemory = ", from memory"
	confirm    = ", from memory: confirm it before use"
	enSource   = "value recommended in EN 1993-1-1:2005" + fromMemory
	ukSource   = "UK NA to EN 1993-1-1:2005" + fromMemory
)

// nationalSets are the built-in sets of nationally determined parameters, the
// default first.
var nationalSets = []design.National{
	{Name: "UK", GammaM0: 1, GammaM1: 1, GammaMfi: 1,
		Strength: design.ProductStandard, LTB: design.LTBCurvesUK, KcFromC1: true, Source: ukSource,
		Sources: map[string]string{
			"gamma_M0":   "UK NA to EN 1993-1-1:2005, NA.2.15" + fromMemory,
			"gamma_M1":   "UK NA to EN 1993-1-1:2005, NA.2.15" + fromMemory,
			"gamma_M,fi": "UK NA to EN 1993-1-2:2005, NA.2.3" + fromMemory,
			"strength":   "UK NA to EN 1993-1-1:2005, NA.2.4" + fromMemory,
			"LTB curves": "UK NA to EN 1993-1-1:2005, NA.2.17" + fromMemory,
			"k_c":        "UK NA to EN 1993-1-1:2005, NA.2.18" + fromMemory,
		}},
	{Name: "EN", GammaM0: 1, GammaM1: 1, GammaMfi: 1, Strength: design.Table31, Source: enSource},
	recommendedBut("DE", 1.00, 1.10, "DIN EN 1993-1-1/NA"),
	recommendedBut("IE", 1.00, 1.00, "Irish NA to I.S. EN 1993-1-1"),
	recommendedBut("IT", 1.05, 1.05, "Italian annex to UNI EN 1993-1-1"),
	recommendedBut("ES", 1.05, 1.05, "Spanish annex to UNE-EN 1993-1-1"),
	recommendedBut("NO", 1.05, 1.05, "NS-EN 1993-1-1/NA"),
	recommendedBut("DK", 1.10, 1.20, "DS/EN 1993-1-1 DK NA"),
}

// recommendedBut is a set of the recommended values but for the partial
// factors of an annex.
func recommendedBut(name string, gammaM0, gammaM1 float64, annex string) design.National {
	return design.National{Name: name, GammaM0: gammaM0, GammaM1: gammaM1, GammaMfi: 1,
		Strength: design.Table31, Source: enSource,
		Sources: map[string]string{"gamma_M0": annex + confirm, "gamma_M1": annex + confirm}}
}

// NationalSets returns the built-in sets, the default first.
func NationalSets() []design.National {
	return append([]design.National(nil), nationalSets...)
}

// NationalSet returns the built-in set of that name, in any case.
func NationalSet(name string) (design.National, error) {
	var names []string
	for _, n := range nationalSets {
		if strings.EqualFold(n.Name, strings.TrimSpace(name)) {
			return n, nil
		}
		names = append(names, n.Name)
	}
	return design.National{}, fmt.Errorf("unknown national set %q: give one of %s, or a set of your own", name, strings.Join(names, ", "))
}
