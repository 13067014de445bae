package workbook

import (
	"fmt"
	"path"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// manifest is the part that lists the types of all others, being changed.
type manifest struct {
	doc       []byte
	root      *markup.Element
	overrides map[string]*markup.Element // by lower-case name without leading slash
	defaults  map[string]string          // by lower-case extension
	added     map[string]string          // part to type
	gone      map[string]*markup.Element // overrides of parts that are left out
	order     []string
	edits     markup.Edits
}

func openManifest(pkg *opc.Package) (*manifest, error) {
	root, doc, err := pkg.Tree(opc.ContentTypes)
	if err != nil {
		return nil, err
	}
	m := &manifest{doc: doc, root: root, overrides: map[string]*markup.Element{}, defaults: map[string]string{}, added: map[string]string{}, gone: map[string]*markup.Element{}}
	for _, e := range root.All("Override") {
		m.overrides[partKey(e.Attr("PartName"))] = e
	}
	for _, e := range root.All("Default") {
		m.defaults[strings.ToLower(e.Attr("Extension"))] = e.Attr("ContentType")
	}
	return m, nil
}

func partKey(name string) string { return strings.ToLower(strings.TrimPrefix(name, "/")) }

// typeOf returns the type of a part.
func (m *manifest) typeOf(part string) string {
	if e := m.overrides[partKey(part)]; e != nil {
		return e.Attr("ContentType")
	}
	return m.defaults[strings.ToLower(strings.TrimPrefix(path.Ext(part), "."))]
}

// set gives a part a type.
func (m *manifest) set(part, kind string) {
	if e := m.gone[partKey(part)]; e != nil { // back in its place
		m.overrides[partKey(part)] = e
		delete(m.gone, partKey(part))
	}
	if m.added[part] == "" && m.typeOf(part) == kind {
		return
	}
	if e := m.overrides[partKey(part)]; e != nil {
		m.edits.SetAttrs(e, "ContentType", kind)
		return
	}
	if m.added[part] == "" {
		m.order = append(m.order, part)
	}
	m.added[part] = kind
}

// remove forgets a part.
func (m *manifest) remove(part string) {
	if e := m.overrides[partKey(part)]; e != nil {
		m.gone[partKey(part)] = e
		delete(m.overrides, partKey(part))
	}
}

func (m *manifest) apply() []byte {
	var b strings.Builder
	for _, part := range m.order {
		fmt.Fprintf(&b, `<%sOverride PartName="/%s" ContentType="%s"/>`, m.root.Prefix, markup.Escaped(part), markup.Escaped(m.added[part]))
	}
	edits := append(markup.Edits(nil), m.edits...)
	for _, part := range sortedKeys(m.gone) {
		edits.Remove(m.gone[part])
	}
	if b.Len() > 0 {
		edits.Append(m.root, b.String())
	}
	return edits.Apply(m.doc)
}

// relations are the relationships of a part, being changed.
type relations struct {
	owner string
	doc   []byte
	root  *markup.Element
	used  map[string]bool
	added strings.Builder
	edits markup.Edits
}

func openRelations(pkg *opc.Package, owner string) (*relations, error) {
	root, doc, err := pkg.Tree(opc.RelsName(owner))
	if err != nil {
		return nil, err
	}
	r := &relations{owner: owner, doc: doc, root: root, used: map[string]bool{}}
	for _, e := range root.All("Relationship") {
		r.used[e.Attr("Id")] = true
	}
	return r, nil
}

// add joins the owner to a part and returns the id of that.
func (r *relations) add(kind, part string) string {
	id := ""
	for n := len(r.used) + 1; ; n++ {
		if id = "rId" + strconv.Itoa(n); !r.used[id] {
			break
		}
	}
	r.used[id] = true
	fmt.Fprintf(&r.added, `<%sRelationship Id="%s" Type="%s" Target="%s"/>`, r.root.Prefix, id, markup.Escaped(kind), markup.Escaped(relative(r.owner, part)))
	return id
}

func (r *relations) remove(id string) {
	for _, e := range r.root.All("Relationship") {
		if e.Attr("Id") == id {
			r.edits.Remove(e)
		}
	}
}

func (r *relations) apply() []byte {
	edits := append(markup.Edits(nil), r.edits...)
	if r.added.Len() > 0 {
		edits.Append(r.root, r.added.String())
	}
	return edits.Apply(r.doc)
}

// relative returns the way from a part to another.
func relative(from, to string) string {
	dir := strings.Split(path.Dir(from), "/")
	target := strings.Split(to, "/")
	for len(dir) > 0 && len(target) > 1 && dir[0] == target[0] {
		dir, target = dir[1:], target[1:]
	}
	if len(dir) == 1 && dir[0] == "." {
		dir = nil
	}
	return strings.Repeat("../", len(dir)) + strings.Join(target, "/")
}
