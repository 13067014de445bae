package schedule

import (
	"fmt"
	"math/rand/v2"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

func FuzzReadHeading(f *testing.F) {
	for _, s := range []string{"N_Ed ULS1 (kN)", "M_y,Ed top", "Nₑd", "L_cr,z [mm]", "N_Ed above 2.5 m", "Länge", "Effective length y-y and z-z", "η y-y bottom", "((", "x-x", "\xff\xfe", "k"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		m := readHeading(s)
		for _, k := range m.keys {
			if k.line() == nil || k.String() == "" {
				t.Fatalf("%q gives %v", s, k)
			}
		}
		if again := readHeading(tidy(s)); fmt.Sprint(again.keys) != fmt.Sprint(m.keys) || again.combination != m.combination {
			t.Fatalf("%q gives %v, tidied %v", s, m, again)
		}
	})
}

// FuzzRead reads sheets of arbitrary cells: members or an error, never a panic.
func FuzzRead(f *testing.F) {
	f.Add("Mark | Length | N_Ed\nC1 | 4 | 900")
	f.Add("Mark | Combination | Length | N_Ed | Restraints z-z | Group\nC1 | ULS1 | 4 | 900 | mid | G\nC1|ULS2|4|3|2/1|G\n\"|^||")
	f.Add("Level | ^ | N_Ed | M y-y | ^\nfrom | to | ULS1 | top | bottom\n- | - | kN | kNm | kNm\nL1|L2|@1|!2|=3")
	f.Fuzz(func(t *testing.T, text string) {
		if len(text) > 4000 {
			return
		}
		s, err := Read(sheetOf(text), options())
		if err != nil {
			return
		}
		for _, m := range s.Members {
			if len(m.Problems) == 0 && (len(m.Column.Combinations) == 0 || m.Column.Length < minLength*0.999) {
				t.Fatalf("a member without load or length: %+v", m)
			}
		}
	})
}

// Permuting the rows only permutes the members.
func TestRowsMayStandInAnyOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 30).Draw(t, "n")
		var lines []string
		for i := range n {
			for c := range rapid.IntRange(1, 3).Draw(t, "combinations") {
				lines = append(lines, fmt.Sprintf("C%d | ULS%d | #%d | #%d | %s", i, c, 3+i%3, 100+i+c, []string{"", "mid", "thirds"}[i%3]))
			}
		}
		header := "Mark | Combination | Length | N_Ed | Restraints z-z\n"
		read := func() map[string]Member {
			s, err := Read(sheetOf(header+strings.Join(lines, "\n")), options())
			require.NoError(t, err)
			byMark := map[string]Member{}
			for _, m := range s.Members {
				m.Rows, m.Column.Cell = nil, ""
				byMark[m.Column.Mark] = m
			}
			return byMark
		}
		want := read()
		require.Len(t, want, n)
		r := rand.New(rand.NewPCG(rapid.Uint64().Draw(t, "seed"), 1))
		r.Shuffle(len(lines), func(i, j int) { lines[i], lines[j] = lines[j], lines[i] })
		for mark, m := range read() {
			assert.Equal(t, want[mark].Column.Length, m.Column.Length)
			assert.Equal(t, want[mark].Column.Z, m.Column.Z)
			assert.ElementsMatch(t, want[mark].Column.Combinations, m.Column.Combinations)
			assert.Empty(t, m.Problems)
		}
	})
}

// Columns may stand in any order, and columns that say nothing between them.
func TestColumnsMayStandInAnyOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		heads := []string{"Mark", "Length (mm)", "N_Ed ULS1", "N_Ed ULS2", "M_y,Ed top", "Restraints z-z", "Grade", "Remarks", "Rev"}
		cells := []string{"C1", "#4500", "#900", "#700", "#12", "thirds", "S275", "new", "P2"}
		perm := rapid.Permutation([]int{0, 1, 2, 3, 4, 5, 6, 7, 8}).Draw(t, "order")
		var a, b []string
		for _, i := range perm {
			a, b = append(a, heads[i]), append(b, cells[i])
		}
		s, err := Read(sheetOf(strings.Join(a, "|")+"\n"+strings.Join(b, "|")), options())
		require.NoError(t, err)
		c := s.Members[0].Column
		assert.Empty(t, s.Members[0].Problems)
		assert.Equal(t, "C1", c.Mark)
		assert.Equal(t, 4500.0, c.Length)
		assert.Equal(t, []float64{1500, 3000}, c.Z.Restraints)
		assert.Len(t, c.Combinations, 2)
		for _, k := range c.Combinations {
			assert.Equal(t, 12e6, k.My.Top)
		}
	})
}
