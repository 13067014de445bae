package main

import (
	"context"
	"fmt"
	"slices"
	"strconv"

	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/building"
	"stanchion/schedule/revision"
)

// keepFlags say which sections stay where a schedule is sized anew.
type keepFlags struct {
	file, sheet string
	renamed     []string
}

func (f *keepFlags) bind(c *cobra.Command) {
	fl := c.Flags()
	fl.StringVar(&f.file, "keep", "", "sections stay as they are in the old issue `OLD` of the schedule, where they still pass")
	fl.StringVar(&f.sheet, "keep-sheet", "", "`NAME` of the sheet that holds the old issue (default: chosen by content)")
	fl.StringArrayVar(&f.renamed, "renamed", nil, "`OLD=NEW`: a mark, grid reference or level that has another name than in the old issue, or one member by all its names, as compare lists it; may be repeated")
}

// parseRenamings reads what names have become.
func parseRenamings(c *cobra.Command, texts []string) ([]revision.Renaming, error) {
	var list []revision.Renaming
	for _, s := range texts {
		n, err := revision.ParseRenaming(s)
		if err != nil {
			return nil, usage(c, "--renamed: %v", err)
		}
		list = append(list, n)
	}
	return list, nil
}

// check refuses what cannot be meant.
func (f *keepFlags) check(c *cobra.Command) error {
	switch {
	case f.file == stdio:
		return usage(c, "--keep -: the old issue is read from a file")
	case f.file == "" && (f.sheet != "" || len(f.renamed) > 0):
		return usage(c, "--keep-sheet and --renamed speak of an old issue: name it with --keep")
	}
	return nil
}

// keeping is what a run knows of the old issue, and what became of it.
type keeping struct {
	old      *revision.Issue
	renamed  []revision.Renaming
	unread   []design.Column // of the new issue, which cannot be designed
	matching *revision.Matching
	cols     []design.Column
	had      []revision.Had
	kept     []revision.Kept
}

// readOld reads the old issue.
func (r *run) readOld(ctx context.Context) error {
	renamings, err := parseRenamings(r.cmd, r.flags.keep.renamed)
	if err != nil {
		return err
	}
	if path, err := r.outputPath(); err == nil && sameFile(path, r.flags.keep.file) && !r.flags.force {
		return fmt.Errorf("%s is the old issue itself: name another file with -o, or give --force to write onto it", path)
	}
	flags := *r.flags
	flags.sheet = flags.keep.sheet
	old := newRun(r.con, r.cmd, &flags, flags.keep.file, r.mode)
	old.loadsOptional = true
	if err := old.read(ctx); err != nil {
		return err
	}
	defer old.source.Close()
	issue, err := old.issue()
	if err != nil {
		return err
	}
	for i := range issue.Members {
		if issue.Members[i].Section != nil {
			r.keep = &keeping{old: issue, renamed: renamings}
			return nil
		}
	}
	return fmt.Errorf("%s gives no sections that could stay: name a schedule that was sized, or that gives them", flags.keep.file)
}

// decideKeeping sizes columns so that those of the old issue keep their
// sections where they pass.
func (r *run) decideKeeping(ctx context.Context, cols []design.Column) (*building.Decision, error) {
	k := r.keep
	k.cols, k.had = cols, make([]revision.Had, len(cols))
	var members []revision.Member
	for _, c := range slices.Concat(cols, k.unread) {
		members = append(members, revision.Member{Column: c})
	}
	if err := revision.Rename(k.old.Members, members, k.renamed); err != nil {
		return nil, usage(r.cmd, "--renamed: %v", err)
	}
	k.matching = revision.Match(k.old.Members, members)
	for _, p := range k.matching.Pairs {
		if p.New >= len(cols) {
			continue
		}
		k.had[p.New] = revision.Had{Section: k.old.Members[p.Old].Section, Grade: k.old.Members[p.Old].Grade}
	}
	found, err := revision.Keep(ctx, r.engine, cols, k.had, r.plan.Settings.Together.Options, r.flags.workers)
	if found == nil {
		return nil, err
	}
	k.kept = found.Columns
	for i := range k.kept {
		found.Decision.Results[i] = k.kept[i].Result
	}
	return found.Decision, err
}

// sayKept says how many sections stayed, and which did not.
func (r *run) sayKept() {
	k := r.keep
	if k == nil || k.matching == nil {
		return
	}
	stay, change := 0, []int{}
	for i := range k.kept {
		switch {
		case k.kept[i].Stays:
			stay++
		case k.had[i].Section != nil:
			change = append(change, i)
		}
	}
	r.print("")
	r.paragraph("", fmt.Sprintf("Kept from %s: %s; %s; %d new, %d gone", k.old.File, plural(stay, "section"), strconv.Itoa(len(change))+" changed", len(k.matching.Added), len(k.matching.Removed)))
	if n := len(k.matching.Candidates); n > 0 {
		r.paragraph("", fmt.Sprintf("Note: %s of a gone and a new member could be the same: see stanchion compare %s %s", plural(n, "pair"), asTyped(r.flags.keep.file), asTyped(r.input)))
	}
	if len(change) == 0 {
		return
	}
	t := newTable("  Changed", "level", "was", "now", "why")
	t.limit(0, 16)
	t.limit(1, 14)
	t.limit(4, 40)
	for _, i := range change[:min(shownFailing, len(change))] {
		c := &k.cols[i]
		t.add("  "+c.Mark, revision.LevelOf(c), k.had[i].Section.Name(), k.kept[i].Result.Section, k.kept[i].Why)
	}
	r.print(t.lines()...)
	if more := len(change) - shownFailing; more > 0 {
		r.print(fmt.Sprintf("  and %d more", more))
	}
}
