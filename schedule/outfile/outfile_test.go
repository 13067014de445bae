package outfile

import (
	"context"
	"errors"
	"io"
	"os"
	"path/filepath"
	"runtime"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

func put(text string) func(io.Writer) error {
	return func(w io.Writer) error {
		_, err := io.WriteString(w, text)
		return err
	}
}

// names lists a folder, so that a left-over shows.
func names(t *testing.T, dir string) []string {
	t.Helper()
	entries, err := os.ReadDir(dir)
	require.NoError(t, err)
	out := []string{}
	for _, e := range entries {
		out = append(out, e.Name())
	}
	return out
}

func TestWriteCreatesAndReplaces(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "out.csv")
	for _, text := range []string{"first", "second"} {
		require.NoError(t, Write(context.Background(), path, put(text)))
		got, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.Equal(t, text, string(got))
		assert.Equal(t, []string{"out.csv"}, names(t, dir))
	}
}

func TestFailureLeavesWhatStoodThere(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "out.csv")
	require.NoError(t, os.WriteFile(path, []byte("mine"), 0o600))
	broken := errors.New("broken")
	err := Write(context.Background(), path, func(w io.Writer) error {
		put("half")(w)
		return broken
	})
	assert.ErrorIs(t, err, broken)
	assertKept(t, dir, path)
}

func TestCancelLeavesWhatStoodThere(t *testing.T) {
	dir := t.TempDir()
	path := filepath.Join(dir, "out.csv")
	require.NoError(t, os.WriteFile(path, []byte("mine"), 0o600))
	ctx, cancel := context.WithCancel(context.Background())
	err := Write(ctx, path, func(w io.Writer) error {
		cancel()
		return nil // not noticed by the writer: noticed before the renaming
	})
	assert.ErrorIs(t, err, context.Canceled)
	assertKept(t, dir, path)

	err = Write(ctx, path, put("more"))
	assert.ErrorIs(t, err, context.Canceled)
	assertKept(t, dir, path)
}

func assertKept(t *testing.T, dir, path string) {
	t.Helper()
	got, err := os.ReadFile(path)
	require.NoError(t, err)
	assert.Equal(t, "mine", string(got))
	assert.Equal(t, []string{"out.csv"}, names(t, dir))
}

func TestPermissions(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("Windows has no such permissions")
	}
	dir := t.TempDir()
	old := filepath.Join(dir, "old")
	require.NoError(t, os.WriteFile(old, nil, 0o600))
	require.NoError(t, os.Chmod(old, 0o664))
	fresh := filepath.Join(dir, "fresh")
	plain := filepath.Join(dir, "plain")
	require.NoError(t, os.WriteFile(plain, nil, 0o666))
	for _, path := range []string{old, fresh} {
		require.NoError(t, Write(context.Background(), path, put("x")))
	}
	assert.Equal(t, os.FileMode(0o664), mode(t, old), "kept")
	assert.Equal(t, mode(t, plain), mode(t, fresh), "as any other new file")

	require.NoError(t, os.Chmod(old, 0o444))
	assert.ErrorContains(t, Write(context.Background(), old, put("x")), "it is read-only")
}

func mode(t *testing.T, path string) os.FileMode {
	t.Helper()
	info, err := os.Stat(path)
	require.NoError(t, err)
	return info.Mode().Perm()
}

func TestLinkIsFollowed(t *testing.T) {
	dir := t.TempDir()
	target := filepath.Join(dir, "target")
	link := filepath.Join(dir, "link")
	require.NoError(t, os.WriteFile(target, []byte("old"), 0o600))
	if err := os.Symlink(target, link); err != nil {
		t.Skip("no symbolic links here: ", err)
	}
	require.NoError(t, Write(context.Background(), link, put("new")))
	got, err := os.ReadFile(target)
	require.NoError(t, err)
	assert.Equal(t, "new", string(got))
	info, err := os.Lstat(link)
	require.NoError(t, err)
	assert.NotZero(t, info.Mode()&os.ModeSymlink, "still a link")
}

func TestRefusals(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "file")
	require.NoError(t, os.WriteFile(file, nil, 0o600))
	for path, want := range map[string]string{
		dir:                           "it is a folder",
		filepath.Join(dir, "no", "x"): "does not exist",
		filepath.Join(file, "x"):      "not a",
	} {
		err := Write(context.Background(), path, put("x"))
		require.Error(t, err)
		assert.Contains(t, err.Error(), path)
		assert.Contains(t, err.Error(), want)
	}
	assert.Equal(t, []string{"file"}, names(t, dir))
}

func TestFullDisk(t *testing.T) {
	if _, err := os.Stat("/dev/full"); err != nil {
		t.Skip("no /dev/full here")
	}
	err := Write(context.Background(), "/dev/full", put("x"))
	assert.EqualError(t, err, "/dev/full: cannot be written: the disk is full: free some space, or write elsewhere")
}

func TestDeviceIsWrittenInPlace(t *testing.T) {
	if _, err := os.Stat("/dev/null"); err != nil {
		t.Skip("no /dev/null here")
	}
	assert.NoError(t, Write(context.Background(), "/dev/null", put("x")))
}

func TestDiscardAfterCommitKeepsTheFile(t *testing.T) {
	path := filepath.Join(t.TempDir(), "x")
	f, err := Create(path)
	require.NoError(t, err)
	_, err = f.Write([]byte("x"))
	require.NoError(t, err)
	require.NoError(t, f.Commit())
	f.Discard()
	assert.FileExists(t, path)
}

// A run with two files that fails while it settles the second leaves neither.
func TestSettledFileIsNotInPlace(t *testing.T) {
	path := filepath.Join(t.TempDir(), "out.txt")
	f, err := Create(path)
	require.NoError(t, err)
	_, err = f.Write([]byte("all of it"))
	require.NoError(t, err)
	require.NoError(t, f.Settle())
	require.NoError(t, f.Settle())
	assert.NoFileExists(t, path)

	require.NoError(t, f.Commit())
	data, err := os.ReadFile(path)
	require.NoError(t, err)
	assert.Equal(t, "all of it", string(data))

	f, err = Create(path)
	require.NoError(t, err)
	require.NoError(t, f.Settle())
	f.Discard()
	entries, err := os.ReadDir(filepath.Dir(path))
	require.NoError(t, err)
	assert.Len(t, entries, 1)
}
