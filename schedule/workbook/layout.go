package workbook

import (
	"bytes"
	"fmt"
	"io"
	"slices"
	"strconv"

	"stanchion/schedule/workbook/internal/markup"
	"stanchion/schedule/workbook/internal/opc"
)

// layout is what a sheet says about itself before and behind its cells.
type layout struct {
	frame  []byte          // the sheet with its cells taken out
	root   *markup.Element // of frame
	data   *markup.Element // the empty sheetData in frame; nil: the sheet has none
	merged []area          // by rising first row
	hidden map[int]bool    // columns
}

// maxFrame bounds what is held of a sheet beside its cells.
const maxFrame = 256 << 20

// layoutOf reads a sheet's layout once.
func (b *Book) layoutOf(s *sheet) (*layout, error) {
	if s.layout != nil {
		return s.layout, nil
	}
	frame, err := b.frame(s)
	if err != nil {
		return nil, err
	}
	root, err := markup.Parse(frame)
	if err != nil {
		return nil, fmt.Errorf("%s: %w", s.part, err)
	}
	l := &layout{frame: frame, root: root, data: root.Child("sheetData")}
	l.findMerged()
	l.findHidden()
	s.layout = l
	return l, nil
}

// frame reads a sheet without its cells.
func (b *Book) frame(s *sheet) ([]byte, error) {
	r, err := b.pkg.Stream(s.part)
	if err != nil {
		return nil, err
	}
	defer r.Close()
	var frame bytes.Buffer
	scan := markup.NewScanner(r)
	for {
		t, err := scan.Next()
		if err == io.EOF {
			return frame.Bytes(), nil
		}
		if err != nil {
			return nil, fmt.Errorf("%s: %w", s.part, err)
		}
		if frame.Len()+len(t.Raw) > maxFrame {
			return nil, &opc.SizeError{Part: s.part, Limit: maxFrame}
		}
		frame.Write(t.Raw)
		if t.Kind == markup.Start && scan.Depth() == 2 && string(t.Local()) == "sheetData" {
			if err := scan.Skim(io.Discard); err != nil {
				return nil, fmt.Errorf("%s: %w", s.part, err)
			}
		}
	}
}

// maxMerged bounds the merged ranges that are looked at.
const maxMerged = 1 << 20

func (l *layout) findMerged() {
	for _, e := range l.root.Child("mergeCells").All("mergeCell") {
		a, ok := parseArea(e.Attr("ref"))
		if ok && a.firstCol+a.firstRow != a.lastCol+a.lastRow && len(l.merged) < maxMerged {
			l.merged = append(l.merged, a)
		}
	}
	slices.SortStableFunc(l.merged, func(a, b area) int { return a.firstRow - b.firstRow })
}

func (l *layout) findHidden() {
	l.hidden = map[int]bool{}
	for _, e := range l.root.Child("cols").All("col") {
		if !isTrue(e.Attr("hidden")) && e.Attr("width") != "0" {
			continue
		}
		first, err1 := strconv.Atoi(e.Attr("min"))
		last, err2 := strconv.Atoi(e.Attr("max"))
		if err1 != nil || err2 != nil {
			continue
		}
		for c := max(1, first); c <= min(last, maxColumns); c++ {
			l.hidden[c-1] = true
		}
	}
}
