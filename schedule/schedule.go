package schedule

import (
	"iter"

	"stanchion/catalogue"
	"stanchion/design"
)

// Options say how a schedule is to be read.
type Options struct {
	Sheet    string       // the sheet that holds the schedule; empty: chosen by content
	Settings []Assignment // from the command line: they beat those of the file
	// SettingsFile is a two-column file of settings given beside a text
	// schedule; nil: none. A sheet named Settings in the schedule's own
	// workbook is read without it.
	SettingsFile Source
	// National resolves the name of a national set (ec3.NationalSet, or one
	// that knows the user's own sets too).
	National func(name string) (design.National, error)
	// Stock reads the list of sections that the setting stock names, so that a
	// given section may be one of its own. nil: names that the catalogue does
	// not know are left to the design where a stock list is set.
	Stock func(file string) (*catalogue.Catalogue, error)
	// LoadsOptional reads a schedule without N_Ed too: for a take-off.
	LoadsOptional bool
	// EarlierSheet is the sheet, by what it was to the run that annotated the
	// schedule, that holds the settings of that run; those that concern the
	// steel hold where nothing else is said: for a take-off. Empty: none.
	EarlierSheet string
}

// Member is what the schedule says of one member, from one row or from several
// rows of the same mark and level.
type Member struct {
	Column   design.Column // of a member that cannot be read: what could be read of mark and place
	Rows     []int         // rows of the sheet, from 1, the first being where the results stand
	Problems []*Problem    // why the member cannot be designed; empty: it can
	Earlier  Earlier       // what an earlier run wrote into its first row
}

// Plan is a schedule whose header, number format, settings and rows are
// understood. It holds a few bytes a row, so that schedules too long to hold
// can be gone through once more.
type Plan struct {
	File     string
	Sheet    string
	Header   Header
	Decimal  byte // '.' or ',': decided once per file
	Settings Settings
	Summary  Summary
	Stock    *catalogue.Catalogue // of the setting stock; nil: none, or Options.Stock is nil

	rows          *rows
	loadsOptional bool
}

// Header says where the schedule stands on its sheet.
type Header struct {
	First, Last int       // rows of the header, from 1, without the unit row
	UnitRow     int       // 0: none
	Columns     []Binding // the columns that are read, by rising column
	Old         []int     // columns (0 is A) of an earlier run's results
	// Width is the first column to the right of everything that the header and
	// the members' rows hold, an earlier run's results left out if they stand
	// last.
	Width int
	// Cells is the greatest number of cells of a row of the header or of a
	// member, blank ones and earlier results included.
	Cells int
}

// Summary is what the reading has to say about the file as a whole.
type Summary struct {
	Members   int
	Rows      int    // rows that belong to members
	Hidden    int    // of which hidden
	Totals    int    // total, subtotal and average rows passed over
	Repeated  int    // repeated headers passed over
	Footnotes int    // footnotes and headings between rows passed over
	LeftAlone []Seen // headers that name a field and are not read
	Other     []Seen // headers that say nothing to the program
	Notes     []string
}

// Seen is a header and why it is not read.
type Seen struct {
	Cell, Heading, Why string
}

// Schedule is a plan with all its members.
type Schedule struct {
	*Plan
	Members []Member
}

// Read reads a whole schedule into memory.
func Read(src Source, opts Options) (*Schedule, error) {
	plan, err := Scan(src, opts)
	if err != nil {
		return nil, err
	}
	s := &Schedule{Plan: plan, Members: make([]Member, 0, plan.Summary.Members)}
	for m, err := range plan.Members() {
		if err != nil {
			return nil, err
		}
		s.Members = append(s.Members, *m)
	}
	return s, nil
}

// Members yields the members in the order of their first rows. An error ends
// them: the file could not be read on. It may be called again.
func (p *Plan) Members() iter.Seq2[*Member, error] { return p.rows.members }
