package main

import (
	"context"
	"fmt"
	"math"
	"strconv"
	"strings"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/summary"
	"stanchion/schedule/takeoff"
)

const (
	shownFailing = 20 // members that fail, on one screen
	shownNotRead = 12
)

func newTally(r *run) *summary.Tally {
	return summary.NewTally(max(shownFailing, shownNotRead), r.familyOf)
}

// report says what came of a run: the outcome, the steel, what needs looking
// at, and where the results are.
func (r *run) report(ctx context.Context) {
	if r.con.quiet {
		return
	}
	r.sayRead()
	r.sayOutcome()
	r.sayKept()
	r.saySteel()
	r.sayAtHand()
	r.saySizes()
	r.sayReserve()
	r.sayFailing(ctx)
	r.sayNotRead()
	r.sayWritten()
}

func (r *run) print(lines ...string) {
	for _, l := range lines {
		fmt.Fprintln(r.con.err, l)
	}
}

// sayRead says what was read, and what was not.
func (r *run) sayRead() {
	s := &r.plan.Summary
	where := r.plan.File
	if r.plan.Sheet != "" {
		where += ", sheet " + r.plan.Sheet
	}
	r.paragraph("", where+": "+plural(s.Members, "member")+" in "+plural(s.Rows, "row"))
	r.paragraph("", "Settings: "+r.settingsLine())
	var over []string
	for _, c := range []struct {
		n    int
		what string
	}{{s.Totals, "total row"}, {s.Repeated, "repeated header"}, {s.Footnotes, "footnote"}} {
		if c.n > 0 {
			over = append(over, plural(c.n, c.what))
		}
	}
	if len(over) > 0 {
		r.paragraph("", "Passed over: "+strings.Join(over, ", "))
	}
	if s.Hidden > 0 {
		r.paragraph("", "Hidden rows, designed too: "+strconv.Itoa(s.Hidden))
	}
	for _, h := range s.LeftAlone {
		r.paragraph("", fmt.Sprintf("Left alone: %s %q: %s", h.Cell, h.Heading, h.Why))
	}
	if len(s.Other) > 0 {
		var headings []string
		for _, h := range s.Other {
			headings = append(headings, fmt.Sprintf("%q (%s)", h.Heading, h.Cell))
		}
		r.paragraph("", "Not used: "+strings.Join(headings, ", "))
	}
	for _, n := range s.Notes {
		r.paragraph("", "Note: "+n)
	}
}

// settingsLine names the settings that every reader asks for, and those that
// somebody gave.
func (r *run) settingsLine() string {
	var list []string
	for _, s := range r.plan.Settings.Used() {
		always := s.Name == "national" || s.Name == "grade" || s.Name == "families" || s.Name == "limit"
		given := s.From != "default" && !strings.HasPrefix(s.From, "national set")
		if s.Value != "" && (always || given) && !strings.HasPrefix(s.Name, "map ") {
			list = append(list, s.Name+" "+s.Value)
		}
	}
	return strings.Join(list, "; ")
}

func (r *run) sayOutcome() {
	c := &r.tally.Count
	parts := []string{fmt.Sprintf("%d pass", c[design.Passes])}
	for _, p := range []struct {
		status design.Status
		word   string
	}{{design.Fails, "fail"}, {design.NoSection, "without a section that passes"}, {design.NotRead, "not read"}} {
		if n := c[p.status]; n > 0 {
			parts = append(parts, r.con.strong(fmt.Sprintf("%d %s", n, p.word)))
		}
	}
	r.print("", fmt.Sprintf("Outcome: %s", strings.Join(parts, ", ")))
}

func (r *run) saySteel() {
	list := r.tally.Steel()
	if len(list) == 0 {
		return
	}
	t := newTable("  Steel", ">lengths", ">length m", ">tonnes")
	row := func(s summary.Steel) {
		t.add("  "+s.Family, strconv.Itoa(s.Lengths), strconv.FormatFloat(s.Length, 'f', 1, 64), strconv.FormatFloat(s.Mass/1000, 'f', 2, 64))
	}
	for _, s := range list {
		row(s)
	}
	if len(list) > 1 {
		row(summary.Total(list))
	}
	r.print("")
	r.print(t.lines()...)
}

// sayAtHand says what is made of steel at hand, and what it saves.
func (r *run) sayAtHand() {
	d := r.reclaim
	if d == nil {
		return
	}
	mass := 0.0
	for i := range d.Results {
		if d.Results[i].AtHand != "" {
			mass += d.Results[i].Mass * float64(r.quantities[i])
		}
	}
	all := summary.Total(r.tally.Steel()).Mass
	r.print("")
	r.paragraph("", fmt.Sprintf("Steel at hand: %d of %s are used, %.2f t in columns; %.2f t are bought new", d.Used, plural(d.AtHand, "piece"), mass/1000, (all-mass)/1000))
	by := r.plan.Settings.Design.Rates.Objective
	name := [...]string{design.ByMass: "new steel", design.ByCost: "the cost of new steel", design.ByCarbon: "the CO2e of new steel"}[by]
	proof := "proven the most that can be saved"
	if d.Bound > d.Saved {
		proof = fmt.Sprintf("the most that can be saved is proven to be within %.2g %% of it", 100*(d.Bound/d.Saved-1))
	}
	what := "It saves %s of %s: %s"
	if !d.Proven && d.Bound == d.Saved { // sizes are few, or lengths depend on each other
		what = "Bought new, each column by itself, that would be %s of %s: %s"
		proof = "with few sizes, or lengths that depend on each other, it is not proven the most"
	}
	if d.Used > 0 {
		r.paragraph("", fmt.Sprintf(what, saving(d.Saved, by), name, proof))
	}
	if d.Tied > 0 {
		r.paragraph("", fmt.Sprintf("%s of groups and stacks, whose sections are decided together, are sized new", plural(d.Tied, "column")))
	}
}

