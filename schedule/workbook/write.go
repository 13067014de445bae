package workbook

import (
	"context"
	"fmt"
	"io"
	"path/filepath"
	"strings"

	"stanchion/schedule/outfile"
	"stanchion/schedule/workbook/internal/markup"
)

// Types of the workbook part, by the extension of the file.
var workbookTypes = map[string]string{
	".xlsx": "application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml",
	".xlsm": "application/vnd.ms-excel.sheet.macroEnabled.main+xml",
	".xltx": "application/vnd.openxmlformats-officedocument.spreadsheetml.template.main+xml",
	".xltm": "application/vnd.ms-excel.template.macroEnabled.main+xml",
}

// Extension returns the extension that a copy of the workbook must have:
// spreadsheet programs refuse a file whose name and content differ.
func (b *Book) Extension() string {
	m, err := openManifest(b.pkg)
	if err == nil {
		kind := m.typeOf(b.main)
		for _, ext := range Extensions() {
			if workbookTypes[ext] == kind {
				return ext
			}
		}
	}
	return ".xlsx"
}

// Write writes the annotated workbook, whole or not at all. The project's own
// sheets stand behind the user's, or where an earlier run put them.
func (p *Plan) Write(ctx context.Context, path string, sheets []Sheet) error {
	return outfile.Write(ctx, path, func(w io.Writer) error {
		return p.write(w, strings.ToLower(filepath.Ext(path)), sheets)
	})
}

// WriteTo writes the annotated workbook to w, as a file with the input's own
// extension.
func (p *Plan) WriteTo(w io.Writer, sheets []Sheet) error {
	return p.write(w, p.book.Extension(), sheets)
}

func (p *Plan) write(w io.Writer, ext string, sheets []Sheet) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = damaged(p.book.name, fmt.Errorf("%v", r))
		}
	}()
	d, err := p.book.newDraft()
	if err != nil {
		return explain(p.book.name, err)
	}
	if err := d.fitExtension(ext); err != nil {
		return err
	}
	g, err := p.graftOwn(d, sheets)
	if err != nil {
		return explain(p.book.name, err)
	}
	if err := p.widenTables(d); err != nil {
		return explain(p.book.name, err)
	}
	d.dropCalculationOrder(p)
	d.out.Set(p.book.main, p.workbookPart(d, g))
	d.finish()
	rows, err := p.newRowWriter(g)
	if err != nil {
		return explain(p.book.name, err)
	}
	d.out.SetStream(p.sheet.part, rows.write)
	return d.out.Write(w)
}

// fitExtension gives the workbook the type that goes with the file's
// extension.
func (d *draft) fitExtension(ext string) error {
	want, known := workbookTypes[ext]
	have := d.types.typeOf(d.book.main)
	if !known || want == have {
		return nil
	}
	macros := strings.Contains(have, "macroEnabled")
	if macros != strings.Contains(want, "macroEnabled") {
		what := "holds no macros"
		if macros {
			what = "holds macros"
		}
		return refuse(d.book.name, fmt.Sprintf("%s, and a file named %s does not go with that", what, ext), "name the output "+d.book.Extension())
	}
	d.types.set(d.book.main, want)
	return nil
}

// dropCalculationOrder leaves out the list of cells with formulas where some
// of those cells go; spreadsheet programs make it anew, and take a wrong one
// for damage.
func (d *draft) dropCalculationOrder(p *Plan) {
	again := len(p.place.old.columns) > 0
	for _, s := range p.book.sheets {
		again = again || s.own != ""
	}
	rel := p.book.relOf("calcChain")
	if !again || rel == nil {
		return
	}
	d.out.Remove(rel.Target)
	d.types.remove(rel.Target)
	d.rels.remove(rel.ID)
}

// hasFormulas reports whether a sheet of the user's holds formulas.
func (b *Book) hasFormulas() bool {
	if b.relOf("calcChain") != nil {
		return true
	}
	for _, s := range b.sheets {
		if s.grid && s.own == "" && b.formulasOn(s) {
			return true
		}
	}
	return false
}

func (b *Book) formulasOn(s *sheet) bool {
	if s.extent.complete {
		return s.extent.formulas
	}
	r, err := b.pkg.Stream(s.part)
	if err != nil {
		return false
	}
	defer r.Close()
	scan := markup.NewScanner(r)
	for {
		t, err := scan.Next()
		if err != nil {
			return false
		}
		if t.Kind != markup.End && string(t.Local()) == "f" && scan.Depth() >= 4 {
			return true
		}
	}
}
