package workbook

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"stanchion/schedule"
)

// named is a defined name of the schedule's sheet.
func named(name, refersTo string) string {
	return `<definedName name="_xlnm.` + name + `" localSheetId="0">` + refersTo + `</definedName>`
}

// printedBook annotates a schedule that has these names of its own, with
// results of which the first four columns are printed, and returns the
// workbook's part.
func printedBook(t *testing.T, names string) (data []byte, book string) {
	t.Helper()
	p := handmade(worksheet(screenRows, ""), nil)
	if names != "" {
		p["xl/workbook.xml"] = insertBefore(p["xl/workbook.xml"], "</workbook>", "<definedNames>"+names+"</definedNames>")
	}
	block := screenBlock(4)
	block.Printed = 4
	data = annotate(t, p.bytes(t), block)
	return data, unpack(t, data)["xl/workbook.xml"]
}

func TestResultsArePrintedBehindTheSchedule(t *testing.T) {
	for names, want := range map[string]struct{ area, titles string }{
		"": {`'Columns'!$A:$B,'Columns'!$C:$F`, `'Columns'!$A:$A,'Columns'!$1:$1`},
		// The user's own rows on paper, and titles, stay.
		named("Print_Area", `Columns!$A$1:$B$4`):     {`'Columns'!$A$1:$B$4,'Columns'!$C$1:$F$4`, `'Columns'!$A:$A,'Columns'!$1:$1`},
		named("Print_Area", `Columns!$A$2:$B$3`):     {`'Columns'!$A$2:$B$3,'Columns'!$C$2:$F$4`, `'Columns'!$A:$A,'Columns'!$1:$1`},
		named("Print_Titles", `Columns!$1:$1`):       {`'Columns'!$A:$B,'Columns'!$C:$F`, `'Columns'!$A:$A,Columns!$1:$1`},
		named("Print_Titles", `Columns!$A:$B`):       {`'Columns'!$A:$B,'Columns'!$C:$F`, `Columns!$A:$B`},
		named("Print_Titles", `Columns!$A:$B,$1:$1`): {`'Columns'!$A:$B,'Columns'!$C:$F`, `Columns!$A:$B,$1:$1`},
		// What prints the results as it is, and what is no single range, stays.
		named("Print_Area", `Columns!$A:$Z`):                           {`Columns!$A:$Z`, `'Columns'!$A:$A,'Columns'!$1:$1`},
		named("Print_Area", `Columns!$A$1:$A$4,Columns!$B$1:$B$4`):     {`Columns!$A$1:$A$4,Columns!$B$1:$B$4`, `'Columns'!$A:$A,'Columns'!$1:$1`},
		named("Print_Area", `OFFSET(Columns!$A$1,0,0,4,COUNTA($1:1))`): {`OFFSET(Columns!$A$1,0,0,4,COUNTA($1:1))`, `'Columns'!$A:$A,'Columns'!$1:$1`},
	} {
		_, book := printedBook(t, names)
		assert.Contains(t, book, named("Print_Area", want.area), names)
		assert.Contains(t, book, named("Print_Titles", want.titles), names)
	}
}

func TestPrintedResultsAreReplaced(t *testing.T) {
	for _, names := range []string{"", named("Print_Area", `'Columns'!$A$1:$B$4`)} {
		once, _ := printedBook(t, names)
		again := screenBlock(4)
		again.Header.Old, again.Printed = []int{2, 3, 4, 5, 6, 7}, 4
		requireSame(t, once, annotate(t, once, again))

		// More columns, then results that have a sheet of their own to be printed.
		again.Printed = 5
		wider := unpack(t, annotate(t, once, again))["xl/workbook.xml"]
		again.Printed = 0
		alone := unpack(t, annotate(t, once, again))["xl/workbook.xml"]
		if names == "" {
			assert.Contains(t, wider, named("Print_Area", `'Columns'!$A:$B,'Columns'!$C:$G`))
			assert.Contains(t, alone, named("Print_Area", `'Columns'!$A:$B`))
		} else {
			assert.Contains(t, wider, named("Print_Area", `'Columns'!$A$1:$B$4,'Columns'!$C$1:$G$4`))
			assert.Contains(t, alone, named("Print_Area", `'Columns'!$A$1:$B$4`))
		}
	}
}

func TestMarksAreRepeatedWithTheirLevels(t *testing.T) {
	columns := func(fields ...string) (list []schedule.Binding) {
		for i, f := range fields {
			if f != "" {
				list = append(list, schedule.Binding{Col: i, Field: f})
			}
		}
		return list
	}
	for _, c := range []struct {
		fields      []string
		first, last int
		ok          bool
	}{
		{[]string{"Stack", "Mark", "Level from", "Level to", "Length"}, 0, 3, true},
		{[]string{"Mark", "Length", "Level"}, 0, 0, true},
		{[]string{"Mark", "", "Level"}, 0, 0, true},
		{[]string{"Length", "N_Ed", "", "", "", "Mark", "Level"}, 5, 6, true}, // not the whole of what stands before it
		{[]string{"Length", "N_Ed"}, 0, 0, false},
	} {
		p := Plan{block: Block{Header: schedule.Header{Columns: columns(c.fields...)}}}
		first, last, ok := p.markColumns()
		assert.Equal(t, c.ok, ok, c.fields)
		assert.Equal(t, []int{c.first, c.last}, []int{first, last}, c.fields)
	}
}

func TestReferencesAreSplitOutsideNames(t *testing.T) {
	assert.Equal(t, []string{"'a, b'!$A:$B", "'it''s, so'!$1:$2"}, splitRefs("'a, b'!$A:$B,'it''s, so'!$1:$2"))
	assert.Equal(t, []string{""}, splitRefs(""))
}
