// Package sidebyside sets what comes of one schedule under several settings
// into one table: text in columns, a list and a sheet.
package sidebyside

import (
	"fmt"
	"strconv"
)

// Table is the scenarios of one schedule. The first is what the others are
// measured against.
type Table struct {
	File string
	Rows []Row
}

// Row is what came of one scenario.
type Row struct {
	Name    string
	Changes string // what it changes
	Why     string // why nothing came of it; empty: the rest is filled

	Passing, Failing, NoSection, NotRead int

	Pieces  int64
	Tonnes  float64
	New     float64 // t bought new, where steel at hand is used
	AtHand  bool
	Sizes   int     // different sections
	Heavier float64 // Tonnes against the first scenario's, as a part of it; 0: nothing to measure against

	Cost, Carbon       float64 // in the currency of the rates, and t of CO2e
	HasCost, HasCarbon bool    // there are rates
	Unpriced, Unrated  bool    // and some steel has none
}

// Measure fills in how much heavier each is than the first.
func (t *Table) Measure() {
	first := &t.Rows[0]
	for i := range t.Rows[1:] {
		if r := &t.Rows[i+1]; r.Why == "" && first.Why == "" && first.Tonnes > 0 {
			r.Heavier = r.Tonnes/first.Tonnes - 1
		}
	}
}

func (t *Table) any(has func(*Row) bool) bool {
	for i := range t.Rows {
		if has(&t.Rows[i]) {
			return true
		}
	}
	return false
}

// column is one column of the table in every form.
type column struct {
	heading, unit string
	key           string // in a list
	decimals      int
	percent       bool
	value         func(*Row) (x float64, ok bool)
}

// Heading is a column's heading on a sheet and in text.
func (c *column) title() string {
	if c.unit == "" {
		return c.heading
	}
	return c.heading + " [" + c.unit + "]"
}

func count(n func(*Row) int) func(*Row) (float64, bool) {
	return func(r *Row) (float64, bool) { return float64(n(r)), true }
}

// columns are those of numbers that the scenarios have.
func (t *Table) columns() []column {
	list := []column{
		{heading: "Pass", key: "pass", value: count(func(r *Row) int { return r.Passing })},
		{heading: "Fail", key: "fail", value: count(func(r *Row) int { return r.Failing })},
		{heading: "No section", key: "no_section", value: count(func(r *Row) int { return r.NoSection })},
		{heading: "Not read", key: "not_read", value: count(func(r *Row) int { return r.NotRead })},
		{heading: "Steel", unit: "t", key: "steel_t", decimals: 2, value: func(r *Row) (float64, bool) { return r.Tonnes, true }},
		{heading: "against the first", key: "against_first", decimals: 1, percent: true, value: func(r *Row) (float64, bool) { return r.Heavier, r != &t.Rows[0] }},
		{heading: "Sizes", key: "sizes", value: count(func(r *Row) int { return r.Sizes })},
	}
	if t.any(func(r *Row) bool { return r.AtHand }) {
		list = append(list, column{heading: "bought new", unit: "t", key: "new_t", decimals: 2, value: func(r *Row) (float64, bool) { return r.New, true }})
	}
	if t.any(func(r *Row) bool { return r.HasCost }) {
		list = append(list, column{heading: "Cost", key: "cost", value: func(r *Row) (float64, bool) { return r.Cost, r.HasCost && !r.Unpriced }})
	}
	if t.any(func(r *Row) bool { return r.HasCarbon }) {
		list = append(list, column{heading: "CO2e", unit: "t", key: "carbon_t", decimals: 2, value: func(r *Row) (float64, bool) { return r.Carbon, r.HasCarbon && !r.Unrated }})
	}
	return list
}

// cell writes a value for people.
func (c *column) cell(r *Row) string {
	x, ok := c.value(r)
	switch {
	case !ok || r.Why != "":
		return ""
	case c.percent:
		return fmt.Sprintf("%+.*f %%", c.decimals, 100*x)
	}
	return strconv.FormatFloat(x, 'f', c.decimals, 64)
}

// Text returns headings and rows of cells for a screen; a heading that opens
// with ">" stands over numbers.
func (t *Table) Text() (headings []string, rows [][]string) {
	columns := t.columns()
	headings = []string{"Scenario"}
	for i := range columns {
		heading := columns[i].heading
		if columns[i].unit != "" {
			heading += " " + columns[i].unit
		}
		headings = append(headings, ">"+heading)
	}
	for i := range t.Rows {
		row := []string{t.Rows[i].Name}
		for j := range columns {
			row = append(row, columns[j].cell(&t.Rows[i]))
		}
		rows = append(rows, row)
	}
	return headings, rows
}

// counted writes a number with what it counts.
func counted(n int, one, more string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, more)
}

// Remarks say what the numbers do not; what holds for every scenario, once.
func (t *Table) Remarks() []string {
	of := make([][]string, len(t.Rows))
	count := map[string]int{}
	for i := range t.Rows {
		of[i] = t.Rows[i].remarks()
		for _, s := range of[i] {
			count[s]++
		}
	}
	common := func(s string) bool { return len(t.Rows) > 1 && count[s] == len(t.Rows) }
	var list []string
	for i := range t.Rows {
		for _, s := range of[i] {
			switch {
			case !common(s):
				list = append(list, t.Rows[i].Name+": "+s)
			case i == 0:
				list = append(list, "every scenario: "+s)
			}
		}
	}
	return list
}

// remarks say what the numbers of a scenario do not.
func (r *Row) remarks() []string {
	var list []string
	add := func(is bool, s string) {
		if is {
			list = append(list, s)
		}
	}
	add(r.Why != "", r.Why)
	add(r.Failing > 0, counted(r.Failing, "member fails", "members fail"))
	add(r.NoSection > 0, counted(r.NoSection, "member has no section, and its steel is not counted", "members have no section, and their steel is not counted"))
	add(r.NotRead > 0, counted(r.NotRead, "member could not be read, and its steel is not counted", "members could not be read, and their steel is not counted"))
	add(r.AtHand && (r.HasCost || r.HasCarbon), "steel at hand is counted at the rates of new steel")
	add(r.HasCost && r.Unpriced, "some of its steel has no cost rate")
	add(r.HasCarbon && r.Unrated, "some of its steel has no carbon factor")
	return list
}
