package main

import (
	"github.com/spf13/cobra"

	"stanchion/design/search"
)

func sizeCommand(con *console) *cobra.Command {
	var f runFlags
	c := &cobra.Command{
		Use:   "size FILE",
		Short: "choose the lightest section that passes for every column",
		Long: "Reads a column schedule (.xlsx, .xlsm or delimited text; - is standard input), chooses for every\n" +
			"column the lightest section that passes every check, and writes the schedule annotated beside it.\n" +
			"A row that gives a section keeps it: it is checked. With --keep, sections stay as they are in an\n" +
			"old issue of the schedule where they still pass, so that the fewest members change.\n\n" +
			workingHelp + "\n\n" +
			settingsHelp() + "\n\n" + exitStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion size examples/ottermere-depot.xlsx
  stanchion size loads.xlsx --set families="HEA, HEB" --set national=EN --set limit=0.95
  stanchion size loads.csv -o sized.csv --json sized.jsonl
  stanchion size loads.xlsx --working C12 --working C13
  stanchion size loads-P02.xlsx --keep loads-P01-sized.xlsx
  stanchion size - < loads.csv > sized.csv`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error {
			return newRun(con, c, &f, args[0], search.Size).do(c.Context())
		},
	}
	f.bind(c, sizedSuffix)
	f.keep.bind(c)
	return c
}

// The names of outputs end in these.
const (
	sizedSuffix   = "-sized"
	checkedSuffix = "-checked"
)
