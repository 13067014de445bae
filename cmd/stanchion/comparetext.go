package main

import (
	"cmp"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"stanchion/schedule/revision"
	"stanchion/schedule/takeoff"
)

// text writes what came of the comparison as tables for a screen or a page.
func (r *compareRun) text(w io.Writer) error {
	p := &compareText{c: r.result}
	p.say(fmt.Sprintf("%s → %s", r.old.plan.File, r.new.plan.File))
	p.gap()
	for _, f := range r.result.Facts() {
		p.say(f[0] + ": " + f[1])
	}
	for _, s := range r.settings() {
		p.say("setting that differs: " + s.Text)
	}
	p.steel()
	p.weak()
	p.spare()
	p.changed()
	p.others()
	_, err := io.WriteString(w, strings.Join(p.lines, "\n")+"\n")
	return err
}

// compareText is the text being written.
type compareText struct {
	c     *revision.Comparison
	lines []string
}

func (p *compareText) say(line string) {
	p.lines = append(p.lines, strings.Split(wrap(line, screenWidth, "  "), "\n")...)
}

func (p *compareText) gap() { p.lines = append(p.lines, "") }

func (p *compareText) end(t *table) {
	p.gap()
	p.lines = append(p.lines, t.lines()...)
}

func (p *compareText) steel() {
	t := newTable("Steel", ">pieces", ">tonnes", ">change t", "")
	list := p.c.Tonnages()
	before := list[0].Steel.Net.Mass
	for i := range list {
		s := &list[i]
		change := ""
		if i > 0 {
			change = fmt.Sprintf("%+.3f", float64(s.Steel.Net.Mass-before)/1e6)
		}
		t.add(s.Name, count(s.Steel.Pieces), tonnes(s.Steel.Net.Mass), change, s.Remark())
	}
	p.end(t)
}

// rows picks rows of the new issue.
func (p *compareText) rows(is func(*revision.Row) bool) []*revision.Row {
	var list []*revision.Row
	for i := range p.c.Rows {
		if is(&p.c.Rows[i]) {
			list = append(list, &p.c.Rows[i])
		}
	}
	return list
}

// weak lists the old sections that fail, the worst first.
func (p *compareText) weak() {
	list := p.rows(func(r *revision.Row) bool { return r.Verdict == revision.Weak || r.Verdict == revision.Barred })
	if len(list) == 0 {
		return
	}
	slices.SortStableFunc(list, func(a, b *revision.Row) int { return cmp.Compare(weakness(b), weakness(a)) })
	p.gap()
	p.say("Sections of the old issue that fail, or are not allowed any more")
	t := newTable("  mark", "level", "section before", ">util.", "governing check", "lightest that passes")
	for _, r := range list {
		lightest := r.LightestName()
		if lightest == "" {
			lightest = "none"
		}
		t.add("✗ "+takeoff.MarkName(r.New.Column.Mark, r.New.Column.Stack), r.New.Level(), r.Old.SectionName(), ratio(r.Utilisation()), r.Governs(), lightest)
	}
	narrow(t)
	p.lines = append(p.lines, t.lines()...)
}

// weakness orders the sections that fail; those that are not allowed come
// first.
func weakness(r *revision.Row) float64 {
	if u := r.Utilisation(); !math.IsNaN(u) {
		return u
	}
	return math.Inf(1)
}

// narrow lets a table of members fit the screen.
func narrow(t *table) {
	t.limit(0, 16)
	t.limit(1, 14)
	t.limit(2, 21)
	t.limit(4, 22)
}

// spare lists the old sections in whose place a lighter one passes, the
// greatest saving first.
func (p *compareText) spare() {
	list := p.rows(func(r *revision.Row) bool { return r.Verdict == revision.Spare })
	if len(list) == 0 {
		return
	}
	slices.SortStableFunc(list, func(a, b *revision.Row) int { return cmp.Compare(b.Saving, a.Saving) })
	p.gap()
	p.say("Sections of the old issue that pass, and could be lighter")
	t := newTable("  mark", "level", "section before", ">util.", ">saves kg", "lightest that passes")
	for _, r := range list {
		t.add("▼ "+takeoff.MarkName(r.New.Column.Mark, r.New.Column.Stack), r.New.Level(), r.Old.SectionName(), ratio(r.Utilisation()), fixed(float64(r.Saving)/1e3, 1), r.LightestName())
	}
	t.limit(0, 16)
	t.limit(1, 14)
	p.lines = append(p.lines, t.lines()...)
}

// changed lists what changed, member by member.
func (p *compareText) changed() {
	list := p.rows(func(r *revision.Row) bool { return r.Word() != "same" && r.Word() != "new" })
	if len(list) == 0 {
		return
	}
	p.gap()
	p.say("What changed")
	for _, r := range list {
		sign := "≠ "
		if r.Word() == "not read" {
			sign = "? not read: "
		}
		p.say(sign + r.New.Name() + ": " + r.What())
		if r.Pair.Note != "" {
			p.say("  " + r.Pair.Note)
		}
	}
}

// others lists what is new, what is gone, and what could be the same.
func (p *compareText) others() {
	if len(p.c.Added) > 0 {
		p.gap()
		p.say("New")
		for _, i := range p.c.Added {
			r := &p.c.Rows[i]
			p.say("+ " + r.New.Name() + about(r))
		}
	}
	if len(p.c.Removed) > 0 {
		p.gap()
		p.say("Gone")
		for _, j := range p.c.Removed {
			m := &p.c.Old.Members[j]
			p.say(strings.TrimRight("− "+m.Name()+": "+m.SectionName(), ": "))
		}
	}
	if len(p.c.Candidates) > 0 {
		p.gap()
		p.say("Perhaps the same")
		for _, c := range p.c.Candidates {
			p.say(fmt.Sprintf("? %s → %s, %s %s", p.c.Old.Members[c.Old].Name(), p.c.New.Members[c.New].Name(), c.Likeness, c.Why))
		}
	}
}

// about says what section a new member has, or is to have.
func about(r *revision.Row) string {
	switch res := &r.Kept.Result; {
	case !r.New.Readable():
		return ": not read: " + r.What()
	case res.Section != "":
		return fmt.Sprintf(": %s %s, %s", res.Section, res.Grade, res.Status)
	}
	return ": no section passes"
}

func ratio(x float64) string {
	if math.IsNaN(x) {
		return "-"
	}
	return strconv.FormatFloat(x, 'f', 3, 64)
}
