package workbook

import (
	"io"
	"slices"
	"strings"

	"stanchion/schedule"
)

// Blank says what an empty schedule is to hold.
type Blank struct {
	Fields   []schedule.FieldInfo   // the headings, in their order
	Known    []schedule.FieldInfo   // all fields, for the notes
	Settings []schedule.SettingInfo // for the settings and the notes
	Lists    map[string][]string    // values to choose from, by the name of a field, beside those that it has itself; others may be typed
	Rows     int                    // to be filled in
}

// UsualFields returns those of the fields that most schedules use.
func UsualFields(all []schedule.FieldInfo) []schedule.FieldInfo {
	usual := []string{
		"Mark", "Stack", "Level from", "Level to", "Quantity", "Length", "N_Ed", "Ends y-y", "Ends z-z",
		"Restraints y-y", "Restraints z-z", "Restraints torsion", "Family", "Grade", "Greatest depth", "Greatest width",
		"Section", "Group", "Splice",
	}
	var out []schedule.FieldInfo
	for _, name := range usual {
		if i := slices.IndexFunc(all, func(f schedule.FieldInfo) bool { return f.Name == name }); i >= 0 {
			out = append(out, all[i])
		}
	}
	return out
}

// Names of the sheets of an empty schedule.
const (
	blankSheet    = "Columns"
	settingsSheet = "Settings"
	notesSheet    = "Notes"
	listsSheet    = "Lists"
)

// The rows of an empty schedule.
const (
	blankHeading = 5
	blankUnit    = 6
	blankFirst   = 7
)

// Write writes an empty schedule: headings with their units and an
// explanation each, rows to fill in with lists of what may be chosen, a sheet
// of settings, and notes.
func (b *Blank) Write(w io.Writer) error {
	sheets := []Sheet{b.schedule(), b.settings(), b.notes()}
	if lists := b.lists(); len(lists.Rows) > 0 {
		sheets = append(sheets, lists)
	}
	return WriteNew(w, sheets)
}

func (b *Blank) schedule() Sheet {
	s := Sheet{
		Name: blankSheet, FreezeRows: blankUnit, FreezeCols: 1, RepeatRows: blankUnit,
		Landscape: true, A3: true, PagesWide: 1, TabColour: fillHead,
		Heights: map[int]float64{blankHeading: 32},
	}
	s.Rows = [][]Cell{
		{{Value: "Column schedule", Look: Look{Role: Title}}},
		{{Value: "One row a column length. Dark headings must be filled in, light ones may stay blank; rest on a heading to see what it means, or see the sheet " + notesSheet + ".", Look: Look{Role: Remark}}},
		{{Value: "Units may be changed in the row below the headings. Columns may be moved, taken out and added.", Look: Look{Role: Remark}}},
		{},
	}
	var headings, units []Cell
	for _, f := range b.Fields {
		role := Group
		if f.Needed {
			role = Heading
		}
		headings = append(headings, Cell{Value: f.Name, Look: Look{Role: role, Wrap: true, Align: Centre}, Note: explain1(&f)})
		units = append(units, Cell{Value: f.Unit, Look: Look{Role: Unit, Align: Centre}})
		s.Widths = append(s.Widths, b.width(&f))
	}
	s.Rows = append(s.Rows, headings, units)
	for range b.Rows {
		row := make([]Cell, len(b.Fields))
		for i := range row {
			row[i].Look = Look{Role: Input}
		}
		s.Rows = append(s.Rows, row)
	}
	s.Validations = b.validations()
	return s
}

// explain1 returns what a heading's note says.
func explain1(f *schedule.FieldInfo) string {
	text := capital(f.Meaning) + "."
	if f.Unit != "" {
		text += "\nUnit: " + f.Unit + ", unless the row below says otherwise."
	}
	if len(f.Allowed) > 0 {
		text += "\nOne of: " + strings.Join(f.Allowed, ", ") + "."
	}
	if f.Needed {
		text += "\nMust be given."
	}
	return text
}

func capital(s string) string {
	if s == "" || strings.HasPrefix(s, "z-z") {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// width returns a width that shows the heading in two lines and the longest
// value.
func (b *Blank) width(f *schedule.FieldInfo) float64 {
	w := max(8, boldWidth(wrapped(f.Name, 2)))
	for _, v := range append(slices.Clone(f.Allowed), b.Lists[f.Name]...) {
		w = max(w, min(len(v), 20))
	}
	return float64(w + 2)
}

func (b *Blank) validations() []Validation {
	var out []Validation
	for i := range b.Fields {
		f := &b.Fields[i]
		v := Validation{
			Range:       area{blankFirst, blankUnit + b.Rows, i, i}.String(),
			PromptTitle: f.Name, Prompt: capital(f.Meaning), Loose: true,
		}
		switch list := b.Lists[f.Name]; {
		case len(f.Allowed) > 0:
			v.Allowed = f.Allowed
		case len(list) > 0:
			col := b.listColumn(f.Name)
			v.AllowedIn = quoted(listsSheet) + "!" + area{2, 1 + len(list), col, col}.absolute()
		}
		out = append(out, v)
	}
	return out
}

// listed returns the fields that have a list of their own, in order.
func (b *Blank) listed() []string {
	var out []string
	for _, f := range b.Fields {
		if len(f.Allowed) == 0 && len(b.Lists[f.Name]) > 0 {
			out = append(out, f.Name)
		}
	}
	return out
}

func (b *Blank) listColumn(name string) int { return slices.Index(b.listed(), name) }

// lists holds the values of fields that have too many to be written into the
// cells' own rules.
func (b *Blank) lists() Sheet {
	s := Sheet{Name: listsSheet, Hidden: true}
	for col, name := range b.listed() {
		for i, v := range append([]string{name}, b.Lists[name]...) {
			for len(s.Rows) <= i {
				s.Rows = append(s.Rows, nil)
			}
			for len(s.Rows[i]) <= col {
				s.Rows[i] = append(s.Rows[i], Cell{})
			}
			s.Rows[i][col].Value = v
		}
	}
	return s
}
