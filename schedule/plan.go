package schedule

import (
	"fmt"
	"maps"
	"math"
	"slices"
)

// plan puts together what was found, or refuses the file.
func (s *scanner) plan(settings *Settings, notes []string) (*Plan, error) {
	if err := s.refuse(settings); err != nil {
		return nil, err
	}
	names, err := newNames(s.opts, settings)
	if err != nil {
		return nil, err
	}
	hint := byte(0)
	if h, ok := s.src.(DecimalHinter); ok {
		hint = h.DecimalHint()
	}
	p := &Plan{File: s.src.Name(), Sheet: s.l.sheet, Decimal: s.vote.mark(hint), Settings: *settings, Summary: s.summary, loadsOptional: s.opts.LoadsOptional, Stock: names.stock}
	p.Header = Header{First: s.l.first, Last: s.l.last, UnitRow: s.l.unitRow, Columns: s.l.bindings, Width: s.freeColumn(), Cells: s.cells}
	for _, o := range s.l.old {
		p.Header.Old = append(p.Header.Old, o.col)
	}
	p.rows = &rows{src: s.src, plan: p, names: names, links: link(s.refs), keep: s.keep, old: s.l.old}
	p.rows.groups = s.groups.clashes(p.rows.links, settings, rowWord(s.src, s.l.sheet))
	sum := &p.Summary
	sum.Rows, sum.LeftAlone, sum.Other = len(s.refs), s.l.left, s.l.other
	for _, later := range p.rows.links.later {
		if !later {
			sum.Members++
		}
	}
	sum.Notes = append(notes, s.remarks(p)...)
	if n := s.vote.unsure(hint); n != "" {
		sum.Notes = append(sum.Notes, fmt.Sprintf("%q is read with the decimal mark %q, and no number tells that it is one: leave it out where it groups thousands", n, p.Decimal))
	}
	return p, nil
}

// freeColumn is the first column right of the user's own.
func (s *scanner) freeColumn() int {
	width := s.width
	for width > 0 && slices.ContainsFunc(s.l.old, func(o oldColumn) bool { return o.col == width-1 }) {
		width--
	}
	return width
}

// remarks are what a person should know of how the file was taken.
func (s *scanner) remarks(p *Plan) []string {
	var list []string
	if n := s.vote.mixed(); n > 0 {
		what := "1 number does"
		if n > 1 {
			what = fmt.Sprintf("%d numbers do", n)
		}
		list = append(list, fmt.Sprintf("%s not fit the decimal mark %q that the others use", what, p.Decimal))
	}
	if s.heavy > 0 && 2*s.heavy > s.positive+s.negative {
		list = append(list, "most N_Ed are above 50 MN, which hardly any column carries: if they are in N, say so in the heading, as N_Ed [N]")
	}
	if p.Settings.Compression == "negative" && s.negative == 0 && s.positive > 0 {
		list = append(list, "compression is set to negative, and every N_Ed is positive: every member is in tension")
	}
	for _, col := range slices.Sorted(maps.Keys(s.strays)) {
		what := "a number stands"
		if n := s.strays[col].rows; n > 1 {
			what = fmt.Sprintf("numbers stand in %d rows", n)
		}
		list = append(list, fmt.Sprintf("%s: %s under no heading, and %s not read", s.strays[col].where, what, isOrAre(s.strays[col].rows)))
	}
	for i := range p.Header.Columns {
		b := &p.Header.Columns[i]
		if b.rank == 1 && (b.key.field == momentField || b.key.field == familyField || b.key.axis != noAxis) {
			list = append(list, fmt.Sprintf("%s (%q) is read as %s", b.Cell, b.Heading, b.Field))
		} else if b.hidden {
			list = append(list, fmt.Sprintf("%s (%q) is hidden, and %s is read from it", b.Cell, b.Heading, b.title()))
		}
	}
	return list
}

func isOrAre(n int) string {
	if n > 1 {
		return "are"
	}
	return "is"
}

// refuse says why a run cannot go on with what was found.
func (s *scanner) refuse(settings *Settings) error {
	r := &Refusal{Problem: Problem{File: s.src.Name(), Cell: s.place()}}
	switch {
	case len(s.l.troubles) > 0:
		r.What, r.Do = "the header cannot be read as it stands", "mend the headings, or map them with the setting map HEADING"
		r.Seen = s.l.troubles
		for i := range r.Seen {
			r.Seen[i].File = ""
		}
	case len(s.l.clashes) > 0:
		r.What, r.Do = "two headers for one field", "rename one, or map one with the setting map HEADING (to "+ignored+", to leave it alone)"
		for _, group := range s.l.clashes {
			for i := range group {
				r.Seen = append(r.Seen, Problem{Cell: group[i].Cell, What: fmt.Sprintf("%q is %s", group[i].Heading, group[i].title())})
			}
		}
	case len(s.refs) == 0:
		r.What, r.Do = "there are no members below the header", "give one row a column length"
	case s.negative > 0 && s.positive == 0 && settings.Compression == "":
		r.What = "every N_Ed is negative, so compression seems to be negative here"
		r.Do = "say so with the setting compression=negative, or with compression=positive if every column is in tension"
	case len(s.refs) > math.MaxInt32-1:
		r.What = "there are too many rows"
	default:
		return nil
	}
	return r
}

// place names the header in a message.
func (s *scanner) place() string {
	if rn, ok := s.src.(RowNamer); ok {
		return rn.WhereRow(s.l.sheet, s.l.last)
	}
	col := 0
	if len(s.l.bindings) > 0 {
		col = s.l.bindings[0].Col
	}
	return s.src.Where(s.l.sheet, s.l.last, col)
}
