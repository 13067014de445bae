package ec3

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// nationalSets are the built-in sets of nationally determined parameters, the
// default first. All partial factors are from memory.
var nationalSets = []design.National{
	{Name: "UK", GammaM0: 1, GammaM1: 1, GammaMfi: 1,
		Strength: design.ProductStandard, LTB: design.LTBCurvesUK, KcFromC1: true,
		Source: "UK NA to EN 1993-1-1:2005 (NA.2.4, NA.2.15, NA.2.17, NA.2.18) and to EN 1993-1-2, from memory"},
	{Name: "EN", GammaM0: 1, GammaM1: 1, GammaMfi: 1, Strength: design.Table31,
		Source: "values recommended in EN 1993-1-1:2005 6.1(1) and EN 1993-1-2:2005 2.3(1), from memory"},
	{Name: "DE", GammaM0: 1, GammaM1: 1.1, GammaMfi: 1, Strength: design.Table31, Source: confirm("DIN EN 1993-1-1/NA")},
	{Name: "IE", GammaM0: 1, GammaM1: 1, GammaMfi: 1, Strength: design.Table31, Source: confirm("Irish NA to I.S. EN 1993-1-1")},
	{Name: "IT", GammaM0: 1.05, GammaM1: 1.05, GammaMfi: 1, Strength: design.Table31, Source: confirm("Italian annex to UNI EN 1993-1-1")},
	{Name: "ES", GammaM0: 1.05, GammaM1: 1.05, GammaMfi: 1, Strength: design.Table31, Source: confirm("Spanish annex to UNE-EN 1993-1-1")},
	{Name: "NO", GammaM0: 1.05, GammaM1: 1.05, GammaMfi: 1, Strength: design.Table31, Source: confirm("NS-EN 1993-1-1/NA")},
	{Name: "DK", GammaM0: 1.1, GammaM1: 1.2, GammaMfi: 1, Strength: design.Table31, Source: confirm("DS/EN 1993-1-1 DK NA")},
}

func confirm(annex string) string {
	return annex + ", from memory: confirm the partial factors before use; everything else as recommended in EN 1993-1-1"
}

// NationalSets returns the built-in sets, the default first.
func NationalSets() []design.National {
	return append([]design.National(nil), nationalSets...)
}

// NationalSet returns the set of that name, in any case.
func NationalSet(name string) (design.National, error) {
	var names []string
	for _, n := range nationalSets {
		if strings.EqualFold(n.Name, strings.TrimSpace(name)) {
			return n, nil
		}
		names = append(names, n.Name)
	}
	return design.National{}, fmt.Errorf("unknown national set %q: give one of %s, or your own set", name, strings.Join(names, ", "))
}
