package revision

import (
	"iter"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/takeoff"
)

// Issue is one issue of a schedule.
type Issue struct {
	File    string
	Members []Member
}

// Member is one member of an issue.
type Member struct {
	Column   design.Column
	Rows     []int // of the sheet; the results stand in the first
	Problems []*schedule.Problem

	Section *catalogue.Section // that it has: given, or of an earlier run; nil: none
	Grade   string
	Why     string // why it has no section
	Sized   bool   // the issue gives no section: it was sized for the comparison
}

// Readable reports whether the member can be designed.
func (m *Member) Readable() bool { return len(m.Problems) == 0 }

// Name names the member for people: mark, stack and levels.
func (m *Member) Name() string { return m.item().Name() }

// Level names the levels between which the member stands.
func (m *Member) Level() string { return LevelOf(&m.Column) }

// LevelOf names the levels between which a column stands: "L1 to L2".
func LevelOf(col *design.Column) string { return takeoff.LevelName(col.From, col.To) }

// SectionName returns the section with its grade, for people; empty: none.
func (m *Member) SectionName() string { return sectionName(m.Section, m.Grade) }

func sectionName(s *catalogue.Section, grade string) string {
	if s == nil {
		return ""
	}
	return strings.TrimSpace(s.Name() + " " + grade)
}

// item is the member as the take-off counts it.
func (m *Member) item() *takeoff.Item {
	it := takeoff.ItemOf(&m.Column, m.Section, m.Grade)
	return &it
}

// Read reads the members of an issue with the sections that they have.
func Read(members iter.Seq2[*schedule.Member, error], find takeoff.Find, grades []string) ([]Member, error) {
	reader := takeoff.NewReader(find, grades)
	var list []Member
	for m, err := range members {
		if err != nil {
			return nil, err
		}
		it, why := reader.Item(m)
		list = append(list, Member{Column: m.Column, Rows: m.Rows, Problems: m.Problems, Section: it.Section, Grade: it.Grade, Why: why})
	}
	return list, nil
}
