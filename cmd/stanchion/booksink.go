package main

import (
	"context"
	"io"
	"slices"

	"stanchion/design"
	"stanchion/schedule"
	"stanchion/schedule/calcsheet"
	"stanchion/schedule/summary"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/tradeoff"
	"stanchion/schedule/workbook"
)

// bookSink writes a workbook: the results stand beside the schedule's rows, and
// the project's own sheets behind the user's.
type bookSink struct {
	workings
	run     *run
	book    *workbook.Book
	w       io.Writer
	cols    []schedule.ResultColumn
	rows    map[int]int         // of the sheet, to the member
	working *calcsheet.Workings // nil: there is no such sheet

	section, check, note int // columns of the block that lead further
}

func newBookSink(r *run, src *bookSource, w io.Writer, cols []schedule.ResultColumn) *bookSink {
	column := func(name string) int {
		return max(0, slices.IndexFunc(cols, func(c schedule.ResultColumn) bool { return c.Name == name }))
	}
	return &bookSink{run: r, book: src.Book, w: w, cols: cols, rows: map[int]int{}, section: column("section"), check: column("governing check"), note: column("note")}
}

func (s *bookSink) put(m *schedule.Member, res *design.Result) error {
	for _, row := range m.Rows {
		s.rows[row] = len(s.lines)
	}
	s.lines = append(s.lines, summary.Line{Member: m, Result: *res})
	return nil
}

func (s *bookSink) finish(ctx context.Context) error {
	last := 0
	for row := range s.rows {
		last = max(last, row)
	}
	info, err := s.run.info()
	if err != nil {
		return err
	}
	var own *summary.Sheets
	plan := s.run.plan
	place, err := s.book.Plan(workbook.Block{
		Sheet: plan.Sheet, Header: plan.Header, LastRow: last, Title: s.run.blockTitle(), Columns: s.cols, Cells: s.cells(),
		Links: func(row int) []workbook.BlockLink { return s.links(own, row) },
	})
	if err != nil {
		return err
	}
	for _, w := range place.Warnings() {
		s.run.con.say("note: %s", w)
	}
	info.SheetName = place.SheetName
	if info.Working, err = s.writeWorkings(ctx, place.SheetName(calcsheet.WorkingSheet), info); err != nil {
		return err
	}
	own, sheets := s.ownSheets(info, place)
	return place.WriteTo(&stopper{ctx, s.w}, workbook.Laid(sheets, plan.Settings.Paper))
}

// links lead from the section of a member, or from the note of one with a
// problem, to where more is said of it, and from its governing check to its
// working. From the status none does: a link would take its mark and colour off
// it in some spreadsheet programs.
func (s *bookSink) links(own *summary.Sheets, row int) []workbook.BlockLink {
	i, ok := s.rows[row]
	if !ok || row != s.lines[i].Member.Rows[0] {
		return nil
	}
	place, problem := own.Place(i)
	links := []workbook.BlockLink{{Column: s.section, Place: place}}
	if problem {
		links[0].Column = s.note
	}
	if to := s.lines[i].Working; to != "" {
		links = append(links, workbook.BlockLink{Column: s.check, Place: to})
	}
	return links
}

// ownSheets are the project's own, in their order: what came of the run, the
// members, the steel, what a person must look at, and the charts.
func (s *bookSink) ownSheets(info *summary.Info, place *workbook.Plan) (*summary.Sheets, []workbook.Sheet) {
	steel := s.run.steelOf(s.lines)
	own := summary.NewSheets(info, s.run.tally, s.lines, steel)
	list := []workbook.Sheet{own.Summary, own.Problems, own.Results}
	if s.working != nil {
		list = append(list, s.working.Sheet())
	}
	list = append(list, own.Sizes)
	list = append(list, steel.Sheets(info.File)...)
	if len(s.run.curve) > 0 {
		list = append(list, s.run.sizesTable().Page(place.SheetName(tradeoff.Sheet)))
	}
	return own, append(list, own.Charts, own.ChartData)
}

// steelOf counts the steel of members as they were designed.
func (r *run) steelOf(lines []summary.Line) *takeoff.TakeOff {
	var items []takeoff.Item
	var leftOut []takeoff.LeftOut
	for i := range lines {
		col, res := &lines[i].Member.Column, &lines[i].Result
		section, err := r.section(res.Section)
		if res.Status > design.Fails || err != nil {
			leftOut = append(leftOut, takeoff.LeftOut{Name: takeoff.MemberName(col), Cell: col.Cell, Why: res.Status.String()})
			continue
		}
		item := takeoff.ItemOf(col, section, res.Grade)
		item.Failing = res.Status == design.Fails
		if res.AtHand != "" {
			item.Remark = "of steel at hand: " + res.AtHand
		}
		items = append(items, item)
	}
	return takeoff.Of(items, leftOut, r.takeoffOptions())
}

// cells returns the results of a row: all of a member's on its first.
func (s *bookSink) cells() func(row int) []schedule.Value {
	var values []schedule.Value
	return func(row int) []schedule.Value {
		i, ok := s.rows[row]
		if !ok {
			return nil
		}
		l := &s.lines[i]
		if row == l.Member.Rows[0] {
			values = schedule.Cells(values[:0], s.cols, l.Member, &l.Result)
		} else {
			values = schedule.ContinuedCells(values[:0], s.cols, l.Member, &l.Result)
		}
		return values
	}
}

// stopper ends a long write with its context.
type stopper struct {
	ctx context.Context
	w   io.Writer
}

func (s *stopper) Write(p []byte) (int, error) {
	if err := s.ctx.Err(); err != nil {
		return 0, err
	}
	return s.w.Write(p)
}
