package workbook

import "github.com/xuri/excelize/v2"

// Role says what a cell is, and so how it is drawn.
type Role uint8

// The roles.
const (
	Plain     Role = iota
	Title          // of a sheet
	Group          // heading over several headings
	Heading        // of a column
	Unit           // below a heading
	Label          // names what stands beside it
	Remark         // small print
	Total          // a sum below a column
	Input          // to be filled in by a person
	Result         // of a member
	Passes         // a member that passes
	Fails          // a member that fails
	NoSection      // a member without a section
	NotRead        // a row that could not be read
	Changed        // something that differs from an earlier issue
	Added          // something that an earlier issue does not have
	Gone           // something that only the earlier issue has
	Spare          // a member that has more than it needs
	Perhaps        // something for a person to decide
)

// Align is where a cell's content stands.
type Align uint8

// The alignments; Usual is left for text and right for numbers.
const (
	Usual Align = iota
	Left
	Centre
	Right
)

// Look is how a cell is drawn: its role, and what differs within it.
type Look struct {
	Role   Role
	Format string // number format; empty: general
	Align  Align
	Wrap   bool
	Bold   bool
	Edge   bool // a line at its left: something new begins here
	Link   bool // drawn as a link
}

// The colours: dark slate for what is ours, and for the outcomes a blue, an
// orange and a yellow that people with any common colour blindness tell apart;
// printed in black and white the outcomes differ by darkness, mark and word.
const (
	inkDark     = "1F2A33"
	inkLight    = "FFFFFF"
	inkMuted    = "5A6670"
	inkLink     = "1F4E79"
	fillHead    = "2F4858"
	fillGroup   = "D5DEE4"
	fillUnit    = "EEF2F4"
	fillInput   = "FFFBE6"
	fillFail    = "B5430B"
	fillNone    = "E8A76F"
	fillRead    = "F5E663"
	fillChanged = "CFE2F0"
	fillAdded   = "E3DCF0"
	fillGone    = "DADADA"
	fillSpare   = "FBE6C8"
	lineSoft    = "C4CDD3"
	lineHard    = "2F4858"
)

// lettering is the font that the workbook uses for its plain cells.
type lettering struct {
	family string
	size   float64
}

// style returns the look as the library takes it.
func (l Look) style(base lettering) *excelize.Style {
	s := &excelize.Style{
		Font:      &excelize.Font{Family: base.family, Size: base.size, Color: inkDark, Bold: l.Bold},
		Alignment: &excelize.Alignment{Vertical: "center", WrapText: l.Wrap, Horizontal: [...]string{"", "left", "center", "right"}[l.Align]},
	}
	if l.Format != "" {
		s.CustomNumFmt = &l.Format
	}
	l.draw(s)
	if l.Link {
		s.Font.Color, s.Font.Underline = inkLink, "single"
	}
	if l.Edge {
		s.Border = append(withoutSide(s.Border, "left"), excelize.Border{Type: "left", Color: lineHard, Style: 2})
	}
	return s
}

func (l Look) draw(s *excelize.Style) {
	switch l.Role {
	case Title:
		s.Font.Bold, s.Font.Size = true, s.Font.Size+3
	case Group:
		s.Font.Bold = true
		fill(s, fillGroup)
		box(s, lineSoft)
		if l.Align == Usual {
			s.Alignment.Horizontal = "center"
		}
		l.indent(s)
	case Heading:
		s.Font.Bold, s.Font.Color = true, inkLight
		fill(s, fillHead)
		box(s, lineSoft)
		s.Alignment.WrapText = true
		l.indent(s)
	case Unit:
		s.Font.Italic, s.Font.Color = true, inkMuted
		fill(s, fillUnit)
		box(s, lineSoft)
		l.indent(s)
	case Label:
		s.Font.Bold = true
	case Remark:
		s.Font.Color = inkMuted
	case Total:
		s.Font.Bold = true
		s.Border = []excelize.Border{{Type: "top", Color: lineHard, Style: 1}}
		l.indent(s)
	case Input:
		fill(s, fillInput)
		box(s, lineSoft)
		s.Protection = &excelize.Protection{Locked: false}
	case Result:
		box(s, lineSoft)
		l.indent(s)
	case Passes, Fails, NoSection, NotRead, Changed, Added, Gone, Spare, Perhaps:
		box(s, lineSoft)
		l.indent(s)
		l.drawOutcome(s)
	}
}

// indent keeps the contents of neighbouring cells apart.
func (l Look) indent(s *excelize.Style) {
	if l.Align == Left || l.Align == Right {
		s.Alignment.Indent = 1
	}
}

// drawOutcome puts a mark before the word by number format, so that the cell
// holds the word alone.
func (l Look) drawOutcome(s *excelize.Style) {
	o := outcomeLooks[l.Role]
	mark := `;;;"` + o.mark + ` "@`
	if o.fill != "" {
		s.Font.Bold = true
		fill(s, o.fill)
	}
	if o.fill == fillFail {
		s.Font.Color = inkLight
	}
	s.CustomNumFmt = &mark
}

// outcomeLooks are the marks and fills of outcomes.
var outcomeLooks = map[Role]struct{ mark, fill string }{
	Passes:    {"✓", ""},
	Fails:     {"✗", fillFail},
	NoSection: {"✗", fillNone},
	NotRead:   {"?", fillRead},
	Changed:   {"≠", fillChanged},
	Added:     {"+", fillAdded},
	Gone:      {"−", fillGone},
	Spare:     {"▼", fillSpare},
	Perhaps:   {"?", fillRead},
}

func fill(s *excelize.Style, colour string) {
	s.Fill = excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}}
}

func box(s *excelize.Style, colour string) {
	for _, side := range []string{"left", "right", "top", "bottom"} {
		s.Border = append(s.Border, excelize.Border{Type: side, Color: colour, Style: 1})
	}
}

func withoutSide(in []excelize.Border, side string) []excelize.Border {
	var out []excelize.Border
	for _, b := range in {
		if b.Type != side {
			out = append(out, b)
		}
	}
	return out
}

// Decimals returns the number format with so many decimals.
func Decimals(n int) string {
	if n <= 0 {
		return "0"
	}
	return "0." + "000000000000000"[:min(n, 15)]
}
