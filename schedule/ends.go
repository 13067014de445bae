package schedule

import (
	"fmt"
	"regexp"
	"strings"

	"stanchion/design"
)

// conditions by the words that offices use, folded: lower case, letters only.
var conditions = conditionWords(map[design.Condition]string{
	design.Pinned:       "pinned pin p hinged hinge simple simply nominallypinned gelenkig",
	design.PartlyFixed:  "partlyfixed partiallyfixed partialfixed partfixed partial semirigid pf",
	design.Fixed:        "fixed fix f fullyfixed rigid encastre builtin eingespannt",
	design.Guided:       "guided fixedsway swayfixed",
	design.PartlyGuided: "partlyguided partiallyguided partguided",
	design.Free:         "free frei",
})

func conditionWords(by map[design.Condition]string) map[string]design.Condition {
	words := map[string]design.Condition{}
	for c, list := range by {
		for _, w := range strings.Fields(list) {
			words[w] = c
		}
	}
	return words
}

var (
	partlyGap = regexp.MustCompile(`(?i)\b(part(?:ly|ially)?|partial|semi|fully|nominally|built)[\s-]+(fixed|guided|rigid|pinned|in)\b`)
	endMark   = regexp.MustCompile(`(?i)\b(top|bottom|base|btm|upper|lower)\b`)
	idleWords = regexp.MustCompile(`\b(?:at|the|end|ends|both|support|supported|is)\b`)
	endsSplit = regexp.MustCompile(`[-–—/,;+&|\n]|\bto\b|\band\b`)
)

// parseEnds reads the conditions of the two ends, bottom first:
// "pinned-pinned", "fixed / pinned", "partly fixed" (both), "fixed-free",
// "top pinned, bottom fixed".
func parseEnds(s string) (bottom, top design.Condition, err error) {
	folded := partlyGap.ReplaceAllString(strings.ToLower(s), "$1$2")
	if folded == "cantilever" {
		return design.Fixed, design.Free, nil
	}
	var parts []string
	split := endsSplit.Split(folded, -1)
	for _, p := range split {
		if p = strings.TrimFunc(p, isSpace); p != "" {
			parts = append(parts, p)
		}
	}
	if len(parts) == 1 && len(split) == 1 {
		if c, err := parseCondition(parts[0]); err == nil {
			if c.Sways() {
				return 0, 0, fmt.Errorf("%q says nothing of the end that is held", s)
			}
			return c, c, nil
		}
		parts = strings.Fields(parts[0]) // "fixed pinned"
	}
	if len(parts) != 2 {
		return 0, 0, fmt.Errorf("%q does not name two ends", s)
	}
	if isTop(parts[0]) || isBottom(parts[1]) {
		parts[0], parts[1] = parts[1], parts[0]
	}
	if isTop(parts[0]) || isBottom(parts[1]) {
		return 0, 0, fmt.Errorf("%q names one end twice", s)
	}
	if bottom, err = parseCondition(parts[0]); err != nil {
		return 0, 0, err
	}
	top, err = parseCondition(parts[1])
	return bottom, top, err
}

func isTop(part string) bool { return oneOf(endMark.FindString(part), "top", "upper") }
func isBottom(part string) bool {
	return oneOf(endMark.FindString(part), "bottom", "base", "btm", "lower")
}

func oneOf(s string, words ...string) bool {
	for _, w := range words {
		if s == w {
			return true
		}
	}
	return false
}

// parseCondition reads the condition of one end.
func parseCondition(s string) (design.Condition, error) {
	word := strings.Map(func(r rune) rune {
		if r >= 'a' && r <= 'z' {
			return r
		}
		if r == 'é' || r == 'è' {
			return 'e'
		}
		return -1
	}, idleWords.ReplaceAllString(endMark.ReplaceAllString(strings.ToLower(s), ""), ""))
	if c, ok := conditions[word]; ok {
		return c, nil
	}
	return 0, fmt.Errorf("%q is not an end condition", strings.TrimFunc(s, isSpace))
}