// saving writes kg as t, and money as it is.
func saving(x float64, by design.Objective) string {
	if by == design.ByCost {
		return fixed(x, 0)
	}
	return fixed(x/1000, 2) + " t"
}

// saySizes says what fewer sizes come to, where they are limited.
func (r *run) saySizes() {
	if len(r.curve) > 0 {
		r.print("")
		r.print(sizesLines(r.sizesTable(), "  ")...)
	}
}

// sayReserve says which member can carry the least more.
func (r *run) sayReserve() {
	if r.least == nil {
		return
	}
	res := &r.least.Result
	factor := ""
	if res.Reserve > 0 {
		factor = fmt.Sprintf(" (factor %.3f)", res.Reserve)
	}
	whose := ""
	if c := &r.tally.Count; c[design.Fails]+c[design.NoSection] > 0 {
		whose = " of those that pass"
	}
	r.print("")
	r.paragraph("", fmt.Sprintf("Least reserve%s: %s, %.1f kN on N_Ed%s, then %s", whose, takeoff.MemberName(&r.least.Member.Column), res.ReserveN/1000, factor, schedule.CheckName(res.ReserveCheck)))
}

// sayFailing lists the members that fail, with what would pass in their place.
func (r *run) sayFailing(ctx context.Context) {
	lines := r.tally.Worst[:min(shownFailing, len(r.tally.Worst))]
	if len(lines) == 0 {
		return
	}
	instead := r.lightest(ctx, lines)
	t := newTable("  Mark", "Level", "Section", ">util.", "Governing check", "Lightest that passes")
	t.limit(0, 14)
	t.limit(1, 12)
	t.limit(4, 26)
	for i := range lines {
		l := &lines[i]
		t.add("  "+l.Member.Column.Mark, summary.Level(&l.Member.Column), l.Result.Section, utilisation(&l.Result, ec3.Limit(&l.Member.Column, &r.plan.Settings.Design)), schedule.CheckName(l.Result.Governing.Kind), instead[i])
	}
	r.print("", "Members that fail:")
	r.print(t.lines()...)
	if more := r.tally.Count[design.Fails] + r.tally.Count[design.NoSection] - len(lines); more > 0 {
		r.print(fmt.Sprintf("  and %d more: see the result column \"status\"", more))
	}
}

// utilisation writes the utilisation of a result: to three decimals, as a
// spreadsheet rounds the number that is written, and to more where three would
// hide that it is above its limit. Of none there is a dash.
func utilisation(res *design.Result, limit float64) string {
	if res.Section == "" || math.IsInf(res.Utilisation, 0) {
		return "-"
	}
	u := schedule.Round(res.Utilisation)
	if rounded := math.Round(u*1000) / 1000; rounded > limit || u <= limit {
		return strconv.FormatFloat(rounded, 'f', 3, 64)
	}
	return strconv.FormatFloat(u, 'f', -1, 64)
}

// lightest names, for members that fail, the lightest section that passes: of
// the family of the one that is given, or of the member's own choice.
func (r *run) lightest(ctx context.Context, lines []summary.Line) []string {
	names := make([]string, len(lines))
	cols := make([]design.Column, len(lines))
	for i := range lines {
		cols[i] = lines[i].Member.Column
		cols[i].Given = ""
		if family := r.familyOf(lines[i].Result.Section); lines[i].Result.Fixed && family != "" {
			cols[i].Choice.Families = []string{family}
		}
	}
	found, err := r.engine.Lightest(ctx, cols, r.flags.workers)
	for i := range names {
		switch {
		case err != nil:
		case found[i] == nil:
			names[i] = "none"
		default:
			names[i] = found[i].Section.Name()
		}
	}
	return names
}

// sayNotRead lists why members could not be read.
func (r *run) sayNotRead() {
	list := r.tally.NotRead
	if len(list) == 0 {
		return
	}
	r.print("", "Not read:")
	shown := list[:min(shownNotRead, len(list))]
	more := r.tally.Unlisted
	for i, reason := range list {
		if i >= len(shown) {
			more += reason.Count
			continue
		}
		cell := reason.Cell
		if reason.Count > 1 {
			cell += fmt.Sprintf(" and %d more", reason.Count-1)
		}
		r.paragraph("  ", cell+": "+reason.Text)
	}
	if more > 0 {
		r.print(fmt.Sprintf("  and %d more: see the result column \"note\"", more))
	}
	if r.tally.Resized && r.mode == search.Check {
		r.paragraph("  ", "The sections that an earlier run chose are results and not given. Set them against revised loads with stanchion compare OLD NEW, or copy them into a column headed Section to have them checked.")
	}
}

func (r *run) sayWritten() {
	r.print("")
	if r.out.path != stdio {
		r.paragraph("", "Written: "+r.con.strong(r.out.path))
	}
	if r.flags.json != "" && r.flags.json != stdio {
		r.paragraph("", "Written: "+r.flags.json)
	}
	r.paragraph("", caution)
}

// paragraph prints words within the width of the screen.
func (r *run) paragraph(indent, words string) {
	r.print(indent + wrap(words, screenWidth-2, indent+"  "))
}

func plural(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return strconv.Itoa(n) + " " + what + "s"
}
