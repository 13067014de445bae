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
	links  map[string][]link // by own sheet
}

// openGraft opens the own workbook and adds its styles to the user's.
func (d *draft) openGraft(data []byte, links map[string][]link) (*graft, error) {
	own, err := OpenBytes("own sheets", data)
	if err != nil {
		return nil, err
	}
	g := &graft{draft: d, own: own, moved: map[string]string{}, links: links}
	if g.types, err = openManifest(own.pkg); err != nil {
		return nil, err
	}
	if err := own.loadStrings(); err != nil {
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

// sheet moves a sheet to a part of that name.
func (g *graft) sheet(own *sheet, to string) error {
	g.moved[own.part] = to
	content, err := g.worksheet(own)
	if err != nil {
		return err
	}
	return g.place(own.part, to, content)
}

// place sets a moved part, its type, and moves what it is joined to.
func (g *graft) place(from, to string, content []byte) error {
	g.draft.out.Set(to, g.draft.edition(content))
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

// worksheet returns an own sheet with the styles of the user's workbook, and
// with its texts in the cells themselves, since the user's table of shared
// texts stays as it is.
func (g *graft) worksheet(s *sheet) ([]byte, error) {
	in, err := g.own.pkg.Stream(s.part)
	if err != nil {
		return nil, err
	}
	defer in.Close()
	scan := markup.NewScanner(in)
	var out bytes.Buffer
	links := linking{list: g.links[s.name]}
	shared := false // in a cell whose text is shared
	for {
		t, err := scan.Next()
		if err == io.EOF {
			return out.Bytes(), nil
		}
		if err != nil {
			return nil, err
		}
		links.before(&out, t, scan.Depth())
		if t.Kind == markup.Start && shared && string(t.Name) == "v" {
			if err := g.inline(&out, scan); err != nil {
				return nil, err
			}
			continue
		}
		if t.Kind != markup.Start && t.Kind != markup.Empty {
			out.Write(t.Raw)
			continue
		}
		if string(t.Name) == "c" {
			kind, _ := t.Attr("t")
			shared = kind == "s"
		}
		out.WriteString(g.retag(t))
	}
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
	case "c":
		if kind, _ := t.Attr("t"); kind == "s" {
			return markup.SetAttrs(t.Raw, "s", style("s"), "t", "inlineStr")
		}
		return markup.SetAttrs(t.Raw, "s", style("s"))
	case "row":
		return markup.SetAttrs(t.Raw, "s", style("s"))
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

// inline writes, in place of the number of a shared text, the text.
func (g *graft) inline(out *bytes.Buffer, scan *markup.Scanner) error {
	var index []byte
	for {
		t, err := scan.Next()
		if err != nil {
			return err
		}
		if t.Kind == markup.Text {
			index = append(index, t.Raw...)
		}
		if t.Kind == markup.End {
			break
		}
	}
	i, err := strconv.Atoi(string(index))
	if err != nil {
		return err
	}
	text, _ := g.own.strings.at(i)
	out.Write(appendInline(nil, "", text))
	return nil
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
