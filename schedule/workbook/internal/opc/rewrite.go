package opc

import (
	"archive/zip"
	"compress/flate"
	"io"
	"slices"
	"time"
)

// Rewrite is a package on its way to another: some parts changed, added or
// left out, all others copied.
type Rewrite struct {
	from    *Package
	changes map[string]change // by key
	added   []string          // names of new parts
}

// change is what becomes of a part: nil leaves it out.
type change func(io.Writer) error

// NewRewrite starts a rewrite in which nothing is changed.
func NewRewrite(from *Package) *Rewrite {
	return &Rewrite{from: from, changes: map[string]change{}}
}

// Set gives a part, old or new, its content.
func (w *Rewrite) Set(name string, content []byte) {
	w.SetStream(name, func(to io.Writer) error {
		_, err := to.Write(content)
		return err
	})
}

// SetStream gives a part content that is written when its turn comes.
func (w *Rewrite) SetStream(name string, write func(io.Writer) error) {
	if !w.from.Has(name) && w.changes[key(name)] == nil {
		w.added = append(w.added, name)
	}
	w.changes[key(name)] = write
}

// Remove leaves a part out.
func (w *Rewrite) Remove(name string) {
	w.changes[key(name)] = nil
	w.added = slices.DeleteFunc(w.added, func(a string) bool { return key(a) == key(name) })
}

// Has reports whether the new package holds a part of that name.
func (w *Rewrite) Has(name string) bool {
	c, changed := w.changes[key(name)]
	return changed && c != nil || !changed && w.from.Has(name)
}

// level is the compression of what is written: sheets are text that repeats
// itself, and the quick levels come within a few per cent of the slow ones.
const level = 3

// Write writes the new package. The same changes to the same package give the
// same bytes: new parts carry the earliest date that the format knows.
func (w *Rewrite) Write(to io.Writer) error {
	z := zip.NewWriter(to)
	z.RegisterCompressor(zip.Deflate, func(out io.Writer) (io.WriteCloser, error) {
		return flate.NewWriter(out, level)
	})
	for _, f := range w.from.zip.File {
		if err := w.writeOld(z, f); err != nil {
			return err
		}
	}
	for _, name := range w.added {
		if err := writePart(z, name, w.changes[key(name)]); err != nil {
			return err
		}
	}
	return z.Close()
}

func (w *Rewrite) writeOld(z *zip.Writer, f *zip.File) error {
	c, changed := w.changes[key(f.Name)]
	switch {
	case !changed:
		return z.Copy(f)
	case c != nil:
		return writePart(z, f.Name, c)
	}
	return nil
}

func writePart(z *zip.Writer, name string, write change) error {
	out, err := z.CreateHeader(&zip.FileHeader{
		Name:     name,
		Method:   zip.Deflate,
		Modified: time.Date(1980, 1, 1, 0, 0, 0, 0, time.UTC),
	})
	if err != nil {
		return err
	}
	return write(out)
}
