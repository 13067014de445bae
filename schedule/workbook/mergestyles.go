package workbook

import (
	"fmt"
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
