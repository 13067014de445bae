package main

import (
	"fmt"
	"runtime"
	"runtime/debug"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/catalogue"
	"stanchion/design/ec3"
)

func versionCommand(con *console) *cobra.Command {
	return &cobra.Command{
		Use:     "version",
		Short:   "print the version, and what the results rest on",
		Long:    "Prints the version of the program, the standard, the national sets and the section tables.\n\n" + plainStatuses,
		Example: "  stanchion version",
		Args:    cobra.NoArgs,
		RunE: func(*cobra.Command, []string) error {
			t := newTable("", "")
			t.add("stanchion", versionText())
			t.add("built with", runtime.Version()+" for "+runtime.GOOS+"/"+runtime.GOARCH)
			t.add("standard", "EN 1993-1-1:2005 + A1:2014; EN 1993-1-2:2005 in fire")
			t.add("national sets", nationalNames())
			t.add("sections", sectionCounts())
			for _, line := range t.lines()[1:] {
				fmt.Fprintln(con.out, line)
			}
			return nil
		},
	}
}

// versionText is the version of the module and the commit, as the build knows
// them.
func versionText() string {
	info, ok := debug.ReadBuildInfo()
	if !ok {
		return "unknown"
	}
	version := info.Main.Version
	if version == "" || version == "(devel)" {
		version = "devel"
	}
	for _, s := range info.Settings {
		if s.Key == "vcs.revision" && len(s.Value) >= 12 && version == "devel" {
			version += " " + s.Value[:12]
		}
		if s.Key == "vcs.modified" && s.Value == "true" && version != "devel" {
			version += ", modified"
		}
	}
	return version
}

func nationalNames() string {
	names := ""
	for i, n := range ec3.NationalSets() {
		if i > 0 {
			names += " "
		}
		names += n.Name
	}
	return names + " (the first is the default)"
}

// sectionCounts says how many sections there are, and of which standards.
func sectionCounts() string {
	list := catalogue.Default().Sections()
	var standards []string
	for _, s := range list {
		if !slices.Contains(standards, s.Standard) {
			standards = append(standards, s.Standard)
		}
	}
	slices.Sort(standards)
	return fmt.Sprintf("%d of %s", len(list), strings.Join(standards, ", "))
}
