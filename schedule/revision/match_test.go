package revision

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"stanchion/design"
)

// col is a column of an issue, written "MARK STACK FROM TO N_Ed": a dash is a
// blank.
func col(text string) Member {
	f := strings.Fields(text)
	for i := range f {
		if f[i] == "-" {
			f[i] = ""
		}
	}
	var n float64
	fmt.Sscan(f[4], &n)
	c := design.Column{Mark: f[0], Stack: f[1], From: f[2], To: f[3], Quantity: 1, Length: 4000, Combinations: []design.Combination{{NEd: n * 1e3}}}
	if c.Mark == "" {
		c.Mark = "Columns!A9"
		c.Cell = c.Mark
	}
	return Member{Column: c, Rows: []int{1}}
}

func issue(lines ...string) []Member {
	var list []Member
	for _, l := range lines {
		list = append(list, col(l))
	}
	return list
}

// told writes a matching as "old=new" marks, for comparison.
func told(old, new []Member, m *Matching) (pairs []string, removed, added, candidates []string) {
	name := func(x *Member) string { return x.Column.Mark + x.Column.Stack + x.Column.From }
	for _, p := range m.Pairs {
		pairs = append(pairs, name(&old[p.Old])+"="+name(&new[p.New]))
	}
	for _, j := range m.Removed {
		removed = append(removed, name(&old[j]))
	}
	for _, i := range m.Added {
		added = append(added, name(&new[i]))
	}
	for _, c := range m.Candidates {
		candidates = append(candidates, name(&old[c.Old])+"="+name(&new[c.New])+" "+c.Likeness.String())
	}
	return pairs, removed, added, candidates
}

func TestMatch(t *testing.T) {
	for name, c := range map[string]struct {
		old, new                          []string
		pairs, removed, added, candidates []string
	}{
		"by mark, stack and level, in any order, however spelt": {
			old:   []string{"C1 A L0 L1 900", "C1 A L1 L2 700", "C2 B L0 L1 500"},
			new:   []string{"c2 b l0 l1 500", "C1 A L1 L2 750", "C1 A L0 L1 900"},
			pairs: []string{"C2BL0=c2bl0", "C1AL1=C1AL1", "C1AL0=C1AL0"},
		},
		"a grid that one issue alone has does not count": {
			old: []string{"C1 A L0 L1 900"}, new: []string{"C1 - L0 L1 900"}, pairs: []string{"C1AL0=C1L0"},
		},
		"renamed in its place": {
			old: []string{"C1 A L0 L1 900", "C2 B L0 L1 900"}, new: []string{"K7 A L0 L1 950", "C2 B L0 L1 900"},
			pairs: []string{"C2BL0=C2BL0"}, removed: []string{"C1AL0"}, added: []string{"K7AL0"}, candidates: []string{"C1AL0=K7AL0 renamed?"},
		},
		"respelt": {
			old: []string{"C-01 - L0 L1 900", "C-02 - L0 L1 900"}, new: []string{"C1 - L0 L1 900", "C2 - L0 L1 700"},
			removed: []string{"C-01L0", "C-02L0"}, added: []string{"C1L0", "C2L0"}, candidates: []string{"C-01L0=C1L0 respelt?", "C-02L0=C2L0 respelt?"},
		},
		"moved": {
			old: []string{"C1 A L0 L1 900"}, new: []string{"C1 B L0 L1 950"},
			removed: []string{"C1AL0"}, added: []string{"C1BL0"}, candidates: []string{"C1AL0=C1BL0 moved?"},
		},
		"moved with everything else": {
			old: []string{"C1 A L0 L1 900"}, new: []string{"K9 B L1 L2 900"},
			removed: []string{"C1AL0"}, added: []string{"K9BL1"}, candidates: []string{"C1AL0=K9BL1 alike?"},
		},
		"nothing in common": {
			old: []string{"C1 A L0 L1 900"}, new: []string{"K9 B L1 L2 950"}, removed: []string{"C1AL0"}, added: []string{"K9BL1"},
		},
		"without marks, by place": {
			old: []string{"- A L0 L1 900", "- A L1 L2 700"}, new: []string{"- A L1 L2 700", "- A L0 L1 800"},
			pairs: []string{"Columns!A9AL1=Columns!A9AL1", "Columns!A9AL0=Columns!A9AL0"},
		},
		"cells are no marks": {
			old: []string{"- - - - 900"}, new: []string{"- - - - 900"},
			removed: []string{"Columns!A9"}, added: []string{"Columns!A9"}, candidates: []string{"Columns!A9=Columns!A9 alike?"},
		},
		"twins that are alike first": {
			old: []string{"C1 - - - 900", "C1 - - - 700"}, new: []string{"C1 - - - 700", "C1 - - - 950"},
			pairs: []string{"C1=C1", "C1=C1"},
		},
		"twins, one more": {
			old: []string{"C1 - - - 900"}, new: []string{"C1 - - - 700", "C1 - - - 950"},
			removed: []string{"C1"}, added: []string{"C1", "C1"}, candidates: []string{"C1=C1 one of several?", "C1=C1 one of several?"},
		},
	} {
		t.Run(name, func(t *testing.T) {
			old, new := issue(c.old...), issue(c.new...)
			pairs, removed, added, candidates := told(old, new, Match(old, new))
			assert.Equal(t, c.pairs, pairs)
			assert.Equal(t, c.removed, removed)
			assert.Equal(t, c.added, added)
			assert.Equal(t, c.candidates, candidates)
		})
	}
}

