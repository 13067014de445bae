package workbook

import (
	"io"
	"regexp"
	"strings"

	"stanchion/schedule/workbook/internal/markup"
)

// greedy are functions that can make something huge of something small, or
// reach for ranges that cannot be seen beforehand.
var greedy = regexp.MustCompile(`(?i)\b(REPT|SEQUENCE|RANDARRAY|MUNIT|MAKEARRAY|INDIRECT|OFFSET|EXPAND|LAMBDA|WEBSERVICE)\s*\(`)

// calculable looks through all formulas of the workbook before any is
// calculated, since each may lead to every other.
func (b *Book) calculable() bool {
	total, waiting := int64(0), 0
	for _, s := range b.sheets {
		if !s.grid {
			continue
		}
		total += b.pkg.Size(s.part)
		if total > maxWorkbookXML || !b.harmless(s, &waiting) {
			return false
		}
	}
	return true
}

// harmless looks through the formulas of a sheet and counts those that have no
// value.
func (b *Book) harmless(s *sheet, waiting *int) bool {
	r, err := b.pkg.Stream(s.part)
	if err != nil {
		return false
	}
	defer r.Close()
	scan := markup.NewScanner(r)
	valued, open := false, false
	for {
		t, err := scan.Next()
		if err != nil {
			return err == io.EOF
		}
		local := string(t.Local())
		switch {
		case local == "c" && t.Kind == markup.Start:
			valued, open = false, false
		case local == "v" && t.Kind == markup.Start:
			valued = true
		case local == "f" && t.Kind != markup.End:
			open = true
			if t.Kind == markup.Start && !harmlessFormula(scan) {
				return false
			}
		case local == "c" && t.Kind == markup.End && open && !valued:
			if *waiting++; *waiting > maxFormulas {
				return false
			}
		}
	}
}

// harmlessFormula reads the open formula.
func harmlessFormula(scan *markup.Scanner) bool {
	var formula []byte
	for {
		t, err := scan.Next()
		if err != nil || len(formula) > maxFormula {
			return false
		}
		switch t.Kind {
		case markup.Text:
			formula = markup.AppendText(formula, t.Raw)
		case markup.End:
			return !greedy.Match(formula) && smallRanges(string(formula))
		}
	}
}

var ranges = regexp.MustCompile(`\$?[A-Za-z]{1,3}\$?[0-9]{1,7}:\$?[A-Za-z]{1,3}\$?[0-9]{1,7}`)

// smallRanges reports whether no range of a formula is out of proportion.
// Whole rows and columns are cut to what is used by the library.
func smallRanges(formula string) bool {
	if !strings.Contains(formula, ":") {
		return true
	}
	for _, ref := range ranges.FindAllString(formula, -1) {
		a, ok := parseArea(ref)
		if !ok || (a.lastRow-a.firstRow+1)*(a.lastCol-a.firstCol+1) > maxRangeCells {
			return false
		}
	}
	return true
}
