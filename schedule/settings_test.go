package schedule

import (
	"errors"
	"strings"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/building"
	"stanchion/design/ec3"
)

const plain = "Mark | Length | N_Ed\nC1 | 4 | 900"

// used are the settings of a run by name.
func used(s *Schedule) map[string]string {
	m := map[string]string{}
	for _, l := range s.Settings.Used() {
		m[l.Name] = l.Value
	}
	return m
}

func TestDefaultSettings(t *testing.T) {
	s := readAll(t, sheetOf(plain))
	uk, err := ec3.NationalSet("UK")
	require.NoError(t, err)
	assert.Equal(t, design.Settings{National: uk, Grades: []string{"S355"}, Families: []string{"UKC"}, Limit: 1, Growth: 1}, s.Settings.Design)
	assert.Equal(t, map[string]string{
		"national": "UK", "gamma_M0": "1.00", "gamma_M1": "1.00", "gamma_M,fi": "1.00", "strength": "product", "grade": "S355", "families": "UKC",
		"hollow sections": "hot finished", "exclude": "", "stock": "", "compression": "positive (assumed)", "limit": "1.00", "effective length": "segment",
		"moments": "analysis", "interaction": "annex B", "LTB": "rolled", "self-weight": "0", "growth": "1.00", "fire": "off", "fire period": "off", "shadow factor": "off", "objective": "mass", "project": "", "paper": "A4",
		"splices": "as scheduled", "splice cost": "0", "sizes": "any", "time for sizes": "120", "reserve": "off", "reclaimed": "", "connections": "0", "waste": "0", "transport length": "off",
	}, used(s))
}

func TestSettings(t *testing.T) {
	s := readAll(t, sheetOf(plain), "National=DE", "gamma_m1=1.15", "strength=product", "grade=s355jr S275", "families=HE, SHS cf", "Hollow sections=cold",
		"exclude=203x203x46 UKC; UC 203x203x52", "compression=positive", "LIMIT=0.95", "effective_length=Elastic", "moments=simple", "interaction=annex A",
		"ltb=general", "self weight=1.35", "growth=1,1", "fire=0.65", "fire period=60", "shadow factor=0.7", "objective=cost", "cost=1500", "cost UKC S355=1400", "carbon SHS=1.9")
	d := s.Settings.Design
	assert.Equal(t, "DE", d.National.Name)
	assert.Equal(t, 1.15, d.National.GammaM1)
	assert.Equal(t, design.ProductStandard, d.National.Strength)
	assert.Equal(t, []string{"S355JR", "S275"}, d.Grades)
	assert.Equal(t, []string{"HEA", "HEB", "HEM", "SHS CF"}, d.Families)
	assert.True(t, d.ColdFormed)
	assert.Len(t, d.Exclude, 2)
	assert.Equal(t, []any{0.95, design.MethodElastic, design.MomentsSimple, design.AnnexA, design.LTBGeneral, 1.35, 1.1, 0.65, 60.0, 0.7},
		[]any{d.Limit, d.Method, d.Moments, d.Interaction, d.LTB, d.SelfWeight, d.Growth, d.FireRatio, d.FirePeriod, d.ShadowFactor})
	assert.Equal(t, design.Rates{Objective: design.ByCost, CostPerTonne: map[string]float64{"": 1500, "UKC S355": 1400}, CarbonPerKg: map[string]float64{"SHS": 1.9}}, d.Rates)

	// What is written back gives the same run.
	var again []string
	for _, l := range s.Settings.Used() {
		if l.Value != "" {
			again = append(again, l.Name+"="+l.Value)
		}
	}
	assert.Equal(t, d, readAll(t, sheetOf(plain), again...).Settings.Design)
}

func TestSettingsOfDecisionsTogether(t *testing.T) {
	for given, want := range map[string]string{
		"splices=every 2": "every 2", "splices=every 3rd length": "every 3", "Splices=Where it pays": "where it pays", "splices=As scheduled": "as scheduled",
		"splice cost=85": "85", "splice cost=off": "0", "sizes=6": "6", "sizes=any": "any", "time for sizes=30 s": "30", "time for sizes=off": "off",
		"reserve=yes": "on", "reserve=off": "off", "reclaimed=yard.csv": "yard.csv",
	} {
		s := readAll(t, sheetOf(plain), given)
		name, _, _ := strings.Cut(given, "=")
		name = strings.ToLower(name)
		assert.Equal(t, want, used(s)[name], given)
		// What is written back gives the same run.
		assert.Equal(t, s.Settings.Together, readAll(t, sheetOf(plain), name+"="+want).Settings.Together, given)
	}
	o := readAll(t, sheetOf(plain), "splices=every 2", "splice cost=85", "sizes=6").Settings.Together
	assert.Equal(t, building.Options{Splices: building.EveryNth, Every: 2, SpliceCost: 85, MostSizes: 6, TimeLimit: 2 * time.Minute}, o.Options)
}

