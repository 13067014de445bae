package schedule

import (
	"fmt"
	"math"
	"slices"
	"strings"
)

// Scan finds the schedule in a file and understands its header, number format,
// settings and rows. Rows of a source that is a Seeker are not kept.
func Scan(src Source, opts Options) (*Plan, error) {
	settings, notes, err := readAllSettings(src, &opts)
	if err != nil {
		return nil, err
	}
	l, err := findHeader(src, &opts, &settings.maps)
	if err != nil {
		return nil, err
	}
	if err := unusedMaps(src, settings, &notes); err != nil {
		return nil, err
	}
	s := newScanner(src, l, &opts)
	if err := s.run(); err != nil {
		return nil, err
	}
	return s.plan(settings.finish(), notes)
}

// unusedMaps refuses a mapping given on the command line whose heading no
// column has; one of the file's own is noted.
func unusedMaps(src Source, settings *settingsReader, notes *[]string) error {
	for _, e := range settings.maps.unused() {
		text := fmt.Sprintf("no heading reads %q, which is mapped", e.heading)
		if strings.HasPrefix(e.where, "-") || e.where == "" {
			return &Refusal{Problem: Problem{File: src.Name(), What: text, Do: "give the heading as it stands in the file"}}
		}
		*notes = append(*notes, e.where+": "+text)
	}
	return nil
}

// scanner goes once through the rows below the header.
type scanner struct {
	src     Source
	l       *layout
	opts    *Options
	classes *classifier
	vote    decimalVote
	marks   []int // columns of mark, stack and levels, -1 where there is none
	comb    int
	decides []decides // columns whose texts tell the decimal mark
	axial   []int     // columns of N_Ed

	refs     []rowRef
	groups   *groupScan
	keep     *rowStore // nil for a source that can seek
	summary  Summary
	positive int // N_Ed above 0
	negative int
	width    int
	cells    int
}

// decides is a column of numbers, and whether a value, in its unit, can be true.
type decides struct {
	col       int
	plausible func(float64) bool
	list      bool // a restraint list
}

func newScanner(src Source, l *layout, opts *Options) *scanner {
	s := &scanner{src: src, l: l, opts: opts, classes: newClassifier(l), marks: []int{-1, -1, -1, -1, -1}, comb: -1, width: l.width, cells: l.cells}
	if _, ok := src.(Seeker); !ok {
		s.keep = newRowStore(l)
	}
	for i := range l.bindings {
		b := &l.bindings[i]
		switch f := b.key.line(); f.name {
		case markField, stackField, levelField, fromField, toField:
			s.marks[f.name-markField] = b.Col
		case combinationField:
			s.comb = b.Col
		case restraintsField, torsionField:
			s.decides = append(s.decides, decides{col: b.Col, list: true})
		case lengthField:
			s.decides = append(s.decides, decides{col: b.Col, plausible: func(x float64) bool {
				return inRange(x*b.unit.factor, minLength, maxLength)
			}})
		default:
			if f.name == axialField {
				s.axial = append(s.axial, b.Col)
			}
			if f.of != noQuantity {
				s.decides = append(s.decides, decides{col: b.Col})
			}
		}
	}
	s.groups = newGroupScan(l)
	return s
}

// run reads all rows below the header.
func (s *scanner) run() error {
	for r, err := range s.src.Rows(s.l.sheet) {
		if err != nil {
			return err
		}
		if r.Number <= s.l.skipTo || r.Number == s.l.skipTo+1 && s.l.takeUnitRow(s.src, r) {
			continue
		}
		switch s.classes.kind(r) {
		case memberRow:
			s.member(r)
		case totalRow:
			s.summary.Totals++
		case headerRow:
			s.summary.Repeated++
		case footnoteRow:
			s.summary.Footnotes++
		}
	}
	return nil
}

