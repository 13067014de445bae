// Package blank lays out an empty schedule: headings that the program knows
// without doubt, each explained, with the values that its cells may take.
package blank

import (
	"encoding/csv"
	"io"
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design/material"
	"stanchion/schedule"
	"stanchion/schedule/workbook"
)

// usual are the fields that most schedules need. N_Ed stands once a
// combination.
var usual = []string{"Mark", "Stack", "Level from", "Level to", "Quantity", "Length", "N_Ed ULS1", "N_Ed ULS2",
	"Ends y-y", "Ends z-z", "Restraints y-y", "Restraints z-z", "Restraints torsion",
	"Family", "Grade", "Section", "Greatest depth", "Greatest width", "Utilisation limit", "Group"}

// heading is one column of the empty schedule.
type heading struct {
	name  string
	field schedule.FieldInfo
}

// headings returns the columns: the usual ones, or one for every field.
func headings(all bool) []heading {
	var list []heading
	for _, f := range schedule.Fields() {
		if f.Name == "Level" {
			continue // its two parts have columns of their own
		}
		names := []string{f.Name}
		if f.Name == "N_Ed" {
			names = []string{"N_Ed ULS1", "N_Ed ULS2"}
		}
		for _, name := range names {
			if all || slices.Contains(usual, name) {
				list = append(list, heading{name, f})
			}
		}
	}
	if !all {
		slices.SortStableFunc(list, func(a, b heading) int {
			return slices.Index(usual, a.name) - slices.Index(usual, b.name)
		})
	}
	return list
}

// CSV writes an empty schedule as comma-separated text: a line of headings.
func CSV(w io.Writer, all bool) error {
	var line []string
	for _, h := range headings(all) {
		if h.field.Unit != "" {
			h.name += " [" + h.field.Unit + "]"
		}
		line = append(line, h.name)
	}
	out := csv.NewWriter(w)
	if err := out.Write(line); err != nil {
		return err
	}
	out.Flush()
	return out.Error()
}

// Workbook writes an empty schedule as a workbook: the schedule, its headings
// explained, and the settings.
func Workbook(w io.Writer, all bool) error {
	list := headings(all)
	return workbook.WriteNew(w, []workbook.Sheet{columnsSheet(list), headingsSheet(), settingsSheet()})
}

// allowed are the values of a field that has few.
func allowed(f *schedule.FieldInfo) []string {
	switch f.Name {
	case "Family":
		return catalogue.FamilyNames()
	case "Grade":
		return material.Names()
	}
	return f.Allowed
}

// values describes in words what a field takes.
func values(f *schedule.FieldInfo) string { return strings.Join(allowed(f), ", ") }
