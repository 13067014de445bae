package workbook

import (
	"bytes"
	"fmt"
	"io"
	"strconv"

	"stanchion/schedule/workbook/internal/markup"
)

// styleMap says which style of the user's workbook stands for each of the
// project's own.
type styleMap struct {
	xfs  []int // of cells
	dxfs []int // of conditional formats
}

// cell returns the style that stands for an own one.
func (m *styleMap) cell(own int) int { return lookUp(m.xfs, own) }

func (m *styleMap) conditional(own int) int { return lookUp(m.dxfs, own) }

func lookUp(m []int, i int) int {
	if i < 0 || i >= len(m) {
		return 0
	}
	return m[i]
}

// maxStyles is how many cell styles a workbook may hold.
const maxStyles = 65_490

// styleSheet is the styles part of the user's workbook, being added to. What
// stands there keeps its place and its bytes. What is the same as something
// that stands there already is not added again, so running over an annotated
// workbook does not make it grow.
type styleSheet struct {
	doc    []byte
	root   *markup.Element
	pools  map[string]*pool
	nextID int // free id of a number format
}

// pool is one list of a styles part.
type pool struct {
	index map[string]int // by element as it stands
	count int
	added []string
}

// The lists, in the order in which they stand in a styles part
// (ECMA-376 Part 1, 18.8.39).
var styleLists = []string{"numFmts", "fonts", "fills", "borders", "cellStyleXfs", "cellXfs", "cellStyles", "dxfs", "tableStyles", "colors", "extLst"}

func newStyleSheet(root *markup.Element, doc []byte) *styleSheet {
	s := &styleSheet{doc: doc, root: root, pools: map[string]*pool{}, nextID: 164}
	for _, list := range styleLists {
		p := &pool{index: map[string]int{}}
		if e := root.Child(list); e != nil {
			for _, c := range e.Children {
				if _, ok := p.index[string(c.Raw())]; !ok {
					p.index[string(c.Raw())] = p.count
				}
				p.count++
			}
		}
		s.pools[list] = p
	}
	for _, e := range root.Child("numFmts").All("numFmt") {
		if id, err := strconv.Atoi(e.Attr("numFmtId")); err == nil {
			s.nextID = max(s.nextID, id+1)
		}
	}
	return s
}

// add puts an element into a list and returns its place.
func (s *styleSheet) add(list, raw string) int {
	p := s.pools[list]
	raw = reprefixed(raw, s.root.Prefix)
	if i, ok := p.index[raw]; ok {
		return i
	}
	p.index[raw] = p.count
	p.added = append(p.added, raw)
	p.count++
	return p.count - 1
}

// merge adds the styles of the project's own workbook.
func (s *styleSheet) merge(own *markup.Element) (*styleMap, error) {
	formats := s.mergeFormats(own)
	places := map[string][]int{}
	for _, list := range []string{"fonts", "fills", "borders"} {
		for _, e := range children(own.Child(list)) {
			places[list] = append(places[list], s.add(list, string(e.Raw())))
		}
	}
	m := &styleMap{}
	for i, e := range children(own.Child("cellXfs")) {
		if i == 0 { // plain cells look as the user's plain cells do
			m.xfs = append(m.xfs, 0)
			continue
		}
		tag := markup.SetAttrs(e.Tag(),
			"numFmtId", strconv.Itoa(formatID(formats, e)),
			"fontId", strconv.Itoa(lookUp(places["fonts"], number(e, "fontId"))),
			"fillId", strconv.Itoa(lookUp(places["fills"], number(e, "fillId"))),
			"borderId", strconv.Itoa(lookUp(places["borders"], number(e, "borderId"))),
			"xfId", "0")
		m.xfs = append(m.xfs, s.add("cellXfs", tag+string(e.Rest())))
	}
	for _, e := range children(own.Child("dxfs")) {
		m.dxfs = append(m.dxfs, s.add("dxfs", string(e.Raw())))
	}
	if s.pools["cellXfs"].count > maxStyles {
		return nil, fmt.Errorf("it holds %d cell formats, as many as a workbook can", s.pools["cellXfs"].count)
	}
	return m, nil
}

func formatID(formats map[int]int, xf *markup.Element) int {
	id := number(xf, "numFmtId")
	if to, ok := formats[id]; ok {
		return to
	}
	return id
}

