package main

import (
	"fmt"
	"slices"
	"strings"

	"github.com/agnivade/levenshtein"

	"stanchion/schedule"
)

// marked reports whether one of the marks was meant for a member.
func marked(m *schedule.Member, marks []string) bool {
	return slices.ContainsFunc(marks, func(mark string) bool { return sameMark(mark, m.Column.Mark) })
}

// sameMark reports whether a mark was meant, in whatever case.
func sameMark(given, mark string) bool {
	return strings.EqualFold(strings.TrimSpace(given), strings.TrimSpace(mark))
}

// nearest returns up to three different marks that differ least from one.
func nearest(mark string, marks []string) []string {
	type near struct {
		mark string
		far  int
	}
	var list []near
	for _, m := range marks {
		far := levenshtein.ComputeDistance(strings.ToLower(mark), strings.ToLower(m))
		if far <= max(2, len(mark)/3) && !slices.ContainsFunc(list, func(n near) bool { return n.mark == m }) {
			list = append(list, near{m, far})
		}
	}
	slices.SortStableFunc(list, func(a, b near) int { return a.far - b.far })
	var names []string
	for _, n := range list[:min(3, len(list))] {
		names = append(names, n.mark)
	}
	return names
}

// missing returns an error that names a mark which no member has, and those
// like it.
func (w *workings) missing(file string, marks []string) error {
	seen := w.seen()
	for _, mark := range marks {
		if slices.ContainsFunc(seen, func(s string) bool { return sameMark(mark, s) }) {
			continue
		}
		message := fmt.Sprintf("%s: no column is marked %q", file, mark)
		if near := nearest(mark, seen); len(near) > 0 {
			message += ": did you mean " + strings.Join(near, ", ") + "?"
		} else if len(seen) > 0 {
			const some = 5
			message += ": its marks are " + strings.Join(seen[:min(some, len(seen))], ", ")
			if more := len(seen) - some; more > 0 {
				message += fmt.Sprintf(" and %d more", more)
			}
		}
		return fmt.Errorf("%s", message)
	}
	return nil
}

// seen returns every mark.
func (w *workings) seen() []string {
	marks := make([]string, len(w.lines))
	for i := range w.lines {
		marks[i] = w.lines[i].Member.Column.Mark
	}
	return marks
}
