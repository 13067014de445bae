package ec3_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/ec3"
)

// usual is a column with two combinations and a restraint about z-z.
func usual() *design.Column {
	col := loaded(6000, 900e3, 800e3)
	col.Combinations[0].Name, col.Combinations[1].Name = "ULS1", "ULS2"
	col.Z.Restraints = []float64{3000}
	return col
}

// Once its buffers are large enough, no part of the work allocates.
func TestWorkDoesNotAllocateOnceWarm(t *testing.T) {
	set := settings()
	col := usual()
	stepped := usual()
	stepped.Combinations[0].Steps = []design.Step{{Height: 3000, NEd: 400e3}}
	for name, s := range map[string]*catalogue.Section{
		"I": he260a(), "channel": channel(200, 90, 7, 14, 12), "angle": angle(100, 100, 12), "box": box(200, 100, 8, catalogue.HotFinished),
	} {
		c := candidate(t, s, "S275", set)
		var m ec3.Member
		var a ec3.Assessment
		work := func() {
			for _, col := range []*design.Column{col, stepped} {
				if m.Reset(col, set) != nil {
					panic("not a member")
				}
				m.Assess(c, &a)
			}
		}
		work()
		assert.Zero(t, testing.AllocsPerRun(20, work), name)
	}
}

func BenchmarkMemberReset(b *testing.B) {
	set, col := settings(), usual()
	var m ec3.Member
	for b.Loop() {
		if err := m.Reset(col, set); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkAssess(b *testing.B) {
	set := settings()
	m, err := ec3.NewMember(usual(), set)
	require.NoError(b, err)
	var a ec3.Assessment
	for name, s := range map[string]*catalogue.Section{"I": he260a(), "angle": angle(100, 100, 12)} {
		c := candidate(b, s, "S275", set)
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				m.Assess(c, &a)
			}
		})
	}
}

func BenchmarkNewCandidate(b *testing.B) {
	set, s, g := settings(), he260a(), grade(b, "S355")
	for b.Loop() {
		if _, err := ec3.NewCandidate(s, g, set); err != nil {
			b.Fatal(err)
		}
	}
}

// bentUsual is usual with moments about both axes, and beam reactions.
func bentUsual() *design.Column {
	col := usual()
	for i := range col.Combinations {
		k := &col.Combinations[i]
		k.My, k.Mz = design.EndMoments{Bottom: -20e6, Top: 40e6}, design.EndMoments{Top: 6e6}
		k.HasReactions, k.FlangeA, k.WebB = true, 90e3, 20e3
	}
	return col
}

// Nor does bending, by either annex, by simple construction or between
// neighbours.
func TestBendingDoesNotAllocateOnceWarm(t *testing.T) {
	for _, interaction := range []design.Interaction{design.AnnexB, design.AnnexA, design.SimpleInteraction} {
		set := simpleSettings()
		set.Interaction = interaction
		for _, s := range []*catalogue.Section{section(t, "203x203x60 UKC"), section(t, "RHS 200x100x8.0"), section(t, "CHS 168.3x8.0")} {
			c := candidate(t, s, "S355", set)
			var m ec3.Member
			var a ec3.Assessment
			col, next := bentUsual(), &ec3.Neighbour{Column: bentUsual(), Section: s}
			col.Z.Restraints = nil
			work := func() {
				if m.Reset(col, set) != nil {
					panic("not a member")
				}
				m.Between(next, next)
				m.Assess(c, &a)
			}
			work()
			require.NotZero(t, a.Section.Class)
			assert.Zero(t, testing.AllocsPerRun(20, work), "%s by %v", s.Name(), interaction)
		}
	}
}

func BenchmarkAssessBent(b *testing.B) {
	set := settings()
	m, err := ec3.NewMember(bentUsual(), set)
	require.NoError(b, err)
	var a ec3.Assessment
	for _, name := range []string{"203x203x60 UKC", "RHS 200x100x8.0"} {
		c := candidate(b, section(b, name), "S355", set)
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				m.Assess(c, &a)
			}
		})
	}
}
