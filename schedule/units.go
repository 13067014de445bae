package schedule

import "strings"

// quantity is what a number of the schedule measures.
type quantity uint8

const (
	noQuantity  quantity = iota
	ratio                // dimensionless
	count                // a whole number
	length               // in design: mm
	size                 // a dimension of a section; in design: mm
	force                // N
	moment               // N mm
	stiffness            // N mm/rad
	minutes              // minutes
	temperature          // C
)

// unit is a unit that a heading, a unit row or a cell may name.
type unit struct {
	name   string // as it is written in messages
	of     quantity
	factor float64 // to the unit of design
}

// units by their spelling, folded: lower case, without spaces, points and dots.
var units = map[string]unit{
	"m": {"m", length, 1000}, "metre": {"m", length, 1000}, "metres": {"m", length, 1000},
	"meter": {"m", length, 1000}, "meters": {"m", length, 1000}, "mtr": {"m", length, 1000},
	"cm": {"cm", length, 10},
	"mm": {"mm", length, 1}, "millimetre": {"mm", length, 1}, "millimetres": {"mm", length, 1},
	"n": {"N", force, 1}, "kn": {"kN", force, 1e3}, "mn": {"MN", force, 1e6},
	"nmm": {"Nmm", moment, 1}, "nm": {"Nm", moment, 1e3}, "kncm": {"kNcm", moment, 1e4},
	"knm": {"kNm", moment, 1e6}, "mnm": {"MNm", moment, 1e9},
	"nmm/rad": {"Nmm/rad", stiffness, 1}, "nm/rad": {"Nm/rad", stiffness, 1e3},
	"knm/rad": {"kNm/rad", stiffness, 1e6}, "mnm/rad": {"MNm/rad", stiffness, 1e9},
	"min": {"min", minutes, 1}, "mins": {"min", minutes, 1}, "minutes": {"min", minutes, 1},
	"%": {"%", ratio, 0.01},
	"-": {"", noQuantity, 1}, "": {"", noQuantity, 1},
}

// foreign are spellings that are units beyond doubt, and none of the above: a
// heading that names one must not be read in the default unit instead.
var foreign = spellingSet(`t te ton tons tonne tonnes kg kgf lb lbs lbf kip kips klbf k
	ft feet foot in inch inches yd ' " kipft kft lbft kn/m knm/m n/mm2 n/mm² mpa kpa kn/m2 kn/m²
	tf tm tfm kgm`)

func spellingSet(list string) map[string]bool {
	set := map[string]bool{}
	for _, w := range strings.Fields(list) {
		set[w] = true
	}
	return set
}

// defaultUnit of a quantity, used where neither heading nor unit row names one.
func (q quantity) defaultUnit() unit {
	switch q {
	case length:
		return units["m"]
	case size:
		return unit{"mm", size, 1}
	case force:
		return units["kn"]
	case moment:
		return units["knm"]
	case stiffness:
		return units["knm/rad"]
	case minutes:
		return units["min"]
	default:
		return unit{"", q, 1}
	}
}

// names of the units that a quantity may be given in, for messages.
func (q quantity) unitNames() string {
	switch q {
	case length, size:
		return "m, cm or mm"
	case force:
		return "kN, N or MN"
	case moment:
		return "kNm, Nm or Nmm"
	case stiffness:
		return "kNm/rad or MNm/rad"
	case minutes:
		return "minutes"
	default:
		return "no unit"
	}
}

// unitFolder takes out what offices write between the parts of a unit.
var unitFolder = strings.NewReplacer(" ", "", "\u00a0", "", ".", "", "·", "", "⋅", "", "∙", "", "*", "", "×", "", "[", "", "]", "", "(", "", ")", "")

// findUnit reads a unit: "kN", "kN.m", "[kNm]". The second result tells
// whether it is one, the third whether it is a unit that is not read here.
func findUnit(s string) (u unit, known, strange bool) {
	folded := strings.ToLower(unitFolder.Replace(strings.TrimSpace(s)))
	if folded == "" {
		return unit{}, false, false
	}
	if u, ok := units[folded]; ok {
		return u, true, false
	}
	if u, ok := units[strings.ReplaceAll(folded, "-", "")]; ok && strings.ContainsAny(folded, "kmn") {
		return u, true, false // kN-m
	}
	return unit{}, false, foreign[folded]
}

// measures reports whether the unit can give the quantity.
func (u unit) measures(q quantity) bool {
	return u.of == q || u.of == length && q == size
}
