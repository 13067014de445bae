package schedule

import (
	"regexp"
	"strings"
)

// meaning is what one heading says.
type meaning struct {
	keys        []key
	exact       bool    // names the fields; otherwise it suggests them
	combination string  // named beside the field
	above       *height // force in the part above this height
	unit        *unit   // named in the heading
	vetoed      bool    // speaks of a field, and of values that are not design values
	unclear     string  // may speak of this field, and is not understood
	trouble     string  // it speaks of a field, and cannot be read as it stands
	remedy      string
}

func (m *meaning) rank() int {
	switch {
	case m == nil || len(m.keys) == 0:
		return 0
	case m.exact:
		return 2
	default:
		return 1
	}
}

var aboveHeight = regexp.MustCompile(`(?i)\babove\s+(\d+(?:[.,]\d+)?(?:\s*(?:mm|cm|m)\b)?|\d\s*/\s*\d|mid(?:[ -]?height)?)`)

// readHeading finds what a heading means. A heading that speaks of no field
// has neither keys nor trouble.
func readHeading(text string) *meaning {
	m := &meaning{}
	rest := tidy(text)
	if !speaks(rest) {
		return m // most cells of a sheet: spare them the expressions below
	}
	rest = yesNo.ReplaceAllString(rest, "")
	if at := aboveHeight.FindStringSubmatchIndex(rest); at != nil {
		if m.above = readAbove(rest[at[2]:at[3]]); m.above != nil {
			rest = rest[:at[0]] + rest[at[1]:]
		}
	}
	bare, u, odd := splitUnit(rest)
	parsePhrase(bare).resolve(m)
	if m.above != nil && (len(m.keys) == 0 || m.keys[0].line().needs&perHeight == 0) {
		*m = meaning{}
	}
	if len(m.keys) > 0 && m.trouble == "" {
		m.setUnit(u, odd)
	}
	return m
}

// speaks reports whether any word of a text is one of the vocabulary's nouns.
func speaks(text string) bool { return len(parsePhrase(text).nouns) > 0 }

func readAbove(s string) *height {
	hs, err := parseRestraints(strings.ReplaceAll(s, ",", "."), '.', length.defaultUnit())
	if err != nil || len(hs) != 1 {
		return nil
	}
	return &hs[0]
}

// setUnit takes the unit that the heading names, or says why it is no unit of
// the field.
func (m *meaning) setUnit(u *unit, odd string) {
	q := m.keys[0].line().of
	switch {
	case odd != "" && q > count:
		m.trouble = "the unit " + odd + " is not read for " + m.keys[0].String()
	case u == nil || u.of == noQuantity || q <= count && u.of != ratio:
	case u.measures(q):
		m.unit = u
	default:
		m.trouble = u.name + " is not a unit of " + m.keys[0].String()
	}
	if m.trouble != "" {
		m.remedy = "give it in " + q.unitNames()
	}
}

var (
	brackets  = regexp.MustCompile(`[(\[]\s*([^()\[\]]*?)\s*[)\]]`)
	trailing  = regexp.MustCompile(`(?i)^(.*?\S)(?:\s*[,/_]\s*|\s+in\s+|\s+)(kN[ .·*-]?m/rad|MN[ .·*-]?m/rad|N[ .·*-]?mm/rad|kN[ .·*-]?m|MN[ .·*-]?m|N[ .·*-]?mm|N[ .·*-]?m|kN|MN|mm|cm|m)$`)
	inside    = regexp.MustCompile(`(?i)[\s,/_](kNm|kN|MNm|MN|mm)[\s,/_]`)
	yesNo     = regexp.MustCompile(`(?i)[(\[]\s*y(?:es)?\s*/\s*no?\s*[)\]]`)
	trailingN = regexp.MustCompile(`^(.*?\S)(?:\s*[,/]\s*|\s+in\s+)(N|min)$`)
)

// splitUnit takes the unit out of a heading: in brackets, or behind a comma, a
// stroke, "in", a space or an underscore. odd is a unit that is not read here.
func splitUnit(s string) (rest string, u *unit, odd string) {
	for _, at := range brackets.FindAllStringSubmatchIndex(s, -1) {
		text := s[at[2]:at[3]]
		first, _, _ := strings.Cut(text, ",")
		known, ok, strange := findUnit(text)
		if !ok && !strange {
			known, ok, strange = findUnit(first) // (kN, ULS)
		}
		switch {
		case ok:
			return s[:at[0]] + " " + s[at[1]:], &known, ""
		case strange:
			return s[:at[0]] + " " + s[at[1]:], nil, text
		}
	}
	for _, re := range []*regexp.Regexp{trailing, trailingN} {
		if at := re.FindStringSubmatch(s); at != nil {
			if known, ok, _ := findUnit(at[2]); ok {
				return at[1], &known, ""
			}
		}
	}
	if at := inside.FindStringSubmatchIndex(s); at != nil && at[0] > 0 {
		if known, ok, _ := findUnit(s[at[2]:at[3]]); ok {
			return s[:at[2]] + s[at[3]:], &known, ""
		}
	}
	return s, nil, ""
}
