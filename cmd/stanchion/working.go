package main

import (
	"context"
	"fmt"
	"io"
	"slices"
	"strings"

	"github.com/agnivade/levenshtein"
	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/search"
	"stanchion/design/working"
	"stanchion/schedule"
	"stanchion/schedule/calcsheet"
)

func workingCommand(con *console) *cobra.Command {
	var f runFlags
	c := &cobra.Command{
		Use:   "working FILE MARK...",
		Short: "show how columns were designed, step by step",
		Long: "Designs a column schedule as `size` does and prints the working of the columns with these marks:\n" +
			"every step from section to utilisation with symbols, numbers, units and clauses, so that someone\n" +
			"with a pocket calculator can follow it. A mark that stands for several lengths prints them all.\n\n" +
			settingsHelp() + "\n\n" + exitStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion working examples/ottermere-depot.xlsx A1-01
  stanchion working loads.csv C12 C13 > checked.txt
  stanchion working loads.xlsx C12 --set national=EN`,
		Args: fileAndMarks,
		RunE: func(c *cobra.Command, args []string) error {
			return newRun(con, c, &f, args[0], search.Size).working(c.Context(), args[1:])
		},
	}
	f.bindReading(c)
	return c
}

// fileAndMarks takes a schedule and at least one mark.
func fileAndMarks(c *cobra.Command, args []string) error {
	switch len(args) {
	case 0:
		return usage(c, "no schedule: name the file and the marks to show")
	case 1:
		return usage(c, "no mark: name the columns of %s to show", args[0])
	}
	return nil
}

// designed is a member with its result.
type designed struct {
	member *schedule.Member
	result design.Result
}

// pick keeps the members with chosen marks, in the order of the schedule; all
// where no marks are given.
type pick struct {
	marks   []string
	members []designed
	seen    []string // every mark
}

func (p *pick) put(m *schedule.Member, res *design.Result) error {
	p.seen = append(p.seen, m.Column.Mark)
	if len(p.marks) == 0 || slices.ContainsFunc(p.marks, func(mark string) bool { return sameMark(mark, m.Column.Mark) }) {
		p.members = append(p.members, designed{m, *res})
	}
	return nil
}

func (p *pick) finish(context.Context) error { return nil }

// sameMark reports whether a mark was meant, in whatever case.
func sameMark(given, mark string) bool {
	return strings.EqualFold(strings.TrimSpace(given), strings.TrimSpace(mark))
}

// missing returns an error that names a mark which no member has, and those
// like it.
func (p *pick) missing(file string) error {
	for _, mark := range p.marks {
		if slices.ContainsFunc(p.members, func(d designed) bool { return sameMark(mark, d.member.Column.Mark) }) {
			continue
		}
		message := fmt.Sprintf("%s: no column is marked %q", file, mark)
		if near := nearest(mark, p.seen); len(near) > 0 {
			message += ": did you mean " + strings.Join(near, ", ") + "?"
		}
		return fmt.Errorf("%s", message)
	}
	return nil
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

// picked designs the schedule and returns the members with these marks.
func (r *run) picked(ctx context.Context, marks []string) (*pick, error) {
	if err := r.flags.check(r.cmd); err != nil {
		return nil, err
	}
	if err := r.read(ctx); err != nil {
		return nil, err
	}
	defer r.source.Close()
	p := &pick{marks: marks}
	r.out, r.tally = &outputs{sinks: []sink{p}}, newTally(r)
	if err := r.design(ctx); err != nil {
		return nil, err
	}
	return p, p.missing(r.input)
}

// working prints the working of the members with these marks.
func (r *run) working(ctx context.Context, marks []string) error {
	p, err := r.picked(ctx, marks)
	if err != nil {
		return err
	}
	var count [4]int
	for i := range p.members {
		d := &p.members[i]
		count[d.result.Status]++
		if err := r.show(r.con.out, d); err != nil {
			return err
		}
	}
	return verdict(&count)
}

// show prints the working of one member, or says why there is none.
func (r *run) show(w io.Writer, d *designed) error {
	sheet, err := r.sheetOf(d)
	if err != nil {
		r.con.fail(err)
		return nil
	}
	if err := calcsheet.Text(w, sheet); err != nil {
		return err
	}
	_, err = fmt.Fprintln(w)
	return err
}

// sheetOf writes the working of a member down. The error says why there is
// none.
func (r *run) sheetOf(d *designed) (*working.Sheet, error) {
	name := d.member.Column.Mark
	if len(d.member.Problems) > 0 {
		return nil, fmt.Errorf("%s: not read: %w", name, d.member.Problems[0])
	}
	set := r.engine.Settings()
	sheet, err := working.Again(r.section, &set, &d.member.Column, &d.result)
	if err != nil {
		if note := schedule.Note(d.member, &d.result); note != "" {
			err = fmt.Errorf("%w: %s", err, note)
		}
		return nil, fmt.Errorf("%s: %w", name, err)
	}
	return sheet, nil
}
