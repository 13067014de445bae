package main

import (
	"bytes"
	"context"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// Where a person reads the take-off on a screen, its lists stand there once.
func TestTakeoffOnAScreenSaysItsListsOnce(t *testing.T) {
	loads := filepath.Join(t.TempDir(), "loads.csv")
	require.NoError(t, os.WriteFile(loads, []byte("Mark,Length,N_Ed,Section\nC1,4,100,203x203x46 UKC\nC2,4,100,\n"), 0o666))
	for _, screen := range []bool{false, true} {
		var out, err bytes.Buffer
		con := &console{in: bytes.NewReader(nil), out: &out, err: &err, screen: screen}
		assert.Equal(t, statusNotRead, execute(context.Background(), con, []string{"takeoff", loads}))
		assert.Contains(t, out.String(), "Not counted")
		if screen {
			assert.NotContains(t, err.String(), "not counted")
		} else {
			assert.Contains(t, err.String(), "not counted: 1")
		}
	}
}
