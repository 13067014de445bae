package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strconv"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/design/building"
	"stanchion/design/search"
	"stanchion/schedule/tradeoff"
	"stanchion/schedule/workbook"
)

func sizesCommand(con *console) *cobra.Command {
	var f runFlags
	var format string
	var most int
	c := &cobra.Command{
		Use:   "sizes FILE",
		Short: "show what it costs to use few different sections",
		Long: "Finds for 1, 2, 3 ... different sections over the whole schedule the choice that needs the least\n" +
			"steel (or cost, or carbon: the setting objective), so that the number can be chosen from which on\n" +
			"more help little; then `size FILE --set sizes=N` uses it. Stacks, groups and given sections are\n" +
			"respected; a section in two grades counts once. Every line is the proven least, or says how far\n" +
			"below it the least may lie.\n\n" +
			settingsHelp() + "\n\n" + exitStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion sizes examples/ottermere-depot.xlsx
  stanchion sizes loads.xlsx --most 20 --set splices="every 2"
  stanchion sizes loads.xlsx -o sizes.xlsx
  stanchion sizes loads.csv -o sizes.svg --set objective=cost --set cost=1850`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error {
			r := &sizesRun{run: newRun(con, c, &f, args[0], search.Size), format: format, most: most}
			return r.do(c.Context())
		},
	}
	f.bindApart(c, "the table", ".xlsx, .csv, .txt, .svg or .png", &format)
	c.Flags().IntVar(&most, "most", 12, "`NUMBER` of different sections to go up to")
	return c
}

// sizesRun is one run of sizes.
type sizesRun struct {
	*run
	format string
	most   int
	table  *tradeoff.Table
}

func (r *sizesRun) do(ctx context.Context) error {
	write, err := r.writer()
	if err != nil {
		return err
	}
	if r.most < 1 || r.most > 1000 {
		return usage(r.cmd, "--most %d: give a number from 1 to 1000", r.most)
	}
	if err := r.flags.check(r.cmd); err != nil {
		return err
	}
	if err := r.read(ctx); err != nil {
		return err
	}
	defer r.source.Close()
	r.plan.Settings.Together.MostSizes = r.most
	r.out, r.tally = &outputs{}, newTally(r.run)
	var few *building.TooFewSizesError
	if err := r.design(ctx); errors.As(err, &few) {
		return fmt.Errorf("%w (--most %d)", err, r.most+12)
	} else if err != nil {
		return err
	}
	r.table = r.sizesTable()
	if err := r.writeApart(ctx, sizesEarlier, write); err != nil {
		return err
	}
	r.say()
	return verdict(&r.tally.Count)
}

// sizesTable is the trade-off of the run's sizes.
func (r *run) sizesTable() *tradeoff.Table {
	s := &r.plan.Settings
	t := tradeoff.Of(filepath.Base(r.input), r.curve, r.anySizes, s.Design.Rates.Objective)
	t.NewOnly = r.reclaim != nil && r.reclaim.Used > 0
	t.Splices = s.Together.Splices == building.WhereItPays && s.Together.SpliceCost > 0
	return t
}

// writer returns how the table is written.
func (r *sizesRun) writer() (func(io.Writer) error, error) {
	format, toFile := r.apartFormat(r.format)
	switch {
	case format == "text" && !toFile, format == "txt" && toFile:
		return r.text, nil
	case format == "csv":
		return func(w io.Writer) error { return r.table.WriteCSV(w, r.plan.Decimal) }, nil
	case format == "xlsx" && toFile:
		return func(w io.Writer) error {
			return workbook.WriteNew(w, workbook.Laid([]workbook.Sheet{r.table.Page(tradeoff.Sheet)}, r.plan.Settings.Paper))
		}, nil
	case (format == "svg" || format == "png") && toFile:
		return func(w io.Writer) error { return r.table.WritePicture(w, format) }, nil
	case toFile:
		return nil, usage(r.cmd, "-o %s: name a file ending in .xlsx, .csv, .txt, .svg or .png", r.flags.output)
	}
	return nil, usage(r.cmd, "--format %s: give text or csv", format)
}

// sizesTitle opens the table in text.
const sizesTitle = "Sizes for "

func (r *sizesRun) text(w io.Writer) error {
	lines := append([]string{sizesTitle + r.plan.File, ""}, sizesLines(r.table, "")...)
	_, err := io.WriteString(w, strings.Join(lines, "\n")+"\n")
	return err
}

// sizesLines is the table for a screen or a page, with its remarks.
func sizesLines(table *tradeoff.Table, indent string) []string {
	name, unit, _ := strings.Cut(table.Quantity(), ", ")
	t := newTable(indent+"Sizes", ">"+name+" "+unit, ">above least", ">one more saves", "least", "sections")
	const sectionsWide = 46
	for _, l := range table.Served() {
		saves := ""
		if l.Saves > 0 {
			saves = fixed(l.Saves, table.Decimals())
		}
		sections := wrapList(l.Sections, sectionsWide)
		t.add(indent+strconv.Itoa(l.Most), fixed(l.Amount, table.Decimals()), fixed(100*l.Above, 1)+" %", saves, l.Proof(), sections[0])
		for _, more := range sections[1:] {
			t.add("", "", "", "", "", more)
		}
	}
	lines := append(t.lines(), "")
	for _, s := range table.Remarks() {
		lines = append(lines, indent+wrap(s, screenWidth-2, indent+"  "))
	}
	return lines
}

// sizesEarlier reports whether an earlier run wrote such a file.
func sizesEarlier(path string) bool {
	return workbook.WrittenByUs(path) || beginsWith(path, func(line string) bool {
		return tradeoff.IsCSV(line) || strings.HasPrefix(line, sizesTitle)
	}) || isPicture(path)
}

// isPicture reports whether an earlier run drew a picture.
func isPicture(path string) bool {
	file, err := os.Open(path)
	if err != nil {
		return false
	}
	defer file.Close()
	begins, err := io.ReadAll(io.LimitReader(file, 1<<10))
	return err == nil && tradeoff.IsPicture(begins)
}

// say tells a person what became of the run where the table went to a file,
// and what to look at.
func (r *sizesRun) say() {
	if out := r.flags.output; out != "" && out != stdio {
		r.con.say("Written: %s", out)
	}
	if r.con.quiet {
		return
	}
	if c := &r.tally.Count; c[1]+c[2]+c[3] > 0 {
		r.sayOutcome()
		r.print("Columns without a section that passes are not counted.")
		r.sayNotRead()
	}
}
