package schedule

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"slices"
	"strconv"
	"strings"
)

// height is one height of a restraint list: mm from the bottom, or a fraction
// of the length.
type height struct {
	mm       float64
	fraction bool
	every    bool // mm is a spacing, repeated up the length
}

// namedHeights are the words of the notation, as fractions of the length.
var namedHeights = map[string][]float64{
	"mid": {1. / 2}, "middle": {1. / 2}, "midheight": {1. / 2}, "midpoint": {1. / 2}, "midspan": {1. / 2}, "midlength": {1. / 2},
	"half": {1. / 2}, "halves": {1. / 2}, "centre": {1. / 2}, "center": {1. / 2},
	"thirds": {1. / 3, 2. / 3}, "thirdpoints": {1. / 3, 2. / 3},
	"quarters": {1. / 4, 2. / 4, 3. / 4}, "quarterpoints": {1. / 4, 2. / 4, 3. / 4},
	"fifths": {1. / 5, 2. / 5, 3. / 5, 4. / 5}, "fifthpoints": {1. / 5, 2. / 5, 3. / 5, 4. / 5},
	"½": {1. / 2}, "⅓": {1. / 3}, "⅔": {2. / 3}, "¼": {1. / 4}, "¾": {3. / 4},
	"none": {}, "no": {}, "ends": {}, "endsonly": {}, "top": {}, "bottom": {}, "base": {}, "topandbottom": {},
}

var (
	wordGaps    = regexp.MustCompile(`(?i)\b(mid|middle|third|quarter|fifth|ends|top)[ -]+(height|point|points|span|length|only)\b`)
	everyNumber = regexp.MustCompile(`(?i)(?:\bevery\b|@)\s*(\d+[.,]\d+)\s*(?:m|mm)?\s*$`)
	everyWord   = regexp.MustCompile(`(?i)(?:\bevery\b|@)\s*`)
	centres     = regexp.MustCompile(`(?i)^(.*?)\s*(?:c/c|crs|centres|centers)\.?$`)
	fraction    = regexp.MustCompile(`^(\d{1,3})\s*[/⁄]\s*(\d{1,3})(?:\s*(?:of\s*)?[LlHh])?$`)
	lengthOf    = regexp.MustCompile(`^(\d{0,3})\s*[LH]\s*[/⁄]\s*(\d{1,3})$`) // L/2, 2L/3
	partOf      = regexp.MustCompile(`^(.*\d)\s*(?:[LH]|%)$`)                 // 0.5L, 50 %
	grouped     = regexp.MustCompile(`(?:^|[^\d.,])\d{1,3},\d{3}(?:[^\d]|$)`)
	commaGap    = regexp.MustCompile(`,\s+|,$`)
	loneUnit    = regexp.MustCompile(`(?i)(\d)\s+(mm|cm|m)\b`)
	loneLen     = regexp.MustCompile(`(\d)\s+([LH%])`)
)

// parseRestraints reads a list of heights: "2.5; 5.0", "2500 mm", "1/2",
// "1/3 2/3", "mid", "thirds", "quarters", "every 1.5". A comma separates
// values unless it is the decimal mark. Heights without a unit are in u, or in
// the unit of the last of the list where that alone has one.
func parseRestraints(s string, decimal byte, u unit) ([]height, error) {
	if decimal != ',' && grouped.MatchString(s) {
		return nil, fmt.Errorf("%q can be read as thousands or as two heights: part heights with a semicolon", s)
	}
	var list []height
	var bare []int // heights still waiting for a unit
	for _, item := range splitHeights(s, decimal) {
		hs, own, err := parseHeight(item, decimal, u)
		if err != nil {
			return nil, err
		}
		if own != nil && len(bare) == len(list) && len(hs) == 1 && !hs[0].fraction {
			for _, i := range bare {
				list[i].mm *= own.factor / u.factor
			}
			bare = nil
		} else if own == nil && len(hs) == 1 && !hs[0].fraction {
			bare = append(bare, len(list))
		}
		list = append(list, hs...)
	}
	return list, nil
}

// splitHeights parts a list into its items.
func splitHeights(s string, decimal byte) []string {
	s = commaGap.ReplaceAllString(s, "; ") // no number holds a comma and a space
	s = wordGaps.ReplaceAllString(s, "$1$2")
	s = everyWord.ReplaceAllString(s, " @")
	s = loneUnit.ReplaceAllString(s, "$1$2")
	s = loneLen.ReplaceAllString(s, "$1$2")
	if m := centres.FindStringSubmatch(s); m != nil && strings.Count(m[1], "@") == 0 {
		return []string{"@" + strings.TrimSpace(strings.TrimPrefix(m[1], "at "))}
	}
	s = centres.ReplaceAllString(s, "$1")
	return strings.FieldsFunc(joinFractions(s), func(r rune) bool {
		return r == ';' || r == '&' || r == '+' || r == '|' || isSpace(r) || r == ',' && decimal != ','
	})
}

var (
	gapsInFraction = regexp.MustCompile(`(\d)\s*([/⁄])\s*(\d)`)
	andWord        = regexp.MustCompile(`(?i)\band\b`)
)

