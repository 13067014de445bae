package catalogue

import (
	"bytes"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"github.com/gocarina/gocsv"
)

// Piece is steel at hand: how many pieces of a section, and their length.
type Piece struct {
	Section *Section
	Length  float64 // mm
	Number  int
}

// Pieces returns the pieces that a stock list counts, in its own order.
func (c *Catalogue) Pieces() []Piece { return c.pieces }

// stockRow is one line of a stock list: a name, or a section's own dimensions.
type stockRow struct {
	Name   string `csv:"section,designation,size,name"`
	Family string `csv:"family"`
	Finish string `csv:"finish"`
	H      string `csv:"h_mm"`
	B      string `csv:"b_mm"`
	Tw     string `csv:"tw_mm"`
	Tf     string `csv:"tf_mm"`
	R      string `csv:"r_mm"`
	D      string `csv:"d_mm"`
	T      string `csv:"t_mm"`
	R1     string `csv:"r1_mm"`
	R2     string `csv:"r2_mm"`
	Mass   string `csv:"mass_kg_m"`
	Number string `csv:"number"`
	Length string `csv:"length_m"`
}

// stockColumns are the headings that a stock list may have.
const stockColumns = "section (or designation, size, name); or family with h_mm, b_mm, tw_mm, tf_mm, r_mm (hollow: d_mm or h_mm and b_mm, t_mm, finish; angles: h_mm, b_mm, t_mm, r1_mm, r2_mm) and mass_kg_m; number and length_m for pieces at hand"

