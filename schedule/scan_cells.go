package schedule

import (
	"strconv"
	"strings"
)

// stray is a column without a heading that members' rows have numbers in.
type stray struct {
	where string // of the first
	rows  int
}

// stray counts the numbers that stand under no heading: a second load case may
// have lost its own.
func (s *scanner) stray(r *Row) {
	for col := range r.Cells {
		if col < len(s.headed) && s.headed[col] || r.Cells[col].Kind == Blank || r.Cells[col].Merged || !isNumber(&r.Cells[col]) {
			continue
		}
		if s.strays[col] == nil {
			s.strays[col] = &stray{where: s.src.Where(s.l.sheet, r.Number, col)}
		}
		s.strays[col].rows++
	}
}

func isNumber(cell *Cell) bool {
	if cell.Kind != Text {
		return cell.Kind == Number
	}
	_, rest, err := splitNumber(cell.Text, '.')
	return err == nil && isUnitOrNothing(rest)
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
	// otherwise tells of its marks, or a spacing, which is one number.
	if spacing := everyNumber.FindStringSubmatch(cell.Text); spacing != nil {
		s.vote.see(spacing[1], nil)
		return
	}
	items := strings.FieldsFunc(cell.Text, func(r rune) bool { return r == ';' || isSpace(r) })
	for _, item := range items {
		if strings.Contains(item, ".") || strings.Count(item, ",") == 1 && strings.Contains(cell.Text, ";") {
			s.vote.see(item, nil)
		}
	}
}

// heaviest is what hardly any column has to carry, N: about what the heaviest
// section carries as a short column.
const heaviest = 50e6

// weigh counts an axial force that is hardly one in the unit assumed for it.
func (s *scanner) weigh(cell *Cell, b *Binding) {
	if b.named {
		return
	}
	x := cell.Number
	if cell.Kind == Text {
		x, _ = strconv.ParseFloat(trim(cell.Text), 64) // a number that is written otherwise has no say
	}
	if abs(x)*b.unit.factor > heaviest {
		s.heavy++
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
