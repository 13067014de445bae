package blank

import (
	"fmt"
	"strings"

	"github.com/xuri/excelize/v2"

	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// The rows of the empty schedule.
const (
	headingRow = 4
	unitRow    = 5
	firstRow   = 6
	lastRow    = 205 // to be filled in
)

// columnsSheet is the schedule to be filled in.
func columnsSheet(list []heading) workbook.Sheet {
	s := workbook.Sheet{Name: "Columns", FreezeRows: unitRow, FreezeCols: 1, RepeatRows: unitRow, Landscape: true, A3: true, PagesWide: 1, Footer: "Column schedule"}
	title := []workbook.Cell{{Value: "Column schedule", Look: workbook.Look{Role: workbook.Title}}}
	hint := []workbook.Cell{{Value: "One row a column length. Axial force is factored and positive in compression. Dark headings must be filled in, blank cells below the others take the default; " +
		"rest on a heading to see what it means, or see the sheet Headings. Columns may be left out, moved and added to.", Look: workbook.Look{Role: workbook.Remark}}}
	names, units, blank := make([]workbook.Cell, len(list)), make([]workbook.Cell, len(list)), make([]workbook.Cell, len(list))
	for i := range list {
		h := &list[i]
		look := workbook.Look{Role: workbook.Group, Wrap: true}
		first := i == 0 || list[i-1].field.Name != h.field.Name // N_Ed stands once a combination
		if h.field.Needed && first {
			look = workbook.Look{Role: workbook.Heading, Align: workbook.Centre}
		}
		names[i] = workbook.Cell{Value: h.name, Look: look, Note: note(&h.field)}
		units[i] = workbook.Cell{Value: h.field.Unit, Look: workbook.Look{Role: workbook.Unit, Align: workbook.Centre}}
		blank[i] = workbook.Cell{Look: workbook.Look{Role: workbook.Input, Align: align(&h.field)}}
		s.Widths = append(s.Widths, width(h))
		s.Validations = append(s.Validations, validation(h, i))
	}
	s.Rows = [][]workbook.Cell{title, hint, nil, names, units}
	for range lastRow - firstRow + 1 {
		s.Rows = append(s.Rows, blank)
	}
	s.Heights = map[int]float64{headingRow: 32}
	return s
}

// note says what a heading means, where the pointer rests on it.
func note(f *schedule.FieldInfo) string {
	text := f.Name + ": " + f.Meaning + "."
	if f.Unit != "" {
		text += "\nIn " + f.Unit + ", unless the row below says otherwise."
	}
	if len(f.Allowed) > 0 {
		text += "\nOne of: " + strings.Join(f.Allowed, ", ") + "."
	}
	if f.Needed {
		text += "\nMust be given."
	}
	return text
}

func align(f *schedule.FieldInfo) workbook.Align {
	if f.Unit == "" && f.Name != "Mark" && f.Name != "Section" && f.Name != "Family" {
		return workbook.Centre
	}
	return workbook.Usual
}

func width(h *heading) float64 {
	switch {
	case strings.HasPrefix(h.name, "Restraints"), strings.HasPrefix(h.name, "Ends"), h.name == "Section":
		return 18
	case len(h.name) > 14, !strings.Contains(h.name, " ") && len(h.name) > 9:
		return 13 // the longest word stands whole, in bold
	}
	return 11
}

// validation explains a heading at its cells, and offers the values where
// there are few. Other values are warned of and not refused: the schedule is
// read in any of the trade's notations.
func validation(h *heading, col int) workbook.Validation {
	name, err := excelize.ColumnNumberToName(col + 1)
	if err != nil {
		panic(err) // there are few columns
	}
	v := workbook.Validation{Range: fmt.Sprintf("%s%d:%s%d", name, firstRow, name, lastRow), Loose: true, PromptTitle: h.name, Prompt: h.field.Meaning}
	// A list within the rule itself may take 255 characters.
	if list := allowed(&h.field); len(strings.Join(list, ",")) <= 255 {
		v.Allowed = list
	}
	return v
}

// headingsSheet explains every field.
func headingsSheet() workbook.Sheet {
	s := workbook.Sheet{Name: "Headings", FreezeRows: 3, RepeatRows: 3, Landscape: true, PagesWide: 1, Widths: []float64{22, 10, 9, 62, 46, 60}, Heights: map[int]float64{}}
	head := func(texts ...string) (row []workbook.Cell) {
		for _, t := range texts {
			row = append(row, workbook.Cell{Value: t, Look: workbook.Look{Role: workbook.Heading, Align: workbook.Left}})
		}
		return row
	}
	s.Rows = [][]workbook.Cell{
		{{Value: "Headings that the program knows", Look: workbook.Look{Role: workbook.Title}}},
		nil,
		head("Heading", "Unit", "Needed", "Meaning", "Values", "Other spellings, among others"),
	}
	cell := func(text string) workbook.Cell {
		return workbook.Cell{Value: text, Look: workbook.Look{Role: workbook.Result, Align: workbook.Left, Wrap: true}}
	}
	for _, f := range schedule.Fields() {
		needed := ""
		if f.Needed {
			needed = "yes"
		}
		s.Rows = append(s.Rows, []workbook.Cell{cell(f.Name), cell(f.Unit), cell(needed), cell(f.Meaning), cell(values(&f)), cell(strings.Join(f.Spellings[:min(6, len(f.Spellings))], ", "))})
		s.Heights[len(s.Rows)] = lineHeight * float64(lines(s.Rows[len(s.Rows)-1], s.Widths))
	}
	return s
}

const lineHeight = 15 // points, of the usual letters

// lines is how many lines the fullest cell of a row needs. A column's width is
// in characters of the widest figure; words are set a little closer.
func lines(row []workbook.Cell, widths []float64) int {
	most := 1
	for i := range row {
		text, _ := row[i].Value.(string)
		most = max(most, 1+int(float64(len(text))/widths[i]))
	}
	return most
}

// settingsSheet holds the settings of a run, blank where the default holds.
func settingsSheet() workbook.Sheet {
	s := workbook.Sheet{Name: "Settings", FreezeRows: 1, PagesWide: 1, Widths: []float64{24, 24, 110}}
	for i, text := range []string{"Name", "Value", "Values, the default first"} {
		if i == 0 {
			s.Rows = append(s.Rows, nil)
		}
		s.Rows[0] = append(s.Rows[0], workbook.Cell{Value: text, Look: workbook.Look{Role: workbook.Heading, Align: workbook.Left}})
	}
	for _, info := range schedule.SettingInfos() {
		if strings.ContainsAny(info.Name, "[") || strings.HasPrefix(info.Name, "map ") {
			continue // given for a heading or a kind of steel
		}
		s.Rows = append(s.Rows, []workbook.Cell{
			{Value: info.Name, Look: workbook.Look{Role: workbook.Label}},
			{Look: workbook.Look{Role: workbook.Input}},
			{Value: info.Explained(), Look: workbook.Look{Role: workbook.Remark}},
		})
	}
	return s
}
