package schedule

import "strings"

// settingsSheet is the name of the sheet that holds settings.
const settingsSheet = "Settings"

// IsSettingsSheet reports whether a sheet of this name holds settings.
func IsSettingsSheet(name string) bool {
	return strings.EqualFold(strings.TrimSpace(name), settingsSheet)
}

// readSettings reads a sheet of name and value: the first two cells of each
// row that hold something. A row without a value says nothing.
func readSettings(src Source, sheet string) ([]Assignment, error) {
	var list []Assignment
	for r, err := range src.Rows(sheet) {
		if err != nil {
			return nil, err
		}
		var pair []string
		col := 0
		for i := range r.Cells {
			if text := r.Cells[i].text(); text != "" && len(pair) < 2 {
				if len(pair) == 0 {
					col = i
				}
				pair = append(pair, strings.Clone(text))
			}
		}
		if len(pair) < 2 || oneOf(foldSetting(pair[0]), "name", "setting", "settings") && oneOf(foldSetting(pair[1]), "value", "values") {
			continue
		}
		list = append(list, Assignment{pair[0], pair[1], src.Where(sheet, r.Number, col+1)})
	}
	return list, nil
}

// readAllSettings applies the settings in their layers and returns notes about
// those that the file names and nothing answers to.
func readAllSettings(src Source, opts *Options) (*settingsReader, []string, error) {
	r, err := newSettingsReader(opts.National)
	if err != nil {
		return nil, nil, err
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
			notes = append(notes, a.Where+": "+(&UnknownSettingError{a.Name}).brief()+": it is passed over")
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

func (e *UnknownSettingError) brief() string { return `unknown setting "` + e.Name + `"` }

// settingRefusal says which setting is wrong, and where it was given.
func settingRefusal(file string, err error) error {
	r := &Refusal{Problem: Problem{File: file, What: err.Error()}}
	if bad, ok := err.(*badSetting); ok {
		r.Cell, r.Heading, r.Value = bad.Where, bad.Name, bad.Value
	}
	return r
}
