package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// A moment that is given at one end alone is noted: a blank is absent, and 0
// there is what the reader may not have meant.
func TestMomentAtOneEnd(t *testing.T) {
	top, bottom := "M_y,Ed is given at the top alone: 0 is taken at the bottom", "M_z,Ed is given at the bottom alone: 0 is taken at the top"
	s := readAll(t, sheetOf(`Mark | Length | N_Ed | M_y bottom | M_y top | M_z bottom | M_z top
both | 4 | #500 | #10 | #30 | #0 | #5
one | 4 | #500 | | #30 | #-5 |
nothing beside 0 | 4 | #500 | | #0 | | 
none | 4 | #500 | | | | `))
	want := [][]string{nil, {top, bottom}, nil, nil}
	for i := range s.Members {
		assert.Equal(t, want[i], s.Members[i].Column.Notes, s.Members[i].Column.Mark)
	}
	require.Len(t, s.Members, len(want))
	s = readAll(t, sheetOf("Mark | Length | N_Ed ULS1 | M_y top ULS1 | N_Ed ULS2 | M_y top ULS2\nC1 | 4 | #500 | #30 | #400 | #20"))
	require.Len(t, s.Members, 1)
	assert.Equal(t, []string{top}, s.Members[0].Column.Notes, "said once")
}
