package schedule

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"stanchion/design"
)

// setting is one line of the settings table.
type setting struct {
	name    string
	folded  []string // spellings, folded
	initial string   // applied before all others; empty: none
	values  string   // for people
	apply   func(*settingsReader, string) error
	show    func(*Settings) string // a value that apply reads back
}

// settingTable lists the settings: one line a setting.
var settingTable []setting

func init() {
	settingTable = []setting{
		{"national", spell("national|national set|national annex"), "UK", "UK, EN, DE, IE, IT, ES, NO, DK, or a set of the user's", applyNational, func(s *Settings) string { return s.Design.National.Name }},
		numberSetting("gamma_M0", "gamma_M0|gammaM0", "", 0.5, 3, func(s *Settings) *float64 { return &s.Design.National.GammaM0 }),
		numberSetting("gamma_M1", "gamma_M1|gammaM1", "", 0.5, 3, func(s *Settings) *float64 { return &s.Design.National.GammaM1 }),
		numberSetting("gamma_M,fi", "gamma_Mfi|gammaMfi", "", 0.5, 3, func(s *Settings) *float64 { return &s.Design.National.GammaMfi }),
		choiceSetting("strength", "strength|yield strength", "", func(s *Settings) *design.StrengthSource { return &s.Design.National.Strength }, "product", "table31"),
		{"grade", spell("grade|grades|default grade|steel grade"), "S355", "S355 ...; several, separated by spaces, leave the choice open", applyGrades, func(s *Settings) string { return strings.Join(s.Design.Grades, " ") }},
		{"families", spell("families|family|default family|section families"), "UKC", "UKC ...; several, separated by commas", applyFamilies, func(s *Settings) string { return strings.Join(s.Design.Families, ", ") }},
		{"hollow sections", spell("hollow sections|hollow section finish|finish"), "hot finished", "hot finished, cold formed: of hollow sections that do not say", applyFinish, showFinish},
		{"exclude", spell("exclude|excluded sections|excluded"), "", "sections that may not be chosen, separated by semicolons", applyExclude, func(s *Settings) string { return strings.Join(s.Design.Exclude, "; ") }},
		{"stock", spell("stock|stock list"), "", "a CSV of the sections that may be used", func(r *settingsReader, v string) error { r.set.Stock, r.set.Design.Stock = v, v; return nil }, func(s *Settings) string { return s.Stock }},
		{"compression", spell("compression"), "", "positive, negative", applyCompression, showCompression},
		numberSetting("limit", "limit|utilisation limit|utilization limit", "1.00", 0.01, 1.5, func(s *Settings) *float64 { return &s.Design.Limit }),
		choiceSetting("effective length", "effective length|effective lengths|method", "segment", func(s *Settings) *design.Method { return &s.Design.Method }, "segment", "elastic"),
		choiceSetting("moments", "moments|moment rule", "analysis", func(s *Settings) *design.MomentRule { return &s.Design.Moments }, "analysis", "simple"),
		choiceSetting("interaction", "interaction", "annex B", func(s *Settings) *design.Interaction { return &s.Design.Interaction }, "annex B", "annex A", "simple"),
		choiceSetting("LTB", "LTB|lateral torsional buckling", "rolled", func(s *Settings) *design.LTBMethod { return &s.Design.LTB }, "rolled", "general"),
		offSetting("self-weight", "self weight|own weight", 0.1, 3, func(s *Settings) *float64 { return &s.Design.SelfWeight }, "0"),
		numberSetting("growth", "growth", "1.00", 0.01, 100, func(s *Settings) *float64 { return &s.Design.Growth }),
		offSetting("fire", "fire|eta_fi", 0.01, 1, func(s *Settings) *float64 { return &s.Design.FireRatio }, "off"),
		offSetting("fire period", "fire period|fire resistance period", 1, 360, func(s *Settings) *float64 { return &s.Design.FirePeriod }, "off"),
		offSetting("shadow factor", "shadow factor|k_sh", 0.01, 1, func(s *Settings) *float64 { return &s.Design.ShadowFactor }, "off"),
		choiceSetting("objective", "objective", "mass", func(s *Settings) *design.Objective { return &s.Design.Rates.Objective }, "mass", "cost", "carbon"),
	}
	settingTable = append(settingTable, projectSetting(), paperSetting())
	settingTable = append(settingTable, togetherSettings()...)
	settingTable = append(settingTable, takeOffSettings()...)
}

// projectSetting names the project on what is handed over.
func projectSetting() setting {
	const most = 120 // letters that a title block holds
	return setting{"project", spell("project|project name|project title"), "", "the project's name, for title blocks and the summary",
		func(r *settingsReader, v string) error {
			if len([]rune(v)) > most {
				return fmt.Errorf("is longer than the %d letters of a title block: shorten it", most)
			}
			r.set.Project = v
			return nil
		},
		func(s *Settings) string { return s.Project }}
}

