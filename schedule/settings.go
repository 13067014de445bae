package schedule

import (
	"fmt"
	"sort"
	"strings"

	"stanchion/design"
)

// Assignment is one setting as someone gave it.
type Assignment struct {
	Name, Value string
	Where       string // cell, line or flag, for messages
}

// ParseAssignment parts NAME=VALUE, as a flag gives it.
func ParseAssignment(s string) (Assignment, error) {
	name, value, ok := strings.Cut(s, "=")
	if !ok || strings.TrimSpace(name) == "" {
		return Assignment{}, fmt.Errorf("%q is not a setting: give NAME=VALUE", s)
	}
	return Assignment{Name: strings.TrimSpace(name), Value: strings.TrimSpace(value), Where: "--set " + s}, nil
}

// Settings are the decisions of a run: what the design needs, and what the
// reading and the command need beside it.
type Settings struct {
	Design      design.Settings
	Compression string // positive, negative; empty: not said
	Project     string // name of the project; empty: not said
	Paper       Paper  // that what is handed over is laid out for
	Stock       string // file of the sections that may be used; empty: the whole catalogue
	TakeOff     TakeOff
	Together    Together
	lines       []SettingLine
}

// SettingLine is one setting as it was used.
type SettingLine struct {
	Name, Value string
	From        string // "default", "national set UK", a cell or a flag
}

// Used returns every setting of the run in a fixed order, to be written back
// beside the results: read again, they give the same run.
func (s *Settings) Used() []SettingLine { return s.lines }

// UnknownSettingError says that a setting has a name that none has.
type UnknownSettingError struct{ Name string }

func (e *UnknownSettingError) Error() string {
	return e.brief() + ": the settings are " + strings.Join(settingNames(), ", ")
}

// settingsReader applies settings in layers: defaults, the file's, the command
// line's. Within a layer the national set goes first, so that a partial factor
// given beside it stands; a national set of a later layer brings its own.
type settingsReader struct {
	set      *Settings
	from     map[string]string
	maps     mapping
	mapLines []Assignment
	national func(string) (design.National, error)
}

func newSettingsReader(national func(string) (design.National, error)) (*settingsReader, error) {
	r := &settingsReader{set: &Settings{}, from: map[string]string{}, national: national}
	for i := range settingTable {
		if s := &settingTable[i]; s.initial != "" {
			if err := r.apply(Assignment{s.name, s.initial, "default"}); err != nil {
				return nil, err
			}
		}
	}
	return r, nil
}

// layer applies the settings of one place. Those that no setting answers to
// are returned; a value that is none is an error.
func (r *settingsReader) layer(list []Assignment) (unknown []Assignment, err error) {
	for _, nationalFirst := range []bool{true, false} {
		for _, a := range list {
			if (foldSetting(a.Name) == "national") != nationalFirst {
				continue
			}
			switch err := r.apply(a); err.(type) {
			case nil:
			case *UnknownSettingError:
				unknown = append(unknown, a)
			default:
				return nil, &badSetting{a, err}
			}
		}
	}
	return unknown, nil
}

// badSetting is a setting whose value is none.
type badSetting struct {
	Assignment
	why error
}

func (e *badSetting) Error() string { return e.why.Error() }
func (e *badSetting) Unwrap() error { return e.why }

// apply applies one setting.
func (r *settingsReader) apply(a Assignment) error {
	folded := foldSetting(a.Name)
	for _, prefix := range []string{"map", "cost", "carbon"} {
		if rest, ok := cutWord(a.Name, prefix); ok && (rest != "" || prefix != "map") {
			return r.applyNamed(prefix, rest, a)
		}
	}
	for i := range settingTable {
		s := &settingTable[i]
		if !oneOf(folded, s.folded...) {
			continue
		}
		if err := s.apply(r, strings.TrimSpace(a.Value)); err != nil {
			return fmt.Errorf("%s is %q: %w", s.name, a.Value, err)
		}
		r.from[s.name] = a.Where
		if s.name == "national" {
			for _, n := range []string{"gamma_M0", "gamma_M1", "gamma_M,fi", "strength"} {
				r.from[n] = "national set " + r.set.Design.National.Name
			}
		}
		return nil
	}
	return &UnknownSettingError{a.Name}
}

// applyNamed applies a setting that is given for a heading or for a kind of
// steel: `map My header`, `cost UKC S355`, `carbon`.
func (r *settingsReader) applyNamed(prefix, rest string, a Assignment) error {
	if prefix == "map" {
		if err := r.maps.add(Assignment{rest, a.Value, a.Where}); err != nil {
			return fmt.Errorf("%s: %w", a.Name, err)
		}
		r.mapLines = append(r.mapLines, Assignment{rest, a.Value, a.Where})
		return nil
	}
	x, err := settingNumber(a.Value, 0, 1e6)
	if err != nil {
		return fmt.Errorf("%s is %q: %w", a.Name, a.Value, err)
	}
	rates := &r.set.Design.Rates
	to := &rates.CostPerTonne
	if prefix == "carbon" {
		to = &rates.CarbonPerKg
	}
	if *to == nil {
		*to = map[string]float64{}
	}
	(*to)[rest] = x
	r.from[strings.TrimSpace(prefix+" "+rest)] = a.Where
	return nil
}

// cutWord takes a first word off a setting's name.
func cutWord(name, word string) (rest string, ok bool) {
	name = strings.TrimSpace(name)
	if len(name) < len(word) || !strings.EqualFold(name[:len(word)], word) {
		return "", false
	}
	rest = name[len(word):]
	if rest != "" && rest[0] != ' ' && rest[0] != ':' {
		return "", false
	}
	return strings.Trim(rest, " :"), true
}

// finish writes down what is used.
func (r *settingsReader) finish() *Settings {
	s := r.set
	s.Design.TensionPositive = s.Compression == "negative"
	s.lines = s.lines[:0]
	for i := range settingTable {
		line := &settingTable[i]
		from := r.from[line.name]
		if from == "" {
			from = "default"
		}
		s.lines = append(s.lines, SettingLine{line.name, line.show(s), from})
	}
	s.lines = append(s.lines, r.rateLines("cost", s.Design.Rates.CostPerTonne)...)
	s.lines = append(s.lines, r.rateLines("carbon", s.Design.Rates.CarbonPerKg)...)
	for _, m := range r.mapLines {
		s.lines = append(s.lines, SettingLine{"map " + m.Name, m.Value, m.Where})
	}
	return s
}

func (r *settingsReader) rateLines(prefix string, rates map[string]float64) []SettingLine {
	var list []SettingLine
	for name, x := range rates {
		full := strings.TrimSpace(prefix + " " + name)
		list = append(list, SettingLine{full, showNumber(x), r.from[full]})
	}
	sort.Slice(list, func(i, j int) bool { return list[i].Name < list[j].Name })
	return list
}

func foldSetting(s string) string { return compact(s) }
