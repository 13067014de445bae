package schedule

import (
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/design"
)

// heightsOf reads a list for a length of 6 m.
func heightsOf(s string, decimal byte) ([]float64, []string, error) {
	list, err := parseRestraints(s, decimal, length.defaultUnit())
	if err != nil {
		return nil, nil, err
	}
	return resolveHeights(list, 6000)
}

func TestRestraintNotation(t *testing.T) {
	for text, want := range map[string][]float64{
		"2.5; 5.0": {2500, 5000}, "2.5, 5.0": {2500, 5000}, "2.5 5.0": {2500, 5000}, "2.5;5": {2500, 5000}, "2.5 & 5.0": {2500, 5000}, "2.5 and 5": {2500, 5000},
		"2500 mm": {2500}, "2500mm; 5000mm": {2500, 5000}, "2.5 m": {2500}, "2.5m, 5m": {2500, 5000}, "250 cm": {2500}, "2500, 5000 mm": {2500, 5000}, "2500 mm; 5.0": {2500, 5000},
		"1/2": {3000}, "1/3 2/3": {2000, 4000}, "1/3, 2/3": {2000, 4000}, "1/3;2/3": {2000, 4000}, "1 / 2": {3000}, "L/2": {3000}, "L/3; 2L/3": {2000, 4000}, "0.5L": {3000}, "1/2 L": {3000}, "50%": {3000}, "50 %": {3000}, "½": {3000},
		"mid": {3000}, "MID": {3000}, "mid-height": {3000}, "mid height": {3000}, "midspan": {3000}, "middle": {3000}, "half": {3000},
		"thirds": {2000, 4000}, "third points": {2000, 4000}, "quarters": {1500, 3000, 4500}, "Quarter points": {1500, 3000, 4500}, "fifths": {1200, 2400, 3600, 4800},
		"every 1.5": {1500, 3000, 4500}, "every 1.5 m": {1500, 3000, 4500}, "Every 1500 mm": {1500, 3000, 4500}, "@1.5": {1500, 3000, 4500}, "@ 2 m": {2000, 4000}, "1.5 m c/c": {1500, 3000, 4500}, "at 2 m centres": {2000, 4000}, "every 2.5": {2500, 5000}, "every 6": nil,
		"none": nil, "ends": nil, "ends only": nil, "top and bottom": nil, "mid; 4.5": {3000, 4500},
		"5.0; 2.5": {2500, 5000}, "0; 2.5; 6": {2500}, "2.5;": {2500},
	} {
		got, _, err := heightsOf(text, '.')
		if assert.NoError(t, err, text) {
			assert.InDeltaSlice(t, append([]float64{}, want...), append([]float64{}, got...), 1e-9, text)
		}
	}
	for text, want := range map[string][]float64{"2,5; 5,0": {2500, 5000}, "2,5 5,0": {2500, 5000}, "2,5": {2500}, "1/3, 2/3": {2000, 4000}, "2,5, 5,0": {2500, 5000}, "every 1,5": {1500, 3000, 4500}} {
		got, _, err := heightsOf(text, ',')
		if assert.NoError(t, err, text) {
			assert.InDeltaSlice(t, want, got, 1e-9, text)
		}
	}
}

func TestRestraintsThatAreNone(t *testing.T) {
	for text, want := range map[string]string{
		"7": "outside the length 6 m", "-1": "outside the length", "2500": "if it is in mm, write 2500 mm", "2.5; 7": "outside",
		"5; 4; 3": "out of order twice", "1;3;2;5;4": "out of order twice", "2.5; 2.5": "stands twice", "mid; 1/2": "stands twice",
		"abc": `"abc" is not a height`, "2.5; tbc": `"tbc" is not a height`, "~2": "not a height", "(2)": "not a height", "2.5 ft": "not a height",
		"2,500": "part heights with a semicolon", "every 0": "not a spacing", "every -1": "not a spacing", "every 7": "outside", "every 0.001": "more than 200",
		"3/2": "not a fraction", "0/2": "not a fraction", "1/0": "not a fraction", "150%": "outside", "continuous": "not a height", "1.2.3": "not a height",
	} {
		_, _, err := heightsOf(text, '.')
		assert.ErrorContains(t, err, want, text)
	}
}

func TestRestraintNotes(t *testing.T) {
	_, notes, err := heightsOf("5; 2.5", '.')
	require.NoError(t, err)
	assert.Equal(t, []string{"the heights were put in order"}, notes)
	_, notes, err = heightsOf("0; 3", '.')
	require.NoError(t, err)
	assert.Len(t, notes, 1)
}