// Paper is a size of paper.
type Paper uint8

// The sizes of paper; A4 is the default.
const (
	A4 Paper = iota
	A3
)

const paperName = "paper"

// Layout reports whether the setting is of what is printed, not of the design.
func (l *SettingLine) Layout() bool { return l.Name == paperName }

// paperSetting says on what paper sheets and calculations are to be printed.
func paperSetting() setting {
	s := choiceSetting(paperName, "paper|paper size|page size", "A4", func(s *Settings) *Paper { return &s.Paper }, "A4", "A3")
	s.values += ": of the program's own sheets and of calculation sheets"
	return s
}

// SettingInfo describes one setting for people.
type SettingInfo struct {
	Name, Values string
	Initial      string // the default; empty: from the national set, or none
	What         string // it is; empty: name and values say so
}

// Explained returns the values of a setting, the default first, and what it
// is.
func (i *SettingInfo) Explained() string {
	text := i.Values
	if i.Initial != "" && !strings.HasPrefix(text, i.Initial) {
		text = i.Initial + ", or " + text
	}
	if i.What != "" {
		text += ": " + i.What
	}
	return text
}

// settingMeanings say what settings are where their values do not.
var settingMeanings = map[string]string{
	"gamma_M0":                "in place of the national set's",
	"gamma_M1":                "in place of the national set's",
	"gamma_M,fi":              "in place of the national set's",
	"strength":                "f_y by thickness from the product standard or from Table 3.1, in place of the national set's",
	"grade":                   "of rows that give none",
	"families":                "what is chosen from, for rows that do not say",
	"compression":             "the sign that compression has in the schedule",
	"limit":                   "the greatest utilisation that passes",
	"effective length":        "of each length between restraints by its ends, or from the elastic critical load of the whole column",
	"moments":                 "those given, or nominal ones of the beam reactions (simple construction)",
	"interaction":             "the factors of (6.61) and (6.62)",
	"LTB":                     "6.3.2.3 for rolled sections, or 6.3.2.2",
	"self-weight":             "the load factor of the columns' own weight",
	"growth":                  "multiplies every given action",
	"fire":                    "the load ratio eta_fi, by which critical temperatures are found",
	"fire period":             "min, compared with the time until an unprotected column is as hot",
	"shadow factor":           "k_sh of every section, in place of EN 1993-1-2, 4.2.5.1",
	"objective":               "what the lightest is the least of",
	"splices":                 "where the section of a stack may change",
	"splice cost":             "of one splice, as the objective counts: kg of steel, cost or kg of carbon",
	"cost [FAMILY] [GRADE]":   "the objective cost and the take-off go by it",
	"carbon [FAMILY] [GRADE]": "the objective carbon and the take-off go by it",
}

// SettingInfos returns the settings in their order, those that are given for a
// heading or a kind of steel last.
func SettingInfos() []SettingInfo {
	var list []SettingInfo
	for i := range settingTable {
		list = append(list, SettingInfo{Name: settingTable[i].name, Values: settingTable[i].values, Initial: settingTable[i].initial})
	}
	list = append(list,
		SettingInfo{Name: "cost [FAMILY] [GRADE]", Values: "cost per tonne"},
		SettingInfo{Name: "carbon [FAMILY] [GRADE]", Values: "embodied carbon, kg per kg"},
		SettingInfo{Name: "map HEADING", Values: "the field that a heading of the user's stands for, or " + ignored})
	for i := range list {
		list[i].What = settingMeanings[list[i].Name]
	}
	return list
}

func settingNames() []string {
	var list []string
	for _, s := range SettingInfos() {
		list = append(list, s.Name)
	}
	return list
}

func spell(list string) []string {
	var folded []string
	for _, s := range strings.Split(list, "|") {
		folded = append(folded, foldSetting(s))
	}
	return folded
}

// numberSetting is a setting that is a number between two others.
func numberSetting(name, spellings, initial string, low, high float64, field func(*Settings) *float64) setting {
	return setting{name, spell(spellings), initial, fmt.Sprintf("a number from %s to %s", showNumber(low), showNumber(high)),
		func(r *settingsReader, v string) (err error) {
			x, err := settingNumber(v, low, high)
			if err == nil {
				*field(r.set) = x
			}
			return err
		},
		func(s *Settings) string { return showNumber(*field(s)) }}
}