// member takes a row of a member.
func (s *scanner) member(r *Row) {
	ref := rowRef{number: int32(r.Number), pos: r.Pos}
	who := newHasher
	for i, col := range s.marks {
		if cell := r.at(col); !cell.empty() {
			who.name(cell.text())
			if i < 2 {
				ref.key = 1 // mark or stack
			}
			continue
		}
		who.byte(0xfe)
	}
	if ref.key != 0 {
		ref.key = who.sum()
	}
	if cell := r.at(s.comb); !cell.empty() {
		h := newHasher
		h.name(cell.text())
		ref.comb = uint32(h.sum())
	}
	s.refs = append(s.refs, ref)
	s.groups.add(r)
	if s.keep != nil {
		s.keep.add(r)
	}
	if r.Hidden {
		s.summary.Hidden++
	}
	for i := range s.decides {
		s.see(r.at(s.decides[i].col), &s.decides[i])
	}
	for _, col := range s.axial {
		s.sign(r.at(col))
	}
	s.cells = max(s.cells, len(r.Cells))
	if len(r.Cells) > s.width {
		s.widen(r)
	}
}

// widen makes room for what a row holds to the right of the header.
func (s *scanner) widen(r *Row) {
	for i := len(r.Cells) - 1; i >= s.width; i-- {
		if !r.Cells[i].empty() {
			s.width = i + 1
			return
		}
	}
}

func (s *scanner) see(cell *Cell, d *decides) {
	if cell.Kind != Text || cell.Merged {
		return
	}
	if !d.list {
		s.vote.see(cell.Text, d.plausible)
		return
	}
	// In a list of heights a comma may be the separator: only a list parted
	// otherwise tells of its marks.
	items := strings.FieldsFunc(cell.Text, func(r rune) bool { return r == ';' || isSpace(r) })
	for _, item := range items {
		if strings.Contains(item, ".") || strings.Count(item, ",") == 1 && strings.Contains(cell.Text, ";") {
			s.vote.see(item, nil)
		}
	}
}

// sign counts an axial force by its sign.
func (s *scanner) sign(cell *Cell) {
	x := cell.Number
	if cell.Kind == Text {
		text := trim(cell.Text)
		if !strings.ContainsAny(text, "123456789") {
			return
		}
		x = 1
		if strings.HasPrefix(text, "-") || strings.HasPrefix(text, "−") || strings.HasPrefix(text, "–") {
			x = -1
		}
	} else if cell.Kind != Number {
		return
	}
	switch {
	case x > 0:
		s.positive++
	case x < 0:
		s.negative++
	}
}

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
	p.rows.groups = s.groups.clashes(p.rows.links, settings)
	sum := &p.Summary
	sum.Rows, sum.LeftAlone, sum.Other = len(s.refs), s.l.left, s.l.other
	for _, later := range p.rows.links.later {
		if !later {
			sum.Members++
		}
	}
	sum.Notes = append(notes, s.remarks(p)...)
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
		list = append(list, fmt.Sprintf("%d numbers do not fit the decimal mark %q that the others use", n, p.Decimal))
	}
	if p.Settings.Compression == "negative" && s.negative == 0 && s.positive > 0 {
		list = append(list, "compression is set to negative, and every N_Ed is positive: every member is in tension")
	}
	for i := range p.Header.Columns {
		b := &p.Header.Columns[i]
		if b.rank == 1 && (b.key.field == momentField || b.key.axis != noAxis) {
			list = append(list, fmt.Sprintf("%s (%q) is read as %s", b.Cell, b.Heading, b.Field))
		}
	}
	return list
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
		r.What, r.Do = "two headings for one field", "rename one, or map one with the setting map HEADING (to "+ignored+", to leave it alone)"
		for _, group := range s.l.clashes {
			for i := range group {
				r.Seen = append(r.Seen, Problem{Cell: group[i].Cell, What: fmt.Sprintf("%q is %s", group[i].Heading, group[i].title())})
			}
		}
	case len(s.refs) == 0:
		r.What, r.Do = "there are no members below the header", "give one row a column length"
	case s.negative > 0 && s.positive == 0 && settings.Compression == "":
		r.What = "every N_Ed is negative: is compression negative here?"
		r.Do = "give the setting compression=negative, or compression=positive if every column is in tension"
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
