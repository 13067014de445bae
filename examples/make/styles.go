package main

import (
	"maps"
	"slices"

	"github.com/xuri/excelize/v2"
)

const (
	ink   = "22313F"
	shade = "E3E8EC"
	rule  = "9AA5AE"
)

// makeStyles makes every style of the workbook, by name.
func makeStyles(f *excelize.File) (map[string]int, error) {
	thin := func(sides ...string) []excelize.Border {
		var b []excelize.Border
		for _, s := range sides {
			b = append(b, excelize.Border{Type: s, Color: rule, Style: 1})
		}
		return b
	}
	box := thin("left", "right", "top", "bottom")
	centre := &excelize.Alignment{Horizontal: "center", Vertical: "center", WrapText: true}
	metre, whole, force := "0.00", "0", "#,##0"
	styles := map[string]*excelize.Style{
		"title":       {Font: &excelize.Font{Family: "Calibri", Bold: true, Size: 18, Color: ink}},
		"subtitle":    {Font: &excelize.Font{Family: "Calibri", Size: 12, Color: ink}},
		"label":       {Font: &excelize.Font{Family: "Calibri", Bold: true, Color: ink}},
		"plain":       {},
		"note":        {Font: &excelize.Font{Family: "Calibri", Italic: true, Size: 10}},
		"heading":     {Font: &excelize.Font{Family: "Calibri", Bold: true, Color: ink}, Fill: fill(shade), Border: box, Alignment: centre},
		"unit":        {Font: &excelize.Font{Family: "Calibri", Italic: true, Color: ink}, Fill: fill(shade), Border: box, Alignment: centre},
		"text":        {},
		"centre":      {Alignment: &excelize.Alignment{Horizontal: "center"}},
		"grid":        {Font: &excelize.Font{Family: "Calibri", Bold: true}, Alignment: &excelize.Alignment{Horizontal: "center", Vertical: "top"}},
		"metre":       {CustomNumFmt: &metre},
		"whole":       {CustomNumFmt: &whole},
		"force":       {CustomNumFmt: &force},
		"total":       {Font: &excelize.Font{Family: "Calibri", Bold: true}, Border: thin("top", "bottom")},
		"total metre": {Font: &excelize.Font{Family: "Calibri", Bold: true}, Border: thin("top", "bottom"), CustomNumFmt: &metre},
		"total whole": {Font: &excelize.Font{Family: "Calibri", Bold: true}, Border: thin("top", "bottom"), CustomNumFmt: &whole},
	}
	// The first row of a stack has a line above it.
	for _, name := range []string{"text", "centre", "grid", "metre", "whole", "force"} {
		s := *styles[name]
		s.Border = thin("top")
		styles[name+" first"] = &s
	}
	ids := map[string]int{}
	for _, name := range slices.Sorted(maps.Keys(styles)) {
		id, err := f.NewStyle(styles[name])
		if err != nil {
			return nil, err
		}
		ids[name] = id
	}
	return ids, nil
}

func fill(colour string) excelize.Fill {
	return excelize.Fill{Type: "pattern", Pattern: 1, Color: []string{colour}}
}
