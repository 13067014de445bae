package markup

import (
	"bytes"
	"cmp"
	"io"
	"slices"
)

// Element is an element of a document held in memory, with its place in it.
type Element struct {
	Name     string // without prefix
	Prefix   string // with its colon, or empty
	Children []*Element
	From, To int // of the whole element
	Inner    int // where its content starts; To of an empty element
	Close    int // where its end tag starts; To of an empty element

	doc []byte
}

// Parse reads a whole document and returns its root element.
func Parse(doc []byte) (*Element, error) {
	s := NewScanner(bytes.NewReader(doc))
	var root *Element
	var open []*Element
	at := 0
	for {
		t, err := s.Next()
		if err == io.EOF {
			return root, nil
		}
		if err != nil {
			return nil, err
		}
		from := at
		at += len(t.Raw)
		switch t.Kind {
		case Start, Empty:
			cut := len(t.Name) - len(t.Local())
			e := &Element{Name: string(t.Name[cut:]), Prefix: string(t.Name[:cut]), From: from, To: at, Inner: at, Close: at, doc: doc}
			if len(open) > 0 {
				parent := open[len(open)-1]
				parent.Children = append(parent.Children, e)
			} else {
				root = e
			}
			if t.Kind == Start {
				open = append(open, e)
			}
		case End:
			e := open[len(open)-1]
			e.Close, e.To = from, at
			open = open[:len(open)-1]
		}
	}
}

// Empty reports whether the element is written as <a/>.
func (e *Element) Empty() bool { return e.Inner == e.To }

// Child returns the first child of that name, nil where there is none.
func (e *Element) Child(name string) *Element {
	if e == nil {
		return nil
	}
	for _, c := range e.Children {
		if c.Name == name {
			return c
		}
	}
	return nil
}

// All returns the children of that name.
func (e *Element) All(name string) []*Element {
	if e == nil {
		return nil
	}
	var out []*Element
	for _, c := range e.Children {
		if c.Name == name {
			out = append(out, c)
		}
	}
	return out
}

// Tag returns the start tag.
func (e *Element) Tag() []byte { return e.doc[e.From:e.Inner] }

// Raw returns the whole element as it stands.
func (e *Element) Raw() []byte { return e.doc[e.From:e.To] }

// Rest returns what stands behind the start tag, the end tag with it.
func (e *Element) Rest() []byte { return e.doc[e.Inner:e.To] }

// Content returns what stands between the tags.
func (e *Element) Content() []byte { return e.doc[e.Inner:e.Close] }

// Text returns the text of an element without children, entities resolved.
func (e *Element) Text() string {
	s := NewScanner(bytes.NewReader(e.Raw()))
	var out []byte
	for {
		t, err := s.Next()
		if err != nil {
			return string(out)
		}
		switch t.Kind {
		case Text:
			out = AppendText(out, t.Raw)
		case CData:
			out = AppendCData(out, t.Raw)
		}
	}
}

// Attr returns the value of an attribute by its name without prefix, entities
// resolved; empty where there is none.
func (e *Element) Attr(name string) string {
	if e == nil {
		return ""
	}
	v, _ := e.token().Attr(name)
	return v
}

// Attrs returns the attributes of the element.
func (e *Element) Attrs() Attrs { return e.token().Attrs() }

// HasAttr reports whether the element has an attribute of that name.
func (e *Element) HasAttr(name string) bool {
	_, ok := e.token().Attr(name)
	return ok
}

func (e *Element) token() *Token {
	n := 1 + len(e.Prefix) + len(e.Name)
	return &Token{Raw: e.Tag(), Name: e.doc[e.From+1 : e.From+n]}
}

// Edits are changes to a document, none within another.
type Edits []edit

type edit struct {
	from, to int
	with     string
}

// Insert puts text before the byte at.
func (e *Edits) Insert(at int, text string) { *e = append(*e, edit{at, at, text}) }

// Remove takes an element out.
func (e *Edits) Remove(el *Element) { *e = append(*e, edit{el.From, el.To, ""}) }

// Replace puts text in the place of an element.
func (e *Edits) Replace(el *Element, text string) { *e = append(*e, edit{el.From, el.To, text}) }

// Append puts text behind the last child of an element.
func (e *Edits) Append(el *Element, text string) {
	if !el.Empty() {
		e.Insert(el.Close, text)
		return
	}
	tag := bytes.TrimRight(el.Tag(), "/> \t\r\n")
	*e = append(*e, edit{el.From, el.To, string(tag) + ">" + text + "</" + el.Prefix + el.Name + ">"})
}

// AppendWith does as Append, and sets attributes of the element's start tag.
func (e *Edits) AppendWith(el *Element, text string, attrs ...string) {
	tag := SetAttrs(el.Tag(), attrs...)
	if !el.Empty() {
		*e = append(*e, edit{el.From, el.Inner, tag})
		e.Insert(el.Close, text)
		return
	}
	tag = string(bytes.TrimRight([]byte(tag), "/> \t\r\n"))
	*e = append(*e, edit{el.From, el.To, tag + ">" + text + "</" + el.Prefix + el.Name + ">"})
}

// SetAttrs sets attributes of an element: name, value, name, value ...
func (e *Edits) SetAttrs(el *Element, attrs ...string) {
	*e = append(*e, edit{el.From, el.Inner, SetAttrs(el.Tag(), attrs...)})
}

// Apply returns the document with the changes made: at one place what is
// inserted first, in the order in which it was asked for.
func (e Edits) Apply(doc []byte) []byte {
	sorted := slices.Clone(e)
	slices.SortStableFunc(sorted, func(a, b edit) int { return cmp.Or(a.from-b.from, a.to-b.to) })
	out := make([]byte, 0, len(doc)+4096)
	at := 0
	for _, c := range sorted {
		out = append(out, doc[at:c.from]...)
		out = append(out, c.with...)
		at = c.to
	}
	return append(out, doc[at:]...)
}

// SetAttrs returns a start or empty tag with attributes set: name, value,
// name, value ... The others stay as they are; an attribute with the value ""
// is taken out.
func SetAttrs(tag []byte, attrs ...string) string {
	for i := 0; i+1 < len(attrs); i += 2 {
		tag = setAttr(tag, attrs[i], attrs[i+1])
	}
	return string(tag)
}

func setAttr(tag []byte, name, value string) []byte {
	t := Token{Raw: tag, Name: tag[1 : 1+nameLength(tag[1:])]}
	for a := t.Attrs(); a.Next(); {
		if string(a.Name) != name {
			continue
		}
		to := len(tag) - len(a.rest)
		from := to - len(a.Value) - 1 // behind the opening quote
		if value == "" {
			from = bytes.LastIndex(tag[:from], a.Name)
			return slices.Concat(bytes.TrimRight(tag[:from], " \t\r\n"), tag[to:])
		}
		return slices.Concat(tag[:from], AppendEscaped(nil, value), tag[to-1:])
	}
	if value == "" {
		return tag
	}
	cut := len(tag) - 1
	if tag[cut-1] == '/' {
		cut--
	}
	added := ` ` + name + `="` + Escaped(value) + `"`
	return slices.Concat(bytes.TrimRight(tag[:cut], " \t\r\n"), []byte(added), tag[cut:])
}
