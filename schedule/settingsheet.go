package schedule

import (
	"strings"

	"github.com/agnivade/levenshtein"
)

// settingsSheet is the name of the sheet that holds settings.
const settingsSheet = "Settings"

// IsSettingsSheet reports whether a sheet of this name holds settings.
func IsSettingsSheet(name string) bool {
	return strings.EqualFold(strings.TrimSpace(name), settingsSheet)
}

// readSettings reads a sheet of name and value: the columns that are headed so
// or, without such a heading, the first two cells of each row that hold
// something. A row without a value says nothing.
func readSettings(src Source, sheet string) ([]Assignment, error) {
	var list []Assignment
	headed := false
	name, value := 0, 0
	for r, err := range src.Rows(sheet) {
		if err != nil {
			return nil, err
		}
		if !headed {
			name, value = firstTwo(r)
		}
		n, v := strings.Clone(r.at(name).text()), strings.Clone(r.at(value).text())
		switch {
		case n == "" || v == "":
		case oneOf(foldSetting(n), "name", "setting", "settings") && oneOf(foldSetting(v), "value", "values"):
			headed = true
		default:
			list = append(list, Assignment{n, v, src.Where(sheet, r.Number, value)})
		}
	}
	return list, nil
}

// firstTwo returns the columns of the first two cells of a row that hold
// something.
func firstTwo(r *Row) (first, second int) {
	first, second = -1, -1
	for i := range r.Cells {
		switch {
		case r.Cells[i].text() == "":
		case first < 0:
			first = i
		default:
			return first, i
		}
	}
	return first, second
}

// readAllSettings applies the settings in their layers and returns notes about
// those that the file names and nothing answers to.
func readAllSettings(src Source, opts *Options) (*settingsReader, []string, error) {
	r, err := newSettingsReader(opts.National)
	if err != nil {
		return nil, nil, err
	}
	earlier, err := readEarlier(src, opts.EarlierSheet)
	if err != nil {
		return nil, nil, err
	}
	if _, err := r.layer(earlier); err != nil {
		return nil, nil, settingRefusal(src.Name(), err)
	}
	var notes []string
	for _, place := range settingPlaces(src, opts) {
		list, err := readSettings(place.src, place.sheet)
		if err != nil {
			return nil, nil, err
		}
		unknown, err := r.layer(list)
		if err != nil {
			return nil, nil, settingRefusal(place.src.Name(), err)
		}
		for _, a := range unknown {
			where := a.Where
			if place.src == opts.SettingsFile {
				where = place.src.Name() + ", " + where
			}
			notes = append(notes, where+": "+(&UnknownSettingError{a.Name}).brief()+": it is passed over")
		}
	}
	unknown, err := r.layer(opts.Settings)
	if err == nil && len(unknown) > 0 {
		err = &UnknownSettingError{unknown[0].Name}
	}
	if err != nil {
		return nil, nil, settingRefusal("", err)
	}
	return r, notes, nil
}

type settingPlace struct {
	src   Source
	sheet string
}

// settingPlaces are the places that hold settings, the stronger last.
func settingPlaces(src Source, opts *Options) []settingPlace {
	var places []settingPlace
	for _, s := range allSheets(src) {
		if IsSettingsSheet(s) {
			places = append(places, settingPlace{src, s})
		}
	}
	if f := opts.SettingsFile; f != nil && len(f.Sheets()) > 0 {
		sheet := f.Sheets()[0]
		for _, s := range f.Sheets() {
			if IsSettingsSheet(s) {
				sheet = s
			}
		}
		places = append(places, settingPlace{f, sheet})
	}
	return places
}

// brief names the setting and the one that may have been meant.
func (e *UnknownSettingError) brief() string {
	text := `unknown setting "` + e.Name + `"`
	if near := nearestSetting(e.Name); near != "" {
		text += " (" + near + "?)"
	}
	return text
}

// nearestSetting returns the setting whose name differs from one by a slip of
// the keyboard; "" where none does.
func nearestSetting(name string) string {
	const slip = 2
	name = foldSetting(name)
	for far := 1; far <= slip; far++ {
		for _, s := range settingNames() {
			if len(name) > slip && levenshtein.ComputeDistance(name, foldSetting(s)) == far {
				return s
			}
		}
	}
	return ""
}

// settingRefusal says which setting is wrong, and where it was given.
func settingRefusal(file string, err error) error {
	r := &Refusal{Problem: Problem{File: file, What: err.Error()}}
	if bad, ok := err.(*badSetting); ok {
		r.Cell, r.Heading, r.Value = bad.Where, bad.Name, bad.Value
	}
	return r
}
