package main

import (
	"context"
	"io"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/schedule/blank"
)

func blankCommand(con *console) *cobra.Command {
	var all, force, quiet bool
	c := &cobra.Command{
		Use:   "blank FILE",
		Short: "write an empty schedule to fill in",
		Long: "Writes an empty column schedule. As a workbook (.xlsx) it has the headings with their units, an\n" +
			"explanation and, where there are few, the allowed values at their cells, and a sheet of settings;\n" +
			"as text (.csv, or - for standard output) it is the line of headings.\n\n" + plainStatuses,
		Example: `  stanchion blank columns.xlsx
  stanchion blank columns.csv
  stanchion blank - --all`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) != 1 {
				return usage(c, "name the file to write: columns.xlsx, columns.csv or - for standard output")
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error {
			con.quiet = quiet
			return writeBlank(c.Context(), con, c, args[0], all, force)
		},
	}
	c.Flags().BoolVar(&all, "all", false, "a column for every field, not the usual ones alone")
	c.Flags().BoolVar(&force, "force", false, "replace the file if it exists")
	c.Flags().BoolVarP(&quiet, "quiet", "q", false, "say errors alone")
	return c
}

func writeBlank(ctx context.Context, con *console, c *cobra.Command, path string, all, force bool) error {
	write := blank.CSV
	switch ext := strings.ToLower(filepath.Ext(path)); {
	case path == stdio:
		return blank.CSV(con.out, all)
	case ext == ".xlsx":
		write = blank.Workbook
	case ext != ".csv" && ext != ".txt":
		return usage(c, "%s: an empty schedule is written as .xlsx or .csv", path)
	}
	if err := writeNewFile(ctx, path, force, func(w io.Writer) error { return write(w, all) }); err != nil {
		return err
	}
	con.say("Written: %s", path)
	return nil
}
