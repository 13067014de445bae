package schedule

import "strings"

// Annotated is a Source that may hold sheets which an earlier run added.
type Annotated interface {
	// OwnSheet names the sheet that was added as what is asked for; "": none.
	OwnSheet(what string) string
}

// readEarlier reads what the settings of the run that annotated a schedule say
// of its steel: where its splices are, allowances and rates. They stand on that
// run's own sheet, as a table of setting, value and where it came from.
func readEarlier(src Source, what string) ([]Assignment, error) {
	own, ok := src.(Annotated)
	if !ok || what == "" || own.OwnSheet(what) == "" {
		return nil, nil
	}
	sheet := own.OwnSheet(what)
	var list []Assignment
	inside := false
	for r, err := range src.Rows(sheet) {
		if err != nil {
			return nil, err
		}
		name, value, from := r.at(0).text(), r.at(1).text(), r.at(2).text()
		switch {
		case name == "Setting" && value == "Value":
			inside = true
		case name == "":
			inside = false
		case inside && value != "" && from != "default" && ofSteel(name):
			list = append(list, Assignment{strings.Clone(name), strings.Clone(value), src.Where(sheet, r.Number, 1)})
		}
	}
	return list, nil
}

// ofSteel reports whether a setting is one that a take-off counts by.
func ofSteel(name string) bool {
	for _, rates := range []string{"cost", "carbon"} {
		if _, ok := cutWord(name, rates); ok {
			return true
		}
	}
	return oneOf(name, "splices", "connections", "waste", "transport length")
}
