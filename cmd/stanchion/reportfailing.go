package main

import (
	"context"
	"fmt"
	"math"
	"strconv"

	"stanchion/design"
	"stanchion/design/ec3"
	"stanchion/schedule"
	"stanchion/schedule/summary"
)

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
		limit := ec3.Limit(&l.Member.Column, &r.plan.Settings.Design)
		t.add("  "+l.Member.Column.Mark, summary.Level(&l.Member.Column), l.Result.Section, utilisation(&l.Result, limit), failing(&l.Result, limit), instead[i])
	}
	r.print("", "Members that fail:")
	r.print(t.lines()...)
	if more := r.tally.Count[design.Fails] + r.tally.Count[design.NoSection] - len(lines); more > 0 {
		r.print(fmt.Sprintf("  and %d more: see the result column \"status\"", more))
	}
}

// failing says what a member fails in. One that passes itself has no section
// because another of its stack or group has none.
func failing(res *design.Result, limit float64) string {
	if res.Status == design.NoSection && res.Section != "" && schedule.Round(res.Utilisation) <= limit {
		return "joined to one that fails"
	}
	return schedule.CheckName(res.Governing.Kind)
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
