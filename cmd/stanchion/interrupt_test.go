//go:build unix

package main

import (
	"os"
	"os/exec"
	"path/filepath"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// A run that is interrupted while it writes ends with 130, and leaves what
// stood there before and nothing else.
func TestInterrupt(t *testing.T) {
	dir := t.TempDir()
	loads, out := filepath.Join(dir, "loads.csv"), filepath.Join(dir, "loads-sized.csv")
	require.NoError(t, os.WriteFile(loads, []byte(manyRows(150_000)), 0o666))
	require.NoError(t, os.WriteFile(out, []byte("as it was"), 0o666))

	run := exec.Command("stanchion", "size", loads, "--force")
	var said lines
	run.Stderr = &said
	require.NoError(t, run.Start())
	require.Eventually(t, func() bool {
		parts, err := filepath.Glob(filepath.Join(dir, ".*.part"))
		return err == nil && len(parts) == 1
	}, 20*time.Second, time.Millisecond, "the run writes no file")
	require.NoError(t, run.Process.Signal(os.Interrupt))
	var exit *exec.ExitError
	require.ErrorAs(t, run.Wait(), &exit)
	assert.Equal(t, statusInterrupted, exit.ExitCode())
	assert.Contains(t, string(said), "interrupted: nothing was written")

	entries, err := os.ReadDir(dir)
	require.NoError(t, err)
	assert.Len(t, entries, 2)
	data, err := os.ReadFile(out)
	require.NoError(t, err)
	assert.Equal(t, "as it was", string(data))
}

// lines collects what a program says.
type lines []byte

func (l *lines) Write(p []byte) (int, error) {
	*l = append(*l, p...)
	return len(p), nil
}
