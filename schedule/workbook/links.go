package workbook

import (
	"io"
	"slices"

	"stanchion/schedule/workbook/internal/markup"
)

// link leads from a cell to a place in the workbook.
type link struct{ cell, to string }

// maxLinks is how many links a sheet may hold.
const maxLinks = 65_530

// behindLinks are the elements of a sheet that stand behind hyperlinks
// (ECMA-376 Part 1, 18.3.1.99).
var behindLinks = []string{
	"printOptions", "pageMargins", "pageSetup", "headerFooter", "rowBreaks", "colBreaks", "customProperties", "cellWatches",
	"ignoredErrors", "smartTags", "drawing", "legacyDrawing", "legacyDrawingHF", "picture", "oleObjects", "controls",
	"webPublishItems", "tableParts", "extLst",
}

// linking puts links into a sheet of ours on its way.
type linking struct {
	list []link
	done bool
}

// before writes the links where a token comes that stands behind them. depth
// is the depth after the token.
func (l *linking) before(w io.Writer, t *markup.Token, depth int) {
	if l.done || len(l.list) == 0 {
		return
	}
	child := t.Kind == markup.Start && depth == 2 || t.Kind == markup.Empty && depth == 1
	if child && !slices.Contains(behindLinks, string(t.Name)) || !child && (t.Kind != markup.End || depth > 0) {
		return
	}
	l.done = true
	b := []byte("<hyperlinks>")
	for _, k := range l.list[:min(len(l.list), maxLinks)] {
		b = append(b, `<hyperlink ref="`...)
		b = append(b, k.cell...)
		b = append(b, `" location="`...)
		b = markup.AppendEscaped(b, k.to)
		b = append(b, `"/>`...)
	}
	w.Write(append(b, "</hyperlinks>"...))
}
