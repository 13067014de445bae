package workbook

import (
	"fmt"
	"strings"
	"unicode/utf16"
)

// grafting is what became of the project's own sheets: where they stand in the
// new workbook, and the styles that were made for them and for the block.
type grafting struct {
	moved    []int // of each old sheet: its new place; -1: it is gone
	sheets   []graftedSheet
	added    []addedSheet
	styles   map[Look]int
	formulas bool // the own sheets hold formulas
}

// graftedSheet is an own sheet.
type graftedSheet struct {
	role  string
	index int // in the new workbook
	names []localName
}

// localName is a defined name of an own sheet.
type localName struct {
	name, refersTo string
	hidden         bool
}

// addedSheet is an entry to the list of sheets.
type addedSheet struct{ name, rel string }

// SheetName returns the name under which an own sheet will stand in the
// workbook: the one that is wanted, unless a sheet of the user's has it, or
// somebody renamed ours.
func (p *Plan) SheetName(wanted string) string {
	for _, s := range p.book.sheets {
		if s.own == wanted {
			return s.name
		}
	}
	name := cutName(wanted, "")
	for n := 2; p.taken(name); n++ {
		name = cutName(wanted, fmt.Sprintf(" (%d)", n))
	}
	return name
}

func (p *Plan) taken(name string) bool {
	for _, s := range p.book.sheets {
		if strings.EqualFold(s.name, name) {
			return true
		}
	}
	return false
}

// cutName returns a name that a sheet may have: at most 31 UTF-16 units, none
// of them []:*?/\, and no apostrophe at its ends.
func cutName(name, suffix string) string {
	name = strings.Map(func(r rune) rune {
		if strings.ContainsRune(`[]:*?/\`, r) || r < ' ' {
			return '-'
		}
		return r
	}, name)
	runes := []rune(strings.Trim(name, "'"))
	for len(utf16.Encode(runes))+len(suffix) > 31 {
		runes = runes[:len(runes)-1]
	}
	return string(runes) + suffix
}

// graftOwn makes the own sheets and the block's styles, and moves them into
// the draft.
func (p *Plan) graftOwn(d *draft, sheets []Sheet) (*grafting, error) {
	own := newOwn(p.letters)
	for i := range sheets {
		if err := own.add(&sheets[i], p.SheetName(sheets[i].Name), i == 0); err != nil {
			return nil, err
		}
	}
	looks := map[Look]int{}
	for _, l := range p.looks() {
		id, err := own.style(l)
		if err != nil {
			return nil, err
		}
		looks[l] = id
	}
	data, err := own.bytes()
	if err != nil {
		return nil, err
	}
	gr, err := d.openGraft(data, own.looks)
	if err != nil {
		return nil, err
	}
	g := p.settleSheets(sheets)
	for l, id := range looks {
		g.styles[l] = gr.styles.cell(id)
	}
	return g, p.moveSheets(d, gr, g, own, sheets)
}

// settleSheets finds the place of each own sheet: that of an earlier run, or
// behind all others.
func (p *Plan) settleSheets(sheets []Sheet) *grafting {
	g := &grafting{styles: map[Look]int{}}
	wanted := map[string]bool{}
	for _, s := range sheets {
		wanted[s.Name] = true
	}
	next := 0
	places := map[string]int{}
	for _, s := range p.book.sheets {
		if s.own != "" && !wanted[s.own] {
			g.moved = append(g.moved, -1)
			continue
		}
		g.moved = append(g.moved, next)
		if s.own != "" {
			places[s.own] = next
		}
		next++
	}
	for _, s := range sheets {
		at, known := places[s.Name]
		if !known {
			at = next
			next++
		}
		g.sheets = append(g.sheets, graftedSheet{role: s.Name, index: at})
	}
	return g
}

// moveSheets moves the own sheets into the draft, in the place of those of an
// earlier run, which go first so that their names are free again.
func (p *Plan) moveSheets(d *draft, gr *graft, g *grafting, own *own, sheets []Sheet) error {
	old := map[string]*sheet{}
	for i, s := range p.book.sheets {
		if s.own == "" {
			continue
		}
		if err := d.dropTree(s.part); err != nil {
			return err
		}
		if g.moved[i] < 0 {
			d.rels.remove(p.relOfSheet(s))
			continue
		}
		old[s.own] = s
	}
	for i := range sheets {
		from := gr.own.sheets[i]
		f := own.filling(from.name, gr.style)
		if s := old[sheets[i].Name]; s != nil {
			if err := gr.sheet(from, f, s.part); err != nil {
				return err
			}
		} else if err := p.addSheet(d, gr, g, from, f); err != nil {
			return err
		}
		g.sheets[i].names = gr.namesOf(from)
		for _, row := range sheets[i].Rows {
			for _, c := range row {
				g.formulas = g.formulas || c.Formula != ""
			}
		}
	}
	return nil
}

func (p *Plan) addSheet(d *draft, gr *graft, g *grafting, from *sheet, f *filling) error {
	part := d.freeName(from.part)
	if err := gr.sheet(from, f, part); err != nil {
		return err
	}
	g.added = append(g.added, addedSheet{from.name, d.rels.add(d.kind("worksheet"), part)})
	return nil
}

// relOfSheet returns the id of the relationship that leads to a sheet.
func (p *Plan) relOfSheet(s *sheet) string {
	for _, r := range p.book.rels {
		if r.Target == s.part && r.Is("worksheet") {
			return r.ID
		}
	}
	return ""
}

// namesOf returns the defined names of an own sheet.
func (g *graft) namesOf(s *sheet) []localName {
	var out []localName
	for _, n := range g.own.definedNames() {
		if g.own.localTo(n) == s {
			out = append(out, localName{n.Attr("name"), n.Text(), isTrue(n.Attr("hidden"))})
		}
	}
	return out
}

// looks returns every look that the block can use.
func (p *Plan) looks() []Look {
	seen := map[Look]bool{}
	var out []Look
	add := func(l Look) {
		if !seen[l] {
			seen[l] = true
			out = append(out, l)
		}
	}
	cells, _ := p.headings()
	for _, c := range cells {
		add(c.look)
	}
	for i := range p.block.Columns {
		add(p.look(i, Result))
		if !p.block.Columns[i].Numeric {
			for _, word := range sortedKeys(p.words()) {
				add(p.look(i, p.words()[word]))
			}
		}
	}
	return out
}