// offSetting is a setting that is off, or a number between two others.
func offSetting(name, spellings string, low, high float64, field func(*Settings) *float64, off string) setting {
	s := numberSetting(name, spellings, off, low, high, field)
	number := s.apply
	s.values = off + ", or " + s.values
	s.apply = func(r *settingsReader, v string) error {
		if x, err := settingNumber(v, 0, 0); err == nil && x == 0 || oneOf(strings.ToLower(v), "off", "no", "none", "") {
			*field(r.set) = 0
			return nil
		}
		return number(r, v)
	}
	s.show = func(s *Settings) string {
		if *field(s) == 0 {
			return off
		}
		return showNumber(*field(s))
	}
	return s
}

// choiceSetting is a setting with few values, in the order of the type's
// constants.
func choiceSetting[T ~uint8](name, spellings, initial string, field func(*Settings) *T, values ...string) setting {
	return setting{name, spell(spellings), initial, strings.Join(values, ", "),
		func(r *settingsReader, v string) error {
			for i, value := range values {
				if foldSetting(v) == foldSetting(value) || "annex"+foldSetting(v) == foldSetting(value) {
					*field(r.set) = T(i)
					return nil
				}
			}
			return fmt.Errorf("give one of %s", strings.Join(values, ", "))
		},
		func(s *Settings) string { return values[*field(s)] }}
}

// settingNumber reads a number with either decimal mark.
func settingNumber(v string, low, high float64) (float64, error) {
	x, rest, err := splitNumber(v, '.')
	if err != nil {
		x, rest, err = splitNumber(v, ',')
	}
	if rest == "%" {
		x, rest = x/100, ""
	}
	if err != nil || rest != "" || math.IsNaN(x) || x < low || x > high {
		return 0, fmt.Errorf("give a number from %s to %s", showNumber(low), showNumber(high))
	}
	return x, nil
}

// showNumber writes a number so that it reads back the same, with two decimals
// at least where it has any.
func showNumber(x float64) string {
	s := strconv.FormatFloat(x, 'f', -1, 64)
	if _, after, ok := strings.Cut(s, "."); ok && len(after) == 1 {
		s += "0"
	} else if !ok && x != 0 && x < 10 {
		s += ".00"
	}
	return s
}

func applyNational(r *settingsReader, v string) error {
	if r.national == nil {
		return fmt.Errorf("national sets are not to be had")
	}
	n, err := r.national(v)
	if err == nil {
		r.set.Design.National = n
	}
	return err
}

func applyGrades(r *settingsReader, v string) error {
	var grades []string
	for _, g := range strings.FieldsFunc(v, func(c rune) bool { return isSpace(c) || c == ',' || c == ';' }) {
		name, err := parseGrade(g)
		if err != nil {
			return err
		}
		grades = append(grades, name)
	}
	if len(grades) == 0 {
		return fmt.Errorf("give a grade, such as S355")
	}
	r.set.Design.Grades = grades
	return nil
}

func applyFamilies(r *settingsReader, v string) error {
	families, err := parseFamilies(v)
	if err == nil && len(families) == 0 {
		err = fmt.Errorf("give a family, such as UKC")
	}
	if err == nil {
		r.set.Design.Families = families
	}
	return err
}

func applyFinish(r *settingsReader, v string) error {
	switch foldSetting(v) {
	case "hot", "hotfinished", "hf":
		r.set.Design.ColdFormed = false
	case "cold", "coldformed", "cf":
		r.set.Design.ColdFormed = true
	default:
		return fmt.Errorf("give hot finished or cold formed")
	}
	return nil
}

func showFinish(s *Settings) string {
	if s.Design.ColdFormed {
		return "cold formed"
	}
	return "hot finished"
}

func applyExclude(r *settingsReader, v string) error {
	r.set.Design.Exclude = nil
	for _, s := range strings.FieldsFunc(v, func(c rune) bool { return c == ';' || c == ',' || c == '\n' }) {
		if s = trim(s); s != "" {
			r.set.Design.Exclude = append(r.set.Design.Exclude, s)
		}
	}
	return nil
}

func applyCompression(r *settingsReader, v string) error {
	switch v = strings.ToLower(v); v {
	case "positive", "negative":
		r.set.Compression = v
		return nil
	case "+", "+ve":
		r.set.Compression = "positive"
		return nil
	case "-", "-ve":
		r.set.Compression = "negative"
		return nil
	case assumedPositive:
		r.set.Compression = ""
		return nil
	}
	return fmt.Errorf("give positive or negative")
}

// assumedPositive is written where nobody has said the sign: read again, it
// still leaves the sign open to doubt.
const assumedPositive = "positive (assumed)"

func showCompression(s *Settings) string {
	if s.Compression == "" {
		return assumedPositive
	}
	return s.Compression
}
