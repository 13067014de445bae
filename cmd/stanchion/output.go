package main

import (
	"bufio"
	"context"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

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
		return fmt.Errorf("%s exists: name another file, or give --force to replace it", path)
	}
	return outfile.Write(ctx, path, write)
}

// writeApart writes results that are no annotated schedule: to the file that
// was asked for, or to standard output. earlier tells what may be replaced.
func (r *run) writeApart(ctx context.Context, earlier func(path string) bool, write func(io.Writer) error) error {
	out := r.flags.output
	if out == "" || out == stdio {
		return write(r.con.out)
	}
	if sameFile(out, r.input) {
		return fmt.Errorf("%s is the input itself: name another file with -o", out)
	}
	if err := mayReplace(out, r.flags.force, earlier); err != nil {
		return err
	}
	return outfile.Write(ctx, out, write)
}

// apartFormat is the form of results that are no annotated schedule: the
// extension of the output or, on standard output, the form that was asked for.
func (r *run) apartFormat(format string) (form string, toFile bool) {
	if out := r.flags.output; out != "" && out != stdio {
		return strings.TrimPrefix(strings.ToLower(filepath.Ext(out)), "."), true
	}
	return format, false
}

// bindApart binds the flags of a command whose results are no annotated
// schedule. forms are the extensions that the output may have.
func (f *runFlags) bindApart(c *cobra.Command, what, forms string, format *string) {
	fl := c.Flags()
	fl.StringVarP(&f.output, "output", "o", "", "write "+what+" to `FILE` ("+forms+" says its form)")
	fl.StringVar(format, "format", "text", "`FORM` on standard output: text or csv")
	fl.BoolVar(&f.force, "force", false, "replace an output that no earlier run wrote")
	f.bindReading(c)
}

// beginsWith reports whether the first line of a text file is one that ours
// begin with.
func beginsWith(path string, ours func(line string) bool) bool {
	f, err := os.Open(path)
	if err != nil {
		return false
	}
	defer f.Close()
	line, _ := bufio.NewReaderSize(f, 64<<10).ReadSlice('\n')
	return ours(string(line))
}
