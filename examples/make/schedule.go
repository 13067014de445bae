package main

import (
	"fmt"
	"math"
)

// line is one row of the schedule.
type line struct {
	mark, grid, from, to     string
	length                   float64 // m
	quantity                 int
	uls1, uls2               float64 // kN
	endsY, endsZ             string
	restraintsY, restraintsZ string
	torsion                  string
	family, section          string
	maxWidth                 float64 // mm; 0: none
	remark                   string
}

// revision is what one issue of the schedule says.
type revision struct {
	name    string
	plant   float64 // factor on the load of the roof
	ordered bool    // the sections are those that were ordered
}

var (
	firstIssue  = revision{name: "P01", plant: 1}
	secondIssue = revision{name: "P02", plant: 1.6, ordered: true}
)

// issue returns the rows of an issue of the schedule.
func issue(r revision) []line {
	var lines []line
	for i := range stacks {
		lines = append(lines, lengthsOf(&stacks[i], r)...)
	}
	lines = append(lines, canopy()...)
	if r.ordered {
		for i := range lines {
			lines[i].section = orderedSection(&lines[i])
			lines[i].family, lines[i].maxWidth = "", 0
		}
	}
	return lines
}

// lengthsOf returns the column lengths of a stack, the lowest first.
func lengthsOf(s *stack, r revision) []line {
	var lines []line
	for i := range storeys {
		f := &storeys[i]
		l := line{grid: s.grid, from: f.from, to: f.to, length: f.height, quantity: 1,
			mark: fmt.Sprintf("%s-%02d", s.grid, len(lines)+1), endsY: "pinned-pinned", endsZ: "pinned-pinned"}
		l.uls1, l.uls2 = s.forces(i, r.plant)
		if s.opening && f.to == "L1" {
			continue // one length with the storey above
		}
		if s.opening && f.to == "L2" {
			l.from, l.length = "L0", storeys[0].height+f.height
		}
		hold(&l)
		limit(&l)
		lines = append(lines, l)
	}
	return lines
}

// hold sets how a length is held beyond its ends.
func hold(l *line) {
	edge, wall := l.grid[0] == 'A' || l.grid[0] == 'D', l.grid[1] == '3'
	switch {
	case l.from == "L0" && l.to == "L2":
		l.endsY, l.endsZ = "partly fixed-pinned", "pinned-pinned"
		l.restraintsZ = "6.2"
		l.remark = "double height; tie beam one way at L1"
	case l.from == "L0" && edge:
		l.endsY = "partly fixed-pinned"
		l.restraintsZ = "2.1; 4.2"
		l.remark = "sheeting rails"
		if l.grid[1] == '2' {
			l.torsion = "ends"
			l.remark = "sheeting rails: no hold against twist"
		}
	case l.from == "L0" && wall:
		l.restraintsZ = "thirds"
		l.remark = "in blockwork wall"
	case l.from == "L0":
		l.endsY = "partly fixed-pinned"
	case l.from == "L2" && edge:
		l.restraintsZ = "mid"
		l.remark = "spandrel"
	case l.to == "Roof" && wall:
		l.restraintsY, l.restraintsZ = "2.1", "every 1.4"
	}
}

// limit sets which sections a length may have.
func limit(l *line) {
	switch {
	case l.grid == "A3" && l.from == "L0":
		l.section, l.remark = "254 x 254 x 73 UKC", "existing frame"
	case l.grid == "A3" && l.from == "L1":
		l.section, l.remark = "UC 203x203x60", "existing frame"
	case l.grid == "A3" && l.from == "L2":
		l.section, l.remark = "203 UC 46", "existing frame"
	case l.grid == "D1" && l.to == "Roof":
		l.section, l.remark = "HE200A", "from stock"
	case l.grid == "B1" && l.from == "L0" || l.grid == "C1" && l.from == "L0":
		l.family, l.remark = "SHS", "exposed, entrance"
	case l.grid == "C3" && l.from != "L0":
		l.maxWidth = 210
		l.remark = "within 225 partition"
	case l.grid == "D2" && l.from != "L0":
		l.family = "HEA, HEB"
	}
}

// canopy returns the posts that stand free before the hall.
func canopy() []line {
	return []line{
		{mark: "P-01", grid: "Canopy", from: "L0", to: "+4.8", length: 4.8, quantity: 4, uls1: 64, uls2: 41,
			endsY: "fixed-free", endsZ: "fixed-free", family: "CHS", remark: "cantilever post"},
		{mark: "P-02", grid: "Canopy", from: "L0", to: "+4.8", length: 4.8, quantity: 2, uls1: 112, uls2: 73,
			endsY: "fixed-free", endsZ: "fixed-free", family: "CHS", remark: "cantilever post"},
	}
}

// ordered are the sections bought for the first issue: few sizes, one through
// two storeys.
var ordered = map[string][3]string{ // L0 to L2, L2 to L4, above
	"corner":   {"203x203x71 UKC", "152x152x37 UKC", "152x152x23 UKC"},
	"edge":     {"254x254x89 UKC", "203x203x60 UKC", "152x152x30 UKC"},
	"interior": {"356x368x129 UKC", "254x254x89 UKC", "152x152x37 UKC"},
}

func orderedSection(l *line) string {
	switch {
	case l.section != "":
		return l.section // existing or from stock
	case l.mark == "P-01":
		return "CHS 139.7x3.6"
	case l.mark == "P-02":
		return "CHS 168.3x5.0"
	case l.family == "SHS":
		return "SHS 300x300x8.8"
	}
	kind := "edge"
	switch corner := l.grid[0] == 'A' || l.grid[0] == 'D'; {
	case corner && l.grid[1] != '2':
		kind = "corner"
	case !corner && l.grid[1] == '2':
		kind = "interior"
	}
	part := map[string]int{"L1": 0, "L2": 0, "L3": 1, "L4": 1, "Roof": 2}[l.to]
	return ordered[kind][part]
}

// pieces returns the number of pieces and their whole length, m.
func pieces(lines []line) (n int, length float64) {
	for i := range lines {
		n += lines[i].quantity
		length += float64(lines[i].quantity) * lines[i].length
	}
	return n, math.Round(length*1000) / 1000
}