func TestSettingsInLayers(t *testing.T) {
	src := sheetOf(plain)
	src.sheet("settings", "gamma_M1 | #1.2\nnational | DK\nmap Druck | N_Ed\ngrade |\n | lonely")
	s := readAll(t, src)
	assert.Equal(t, "DK", s.Settings.Design.National.Name)
	assert.Equal(t, 1.2, s.Settings.Design.National.GammaM1, "a factor beside its set stands")
	assert.Equal(t, []string{"S355"}, s.Settings.Design.Grades)
	assert.Contains(t, s.Summary.Notes[0], `no heading reads "Druck"`)
	s = readAll(t, src, "national=DE")
	assert.Equal(t, 1.1, s.Settings.Design.National.GammaM1, "a set given later brings its own")
	for _, l := range s.Settings.Used() {
		switch l.Name {
		case "national":
			assert.Equal(t, "--set national=DE", l.From)
		case "gamma_M1":
			assert.Equal(t, "national set DE", l.From)
		case "limit":
			assert.Equal(t, "default", l.From)
		}
	}
}

func TestSettingsThatAreRefused(t *testing.T) {
	for setting, want := range map[string]string{
		"splices=never": "as scheduled, every 2", "splices=every 0": "every 2", "sizes=0": "from 1 to 1000", "sizes=2.5": "whole number", "reserve=some": "on or off", "splice cost=dear": "splice cost",
		"weather=fine": "unknown setting", "limit=0": "from 0.01 to 1.50", "limit=95": "from", "national=XX": "unknown national set", "grade=S999": "S999", "families=wood": "wood",
		"compression=down": "positive or negative", "moments=some": "analysis, simple", "growth=tbc": "growth", "fire=2": "fire", "grade=": "grade", "cost UKC=free": "cost UKC",
	} {
		r := refused(t, sheetOf(plain), setting)
		assert.ErrorContains(t, r, want, setting)
		assert.ErrorContains(t, r, "", setting)
	}
	src := sheetOf(plain)
	src.sheet("Settings", "limit | much")
	r := refused(t, src)
	assert.ErrorContains(t, r, "loads.xlsx, Settings!B1: limit")
	_, err := ParseAssignment("limit")
	assert.Error(t, err)
}

func TestStock(t *testing.T) {
	text := "Mark | Length | N_Ed | Section\nC1 | 4 | 900 | 203x203x47 UKC"
	p := problem(t, text)
	assert.Contains(t, p.Error(), "loads.xlsx, Columns!D2")
	assert.Contains(t, p.Error(), "203x203x46 UKC", "the nearest names")
	// A stock list that is not at hand may know the name.
	assert.Equal(t, "203x203x47 UKC", good(t, text, "stock=ours.csv").Given)
	o := options("stock=ours.csv")
	o.Stock = func(string) (*catalogue.Catalogue, error) { return nil, errors.New("ours.csv: no such file") }
	_, err := Read(sheetOf(text), o)
	assert.ErrorContains(t, err, "no such file")
	o.Stock = func(string) (*catalogue.Catalogue, error) { return catalogue.Default(), nil }
	s, err := Read(sheetOf(text), o)
	require.NoError(t, err)
	assert.Len(t, s.Members[0].Problems, 1)
	assert.NotNil(t, s.Stock)
}

func TestGivenNamesAreSettledByFamily(t *testing.T) {
	text := "Mark | Length | N_Ed | Section | Family\nC1 | 4 | 900 | 150x150x10 | SHS\n"
	assert.Equal(t, "SHS 150x150x10.0 HF", good(t, text).Given)
	assert.Equal(t, "SHS 150x150x10.0 CF", good(t, text, "hollow sections=cold formed").Given)
	assert.Equal(t, "SHS 150x150x10.0 CF", good(t, "Mark | Length | N_Ed | Section\nC1 | 4 | 900 | 150x150x10 SHS CF").Given)
	// The finish stands in the name that goes on: the search reads it under the
	// row's families and the settings again.
	assert.Equal(t, "SHS 150x150x10.0 CF", good(t, strings.Replace(text, "| SHS", "| SHS CF", 1)).Given)
	assert.Equal(t, "SHS 150x150x10.0 HF", good(t, "Mark | Length | N_Ed | Section | Family\nC1 | 4 | 900 | SHS 150x150x10 HF | SHS CF\n").Given)
	problem(t, "Mark | Length | N_Ed | Family\nC1 | 4 | 900 | wood")
	problem(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | S36")
	assert.Equal(t, []string{"S275", "S355"}, good(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | S275 S355").Grades)
	assert.Equal(t, []string{"S355JR"}, good(t, "Mark | Length | N_Ed | Grade\nC1 | 4 | 900 | S355 JR").Grades)
}

func TestSettingsNearlySpelt(t *testing.T) {
	for given, want := range map[string]string{"familes": "(families?)", "self-wieght": "(self-weight?)", "gamma M3": "(gamma_M0?)", "colour": `"colour":`, "x": `"x":`} {
		assert.Contains(t, (&UnknownSettingError{given}).Error(), want)
	}
	// A note on the settings file names it: the schedule is another.
	file := sheetOf("familes | UKB")
	o := options()
	o.SettingsFile = file
	s, err := Read(sheetOf("Mark | Length | N_Ed\nC1 | 4 | 900"), o)
	require.NoError(t, err)
	assert.Equal(t, []string{`loads.xlsx, Columns!B1: unknown setting "familes" (families?): it is passed over`}, s.Summary.Notes)
}
