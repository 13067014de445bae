package workbook

import "github.com/xuri/excelize/v2"

// dateShower shows numbers as their date formats do, on a scratch sheet.
type dateShower struct {
	scratch *excelize.File
	styles  map[format]int
}

func newDateShower(date1904 bool) *dateShower {
	d := &dateShower{scratch: excelize.NewFile(), styles: map[format]int{}}
	if err := d.scratch.SetWorkbookProps(&excelize.WorkbookPropsOptions{Date1904: &date1904}); err != nil {
		d.scratch = nil
	}
	return d
}

// shown returns a number as its date format shows it, or as it stands in the
// file where that cannot be told.
func (b *Book) shown(f format, n float64, raw string) (text string) {
	defer func() {
		if recover() != nil {
			text = raw
		}
	}()
	if b.dates == nil {
		b.dates = newDateShower(b.date1904)
	}
	if text = b.dates.show(f, n); text == "" {
		return raw
	}
	return text
}

func (d *dateShower) show(f format, n float64) string {
	const sheet, cell = "Sheet1", "A1"
	style, err := d.style(f)
	if d.scratch == nil || err != nil {
		return ""
	}
	if d.scratch.SetCellFloat(sheet, cell, n, -1, 64) != nil || d.scratch.SetCellStyle(sheet, cell, cell, style) != nil {
		return ""
	}
	text, err := d.scratch.GetCellValue(sheet, cell)
	if err != nil {
		return ""
	}
	return text
}

func (d *dateShower) style(f format) (int, error) {
	if id, ok := d.styles[f]; ok {
		return id, nil
	}
	style := &excelize.Style{NumFmt: f.id}
	if f.code != "" {
		style = &excelize.Style{CustomNumFmt: &f.code}
	}
	id, err := d.scratch.NewStyle(style)
	if err == nil {
		d.styles[f] = id
	}
	return id, err
}
