package catalogue

import (
	"fmt"
	"slices"
	"strings"
)

// FamilySpec is a family of the catalogue, with the finish where the words
// that named it said one.
type FamilySpec struct {
	Family string
	Finish Finish
}

// family is what the catalogue knows of a family: its shape, and the words for
// it, upper case and without spaces. Plural and hyphen are taken off before.
type family struct {
	shape Shape
	words []string
}

var families = map[string]family{
	"UKC":       {ShapeI, []string{"UKC", "UC", "UNIVERSALCOLUMN", "UKCOLUMN"}},
	"UKB":       {ShapeI, []string{"UKB", "UB", "UNIVERSALBEAM", "UKBEAM"}},
	"UKBP":      {ShapeI, []string{"UKBP", "UBP", "UNIVERSALBEARINGPILE", "BEARINGPILE", "HPILE"}},
	"HEA":       {ShapeI, []string{"HEA"}},
	"HEB":       {ShapeI, []string{"HEB"}},
	"HEM":       {ShapeI, []string{"HEM"}},
	"HEAA":      {ShapeI, []string{"HEAA"}},
	"HD":        {ShapeI, []string{"HD"}},
	"IPE":       {ShapeI, []string{"IPE"}},
	"IPEA":      {ShapeI, []string{"IPEA"}},
	"IPEO":      {ShapeI, []string{"IPEO"}},
	"UKPFC":     {ShapeChannel, []string{"UKPFC", "PFC", "PARALLELFLANGECHANNEL"}},
	"UPE":       {ShapeChannel, []string{"UPE"}},
	"CHS":       {ShapeCHS, []string{"CHS", "CIRCULARHOLLOWSECTION", "CIRCULARHOLLOW"}},
	"SHS":       {ShapeRHS, []string{"SHS", "SQUAREHOLLOWSECTION", "SQUAREHOLLOW"}},
	"RHS":       {ShapeRHS, []string{"RHS", "RECTANGULARHOLLOWSECTION", "RECTANGULARHOLLOW"}},
	"L equal":   {ShapeAngle, []string{"LEQUAL", "EA", "EQUALANGLE", "RSEA", "EQUALLEGANGLE"}},
	"L unequal": {ShapeAngle, []string{"LUNEQUAL", "UA", "UNEQUALANGLE", "RSUA", "UNEQUALLEGANGLE"}},
}

// collective words stand for several families.
var collective = map[string][]string{
	"HE":            {"HEA", "HEB", "HEM"},
	"L":             {"L equal", "L unequal"},
	"ANGLE":         {"L equal", "L unequal"},
	"RSA":           {"L equal", "L unequal"},
	"UKA":           {"L equal", "L unequal"},
	"ROLLEDANGLE":   {"L equal", "L unequal"},
	"CHANNEL":       {"UKPFC", "UPE"},
	"HOLLOW":        {"CHS", "SHS", "RHS"},
	"HOLLOWSECTION": {"CHS", "SHS", "RHS"},
}

// finishWords say how a hollow section was formed.
var finishWords = map[string]Finish{
	"CF": ColdFormed, "COLD": ColdFormed, "COLDFORMED": ColdFormed, "CFHS": ColdFormed,
	"HF": HotFinished, "HOT": HotFinished, "HOTFINISHED": HotFinished, "HFHS": HotFinished, "HOTFORMED": HotFinished,
	"EN10219": ColdFormed, "EN10210": HotFinished, "EN102192": ColdFormed, "EN102102": HotFinished,
	"BSEN10219": ColdFormed, "BSEN10210": HotFinished, "BSEN102192": ColdFormed, "BSEN102102": HotFinished,
}

// familyByWord is families and collective, by word.
var familyByWord = func() map[string][]string {
	byWord := map[string][]string{}
	for name, f := range families {
		for _, w := range f.words {
			byWord[w] = []string{name}
		}
	}
	for w, names := range collective {
		byWord[w] = names
	}
	return byWord
}()

// FamilyNames lists the families of the catalogue, in alphabetical order.
func FamilyNames() []string {
	names := make([]string, 0, len(families))
	for name := range families {
		names = append(names, name)
	}
	slices.Sort(names)
	return names
}

// ParseFamilies reads the families that a schedule or a setting names: "UKC",
// "HE", "CHS, SHS CF", "Universal columns". Comma, semicolon and line end part
// items; within an item blanks, slash, plus, ampersand, "and" and "or" part
// families, and a finish behind several holds for all of them: "CHS/SHS CF".
// An error lists the families there are.
func ParseFamilies(text string) ([]FamilySpec, error) {
	var specs []FamilySpec
	for _, item := range strings.FieldsFunc(text, func(r rune) bool { return strings.ContainsRune(",;\n", r) }) {
		found, err := parseFamilyItem(item)
		if err != nil {
			return nil, err
		}
		for _, f := range found {
			if !slices.Contains(specs, f) {
				specs = append(specs, f)
			}
		}
	}
	if len(specs) == 0 {
		return nil, unknownFamily(text)
	}
	return specs, nil
}

func unknownFamily(text string) error {
	return fmt.Errorf("section family %q is not known: give one or more of %s", shortened(strings.TrimSpace(text)), strings.Join(FamilyNames(), ", "))
}

// parseFamilyItem takes the longest run of words that names a family; a finish
// belongs to the families before it, or to those behind it where none stands
// before.
func parseFamilyItem(item string) ([]FamilySpec, error) {
	words := strings.FieldsFunc(plainUpper(item), func(r rune) bool { return strings.ContainsRune(" /+|&", r) })
	var specs []FamilySpec
	finish, open := FinishNone, 0
	for i := 0; i < len(words); {
		n, names, f := takeFamily(words[i:])
		switch {
		case n == 0:
			if words[i] != "AND" && words[i] != "OR" {
				return nil, unknownFamily(words[i])
			}
			n = 1
		case f != FinishNone && names == nil:
			if len(specs) > open {
				applyFinish(specs[open:], f)
				open = len(specs)
			} else {
				finish = f
			}
		default:
			if f == FinishNone {
				f = finish
			}
			for _, name := range names {
				specs = append(specs, FamilySpec{name, hollowFinish(name, f)})
			}
		}
		i += n
	}
	return specs, nil
}

func applyFinish(specs []FamilySpec, f Finish) {
	for i := range specs {
		specs[i].Finish = hollowFinish(specs[i].Family, f)
	}
}

// hollowFinish is f for the hollow families, none for the others.
func hollowFinish(name string, f Finish) Finish {
	if s := families[name].shape; s.hollow() {
		return f
	}
	return FinishNone
}

// takeFamily reads the longest run of words that is a family or a finish.
func takeFamily(words []string) (n int, names []string, f Finish) {
	for n := min(4, len(words)); n > 0; n-- {
		joined := strings.Join(words[:n], "")
		for _, w := range []string{joined, strings.TrimSuffix(joined, "S")} {
			if names, ok := familyByWord[w]; ok {
				return n, names, FinishNone
			}
			if f, ok := finishWords[w]; ok {
				return n, nil, f
			}
			if rest, f := cutFinish(w); n == 1 && f != FinishNone {
				return n, familyByWord[rest], f
			}
		}
	}
	return 0, nil, FinishNone
}
