package takeoff

import (
	"fmt"
	"iter"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/schedule"
)

// Find returns the section of a name that stands in a column's row.
type Find func(name string, col *design.Column) (*catalogue.Section, error)

// Members takes the members of a schedule with the sections that it says they
// have, those that cannot be counted apart.
func Members(members iter.Seq2[*schedule.Member, error], find Find, grades []string) (items []Item, leftOut []LeftOut, err error) {
	r := NewReader(find, grades)
	for m, err := range members {
		if err != nil {
			return nil, nil, err
		}
		it, why := r.Item(m)
		if why != "" {
			leftOut = append(leftOut, LeftOut{it.Name(), it.Cell, why})
			continue
		}
		items = append(items, it)
	}
	return items, leftOut, nil
}

// Reader finds which section a schedule says that a member has: that of its
// section column and, where it is blank, the one that an earlier run wrote.
type Reader struct {
	find   Find
	grades []string
	found  map[string]*catalogue.Section // by name and families
}

// NewReader returns a reader. grades are used where neither the row nor its
// results say one.
func NewReader(find Find, grades []string) *Reader {
	return &Reader{find: find, grades: grades, found: map[string]*catalogue.Section{}}
}

// Item returns a member as it is counted, or with no section and why.
func (r *Reader) Item(m *schedule.Member) (it Item, why string) {
	it = ItemOf(&m.Column, nil, "")
	if len(m.Problems) > 0 {
		return it, m.Problems[0].Message()
	}
	given, err := r.section(m.Column.Given, &m.Column)
	if err != nil {
		return it, err.Error()
	}
	earlier, err := r.section(m.Earlier.Section, &m.Column)
	if err != nil {
		return it, "result of an earlier run: " + err.Error()
	}
	switch {
	case given != nil:
		r.given(&it, m, given, earlier)
	case earlier == nil:
		return it, "it has no section: " + reasonOf(m.Earlier.Status, "size the schedule first, or give one")
	case decided(m.Earlier.Status):
		it.Section, it.Grade = earlier, m.Earlier.Grade
		it.Failing = m.Earlier.Status == design.Fails.String()
	default:
		return it, fmt.Sprintf("it has no section that passes: an earlier run found %q, and named %s as the nearest", m.Earlier.Status, earlier.Name())
	}
	r.grade(&it, &m.Column)
	return it, ""
}

func reasonOf(status, otherwise string) string {
	if status == "" {
		return otherwise
	}
	return fmt.Sprintf("an earlier run found %q", status)
}

// decided reports whether an earlier run settled on the section that it names:
// where none passes, it names the best tried.
func decided(status string) bool {
	return status == "" || status == design.Passes.String() || status == design.Fails.String()
}

// given takes the section of the schedule's own column. An earlier run's
// result counts for what it says of that same section.
func (r *Reader) given(it *Item, m *schedule.Member, given, earlier *catalogue.Section) {
	it.Section = given
	if earlier == given {
		it.Grade = m.Earlier.Grade
		it.Failing = m.Earlier.Status == design.Fails.String()
	} else if earlier != nil {
		it.Remark = fmt.Sprintf("%s stands in the schedule and %s in the results of an earlier run: %[1]s is counted", given.Name(), earlier.Name())
	}
}

// grade settles the grade: that of the result, of the row, of the settings.
func (r *Reader) grade(it *Item, col *design.Column) {
	if it.Grade != "" {
		return
	}
	open := col.Grades
	if len(open) == 0 {
		open = r.grades
	}
	if len(open) == 0 {
		return
	}
	it.Grade = open[0]
	if len(open) > 1 {
		it.Remark = strings.TrimPrefix(it.Remark+fmt.Sprintf("; the grade is open (%s): %s is counted", strings.Join(open, ", "), it.Grade), "; ")
	}
}

// section finds a section, remembering those found; nil for no name.
func (r *Reader) section(name string, col *design.Column) (*catalogue.Section, error) {
	if name == "" {
		return nil, nil
	}
	key := name + "\x1f" + strings.Join(col.Choice.Families, "\x1f")
	if s, ok := r.found[key]; ok {
		return s, nil
	}
	s, err := r.find(name, col)
	if err == nil {
		r.found[strings.Clone(key)] = s
	}
	return s, err
}
