package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"stanchion/schedule/outfile"
)

// stdio stands for standard input or output where a file is named.
const stdio = "-"

// beside returns the name of an output that stands beside its input:
// loads.xlsx gives loads-sized.xlsx.
func beside(input, suffix string) string {
	ext := filepath.Ext(input)
	return strings.TrimSuffix(input, ext) + suffix + ext
}

// sameFile reports whether two names lead to one file, by whatever links.
func sameFile(a, b string) bool {
	if a == stdio || b == stdio {
		return false
	}
	infoA, errA := os.Stat(a)
	infoB, errB := os.Stat(b)
	return errA == nil && errB == nil && os.SameFile(infoA, infoB)
}

// mayReplace returns an error unless a file may be written at path: nothing
// stands there, or an earlier run wrote it, or the user insists.
func mayReplace(path string, force bool, earlier func(path string) bool) error {
	info, err := os.Stat(path)
	switch {
	case errors.Is(err, fs.ErrNotExist) || force:
		return nil
	case err != nil:
		return nil // writing will say why
	case !info.Mode().IsRegular():
		return nil // a device or a pipe holds nothing; a folder is refused on writing
	case info.Size() == 0 || earlier(path):
		return nil
	}
	return fmt.Errorf("%s exists, and no earlier run wrote it: name another file with -o, or give --force to replace it", path)
}

// never says that no earlier run can be told from the file.
func never(string) bool { return false }

// writeNewFile writes a file that replaces none, unless the user insists.
func writeNewFile(ctx context.Context, path string, force bool, write func(io.Writer) error) error {
	if err := mayReplace(path, force, never); err != nil {
		return err
	}
	return outfile.Write(ctx, path, write)
}
