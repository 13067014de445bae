package main

import (
	"context"
	"errors"
	"fmt"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/sidebyside"
	"stanchion/schedule/summary"
	"stanchion/schedule/workbook"
)

func scenariosCommand(con *console) *cobra.Command {
	var f runFlags
	var format, file string
	var texts []string
	c := &cobra.Command{
		Use:   "scenarios FILE",
		Short: "set a schedule under several settings side by side",
		Long: "Sizes one schedule under its own settings and under those of each scenario, and sets the outcomes\n" +
			"side by side: members that pass and fail, steel, different sections, and cost and embodied carbon\n" +
			"where there are rates. A scenario is a name and the settings that it changes. Scenarios come from\n" +
			"--scenario, from a table given with --scenarios, or from a sheet named Scenarios in the workbook:\n" +
			"a column headed Scenario with names, and columns headed by settings (a blank changes nothing).\n\n" +
			settingsHelp() + "\n\n" + scenarioStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion scenarios examples/ottermere-depot.xlsx --scenario "S275: grade=S275" --scenario "few: sizes=12"
  stanchion scenarios loads.xlsx --scenarios options.csv -o options.xlsx
  stanchion scenarios loads.csv --set cost=1850 --scenario "tubes: families=CHS, SHS; hollow sections=cold"`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error {
			con.quiet = f.quiet
			s := &scenariosRun{con: con, cmd: c, flags: &f, input: args[0], format: format, file: file, texts: texts}
			return s.do(c.Context())
		},
	}
	f.bindApart(c, "the table", ".xlsx, .csv or .txt", &format)
	c.Flags().StringArrayVar(&texts, "scenario", nil, "`\"NAME: setting=value; ...\"`; may be repeated")
	c.Flags().StringVar(&file, "scenarios", "", "`FILE` with a table of scenarios")
	return c
}

const scenarioStatuses = `Exit status:
  0    every member passes in every scenario
  1    finished; in a scenario a member fails or has no section, or it cannot be met
  2    finished; a row could not be read
  3    nothing written: bad usage or setting, unreadable file, no header, two
       headers for one field, no members, or an output that cannot be written
  130  interrupted; nothing written`

// scenariosRun is one run of scenarios.
type scenariosRun struct {
	con     *console
	cmd     *cobra.Command
	flags   *runFlags
	input   string
	format  string
	file    string
	texts   []string
	table   *sidebyside.Table
	decimal byte
	paper   schedule.Paper // of the schedule as given
	count   [4]int
	unmet   bool
}

func (s *scenariosRun) do(ctx context.Context) error {
	if s.input == stdio {
		return usage(s.cmd, "-: scenarios read the schedule more than once: name a file")
	}
	first := s.run(nil)
	write, err := s.writer(first)
	if err != nil {
		return err
	}
	list, err := s.scenarios(ctx)
	if err != nil {
		return err
	}
	s.table = &sidebyside.Table{File: filepath.Base(s.input)}
	for _, sc := range append([]schedule.Scenario{{Name: schedule.AsGiven}}, list...) {
		if err := s.try(ctx, &sc); err != nil {
			return err
		}
	}
	s.table.Measure()
	if err := first.writeApart(ctx, scenariosEarlier, write); err != nil {
		return err
	}
	if out := s.flags.output; out != "" && out != stdio {
		for _, remark := range s.table.Remarks() { // what the exit status rests on
			s.con.say("%s", wrap("✗ "+remark, screenWidth-2, "  "))
		}
		s.con.say("Written: %s", out)
	}
	if s.unmet {
		s.count[design.Fails]++
	}
	return verdict(&s.count)
}

// run makes a run with the settings of a scenario added to those of the command
// line.
func (s *scenariosRun) run(more []schedule.Assignment) *run {
	r := newRun(s.con, s.cmd, s.flags, s.input, search.Size)
	r.more = more
	return r
}

// scenarios gathers the scenarios from wherever they are given.
func (s *scenariosRun) scenarios(ctx context.Context) ([]schedule.Scenario, error) {
	var list []schedule.Scenario
	for _, text := range s.texts {
		sc, err := schedule.ParseScenario(text)
		if err != nil {
			return nil, usage(s.cmd, "--scenario: %v", err)
		}
		list = append(list, sc)
	}
	fromFile, err := s.fromFile(ctx)
	if err != nil {
		return nil, err
	}
	list = append(list, fromFile...)
	if len(list) == 0 {
		return nil, usage(s.cmd, "no scenario: give --scenario, --scenarios, or a sheet named Scenarios in the workbook")
	}
	return list, schedule.CheckScenarios(list)
}

// fromFile reads the table of scenarios: the file that is named or, where no
// scenario is given otherwise, the schedule's own sheet.
func (s *scenariosRun) fromFile(ctx context.Context) ([]schedule.Scenario, error) {
	path := s.file
	if path == "" {
		if len(s.texts) > 0 || !workbook.Is(s.input) {
			return nil, nil
		}
		path = s.input
	}
	src, err := openSource(ctx, s.con, path)
	if err != nil {
		return nil, err
	}
	defer src.Close()
	sheet, ok := schedule.ScenariosSheet(src)
	switch {
	case !ok && s.file == "":
		return nil, nil
	case !ok && len(src.Sheets()) > 0:
		sheet = src.Sheets()[0]
	}
	return schedule.ReadScenarios(src, sheet)
}

// gathered keeps every member with its result.
type gathered struct{ lines []summary.Line }

func (g *gathered) put(m *schedule.Member, res *design.Result) error {
	g.lines = append(g.lines, summary.Line{Member: m, Result: *res})
	return nil
}

func (g *gathered) finish(context.Context) error { return nil }

// try designs the schedule under one scenario. What cannot be read ends the
// run; what cannot be met is told in its row.
func (s *scenariosRun) try(ctx context.Context, sc *schedule.Scenario) error {
	r := s.run(sc.Settings)
	if err := r.flags.check(r.cmd); err != nil {
		return err
	}
	if err := r.read(ctx); err != nil {
		if where := fmt.Sprintf("scenario %q", sc.Name); len(sc.Settings) > 0 && !strings.HasPrefix(err.Error(), where) {
			err = fmt.Errorf("%s: %w", where, err)
		}
		return err
	}
	defer r.source.Close()
	if len(sc.Settings) == 0 {
		s.paper = r.plan.Settings.Paper
	}
	s.decimal = r.plan.Decimal
	all := &gathered{}
	r.out, r.tally = &outputs{sinks: []sink{all}}, newTally(r)
	row := sidebyside.Row{Name: sc.Name, Changes: sc.Changes()}
	var defect *search.BugError
	err := r.design(ctx)
	switch {
	case ctx.Err() != nil:
		return ctx.Err()
	case errors.As(err, &defect):
		s.con.fail(err)
	case err != nil:
		row.Why, s.unmet = err.Error(), true
		s.table.Rows = append(s.table.Rows, row)
		return nil
	}
	r.fillRow(&row, all.lines)
	for i, n := range r.tally.Count {
		s.count[i] += n
	}
	s.table.Rows = append(s.table.Rows, row)
	return nil
}
