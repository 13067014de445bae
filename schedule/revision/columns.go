package revision

import (
	"math"
	"strings"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// The words that say what became of a member as a whole.
const (
	wordSame    = "same"
	wordChanged = "changed"
	wordNew     = "new"
	wordGone    = "gone"
	wordNotRead = "not read"
)

// Words are the words of a comparison that are drawn to be seen at a glance.
func Words() map[string]workbook.Role {
	return map[string]workbook.Role{
		wordChanged: workbook.Changed, wordNew: workbook.Added, wordNotRead: workbook.NotRead,
		Stays.String(): workbook.Passes, Spare.String(): workbook.Spare, Weak.String(): workbook.Fails, Barred.String(): workbook.NoSection,
		design.Passes.String(): workbook.Passes, design.NoSection.String(): workbook.NoSection,
	}
}

// Word says what became of the member.
func (r *Row) Word() string {
	switch {
	case !r.New.Readable():
		return wordNotRead
	case r.Old == nil:
		return wordNew
	case r.Changed():
		return wordChanged
	}
	return wordSame
}

// What says what changed, or why it cannot be told.
func (r *Row) What() string {
	switch {
	case !r.New.Readable():
		return r.New.Problems[0].Message()
	case r.Old == nil:
		return ""
	case !r.Old.Readable():
		return "the old issue's row could not be read: " + r.Old.Problems[0].Message()
	}
	return TextOf(r.Changes)
}

// Governs says which check governs the old section now, or why it is not
// allowed any more.
func (r *Row) Governs() string {
	switch {
	case r.Check == nil:
		return r.Clash
	case r.Check.Governing.Kind == design.Refused:
		return "not covered: " + r.Check.Governing.Reason
	}
	return schedule.CheckName(r.Check.Governing.Kind)
}

// Utilisation is that of the old section under the new actions; NaN where there
// is none.
func (r *Row) Utilisation() float64 {
	if r.Check == nil || r.Check.Section == "" || math.IsInf(r.Check.Utilisation, 0) {
		return math.NaN()
	}
	return r.Check.Utilisation
}

// LightestName is the lightest section that passes, with its grade; empty:
// none passes.
func (r *Row) LightestName() string {
	if r.Lightest.Status != design.Passes || r.Lightest.Section == "" {
		return ""
	}
	return r.Lightest.Section + " " + r.Lightest.Grade
}

// note gathers what else there is to say of a member.
func (r *Row) note() string {
	var parts []string
	add := func(s string) {
		if s != "" {
			parts = append(parts, s)
		}
	}
	add(r.Pair.Note)
	if r.Old != nil && r.Old.Sized {
		add("the old issue gives no section: this is the lightest for its own actions")
	} else if r.Old != nil && r.Old.Why != "" && r.Old.Readable() {
		add("old issue: " + r.Old.Why)
	}
	if r.New.Readable() {
		add(strings.Join(r.Kept.Result.Notes, "; "))
	}
	return strings.Join(parts, "; ")
}

// Columns returns the columns of the comparison beside the new issue. A member
// is known by its first row.
func (c *Comparison) Columns() []schedule.ResultColumn {
	rows := map[int]*Row{}
	for i := range c.Rows {
		rows[c.Rows[i].New.Rows[0]] = &c.Rows[i]
	}
	of := func(m *schedule.Member) *Row { return rows[m.Rows[0]] }
	text := func(group, name string, width int, value func(*Row) string) schedule.ResultColumn {
		return schedule.ResultColumn{Name: name, Group: group, Width: width}.Valued(func(m *schedule.Member, _ *design.Result) schedule.Value {
			return schedule.TextValue(value(of(m)))
		})
	}
	number := func(group, name, unit string, decimals, width int, value func(*Row) float64) schedule.ResultColumn {
		return schedule.ResultColumn{Name: name, Group: group, Unit: unit, Decimals: decimals, Width: width, Numeric: true}.Valued(func(m *schedule.Member, _ *design.Result) schedule.Value {
			return schedule.NumberValue(value(of(m)))
		})
	}
	const revised, before, lighter, now = "Revision", "Section of the old issue, under the new actions", "Lightest section", "Section where those that pass stay"
	return []schedule.ResultColumn{
		text(revised, "change", 11, (*Row).Word),
		number(revised, "N_Ed before", "kN", 0, 9, func(r *Row) float64 { return r.force(r.Old) }),
		number(revised, "N_Ed now", "kN", 0, 9, func(r *Row) float64 { return r.force(r.New) }),
		number(revised, "change of N_Ed", "%", 1, 9, (*Row).rise),
		text(before, "section before", 20, func(r *Row) string {
			if r.Old == nil {
				return ""
			}
			return r.Old.SectionName()
		}),
		number(before, "its utilisation", "", 3, 10, (*Row).Utilisation),
		text(before, "verdict", 15, func(r *Row) string {
			if r.Verdict == NotChecked {
				return ""
			}
			return r.Verdict.String()
		}),
		text(before, "governing check", 22, (*Row).Governs),
		text(lighter, "lightest", 20, (*Row).LightestName),
		number(lighter, "it would save", "kg", 0, 9, func(r *Row) float64 { return blankZero(float64(r.Saving) / 1e3) }),
		text(now, "section", 18, func(r *Row) string { return r.Kept.Result.Section }),
		text(now, "grade", 8, func(r *Row) string { return r.Kept.Result.Grade }),
		number(now, "utilisation", "", 3, 10, func(r *Row) float64 {
			if r.Kept.Result.Section == "" {
				return math.NaN()
			}
			return r.Kept.Result.Utilisation
		}),
		text(now, "status", 11, func(r *Row) string {
			if !r.New.Readable() {
				return wordNotRead
			}
			return r.Kept.Result.Status.String()
		}),
		text("Since the old issue", "what changed", 66, (*Row).What),
		text("Remarks", "note", 30, (*Row).note),
	}
}

// PrintedColumns is how many of the columns, from the first, show on paper what
// became of the schedule; the notes behind them would make the others small.
func (c *Comparison) PrintedColumns() int { return len(c.Columns()) - 1 }

// force is the greatest axial force of a member in kN; NaN for none.
func (r *Row) force(m *Member) float64 {
	if m == nil || !m.Readable() || len(m.Column.Combinations) == 0 {
		return math.NaN()
	}
	return GreatestNEd(&m.Column) / 1e3
}

// rise is by how much the greatest axial force grew, in per cent; NaN where
// that says nothing.
func (r *Row) rise() float64 {
	a, b := r.force(r.Old), r.force(r.New)
	if !(a*b > 0) || equal(a, b) {
		return math.NaN()
	}
	return 100 * (b/a - 1)
}

func blankZero(x float64) float64 {
	if x == 0 {
		return math.NaN()
	}
	return x
}
