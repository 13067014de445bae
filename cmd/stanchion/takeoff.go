package main

import (
	"context"
	"io"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/search"
	"stanchion/schedule/summary"
	"stanchion/schedule/takeoff"
	"stanchion/schedule/workbook"
)

func takeoffCommand(con *console) *cobra.Command {
	var f runFlags
	var format string
	c := &cobra.Command{
		Use:   "takeoff FILE",
		Short: "count the steel of a schedule that has its sections",
		Long: "Counts the steel of an annotated schedule, or of one that gives its sections: by section and\n" +
			"grade, by level, by family and by the lengths that are to be cut; with painted area, splices,\n" +
			"the longest piece, and cost and embodied carbon where the settings have rates. The sections are\n" +
			"those of the schedule's own column and, where it is blank, those of the results.\n\n" +
			"Where the schedule or the setting splices says where the splices are, lengths between them are\n" +
			"one piece; otherwise every length is. What the run that annotated a workbook was told of\n" +
			"splices, allowances and rates holds here too, where nothing else is said; a text schedule does\n" +
			"not hold it: give it again with --set, or the same --settings.\n\n" +
			settingsHelp() + "\n\n" + takeoffStatuses,
		Example: `  stanchion takeoff examples/ottermere-depot-ordered.csv
  stanchion takeoff depot-sized.xlsx -o depot-steel.xlsx --set "cost=1850" --set "carbon=1.74"
  stanchion takeoff loads-sized.csv --settings settings.csv
  stanchion takeoff ordered.csv -o steel.csv --set connections=6 --set waste=2.5 --set "transport length=12"`,
		Args: oneFile,
		RunE: func(c *cobra.Command, args []string) error {
			r := newRun(con, c, &f, args[0], search.Check)
			r.loadsOptional, r.earlierSheet = true, summary.SummarySheet
			return (&takeoffRun{run: r, format: format}).do(c.Context())
		},
	}
	fl := c.Flags()
	fl.StringVarP(&f.output, "output", "o", "", "write the take-off to `FILE` (.xlsx, .csv or .txt says its form)")
	fl.StringVar(&format, "format", "text", "`FORM` on standard output: text or csv")
	fl.StringVar(&f.sheet, "sheet", "", "`NAME` of the sheet that holds the schedule (default: chosen by content)")
	fl.StringArrayVar(&f.set, "set", nil, "`NAME=VALUE` of a setting, such as connections=6; may be repeated")
	fl.StringVar(&f.settings, "settings", "", "`FILE` of settings: two columns, name and value")
	fl.StringArrayVar(&f.maps, "map", nil, "`HEADER=FIELD`: what a heading of your own stands for, or ignore; may be repeated")
	fl.BoolVar(&f.force, "force", false, "replace an output that no earlier run wrote")
	fl.BoolVarP(&f.quiet, "quiet", "q", false, "say errors alone")
	return c
}

const takeoffStatuses = `Exit status:
  0    every member is counted
  1    finished; a member that fails is counted with its section
  2    finished; a member is not counted: it could not be read or has no section
  3    nothing written: bad usage, unreadable file, no header, two headers for
       one field, no members, or an output that cannot be written
  130  interrupted; nothing written`

// takeoffRun is one run of takeoff.
type takeoffRun struct {
	*run
	format string
	steel  *takeoff.TakeOff
}

func (r *takeoffRun) do(ctx context.Context) error {
	write, err := r.writer()
	if err != nil {
		return err
	}
	if err := r.read(ctx); err != nil {
		return err
	}
	defer r.source.Close()
	if err := r.count(); err != nil {
		return err
	}
	if err := r.write(ctx, write); err != nil {
		return err
	}
	r.say()
	switch {
	case len(r.steel.LeftOut) > 0:
		return &finished{statusNotRead}
	case len(r.steel.Failing) > 0:
		return &finished{statusFails}
	}
	return nil
}

// count reads the members and counts their steel.
func (r *takeoffRun) count() error {
	items, leftOut, err := takeoff.Members(r.plan.Members(), r.find, r.plan.Settings.Design.Grades)
	if err != nil {
		return err
	}
	r.steel = takeoff.Of(items, leftOut, r.takeoffOptions())
	return nil
}