func joinFractions(s string) string {
	return andWord.ReplaceAllString(gapsInFraction.ReplaceAllString(s, "$1$2$3"), ";")
}

// parseHeight reads one item, and returns its own unit where it names one.
func parseHeight(item string, decimal byte, u unit) ([]height, *unit, error) {
	if fs, ok := namedHeights[strings.ToLower(strings.ReplaceAll(item, "-", ""))]; ok {
		hs := make([]height, len(fs))
		for i, f := range fs {
			hs[i] = height{mm: f, fraction: true}
		}
		return hs, nil, nil
	}
	if m := fraction.FindStringSubmatch(item); m != nil {
		return fractionHeight(item, m[1], m[2])
	}
	if m := lengthOf.FindStringSubmatch(item); m != nil {
		if m[1] == "" {
			m[1] = "1"
		}
		return fractionHeight(item, m[1], m[2])
	}
	if m := partOf.FindStringSubmatch(item); m != nil {
		f, rest, err := splitNumber(m[1], decimal)
		if err != nil || rest != "" {
			return nil, nil, notHeight(item)
		}
		if strings.HasSuffix(item, "%") {
			f /= 100
		}
		return []height{{mm: f, fraction: true}}, nil, nil
	}
	text, every := strings.CutPrefix(item, "@")
	x, rest, err := splitNumber(text, decimal)
	if err != nil {
		return nil, nil, notHeight(item)
	}
	if rest == "" {
		return []height{{mm: x * u.factor, every: every}}, nil, nil
	}
	own, known, _ := findUnit(rest)
	if !known || own.of != length {
		return nil, nil, notHeight(item)
	}
	return []height{{mm: x * own.factor, every: every}}, &own, nil
}

func fractionHeight(item, over, under string) ([]height, *unit, error) {
	a, _ := strconv.Atoi(over)
	b, _ := strconv.Atoi(under)
	if a <= 0 || a >= b {
		return nil, nil, fmt.Errorf("%q is not a fraction of the length between 0 and 1", item)
	}
	return []height{{mm: float64(a) / float64(b), fraction: true}}, nil, nil
}

func notHeight(item string) error {
	return fmt.Errorf("%q is not a height", strings.TrimPrefix(item, "@"))
}

// heightTolerance is how near two heights, or a height and an end, are taken
// as one, in mm: schedules give heights to the mm at best.
const heightTolerance = 0.5

// maxRestraints is more than any column has; beyond it the spacing is in the
// wrong unit.
const maxRestraints = 200

// resolveHeights turns a list into heights strictly between the ends of a
// length L, rising, in mm. notes says what was done to it. A height outside
// the length, one that stands twice, or a list out of order twice is an error.
func resolveHeights(list []height, L float64) (heights []float64, notes []string, err error) {
	for _, h := range list {
		if h.every {
			if heights, err = appendEvery(heights, h.mm, L); err != nil {
				return nil, nil, err
			}
			continue
		}
		x := h.mm
		if h.fraction {
			x *= L
		}
		if x < -heightTolerance || x > L+heightTolerance || math.IsNaN(x) {
			return nil, nil, outside(x, L)
		}
		if x < heightTolerance || x > L-heightTolerance {
			notes = append(notes, fmt.Sprintf("the height %s m is an end, which its end condition describes", metres(x)))
			continue
		}
		heights = append(heights, x)
	}
	falls := 0
	for i := 1; i < len(heights); i++ {
		if heights[i] < heights[i-1]-heightTolerance {
			falls++
		}
	}
	if falls > 1 {
		return nil, nil, errors.New("the heights are out of order twice")
	}
	if falls == 1 {
		notes = append(notes, "the heights were put in order")
		slices.Sort(heights)
	}
	for i := 1; i < len(heights); i++ {
		if heights[i]-heights[i-1] < heightTolerance {
			return nil, nil, fmt.Errorf("the height %s m stands twice", metres(heights[i]))
		}
	}
	return heights, notes, nil
}

func outside(x, L float64) error {
	hint := ""
	if x > maxLength && x/1000 < L {
		hint = fmt.Sprintf(" (if it is in mm, write %s mm)", metres(x))
	}
	return fmt.Errorf("the height %s m is outside the length %s m%s", metres(x), metres(L), hint)
}

func appendEvery(heights []float64, spacing, L float64) ([]float64, error) {
	switch {
	case !(spacing > heightTolerance):
		return nil, fmt.Errorf("every %s m is not a spacing", metres(spacing))
	case spacing > L+heightTolerance:
		return nil, fmt.Errorf("every %s m is outside the length %s m", metres(spacing), metres(L))
	case L/spacing > maxRestraints:
		return nil, fmt.Errorf("every %s m gives more than %d restraints", metres(spacing), maxRestraints)
	}
	for i := 1; float64(i)*spacing < L-heightTolerance; i++ {
		heights = append(heights, float64(i)*spacing)
	}
	return heights, nil
}

// metres formats mm as metres, to the mm, without needless zeros.
func metres(mm float64) string {
	return strconv.FormatFloat(math.Round(mm)/1000, 'f', -1, 64)
}
