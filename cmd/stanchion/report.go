package main

import (
	"context"
	"fmt"
	"strconv"
	"strings"

	"stanchion/design"
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
