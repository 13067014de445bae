package workbook

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// beforeNames are the elements of a workbook part that stand before
// definedNames, and beforeCalc those before calcPr (ECMA-376 Part 1, 18.2.27).
var (
	beforeNames = []string{"fileVersion", "fileSharing", "workbookPr", "AlternateContent", "revisionPtr", "absPath", "workbookProtection", "bookViews", "sheets", "functionGroups", "externalReferences"}
	beforeCalc  = append(slices.Clone(beforeNames), "definedNames")
)

// workbookPart returns the workbook part: with the project's own sheets on its
// list, and the names that go with them and with the block.
func (p *Plan) workbookPart(d *draft, g *grafting) []byte {
	var edits markup.Edits
	root := p.book.root
	p.listSheets(&edits, g)
	p.editNames(&edits, g)
	p.askForCalculation(&edits, g)
	doc := edits.Apply(p.book.doc)
	if at := root.From; !strings.Contains(string(p.book.doc[:at]), mark) {
		doc = slices.Concat(doc[:at], []byte(mark), doc[at:])
	}
	return doc
}

// listSheets adds sheets that are new and takes out those that are gone.
func (p *Plan) listSheets(edits *markup.Edits, g *grafting) {
	list := p.book.root.Child("sheets")
	elements := list.All("sheet")
	next := 1
	for i, e := range elements {
		next = max(next, number(e, "sheetId")+1)
		if g.moved[i] < 0 {
			edits.Remove(e)
		}
	}
	idName, declared := relationAttr(elements[0])
	var added strings.Builder
	for i, s := range g.added {
		fmt.Fprintf(&added, `<%ssheet name="%s" sheetId="%d"%s %s="%s"/>`, list.Prefix, markup.Escaped(s.name), next+i, declared, idName, s.rel)
	}
	if added.Len() > 0 {
		edits.Append(list, added.String())
	}
	p.moveViews(edits, g)
}

// relationAttr returns the name, prefix and all, by which a sheet element names
// its relationship, and the declaration of that prefix where the element makes
// it itself: some programs declare it on every sheet and not on the root.
func relationAttr(e *markup.Element) (name, declared string) {
	name = "r:id"
	for a := e.Attrs(); a.Next(); {
		if n := string(a.Name); n == "id" || strings.HasSuffix(n, ":id") {
			name = n
		}
	}
	prefix, _, _ := strings.Cut(name, ":")
	for a := e.Attrs(); a.Next(); {
		if string(a.Name) == "xmlns:"+prefix {
			declared = fmt.Sprintf(` %s="%s"`, a.Name, a.Value)
		}
	}
	return name, declared
}

// moveViews keeps the sheet that is shown first where sheets before it go.
func (p *Plan) moveViews(edits *markup.Edits, g *grafting) {
	for _, v := range p.book.root.Child("bookViews").All("workbookView") {
		var attrs []string
		for _, name := range []string{"firstSheet", "activeTab"} {
			i, err := strconv.Atoi(v.Attr(name))
			if err != nil || i < 0 || i >= len(g.moved) || g.moved[i] == i {
				continue
			}
			attrs = append(attrs, name, strconv.Itoa(max(0, g.moved[i])))
		}
		if len(attrs) > 0 {
			edits.SetAttrs(v, attrs...)
		}
	}
}

// editNames widens the filter of the schedule, takes out
// what an earlier run left, and adds the names of this one.
func (p *Plan) editNames(edits *markup.Edits, g *grafting) {
	root := p.book.root
	for _, n := range p.book.definedNames() {
		s := p.book.localTo(n)
		switch {
		case n.Attr("name") == sheetName, n.Attr("name") == resultsName && s == p.sheet, s != nil && s.own != "" && builtIn(n):
			edits.Remove(n)
		case s != nil && g.moved[number(n, "localSheetId")] < 0:
			edits.Remove(n)
		default:
			p.editName(edits, g, n, s)
		}
	}
	added := p.newNames(g)
	list := root.Child("definedNames")
	if list != nil {
		edits.Append(list, added)
		return
	}
	name := root.Prefix + "definedNames"
	edits.Insert(behindLast(root, beforeNames), "<"+name+">"+added+"</"+name+">")
}

