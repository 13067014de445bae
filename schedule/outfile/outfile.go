// Package outfile writes files whole or not at all: beside their place under
// another name, then renamed. A run that fails or is stopped leaves what stood
// there before, and nothing half written.
package outfile

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"math/rand/v2"
	"os"
	"path/filepath"
)

// bufferSize is what is gathered before the disk is asked.
const bufferSize = 256 << 10

// File is a file being written. It appears at its place on Commit.
type File struct {
	path string // as given, for messages
	temp string // what is being written; empty: the place itself (a device, a pipe)
	dest string // with links followed
	mode fs.FileMode
	kept bool // mode is that of a file which stands there
	file *os.File
	buf  *bufio.Writer

	settled bool
}

// Write writes a file whole or not at all. Nothing is left of it where write
// fails or ctx ends. The permissions of a file that stands there are kept.
func Write(ctx context.Context, path string, write func(io.Writer) error) error {
	f, err := Create(path)
	if err != nil {
		return err
	}
	defer f.Discard()
	if err := write(&guarded{ctx, f}); err != nil {
		return err
	}
	if err := ctx.Err(); err != nil {
		return err
	}
	return f.Commit()
}

// Create starts a file that is to stand at path.
func Create(path string) (*File, error) {
	f := &File{path: path, dest: path, mode: 0o666}
	if err := f.look(); err != nil {
		return nil, err
	}
	if err := f.open(); err != nil {
		return nil, f.explain(err)
	}
	f.buf = bufio.NewWriterSize(f.file, bufferSize)
	return f, nil
}

// look finds out what stands at the place.
func (f *File) look() error {
	if real, err := filepath.EvalSymlinks(f.path); err == nil {
		f.dest = real
	}
	info, err := os.Stat(f.dest)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return f.lookAtFolder()
	case err != nil:
		return f.explain(err)
	case info.IsDir():
		return fmt.Errorf("%s: cannot be written: it is a folder: name a file", f.path)
	case !info.Mode().IsRegular():
		f.temp, f.mode = "", 0
		return nil
	case info.Mode().Perm()&0o200 == 0:
		return fmt.Errorf("%s: cannot be written: it is read-only: name another file, or allow writing", f.path)
	}
	f.mode, f.kept = info.Mode().Perm(), true
	return nil
}

func (f *File) lookAtFolder() error {
	dir := filepath.Dir(f.dest)
	info, err := os.Stat(dir)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return fmt.Errorf("%s: cannot be written: the folder %s does not exist: make it, or name another", f.path, dir)
	case err != nil:
		return f.explain(err)
	case !info.IsDir():
		return fmt.Errorf("%s: cannot be written: %s is not a folder", f.path, dir)
	}
	return nil
}

func (f *File) open() (err error) {
	if f.mode == 0 {
		f.file, err = os.OpenFile(f.dest, os.O_WRONLY, 0)
		return err
	}
	// Not os.CreateTemp: that hides the file from everyone but its owner, and
	// the usual permissions could not be found again.
	for range 100 {
		f.temp = filepath.Join(filepath.Dir(f.dest), fmt.Sprintf(".%s.%08x.part", filepath.Base(f.dest), rand.Uint32()))
		f.file, err = os.OpenFile(f.temp, os.O_WRONLY|os.O_CREATE|os.O_EXCL, f.mode)
		if !errors.Is(err, fs.ErrExist) {
			break
		}
	}
	return err
}

// Write adds to the file.
func (f *File) Write(p []byte) (int, error) {
	n, err := f.buf.Write(p)
	if err != nil {
		err = f.explain(err)
	}
	return n, err
}

// Settle writes all that is still held back, so that little but the rename can
// fail in Commit. A run with several files settles them all before it commits
// the first.
func (f *File) Settle() error {
	if f.settled {
		return nil
	}
	if err := f.settle(); err != nil {
		f.Discard()
		return f.explain(err)
	}
	f.settled = true
	return nil
}

func (f *File) settle() error {
	if err := f.buf.Flush(); err != nil {
		return err
	}
	if f.temp != "" {
		if f.kept {
			if err := f.file.Chmod(f.mode); err != nil {
				return err
			}
		}
		if err := f.file.Sync(); err != nil {
			return err
		}
	}
	file := f.file
	f.file = nil
	return file.Close()
}

// Commit finishes the file and puts it at its place.
func (f *File) Commit() error {
	if err := f.Settle(); err != nil {
		return err
	}
	if f.temp == "" {
		return nil
	}
	if err := os.Rename(f.temp, f.dest); err != nil {
		f.Discard()
		return f.explain(err)
	}
	f.temp = ""
	syncFolder(filepath.Dir(f.dest))
	return nil
}

// Discard drops a file that was not committed; after Commit it does nothing.
func (f *File) Discard() {
	if f.file != nil {
		f.file.Close()
		f.file = nil
	}
	if f.temp != "" {
		os.Remove(f.temp)
		f.temp = ""
	}
}

// explain says in a person's words why the file cannot be written.
func (f *File) explain(err error) error {
	why := err
	var path *fs.PathError
	var link *os.LinkError
	switch {
	case isFull(err):
		return &failure{f.path, "the disk is full: free some space, or write elsewhere", err}
	case isHeld(err):
		return &failure{f.path, "another program holds it open: close it there first", err}
	case errors.Is(err, fs.ErrPermission):
		return &failure{f.path, "permission denied: name another place", err}
	case errors.As(err, &path):
		why = path.Err
	case errors.As(err, &link):
		why = link.Err
	}
	return &failure{f.path, why.Error(), err}
}

// failure is a file that cannot be written.
type failure struct {
	path, why string
	err       error
}

func (e *failure) Error() string { return e.path + ": cannot be written: " + e.why }
func (e *failure) Unwrap() error { return e.err }

// guarded stops a file when its context ends.
type guarded struct {
	ctx  context.Context
	file *File
}

func (g *guarded) Write(p []byte) (int, error) {
	if err := g.ctx.Err(); err != nil {
		return 0, err
	}
	return g.file.Write(p)
}
