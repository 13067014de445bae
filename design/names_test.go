package design

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

func TestNamesThatAreTheSame(t *testing.T) {
	for _, same := range [][2]string{{"Level 1", "level  1"}, {"+3.90", "3.9"}, {"0.00", "0"}, {"+3,90", "3,9"}, {"3,9", "3.90"}, {"-0.5", "-0.50"}, {"Roof\u00a0top", " roof top"}} {
		assert.Equal(t, FoldLevel(same[0]), FoldLevel(same[1]), "%q", same)
	}
	for _, other := range [][2]string{{"L1", "L10"}, {"3.9", "-3.9"}, {"3.9", "39"}, {"", "0"}} {
		assert.NotEqual(t, FoldLevel(other[0]), FoldLevel(other[1]), "%q", other)
	}
	assert.NotEqual(t, FoldName("1"), FoldName("1.0"), "marks are not numbers")
	assert.Equal(t, LineOf("A1", "x"), LineOf("a1 ", "y"))
	assert.NotEqual(t, LineOf("A1", ""), LineOf("", "A1"))
}
