package revision

import (
	"strings"
	"unicode"

	"stanchion/design"
)

// identity is what makes a member the same in two issues, each part folded;
// empty where the issue says nothing.
type identity struct{ mark, stack, from, to string }

// parts says which parts of the identity both issues have.
type parts struct{ mark, stack, levels bool }

// identityOf returns the identity of a column, of the parts that count.
func identityOf(col *design.Column, p parts) identity {
	var id identity
	if p.mark {
		id.mark = markOf(col)
	}
	if p.stack {
		id.stack = design.FoldName(col.Stack)
	}
	if p.levels {
		id.from, id.to = design.FoldLevel(col.From), design.FoldLevel(col.To)
	}
	return id
}

// says reports whether the identity can tell a member from others: by its mark
// or by its place.
func (id identity) says() bool { return id.mark != "" || id.stack != "" && id.from+id.to != "" }

// markOf returns the mark, folded. A member without one is shown by its cell,
// which says nothing about another issue.
func markOf(col *design.Column) string {
	if col.Mark == col.Cell {
		return ""
	}
	return design.FoldName(col.Mark)
}

// commonParts finds which parts of the identity both issues have: a column that
// only one of them keeps tells nothing.
func commonParts(old, new []Member) parts {
	a, b := partsOf(old), partsOf(new)
	return parts{a.mark && b.mark, a.stack && b.stack, a.levels && b.levels}
}

func partsOf(members []Member) (p parts) {
	for i := range members {
		col := &members[i].Column
		p.mark = p.mark || markOf(col) != ""
		p.stack = p.stack || col.Stack != ""
		p.levels = p.levels || col.From+col.To != ""
	}
	return p
}

// ignored names the parts that only one issue has.
func ignored(old, new []Member) []string {
	a, b := partsOf(old), partsOf(new)
	var list []string
	for _, p := range []struct {
		name string
		a, b bool
	}{{"mark", a.mark, b.mark}, {"grid reference", a.stack, b.stack}, {"level", a.levels, b.levels}} {
		if p.a != p.b {
			list = append(list, p.name)
		}
	}
	return list
}

// bareMark takes out of a mark what people write differently: case, spaces,
// punctuation and zeros before a number. "C-01" and "c1" are bare alike.
func bareMark(mark string) string {
	var b strings.Builder
	number := false
	for _, r := range mark {
		digit := unicode.IsDigit(r)
		if digit && r == '0' && !number {
			continue // a zero before a number, or a number that is zero
		}
		number = digit
		if digit || unicode.IsLetter(r) {
			b.WriteRune(unicode.ToLower(r))
		}
	}
	return b.String()
}
