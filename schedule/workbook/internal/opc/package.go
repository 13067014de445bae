// Package opc reads and writes the package that an Office workbook is: a zip
// archive of parts, joined by relationships (ECMA-376 Part 2). Parts that
// nobody asked to change are copied as they are, still compressed.
package opc

import (
	"archive/zip"
	"compress/flate"
	"errors"
	"fmt"
	"io"
	"path"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// ContentTypes is the part that gives every other part its type.
const ContentTypes = "[Content_Types].xml"

// ErrDamaged is behind every error about a package that does not hold
// together.
var ErrDamaged = errors.New("damaged package")

// Package is a package open for reading.
type Package struct {
	zip   *zip.Reader
	parts map[string]*zip.File // by key
}

// Open reads the directory of a package.
func Open(r io.ReaderAt, size int64) (*Package, error) {
	z, err := zip.NewReader(r, size)
	if err != nil {
		return nil, fmt.Errorf("%w: %w", ErrDamaged, err)
	}
	p := &Package{zip: z, parts: make(map[string]*zip.File, len(z.File))}
	for _, f := range z.File {
		if strings.HasSuffix(f.Name, "/") {
			continue
		}
		k := key(f.Name)
		if p.parts[k] != nil {
			return nil, fmt.Errorf("%w: the part %s stands in it twice", ErrDamaged, f.Name)
		}
		p.parts[k] = f
	}
	return p, nil
}

// key makes names of parts comparable: they differ by more than case and the
// kind of slash.
func key(name string) string {
	return strings.ToLower(strings.TrimPrefix(strings.ReplaceAll(name, `\`, "/"), "/"))
}

// Has reports whether there is a part of that name.
func (p *Package) Has(name string) bool { return p.parts[key(name)] != nil }

// Names returns the names of all parts, in the order of the archive.
func (p *Package) Names() []string {
	var out []string
	for _, f := range p.zip.File {
		if p.parts[key(f.Name)] == f {
			out = append(out, f.Name)
		}
	}
	return out
}

// Size returns what a part takes up once unpacked, in bytes, by its own word.
func (p *Package) Size(name string) int64 {
	f := p.parts[key(name)]
	if f == nil {
		return 0
	}
	return int64(min(f.UncompressedSize64, 1<<62))
}

// Stream opens an XML part, as UTF-8.
func (p *Package) Stream(name string) (io.ReadCloser, error) {
	f := p.parts[key(name)]
	if f == nil {
		return nil, fmt.Errorf("%w: the part %s is missing", ErrDamaged, name)
	}
	raw, err := f.Open()
	if err != nil {
		return nil, fmt.Errorf("%w: %s: %w", ErrDamaged, name, err)
	}
	text, err := markup.UTF8(&limited{r: raw, name: f.Name, packed: int64(f.CompressedSize64)})
	if err != nil {
		raw.Close()
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	return &stream{text, raw}, nil
}

type stream struct {
	io.Reader
	raw io.Closer
}

func (s *stream) Close() error { return s.raw.Close() }

// Read returns a whole XML part, as UTF-8.
func (p *Package) Read(name string) ([]byte, error) {
	r, err := p.Stream(name)
	if err != nil {
		return nil, err
	}
	defer r.Close()
	b, err := io.ReadAll(io.LimitReader(r, maxHeld+1))
	if err != nil {
		return nil, err
	}
	if len(b) > maxHeld {
		return nil, &SizeError{Part: name, Limit: maxHeld}
	}
	return b, nil
}

// Tree reads a part as a tree of elements.
func (p *Package) Tree(name string) (*markup.Element, []byte, error) {
	doc, err := p.Read(name)
	if err != nil {
		return nil, nil, err
	}
	root, err := markup.Parse(doc)
	if err != nil {
		return nil, nil, fmt.Errorf("%s: %w", name, err)
	}
	return root, doc, nil
}

// Main returns the name of the part that the package is about.
func (p *Package) Main() (string, error) {
	rels, err := p.Rels("")
	if err != nil {
		return "", err
	}
	for _, r := range rels {
		if r.Is("officeDocument") {
			return r.Target, nil
		}
	}
	return "", fmt.Errorf("%w: it names no main part", ErrDamaged)
}

// Rel is a relationship from one part to another, or to something outside.
type Rel struct {
	ID, Type string
	Target   string // name of a part; as written where it is outside
	Outside  bool
}

// Is reports whether the relationship is of the kind with that last word,
// whatever the edition of the standard that its namespace is of.
func (r *Rel) Is(kind string) bool { return path.Base(r.Type) == kind }

// RelsName returns the name of the part that holds the relationships of part;
// those of the package for the empty name.
func RelsName(part string) string {
	return path.Join(path.Dir(part), "_rels", path.Base("/"+part)+".rels")
}

// Rels returns the relationships of a part, none where it has no such part.
func (p *Package) Rels(part string) ([]Rel, error) {
	name := RelsName(part)
	if part == "" {
		name = "_rels/.rels"
	}
	if !p.Has(name) {
		return nil, nil
	}
	root, _, err := p.Tree(name)
	if err != nil {
		return nil, err
	}
	var out []Rel
	for _, e := range root.All("Relationship") {
		r := Rel{ID: e.Attr("Id"), Type: e.Attr("Type"), Target: e.Attr("Target")}
		r.Outside = e.Attr("TargetMode") == "External"
		if !r.Outside {
			r.Target = Resolve(part, r.Target)
		}
		out = append(out, r)
	}
	return out, nil
}

// Resolve returns the name of the part that a relationship of part points to.
func Resolve(part, target string) string {
	target = strings.ReplaceAll(target, `\`, "/")
	if !strings.HasPrefix(target, "/") {
		target = path.Join("/", path.Dir(part), target)
	}
	return path.Clean(target)[1:]
}

// limits: what a part may grow to when it is unpacked. A sheet is text that
// repeats itself, yet never a hundredfold.
const (
	maxHeld  = 512 << 20 // of a part that is held in memory
	maxRatio = 250       // of unpacked to packed, beyond freeRide
	freeRide = 64 << 20
)

// SizeError is a part too big to be taken for a workbook's.
type SizeError struct {
	Part  string
	Limit int64
}

func (e *SizeError) Error() string {
	return fmt.Sprintf("the part %s unpacks to more than %d MB", e.Part, e.Limit>>20)
}

// limited stops a part that unpacks to out of all proportion, and tells errors
// of the archive from others.
type limited struct {
	r      io.Reader
	name   string
	packed int64
	n      int64
}

func (l *limited) Read(b []byte) (int, error) {
	n, err := l.r.Read(b)
	l.n += int64(n)
	if limit := max(freeRide, maxRatio*l.packed); l.n > limit {
		return 0, &SizeError{l.name, limit}
	}
	var corrupt flate.CorruptInputError
	if errors.Is(err, zip.ErrChecksum) || errors.Is(err, zip.ErrFormat) || errors.Is(err, io.ErrUnexpectedEOF) || errors.As(err, &corrupt) {
		err = fmt.Errorf("%w: %s: %w", ErrDamaged, l.name, err)
	}
	return n, err
}
