package design

import (
	"strconv"
	"strings"
)

// FoldName brings a mark, the name of a stack, group or combination into the
// form under which two of them are the same for people: lower case, single
// spaces.
func FoldName(name string) string { return strings.ToLower(strings.Join(strings.Fields(name), " ")) }

// FoldLevel is FoldName for a level, which may be a height: "+3.90", "3.9" and
// "3,90" are one.
func FoldLevel(name string) string {
	name = FoldName(name)
	if v, err := strconv.ParseFloat(strings.Replace(strings.TrimPrefix(name, "+"), ",", ".", 1), 64); err == nil {
		return strconv.FormatFloat(v, 'g', -1, 64)
	}
	return name
}

// LineOf tells column lines apart: lengths of one stack or, where none is given,
// of one mark may stand on each other.
func LineOf(stack, mark string) string {
	if stack != "" {
		return "stack " + FoldName(stack)
	}
	return "mark " + FoldName(mark)
}
