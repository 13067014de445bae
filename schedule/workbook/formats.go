package workbook

import (
	"strconv"

	"github.com/xuri/nfp"

	"stanchion/schedule/workbook/internal/markup"
)

// format is what a cell's style does to a number, as far as its meaning goes.
type format struct {
	date     bool // a date or a time
	fraction bool
	id       int    // number format of the standard
	code     string // the workbook's own number format; empty: one of the standard
}

// loadFormats reads the number format of every style, once.
func (b *Book) loadFormats() error {
	if b.formats != nil {
		return nil
	}
	b.formats = []format{}
	rel := b.relOf("styles")
	if rel == nil || !b.pkg.Has(rel.Target) {
		return nil
	}
	root, _, err := b.pkg.Tree(rel.Target)
	if err != nil {
		return err
	}
	codes := map[int]string{}
	for _, e := range root.Child("numFmts").All("numFmt") {
		if id, err := strconv.Atoi(e.Attr("numFmtId")); err == nil {
			codes[id] = e.Attr("formatCode")
		}
	}
	known := map[int]format{}
	for _, xf := range root.Child("cellXfs").All("xf") {
		b.formats = append(b.formats, formatOf(xf, codes, known))
	}
	return nil
}

func formatOf(xf *markup.Element, codes map[int]string, known map[int]format) format {
	id, err := strconv.Atoi(xf.Attr("numFmtId"))
	if err != nil {
		return format{}
	}
	f, ok := known[id]
	if !ok {
		f = classify(id, codes[id])
		known[id] = f
	}
	return f
}

// classify tells dates and fractions from other number formats.
func classify(id int, code string) format {
	f := format{id: id, code: code}
	switch {
	case code != "":
		f.date, f.fraction = classifyCode(code)
	case id == 12 || id == 13:
		f.fraction = true
	// ECMA-376 Part 1, 18.8.30: dates and times, the latter two groups in
	// East Asian editions.
	case id >= 14 && id <= 22, id >= 45 && id <= 47, id >= 27 && id <= 36, id >= 50 && id <= 58:
		f.date = true
	}
	return f
}

// classifyCode looks at the first section of a format, that of positive
// numbers.
func classifyCode(code string) (date, fraction bool) {
	defer func() {
		if recover() != nil { // a code that the parser does not know is no date
			date, fraction = false, false
		}
	}()
	parser := nfp.NumberFormatParser()
	sections := parser.Parse(code)
	if len(sections) == 0 {
		return false, false
	}
	for _, item := range sections[0].Items {
		switch item.TType {
		case nfp.TokenTypeDateTimes, nfp.TokenTypeElapsedDateTimes:
			date = true
		case nfp.TokenTypeFraction:
			fraction = true
		}
	}
	return date, fraction && !date
}

// format returns the format of a style id.
func (b *Book) format(style int) format {
	if style < 0 || style >= len(b.formats) {
		return format{}
	}
	return b.formats[style]
}
