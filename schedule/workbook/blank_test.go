package workbook

import (
	"bytes"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"github.com/xuri/excelize/v2"

	"stanchion/design/ec3"
	"stanchion/schedule"
)

func someBlank() *Blank {
	return &Blank{
		Fields: UsualFields(schedule.Fields()), Known: schedule.Fields(), Settings: schedule.SettingInfos(), Rows: 40,
		Lists: map[string][]string{"Grade": {"S275", "S355", "S460"}, "Family": {"UKC", "UKB", "SHS"}},
	}
}

func blankBytes(t testing.TB, b *Blank) []byte {
	t.Helper()
	var out bytes.Buffer
	require.NoError(t, b.Write(&out))
	return out.Bytes()
}

// filledIn types a first row into an empty schedule.
func filledIn(t testing.TB, data []byte, values map[string]any) []byte {
	t.Helper()
	f, err := excelize.OpenReader(bytes.NewReader(data))
	require.NoError(t, err)
	rows, err := f.GetRows(blankSheet)
	require.NoError(t, err)
	for c, name := range rows[blankHeading-1] {
		if v, ok := values[name]; ok {
			require.NoError(t, f.SetCellValue(blankSheet, cellName(c, blankFirst), v))
		}
	}
	return packed(t, f)
}

func TestEmptyScheduleIsReadOnceFilledIn(t *testing.T) {
	data := filledIn(t, blankBytes(t, someBlank()), map[string]any{
		"Mark": "C1", "Length": 4.2, "N_Ed": 1200, "Ends y-y": "fixed-pinned", "Restraints z-z": "mid", "Grade": "S275", "Splice": "yes",
	})
	b, err := OpenBytes("blank.xlsx", data)
	require.NoError(t, err)
	defer b.Close()
	plan, err := schedule.Read(b, schedule.Options{National: ec3.NationalSet})
	require.NoError(t, err)
	assert.Equal(t, blankSheet, plan.Sheet)
	assert.Empty(t, plan.Plan.Summary.LeftAlone)
	assert.Empty(t, plan.Plan.Summary.Notes)
	assert.Equal(t, blankHeading, plan.Header.Last)
	assert.Equal(t, blankUnit, plan.Header.UnitRow)
	require.Len(t, plan.Header.Columns, len(someBlank().Fields), "every heading is known")
	for i, c := range plan.Header.Columns {
		assert.Equal(t, someBlank().Fields[i].Name, c.Heading)
	}
	require.Len(t, plan.Members, 1)
	m := plan.Members[0]
	require.Empty(t, m.Problems)
	assert.Equal(t, 4200.0, m.Column.Length)
	assert.Equal(t, 1.2e6, m.Column.Combinations[0].NEd)
	assert.Equal(t, []float64{2100}, m.Column.Z.Restraints)
	assert.Equal(t, []string{"S275"}, m.Column.Grades)
	assert.True(t, m.Column.Splice)
}

func TestEmptyScheduleWithEveryField(t *testing.T) {
	all := someBlank()
	all.Fields = nil
	for _, f := range all.Known {
		if f.Name != "Level" { // beside Level from and Level to it says nothing new
			all.Fields = append(all.Fields, f)
		}
	}
	b, err := OpenBytes("blank.xlsx", filledIn(t, blankBytes(t, all), map[string]any{"Mark": "C1", "Length": 4.2, "N_Ed": 1200}))
	require.NoError(t, err)
	defer b.Close()
	plan, err := schedule.Read(b, schedule.Options{National: ec3.NationalSet})
	require.NoError(t, err)
	assert.Len(t, plan.Header.Columns, len(all.Fields))
	require.Len(t, plan.Members, 1)
	assert.Empty(t, plan.Members[0].Problems)
}

func TestEmptyScheduleGuidesThePerson(t *testing.T) {
	data := blankBytes(t, someBlank())
	assert.True(t, bytes.Equal(data, blankBytes(t, someBlank())), "the same bytes each time")
	f, err := excelize.OpenReader(bytes.NewReader(data))
	require.NoError(t, err)
	assert.Equal(t, []string{"Columns", "Settings", "Notes", "Lists"}, f.GetSheetList())
	validations, err := f.GetDataValidations(blankSheet)
	require.NoError(t, err)
	lists := map[string]string{}
	for _, v := range validations {
		if v.PromptTitle != nil && v.Formula1 != "" {
			lists[*v.PromptTitle] = v.Formula1
		}
	}
	assert.Contains(t, lists["Ends z-z"], "fixed-pinned")
	assert.Equal(t, "'Lists'!$B$2:$B$4", lists["Grade"])
	notes, err := f.GetComments(blankSheet)
	require.NoError(t, err)
	assert.Len(t, notes, len(someBlank().Fields), "every heading is explained")
	props, err := f.GetDocProps()
	require.NoError(t, err)
	assert.Equal(t, "stanchion", props.Creator)
}

func TestEmptyScheduleOpensInAnotherProgram(t *testing.T) {
	data := blankBytes(t, someBlank())
	os.WriteFile("/tmp/wb/blank.xlsx", data, 0o644)
	f, err := excelize.OpenFile(throughOffice(t, data, ".xlsx", "xlsx"))
	require.NoError(t, err)
	defer f.Close()
	got, err := f.GetCellValue(blankSheet, "F5")
	require.NoError(t, err)
	assert.Equal(t, "Length", got)
	validations, err := f.GetDataValidations(blankSheet)
	require.NoError(t, err)
	assert.NotEmpty(t, validations)
}

func TestChoices(t *testing.T) {
	assert.Equal(t, []string{"segment", "elastic"}, choices("segment, elastic"))
	for _, s := range []string{"", "a number from 0 to 1", "0, or a number from 0.1 to 3", "S355 ...; several, separated by spaces", "UKC", "UK, EN, or a set of the user's"} {
		assert.Empty(t, choices(s), s)
	}
}
