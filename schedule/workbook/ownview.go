package workbook

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

func (o *own) sizes(s *Sheet, name string) error {
	for c, w := range s.Widths {
		if w <= 0 {
			continue
		}
		col := columnName(c)
		if err := o.file.SetColWidth(name, col, col, w); err != nil {
			return err
		}
	}
	for _, m := range s.Merges {
		a, ok := parseArea(m)
		if !ok {
			return fmt.Errorf("cannot merge %q", m)
		}
		if a.firstCol < a.lastCol || a.firstRow < a.lastRow {
			o.sheets[name].merges = append(o.sheets[name].merges, a)
		}
	}
	return nil
}

func (o *own) view(s *Sheet, name string) error {
	off := false
	if err := o.file.SetSheetView(name, 0, &excelize.ViewOptions{ShowGridLines: &off}); err != nil {
		return err
	}
	if s.FreezeRows > 0 || s.FreezeCols > 0 {
		corner := cellName(s.FreezeCols, s.FreezeRows+1)
		pane := "bottomRight"
		switch {
		case s.FreezeRows == 0:
			pane = "topRight"
		case s.FreezeCols == 0:
			pane = "bottomLeft"
		}
		err := o.file.SetPanes(name, &excelize.Panes{
			Freeze: true, XSplit: s.FreezeCols, YSplit: s.FreezeRows, TopLeftCell: corner, ActivePane: pane,
			Selection: []excelize.Selection{{SQRef: corner, ActiveCell: corner, Pane: pane}},
		})
		if err != nil {
			return err
		}
	}
	if s.Filter != "" {
		if err := o.file.AutoFilter(name, s.Filter, nil); err != nil {
			return err
		}
	}
	if s.Hidden {
		if err := o.file.SetSheetVisible(name, false); err != nil {
			return err
		}
	}
	if s.TabColour != "" {
		return o.file.SetSheetProps(name, &excelize.SheetPropsOptions{TabColorRGB: &s.TabColour})
	}
	return nil
}

func (o *own) validations(s *Sheet, name string) error {
	for _, v := range s.Validations {
		dv := excelize.NewDataValidation(true)
		dv.SetSqref(v.Range)
		switch {
		case v.AllowedIn != "":
			dv.SetSqrefDropList(v.AllowedIn)
		case len(v.Allowed) > 0:
			if err := dv.SetDropList(v.Allowed); err != nil {
				return err
			}
		}
		if v.Prompt != "" {
			dv.SetInput(string(clipRunes(v.PromptTitle, 32)), string(clipRunes(v.Prompt, 255)))
		}
		if v.AllowedIn != "" || len(v.Allowed) > 0 {
			style := excelize.DataValidationErrorStyleStop
			if v.Loose {
				style = excelize.DataValidationErrorStyleWarning
			}
			dv.SetError(style, string(clipRunes(v.PromptTitle, 32)), "Not on the list.")
		}
		if err := o.file.AddDataValidation(name, dv); err != nil {
			return err
		}
	}
	return nil
}

func (o *own) rules(s *Sheet, name string) error {
	for _, r := range s.Rules {
		options := append([]excelize.ConditionalFormatOptions(nil), r.Options...)
		if r.Look != nil {
			style := r.Look.style(o.base)
			style.Font.Family, style.Font.Size, style.Alignment = "", 0, nil
			id, err := o.file.NewConditionalStyle(style)
			if err != nil {
				return err
			}
			for i := range options {
				options[i].Format = &id
			}
		}
		if err := o.file.SetConditionalFormat(name, r.Range, options); err != nil {
			return err
		}
	}
	return nil
}

func (o *own) charts(s *Sheet, name string) error {
	if len(s.Charts) > 0 { // it asks the library how high the rows are
		for _, r := range sortedKeys(s.Heights) {
			if err := o.file.SetRowHeight(name, r, s.Heights[r]); err != nil {
				return err
			}
		}
	}
	for _, c := range s.Charts {
		if err := o.file.AddChart(name, c.Cell, c.Chart, c.Combo...); err != nil {
			return err
		}
	}
	return nil
}
