package main

import (
	"context"
	"fmt"

	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/calcsheet"
	"stanchion/schedule/summary"
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

// pick keeps the members, and knows those with chosen marks: all where no
// marks are given.
type pick struct {
	workings
	marks   []string
	members []int // the chosen ones
}

func (p *pick) put(m *schedule.Member, res *design.Result) error {
	if len(p.marks) == 0 || marked(m, p.marks) {
		p.members = append(p.members, len(p.lines))
	}
	p.lines = append(p.lines, summary.Line{Member: m, Result: *res})
	return nil
}

func (p *pick) finish(context.Context) error { return nil }

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
	if err := p.missing(r.input, marks); err != nil {
		return nil, err
	}
	p.again(r)
	return p, nil
}

// working prints the working of the members with these marks.
func (r *run) working(ctx context.Context, marks []string) error {
	p, err := r.picked(ctx, marks)
	if err != nil {
		return err
	}
	var count [4]int
	for _, i := range p.members {
		count[p.lines[i].Result.Status]++
		sheet, err := p.sheet(i)
		if err != nil {
			r.con.fail(err)
			continue
		}
		if err := calcsheet.Text(r.con.out, sheet); err != nil {
			return err
		}
		if _, err := fmt.Fprintln(r.con.out); err != nil {
			return err
		}
	}
	return verdict(&count)
}
