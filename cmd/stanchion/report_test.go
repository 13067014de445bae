package main

import (
	"math"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/design"
)

func TestUtilisationShowsThatItFails(t *testing.T) {
	for _, c := range []struct {
		u, limit float64
		want     string
	}{{1.0465, 1, "1.047"}, {1.54, 1, "1.540"}, {1.0002, 1, "1.0002"}, {0.9504, 0.95, "0.9504"}, {0.96, 0.95, "0.960"}, {math.Inf(1), 1, "-"}, {0.96412, 1, "0.964"}} {
		assert.Equal(t, c.want, utilisation(&design.Result{Section: "203x203x46 UKC", Utilisation: c.u}, c.limit))
	}
	assert.Equal(t, "-", utilisation(&design.Result{}, 1), "no section")
}

func TestSpan(t *testing.T) {
	for text, want := range map[string]span{"": {}, "200..260": {200, 260}, "..260": {0, 260}, "200..": {200, 0}, "10": {10, 10}, " 5 .. 6 ": {5, 6}} {
		got, err := parseSpan(text)
		require.NoError(t, err, text)
		assert.Equal(t, want, got, text)
	}
	for _, text := range []string{"..", "ten", "9..8", "-1..2", "1e9", "NaN", "1..2..3"} {
		_, err := parseSpan(text)
		assert.Error(t, err, text)
	}
}

// A section holds the values of its span, ends included.
func TestSpanHolds(t *testing.T) {
	s := span{200, 260}
	assert.True(t, s.holds(200) && s.holds(260) && !s.holds(199.9) && !s.holds(260.1))
	assert.True(t, span{}.holds(1e9) && span{least: 5}.holds(1e9))
}

func TestFourFigures(t *testing.T) {
	for v, want := range map[float64]string{6125.3: "6125", 1021412: "1021000", 47.228: "47.23", 0.98765: "0.9877", 4.6348: "4.635", 9999.7: "10000"} {
		assert.Equal(t, want, fourFigures(v))
	}
}

func TestTable(t *testing.T) {
	table := newTable("Mark", ">kN", "Empty", "Check")
	table.limit(3, 8)
	table.add("C1", "5", "", "flexural buckling")
	table.add("C12", "1250", "", "")
	assert.Equal(t, []string{"Mark    kN  Check", "C1       5  flexura…", "C12   1250"}, table.lines())
}

// Wrapped words keep their order and fit the width, unless one alone does not.
func TestWrap(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		words := rapid.SliceOf(rapid.StringMatching(`[a-zé]{1,12}`)).Draw(t, "words")
		width := rapid.IntRange(14, 60).Draw(t, "width")
		wrapped := wrap(strings.Join(words, " "), width, "  ")
		assert.Equal(t, words, append([]string{}, strings.Fields(wrapped)...))
		for _, line := range strings.Split(wrapped, "\n") {
			assert.LessOrEqual(t, utf8.RuneCountInString(line), width)
		}
	})
}

func TestBeside(t *testing.T) {
	assert.Equal(t, "a/loads-sized.xlsx", beside("a/loads.xlsx", sizedSuffix))
	assert.Equal(t, "a.b/loads-checked", beside("a.b/loads", checkedSuffix))
}
