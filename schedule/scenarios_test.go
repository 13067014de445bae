package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestParseScenario(t *testing.T) {
	s, err := ParseScenario(" tubes : families = CHS, SHS; exclude=SHS 150x150x10; CHS 168.3x5; limit=0.95;")
	require.NoError(t, err)
	assert.Equal(t, "tubes", s.Name)
	where := `scenario "tubes"`
	assert.Equal(t, []Assignment{{"families", "CHS, SHS", where}, {"exclude", "SHS 150x150x10; CHS 168.3x5", where}, {"limit", "0.95", where}}, s.Settings)
	assert.Equal(t, "families CHS, SHS; exclude SHS 150x150x10; CHS 168.3x5; limit 0.95", s.Changes())
	for _, bad := range []string{"", "grade=S275", "a", "a:", ": grade=S275", "a: S275", "a=b: grade=S275", "a: =3"} {
		_, err := ParseScenario(bad)
		assert.Error(t, err, bad)
	}
}

func TestReadScenarios(t *testing.T) {
	src := sheetOf(plain)
	src.sheet("Scenarios", "Options to be priced\nNo. | Scenario | Grade | Limit\n | weak | S275 | \n | - | | \n | tight | S355 | #0.9")
	sheet, ok := ScenariosSheet(src)
	require.True(t, ok)
	list, err := ReadScenarios(src, sheet)
	require.NoError(t, err)
	require.Len(t, list, 2)
	assert.Equal(t, []Assignment{{"Grade", "S275", "Scenarios!C3"}}, list[0].Settings)
	assert.Equal(t, "Grade S355; Limit 0.9", list[1].Changes())

	for text, want := range map[string]string{
		"Name | Grade\na | S275":     "no scenario is found",
		"Scenario | Grade\n | S275":  "the scenario has no name",
		"Scenario | Grade\nweak | -": "no scenario is found",
	} {
		src := sheetOf(text)
		_, err := ReadScenarios(src, src.Sheets()[0])
		assert.ErrorContains(t, err, want, text)
	}
	assert.NoError(t, CheckScenarios(list))
	assert.Error(t, CheckScenarios([]Scenario{{Name: "As given"}}))
}

func FuzzParseScenario(f *testing.F) {
	for _, s := range []string{"a: b=c", "a: b=c; d; e=f", ":;=", "a: exclude=x;y"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		s, err := ParseScenario(text)
		if err == nil {
			require.NotEmpty(t, s.Name)
			require.NotEmpty(t, s.Settings)
		}
	})
}
