package schedule

import (
	"fmt"
	"strings"
)

// groupScan gathers which family and grade the members of each group have: a
// group has one of each.
type groupScan struct {
	group, family, grade int // columns; -1: none
	texts                []string
	index                map[string]uint32
	rows                 []groupRow // one a row of a member; empty without a group column
}

// groupRow holds indices into texts; 0 stands for a blank.
type groupRow struct{ group, family, grade uint32 }

func newGroupScan(l *layout) *groupScan {
	g := &groupScan{group: -1, family: -1, grade: -1, texts: []string{""}, index: map[string]uint32{"": 0}}
	for i := range l.bindings {
		switch b := &l.bindings[i]; b.key.field {
		case groupField:
			g.group = b.Col
		case familyField:
			g.family = b.Col
		case gradeField:
			g.grade = b.Col
		}
	}
	return g
}

func (g *groupScan) add(r *Row) {
	if g.group >= 0 {
		g.rows = append(g.rows, groupRow{g.number(r, g.group), g.number(r, g.family), g.number(r, g.grade)})
	}
}

func (g *groupScan) number(r *Row, col int) uint32 {
	cell := r.at(col)
	if cell.empty() {
		return 0
	}
	text := cell.text()
	folded := foldName(text)
	if n, ok := g.index[folded]; ok {
		return n
	}
	n := uint32(len(g.texts))
	g.texts = append(g.texts, strings.Clone(text))
	g.index[strings.Clone(folded)] = n
	return n
}

// groupClashes says, by the first row of a member, why its group is not one.
type groupClashes map[int32]string

// clashes finds the groups with several families or grades. rowWord is what the
// source calls its rows.
func (g *groupScan) clashes(links *rowLinks, set *Settings, rowWord string) groupClashes {
	if len(g.rows) == 0 {
		return nil
	}
	families := g.resolve(sameFamilies(set.Design.Families), func(s string) string {
		list, err := parseFamilies(s)
		if err != nil {
			return strings.ToUpper(s)
		}
		return sameFamilies(list)
	})
	grades := g.resolve(strings.Join(set.Design.Grades, " "), func(s string) string {
		if name, err := parseGrade(strengthName(s)); err == nil {
			return name
		}
		return strings.ToUpper(s)
	})
	found := groupClashes{}
	g.compare(links, "family", rowWord, families, func(r groupRow) uint32 { return r.family }, found)
	g.compare(links, "grade", rowWord, grades, func(r groupRow) uint32 { return r.grade }, found)
	return found
}

// resolve brings the texts into the form in which two of them are compared.
func (g *groupScan) resolve(blank string, canonical func(string) string) []string {
	list := make([]string, len(g.texts))
	for i, t := range g.texts {
		list[i] = canonical(t)
	}
	list[0] = blank
	return list
}

// member joins the rows of one member: what the first of them says that says
// anything.
func (g *groupScan) member(links *rowLinks, first int32) groupRow {
	m := g.rows[first]
	for i := links.next[first]; i >= 0; i = links.next[i] {
		r := g.rows[i]
		if m.group == 0 {
			m.group = r.group
		}
		if m.family == 0 {
			m.family = r.family
		}
		if m.grade == 0 {
			m.grade = r.grade
		}
	}
	return m
}

// compare finds the groups whose members differ in one value.
func (g *groupScan) compare(links *rowLinks, what, rowWord string, values []string, of func(groupRow) uint32, found groupClashes) {
	first := map[uint32]string{}
	mixed := map[uint32]*groupValues{}
	g.members(links, func(i int32, m groupRow) {
		v, ok := first[m.group]
		if !ok {
			first[m.group] = values[of(m)]
		} else if v != values[of(m)] {
			mixed[m.group] = &groupValues{word: rowWord}
		}
	})
	if len(mixed) == 0 {
		return
	}
	g.members(links, func(i int32, m groupRow) {
		if mix := mixed[m.group]; mix != nil {
			mix.add(values[of(m)], int(links.refs[i].number))
		}
	})
	g.members(links, func(i int32, m groupRow) {
		if mix := mixed[m.group]; mix != nil && found[i] == "" {
			found[i] = fmt.Sprintf("group %q has more than one %s: %s", g.texts[m.group], what, mix)
		}
	})
}

// members calls f for each member that is in a group.
func (g *groupScan) members(links *rowLinks, f func(int32, groupRow)) {
	for i := range g.rows {
		if links.later[i] {
			continue
		}
		if m := g.member(links, int32(i)); m.group != 0 {
			f(int32(i), m)
		}
	}
}

// groupValues lists the values within a group and the rows that have them.
type groupValues struct {
	word  string
	names []string
	rows  [][]int
	text  string
}

// maxNamed is how many rows a message names before it counts the others.
const maxNamed = 12

func (v *groupValues) add(name string, row int) {
	for i := range v.names {
		if v.names[i] == name {
			v.rows[i] = append(v.rows[i], row)
			return
		}
	}
	v.names, v.rows = append(v.names, name), append(v.rows, []int{row})
}

// String returns `UKC in rows 5, 6, 7; SHS in row 9`.
func (v *groupValues) String() string {
	if v.text != "" {
		return v.text
	}
	var parts []string
	for i, name := range v.names {
		parts = append(parts, name+" in "+rowList(v.word, v.rows[i]))
	}
	v.text = strings.Join(parts, "; ")
	return v.text
}

// rowList returns "row 5", or "rows 5, 6, 7 and 40 more"; "lines" by that word.
func rowList(word string, rows []int) string {
	if len(rows) == 1 {
		return fmt.Sprintf("%s %d", word, rows[0])
	}
	s := strings.Trim(strings.Join(strings.Fields(fmt.Sprint(rows[:min(len(rows), maxNamed)])), ", "), "[]")
	if more := len(rows) - maxNamed; more > 0 {
		s += fmt.Sprintf(" and %d more", more)
	}
	return word + "s " + s
}
