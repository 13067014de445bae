// Package material turns the name of a structural steel grade and the
// thickness of a section into a yield strength.
//
// Strengths are in MPa and thicknesses in mm. Two sources are held: the bands
// of the product standards (EN 10025-2, -3, -4, EN 10210-1, EN 10219-1), which
// the UK annex to EN 1993-1-1 adopts, and EN 1993-1-1:2005 Table 3.1.
package material

import (
	"fmt"
	"slices"
	"strings"
)

// Delivery says which family of product standard a grade belongs to.
type Delivery uint8

// The deliveries.
const (
	NonAlloy          Delivery = iota // EN 10025-2; hollow: EN 10210-1 and EN 10219-1 non-alloy
	Normalised                        // N and NL: EN 10025-3; hollow: NH, NLH
	Thermomechanical                  // M and ML: EN 10025-4; hollow: MH, MLH
	UnstatedFineGrain                 // a bare S420 or S460: N, on cold-formed hollow sections MH
)

// Grade is a structural steel grade as a drawing names it.
type Grade struct {
	Name     string // normalised: "S355J2H"
	Nominal  int    // nominal yield strength, MPa: the number in the name
	Delivery Delivery
	Hollow   bool // the name ends in H: a grade of hollow sections alone
}

// String returns the normalised name.
func (g Grade) String() string { return g.Name }

// nominals lists, for each delivery, the nominal strengths that exist.
var nominals = map[Delivery][]int{
	NonAlloy:          {235, 275, 355, 450},
	Normalised:        {275, 355, 420, 460},
	Thermomechanical:  {275, 355, 420, 460},
	UnstatedFineGrain: {420, 460},
}

// deliveries maps what may follow the number, without a final H, to the
// delivery that it stands for. The toughness sub-grade and the delivery
// condition behind a plus sign do not change the strength.
var deliveries = map[string]Delivery{
	"": NonAlloy, "JR": NonAlloy, "J0": NonAlloy, "J2": NonAlloy, "K2": NonAlloy,
	"N": Normalised, "NL": Normalised,
	"M": Thermomechanical, "ML": Thermomechanical,
}

// conditions are the delivery conditions that EN 10025-2 lets stand behind a
// grade's name.
var conditions = []string{"+AR", "+N", "+M"}

// Parse reads a grade: S235, S275, S355, S420, S450 or S460, with a sub-grade
// (JR, J0, J2, K2), a delivery (N, NL, M, ML), an H for hollow sections and a
// delivery condition (+AR, +N, +M), in any case and spacing.
func Parse(name string) (Grade, error) {
	text := strings.ToUpper(strings.Join(strings.Fields(name), ""))
	text = strings.NewReplacer("-", "", "_", "", "/", "", "JO", "J0").Replace(text) // the letter for the figure
	unknown := &UnknownGradeError{Name: name}
	if len(text) < 4 || text[0] != 'S' {
		return Grade{}, unknown
	}
	nominal := 0
	for _, r := range text[1:4] {
		if r < '0' || r > '9' {
			return Grade{}, unknown
		}
		nominal = 10*nominal + int(r-'0')
	}
	suffix := text[4:]
	for _, c := range conditions {
		if cut, ok := strings.CutSuffix(suffix, c); ok {
			suffix = cut
			break
		}
	}
	suffix, hollow := strings.CutSuffix(suffix, "H")
	delivery, ok := deliveries[suffix]
	if !ok {
		return Grade{}, unknown
	}
	if suffix == "" && (nominal == 420 || nominal == 460) {
		delivery = UnstatedFineGrain
	}
	if !slices.Contains(nominals[delivery], nominal) {
		return Grade{}, unknown
	}
	return Grade{Name: text, Nominal: nominal, Delivery: delivery, Hollow: hollow}, nil
}

// Names lists the grades without their sub-grades, for messages and lists of
// allowed values.
func Names() []string {
	return []string{"S235", "S275", "S355", "S420", "S450", "S460",
		"S275N", "S355N", "S420N", "S460N", "S275M", "S355M", "S420M", "S460M"}
}

// UnknownGradeError says that a name is no grade held here.
type UnknownGradeError struct{ Name string }

func (e *UnknownGradeError) Error() string {
	return fmt.Sprintf("unknown steel grade %q: give one of %s, with its sub-grade (JR, J0, J2, K2, NL, ML) "+
		"and H for hollow sections if you like", e.Name, strings.Join(Names(), ", "))
}
