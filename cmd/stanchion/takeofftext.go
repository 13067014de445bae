package main

import (
	"fmt"
	"io"
	"strconv"
	"strings"

	"stanchion/schedule/takeoff"
)

// takeoffTitle opens a take-off in text.
const takeoffTitle = "Take-off of "

// text writes the take-off as tables for a screen or a page.
func (r *takeoffRun) text(w io.Writer) error {
	t := r.steel
	p := &takeoffText{t: t, cost: t.HasCost(), carbon: t.HasCarbon()}
	where := r.plan.File
	if r.plan.Sheet != "" {
		where += ", sheet " + r.plan.Sheet
	}
	p.say(takeoffTitle + where)
	if n := len(t.LeftOut); n > 0 {
		p.say(fmt.Sprintf("NOT COUNTED: %s, listed at the end", plural(n, "member")))
	}
	p.sections()
	p.levels()
	p.families()
	p.whole()
	p.cuts()
	p.list("Not counted", t.LeftOut)
	p.list("Counted, and they fail", t.Failing)
	_, err := io.WriteString(w, strings.Join(p.lines, "\n")+"\n")
	return err
}

// takeoffText is the text being written.
type takeoffText struct {
	t            *takeoff.TakeOff
	cost, carbon bool
	lines        []string
}

func (p *takeoffText) say(line string) {
	p.lines = append(p.lines, strings.Split(wrap(line, screenWidth, "  "), "\n")...)
}

// table starts a table with headings of its own before those of the amounts.
func (p *takeoffText) table(headings ...string) *table {
	return newTable(append(headings, ">pieces", ">lengths", ">length m", ">kg/m", ">tonnes", ">painted m2", ">cost", ">CO2e t")...)
}

func (p *takeoffText) amounts(pieces int64, kgM float64, a *takeoff.Amounts) []string {
	lengths := a.Lengths
	if pieces > 0 && p.t.Pieces == p.t.Net.Lengths {
		lengths = 0 // the same number throughout
	}
	cells := []string{count(pieces), count(lengths), fixed(a.Metres(), 2), massPerMetre(kgM), tonnes(a.Mass), fixed(a.SquareMetres(), 1), "", ""}
	if a.Length == 0 { // an allowance
		cells[2], cells[5] = "", ""
	}
	if p.cost {
		cells[6] = rated(a.Cost, a.Money(), 0)
	}
	if p.carbon {
		cells[7] = rated(a.Carbon, a.TonnesCO2e(), 3)
	}
	return cells
}

func (p *takeoffText) end(t *table) { p.lines = append(append(p.lines, ""), t.lines()...) }

func (p *takeoffText) sections() {
	t := p.table("Section", "grade")
	for i := range p.t.Sections {
		s := &p.t.Sections[i]
		t.add(append([]string{s.Section.Name(), s.Grade}, p.amounts(s.Pieces, s.Section.Mass, &s.Amounts)...)...)
	}
	t.add(append([]string{"all", ""}, p.amounts(p.t.Pieces, 0, &p.t.Net)...)...)
	p.end(t)
}

func (p *takeoffText) levels() {
	if len(p.t.Levels) < 2 {
		return
	}
	t := p.table("Level")
	t.limit(0, 24)
	for i := range p.t.Levels {
		l := &p.t.Levels[i]
		name := l.Name()
		if name == "" {
			name = "not said"
		}
		t.add(append([]string{name}, p.amounts(0, 0, &l.Amounts)...)...)
	}
	p.end(t)
}

func (p *takeoffText) families() {
	if len(p.t.Families) < 2 {
		return
	}
	t := p.table("Family")
	for i := range p.t.Families {
		f := &p.t.Families[i]
		t.add(append([]string{f.Family}, p.amounts(f.Pieces, 0, &f.Amounts)...)...)
	}
	p.end(t)
}

// whole says what all of it comes to.
func (p *takeoffText) whole() {
	connections, waste := p.t.Allowance()
	gross := p.t.Gross()
	if connections.Mass > 0 || waste.Mass > 0 {
		t := p.table("Total", "")
		t.add(append([]string{"net", ""}, p.amounts(p.t.Pieces, 0, &p.t.Net)...)...)
		if connections.Mass > 0 {
			t.add(append([]string{"for connections", takeoff.Percent(p.t.Connections)}, p.amounts(0, 0, &connections)...)...)
		}
		if waste.Mass > 0 {
			t.add(append([]string{"for waste", takeoff.Percent(p.t.Waste)}, p.amounts(0, 0, &waste)...)...)
		}
		t.add(append([]string{"with allowances", ""}, p.amounts(p.t.Pieces, 0, &gross)...)...)
		p.end(t)
	}
	p.lines = append(p.lines, "")
	for _, f := range p.t.Facts() {
		p.say(f[0] + ": " + f[1])
	}
}

func (p *takeoffText) cuts() {
	if len(p.t.Cuts) == 0 {
		return
	}
	const marksWide = 42
	t := newTable("Cutting list", "grade", ">number", ">length m", ">tonnes", "marks")
	for i := range p.t.Cuts {
		c := &p.t.Cuts[i]
		var marks []string
		for _, line := range wrapList(c.Marks, marksWide) { // of a piece, its marks stay together where they can
			marks = append(marks, strings.Split(wrap(line, marksWide, "  "), "\n")...)
		}
		t.add(c.Section.Name(), c.Grade, count(c.Number), takeoff.Metres(c.Length), tonnes(c.Mass), marks[0])
		for _, more := range marks[1:] {
			t.add("", "", "", "", "", more)
		}
	}
	p.end(t)
}

func (p *takeoffText) list(what string, list []takeoff.LeftOut) {
	if len(list) == 0 {
		return
	}
	p.lines = append(p.lines, "", what)
	for i := range list {
		p.say("  " + list[i].String())
	}
}

// rated writes what a rate gives, and says where there is none.
func rated(n int64, x float64, decimals int) string {
	if n == 0 {
		return "no rate"
	}
	return fixed(x, decimals)
}

// count writes a number of things; none is a blank.
func count(n int64) string {
	if n == 0 {
		return ""
	}
	return strconv.FormatInt(n, 10)
}

func fixed(x float64, decimals int) string { return strconv.FormatFloat(x, 'f', decimals, 64) }

// tonnes writes grams in t.
func tonnes(grams int64) string { return fixed(float64(grams)/1e6, 3) }

// massPerMetre writes kg/m as the catalogue publishes it.
func massPerMetre(x float64) string {
	if x == 0 {
		return ""
	}
	return strconv.FormatFloat(x, 'f', max(1, decimalsOf(x)), 64)
}

func decimalsOf(x float64) int {
	_, part, _ := strings.Cut(strconv.FormatFloat(x, 'f', -1, 64), ".")
	return len(part)
}
