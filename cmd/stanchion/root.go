package main

import (
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"
)

// caution is carried by every output and by the help.
const caution = "Results are design aids, to be checked by a qualified engineer against the project's own requirements, " +
	"the national annex and local regulations."

// notCovered is the other half of the caution: what the results say nothing of.
const notCovered = "Not covered: built-up and tapered members, seismic, fatigue, connections, base plates, second-order " +
	"frame effects (the forces given must include them where they matter)."

// cautionHelp is the caution as the help has it.
var cautionHelp = wrap(caution, 92, "") + "\n" + wrap(notCovered, 92, "")

// execute runs one command line and returns the exit status.
func execute(ctx context.Context, con *console, args []string) int {
	root := rootCommand(con)
	root.SetArgs(args)
	root.SetIn(con.in)
	root.SetOut(con.out)
	root.SetErr(con.err)
	err := root.ExecuteContext(ctx)
	if errors.Is(err, context.Canceled) {
		con.fail(errors.New("interrupted: nothing was written"))
	} else if _, done := err.(*finished); err != nil && !done {
		con.fail(err)
	}
	return exitStatus(err)
}

// rootCommand returns the tree of commands.
func rootCommand(con *console) *cobra.Command {
	root := &cobra.Command{
		Use:   "stanchion",
		Short: "size and check the steel columns of a schedule",
		Long: "stanchion sizes and checks steel columns to EN 1993-1-1. It reads a column schedule as a design\n" +
			"office keeps it (.xlsx, .xlsm, .csv), finds the lightest section that passes for every column,\n" +
			"and returns the schedule annotated.\n\n" +
			cautionHelp,
		Example: `  stanchion size examples/ottermere-depot.xlsx
  stanchion check examples/ottermere-depot-ordered.csv
  stanchion sections 203x203 UKC`,
		Version:       versionText(),
		SilenceUsage:  true,
		SilenceErrors: true,
	}
	root.SetVersionTemplate("{{.Name}} {{.Version}}\n")
	root.CompletionOptions.HiddenDefaultCmd = true
	root.SetFlagErrorFunc(func(c *cobra.Command, err error) error { return usage(c, "%v", err) })
	root.AddCommand(sizeCommand(con), checkCommand(con), workingCommand(con), sheetsCommand(con), blankCommand(con), sectionsCommand(con), nationalCommand(con), versionCommand(con))
	root.AddCommand(takeoffCommand(con), compareCommand(con), sizesCommand(con), scenariosCommand(con))
	return root
}

// usage is an error in the command line itself.
func usage(c *cobra.Command, format string, args ...any) error {
	return fmt.Errorf("%s\nsee: %s --help", fmt.Sprintf(format, args...), c.CommandPath())
}