// mergeFormats adds the own number formats and returns their new ids.
func (s *styleSheet) mergeFormats(own *markup.Element) map[int]int {
	known := map[string]int{}
	for _, e := range s.root.Child("numFmts").All("numFmt") {
		if _, ok := known[e.Attr("formatCode")]; !ok {
			known[e.Attr("formatCode")] = number(e, "numFmtId")
		}
	}
	out := map[int]int{}
	for _, e := range own.Child("numFmts").All("numFmt") {
		code := e.Attr("formatCode")
		id, ok := known[code]
		if !ok {
			id = s.nextID
			s.nextID++
			known[code] = id
			s.add("numFmts", fmt.Sprintf(`<numFmt numFmtId="%d" formatCode="%s"/>`, id, markup.Escaped(code)))
		}
		out[number(e, "numFmtId")] = id
	}
	return out
}

// apply returns the styles part with what was added.
func (s *styleSheet) apply() []byte {
	var edits markup.Edits
	after := s.root.Inner
	var missing string
	for _, list := range styleLists {
		p, e := s.pools[list], s.root.Child(list)
		if e != nil {
			if missing != "" {
				edits.Insert(after, missing)
				missing = ""
			}
			if len(p.added) > 0 {
				edits.AppendWith(e, joined(p.added), "count", strconv.Itoa(p.count))
			}
			after = e.To
			continue
		}
		if len(p.added) > 0 {
			name := s.root.Prefix + list
			missing += fmt.Sprintf(`<%s count="%d">%s</%s>`, name, p.count, joined(p.added), name)
		}
	}
	if missing != "" {
		edits.Insert(after, missing)
	}
	return edits.Apply(s.doc)
}

func joined(parts []string) string {
	var b bytes.Buffer
	for _, p := range parts {
		b.WriteString(p)
	}
	return b.String()
}

func children(e *markup.Element) []*markup.Element {
	if e == nil {
		return nil
	}
	return e.Children
}

// number returns a whole-number attribute, 0 where it is none.
func number(e *markup.Element, attr string) int {
	n, err := strconv.Atoi(e.Attr(attr))
	if err != nil {
		return 0
	}
	return n
}

// reprefixed gives the elements of a fragment without prefixes the one that
// the document uses.
func reprefixed(raw, prefix string) string {
	if prefix == "" {
		return raw
	}
	scan := markup.NewScanner(bytes.NewReader([]byte(raw)))
	var out bytes.Buffer
	for {
		t, err := scan.Next()
		if err == io.EOF || err != nil {
			return out.String()
		}
		switch t.Kind {
		case markup.Start, markup.Empty:
			out.WriteByte('<')
			out.WriteString(prefix)
			out.Write(t.Raw[1:])
		case markup.End:
			out.WriteString("</")
			out.WriteString(prefix)
			out.Write(t.Raw[2:])
		default:
			out.Write(t.Raw)
		}
	}
}

// lettering returns the font of the workbook's plain cells.
func (b *Book) lettering() (lettering, error) {
	rel := b.relOf("styles")
	if rel == nil || !b.pkg.Has(rel.Target) {
		return usualLettering, nil
	}
	root, _, err := b.pkg.Tree(rel.Target)
	if err != nil {
		return usualLettering, err
	}
	return letteringOf(root), nil
}

var usualLettering = lettering{"Calibri", 11}

// letteringOf returns the font of the workbook's plain cells.
func letteringOf(root *markup.Element) lettering {
	l := usualLettering
	xf := first(root.Child("cellXfs"))
	fonts := children(root.Child("fonts"))
	if xf == nil || len(fonts) == 0 {
		return l
	}
	i := number(xf, "fontId")
	if i < 0 || i >= len(fonts) {
		return l
	}
	if name := fonts[i].Child("name").Attr("val"); name != "" {
		l.family = name
	}
	if size, err := strconv.ParseFloat(fonts[i].Child("sz").Attr("val"), 64); err == nil && size >= 6 && size <= 16 {
		l.size = size
	}
	return l
}

func first(e *markup.Element) *markup.Element {
	if c := children(e); len(c) > 0 {
		return c[0]
	}
	return nil
}
