package workbook

import (
	"bytes"
	"fmt"
	"io"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// graft moves the sheets of the project's own workbook into the user's.
type graft struct {
	draft  *draft
	own    *Book
	types  *manifest // of the own workbook
	styles *styleMap
	moved  map[string]string // own part to new name
	looks  map[Look]int      // style ids in the own workbook
}

// openGraft opens the own workbook and adds its styles to the user's.
func (d *draft) openGraft(data []byte, looks map[Look]int) (*graft, error) {
	own, err := OpenBytes("own sheets", data)
	if err != nil {
		return nil, err
	}
	g := &graft{draft: d, own: own, moved: map[string]string{}, looks: looks}
	if g.types, err = openManifest(own.pkg); err != nil {
		return nil, err
	}
	return g, g.graftStyles()
}

func (g *graft) graftStyles() error {
	rel := g.own.relOf("styles")
	ownRoot, ownDoc, err := g.own.pkg.Tree(rel.Target)
	if err != nil {
		return err
	}
	d := g.draft
	theirs := d.book.relOf("styles")
	if theirs == nil || !d.book.pkg.Has(theirs.Target) {
		return g.newStyles(ownRoot, ownDoc)
	}
	root, doc, err := d.book.pkg.Tree(theirs.Target)
	if err != nil {
		return err
	}
	sheet := newStyleSheet(root, doc)
	if g.styles, err = sheet.merge(ownRoot); err != nil {
		return err
	}
	d.out.Set(theirs.Target, sheet.apply())
	return nil
}

// newStyles gives a workbook without styles the own ones.
func (g *graft) newStyles(root *markup.Element, doc []byte) error {
	d := g.draft
	name := d.freeName("xl/styles.xml")
	if !d.out.Has("xl/styles.xml") {
		name = "xl/styles.xml"
	}
	d.out.Set(name, d.edition(doc))
	d.types.set(name, "application/vnd.openxmlformats-officedocument.spreadsheetml.styles+xml")
	d.rels.add(d.kind("styles"), name)
	g.styles = &styleMap{}
	for i := range children(root.Child("cellXfs")) {
		g.styles.xfs = append(g.styles.xfs, i)
	}
	for i := range children(root.Child("dxfs")) {
		g.styles.dxfs = append(g.styles.dxfs, i)
	}
	return nil
}

// sheet moves a sheet to a part of that name, and puts its rows into it.
func (g *graft) sheet(own *sheet, f *filling, to string) error {
	g.moved[own.part] = to
	write := func(w io.Writer) error { return g.own.fill(own, f, w, g.retag) }
	if g.draft.strict {
		var content bytes.Buffer
		if err := write(&content); err != nil {
			return err
		}
		return g.place(own.part, to, content.Bytes())
	}
	g.draft.out.SetStream(to, write)
	return g.join(own.part, to)
}

// place sets a moved part.
func (g *graft) place(from, to string, content []byte) error {
	g.draft.out.Set(to, g.draft.edition(content))
	return g.join(from, to)
}

// join gives a moved part its type, and moves what it is joined to.
func (g *graft) join(from, to string) error {
	g.draft.types.set(to, g.types.typeOf(from))
	rels, err := g.own.pkg.Rels(from)
	if err != nil || len(rels) == 0 {
		return err
	}
	var b strings.Builder
	b.WriteString(`<?xml version="1.0" encoding="UTF-8" standalone="yes"?>` + "\n" +
		`<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">`)
	for _, r := range rels {
		target, mode := r.Target, ` TargetMode="External"`
		if !r.Outside {
			name, err := g.part(r.Target)
			if err != nil {
				return err
			}
			target, mode = relative(to, name), ""
		}
		fmt.Fprintf(&b, `<Relationship Id="%s" Type="%s" Target="%s"%s/>`, markup.Escaped(r.ID), g.draft.edition([]byte(r.Type)), markup.Escaped(target), mode)
	}
	b.WriteString(`</Relationships>`)
	g.draft.out.Set(opc.RelsName(to), []byte(b.String()))
	return nil
}

// part moves a part, once, and returns its new name.
func (g *graft) part(from string) (string, error) {
	if to, ok := g.moved[from]; ok {
		return to, nil
	}
	to := g.draft.freeName(from)
	g.moved[from] = to
	content, err := g.own.pkg.Read(from)
	if err != nil {
		return "", err
	}
	return to, g.place(from, to, content)
}

// style returns the style id of a look in the user's workbook.
func (g *graft) style(l Look) int {
	if id := g.looks[l]; id != 0 {
		return g.styles.cell(id)
	}
	return 0
}

// retag returns a tag with the user's style ids.
func (g *graft) retag(t *markup.Token) string {
	style := func(attr string) string {
		v, _ := t.Attr(attr)
		n, err := strconv.Atoi(v)
		if err != nil || n == 0 {
			return "" // none, or the plain one
		}
		return strconv.Itoa(g.styles.cell(n))
	}
	switch string(t.Name) {
	case "col":
		return markup.SetAttrs(t.Raw, "style", style("style"))
	case "cfRule":
		if v, ok := t.Attr("dxfId"); ok {
			n, _ := strconv.Atoi(v)
			return markup.SetAttrs(t.Raw, "dxfId", strconv.Itoa(g.styles.conditional(n)))
		}
	case "sheetView":
		// Two selected sheets would be edited together.
		return markup.SetAttrs(t.Raw, "tabSelected", "")
	}
	return string(t.Raw)
}

// appendInline appends a text as a cell holds it itself.
func appendInline(to []byte, prefix, text string) []byte {
	to = append(to, '<')
	to = append(to, prefix...)
	to = append(to, "is><"...)
	to = append(to, prefix...)
	to = append(to, 't')
	if strings.TrimSpace(text) != text || strings.Contains(text, "\n") {
		to = append(to, ` xml:space="preserve"`...)
	}
	to = append(to, '>')
	to = appendCellText(to, text)
	to = append(to, "</"...)
	to = append(to, prefix...)
	to = append(to, "t></"...)
	to = append(to, prefix...)
	return append(to, "is>"...)
}

// appendCellText appends a text, escaping what looks like an escape.
func appendCellText(to []byte, text string) []byte {
	for {
		i := strings.Index(text, "_x")
		if i < 0 {
			return markup.AppendEscaped(to, text)
		}
		to = markup.AppendEscaped(to, text[:i])
		if _, ok := escape([]byte(text[i:])); ok {
			to = append(to, "_x005F_x"...)
		} else {
			to = append(to, "_x"...)
		}
		text = text[i+2:]
	}
}
