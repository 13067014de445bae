package blank

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design/ec3"
	"stanchion/schedule"
	"stanchion/schedule/text"
	"stanchion/schedule/workbook"
)

// Every heading of an empty schedule is read as the field that it stands for,
// in its unit, and none is left alone.
func TestHeadingsAreKnown(t *testing.T) {
	for _, all := range []bool{false, true} {
		var buf bytes.Buffer
		require.NoError(t, CSV(&buf, all))
		list := headings(all)
		row := make([]string, len(list))
		for i, h := range list {
			switch h.field.Name {
			case "Mark":
				row[i] = "C1"
			case "Length":
				row[i] = "4"
			case "N_Ed":
				row[i] = "500"
			}
		}
		buf.WriteString(strings.Join(row, ",") + "\n")
		f, err := text.OpenReader(&buf, "blank.csv")
		require.NoError(t, err)
		plan, err := schedule.Scan(f, schedule.Options{National: ec3.NationalSet})
		require.NoError(t, err)
		assert.Empty(t, plan.Summary.LeftAlone)
		assert.Empty(t, plan.Summary.Other)
		require.Len(t, plan.Header.Columns, len(list))
		for i, b := range plan.Header.Columns {
			assert.Equal(t, list[i].field.Name, b.Field, list[i].name)
			assert.Equal(t, list[i].field.Unit, b.Unit, list[i].name)
		}
		require.NoError(t, f.Close())
	}
}

// The workbook opens, and nothing on its sheets is read as a schedule but the
// one that is meant.
func TestWorkbookHoldsOneSchedule(t *testing.T) {
	var buf bytes.Buffer
	require.NoError(t, Workbook(&buf, true))
	b, err := workbook.OpenBytes("blank.xlsx", buf.Bytes())
	require.NoError(t, err)
	defer b.Close()
	assert.Equal(t, []string{"Columns", "Headings", "Settings"}, b.Sheets())
	_, err = schedule.Scan(b, schedule.Options{National: ec3.NationalSet})
	assert.ErrorContains(t, err, "there are no members below the header")
	assert.ErrorContains(t, err, "Columns!")
}
