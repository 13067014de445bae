package schedule

import (
	"fmt"
	"iter"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/ec3"
)

// memory is a source whose sheets are written in tests: one row a line, cells
// parted by "|". A cell is a text; #3.5 is a number, ~1/2=0.5 one shown as a
// fraction, @text a date, !text an error, =text a formula without a value,
// ^ repeats the cell to the left as merged, " the cell above.
type memory struct {
	sheets []string
	rows   map[string][]*Row
	hidden map[int]bool
	hide   map[int]bool // rows
}

func sheetOf(text string) *memory { return (&memory{rows: map[string][]*Row{}}).sheet("Columns", text) }

func (m *memory) sheet(name, text string) *memory {
	m.sheets = append(m.sheets, name)
	var above *Row
	for i, line := range strings.Split(strings.Trim(text, "\n"), "\n") {
		r := &Row{Number: i + 1}
		if trim(line) != "" {
			for j, c := range strings.Split(line, "|") {
				r.Cells = append(r.Cells, cellOf(strings.TrimSpace(c), r, above, j))
			}
		}
		m.rows[name] = append(m.rows[name], r)
		above = r
	}
	return m
}

func cellOf(s string, row, above *Row, col int) Cell {
	var x float64
	switch {
	case s == "":
		return Cell{}
	case s == "^" && col == 0, s == `"` && above == nil:
		return Cell{}
	case s == "^":
		c := row.Cells[col-1]
		c.Merged = true
		return c
	case s == `"`:
		c := *above.at(col)
		c.Merged = true
		return c
	case s[0] == '#' && len(s) > 1:
		fmt.Sscan(s[1:], &x)
		return Cell{Kind: Number, Number: x, Text: s[1:]}
	case s[0] == '~' && strings.Contains(s, "="):
		shown, val, _ := strings.Cut(s[1:], "=")
		fmt.Sscan(val, &x)
		return Cell{Kind: Number, Number: x, Text: shown, Fraction: true}
	case s[0] == '@':
		return Cell{Kind: Date, Text: s[1:]}
	case s[0] == '!':
		return Cell{Kind: Fault, Text: s[1:]}
	case s[0] == '=':
		return Cell{Kind: Uncalculated, Text: s}
	}
	return Cell{Kind: Text, Text: s}
}

func (m *memory) Name() string                      { return "loads.xlsx" }
func (m *memory) Sheets() []string                  { return m.sheets }
func (m *memory) HiddenColumns(string) map[int]bool { return m.hidden }
func (m *memory) Close() error                      { return nil }

func (m *memory) Where(sheet string, row, col int) string {
	return fmt.Sprintf("%s!%c%d", sheet, 'A'+col, row)
}

func (m *memory) Rows(sheet string) iter.Seq2[*Row, error] {
	return func(yield func(*Row, error) bool) {
		for _, r := range m.rows[sheet] {
			c := *r
			c.Hidden = m.hide[r.Number]
			if len(r.Cells) > 0 && !yield(&c, nil) {
				return
			}
		}
	}
}

func options(settings ...string) Options {
	o := Options{National: ec3.NationalSet}
	for _, s := range settings {
		a, err := ParseAssignment(s)
		if err != nil {
			panic(err)
		}
		o.Settings = append(o.Settings, a)
	}
	return o
}

// readAll reads a schedule that must be readable as a whole.
func readAll(t *testing.T, src Source, settings ...string) *Schedule {
	t.Helper()
	s, err := Read(src, options(settings...))
	require.NoError(t, err)
	return s
}

// refused reads a schedule that must be refused.
func refused(t *testing.T, src Source, settings ...string) *Refusal {
	t.Helper()
	_, err := Read(src, options(settings...))
	require.Error(t, err)
	var r *Refusal
	require.ErrorAs(t, err, &r)
	return r
}

// one reads a schedule of one member.
func one(t *testing.T, text string, settings ...string) *Member {
	t.Helper()
	s := readAll(t, sheetOf(text), settings...)
	require.Len(t, s.Members, 1)
	return &s.Members[0]
}

// good is one for a member that must be read without problems.
func good(t *testing.T, text string, settings ...string) *design.Column {
	t.Helper()
	m := one(t, text, settings...)
	for _, p := range m.Problems {
		t.Fatal(p)
	}
	return &m.Column
}

// problem reads one member that must have one problem, and returns it.
func problem(t *testing.T, text string, settings ...string) *Problem {
	t.Helper()
	m := one(t, text, settings...)
	require.Len(t, m.Problems, 1)
	return m.Problems[0]
}
