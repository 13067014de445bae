package main

import (
	"context"
	"errors"
	"fmt"
	"io/fs"
	"iter"
	"os"

	"stanchion/schedule"
	"stanchion/schedule/text"
	"stanchion/schedule/workbook"
)

// openSource opens a file that holds a schedule or settings. Reading its rows
// ends with ctx.
func openSource(ctx context.Context, con *console, path string) (schedule.Source, error) {
	if path == stdio {
		f, err := text.OpenReader(con.in, "standard input")
		if err != nil {
			return nil, err
		}
		return &textSource{f, ctx}, nil
	}
	info, err := os.Stat(path)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, fmt.Errorf("%s: no such file: check the name and the folder", path)
	case err != nil:
		return nil, fmt.Errorf("%s: cannot be read: %w", path, plainCause(err))
	case info.IsDir():
		return nil, fmt.Errorf("%s: is a folder: name the schedule in it", path)
	}
	if workbook.Is(path) {
		b, err := workbook.Open(path)
		if err != nil {
			return nil, err
		}
		return &bookSource{b, ctx}, nil
	}
	f, err := text.Open(path)
	if err != nil {
		return nil, err
	}
	return &textSource{f, ctx}, nil
}

// textSource is a text schedule whose reading can be stopped.
type textSource struct {
	*text.File
	ctx context.Context
}

// Rows yields the rows, until they or ctx end.
func (s *textSource) Rows(sheet string) iter.Seq2[*schedule.Row, error] {
	return stoppable(s.ctx, s.File.Rows(sheet))
}

// bookSource is a workbook whose reading can be stopped.
type bookSource struct {
	*workbook.Book
	ctx context.Context
}

// Rows yields the rows, until they or ctx end.
func (s *bookSource) Rows(sheet string) iter.Seq2[*schedule.Row, error] {
	return stoppable(s.ctx, s.Book.Rows(sheet))
}

func stoppable(ctx context.Context, rows iter.Seq2[*schedule.Row, error]) iter.Seq2[*schedule.Row, error] {
	return func(yield func(*schedule.Row, error) bool) {
		for r, err := range rows {
			if ctx.Err() != nil {
				yield(nil, ctx.Err())
				return
			}
			if !yield(r, err) {
				return
			}
		}
	}
}

// textEarlier reports whether an earlier run wrote a text schedule: results
// stand in it.
func textEarlier(path string) bool {
	f, err := text.Open(path)
	if err != nil {
		return false
	}
	defer f.Close()
	rows := 200 // in which a header can stand
	for row, err := range f.Rows("") {
		if err != nil || rows == 0 {
			break
		}
		rows--
		for i := range row.Cells {
			if schedule.IsResultHeading(row.Cells[i].Text) {
				return true
			}
		}
	}
	return false
}
