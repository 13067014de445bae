package workbook

import (
	"bytes"
	"fmt"

	"github.com/xuri/excelize/v2"
)

// own is a workbook being made with the library, but for the rows of its
// sheets: those are put in as it is copied to its place.
type own struct {
	file   *excelize.File
	base   lettering
	looks  map[Look]int
	sheets map[string]*ownSheet // by name
}

// ownSheet is what the library has not been told of a sheet.
type ownSheet struct {
	*Sheet
	links  []link
	merges []area
}

func newOwn(base lettering) *own {
	return &own{file: excelize.NewFile(), base: base, looks: map[Look]int{}, sheets: map[string]*ownSheet{}}
}

// filling returns what puts the rows into a sheet. style gives the style id of
// a look in the workbook that the sheet goes to.
func (o *own) filling(name string, style func(Look) int) *filling {
	s := o.sheets[name]
	return &filling{sheet: s.Sheet, base: o.base, style: style, merges: lateMerges(s.merges), links: lateLinks(s.links)}
}

// style returns the id of a look in the own workbook.
func (o *own) style(l Look) (int, error) {
	if l == (Look{}) {
		return 0, nil
	}
	if id, ok := o.looks[l]; ok {
		return id, nil
	}
	id, err := o.file.NewStyle(l.style(o.base))
	if err == nil {
		o.looks[l] = id
	}
	return id, err
}

// add makes a sheet. The first takes the place of the one that a new workbook
// has.
func (o *own) add(s *Sheet, name string, first bool) error {
	var err error
	if first {
		err = o.file.SetSheetName("Sheet1", name)
	} else {
		_, err = o.file.NewSheet(name)
	}
	if err != nil {
		return err
	}
	for _, step := range []func(*Sheet, string) error{
		o.cells, o.sizes, o.view, o.print, o.validations, o.rules, o.charts,
	} {
		if err := step(s, name); err != nil {
			return fmt.Errorf("sheet %q: %w", name, err)
		}
	}
	return nil
}

// cells makes the styles that the cells need, and their notes.
func (o *own) cells(s *Sheet, name string) error {
	kept := &ownSheet{Sheet: s}
	o.sheets[name] = kept
	for r, row := range s.Rows {
		for c := range row {
			cell := &row[c]
			if _, err := o.style(cell.look()); err != nil {
				return err
			}
			if cell.Link != "" {
				kept.links = append(kept.links, link{cellName(c, r+1), cell.Link})
			}
			if cell.Note == "" {
				continue
			}
			err := o.file.AddComment(name, excelize.Comment{Cell: cellName(c, r+1), Author: "stanchion", Text: cell.Note, Width: 320, Height: noteHeight(cell.Note)})
			if err != nil {
				return err
			}
		}
	}
	return nil
}

// noteHeight returns a height, in pixels, at which a note shows whole.
func noteHeight(text string) uint {
	lines := 1 + len(text)/45
	for _, r := range text {
		if r == '\n' {
			lines++
		}
	}
	return uint(20 + 16*lines)
}

// bytes returns the own workbook as a package, without its rows.
func (o *own) bytes() ([]byte, error) {
	var buf bytes.Buffer
	if err := o.file.Write(&buf); err != nil {
		return nil, err
	}
	return buf.Bytes(), o.file.Close()
}
