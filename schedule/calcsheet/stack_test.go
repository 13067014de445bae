package calcsheet

import (
	"bytes"
	"regexp"
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/design"
	"stanchion/design/building"
)

// said writes stacks as the marks of their lengths, those of gaps in brackets.
func said(stacks []*Stack) string {
	var lines []string
	for _, s := range stacks {
		var marks []string
		for _, l := range s.Lengths {
			if l.Sheet != nil {
				marks = append(marks, l.Sheet.Column.Mark)
			} else {
				marks = append(marks, "["+l.Missing.Column.Mark+"]")
			}
		}
		lines = append(lines, strings.Join(marks, " "))
	}
	return strings.Join(lines, "; ")
}

func TestALengthThatIsNotReadLeavesAGap(t *testing.T) {
	list := stack(t) // A1-1 from L0 to L1, A1-2 to L2, A1-3 to L3
	gap := func(mark, from, to string) Missing {
		return Missing{Column: &design.Column{Mark: mark, Stack: "A1 & <B>", From: from, To: to, Length: 3600}, Status: design.NotRead}
	}
	without := append(list[:1:1], list[2])
	for _, c := range []struct {
		missing []Missing
		want    string
	}{
		{nil, ""}, // nothing stands on anything
		{[]Missing{gap("A1-2", "L1", "L2")}, "A1-1 [A1-2] A1-3"},
		{[]Missing{gap("A1-2", "l1", "L 2")}, "A1-1 [A1-2]"}, // another level than the L2 of the third
		{[]Missing{gap("A1-4", "L3", "Roof"), gap("A1-2", "L1", "L2"), gap("A1-0", "B1", "L0")}, "[A1-0] A1-1 [A1-2] A1-3 [A1-4]"},
		{[]Missing{gap("A1-4", "L3", "L4"), gap("A1-5", "L4", "Roof")}, "A1-3 [A1-4] [A1-5]"},
		{[]Missing{gap("A1-2", "L1", "")}, ""},                              // nobody knows where it stands
		{[]Missing{gap("A1-8", "L8", "L9"), gap("A1-9", "L9", "Roof")}, ""}, // gaps alone are no stack
	} {
		assert.Equal(t, c.want, said(Stacks(without, c.missing, building.Options{})))
	}

	// Levels that clash do not take apart what stands together.
	clash := []Missing{gap("A1-2b", "L1", "L2")}
	assert.Equal(t, "A1-1 A1-2 A1-3", said(Stacks(list, clash, building.Options{})))
	// A gap of another column line is none of this one.
	other := gap("X", "L3", "L4")
	other.Column.Stack = "X"
	assert.Equal(t, "A1-1 A1-2 A1-3", said(Stacks(list, []Missing{other}, building.Options{})))
}

// Beside a gap no splice is drawn, and above it storeys are counted anew, as
// the take-off counts them: it knows of no lengths that are not read.
func TestSplicesBesideAGap(t *testing.T) {
	list := stack(t)
	for i, l := range list {
		l.Column.From, l.Column.To = []string{"L0", "L2", "L3"}[i], []string{"L1", "L3", "L4"}[i]
	}
	missing := []Missing{{Column: &design.Column{Mark: "A1-1b", Stack: "A1 & <B>", From: "L1", To: "L2"}}}
	s := Stacks(list, missing, building.Options{Splices: building.EveryNth, Every: 3})[0]
	require.Len(t, s.Lengths, 4)
	for i := 1; i < 4; i++ { // the third is the first above the gap: its piece runs through
		splice, _ := s.spliced(i)
		assert.False(t, splice, i)
	}
	s.Rule.Every = 1
	splice, _ := s.spliced(3)
	assert.True(t, splice)
}

func TestAGapIsDrawnToItsHeightWithItsMarkAndAWord(t *testing.T) {
	list := stack(t)
	list = append(list[:1:1], list[2])
	for _, c := range []struct {
		length float64
		want   []string
		height float64 // against that of a length of 4 m
	}{
		{2000, []string{"A1-2: not read", "L = 2.0 m"}, 0.5},
		{0, []string{"A1-2: not read", "its length is not known: not to scale"}, 1},
	} {
		missing := []Missing{{Column: &design.Column{Mark: "A1-2", Stack: "A1 & <B>", From: "L1", To: "L2", Length: c.length}, Status: design.NotRead}}
		stacks := Stacks(list, missing, building.Options{})
		require.Len(t, stacks, 1)
		var b bytes.Buffer
		require.NoError(t, stacks[0].SVG(&b))
		for _, text := range append(c.want, ">L0<", ">L1<", ">L2<", ">L3<", ">?<") {
			assert.Contains(t, b.String(), text)
		}
		assert.NotContains(t, b.String(), "splice")
		levels := map[string]float64{}
		for _, m := range regexp.MustCompile(`<text x="[^"]+" y="([^"]+)"[^>]*>(L\d)<`).FindAllStringSubmatch(b.String(), -1) {
			levels[m[2]] = parsed(t, m[1])
		}
		// 0.02 mm on one of 20: places are written to a hundredth.
		assert.InDelta(t, c.height, (levels["L1"]-levels["L2"])/(levels["L0"]-levels["L1"]), 0.001)
	}
}

func parsed(t *testing.T, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	require.NoError(t, err)
	return x
}
