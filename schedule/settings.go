package schedule

import "stanchion/design"

// Assignment is one setting as someone gave it.
type Assignment struct {
	Name, Value string
	Where       string // cell, line or flag, for messages
}

// Settings are the decisions of a run: what the design needs, and what the
// reading and the command need beside it.
type Settings struct {
	Design      design.Settings
	Compression string            // positive, negative; empty: not said
	Stock       string            // file of the sections that may be used; empty: the whole catalogue
	Maps        map[string]string // the user's headers and the fields they stand for
	lines       []SettingLine
}

// SettingLine is one setting as it was used.
type SettingLine struct {
	Name, Value string
	From        string // "default", the national set's name, a cell or the command line
}

// Used returns every setting of the run in a fixed order, to be written back
// beside the results.
func (s *Settings) Used() []SettingLine { return s.lines }