func builtIn(n *markup.Element) bool { return strings.HasPrefix(n.Attr("name"), "_xlnm.") }

// editName moves a name with its sheet, and widens it where it is the filter
// or the print area of the schedule.
func (p *Plan) editName(edits *markup.Edits, g *grafting, n *markup.Element, s *sheet) {
	tag, text := string(n.Tag()), string(n.Content())
	if s != nil {
		if i := number(n, "localSheetId"); g.moved[i] != i {
			tag = markup.SetAttrs(n.Tag(), "localSheetId", strconv.Itoa(g.moved[i]))
		}
	}
	if s == p.sheet && builtIn(n) {
		text = p.editRange(n, text)
	}
	if with := tag + text + string(n.Rest()[len(n.Content()):]); with != string(n.Raw()) {
		edits.Replace(n, with)
	}
}

// editRange returns the range of the schedule's filter widened, and what is
// printed of it as it is to be.
func (p *Plan) editRange(n *markup.Element, text string) string {
	if n.Attr("name") == "_xlnm._FilterDatabase" {
		sheet, cells, ok := splitRef(n.Text())
		if a, isArea := parseArea(cells); ok && isArea && p.reaches(a) {
			return markup.Escaped(quoted(sheet) + "!" + p.widened(a).absolute())
		}
		return text
	}
	if with, ok := p.editPrinting(n); ok && with != n.Text() {
		return markup.Escaped(with)
	}
	return text
}

// newNames returns the defined names that this run leaves.
func (p *Plan) newNames(g *grafting) string {
	var b strings.Builder
	prefix := p.book.root.Prefix
	add := func(name string, sheet int, hidden bool, refersTo string) {
		h := ""
		if hidden {
			h = ` hidden="1"`
		}
		fmt.Fprintf(&b, `<%sdefinedName name="%s" localSheetId="%d"%s>%s</%sdefinedName>`, prefix, name, sheet, h, markup.Escaped(refersTo), prefix)
	}
	here, at := quoted(p.sheet.name)+"!", g.moved[p.sheetIndex()]
	// First those that stay when the schedule is annotated again.
	if a, ok := p.newFilter(); ok && !p.hasName("_xlnm._FilterDatabase") {
		add("_xlnm._FilterDatabase", at, true, here+a.absolute())
	}
	if refersTo, ok := p.printArea(); ok {
		add(printAreaName, at, false, refersTo)
	}
	if refersTo, ok := p.printTitles(""); ok && !p.hasName(printTitlesName) {
		add(printTitlesName, at, false, refersTo)
	}
	add(resultsName, at, true, here+p.place.rows.absolute())
	for _, s := range g.sheets {
		add(sheetName, s.index, true, `"`+strings.ReplaceAll(s.role, `"`, `""`)+`"`)
		for _, n := range s.names {
			add(n.name, s.index, n.hidden, n.refersTo)
		}
	}
	return b.String()
}

// hasName reports whether the schedule's sheet has a defined name of its own.
func (p *Plan) hasName(name string) bool {
	return slices.ContainsFunc(p.book.definedNames(), func(n *markup.Element) bool {
		return n.Attr("name") == name && p.book.localTo(n) == p.sheet
	})
}

func (p *Plan) sheetIndex() int { return slices.Index(p.book.sheets, p.sheet) }

// askForCalculation has spreadsheet programs calculate formulas on opening
// where some may depend on what is written. The other settings stay.
func (p *Plan) askForCalculation(edits *markup.Edits, g *grafting) {
	if !g.formulas && !p.book.hasFormulas() {
		return
	}
	root := p.book.root
	if e := root.Child("calcPr"); e != nil {
		if !isTrue(e.Attr("fullCalcOnLoad")) {
			edits.SetAttrs(e, "fullCalcOnLoad", "1")
		}
		return
	}
	edits.Insert(behindLast(root, beforeCalc), "<"+root.Prefix+`calcPr fullCalcOnLoad="1"/>`)
}
