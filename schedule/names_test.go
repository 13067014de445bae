package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"
)

func TestNamesThatAreTheSame(t *testing.T) {
	for _, pair := range [][2]string{{"C1", "c1"}, {" C1 ", "C1"}, {"A  1", "a 1"}, {"A\u00a01", "a 1"}, {"STÜTZE 1", "stütze 1"}} {
		assert.True(t, sameName(pair[0], pair[1]), pair)
	}
	assert.False(t, sameName("C1", "C 1"))
}

// Two names have one hash just where they are the same for people.
func TestHashFollowsNames(t *testing.T) {
	name := rapid.StringMatching(`[aA1 üÜ\t-]{0,6}`)
	rapid.Check(t, func(t *rapid.T) {
		a, b := name.Draw(t, "a"), name.Draw(t, "b")
		x, y := newHasher, newHasher
		x.name(a)
		y.name(b)
		if (x.sum() == y.sum()) != sameName(a, b) {
			t.Fatalf("%q %q", a, b)
		}
	})
}
