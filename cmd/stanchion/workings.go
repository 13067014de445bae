package main

import (
	"errors"
	"fmt"
	"slices"
	"strings"

	"stanchion/design"
	"stanchion/design/working"
	"stanchion/schedule"
	"stanchion/schedule/summary"
)

// workings are members with their results, whose working can be written down.
type workings struct {
	lines []summary.Line // in the order of the schedule
	run   *working.Run
}

// again prepares the members to be assessed once more.
func (w *workings) again(r *run) {
	columns, results := make([]design.Column, len(w.lines)), make([]design.Result, len(w.lines))
	for i := range w.lines {
		columns[i], results[i] = w.lines[i].Member.Column, w.lines[i].Result
	}
	set := r.engine.Settings()
	w.run = working.NewRun(r.section, &set, columns, results)
}

// sheet writes the working of a member down. The error says why there is none.
func (w *workings) sheet(i int) (*working.Sheet, error) {
	m, res := w.lines[i].Member, &w.lines[i].Result
	if len(m.Problems) > 0 {
		return nil, fmt.Errorf("%s: not read: %w", m.Column.Mark, m.Problems[0])
	}
	sheet, err := w.run.Sheet(i)
	if err != nil {
		switch note := schedule.Note(m, res); {
		case strings.Contains(note, err.Error()):
			err = errors.New(note) // a refusal: its note says all
		case note != "":
			err = fmt.Errorf("%w: %s", err, note)
		}
		return nil, fmt.Errorf("%s: %w", m.Column.Mark, err)
	}
	return sheet, nil
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
