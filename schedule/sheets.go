package schedule

import (
	"fmt"
	"slices"
	"strings"
)

// findHeader finds the sheet and the header of the schedule: the sheet that is
// named, or the one that reads best as a schedule.
func findHeader(src Source, opts *Options, maps *mapping) (*layout, error) {
	sheets, err := candidateSheets(src, opts.Sheet)
	if err != nil {
		return nil, err
	}
	var best, nearest *layout
	var rivals []string
	for _, sheet := range sheets {
		l, err := readHeader(src, sheet, maps)
		if err != nil {
			return nil, err
		}
		if l == nil {
			continue
		}
		if nearest == nil || l.score > nearest.score {
			nearest = l
		}
		switch {
		case len(l.missing(!opts.LoadsOptional)) > 0:
		case best == nil || l.score > best.score:
			best, rivals = l, nil
		case l.score == best.score:
			rivals = append(rivals, sheet)
		}
	}
	switch {
	case best == nil:
		return nil, noHeader(src, opts, nearest)
	case len(rivals) > 0:
		return nil, &Refusal{Problem: Problem{File: src.Name(),
			What: fmt.Sprintf("sheets %s look alike: each holds a schedule", quoted(append([]string{best.sheet}, rivals...))),
			Do:   "name one with --sheet"}}
	}
	return best, nil
}

func quoted(names []string) string {
	list := make([]string, len(names))
	for i, n := range names {
		list[i] = fmt.Sprintf("%q", n)
	}
	return strings.Join(list, " and ")
}

// allSheets are the sheets of a source, hidden ones last.
func allSheets(src Source) []string {
	all := src.Sheets()
	if h, ok := src.(SheetHider); ok {
		all = slices.Concat(all, h.HiddenSheets())
	}
	return all
}

// candidateSheets are the sheets that may hold the schedule.
func candidateSheets(src Source, name string) ([]string, error) {
	all := allSheets(src)
	if name == "" {
		var list []string
		for _, s := range src.Sheets() {
			if !IsSettingsSheet(s) {
				list = append(list, s)
			}
		}
		return list, nil
	}
	for _, exact := range []bool{true, false} {
		for _, s := range all {
			if s == name || !exact && sameName(s, name) {
				return []string{s}, nil
			}
		}
	}
	if len(all) == 1 && all[0] == "" {
		return nil, &Refusal{Problem: Problem{File: src.Name(), What: "a text schedule has no sheets", Do: "leave out --sheet"}}
	}
	return nil, &Refusal{Problem: Problem{File: src.Name(), What: fmt.Sprintf("there is no sheet %q", name), Do: "the sheets are " + quoted(all)}}
}

// readHeader reads the first rows of a sheet and returns the block that reads
// best as a header; nil where no row can be one.
func readHeader(src Source, sheet string, maps *mapping) (*layout, error) {
	h := &headerScan{src: src, sheet: sheet, hidden: src.HiddenColumns(sheet), maps: maps, cache: map[string]*meaning{}}
	for r, err := range src.Rows(sheet) {
		if err != nil {
			return nil, err
		}
		if len(h.rows) == headerDepth+maxHeader {
			break
		}
		h.rows = append(h.rows, r.clone())
	}
	return h.best(), nil
}

// noHeader says what was seen in the row that came nearest to a header, and
// what is needed.
func noHeader(src Source, opts *Options, l *layout) error {
	needs := "Length and N_Ed"
	if opts.LoadsOptional {
		needs = "Length"
	}
	r := &Refusal{Problem: Problem{File: src.Name(), What: "no header was recognised"}}
	r.Do = "a schedule needs the fields " + needs + " (Mark and the others are optional): rename the headings, or map them with the setting map HEADING"
	choice := opts.Sheet == "" && len(src.Sheets()) > 1
	if choice {
		r.Do = strings.Replace(r.Do, ", or map them with the setting map HEADING", ", map them with the setting map HEADING, or name the sheet with --sheet", 1)
	}
	if opts.LoadsOptional {
		r.Do = strings.Replace(r.Do, "fields", "field", 1)
	}
	if l == nil {
		return r
	}
	if missing := l.missing(!opts.LoadsOptional); len(missing) == 1 && !opts.LoadsOptional {
		r.What += ": nothing stands for " + missing[0]
	}
	if l.sheet != "" {
		r.What += fmt.Sprintf(" on sheet %q", l.sheet)
	}
	if choice {
		r.What += ", which comes nearest"
	}
	for i := range l.bindings {
		b := &l.bindings[i]
		r.Seen = append(r.Seen, Problem{Cell: b.Cell, What: fmt.Sprintf("%q is %s", b.Heading, b.title())})
	}
	r.Seen = append(r.Seen, l.troubles...)
	for _, s := range append(l.left, l.other...) {
		r.Seen = append(r.Seen, Problem{Cell: s.Cell, What: join(": ", fmt.Sprintf("%q is not read", s.Heading), s.Why)})
	}
	return r
}

// Likeness tells how much a sheet looks like a schedule: 0 where nothing in it
// can be a header. It serves to find how a text file is to be parted.
func Likeness(src Source, sheet string) (float64, error) {
	l, err := readHeader(src, sheet, &mapping{})
	if l == nil || err != nil {
		return 0, err
	}
	return max(l.score, 0), nil
}
