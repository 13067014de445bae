package revision

import (
	"context"
	"errors"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/search"
	"stanchion/schedule/takeoff"
)

// Verdict is what the new actions mean for the section that a member had.
type Verdict uint8

// The verdicts.
const (
	NotChecked Verdict = iota // there was none, or the member cannot be designed
	Stays                     // it passes, and no lighter section does
	Spare                     // it passes, and a lighter one would
	Weak                      // it fails
	Barred                    // the new issue does not allow it any more
)

// String returns the verdict as it stands in the output.
func (v Verdict) String() string {
	return [...]string{"not checked", "stays", "lighter passes", "fails", "not allowed"}[v]
}

// Row is what became of one member of the new issue.
type Row struct {
	New     *Member
	Old     *Member // nil: the member is new
	Pair    Pair
	Changes []Change

	Verdict  Verdict
	Check    *design.Result // of the old section under the new actions; nil: not checked
	Kept     Kept           // with the sections that can stay
	Lightest design.Result  // sized without regard to what was there
	Saving   int64          // g, of all pieces, where a lighter section passes
	Clash    string         // why the old section is not allowed any more
}

// Changed reports whether anything of the member differs, its section too.
func (r *Row) Changed() bool { return len(r.Changes) > 0 }

// Comparison is two issues side by side.
type Comparison struct {
	Old, New *Issue
	*Matching
	Rows []Row // one a member of the new issue, in its order

	Before  takeoff.TakeOff // the old issue
	Issued  takeoff.TakeOff // the new issue, with the sections that it gives
	Staying takeoff.TakeOff // the new issue, with the sections that can stay
	Light   takeoff.TakeOff // the new issue, sized without regard to what was there
}

// Compare sets two issues side by side, and tries the sections of the old
// under the actions of the new. engine works under the settings of the new
// issue, and o says what is decided together. Where the old issue gives no section at all, its members are sized by
// oldEngine first.
//
// The errors are those of building.Size; besides a *search.BugError there is a
// comparison, complete but for the members that it names.
func Compare(ctx context.Context, old, new *Issue, oldEngine, engine *search.Engine, o building.Options, workers int) (*Comparison, error) {
	c := &comparer{ctx: ctx, workers: workers, engine: engine, options: o, Comparison: &Comparison{Old: old, New: new, Matching: Match(old.Members, new.Members)}}
	c.rows()
	if err := c.sizeOld(oldEngine); err != nil {
		return nil, err
	}
	c.steel()
	if err := c.try(); err != nil {
		return nil, err
	}
	c.weigh()
	return c.Comparison, c.defects
}

type comparer struct {
	*Comparison
	ctx     context.Context
	workers int
	engine  *search.Engine
	options building.Options
	defects error
}

// rows makes a row of every member of the new issue.
func (c *comparer) rows() {
	c.Rows = make([]Row, len(c.New.Members))
	for i := range c.Rows {
		c.Rows[i].New = &c.New.Members[i]
	}
	for _, p := range c.Pairs {
		r := &c.Rows[p.New]
		r.Pair, r.Old = p, &c.Old.Members[p.Old]
		if r.Old.Readable() && r.New.Readable() {
			r.Changes = Changes(&r.Old.Column, &r.New.Column)
		}
	}
}

// steel adds the change of section where both issues say one. It is known only
// once the old issue has its sections.
func (c *comparer) steel() {
	for i := range c.Rows {
		r := &c.Rows[i]
		if r.Old == nil || r.Old.Section == nil || r.Old.Sized || r.New.Section == nil {
			continue
		}
		if a, b := r.Old.SectionName(), r.New.SectionName(); a != b {
			r.Changes = append(r.Changes, Change{Steel, "section " + a + " → " + b})
		}
	}
}

// sizeOld sizes the members of the old issue where none of them has a section.
func (c *comparer) sizeOld(e *search.Engine) error {
	var cols []design.Column
	var at []int
	for i := range c.Old.Members {
		m := &c.Old.Members[i]
		if m.Section != nil {
			if !m.Sized {
				return nil
			}
			continue
		}
		if m.Readable() && len(m.Column.Combinations) > 0 {
			cols, at = append(cols, m.Column), append(at, i)
		}
	}
	results, err := c.all(e, cols)
	if err != nil {
		return err
	}
	for n, i := range at {
		m := &c.Old.Members[i]
		if s := sectionOf(e, &results[n]); s != nil {
			m.Section, m.Grade, m.Sized = s, results[n].Grade, true
		}
	}
	return nil
}

// all sizes columns. A defect of single columns is kept and the rest goes on.
func (c *comparer) all(e *search.Engine, cols []design.Column) ([]design.Result, error) {
	d, err := building.Size(c.ctx, e, cols, c.options, c.workers, nil)
	if d == nil || d.Results == nil && len(cols) > 0 {
		return nil, err
	}
	c.defects = errors.Join(c.defects, err)
	return d.Results, nil
}

// try tries the old sections under the new actions, and what would be lightest.
func (c *comparer) try() error {
	at, cols, had := c.designable()
	for n := range cols {
		if had[n].Section != nil {
			cols[n].Given = "" // the old section is to be tried, whatever the new issue gives
		}
	}
	kept, err := Keep(c.ctx, c.engine, cols, had, c.options, c.workers)
	if kept == nil {
		return err
	}
	c.defects = errors.Join(c.defects, err)
	light := cols
	for n := range light {
		light[n].Given = ""
		light[n].Choice.Families = c.familiesOf(&light[n], had[n].Section)
	}
	lightest, err := c.all(c.engine, light)
	if err != nil {
		return err
	}
	for n, i := range at {
		c.judge(&c.Rows[i], &kept.Columns[n], &lightest[n])
	}
	return nil
}

// designable lists the members of the new issue that can be designed, with the
// sections that they had.
func (c *comparer) designable() (at []int, cols []design.Column, had []Had) {
	for i := range c.Rows {
		r := &c.Rows[i]
		if !r.New.Readable() {
			continue
		}
		h := Had{}
		if r.Old != nil {
			h = Had{r.Old.Section, r.Old.Grade}
		}
		at, cols, had = append(at, i), append(cols, r.New.Column), append(had, h)
	}
	return at, cols, had
}

// familiesOf lets a member that names no family choose from that of the section
// which it had, if the settings' families do not hold it. The members of a
// group choose as they do when sized.
func (c *comparer) familiesOf(col *design.Column, had *catalogue.Section) []string {
	set := c.engine.Settings()
	if len(col.Choice.Families) > 0 || had == nil || col.Group != "" || isOf(had, set.Families, set.ColdFormed) {
		return col.Choice.Families
	}
	return []string{takeoff.FamilyName(had)}
}

// judge says what the new actions mean for the section that a member had.
func (c *comparer) judge(r *Row, kept *Kept, lightest *design.Result) {
	r.Kept, r.Lightest, r.Check = *kept, *lightest, kept.Old
	switch {
	case r.Check == nil:
		if r.Old != nil && r.Old.Section != nil {
			r.Verdict, r.Clash = Barred, kept.Why
		}
	case r.Check.Status == design.NotRead:
	case r.Check.Status != design.Passes:
		r.Verdict = Weak
	case lightest.Status == design.Passes && lightest.MassPerM < r.Check.MassPerM:
		r.Verdict = Spare
		r.Saving = massOf(r.Check, r.New) - massOf(lightest, r.New)
	default:
		r.Verdict = Stays
	}
}

// Count returns how many members a verdict has.
func (c *Comparison) Count(v Verdict) (n int) {
	for i := range c.Rows {
		if c.Rows[i].Verdict == v {
			n++
		}
	}
	return n
}
