package workbook

import (
	"strings"
)

// settings holds the settings that have a default, ready to be changed, and
// blank those that have none.
func (b *Blank) settings() Sheet {
	s := Sheet{Name: settingsSheet, Widths: []float64{24, 24}, FreezeRows: 1, PagesWide: 1}
	s.Rows = [][]Cell{{{Value: "Setting", Look: Look{Role: Heading}}, {Value: "Value", Look: Look{Role: Heading}}}}
	for _, set := range b.Settings {
		if named(set.Name) {
			continue // its name holds a name of the user's: the notes say how
		}
		s.Rows = append(s.Rows, []Cell{{Value: set.Name, Look: Look{Role: Label}}, {Value: set.Initial, Look: Look{Role: Input, Format: "@", Align: Left}}})
		s.Validations = append(s.Validations, Validation{
			Range: cellName(1, len(s.Rows)), Allowed: choices(set.Values), Loose: true,
			PromptTitle: set.Name, Prompt: capital(set.Values),
		})
	}
	return s
}

// named reports whether the name of a setting ends with a name of the user's:
// map HEADING, cost [FAMILY].
func named(setting string) bool {
	words := strings.Fields(setting)
	last := words[len(words)-1]
	return len(words) > 1 && strings.ToUpper(last) == last
}

// choices returns the values that a setting's description lists, none where it
// describes them otherwise.
func choices(values string) []string {
	if strings.ContainsAny(values, ";.:") {
		return nil
	}
	list := strings.Split(values, ", ")
	if len(list) < 2 || strings.Contains(values, ", or ") || strings.Contains(values, "a number") {
		return nil
	}
	return list
}

func (b *Blank) notes() Sheet {
	s := Sheet{Name: notesSheet, Widths: []float64{24, 10, 60, 40}, FreezeRows: 3, RepeatRows: 3, Landscape: true, PagesWide: 1}
	s.Rows = [][]Cell{
		{{Value: "What the headings mean", Look: Look{Role: Title}}},
		{},
		headingRow("Heading", "Unit", "Meaning", "Also read"),
	}
	for _, f := range b.Known {
		meaning := capital(f.Meaning)
		if len(f.Allowed) > 0 {
			meaning += ": " + strings.Join(f.Allowed, ", ")
		}
		s.Rows = append(s.Rows, []Cell{
			{Value: f.Name, Look: Look{Role: Label}}, {Value: f.Unit, Look: Look{Align: Centre}},
			{Value: meaning, Look: Look{Wrap: true}}, {Value: strings.Join(f.Spellings[:min(6, len(f.Spellings))], ", "), Look: Look{Role: Remark, Wrap: true}},
		})
		s.tall(meaning, strings.Join(f.Spellings[:min(6, len(f.Spellings))], ", "))
	}
	s.Rows = append(s.Rows, []Cell{}, headingRow("Setting", "Default", "Values", ""))
	for _, set := range b.Settings {
		s.Rows = append(s.Rows, []Cell{
			{Value: set.Name, Look: Look{Role: Label}}, {Value: set.Initial, Look: Look{Align: Centre}},
			{Value: capital(set.Values), Look: Look{Wrap: true}},
		})
		s.tall(set.Values, "")
	}
	return s
}

func headingRow(names ...string) []Cell {
	var row []Cell
	for _, n := range names {
		row = append(row, Cell{Value: n, Look: Look{Role: Heading, Align: Left}})
	}
	return row
}

// tall gives the last row of the notes the height that its texts need.
func (s *Sheet) tall(meaning, spellings string) {
	lines := max(linesAt(splitWords(meaning), int(s.Widths[2])), linesAt(splitWords(spellings), int(s.Widths[3])))
	if lines < 2 {
		return
	}
	if s.Heights == nil {
		s.Heights = map[int]float64{}
	}
	s.Heights[len(s.Rows)] = float64(lines) * 15
}
