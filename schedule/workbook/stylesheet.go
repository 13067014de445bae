package workbook

import (
	"bytes"
	"fmt"
	"io"
	"strconv"

	"stanchion/schedule/workbook/internal/markup"
)

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
