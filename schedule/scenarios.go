package schedule

import (
	"fmt"
	"slices"
	"strings"
)

// Scenario is a set of settings under which a schedule is designed beside
// others.
type Scenario struct {
	Name     string
	Settings []Assignment
}

// ParseScenario reads "NAME: setting=value; setting=value". A value may hold
// semicolons: what follows one without a sign of equality belongs to it.
func ParseScenario(s string) (Scenario, error) {
	name, rest, ok := strings.Cut(s, ":")
	if name = trim(name); !ok || name == "" || strings.Contains(name, "=") {
		return Scenario{}, fmt.Errorf("%q is not a scenario: give \"NAME: setting=value; setting=value\"", s)
	}
	sc := Scenario{Name: name}
	for _, part := range strings.Split(rest, ";") {
		switch last := len(sc.Settings) - 1; {
		case trim(part) == "":
		case strings.Contains(part, "="):
			a, err := ParseAssignment(part)
			if err != nil {
				return Scenario{}, fmt.Errorf("scenario %q: %w", name, err)
			}
			a.Where = fmt.Sprintf("scenario %q", name)
			sc.Settings = append(sc.Settings, a)
		case last >= 0:
			sc.Settings[last].Value += ";" + part
		default:
			return Scenario{}, fmt.Errorf("scenario %q: %q is not a setting: give setting=value", name, trim(part))
		}
	}
	if len(sc.Settings) == 0 {
		return Scenario{}, fmt.Errorf("scenario %q changes nothing: give setting=value", name)
	}
	return sc, nil
}

// scenariosSheet is the name of the sheet that holds scenarios.
const scenariosSheet = "Scenarios"

// ScenariosSheet returns the sheet of a source that holds scenarios, and
// whether there is one.
func ScenariosSheet(src Source) (sheet string, ok bool) {
	for _, s := range allSheets(src) {
		if strings.EqualFold(trim(s), scenariosSheet) {
			return s, true
		}
	}
	return "", false
}

// ReadScenarios reads a table of scenarios: a heading Scenario over their
// names, and beside it names of settings over their values. A blank cell
// leaves the setting as it is.
func ReadScenarios(src Source, sheet string) ([]Scenario, error) {
	var list []Scenario
	var header *Row
	name := -1
	for r, err := range src.Rows(sheet) {
		if err != nil {
			return nil, err
		}
		if header == nil {
			if name = scenarioColumn(r); name >= 0 {
				header = r.clone()
			}
			continue
		}
		sc, err := readScenario(src, sheet, header, name, r)
		if err != nil {
			return nil, err
		}
		if len(sc.Settings) > 0 {
			list = append(list, sc)
		}
	}
	if len(list) == 0 {
		return nil, &Refusal{Problem: Problem{File: src.Name(), What: "no scenario is found",
			Do: "give a heading Scenario over names, and beside it names of settings over values"}}
	}
	return list, nil
}

// scenarioColumn is the column headed Scenario; -1: none.
func scenarioColumn(r *Row) int {
	return slices.IndexFunc(r.Cells, func(c Cell) bool {
		return oneOf(foldSetting(c.text()), "scenario", "scenarios", "scenarioname")
	})
}

func readScenario(src Source, sheet string, header *Row, name int, r *Row) (Scenario, error) {
	sc := Scenario{Name: strings.Clone(r.at(name).text())}
	for col := range r.Cells {
		heading, value := header.at(col).text(), r.at(col).text()
		if col == name || value == "" || nothing(value) || heading == "" {
			continue
		}
		sc.Settings = append(sc.Settings, Assignment{strings.Clone(heading), strings.Clone(value), src.Where(sheet, r.Number, col)})
	}
	if sc.Name == "" && len(sc.Settings) > 0 {
		return sc, &Refusal{Problem: Problem{File: src.Name(), Cell: src.Where(sheet, r.Number, name), What: "the scenario has no name", Do: "give it one"}}
	}
	return sc, nil
}

// CheckScenarios refuses scenarios that cannot be told apart.
func CheckScenarios(list []Scenario) error {
	seen := map[string]bool{strings.ToLower(AsGiven): true}
	for i := range list {
		key := strings.ToLower(list[i].Name)
		if seen[key] {
			return fmt.Errorf("two scenarios are called %q: rename one", list[i].Name)
		}
		seen[key] = true
	}
	return nil
}

// AsGiven is the name of the scenario that changes nothing.
const AsGiven = "as given"

// Changes writes what a scenario changes: "grade S275; limit 0.95".
func (s *Scenario) Changes() string {
	var list []string
	for _, a := range s.Settings {
		list = append(list, a.Name+" "+a.Value)
	}
	return strings.Join(list, "; ")
}
