package main

import (
	"context"
	"errors"
	"fmt"
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

// pick keeps the members, and knows those with chosen marks: all where no
// marks are given.
type pick struct {
	marks   []string
	all     []designed // in the order of the schedule
	members []int      // the chosen ones
	run     *working.Run
}

func (p *pick) put(m *schedule.Member, res *design.Result) error {
	if len(p.marks) == 0 || slices.ContainsFunc(p.marks, func(mark string) bool { return sameMark(mark, m.Column.Mark) }) {
		p.members = append(p.members, len(p.all))
	}
	p.all = append(p.all, designed{m, *res})
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
		if slices.ContainsFunc(p.members, func(i int) bool { return sameMark(mark, p.all[i].member.Column.Mark) }) {
			continue
		}
		message := fmt.Sprintf("%s: no column is marked %q", file, mark)
		seen := p.seen()
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
func (p *pick) seen() []string {
	marks := make([]string, len(p.all))
	for i := range p.all {
		marks[i] = p.all[i].member.Column.Mark
	}
	return marks
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
	if err := p.missing(r.input); err != nil {
		return nil, err
	}
	p.run = r.again(p.all)
	return p, nil
}

// again prepares the working of designed members.
func (r *run) again(all []designed) *working.Run {
	columns, results := make([]design.Column, len(all)), make([]design.Result, len(all))
	for i := range all {
		columns[i], results[i] = all[i].member.Column, all[i].result
	}
	set := r.engine.Settings()
	return working.NewRun(r.section, &set, columns, results)
}

// working prints the working of the members with these marks.
func (r *run) working(ctx context.Context, marks []string) error {
	p, err := r.picked(ctx, marks)
	if err != nil {
		return err
	}
	var count [4]int
	for _, i := range p.members {
		count[p.all[i].result.Status]++
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

// sheet writes the working of a member down. The error says why there is none.
func (p *pick) sheet(i int) (*working.Sheet, error) {
	m, res := p.all[i].member, &p.all[i].result
	if len(m.Problems) > 0 {
		return nil, fmt.Errorf("%s: not read: %w", m.Column.Mark, m.Problems[0])
	}
	sheet, err := p.run.Sheet(i)
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
