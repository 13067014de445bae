package schedule

import (
	"fmt"
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
	if err := l.settleTypes(src); err != nil {
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
	decides []decides  // columns whose texts tell the decimal mark
	axial   []*Binding // columns of N_Ed

	refs     []rowRef
	groups   *groupScan
	keep     *rowStore // nil for a source that can seek
	summary  Summary
	positive int // N_Ed above 0
	negative int
	heavy    int // N_Ed beyond any rolled column, in a unit that nobody named
	width    int
	cells    int
	headed   []bool         // columns with a text in the header
	strays   map[int]*stray // by column
}

// decides is a column of numbers, and whether a value, in its unit, can be true.
type decides struct {
	col       int
	plausible func(float64) bool
	list      bool // a restraint list
}

func newScanner(src Source, l *layout, opts *Options) *scanner {
	s := &scanner{src: src, l: l, opts: opts, strays: map[int]*stray{}, classes: newClassifier(l), marks: []int{-1, -1, -1, -1, -1}, comb: -1, width: l.width, cells: l.cells}
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
				s.axial = append(s.axial, b)
			}
			if f.of != noQuantity {
				s.decides = append(s.decides, decides{col: b.Col})
			}
		}
	}
	for col := range l.texts {
		s.headed = append(s.headed, make([]bool, max(0, col+1-len(s.headed)))...)
		s.headed[col] = true
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
	for _, b := range s.axial {
		s.sign(r.at(b.Col))
		s.weigh(r.at(b.Col), b)
	}
	s.stray(r)
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
