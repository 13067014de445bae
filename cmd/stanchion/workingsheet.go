package main

import (
	"context"
	"errors"
	"fmt"
	"slices"

	"github.com/spf13/cobra"

	"stanchion/schedule/calcsheet"
	"stanchion/schedule/summary"
)

// workingMembers is how many members there may be for the sheet of workings to
// be written without being asked for: of more it would be long.
const workingMembers = 300

// workingHelp explains the sheet for the help of a command.
const workingHelp = "An annotated workbook holds the working of its members, step by step, on a sheet named Working: a click\n" +
	"on a member's governing check leads there. Of more than 300 members it is left out unless --working asks for it:\n" +
	"that of ten thousand takes about a gigabyte of memory and makes the file 55 MB larger."

// What --working may say beside marks.
const (
	workingAll  = "all"
	workingNone = "none"
)

// workingFlags say of which members an annotated workbook holds the working.
type workingFlags struct{ given []string }

func (f *workingFlags) bind(c *cobra.Command) {
	c.Flags().StringArrayVar(&f.given, "working", nil, fmt.Sprintf("`MARK` of a member whose working goes into the sheet Working, or all, or none; may be repeated (default: all of up to %d members, else none)", workingMembers))
}

// check refuses what cannot be meant.
func (f *workingFlags) check(c *cobra.Command) error {
	if len(f.given) > 1 && (slices.Contains(f.given, workingAll) || slices.Contains(f.given, workingNone)) {
		return usage(c, "--working: give all, none or marks")
	}
	return nil
}

// checkText refuses to write a sheet into text.
func (f *workingFlags) checkText(c *cobra.Command) error {
	if len(f.given) > 0 && f.given[0] != workingNone {
		return usage(c, "--working %s: a text schedule has no sheets; see stanchion working", f.given[0])
	}
	return nil
}

// marks returns the marks that were chosen; none where all members are.
func (f *workingFlags) marks() []string {
	if len(f.given) == 1 && f.given[0] == workingAll {
		return nil
	}
	return f.given
}

// leftOut says why no member's working is written; empty: some is.
func (f *workingFlags) leftOut(members int) string {
	switch {
	case len(f.given) == 1 && f.given[0] == workingNone:
		return "left out, as asked for"
	case len(f.given) == 0 && members > workingMembers:
		return fmt.Sprintf("left out, with more than %d members: give --working all, or --working MARK", workingMembers)
	}
	return ""
}

// writeWorkings writes the sheet of workings under that name, and says of which
// members.
func (s *bookSink) writeWorkings(ctx context.Context, name string, info *summary.Info) (string, error) {
	f := &s.run.flags.working
	if why := f.leftOut(len(s.lines)); why != "" {
		if len(f.given) == 0 {
			s.run.con.say("note: the working is %s", why)
		}
		return why, nil
	}
	marks := f.marks()
	if err := s.missing(s.run.input, marks); err != nil {
		return "", err
	}
	s.again(s.run)
	s.working = calcsheet.NewWorkings(name, &calcsheet.Project{File: info.File, Sheet: info.Sheet, Standard: info.Standard, National: *info.National})
	written := 0
	for i := range s.lines {
		if len(marks) > 0 && !marked(s.lines[i].Member, marks) {
			continue
		}
		if err := s.writeWorking(i); errors.Is(err, errFull) {
			return fmt.Sprintf("sheet %s: the first %d members, which fill it", name, written), nil
		}
		if s.lines[i].Working != "" {
			written++
		}
		if err := ctx.Err(); err != nil {
			return "", err
		}
	}
	return s.workingsWritten(name, written), nil
}

// errFull is said of a sheet that has no rows left.
var errFull = errors.New("the sheet is full")

// writeWorking adds the working of a member, if there is one.
func (s *bookSink) writeWorking(i int) error {
	sheet, err := s.sheet(i)
	if err != nil {
		return nil // not read, or without a section: the problems say why
	}
	if s.lines[i].Working = s.working.Add(sheet); s.lines[i].Working == "" {
		return errFull
	}
	return nil
}

// workingsWritten says how many workings there are. Of none there is no sheet.
func (s *bookSink) workingsWritten(name string, written int) string {
	switch {
	case written == 0:
		s.working = nil
		return "none: no member has a section to work out"
	case written == len(s.lines):
		return fmt.Sprintf("sheet %s: every member", name)
	}
	return fmt.Sprintf("sheet %s: %d of %s", name, written, plural(len(s.lines), "member"))
}
