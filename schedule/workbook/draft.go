package workbook

import (
	"fmt"
	"path"
	"strings"

	"stanchion/schedule/workbook/internal/opc"
)

// draft is the new workbook in the making: the old one with changes.
type draft struct {
	book   *Book
	out    *opc.Rewrite
	types  *manifest
	rels   *relations // of the workbook part
	strict bool       // the workbook is of the strict edition of the standard
	prefix string     // of the elements of the workbook part
}

func (b *Book) newDraft() (*draft, error) {
	d := &draft{book: b, out: opc.NewRewrite(b.pkg), prefix: b.root.Prefix}
	var err error
	if d.types, err = openManifest(b.pkg); err != nil {
		return nil, err
	}
	if d.rels, err = openRelations(b.pkg, b.main); err != nil {
		return nil, err
	}
	d.strict = strings.Contains(string(b.root.Tag()), strictNamespace)
	return d, nil
}

// finish puts the parts that list others in place.
func (d *draft) finish() {
	d.out.Set(opc.ContentTypes, d.types.apply())
	d.out.Set(opc.RelsName(d.book.main), d.rels.apply())
}

// freeName returns a name for a new part that no other has: that of a part of
// its kind with the first number that is free.
func (d *draft) freeName(like string) string {
	ext := path.Ext(like)
	stem := strings.TrimRight(strings.TrimSuffix(like, ext), "0123456789")
	for n := 1; ; n++ {
		name := fmt.Sprintf("%s%d%s", stem, n, ext)
		if !d.out.Has(name) {
			return name
		}
	}
}

// dropTree leaves a part out, and what it alone is joined to.
func (d *draft) dropTree(part string) error {
	kept, err := d.referred(part)
	if err != nil {
		return err
	}
	return d.drop(part, kept)
}

func (d *draft) drop(part string, kept map[string]int) error {
	rels, err := d.book.pkg.Rels(part)
	if err != nil {
		return err
	}
	d.out.Remove(part)
	d.out.Remove(opc.RelsName(part))
	d.types.remove(part)
	for _, r := range rels {
		if r.Outside || !d.out.Has(r.Target) {
			continue
		}
		if kept[partKey(r.Target)]--; kept[partKey(r.Target)] <= 0 {
			if err := d.drop(r.Target, kept); err != nil {
				return err
			}
		}
	}
	return nil
}

// referred counts the relationships that lead to each part.
func (d *draft) referred(part string) (map[string]int, error) {
	count := map[string]int{}
	for _, name := range append(d.book.pkg.Names(), "") {
		rels, err := d.book.pkg.Rels(name)
		if err != nil {
			return nil, fmt.Errorf("%s: %w", part, err)
		}
		for _, r := range rels {
			if !r.Outside {
				count[partKey(r.Target)]++
			}
		}
	}
	return count, nil
}

// Namespaces of the strict edition (ISO/IEC 29500-1) and of the usual,
// transitional one.
const strictNamespace = "http://purl.oclc.org/ooxml/"

var strictNames = strings.NewReplacer(
	"http://schemas.openxmlformats.org/spreadsheetml/2006/main", strictNamespace+"spreadsheetml/main",
	"http://schemas.openxmlformats.org/officeDocument/2006/relationships", strictNamespace+"officeDocument/relationships",
	"http://schemas.openxmlformats.org/drawingml/2006/spreadsheetDrawing", strictNamespace+"drawingml/spreadsheetDrawing",
	"http://schemas.openxmlformats.org/drawingml/2006/chartDrawing", strictNamespace+"drawingml/chartDrawing",
	"http://schemas.openxmlformats.org/drawingml/2006/chart", strictNamespace+"drawingml/chart",
	"http://schemas.openxmlformats.org/drawingml/2006/main", strictNamespace+"drawingml/main",
)

// edition returns a part of ours as the edition of the workbook has it.
func (d *draft) edition(part []byte) []byte {
	if !d.strict {
		return part
	}
	return []byte(strictNames.Replace(string(part)))
}

// kind returns the type of a relationship, with that last word, as the
// edition of the workbook has it.
func (d *draft) kind(word string) string {
	const usual = "http://schemas.openxmlformats.org/officeDocument/2006/relationships/"
	return string(d.edition([]byte(usual + word)))
}
