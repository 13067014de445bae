package schedule

import (
	"fmt"
	"sort"
	"strings"
)

// mapping holds the user's own headers and the fields that they stand for.
type mapping struct {
	entries map[string]*mapEntry // by the compact heading
}

type mapEntry struct {
	heading string // as the user wrote it
	where   string
	meaning *meaning
	ignore  bool
	used    bool
}

// ignored says in a mapping that a column is to be left alone.
const ignored = "ignore"

// add takes one mapping: a heading and the field it stands for, or "ignore".
func (m *mapping) add(a Assignment) error {
	heading, field := strings.TrimSpace(a.Name), strings.TrimSpace(a.Value)
	e := &mapEntry{heading: heading, where: a.Where}
	if strings.EqualFold(field, ignored) {
		e.ignore = true
	} else {
		e.meaning = readHeading(field)
		if len(e.meaning.keys) == 0 || e.meaning.trouble != "" {
			return fmt.Errorf("%q is not a field: give one of %s, or %s", field, fieldList(), ignored)
		}
		e.meaning.exact = true
	}
	if m.entries == nil {
		m.entries = map[string]*mapEntry{}
	}
	m.entries[compact(heading)] = e
	return nil
}

// find returns the mapping of a heading; nil where there is none.
func (m *mapping) find(heading string) *mapEntry {
	if len(m.entries) == 0 {
		return nil
	}
	if e := m.entries[compact(heading)]; e != nil {
		return e
	}
	bare, _, _ := splitUnit(tidy(heading))
	return m.entries[compact(bare)]
}

// unused returns the headings that no column has, in order.
func (m *mapping) unused() []*mapEntry {
	var list []*mapEntry
	for _, e := range m.entries {
		if !e.used {
			list = append(list, e)
		}
	}
	sort.Slice(list, func(i, j int) bool { return list[i].heading < list[j].heading })
	return list
}

// fieldList names the fields, as a mapping spells them.
func fieldList() string {
	var names []string
	for _, f := range Fields() {
		names = append(names, f.Name)
	}
	return strings.Join(names, ", ")
}

// FieldInfo describes one field of the schedule, for people and for an empty
// schedule.
type FieldInfo struct {
	Name      string   // the heading under which the program knows it without doubt
	Unit      string   // default; empty: none
	Needed    bool     // a schedule without it is refused
	Spellings []string // other headings that name it
	Meaning   string   // one line
	Allowed   []string // values, where there are few
}
