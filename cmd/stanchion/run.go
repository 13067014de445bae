package main

import (
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"stanchion/catalogue"
	"stanchion/design/building"
	"stanchion/design/reclaim"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/summary"
)

// run is one run of size or check over a schedule.
type run struct {
	con   *console
	cmd   *cobra.Command
	flags *runFlags
	input string
	mode  search.Mode

	earlierSheet  string                // that holds settings of an earlier run which hold here too
	loadsOptional bool                  // a schedule without N_Ed will do
	more          []schedule.Assignment // settings that beat those of the command line

	source     schedule.Source
	plan       *schedule.Plan
	cat        *catalogue.Catalogue
	atHand     *catalogue.Catalogue // the list of steel at hand; nil: none
	reclaim    *reclaim.Decision    // what was made of it
	quantities []int                // of its columns
	engine     *search.Engine
	families   map[string]string // of sections, by name
	out        *outputs
	keep       *keeping         // the old issue whose sections stay; nil: none
	curve      []building.Trade // what fewer sizes come to, where they are limited
	anySizes   *building.Trade  // and what any number of them does
	least      *summary.Line    // the member with the least reserve, where it is looked for
	tally      *summary.Tally
}

func newRun(con *console, c *cobra.Command, f *runFlags, input string, mode search.Mode) *run {
	con.quiet = f.quiet
	return &run{con: con, cmd: c, flags: f, input: input, mode: mode, families: map[string]string{}}
}

// suffix ends the name of the output.
func (r *run) suffix() string {
	if r.mode == search.Check {
		return checkedSuffix
	}
	return sizedSuffix
}

// do reads the schedule, designs its members, writes the results and says what
// came of it. Nothing stands at the outputs' places before all is done.
func (r *run) do(ctx context.Context) error {
	if err := r.flags.check(r.cmd); err != nil {
		return err
	}
	if err := r.read(ctx); err != nil {
		return err
	}
	defer r.source.Close()
	if r.flags.keep.file != "" {
		if err := r.readOld(ctx); err != nil {
			return err
		}
	}
	if err := r.openOutputs(); err != nil {
		return err
	}
	defer r.out.discard()
	defects := r.design(ctx)
	var defect *search.BugError
	if defects != nil && !errors.As(defects, &defect) {
		return defects
	}
	if err := r.out.commit(ctx); err != nil {
		return err
	}
	if defects != nil {
		r.con.fail(defects)
	}
	r.report(ctx)
	return verdict(&r.tally.Count)
}

// read opens the schedule and understands it, its settings and the sections
// that may be used.
func (r *run) read(ctx context.Context) error {
	assignments, err := r.flags.assignments(r.cmd)
	if err != nil {
		return err
	}
	if r.source, err = openSource(ctx, r.con, r.input); err != nil {
		return err
	}
	if err = r.checkForm(); err == nil {
		err = r.scan(ctx, append(assignments, r.more...))
	}
	if err != nil {
		r.source.Close()
	}
	return err
}

// checkForm refuses flags that speak of sheets where the schedule is text.
func (r *run) checkForm() error {
	switch {
	case !r.isText():
		return nil
	case r.flags.sheet != "":
		return usage(r.cmd, "--sheet %q: a text schedule has no sheets", r.flags.sheet)
	}
	return r.flags.working.checkText(r.cmd)
}

func (r *run) scan(ctx context.Context, assignments []schedule.Assignment) error {
	opts := schedule.Options{
		Sheet:    r.flags.sheet,
		Settings: assignments,
		National: r.national,
		Stock:    r.stock,

		LoadsOptional: r.loadsOptional,
		EarlierSheet:  r.earlierSheet,
	}
	if r.flags.settings != "" {
		s, err := openSource(ctx, r.con, r.flags.settings)
		if err != nil {
			return err
		}
		defer s.Close()
		opts.SettingsFile = s
	}
	var err error
	if r.plan, err = schedule.Scan(r.source, opts); err != nil {
		return err
	}
	set := &r.plan.Settings
	r.cat = catalogue.Default()
	if r.plan.Stock != nil {
		r.cat = r.plan.Stock
	}
	if r.engine, err = search.New(r.cat, set.Design); err != nil {
		return fmt.Errorf("settings: %w", err)
	}
	r.engine.Reserve = set.Together.Reserve
	if file := set.Together.Reclaimed; file != "" && r.mode == search.Size {
		if r.keep != nil {
			return usage(r.cmd, "--keep and the setting reclaimed both say where sections come from: give one of them")
		}
		if r.atHand, err = r.stock(file); err != nil {
			return fmt.Errorf("reclaimed: %w", err)
		}
		r.engine.AtHand = r.atHand
	}
	return nil
}

// isText reports whether the schedule is delimited text.
func (r *run) isText() bool {
	_, ok := r.source.(*textSource)
	return ok
}
