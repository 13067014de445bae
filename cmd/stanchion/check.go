package main

import (
	"github.com/spf13/cobra"

	"stanchion/design/search"
)

func checkCommand(con *console) *cobra.Command {
	var f runFlags
	c := &cobra.Command{
		Use:   "check FILE",
		Short: "prove the sections that the schedule gives",
		Long: "Reads a column schedule whose columns have their sections, checks every one, and writes the\n" +
			"schedule annotated beside it: utilisation, what governs, pass or fail, and by how much the axial\n" +
			"force could still grow. Columns that fail are listed, with the lightest section that would pass.\n\n" +
			workingHelp + "\n\n" +
			settingsHelp() + "\n\n" + exitStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion check examples/ottermere-depot-ordered.csv
  stanchion check loads.xlsx --sheet Columns --set growth=1.10
  stanchion check loads.csv -o - --quiet`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error {
			return newRun(con, c, &f, args[0], search.Check).do(c.Context())
		},
	}
	f.bind(c, checkedSuffix)
	return c
}
