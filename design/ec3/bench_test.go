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
