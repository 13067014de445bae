package takeoff

import (
	"iter"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/schedule"
)

func membersOf(list ...schedule.Member) iter.Seq2[*schedule.Member, error] {
	return func(yield func(*schedule.Member, error) bool) {
		for i := range list {
			if !yield(&list[i], nil) {
				return
			}
		}
	}
}

func find(name string, _ *design.Column) (*catalogue.Section, error) {
	return catalogue.Default().Find(name, catalogue.FindOptions{})
}

func member(given, grade string, e schedule.Earlier) schedule.Member {
	m := schedule.Member{Column: design.Column{Mark: "C1", Quantity: 2, Length: 3000, Given: given, Cell: "Columns!A2"}, Earlier: e}
	if grade != "" {
		m.Column.Grades = []string{grade}
	}
	return m
}

func TestWhichSectionIsCounted(t *testing.T) {
	result := func(section, status string) schedule.Earlier {
		return schedule.Earlier{Section: section, Grade: "S275", Status: status}
	}
	for name, c := range map[string]struct {
		member         schedule.Member
		section, grade string // empty: left out
		failing        bool
		says           string
	}{
		"of the result":          {member("", "", result("HE 200 A", "passes")), "HE 200 A", "S275", false, ""},
		"of a result that fails": {member("HEA 200", "", result("HE 200 A", "fails")), "HE 200 A", "S275", true, ""},
		"given":                  {member("HE200A", "S460", schedule.Earlier{}), "HE 200 A", "S460", false, ""},
		"given, default grade":   {member("HE200A", "", schedule.Earlier{}), "HE 200 A", "S355", false, ""},
		"given since the run":    {member("HE 220 A", "", result("HE 200 A", "fails")), "HE 220 A", "S355", false, "HE 220 A stands in the schedule and HE 200 A in the results of an earlier run: HE 220 A is counted"},
		"none":                   {member("", "", schedule.Earlier{}), "", "", false, "it has no section: size the schedule first, or give one"},
		"none passes":            {member("", "", result("HE 200 A", "no section")), "", "", false, `it has no section that passes: an earlier run found "no section", and named HE 200 A as the nearest`},
		"not read":               {member("", "", result("", "not read")), "", "", false, `it has no section: an earlier run found "not read"`},
		"unknown":                {member("", "", result("HE 201 A", "passes")), "", "", false, "result of an earlier run: section \"HE 201 A\" is not in the catalogue"},
	} {
		t.Run(name, func(t *testing.T) {
			items, leftOut, err := Members(membersOf(c.member), find, []string{"S355"})
			require.NoError(t, err)
			if c.section == "" {
				require.Len(t, leftOut, 1)
				assert.Contains(t, leftOut[0].Why, c.says)
				assert.Equal(t, "Columns!A2", leftOut[0].Cell)
				return
			}
			require.Len(t, items, 1)
			it := items[0]
			assert.Equal(t, c.section, it.Section.Name())
			assert.Equal(t, c.grade, it.Grade)
			assert.Equal(t, c.failing, it.Failing)
			assert.Equal(t, c.says, it.Remark)
		})
	}
}

func TestOpenGradeIsSaid(t *testing.T) {
	m := member("HE 200 A", "", schedule.Earlier{})
	m.Column.Grades = []string{"S275", "S355"}
	items, _, err := Members(membersOf(m), find, nil)
	require.NoError(t, err)
	assert.Equal(t, "S275", items[0].Grade)
	assert.Equal(t, "the grade is open (S275, S355): S275 is counted", items[0].Remark)
}

func TestUnreadMembersAreLeftOut(t *testing.T) {
	m := member("HE 200 A", "", schedule.Earlier{})
	m.Problems = []*schedule.Problem{{What: `Length is "tbc"`, Do: "give a number in m"}}
	_, leftOut, err := Members(membersOf(m), find, nil)
	require.NoError(t, err)
	assert.Equal(t, []LeftOut{{"C1", "Columns!A2", `Length is "tbc": give a number in m`}}, leftOut)
}