// takeoffOptions are what the settings ask of a take-off.
func (r *run) takeoffOptions() takeoff.Options {
	set := &r.plan.Settings
	return takeoff.Options{
		Rates: set.Design.Rates, Connections: set.TakeOff.Connections, Waste: set.TakeOff.Waste, Transport: set.TakeOff.Transport,
		Splices: set.Together.Splices, Every: set.Together.Every,
	}
}

// find returns the section of a name in a column's row. One that is given need
// not be in stock.
func (r *run) find(name string, col *design.Column) (*catalogue.Section, error) {
	set := &r.plan.Settings.Design
	o := catalogue.FindOptions{ColdFormed: set.ColdFormed, Families: col.Choice.Families}
	if len(o.Families) == 0 {
		o.Families = set.Families
	}
	if s, err := r.cat.Find(name, o); err == nil {
		return s, nil
	}
	return catalogue.Default().Find(name, o)
}

// writer returns how the take-off is written: as the name of the output says,
// or as the flag does for standard output.
func (r *takeoffRun) writer() (func(io.Writer) error, error) {
	out := r.flags.output
	toFile := out != "" && out != stdio
	format := r.format
	if toFile {
		format = strings.TrimPrefix(strings.ToLower(filepath.Ext(out)), ".")
	}
	switch {
	case format == "text" && !toFile, format == "txt" && toFile:
		return r.text, nil
	case format == "csv":
		return r.csv, nil
	case format == "xlsx" && toFile:
		return r.book, nil
	case toFile:
		return nil, usage(r.cmd, "-o %s: name a file ending in .xlsx, .csv or .txt", out)
	}
	return nil, usage(r.cmd, "--format %s: give text or csv", format)
}

func (r *takeoffRun) csv(w io.Writer) error { return r.steel.WriteCSV(w, r.plan.Decimal) }

func (r *takeoffRun) book(w io.Writer) error {
	return workbook.WriteNew(w, workbook.Laid(r.steel.Sheets(filepath.Base(r.input)), r.plan.Settings.Paper))
}

func (r *takeoffRun) write(ctx context.Context, write func(io.Writer) error) error {
	return r.writeApart(ctx, takeoffEarlier, write)
}

// takeoffEarlier reports whether an earlier run wrote a take-off.
func takeoffEarlier(path string) bool {
	return workbook.WrittenByUs(path) || beginsWith(path, func(line string) bool {
		return takeoff.IsCSV(line) || strings.HasPrefix(line, takeoffTitle)
	})
}

// say tells a person what became of the run where the results went to a file,
// and what to look at.
func (r *takeoffRun) say() {
	t := r.steel
	if out := r.flags.output; out != "" && out != stdio {
		r.con.say("%s, %s t net: %s", plural(int(t.Pieces), "piece"), tonnes(t.Net.Mass), out)
	} else if r.con.screen && r.format == "text" {
		return // the lists stand on the same screen, at the end
	}
	r.sayDefaults()
	r.sayList("not counted", t.LeftOut)
	r.sayList("counted, and they fail", t.Failing)
	r.sayList("remarks", t.Remarks)
}

// sayDefaults warns of defaults that the run which annotated a text schedule may
// have been told otherwise: text holds no settings.
func (r *takeoffRun) sayDefaults() {
	_, text := r.source.(*textSource)
	if !text || len(r.plan.Header.Old) == 0 || len(r.flags.set) > 0 || r.flags.settings != "" {
		return
	}
	r.con.say("%s", wrap("note: "+filepath.Base(r.input)+" does not hold what the run that annotated it was told of splices, allowances and rates: "+
		"where that was not the default, give it again with --set or --settings", screenWidth-2, "  "))
}

// sayList names the first few of a list.
func (r *takeoffRun) sayList(what string, list []takeoff.LeftOut) {
	if len(list) == 0 {
		return
	}
	const shown = 12
	r.con.say("%s: %d", what, len(list))
	for i := range list[:min(shown, len(list))] {
		r.con.say("  %s", wrap(list[i].String(), screenWidth-2, "    "))
	}
	if more := len(list) - shown; more > 0 {
		r.con.say("  and %d more", more)
	}
}
