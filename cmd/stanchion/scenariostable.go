package main

import (
	"io"
	"strings"

	"stanchion/design"
	"stanchion/schedule/sidebyside"
	"stanchion/schedule/summary"
	"stanchion/schedule/workbook"
)

// fillRow says what came of a scenario.
func (r *run) fillRow(row *sidebyside.Row, lines []summary.Line) {
	c := &r.tally.Count
	row.Passing, row.Failing, row.NoSection, row.NotRead = c[design.Passes], c[design.Fails], c[design.NoSection], c[design.NotRead]
	steel := r.steelOf(lines)
	row.Pieces, row.Tonnes = steel.Pieces, steel.Net.Tonnes()
	row.HasCost, row.HasCarbon = steel.HasCost(), steel.HasCarbon()
	row.Cost, row.Carbon = steel.Net.Money(), steel.Net.TonnesCO2e()
	row.Unpriced, row.Unrated = steel.Unpriced.Mass > 0, steel.Unrated.Mass > 0
	sizes := map[string]bool{}
	for i := range steel.Sections {
		sizes[steel.Sections[i].Section.Name()] = true
	}
	row.Sizes = len(sizes)
	row.AtHand, row.New = r.atHand != nil, row.Tonnes
	for i := range lines {
		if res := &lines[i].Result; res.AtHand != "" {
			row.New -= res.Mass * float64(lines[i].Member.Column.Quantity) / 1000
		}
	}
}

// writer returns how the table is written.
func (s *scenariosRun) writer(r *run) (func(io.Writer) error, error) {
	format, toFile := r.apartFormat(s.format)
	switch {
	case format == "text" && !toFile, format == "txt" && toFile:
		return s.text, nil
	case format == "csv":
		return func(w io.Writer) error { return s.table.WriteCSV(w, s.decimal) }, nil
	case format == "xlsx" && toFile:
		return func(w io.Writer) error {
			return workbook.WriteNew(w, workbook.Laid([]workbook.Sheet{s.table.Page()}, s.paper))
		}, nil
	case toFile:
		return nil, usage(s.cmd, "-o %s: name a file ending in .xlsx, .csv or .txt", s.flags.output)
	}
	return nil, usage(s.cmd, "--format %s: give text or csv", format)
}

// scenariosTitle opens the table in text.
const scenariosTitle = "Scenarios of "

func (s *scenariosRun) text(w io.Writer) error {
	headings, rows := s.table.Text()
	t := newTable(headings...)
	t.limit(0, 28)
	for _, row := range rows {
		t.add(row...)
	}
	lines := append([]string{scenariosTitle + s.table.File, ""}, t.lines()...)
	lines = append(lines, "")
	for i := range s.table.Rows {
		if r := &s.table.Rows[i]; r.Changes != "" {
			lines = append(lines, wrap(r.Name+": "+r.Changes, screenWidth-2, "  "))
		}
	}
	for _, remark := range s.table.Remarks() {
		lines = append(lines, wrap("✗ "+remark, screenWidth-2, "  "))
	}
	_, err := io.WriteString(w, strings.Join(lines, "\n")+"\n")
	return err
}

// scenariosEarlier reports whether an earlier run wrote such a table.
func scenariosEarlier(path string) bool {
	return workbook.WrittenByUs(path) || beginsWith(path, func(line string) bool {
		return sidebyside.IsCSV(line) || strings.HasPrefix(line, scenariosTitle)
	})
}
