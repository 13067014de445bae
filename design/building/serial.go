package building

import (
	"regexp"
	"strconv"

	"stanchion/catalogue"
)

// serial is the serial size of a section, mm: its nominal depth and width.
type serial struct{ depth, width float64 }

var number = regexp.MustCompile(`[0-9]+(\.[0-9]+)?`)

// serialOf reads the serial size behind a section: both numbers of a British
// one (203x203), the number of a European one (HE 200) and the width of the
// section, or the section's own depth and width where it has none.
func serialOf(s *catalogue.Section) serial {
	var n []float64
	for _, text := range number.FindAllString(s.Nominal, 2) {
		v, err := strconv.ParseFloat(text, 64)
		if err != nil {
			break
		}
		n = append(n, v)
	}
	switch len(n) {
	case 2:
		return serial{n[0], n[1]}
	case 1:
		return serial{n[0], s.B}
	}
	return serial{s.H, s.B}
}

// mayStand reports whether a section may stand on another at a splice: it is
// neither heavier nor of a larger serial size.
func mayStand(below, above *catalogue.Section) bool {
	return mayStandIn([]*catalogue.Section{below, above})(0, 1)
}

// mayStandIn is mayStand for sections told by their place, whose names are read
// once.
func mayStandIn(sections []*catalogue.Section) func(below, above int) bool {
	serials := make([]serial, len(sections))
	for j, s := range sections {
		serials[j] = serialOf(s)
	}
	return func(below, above int) bool {
		b, a := serials[below], serials[above]
		return sections[above].Mass <= sections[below].Mass && a.depth <= b.depth && a.width <= b.width
	}
}
