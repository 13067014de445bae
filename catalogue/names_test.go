package catalogue

import (
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

	_, err = Default().Find("203x203 UKC", FindOptions{})
	require.ErrorAs(t, err, &amb)
	assert.Contains(t, amb.Candidates, "203x203x60 UKC")
}

func TestFindNamesTheNearest(t *testing.T) {
	for name, near := range map[string]string{
		"203x203x61 UKC": "203x203x60 UKC", "HE 205 A": "HE 200 A", "UKC 203x230x60": "203x203x60 UKC", "IPE 310": "IPE 300", "SHS 150x150x10.5": "SHS 150x150x10.0",
	} {
		_, err := Default().Find(name, FindOptions{})
		var unknown *UnknownSectionError
		if assert.ErrorAs(t, err, &unknown, name) {
			assert.Contains(t, unknown.Nearest, near, name)
		}
	}
	for _, name := range []string{"", "steel", "UKC", "203x203x60 UKC S355", "203x203x60 XYZ", strings.Repeat("9", 4000)} {
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
		require.ErrorContains(t, err, "cold formed only", d)
	}
	require.Positive(t, tried)
}

func TestEveryNameIsReadBack(t *testing.T) {
	for _, s := range Default().Sections() {
		got, err := Default().Find(s.Name(), FindOptions{})
		require.NoError(t, err, s.Name())
		require.Same(t, s, got, s.Name())
	}
}

func TestSpellingsVaryFreely(t *testing.T) {
	all := Default().Sections()
	rapid.Check(t, func(t *rapid.T) {
		s := all[rapid.IntRange(0, len(all)-1).Draw(t, "section")]
		name := s.Name()
		name = strings.ReplaceAll(name, "x", rapid.SampledFrom([]string{"x", "X", "×", " x ", "*"}).Draw(t, "by"))
		if rapid.Bool().Draw(t, "lower") {
			name = strings.ToLower(name)
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
		"CHS, SHS": {{Family: "CHS"}, {Family: "SHS"}}, "CHS/RHS hot finished": {{Family: "CHS"}, {"RHS", HotFinished}},
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
	_, err := ParseFamilies("XYZ")
	require.ErrorContains(t, err, "UKC")
	_, err = ParseFamilies(" ")
	require.Error(t, err)
}

func BenchmarkFind(b *testing.B) {
	c := Default()
	for b.Loop() {
		if _, err := c.Find("UC 203x203x60", FindOptions{}); err != nil {
			b.Fatal(err)
		}
	}
}