// Heights read back from the notation in which they are written.
func TestRestraintsReadBack(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		L := float64(rapid.IntRange(300, 60_000).Draw(t, "L"))
		n := rapid.IntRange(0, 8).Draw(t, "n")
		decimal := rapid.SampledFrom([]byte{'.', ','}).Draw(t, "decimal")
		var want []float64
		for x := 0.0; len(want) < n; {
			x += float64(rapid.IntRange(1, 9000).Draw(t, "step"))
			if x > L-1 {
				break
			}
			want = append(want, x)
		}
		list, err := parseRestraints(formatRestraints(want, decimal), decimal, length.defaultUnit())
		require.NoError(t, err)
		got, _, err := resolveHeights(list, L)
		require.NoError(t, err)
		// Metres and back is two roundings.
		assert.InDeltaSlice(t, append([]float64{}, want...), append([]float64{}, got...), 1e-8)
	})
}

func FuzzRestraints(f *testing.F) {
	for _, s := range []string{"2.5; 5.0", "2500 mm", "1/3 2/3", "every 1.5", "mid", "2,5; 5,0", "L/2", "1.5 m c/c", "@", "every", "50%", "½", "1/", "every every 2", ";;;", "1e300", "every 1e-300"} {
		f.Add(s, true, 6000.0)
		f.Add(s, false, 6000.0)
	}
	f.Fuzz(func(t *testing.T, s string, point bool, L float64) {
		if !(L >= minLength && L <= maxLength) {
			return
		}
		list, err := parseRestraints(s, pick(point), length.defaultUnit())
		if err != nil {
			return
		}
		heights, _, err := resolveHeights(list, L)
		if err != nil {
			return
		}
		last := 0.0
		for _, h := range heights {
			if !(h > last && h < L) {
				t.Fatalf("%q gives %v in %v", s, heights, L)
			}
			last = h
		}
	})
}

func TestEnds(t *testing.T) {
	type pair = [2]design.Condition
	for text, want := range map[string]pair{
		"pinned-pinned": {design.Pinned, design.Pinned}, "fixed-pinned": {design.Fixed, design.Pinned}, "Fixed/Pinned": {design.Fixed, design.Pinned},
		"fixed - fixed": {design.Fixed, design.Fixed}, "partly fixed": {design.PartlyFixed, design.PartlyFixed}, "partly fixed-pinned": {design.PartlyFixed, design.Pinned},
		"Partially fixed / fixed": {design.PartlyFixed, design.Fixed}, "fixed-free": {design.Fixed, design.Free}, "fixed-guided": {design.Fixed, design.Guided},
		"fixed-partly guided": {design.Fixed, design.PartlyGuided}, "free-fixed": {design.Free, design.Fixed}, "pinned": {design.Pinned, design.Pinned}, "fixed": {design.Fixed, design.Fixed},
		"F-P": {design.Fixed, design.Pinned}, "P-P": {design.Pinned, design.Pinned}, "pin–fix": {design.Pinned, design.Fixed}, "fixed pinned": {design.Fixed, design.Pinned},
		"top pinned, bottom fixed": {design.Fixed, design.Pinned}, "fixed base, pinned top": {design.Fixed, design.Pinned}, "fixed at base and pinned at top": {design.Fixed, design.Pinned}, "cantilever": {design.Fixed, design.Free},
		"semi-rigid / pinned": {design.PartlyFixed, design.Pinned}, "nominally pinned - fixed": {design.Pinned, design.Fixed}, "pinned at both ends": {design.Pinned, design.Pinned}, "fixed to pinned": {design.Fixed, design.Pinned},
	} {
		bottom, top, err := parseEnds(text)
		require.NoError(t, err, text)
		assert.Equal(t, want, pair{bottom, top}, text)
	}
	for _, text := range []string{"", "free", "guided", "welded", "fixed-pinned-free", "fixed-", "0.85", "top fixed, top pinned", "-"} {
		_, _, err := parseEnds(text)
		assert.Error(t, err, text)
	}
	// Every pair reads back from the words of its conditions.
	for b := design.Pinned; b <= design.Free; b++ {
		for c := design.Pinned; c <= design.Free; c++ {
			bottom, top, err := parseEnds(b.String() + "-" + c.String())
			require.NoError(t, err)
			assert.Equal(t, pair{b, c}, pair{bottom, top})
		}
	}
}

func FuzzEnds(f *testing.F) {
	for _, s := range []string{"pinned-pinned", "partly fixed", "top pinned, bottom fixed", "cantilever", "fixed–free", "é-è"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		bottom, top, err := parseEnds(s)
		if err == nil && (bottom > design.Free || top > design.Free) {
			t.Fatalf("%q gives %d, %d", s, bottom, top)
		}
	})
}

// formatRestraints writes heights in mm as the schedule notes them, in m.
func formatRestraints(heights []float64, decimal byte) string {
	parts := make([]string, len(heights))
	for i, h := range heights {
		parts[i] = strings.Replace(strconv.FormatFloat(h/1000, 'f', -1, 64), ".", string(decimal), 1)
	}
	return strings.Join(parts, "; ")
}