func TestTwinsAreSaid(t *testing.T) {
	old, new := issue("C1 - - - 900", "C1 - - - 700"), issue("C1 - - - 910", "C1 - - - 710")
	m := Match(old, new)
	require.Len(t, m.Pairs, 2)
	assert.Equal(t, []int{0, 1}, []int{m.Pairs[0].Old, m.Pairs[1].Old})
	assert.Contains(t, m.Pairs[0].Note, "they are taken in their order")
}

func TestRename(t *testing.T) {
	old, new := issue("C1 A L1 L2 900", "C2 A L2 L3 900"), issue("K1 A 01 02 900", "C2 A 02 L3 900")
	var list []Renaming
	for _, s := range []string{"C1=K1", " l1 = 01 ", "L2=02"} {
		r, err := ParseRenaming(s)
		require.NoError(t, err)
		list = append(list, r)
	}
	require.NoError(t, Rename(old, new, list))
	assert.Len(t, Match(old, new).Pairs, 2)
	assert.ErrorContains(t, Rename(old, new, []Renaming{{"X", "01"}}), `no mark, grid reference or level of the old issue is "X"`)
	assert.ErrorContains(t, Rename(old, new, []Renaming{{"C2", "C3"}}), `no mark, grid reference or level of the new issue is "C3"`)
	assert.ErrorContains(t, Rename(old, new, []Renaming{{"C2", "C2 A 02 to L3"}}), "not of one kind")
	for _, s := range []string{"", "=", "a=", "=b", "ab"} {
		_, err := ParseRenaming(s)
		assert.Error(t, err, s)
	}
}

// A member that stands elsewhere is named whole: its level keeps its name for
// all others.
func TestRenameOneMember(t *testing.T) {
	old := issue("C1 A L1 L2 900", "C2 A L2 L3 900", "C2 B L2 L3 900")
	new := issue("C1 A L1 L2 900", "C2 A L2 Roof 900", "C2 B L2 L3 900")
	require.Len(t, Match(old, new).Pairs, 2)
	require.NoError(t, Rename(old, new, []Renaming{{old[1].Name(), new[1].Name()}}))
	assert.Len(t, Match(old, new).Pairs, 3)
	assert.Equal(t, "C2 B L2 to L3", old[2].Name())
}

func TestBareMark(t *testing.T) {
	for _, pair := range [][2]string{{"C-01", "c1"}, {"A1/02", "A1.2"}, {"SC 010", "sc10"}, {"C100", "C-100"}} {
		assert.Equal(t, bareMark(pair[0]), bareMark(pair[1]), pair)
	}
	for _, pair := range [][2]string{{"C1", "C10"}, {"C1", "C11"}, {"C1", "D1"}, {"C101", "C11"}, {"C100", "C1"}} {
		assert.NotEqual(t, bareMark(pair[0]), bareMark(pair[1]), pair)
	}
}

func drawIssue(rt *rapid.T, name string) []Member {
	pick := func(of ...string) string { return rapid.SampledFrom(of).Draw(rt, "part") }
	var list []Member
	for range rapid.IntRange(0, 12).Draw(rt, name) {
		list = append(list, col(strings.Join([]string{pick("C1", "C-01", "C2", "C3", "-"), pick("A", "B", "-"), pick("L0", "L1", "-"), pick("L2", "-"), pick("700", "900")}, " ")))
	}
	return list
}

// Every member is in exactly one place, pairs have one name, and candidates are
// among what was not paired.
func TestMatchingIsAPartition(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		old, new := drawIssue(rt, "old"), drawIssue(rt, "new")
		m := Match(old, new)
		seenOld, seenNew := map[int]int{}, map[int]int{}
		p := commonParts(old, new)
		for k, pair := range m.Pairs {
			seenOld[pair.Old]++
			seenNew[pair.New]++
			assert.Equal(rt, identityOf(&old[pair.Old].Column, p), identityOf(&new[pair.New].Column, p))
			if k > 0 {
				assert.Less(rt, m.Pairs[k-1].New, pair.New)
			}
		}
		removed, added := map[int]bool{}, map[int]bool{}
		for _, j := range m.Removed {
			seenOld[j]++
			removed[j] = true
		}
		for _, i := range m.Added {
			seenNew[i]++
			added[i] = true
		}
		for j := range old {
			assert.Equal(rt, 1, seenOld[j])
		}
		for i := range new {
			assert.Equal(rt, 1, seenNew[i])
		}
		for _, c := range m.Candidates {
			assert.True(rt, removed[c.Old] && added[c.New])
		}
	})
}

// An issue against itself, its rows in another order: everything is found, and
// nothing changed.
func TestAnIssueMatchesItself(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		old := drawIssue(rt, "issue")
		var said []Member
		p := partsOf(old)
		for i := range old {
			if identityOf(&old[i].Column, p).says() {
				said = append(said, old[i])
			}
		}
		new := rapid.Permutation(said).Draw(rt, "order")
		m := Match(said, new)
		assert.Len(rt, m.Pairs, len(said))
		assert.Empty(rt, m.Candidates)
		for _, pair := range m.Pairs {
			assert.Empty(rt, Changes(&said[pair.Old].Column, &new[pair.New].Column))
		}
	})
}

// Which issue is the old one only turns the matching round.
func TestMatchingTurnsRound(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		old, new := drawIssue(rt, "old"), drawIssue(rt, "new")
		a, b := Match(old, new), Match(new, old)
		assert.ElementsMatch(rt, a.Removed, b.Added)
		assert.ElementsMatch(rt, a.Added, b.Removed)
		assert.Equal(rt, len(a.Pairs), len(b.Pairs))
	})
}