// Stock reads a list of the sections that may be used, as comma or semicolon
// separated text with a header: names of the catalogue, or a section's own
// dimensions in mm with its family. name is the file's, for messages. Every
// line that cannot be read is reported; the errors are joined.
func (c *Catalogue) Stock(r io.Reader, name string) (*Catalogue, error) {
	data, err := io.ReadAll(io.LimitReader(r, 64<<20))
	if err != nil {
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	data = bytes.TrimPrefix(data, []byte("\ufeff"))
	rows, err := stockRows(data)
	if err != nil {
		return nil, fmt.Errorf("%s: %w; a stock list has the columns %s", name, err, stockColumns)
	}
	var sections []*Section
	var pieces []Piece
	var problems []error
	for i := range rows {
		s, err := c.stockSection(&rows[i])
		if err != nil {
			problems = append(problems, fmt.Errorf("%s, line %d: %w", name, i+2, err))
			continue
		}
		if s == nil {
			continue // a blank line
		}
		at := slices.IndexFunc(sections, func(o *Section) bool { return o.Name() == s.Name() })
		if at < 0 {
			sections = append(sections, s)
		} else {
			s = sections[at]
		}
		piece, err := rows[i].piece(s)
		if err != nil {
			problems = append(problems, fmt.Errorf("%s, line %d: %w", name, i+2, err))
			continue
		}
		if piece.Number > 0 {
			pieces = append(pieces, piece)
		}
	}
	if len(problems) > 0 {
		return nil, errors.Join(problems...)
	}
	if len(sections) == 0 {
		return nil, fmt.Errorf("%s: no section in the stock list; it has the columns %s", name, stockColumns)
	}
	stock := newCatalogue(sections)
	stock.pieces = pieces
	return stock, nil
}

// stockRows reads the lines with the headings in any case.
func stockRows(data []byte) ([]stockRow, error) {
	line, _, _ := bytes.Cut(data, []byte("\n"))
	comma := ','
	if bytes.Count(line, []byte(";")) > bytes.Count(line, []byte(",")) {
		comma = ';'
	}
	if bytes.Count(line, []byte("\t")) > bytes.Count(line, []byte(string(comma))) {
		comma = '\t'
	}
	reader := csv.NewReader(bytes.NewReader(append(bytes.ToLower(line), data[len(line):]...)))
	reader.Comma = comma
	reader.TrimLeadingSpace = true
	reader.FieldsPerRecord = -1
	reader.LazyQuotes = true
	var rows []stockRow
	if err := gocsv.UnmarshalCSV(trimmedHeader{reader}, &rows); err != nil {
		return nil, err
	}
	return rows, nil
}

// trimmedHeader takes the blanks off every field.
type trimmedHeader struct{ *csv.Reader }

func (t trimmedHeader) Read() ([]string, error) {
	record, err := t.Reader.Read()
	for i := range record {
		record[i] = strings.TrimSpace(record[i])
	}
	return record, err
}

func (t trimmedHeader) ReadAll() ([][]string, error) {
	var all [][]string
	for {
		record, err := t.Read()
		if err == io.EOF {
			return all, nil
		}
		if err != nil {
			return nil, err
		}
		all = append(all, record)
	}
}

// stockSection finds the section that a line names, or builds it from the
// line's dimensions; nil for a blank line.
func (c *Catalogue) stockSection(r *stockRow) (*Section, error) {
	own := r.H + r.D + r.T + r.Tw
	switch {
	case r.Name == "" && own == "" && r.Family == "":
		return nil, nil
	case own == "":
		if r.Name == "" {
			return nil, errors.New("names no section and gives no dimensions")
		}
		return c.Find(strings.TrimSpace(r.Name+" "+r.Finish), FindOptions{Families: nonEmpty(r.Family)})
	}
	return r.ownSection()
}

func nonEmpty(s string) []string {
	if s == "" {
		return nil
	}
	return []string{s}
}

// ownSection builds a section from a line's dimensions, and refuses those that
// no section can have.
func (r *stockRow) ownSection() (*Section, error) {
	specs, err := ParseFamilies(r.Family + " " + r.Finish)
	if err != nil {
		return nil, err
	}
	if len(specs) != 1 {
		return nil, fmt.Errorf("family %q stands for several: give one of %s", r.Family, strings.Join(FamilyNames(), ", "))
	}
	d := &row{Designation: r.Name, Family: specs[0].Family, Standard: "own dimensions"}
	finish := specs[0].Finish
	shape := families[d.Family].shape
	if (shape == ShapeCHS || shape == ShapeRHS) && finish == FinishNone {
		return nil, errors.New("a hollow section with its own dimensions needs its finish: hot or cold")
	}
	if finish == HotFinished {
		d.Finish = "hot"
	} else if finish == ColdFormed {
		d.Finish = "cold"
	}
	if err := r.dimensions(d, shape); err != nil {
		return nil, err
	}
	s := d.section()
	if d.Designation == "" {
		s.Designation = s.madeName()
	}
	if s.Nominal == "" {
		s.Nominal = fmt.Sprintf("%gx%g", math.Round(s.H), math.Round(s.B))
	}
	if !(s.A > 0 && s.Iz > 0 && s.Iy > 0) {
		return nil, errors.New("these dimensions enclose no steel: check them")
	}
	if fromArea := s.A * 7850e-6; s.Mass == 0 {
		s.Mass = math.Round(fromArea*10) / 10
	} else if math.Abs(s.Mass/fromArea-1) > 0.05 {
		return nil, fmt.Errorf("mass %g kg/m does not fit the dimensions, which give %.1f kg/m: check both", s.Mass, fromArea)
	}
	return s, nil
}

// dimensions reads the columns that a shape needs and checks that they leave
// a section.
func (r *stockRow) dimensions(d *row, shape Shape) error {
	type need struct {
		text string
		name string
		to   *float64
		zero bool
	}
	var needs []need
	switch shape {
	case ShapeI, ShapeChannel:
		needs = []need{{r.H, "h_mm", &d.H, false}, {r.B, "b_mm", &d.B, false}, {r.Tw, "tw_mm", &d.Tw, false}, {r.Tf, "tf_mm", &d.Tf, false}, {r.R, "r_mm", &d.R, true}}
	case ShapeCHS:
		needs = []need{{r.D, "d_mm", &d.D, false}, {r.T, "t_mm", &d.T, false}}
	case ShapeRHS:
		needs = []need{{r.H, "h_mm", &d.H, false}, {r.B, "b_mm", &d.B, false}, {r.T, "t_mm", &d.T, false}}
	case ShapeAngle:
		needs = []need{{r.H, "h_mm", &d.H, false}, {r.B, "b_mm", &d.B, false}, {r.T, "t_mm", &d.T, false}, {r.R1, "r1_mm", &d.R1, true}, {r.R2, "r2_mm", &d.R2, true}}
	}
	if r.Mass != "" {
		needs = append(needs, need{r.Mass, "mass_kg_m", &d.Mass, false})
	}
	for _, n := range needs {
		v, err := strconv.ParseFloat(strings.Replace(n.text, ",", ".", 1), 64)
		if err != nil || math.IsInf(v, 0) || math.IsNaN(v) || v < 0 || v == 0 && !n.zero || v > 5000 {
			return fmt.Errorf("%s is %q: a %s section needs it as a number of mm (kg/m for the mass)", n.name, n.text, d.Family)
		}
		*n.to = v
	}
	room := true
	switch shape {
	case ShapeI:
		room = d.H > 2*(d.Tf+d.R) && d.B > d.Tw+2*d.R
	case ShapeChannel:
		room = d.H > 2*(d.Tf+d.R) && d.B > d.Tw+d.R
	case ShapeCHS:
		room = d.D > 2*d.T
	case ShapeRHS:
		room = d.H >= d.B && d.B > 6*d.T
	case ShapeAngle:
		room = d.H >= d.B && d.B > d.T+d.R1+d.R2 && d.R2 <= d.T
	}
	if !room {
		return errors.New("these dimensions do not make a section: the depth must exceed twice flange and root radius, the width the web and its radii; for hollow sections and angles the greater side is h_mm")
	}
	return nil
}

// madeName is a name for a section that a stock list gives by dimensions alone.
func (s *Section) madeName() string {
	switch s.Shape {
	case ShapeCHS:
		return fmt.Sprintf("CHS %gx%g", s.H, s.Tw)
	case ShapeRHS, ShapeAngle:
		return fmt.Sprintf("%s %gx%gx%g", strings.Fields(s.Family)[0], s.H, s.B, s.Tw)
	default:
		return fmt.Sprintf("%s %gx%gx%gx%g", s.Family, s.H, s.B, s.Tw, s.Tf)
	}
}

// piece reads how many pieces a line counts and how long they are.
func (r *stockRow) piece(s *Section) (Piece, error) {
	if r.Number == "" && r.Length == "" {
		return Piece{}, nil
	}
	number := 1
	if r.Number != "" {
		n, err := strconv.Atoi(r.Number)
		if err != nil || n < 0 {
			return Piece{}, fmt.Errorf("number is %q: give how many pieces there are", r.Number)
		}
		number = n
	}
	length, err := strconv.ParseFloat(strings.Replace(r.Length, ",", ".", 1), 64)
	if err != nil || !(length > 0) || length > 60 {
		return Piece{}, fmt.Errorf("length_m is %q: give the length of a piece in m", r.Length)
	}
	return Piece{Section: s, Length: length * 1000, Number: number}, nil
}
