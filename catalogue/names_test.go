package catalogue

import (
	"errors"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// The spellings are common practice, no source.
func TestFindReadsTheTradesSpellings(t *testing.T) {
	for name, want := range map[string]string{
		"203x203x60 UKC": "203x203x60 UKC", "UC 203x203x60": "203x203x60 UKC", "203 UC 60": "203x203x60 UKC",
		"203×203×60": "203x203x60 UKC", "UKC203X203X60": "203x203x60 UKC", "uc203*203*60": "203x203x60 UKC",
		"203 x 203 UC 60": "203x203x60 UKC", "203x203x60UC": "203x203x60 UKC", "203\u00a0x\u00a0203 x 60  UKC": "203x203x60 UKC",
		"Universal Column 203x203x60": "203x203x60 UKC", "UC203X60": "203x203x60 UKC", "203-203-60 UC": "203x203x60 UKC",
		"HE200A": "HE 200 A", "HEA 200": "HE 200 A", "HE 200 A": "HE 200 A", "HE A 200": "HE 200 A", "hea200": "HE 200 A", "HE-A 200": "HE 200 A",
		"HEB200": "HE 200 B", "HE 200 AA": "HE 200 AA", "HE300M": "HE 300 M",
		"IPE300": "IPE 300", "IPE A 300": "IPE 300 A", "IPE O 300": "IPE 300 O", "ipe 300": "IPE 300",
		"HD 400x187": "HD 400x187", "HD 260x54.1": "HD 260x54.1", "HD 260x54": "HD 260x54.1",
		"CHS 168.3x8": "CHS 168.3x8.0", "168.3 x 8.0 CHS": "CHS 168.3x8.0", "168,3x8 CHS": "CHS 168.3x8.0",
		"SHS 150x150x10": "SHS 150x150x10.0", "150x150x10 SHS": "SHS 150x150x10.0", "SHS 150x10": "SHS 150x150x10.0",
		"150x150x10 SHS CF": "SHS 150x150x10.0 CF", "cold formed SHS 150x150x10": "SHS 150x150x10.0 CF", "CFSHS 150x150x10": "SHS 150x150x10.0 CF",
		"150x150x10 SHS hot finished": "SHS 150x150x10.0", "SHS 150x150x10 EN 10219": "SHS 150x150x10.0 CF", "SHS 150x150x10 EN 10210-2": "SHS 150x150x10.0",
		"RHS 200x100x8": "RHS 200x100x8.0",
		"PFC 200x90x30": "200x90x30 UKPFC", "200x90 PFC": "200x90x30 UKPFC", "UPE 200": "UPE 200",
		"L 100x100x10": "L 100x100x10", "100x100x10 L": "L 100x100x10", "Equal angle 100x100x10": "L 100x100x10", "L100x10": "L 100x100x10",
		"UA 150x90x10": "L 150x90x10", "UBP 305x305x79": "305x305x79 UKBP", "305x165x40 UB": "305x165x40 UKB",
		"203x203xUC60": "203x203x60 UKC", "203 x 203 x 60 kg/m UC": "203x203x60 UKC", "UC203x203x60kg": "203x203x60 UKC",
		"Ø168.3x8": "CHS 168.3x8.0", "CHS ø168,3 x 8": "CHS 168.3x8.0", "CHS 168x8": "CHS 168.3x8.0", "CHS 140x5": "CHS 139.7x5.0", "139x5 CHS": "CHS 139.7x5.0",
		"150x150x10mm SHS": "SHS 150x150x10.0", "RHS 150x150x10": "SHS 150x150x10.0", "RHSCF 200x100x8": "RHS 200x100x8.0 CF", "SHS 150x150x10 (CF)": "SHS 150x150x10.0 CF",
		"∟100x100x10": "L 100x100x10", "RSA 100x100x10": "L 100x100x10", "HE 300-B": "HE 300 B", "UPE200": "UPE 200",
	} {
		s, err := Default().Find(name, FindOptions{})
		if assert.NoError(t, err, name) {
			assert.Equal(t, want, s.Name(), name)
		}
	}
}

func TestFindNamesEveryFit(t *testing.T) {
	_, err := Default().Find("150x150x10", FindOptions{})
	var amb *AmbiguousSectionError
	require.ErrorAs(t, err, &amb)
	assert.ElementsMatch(t, []string{"SHS 150x150x10.0", "L 150x150x10"}, amb.Candidates)

	s, err := Default().Find("150x150x10", FindOptions{Families: []string{"SHS"}, ColdFormed: true})
	require.NoError(t, err)
	assert.Equal(t, "SHS 150x150x10.0 CF", s.Name())

	s, err = Default().Find("HE200A", FindOptions{Families: []string{"UKC"}})
	require.NoError(t, err, "the families of the schedule do not shut out a name that states its own")
	assert.Equal(t, "HE 200 A", s.Name())

	for _, name := range []string{"150x150x10", "SHS 150x150x10"} {
		s, err = Default().Find(name, FindOptions{Families: []string{"SHS CF"}})
		require.NoError(t, err)
		assert.Equal(t, "SHS 150x150x10.0 CF", s.Name(), "a family says the finish, too: %s", name)
	}
	s, err = Default().Find("SHS 150x150x10", FindOptions{Families: []string{"SHS HF", "SHS CF"}, ColdFormed: true})
	require.NoError(t, err)
	assert.Equal(t, "SHS 150x150x10.0 CF", s.Name(), "where both are allowed the setting decides")
	s, err = Default().Find("SHS 150x150x10 HF", FindOptions{Families: []string{"SHS CF"}})
	require.NoError(t, err)
	assert.Equal(t, "SHS 150x150x10.0", s.Name(), "a name's own finish stands")
	_, err = Default().Find("150x150x10", FindOptions{Families: []string{"XYZ"}})
	require.ErrorContains(t, err, "XYZ")

	_, err = Default().Find("203x203 UKC", FindOptions{})
	require.ErrorAs(t, err, &amb)
	assert.Contains(t, amb.Candidates, "203x203x60 UKC")
}

func TestFindNamesTheNearest(t *testing.T) {
	for name, near := range map[string]string{
		"RHS 100x200x8": "RHS 200x100x8.0", "UA 90x150x10": "L 150x90x10", "UPN 200": "UPE 200", "203x203x61 UKC": "203x203x60 UKC", "HE 205 A": "HE 200 A", "UKC 203x230x60": "203x203x60 UKC", "IPE 310": "IPE 300", "SHS 150x150x10.5": "SHS 150x150x10.0",
	} {
		_, err := Default().Find(name, FindOptions{})
		var unknown *UnknownSectionError
		if assert.ErrorAs(t, err, &unknown, name) {
			assert.Contains(t, unknown.Nearest, near, name)
		}
	}
	_, err := Default().Find("RHS 100x200x8", FindOptions{})
	require.ErrorContains(t, err, "the greater dimension comes first")
	_, err = Default().Find("SHS 150x150x10 CF hot finished", FindOptions{})
	require.ErrorContains(t, err, "both hot finished and cold formed")
	for _, name := range []string{"", "steel", "SHS 200x100x8", "L 20x20", "RHS 150x10", "UKC", "203x203x60 UKC S355", "203x203x60 XYZ", strings.Repeat("9", 4000)} {
		_, err := Default().Find(name, FindOptions{})
		var unknown *UnknownSectionError
		assert.ErrorAs(t, err, &unknown, name)
	}
}

func TestFindNeverSwitchesTheFinish(t *testing.T) {
	hot, cold := map[string]bool{}, map[string]bool{}
	for _, s := range Default().Sections() {
		switch s.Finish {
		case HotFinished:
			hot[s.Designation] = true
		case ColdFormed:
			cold[s.Designation] = true
		}
	}
	tried := 0
	for d := range cold {
		if hot[d] {
			continue
		}
		tried++
		_, err := Default().Find(d, FindOptions{})
		require.ErrorContains(t, err, "cold formed only: add CF", d)
	}
	require.Positive(t, tried)
}

func TestEveryNameIsReadBack(t *testing.T) {
	for _, s := range Default().Sections() {
		got, err := Default().Find(s.Name(), FindOptions{})
		require.NoError(t, err, s.Name())
		require.Same(t, s, got, s.Name())
		for _, o := range []FindOptions{{}, {ColdFormed: true}, {Families: []string{"CHS SHS RHS CF"}}, {Families: []string{"UKC"}, ColdFormed: true}} {
			got, err := Default().Find(s.FullName(), o)
			require.NoError(t, err, s.FullName())
			require.Same(t, s, got, s.FullName())
		}
	}
}

// otherWords are words of the trade for a family, and where they may stand.
var otherWords = map[string][]string{
	"UKC": {"UC", "ukc", "Universal Column", "Uc"}, "UKB": {"UB", "ukb", "universal beam"}, "UKBP": {"UBP", "bearing pile"}, "UKPFC": {"PFC", "pfc"},
	"CHS": {"chs", "Circular Hollow Section"}, "SHS": {"shs", "square hollow section"}, "RHS": {"rhs", "Rectangular hollow"},
	"L equal": {"L", "Equal angle", "EA", "RSA"}, "L unequal": {"L", "Unequal angle", "UA", "angle"}, "HD": {"HD", "hd"},
}

func TestSpellingsVaryFreely(t *testing.T) {
	all := Default().Sections()
	rapid.Check(t, func(t *rapid.T) {
		s := all[rapid.IntRange(0, len(all)-1).Draw(t, "section")]
		name := s.Name()
		if words := otherWords[s.Family]; words != nil {
			dimensions := strings.Trim(strings.Map(func(r rune) rune {
				if r >= '0' && r <= '9' || r == 'x' || r == '.' {
					return r
				}
				return ' '
			}, s.Designation), " ")
			if rapid.Bool().Draw(t, "bare decimals") {
				dimensions = strings.TrimSuffix(dimensions, ".0")
			}
			word := rapid.SampledFrom(words).Draw(t, "word")
			gap := rapid.SampledFrom([]string{"", " ", "  ", "\u00a0", "-"}).Draw(t, "gap")
			name = word + gap + dimensions
			if rapid.Bool().Draw(t, "behind") {
				name = dimensions + gap + word
			}
			if s.Finish == ColdFormed {
				name += rapid.SampledFrom([]string{" CF", " cold formed", " cold-formed", " (CF)", " EN 10219-2", ", cold"}).Draw(t, "finish")
			}
		}
		name = strings.ReplaceAll(name, "x", rapid.SampledFrom([]string{"x", "X", "×", " x ", "*", " × ", "\u00a0x\u00a0"}).Draw(t, "by"))
		switch rapid.IntRange(0, 2).Draw(t, "case") {
		case 1:
			name = strings.ToLower(name)
		case 2:
			name = strings.ToUpper(name)
		}
		if rapid.Bool().Draw(t, "spaces") {
			name = "  " + strings.ReplaceAll(name, " ", "\u00a0 ") + " "
		}
		if rapid.Bool().Draw(t, "comma") {
			name = strings.ReplaceAll(name, ".", ",")
		}
		got, err := Default().Find(name, FindOptions{})
		if err != nil || got != s {
			t.Fatalf("%q: %v", name, err)
		}
	})
}

// A shorter form never settles on one section where another has the name too.
func TestShortFormsAreOnesOwn(t *testing.T) {
	for _, s := range Default().Sections() {
		for _, form := range shortForms(s, readSpelling(s.Designation).numbers) {
			name := key(form)
			if s.Finish == ColdFormed {
				name += " CF"
			}
			got, err := Default().Find(strings.Fields(s.Family)[0]+" "+name, FindOptions{})
			var amb *AmbiguousSectionError
			if errors.As(err, &amb) {
				assert.Contains(t, amb.Candidates, s.Name())
				continue
			}
			require.NoError(t, err, name)
			assert.Same(t, s, got, "%s is read as %s", s.Name()+" shortened to "+name, got.Name())
		}
	}
}

func FuzzFind(f *testing.F) {
	for _, s := range []string{"203x203x60 UKC", "203 UC 60", "SHS 150x10 CF", "168,3 x 8", "EN 10219", "×", "1.", "HE A"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, name string) {
		s, err := Default().Find(name, FindOptions{})
		if (s == nil) == (err == nil) {
			t.Fatal("neither a section nor an error, or both")
		}
	})
}

