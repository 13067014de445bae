package main

import (
	"context"
	"errors"
	"io"
	"path/filepath"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/revision"
	"stanchion/schedule/workbook"
)

// sink writes the comparison in the form of the new issue.
func (r *compareRun) sink(w io.Writer) (sink, error) {
	cols := r.result.Columns()
	switch src := r.new.source.(type) {
	case *textSource:
		tw, err := src.NewWriter(w, r.new.plan, cols)
		return &textSink{tw}, err
	case *bookSource:
		return &comparedBook{compareRun: r, book: src.Book, w: w, cols: cols, members: map[int]*schedule.Member{}}, nil
	}
	return nil, errors.New("no writer for this kind of schedule")
}

// comparedBook writes the comparison into a workbook.
type comparedBook struct {
	*compareRun
	book    *workbook.Book
	w       io.Writer
	cols    []schedule.ResultColumn
	members map[int]*schedule.Member // by row of the sheet
	last    int
}

func (s *comparedBook) put(m *schedule.Member, _ *design.Result) error {
	for _, row := range m.Rows {
		s.members[row] = m
		s.last = max(s.last, row)
	}
	return nil
}

func (s *comparedBook) finish(ctx context.Context) error {
	plan := s.new.plan
	place, err := s.book.Plan(workbook.Block{
		Sheet: plan.Sheet, Header: plan.Header, LastRow: s.last, Columns: s.cols, Words: revision.Words(), Cells: s.cells, Printed: s.result.PrintedColumns(),
		Title: "Changes since " + filepath.Base(s.old.input) + ", by " + standard + ", national set " + plan.Settings.Design.National.Name,
	})
	if err != nil {
		return err
	}
	for _, w := range place.Warnings() {
		s.new.con.say("note: %s", w)
	}
	info, err := s.info()
	if err != nil {
		return err
	}
	return place.WriteTo(&stopper{ctx, s.w}, workbook.Laid(s.result.Sheets(info), plan.Settings.Paper))
}

func (s *comparedBook) cells(row int) []schedule.Value {
	m := s.members[row]
	switch {
	case m == nil:
		return nil
	case row == m.Rows[0]:
		return schedule.Cells(nil, s.cols, m, nil)
	}
	return schedule.ContinuedCells(nil, s.cols, m, nil)
}

// info gathers what the sheets say of the run.
func (r *compareRun) info() (*revision.Info, error) {
	oldSum, err := fileSum(r.old.input)
	if err != nil {
		return nil, err
	}
	newSum, err := fileSum(r.new.input)
	if err != nil {
		return nil, err
	}
	national := &r.new.plan.Settings.Design.National
	return &revision.Info{
		Program: "stanchion " + versionText(), Standard: standard, National: national.Name + ": " + national.Source,
		OldFile: filepath.Base(r.old.input), OldSHA256: oldSum, NewFile: filepath.Base(r.new.input), NewSHA256: newSum,
		Sheet: r.new.plan.Sheet, Settings: r.settings(), Cautions: []string{caution, notCovered},
	}, nil
}

func (r *compareRun) settings() []revision.Change {
	return revision.SettingsThatDiffer(&r.old.plan.Settings, &r.new.plan.Settings)
}
