package catalogue

import (
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"
)

// Piece is steel at hand: how many pieces of a section, and their length.
type Piece struct {
	Section *Section
	Grade   string  // as the list has it; empty: it says none
	Length  float64 // mm
	Number  int
	Line    int // of the list, from 1
}

// Pieces returns the pieces that a stock list counts, in its own order.
func (c *Catalogue) Pieces() []Piece { return c.pieces }

const (
	largestStock  = 64 << 20 // bytes
	problemsShown = 20
	longestPiece  = 60 // m
)

// stockColumns are the headings that a stock list may have, for messages.
const stockColumns = "section (or designation, size, name); or family with h_mm, b_mm, tw_mm, tf_mm, r_mm (hollow: d_mm or h_mm and b_mm, t_mm, finish; angles: h_mm, b_mm, t_mm, r1_mm, r2_mm) and mass_kg_m; number, length_m and grade for pieces at hand"

// Stock reads a list of the sections that may be used, as text in columns
// (comma, semicolon or tab; UTF-8, UTF-16 or Windows-1252) with a header, or as
// a bare list of names: sections of the catalogue, or a section's own
// dimensions in mm with its family. name is the file's, for messages. Every
// line that cannot be read is reported; the errors are joined.
func (c *Catalogue) Stock(r io.Reader, name string) (*Catalogue, error) {
	data, err := io.ReadAll(io.LimitReader(r, largestStock+1))
	if err == nil && len(data) > largestStock {
		err = fmt.Errorf("larger than %d MB: that is no stock list", largestStock>>20)
	}
	if err != nil {
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	rows, err := c.stockRows(data)
	if err != nil {
		return nil, fmt.Errorf("%s: %w; a stock list has the columns %s", name, err, stockColumns)
	}
	l := stockList{catalogue: c, byName: map[string]listed{}}
	var problems []error
	for i := range rows {
		if err := l.add(&rows[i]); err != nil {
			problems = append(problems, fmt.Errorf("%s, line %d: %w", name, rows[i].line, err))
		}
	}
	if n := len(problems); n > problemsShown {
		problems = append(problems[:problemsShown], fmt.Errorf("%s: %d more lines cannot be read", name, n-problemsShown))
	}
	if len(problems) > 0 {
		return nil, errors.Join(problems...)
	}
	if len(l.sections) == 0 {
		return nil, fmt.Errorf("%s: no section in the stock list; it has the columns %s", name, stockColumns)
	}
	stock := newCatalogue(l.sections)
	stock.pieces = l.pieces
	return stock, nil
}

// stockList is what has been read of a list.
type stockList struct {
	catalogue *Catalogue
	byName    map[string]listed
	sections  []*Section
	pieces    []Piece
}

type listed struct {
	section *Section
	line    int
}

// add reads a line. A section that stands there again must have the same
// dimensions; one that counts no pieces is not at hand.
func (l *stockList) add(r *stockRow) error {
	s, err := l.catalogue.stockSection(r)
	if s == nil || err != nil {
		return err
	}
	piece, err := r.piece()
	if err != nil {
		return err
	}
	k := plainKey(s.Name())
	before, again := l.byName[k]
	switch {
	case again && before.section.dimensions() != s.dimensions():
		return fmt.Errorf("%q stands in line %d with other dimensions: give one of them another name", s.Name(), before.line)
	case again:
		s = before.section
	case piece != nil && piece.Number == 0:
		return nil
	default:
		l.byName[k] = listed{s, r.line}
		l.sections = append(l.sections, s)
	}
	if piece != nil && piece.Number > 0 {
		piece.Section, piece.Grade, piece.Line = s, r.Grade, r.line
		l.pieces = append(l.pieces, *piece)
	}
	return nil
}

// dimensions are what two sections of one name must agree in.
func (s *Section) dimensions() [9]any {
	return [...]any{s.Family, s.Finish, s.H, s.B, s.Tw, s.Tf, s.R, s.R2, s.Mass}
}

// piece reads how many pieces a line counts and how long they are; nil where it
// says neither.
func (r *stockRow) piece() (*Piece, error) {
	if r.Number == "" && r.LengthM == "" && r.LengthMM == "" {
		return nil, nil
	}
	p := &Piece{Number: 1}
	if r.Number != "" {
		n, err := strconv.Atoi(r.Number)
		if err != nil || n < 0 {
			return nil, fmt.Errorf("number is %q: give how many pieces there are", r.Number)
		}
		p.Number = n
	}
	if p.Number == 0 {
		return p, nil
	}
	if r.LengthM != "" && r.LengthMM != "" {
		return nil, errors.New("gives length_m and length_mm: clear one of them")
	}
	text, unit, perMetre := r.LengthM, "m", 1.0
	if r.LengthMM != "" {
		text, unit, perMetre = r.LengthMM, "mm", 1000
	}
	length, err := number(text)
	if err != nil || !(length > 0) || length > longestPiece*perMetre {
		return nil, fmt.Errorf("length_%s is %q: give the length of a piece in %[1]s", unit, text)
	}
	p.Length = length / perMetre * 1000
	return p, nil
}

// number reads a plain decimal number with point or comma.
func number(text string) (float64, error) {
	v, err := strconv.ParseFloat(strings.Replace(text, ",", ".", 1), 64)
	if err == nil && (math.IsNaN(v) || math.IsInf(v, 0)) {
		err = strconv.ErrRange
	}
	return v, err
}
