package workbook

import (
	"strconv"

	"stanchion/schedule/workbook/internal/markup"
)

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
