package workbook

import (
	"io"
	"slices"
	"strconv"

	"stanchion/schedule/workbook/internal/markup"
)

// late is an element behind the rows of a sheet of ours that is put in as the
// sheet is copied: the library would hold a row for every one that it names.
type late struct {
	element []byte   // nil: there is none
	behind  []string // the elements that stand behind it
	done    bool
}

// before writes the element where a token comes that stands behind it. depth
// is the depth after the token.
func (l *late) before(w io.Writer, t *markup.Token, depth int) {
	if l.done || len(l.element) == 0 {
		return
	}
	child := t.Kind == markup.Start && depth == 2 || t.Kind == markup.Empty && depth == 1
	if child && !slices.Contains(l.behind, string(t.Name)) || !child && (t.Kind != markup.End || depth > 0) {
		return
	}
	l.done = true
	w.Write(l.element)
}

// behindLinks are the elements of a sheet that stand behind hyperlinks, and
// behindMerges those behind mergeCells (ECMA-376 Part 1, 18.3.1.99).
var (
	behindLinks = []string{
		"printOptions", "pageMargins", "pageSetup", "headerFooter", "rowBreaks", "colBreaks", "customProperties", "cellWatches",
		"ignoredErrors", "smartTags", "drawing", "legacyDrawing", "legacyDrawingHF", "picture", "oleObjects", "controls",
		"webPublishItems", "tableParts", "extLst",
	}
	behindMerges = append([]string{"phoneticPr", "conditionalFormatting", "dataValidations", "hyperlinks"}, behindLinks...)
)

// lateMerges returns the merged cells of a sheet.
func lateMerges(list []area) late {
	if len(list) == 0 {
		return late{}
	}
	b := append([]byte(`<mergeCells count="`), strconv.Itoa(len(list))...)
	b = append(b, `">`...)
	for _, m := range list {
		b = append(b, `<mergeCell ref="`...)
		b = append(b, m.String()...)
		b = append(b, `"/>`...)
	}
	return late{element: append(b, "</mergeCells>"...), behind: behindMerges}
}
