package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"

	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/outfile"
	"stanchion/schedule/workbook"
)

// sink takes the members in their order, and is told when all have come.
type sink interface {
	put(m *schedule.Member, res *design.Result) error
	finish(ctx context.Context) error
}

// outputs are what a run writes. Files appear at their places on commit alone.
type outputs struct {
	path  string // of the annotated schedule, for people
	sinks []sink
	files []*outfile.File
	last  func() error // before files appear: lets go of the input, which may be one of them
}

func (o *outputs) put(m *schedule.Member, res *design.Result) error {
	for _, s := range o.sinks {
		if err := s.put(m, res); err != nil {
			return err
		}
	}
	return nil
}

// commit finishes the outputs and puts the files at their places.
func (o *outputs) commit(ctx context.Context) error {
	for _, s := range o.sinks {
		if err := s.finish(ctx); err != nil {
			return err
		}
	}
	for _, f := range o.files {
		if err := f.Settle(); err != nil {
			return err
		}
	}
	if err := ctx.Err(); err != nil {
		return err
	}
	if err := o.last(); err != nil {
		return err
	}
	for _, f := range o.files {
		if err := f.Commit(); err != nil {
			return err
		}
	}
	return nil
}

// discard drops what was not committed.
func (o *outputs) discard() {
	for _, f := range o.files {
		f.Discard()
	}
}

// create opens a place for an output: a file, or standard output.
func (o *outputs) create(con *console, path string) (io.Writer, error) {
	if path == stdio {
		return con.out, nil
	}
	f, err := outfile.Create(path)
	if err != nil {
		return nil, err
	}
	o.files = append(o.files, f)
	return f, nil
}

// openOutputs settles where the results go, and refuses to write over what is
// not the program's own.
func (r *run) openOutputs() error {
	path, err := r.outputPath()
	if err != nil {
		return err
	}
	r.out = &outputs{path: path, last: r.source.Close}
	r.tally = newTally(r)
	if err := r.guard(path); err != nil {
		return err
	}
	err = r.openSinks(path)
	if err != nil {
		r.out.discard()
	}
	return err
}

// outputPath is the place of the annotated schedule.
func (r *run) outputPath() (string, error) {
	path := r.flags.output
	switch {
	case path == "" && r.input == stdio:
		return stdio, nil
	case path == "":
		return beside(r.input, r.suffix()), nil
	case path == stdio && !r.isText():
		return "", usage(r.cmd, "-o -: a workbook does not go to standard output: name a file")
	case path == stdio:
		return path, nil
	}
	from, to := strings.ToLower(filepath.Ext(r.input)), strings.ToLower(filepath.Ext(path))
	if info, err := os.Stat(path); err == nil && !info.Mode().IsRegular() {
		return path, nil // a device or a pipe has the name it has
	}
	if r.isText() == isWorkbookName(to) {
		return "", usage(r.cmd, "-o %s: the output has the form of the input: name a file ending in %s", path, fallback(from, ".csv"))
	}
	if !r.isText() && from != to {
		return "", usage(r.cmd, "-o %s: the output of %s must end in %s too", path, r.input, from)
	}
	return path, nil
}

func isWorkbookName(ext string) bool {
	switch ext {
	case ".xlsx", ".xlsm", ".xltx", ".xltm", ".xls", ".xlsb", ".ods":
		return true
	}
	return false
}

func fallback(s, other string) string {
	if s == "" {
		return other
	}
	return s
}

// guard refuses outputs that would be written over something of the user's.
func (r *run) guard(path string) error {
	json := r.flags.json
	switch {
	case sameFile(path, r.input) && !r.flags.force:
		return fmt.Errorf("%s is the input itself: name another file with -o, or give --force to write onto it", path)
	case sameFile(json, r.input):
		return fmt.Errorf("--json %s is the input itself: name another file", json)
	case json != "" && json != stdio && (sameFile(path, json) || filepath.Clean(path) == filepath.Clean(json)):
		return fmt.Errorf("-o and --json both name %s: name two files", json)
	}
	if path != stdio {
		if err := mayReplace(path, r.flags.force, r.earlier()); err != nil {
			return err
		}
	}
	if json != "" && json != stdio {
		return mayReplace(json, r.flags.force, jsonEarlier)
	}
	return nil
}

// earlier tells whether an earlier run wrote a file of the input's form.
func (r *run) earlier() func(path string) bool {
	if r.isText() {
		return textEarlier
	}
	return workbook.WrittenByUs
}

func (r *run) openSinks(path string) error {
	w, err := r.out.create(r.con, path)
	if err != nil {
		return err
	}
	schedule, err := r.scheduleSink(w)
	if err != nil {
		return err
	}
	r.out.sinks = append(r.out.sinks, schedule)
	if r.flags.json == "" {
		return nil
	}
	if w, err = r.out.create(r.con, r.flags.json); err != nil {
		return err
	}
	r.out.sinks = append(r.out.sinks, newJSONSink(w))
	return nil
}

// scheduleSink writes the annotated schedule in the form of the input.
func (r *run) scheduleSink(w io.Writer) (sink, error) {
	cols := schedule.ResultColumns(r.resultOptions())
	switch src := r.source.(type) {
	case *textSource:
		tw, err := src.NewWriter(w, r.plan, cols)
		return &textSink{tw}, err
	case *bookSource:
		return newBookSink(r, src, w, cols), nil
	}
	return nil, errors.New("no writer for this kind of schedule")
}

func (r *run) resultOptions() schedule.ResultOptions {
	set := &r.plan.Settings.Design
	return schedule.ResultOptions{
		Reserve:     r.mode == search.Check || r.plan.Settings.Together.Reserve,
		AtHand:      r.atHand != nil,
		StatusFirst: !r.isText(),
		Fire:        set.FireRatio > 0 || set.FirePeriod > 0 || r.hasField("eta_fi") || r.hasField("Fire period"),
	}
}

// textWriter is the writer of the text package.
type textWriter interface {
	Write(*schedule.Member, *design.Result) error
	Close() error
}

// textSink writes delimited text.
type textSink struct{ textWriter }

func (s *textSink) put(m *schedule.Member, res *design.Result) error { return s.Write(m, res) }
func (s *textSink) finish(context.Context) error                     { return s.Close() }

// jsonSink writes JSON lines.
type jsonSink struct{ *schedule.JSONLines }

func newJSONSink(w io.Writer) *jsonSink {
	return &jsonSink{schedule.NewJSONLines(w)}
}

func (s *jsonSink) put(m *schedule.Member, res *design.Result) error { return s.Write(m, res) }
func (s *jsonSink) finish(context.Context) error                     { return s.Flush() }

// jsonEarlier reports whether an earlier run wrote a file of JSON lines: its
// first line opens with the first keys.
func jsonEarlier(path string) bool {
	return beginsWith(path, func(line string) bool {
		return strings.HasPrefix(line, `{"mark":`) && strings.Contains(line, `"stack":`) && strings.Contains(line, `"next_lighter":`)
	})
}
