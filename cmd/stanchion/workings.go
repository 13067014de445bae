package main

import (
	"errors"
	"fmt"
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
