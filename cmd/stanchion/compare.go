package main

import (
	"context"
	"fmt"
	"path/filepath"

	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule"
	"stanchion/schedule/revision"
)

// comparedSuffix ends the name of the output.
const comparedSuffix = "-compared"

func compareCommand(con *console) *cobra.Command {
	r := &compareRun{}
	var renamed []string
	c := &cobra.Command{
		Use:   "compare OLD NEW",
		Short: "set two issues of a schedule side by side",
		Long: "Finds which member of the old issue is which of the new one, by mark, grid reference and levels,\n" +
			"says what changed in load, length, restraint and section, and tries the sections of the old issue\n" +
			"under the actions of the new: which stay, which fail, which could be lighter, and the steel before\n" +
			"and after. The sections of the old issue are those of its own column and, where that is blank,\n" +
			"those of its results; if it has none, its members are sized first.\n\n" +
			"The new issue is written annotated beside itself, and what came of it in words on standard output.\n" +
			"A member that is gone and a new one that could be it under another name or in another place are\n" +
			"named as candidates, and never taken for one: --renamed says what a name has become.\n\n" +
			settingsHelp() + "\n\n" + compareStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion compare examples/ottermere-depot.csv examples/ottermere-depot-ordered.csv
  stanchion compare depot-P01-sized.xlsx depot-P02.xlsx
  stanchion compare P01.csv P02.csv -o changes.csv --renamed "L1=Level 01" --renamed C7=C7A
  stanchion compare P01.csv P02.csv --renamed "C9 B2 L1 to L2=C9 B3 L1 to L2"`,
		Args: twoFiles,
		RunE: func(c *cobra.Command, args []string) error {
			var err error
			if r.renamed, err = parseRenamings(c, renamed); err != nil {
				return err
			}
			return r.do(c.Context(), con, c, args[0], args[1])
		},
	}
	f, fl := &r.flags, c.Flags()
	fl.StringVarP(&f.output, "output", "o", "", "write the annotated new issue to `FILE` (default: beside it, as NAME"+comparedSuffix+")")
	fl.StringVar(&f.sheet, "sheet", "", "`NAME` of the sheet that holds the new issue (default: chosen by content)")
	fl.StringVar(&r.oldSheet, "old-sheet", "", "`NAME` of the sheet that holds the old issue (default: chosen by content)")
	fl.StringArrayVar(&renamed, "renamed", nil, "`OLD=NEW`: a mark, grid reference or level that has another name in the new issue, or one member by all its names, as it is listed; may be repeated")
	fl.StringArrayVar(&f.set, "set", nil, "`NAME=VALUE` of a setting, for both issues; may be repeated")
	fl.StringVar(&f.settings, "settings", "", "`FILE` of settings for both issues: two columns, name and value")
	fl.StringArrayVar(&f.maps, "map", nil, "`HEADER=FIELD`: what a heading of your own stands for, or ignore; may be repeated")
	fl.IntVar(&f.workers, "workers", 0, "`NUMBER` of columns designed at a time (default: one a processor); results do not depend on it")
	fl.BoolVar(&f.force, "force", false, "replace an output that no earlier run wrote, or the new issue itself")
	fl.BoolVarP(&f.quiet, "quiet", "q", false, "say errors alone")
	return c
}

const compareStatuses = `Exit status:
  0    every section of the old issue passes under the new actions
  1    finished; a section of the old issue fails or is not allowed any more,
       or no section passes
  2    finished; a row could not be read
  3    nothing written: bad usage, unreadable file, no header, two headers for
       one field, no members, or an output that cannot be written
  130  interrupted; nothing written`

func twoFiles(c *cobra.Command, args []string) error {
	if len(args) != 2 {
		return usage(c, "%s: name the old issue and the new one", plural(len(args), "file"))
	}
	for _, a := range args {
		if a == stdio {
			return usage(c, "-: both issues are read from files")
		}
	}
	return nil
}

// compareRun is one run of compare.
type compareRun struct {
	flags    runFlags
	oldSheet string
	renamed  []revision.Renaming

	old, new *run
	result   *revision.Comparison
}

func (r *compareRun) do(ctx context.Context, con *console, c *cobra.Command, oldPath, newPath string) error {
	if err := r.flags.check(c); err != nil {
		return err
	}
	if r.flags.output == "" {
		r.flags.output = beside(newPath, comparedSuffix)
	}
	oldFlags := r.flags
	oldFlags.sheet = r.oldSheet
	r.old, r.new = newRun(con, c, &oldFlags, oldPath, search.Size), newRun(con, c, &r.flags, newPath, search.Size)
	r.old.loadsOptional = true // it may be a schedule of what was built
	for _, x := range []*run{r.old, r.new} {
		if err := x.read(ctx); err != nil {
			return err
		}
		defer x.source.Close()
	}
	defects := r.compare(ctx)
	if r.result == nil {
		return defects
	}
	if err := r.write(ctx); err != nil {
		return err
	}
	if defects != nil {
		con.fail(defects)
	}
	if err := r.text(con.out); err != nil {
		return err
	}
	con.say("Written: %s", r.flags.output)
	con.say("%s", wrap(caution, screenWidth-2, "  "))
	return r.status()
}

// compare reads both issues and sets them side by side. Where the search could
// not bring single columns to an end, there is a result besides the error.
func (r *compareRun) compare(ctx context.Context) error {
	old, err := r.old.issue()
	if err != nil {
		return err
	}
	new, err := r.new.issue()
	if err != nil {
		return err
	}
	if err := revision.Rename(old.Members, new.Members, r.renamed); err != nil {
		return usage(r.new.cmd, "--renamed: %v", err)
	}
	r.result, err = revision.Compare(ctx, old, new, r.old.engine, r.new.engine, r.new.plan.Settings.Together.Options, r.flags.workers)
	return err
}

// issue reads the members of a schedule with the sections that they have.
func (r *run) issue() (*revision.Issue, error) {
	members, err := revision.Read(r.plan.Members(), r.find, r.plan.Settings.Design.Grades)
	return &revision.Issue{File: filepath.Base(r.input), Members: members}, err
}

// status is how the run ends.
func (r *compareRun) status() error {
	count := [4]int{}
	for i := range r.result.Rows {
		switch row := &r.result.Rows[i]; {
		case !row.New.Readable() || row.Kept.Result.Status == design.NotRead:
			count[design.NotRead]++
		case row.Verdict == revision.Weak || row.Verdict == revision.Barred || row.Kept.Result.Status != design.Passes:
			count[design.Fails]++
		}
	}
	return verdict(&count)
}

// write writes the annotated new issue.
func (r *compareRun) write(ctx context.Context) error {
	n := r.new
	path, err := n.outputPath()
	if err != nil {
		return err
	}
	switch {
	case path == stdio:
		return usage(n.cmd, "-o -: what came of it goes to standard output in words: name a file")
	case sameFile(path, r.old.input):
		return fmt.Errorf("%s is the old issue itself: name another file with -o", path)
	}
	if err := n.guard(path); err != nil {
		return err
	}
	n.out = &outputs{path: path, last: n.source.Close}
	defer n.out.discard()
	w, err := n.out.create(n.con, path)
	if err != nil {
		return err
	}
	s, err := r.sink(w)
	if err != nil {
		return err
	}
	n.out.sinks = []sink{s}
	for i := range r.result.Rows {
		m := r.result.Rows[i].New
		if err := n.out.put(&schedule.Member{Column: m.Column, Rows: m.Rows}, nil); err != nil {
			return err
		}
	}
	return n.out.commit(ctx)
}
