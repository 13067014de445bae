package schedule

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func TestSplitNumber(t *testing.T) {
	type want struct {
		value float64
		rest  string
	}
	for text, w := range map[string]want{
		"1200": {1200, ""}, "1200.5": {1200.5, ""}, "1,200.5": {1200.5, ""}, "1 200.5": {1200.5, ""}, "1'200.5": {1200.5, ""},
		"1\u00a0200": {1200, ""}, "1\u2009234\u2009567": {1234567, ""}, "1\u202f200": {1200, ""}, "1’200": {1200, ""},
		"-5": {-5, ""}, "−5": {-5, ""}, "–5": {-5, ""}, "+5": {5, ""}, "- 5": {-5, ""}, ".5": {0.5, ""}, "5.": {5, ""},
		"1e3": {1000, ""}, "1.2E-2": {0.012, ""}, "1200 kN": {1200, "kN"}, "1200kN": {1200, "kN"}, " 7 ": {7, ""},
		"1,234,567": {1234567, ""}, "900 (tbc)": {900, "(tbc)"}, "12 m": {12, "m"}, "3 e": {3, "e"},
	} {
		value, rest, err := splitNumber(text, '.')
		require.NoError(t, err, text)
		assert.Equal(t, w, want{value, rest}, text)
	}
	for text, w := range map[string]float64{"1,5": 1.5, "1.200,5": 1200.5, "1 200,5": 1200.5, "1.200": 1200, "0,500": 0.5} {
		value, rest, err := splitNumber(text, ',')
		require.NoError(t, err, text)
		assert.Equal(t, w, value, text)
		assert.Empty(t, rest)
	}
	for _, text := range []string{"", "-", "tbc", "(450)", "~900", "1,20", "12,34,567", "1,2345", "0,500", "1.2.3", "12 00", "1.5 2", "1,234'567", "1'2", ",5", "--5", "1234,567", "≈3", ". 5", "1.5'000"} {
		_, _, err := splitNumber(text, '.')
		assert.Error(t, err, text)
	}
}

func TestParseNumberWithUnits(t *testing.T) {
	kn := force.defaultUnit()
	for text, want := range map[string]float64{"1200 kN": 1.2e6, "1.2MN": 1.2e6, "1200000 N": 1.2e6, "1200 KN": 1.2e6} {
		x, err := parseNumber(text, '.', force, kn)
		require.NoError(t, err, text)
		assert.InDelta(t, want, x, 1e-6, text)
	}
	for _, text := range []string{"1200 kNm", "1200 t", "1200 (kN)", "1200 kN approx", "1200 -", "1200 m", "1200*"} {
		_, err := parseNumber(text, '.', force, kn)
		assert.Error(t, err, text)
	}
	x, err := parseNumber("45 kN.m", '.', moment, moment.defaultUnit())
	require.NoError(t, err)
	assert.InDelta(t, 45e6, x, 1e-6)
	x, err = parseNumber("0.3 m", '.', size, size.defaultUnit())
	require.NoError(t, err)
	assert.InDelta(t, 300, x, 1e-9)
}

// grouping writes the whole part of a number in threes.
func grouping(digits, mark string) string {
	var parts []string
	for len(digits) > 3 {
		parts = append([]string{digits[len(digits)-3:]}, parts...)
		digits = digits[:len(digits)-3]
	}
	return strings.Join(append([]string{digits}, parts...), mark)
}

// A number reads back from every way of writing it.
func TestNumbersReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		whole := rapid.Uint32().Draw(t, "whole")
		part := rapid.StringMatching(`[0-9]{0,4}`).Draw(t, "part")
		decimal := rapid.SampledFrom([]byte{'.', ','}).Draw(t, "decimal")
		marks := []string{"", " ", "'", "’", "\u00a0", "\u2009", "."}
		if decimal == '.' {
			marks[6] = ","
		}
		mark := rapid.SampledFrom(marks).Draw(t, "mark")
		sign := rapid.SampledFrom([]string{"", "-", "−", "+"}).Draw(t, "sign")
		unit := rapid.SampledFrom([]string{"", " kN", "kN"}).Draw(t, "unit")
		digits := strconv.FormatUint(uint64(whole), 10)
		text := sign + grouping(digits, mark)
		plain := strings.NewReplacer("−", "-", "+", "").Replace(sign) + digits
		if part != "" {
			text += string(decimal) + part
			plain += "." + part
		}
		want, err := strconv.ParseFloat(plain, 64)
		require.NoError(t, err)
		got, err := parseNumber(text+unit, decimal, force, units["kn"])
		require.NoError(t, err, text)
		assert.Equal(t, want*1000, got)
	})
}

// The file's decimal mark is found from its numbers, however they are mixed,
// as long as one of them tells.
func TestDecimalVote(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		decimal := rapid.SampledFrom([]byte{'.', ','}).Draw(t, "decimal")
		group := map[byte]string{'.': ",", ',': "."}[decimal]
		var vote decimalVote
		n := rapid.IntRange(0, 20).Draw(t, "n")
		for range n {
			digits := strconv.Itoa(rapid.IntRange(1000, 9_999_999).Draw(t, "x"))
			vote.see(grouping(digits, group), nil)
		}
		vote.see("3"+string(decimal)+"6", nil)
		assert.Equal(t, decimal, vote.mark(0))
	})
	var vote decimalVote
	vote.see("1,200", nil)
	assert.Equal(t, byte('.'), vote.mark(0), "a group, where nothing tells otherwise")
	assert.Equal(t, byte(','), vote.mark(','))
	vote.see("12,5", nil)
	vote.see("12.5", nil)
	vote.see("13.5", nil)
	assert.Equal(t, byte('.'), vote.mark(0))
	assert.Equal(t, 1, vote.mixed())
}

func FuzzSplitNumber(f *testing.F) {
	for _, s := range []string{"1200", "1,200.5", "1 200 kN", "-1.5e3", "(450)", "~900", "0,500", "1'234'567.8", "–5", "12 00", "9e999", ".", "1e", "1.2.3"} {
		f.Add(s, true)
		f.Add(s, false)
	}
	f.Fuzz(func(t *testing.T, s string, point bool) {
		value, rest, err := splitNumber(s, pick(point))
		if err != nil {
			return
		}
		if math.IsNaN(value) || math.IsInf(value, 0) {
			t.Fatalf("%q is %v", s, value)
		}
		if len(rest) >= len(s) {
			t.Fatalf("%q leaves %q", s, rest)
		}
		// What was read reads back the same.
		text := strings.Replace(strconv.FormatFloat(value, 'f', -1, 64), ".", string(pick(point)), 1)
		again, rest, err := splitNumber(text, pick(point))
		if err != nil || rest != "" || again != value && len(text) < 60 {
			t.Fatalf("%q is %v, and %q is %v, %q, %v", s, value, text, again, rest, err)
		}
		var vote decimalVote
		vote.see(s, nil)
		_ = vote.mark(0)
	})
}
