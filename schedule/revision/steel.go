package revision

import (
	"math"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule/takeoff"
)

// massOf returns the mass of all pieces of a member in the section of a result,
// g, as the take-off counts it.
func massOf(r *design.Result, m *Member) int64 {
	return int64(math.Round(r.MassPerM*m.Column.Length)) * int64(m.Column.Quantity)
}

// sectionOf returns the section of a result; nil for none that passes or is
// given.
func sectionOf(e *search.Engine, r *design.Result) *catalogue.Section {
	if r.Status == design.NotRead || r.Status == design.NoSection || r.Section == "" {
		return nil
	}
	s, err := e.Section(r.Section)
	if err != nil {
		return nil
	}
	return s
}

// weigh counts the steel of both issues.
func (c *comparer) weigh() {
	c.Before = *c.steelOf(len(c.Old.Members), func(i int) (*Member, *catalogue.Section, string) {
		m := &c.Old.Members[i]
		return m, m.Section, m.Grade
	})
	c.Issued = *c.steelOf(len(c.Rows), func(i int) (*Member, *catalogue.Section, string) {
		m := c.Rows[i].New
		return m, m.Section, m.Grade
	})
	of := func(result func(*Row) *design.Result) *takeoff.TakeOff {
		return c.steelOf(len(c.Rows), func(i int) (*Member, *catalogue.Section, string) {
			r := result(&c.Rows[i])
			return c.Rows[i].New, sectionOf(c.engine, r), r.Grade
		})
	}
	c.Staying = *of(func(r *Row) *design.Result { return &r.Kept.Result })
	c.Light = *of(func(r *Row) *design.Result { return &r.Lightest })
}

// steelOf counts the steel of members in the sections that they are given here.
func (c *comparer) steelOf(n int, at func(i int) (*Member, *catalogue.Section, string)) *takeoff.TakeOff {
	var items []takeoff.Item
	var leftOut []takeoff.LeftOut
	for i := range n {
		m, s, grade := at(i)
		if s == nil || !m.Readable() {
			leftOut = append(leftOut, takeoff.LeftOut{Name: m.Name(), Cell: m.Column.Cell, Why: "no section"})
			continue
		}
		items = append(items, takeoff.ItemOf(&m.Column, s, grade))
	}
	return takeoff.Of(items, leftOut, takeoff.Options{Splices: c.options.Splices, Every: c.options.Every})
}
