package main

import (
	"fmt"
	"strconv"
	"strings"

	"stanchion/design/search"
)

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
	}{{s.Totals, "total row"}, {s.Repeated, "repeated header"}, {s.Footnotes, "other text"}} {
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
