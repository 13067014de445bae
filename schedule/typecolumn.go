package schedule

import (
	"fmt"
	"slices"
	"strings"
)

// typeHeadings head the families of sections in some offices, and in others
// what kind of column it is: the values tell.
var typeHeadings = compactSet("type|column type|member type|typ|shape|section shape|column shape|type of section|type of column")

// isType reports whether a heading may be one of families by its values.
func (c *headerColumn) isType() bool {
	return slices.ContainsFunc(c.candidates(), func(s string) bool { return typeHeadings[compact(s)] })
}

// settleTypes reads the columns headed Type as families where all that they
// hold is families, and leaves them alone otherwise.
func (l *layout) settleTypes(src Source) error {
	if len(l.types) == 0 {
		return nil
	}
	var taken []Binding
	for i := range l.types {
		b := &l.types[i]
		seen := Seen{Cell: b.Cell, Heading: b.Heading}
		if l.has(familyField) {
			l.other = append(l.other, seen)
			continue
		}
		families, alien, err := l.familyValues(src, b.Col)
		switch {
		case err != nil:
			return err
		case families == 0:
			l.other = append(l.other, seen)
		case alien != "":
			seen.Why = fmt.Sprintf("it names section families and %q too: map it to Family if it is one", alien)
			l.left = append(l.left, seen)
		default:
			taken = append(taken, *b)
		}
	}
	if len(taken) > 1 {
		l.clashes = append(l.clashes, taken)
	}
	l.bindings = append(l.bindings, taken...)
	slices.SortStableFunc(l.bindings, func(a, b Binding) int { return a.Col - b.Col })
	return nil
}

// familyValues goes through the members' cells of a column: how many different
// texts name families, and the first that does not.
func (l *layout) familyValues(src Source, col int) (families int, alien string, err error) {
	known := map[string]bool{}
	classes, skip := newClassifier(l), l.skipTo
	for r, err := range src.Rows(l.sheet) {
		if err != nil {
			return 0, "", err
		}
		if r.Number == skip+1 && (l.isUnitRow(r) || isNumbering(r)) {
			skip = r.Number
		}
		cell := r.at(col)
		if r.Number <= skip || cell.empty() || classes.kind(r) != memberRow {
			continue
		}
		text := cell.text()
		if known[text] {
			continue
		}
		if _, err := parseFamilies(text); err == nil && cell.Kind == Text {
			known[strings.Clone(text)] = true
		} else if alien == "" {
			alien = strings.Clone(text)
		}
		if alien != "" && len(known) > 0 {
			break
		}
	}
	return len(known), alien, nil
}
