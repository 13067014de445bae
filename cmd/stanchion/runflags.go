package main

import (
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/schedule"
)

// runFlags are the flags of the commands that design.
type runFlags struct {
	output, json, sheet string
	set, maps           []string
	settings            string
	workers             int
	force, quiet        bool
	keep                keepFlags
	working             workingFlags
}

func (f *runFlags) bind(c *cobra.Command, suffix string) {
	fl := c.Flags()
	fl.StringVarP(&f.output, "output", "o", "", "write the annotated schedule to `FILE` (default: beside the input, as NAME"+suffix+"; - is standard output, for text)")
	fl.StringVar(&f.json, "json", "", "write the results as JSON lines to `FILE` too (- is standard output)")
	fl.BoolVar(&f.force, "force", false, "replace an output that no earlier run wrote, or the input itself")
	f.working.bind(c)
	f.bindReading(c)
}

// bindReading binds the flags that say how the schedule is read and designed.
func (f *runFlags) bindReading(c *cobra.Command) {
	fl := c.Flags()
	fl.StringVar(&f.sheet, "sheet", "", "`NAME` of the sheet that holds the schedule (default: chosen by content)")
	fl.StringArrayVar(&f.set, "set", nil, "`NAME=VALUE` of a setting, such as families=\"UKC, HE\"; may be repeated")
	fl.StringVar(&f.settings, "settings", "", "`FILE` of settings: two columns, name and value")
	fl.StringArrayVar(&f.maps, "map", nil, "`HEADER=FIELD`: what a heading of your own stands for, or ignore; may be repeated")
	fl.IntVar(&f.workers, "workers", 0, "`NUMBER` of columns designed at a time (default: one a processor); results do not depend on it")
	fl.BoolVarP(&f.quiet, "quiet", "q", false, "say errors alone")
}

// assignments are the settings of the command line.
func (f *runFlags) assignments(c *cobra.Command) ([]schedule.Assignment, error) {
	var list []schedule.Assignment
	for _, s := range f.set {
		a, err := schedule.ParseAssignment(s)
		if err != nil {
			return nil, usage(c, "--set: %v", err)
		}
		list = append(list, a)
	}
	for _, s := range f.maps {
		i := strings.LastIndexByte(s, '=') // a heading may hold the sign too
		if i <= 0 {
			return nil, usage(c, "--map %q: give HEADER=FIELD", s)
		}
		list = append(list, schedule.Assignment{Name: "map " + s[:i], Value: s[i+1:], Where: "--map " + s})
	}
	return list, nil
}

// check refuses what cannot be meant.
func (f *runFlags) check(c *cobra.Command) error {
	if f.workers < 0 || f.workers > 1024 {
		return usage(c, "--workers %d: give a number from 1 to 1024", f.workers)
	}
	if f.output == stdio && f.json == stdio {
		return usage(c, "-o - and --json - both go to standard output: name a file for one of them")
	}
	if err := f.working.check(c); err != nil {
		return err
	}
	return f.keep.check(c)
}

// settingsHelp lists the settings for the help of a command.
func settingsHelp() string {
	var b strings.Builder
	b.WriteString("Settings, the default first, for --set, a sheet named Settings or a file given with --settings:\n")
	const wide = 26 // of the names
	for _, s := range schedule.SettingInfos() {
		text := strings.Replace(wrap(s.Explained(), screenWidth-wide, "  "), "\n", "\n"+strings.Repeat(" ", wide), -1)
		fmt.Fprintf(&b, "  %-*s%s\n", wide-2, s.Name, text)
	}
	return strings.TrimRight(b.String(), "\n")
}

// oneFile takes the one argument that a command designs from.
func oneFile(c *cobra.Command, args []string) error {
	switch {
	case len(args) == 0:
		return usage(c, "no schedule: name the file")
	case len(args) > 1:
		return usage(c, "%d files: give one schedule at a time (a name with spaces needs quotes)", len(args))
	}
	return nil
}