func TestParseFamilies(t *testing.T) {
	for text, want := range map[string][]FamilySpec{
		"UKC": {{Family: "UKC"}}, "uc": {{Family: "UKC"}}, "Universal Columns": {{Family: "UKC"}}, "UKC UKB": {{Family: "UKC"}, {Family: "UKB"}},
		"HE": {{Family: "HEA"}, {Family: "HEB"}, {Family: "HEM"}}, "SHS CF": {{"SHS", ColdFormed}}, "cold formed SHS": {{"SHS", ColdFormed}},
		"CHS, SHS": {{Family: "CHS"}, {Family: "SHS"}}, "CHS/RHS hot finished": {{"CHS", HotFinished}, {"RHS", HotFinished}},
		"CHS & SHS CF": {{"CHS", ColdFormed}, {"SHS", ColdFormed}}, "CFSHS": {{"SHS", ColdFormed}}, "RHSCF; CHS": {{"RHS", ColdFormed}, {Family: "CHS"}},
		"EN 10219-2 square hollow sections": {{"SHS", ColdFormed}}, "HE-A, HE-B": {{Family: "HEA"}, {Family: "HEB"}},
		"UKC and HEB": {{Family: "UKC"}, {Family: "HEB"}}, "IPE A": nil, "L": {{Family: "L equal"}, {Family: "L unequal"}}, "Equal angles": {{Family: "L equal"}},
		"L unequal": {{Family: "L unequal"}},
	} {
		got, err := ParseFamilies(text)
		if text == "IPE A" {
			require.NoError(t, err)
			assert.Equal(t, []FamilySpec{{Family: "IPEA"}}, got)
			continue
		}
		require.NoError(t, err, text)
		assert.Equal(t, want, got, text)
	}
	_, err := ParseFamilies("UKC, XYZ")
	require.ErrorContains(t, err, `"XYZ" is not known`)
	require.ErrorContains(t, err, "UKPFC")
	_, err = ParseFamilies(" ")
	require.Error(t, err)
}

func FuzzParseFamilies(f *testing.F) {
	for _, s := range []string{"UKC", "HE, SHS CF", "CHS/SHS", "Universal columns and UKB", "cold formed", "EN 10219-2", ";"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, text string) {
		specs, err := ParseFamilies(text)
		if (len(specs) == 0) == (err == nil) {
			t.Fatal("neither families nor an error, or both")
		}
	})
}

func BenchmarkFindUnknown(b *testing.B) {
	c := Default()
	for b.Loop() {
		sp := readSpelling("203x203x61 UKZ")
		c.newUnknown("203x203x61 UKZ", &sp, "")
	}
}

func BenchmarkBuild(b *testing.B) {
	for b.Loop() {
		read()
	}
}

func BenchmarkFind(b *testing.B) {
	c := Default()
	for b.Loop() {
		if _, err := c.Find("UC 203x203x60", FindOptions{}); err != nil {
			b.Fatal(err)
		}
	}
}
