package workbook

import "stanchion/schedule/workbook/internal/markup"

// link leads from a cell to a place in the workbook.
type link struct{ cell, to string }

// maxLinks is how many links a sheet may hold.
const maxLinks = 65_530

// lateLinks returns the links of a sheet.
func lateLinks(list []link) late {
	if len(list) == 0 {
		return late{}
	}
	b := []byte("<hyperlinks>")
	for _, k := range list[:min(len(list), maxLinks)] {
		b = append(b, `<hyperlink ref="`...)
		b = append(b, k.cell...)
		b = append(b, `" location="`...)
		b = markup.AppendEscaped(b, k.to)
		b = append(b, `"/>`...)
	}
	return late{element: append(b, "</hyperlinks>"...), behind: behindLinks}
}
