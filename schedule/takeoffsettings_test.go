package schedule

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func TestTakeOffSettings(t *testing.T) {
	const plain = "Mark | Length | N_Ed\nC1 | 3.6 | 900"
	for given, want := range map[string]float64{"6 %": 0.06, "6": 0.06, "6,5%": 0.065, "0.06": 0.06, "0": 0, "0.5 %": 0.005, "50": 0.5} {
		s := readAll(t, sheetOf(plain), "connections="+given)
		assert.InDelta(t, want, s.Settings.TakeOff.Connections, 1e-12, given)
		// What is written back reads the same.
		for _, l := range s.Settings.Used() {
			if l.Name == "connections" {
				again := readAll(t, sheetOf(plain), "connections="+l.Value)
				assert.InDelta(t, want, again.Settings.TakeOff.Connections, 1e-12, l.Value)
			}
		}
	}
	for _, given := range []string{"0.7", "51", "-3", "much", "60 %"} {
		_, err := Read(sheetOf(plain), options("waste="+given))
		assert.ErrorContains(t, err, "give a percentage from 0 to 50 %", given)
	}
	s := readAll(t, sheetOf(plain), "transport length=12.5 m", "waste=2.5")
	assert.Equal(t, TakeOff{Waste: 0.025, Transport: 12_500}, s.Settings.TakeOff)
	assert.Zero(t, readAll(t, sheetOf(plain), "transport limit=off").Settings.TakeOff.Transport)
	_, err := Read(sheetOf(plain), options("transport length=12000"))
	require.ErrorContains(t, err, "in m")
}
