package main

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf16"

	"github.com/spf13/cobra"

	"stanchion/design/search"
	"stanchion/design/working"
	"stanchion/schedule/calcsheet"
	"stanchion/schedule/outfile"
)

// sheetsSuffix ends the name of the calculation sheets.
const sheetsSuffix = "-sheets"

// sheetsFlags say what the calculation sheets are to be.
type sheetsFlags struct {
	runFlags
	title, elevations string
}

func sheetsCommand(con *console) *cobra.Command {
	var f sheetsFlags
	c := &cobra.Command{
		Use:   "sheets FILE [MARK]...",
		Short: "write calculation sheets for the one who checks",
		Long: "Designs a column schedule as `size` does and writes calculation sheets as PDF: one for every\n" +
			"column, or for those with the marks given, with every formula, the numbers put in, the result and\n" +
			"the clause, an elevation of the column and its place on the buckling curve; before them a list\n" +
			"of the sheets and the elevations of the column lines.\n\n" +
			settingsHelp() + "\n\n" + exitStatuses + "\n\n" + cautionHelp,
		Example: `  stanchion sheets examples/ottermere-depot.xlsx
  stanchion sheets loads.xlsx C12 C13 -o c12-c13.pdf --title "Ottermere Depot, frame B"
  stanchion sheets loads.csv --elevations drawings`,
		Args: func(c *cobra.Command, args []string) error {
			if len(args) == 0 {
				return usage(c, "no schedule: name the file")
			}
			return nil
		},
		RunE: func(c *cobra.Command, args []string) error {
			return newRun(con, c, &f.runFlags, args[0], search.Size).sheets(c.Context(), &f, args[1:])
		},
	}
	fl := c.Flags()
	fl.StringVarP(&f.output, "output", "o", "", "write the sheets to `FILE` (default: beside the input, as NAME"+sheetsSuffix+".pdf)")
	fl.StringVar(&f.title, "title", "", "`TEXT` in the title block (default: the setting project, else the name of the schedule)")
	fl.StringVar(&f.elevations, "elevations", "", "write the elevation of every column line as SVG into `FOLDER` too")
	fl.BoolVar(&f.force, "force", false, "replace an output that no earlier run wrote")
	f.bindReading(c)
	return c
}

// sheets writes the calculation sheets of the members with these marks.
func (r *run) sheets(ctx context.Context, f *sheetsFlags, marks []string) error {
	path, err := r.sheetsPath(f)
	if err != nil {
		return err
	}
	p, err := r.picked(ctx, marks)
	if err != nil {
		return err
	}
	project, err := r.project(f)
	if err != nil {
		return err
	}
	var count [4]int
	var sheets []*working.Sheet
	for _, i := range p.members {
		count[p.lines[i].Result.Status]++
		sheet, err := p.sheet(i)
		if err != nil {
			r.con.fail(err)
			col := &p.lines[i].Member.Column
			why := strings.TrimPrefix(err.Error(), col.Mark+": ") // the list names the member itself
			project.Missing = append(project.Missing, calcsheet.Missing{Column: col, Status: p.lines[i].Result.Status, Why: why})
			continue
		}
		sheets = append(sheets, sheet)
		if err := ctx.Err(); err != nil {
			return err
		}
	}
	stacks := calcsheet.Stacks(sheets, project.Missing, r.plan.Settings.Together.Options)
	elevations, err := elevationFiles(f, stacks)
	if err != nil {
		return err
	}
	if err := outfile.Write(ctx, path, func(w io.Writer) error { return calcsheet.PDF(w, project, sheets, stacks) }); err != nil {
		return err
	}
	if err := writeElevations(ctx, f, elevations, stacks); err != nil {
		return err
	}
	r.con.say("%s: %s", path, plural(len(sheets), "sheet"))
	if f.elevations != "" && len(elevations) == 0 {
		r.con.say("--elevations: none is written, since of the members chosen no two stand on each other in a stack")
	}
	return verdict(&count)
}

// project gathers what stands on the first page and in the title block.
func (r *run) project(f *sheetsFlags) (*calcsheet.Project, error) {
	p := &calcsheet.Project{Title: f.title, File: "standard input", Sheet: r.plan.Sheet, Program: "stanchion " + versionText(),
		Standard: standard, National: r.plan.Settings.Design.National, Paper: r.plan.Settings.Paper}
	if p.Title == "" {
		p.Title = r.plan.Settings.Project
	}
	if r.input != stdio {
		sum, err := fileSum(r.input)
		if err != nil {
			return nil, err
		}
		p.File, p.SHA256 = filepath.Base(r.input), sum
	}
	for _, s := range r.plan.Settings.Used() {
		if s.From != "default" && s.Value != "" && !s.Layout() && !strings.HasPrefix(s.From, "national set") {
			p.Settings = append(p.Settings, [2]string{s.Name, s.Value})
		}
	}
	return p, nil
}

// sheetsPath settles where the sheets go.
func (r *run) sheetsPath(f *sheetsFlags) (string, error) {
	path := f.output
	if path == "" {
		if r.input == stdio {
			return "", usage(r.cmd, "the schedule comes from standard input: name the PDF with -o")
		}
		path = strings.TrimSuffix(r.input, filepath.Ext(r.input)) + sheetsSuffix + ".pdf"
	}
	switch {
	case path == stdio:
		return "", usage(r.cmd, "-o -: sheets do not go to standard output: name a file")
	case !strings.EqualFold(filepath.Ext(path), ".pdf"):
		return "", usage(r.cmd, "-o %s: name a file ending in .pdf", path)
	}
	return path, mayReplace(path, f.force, sheetsEarlier)
}

// sheetsEarlier reports whether an earlier run wrote a PDF: its title tells. It
// stands among the last objects of the file, before the table of their places,
// which is as long as there are objects.
func sheetsEarlier(path string) bool {
	file, err := os.Open(path)
	if err != nil {
		return false
	}
	defer file.Close()
	info, err := file.Stat()
	if err != nil {
		return false
	}
	const near = 8 << 10
	found := tableOfObjects.FindSubmatch(before(file, info.Size(), near))
	if found == nil {
		return false
	}
	table, err := strconv.ParseInt(string(found[1]), 10, 64)
	if err != nil {
		return false
	}
	var title []byte
	for _, u := range utf16.Encode([]rune(calcsheet.PDFTitle)) {
		title = append(title, byte(u>>8), byte(u))
	}
	return bytes.Contains(before(file, min(table, info.Size()), near), title)
}

// tableOfObjects is the end of a PDF, which says where the table of its objects
// stands (ISO 32000-1, 7.5.5).
var tableOfObjects = regexp.MustCompile(`startxref\s+(\d{1,18})\s+%%EOF\s*$`)

// before returns what of a file stands before a place, n bytes at most.
func before(file io.ReaderAt, place, n int64) []byte {
	n = min(n, place)
	data := make([]byte, n)
	if _, err := file.ReadAt(data, place-n); err != nil && err != io.EOF {
		return nil
	}
	return data
}

// elevationFiles names the file of every stack's elevation. What no earlier run
// wrote is not replaced.
func elevationFiles(f *sheetsFlags, stacks []*calcsheet.Stack) ([]string, error) {
	if f.elevations == "" {
		return nil, nil
	}
	var files []string
	taken := map[string]bool{}
	for _, s := range stacks {
		name := fileName(s.Name)
		for n := 2; taken[strings.ToLower(name)]; n++ {
			name = fmt.Sprintf("%s-%d", fileName(s.Name), n)
		}
		taken[strings.ToLower(name)] = true
		path := filepath.Join(f.elevations, name+".svg")
		if err := mayReplace(path, f.force, elevationEarlier); err != nil {
			return nil, fmt.Errorf("--elevations: %s exists, and no earlier run wrote it: name another folder, or give --force to replace it", path)
		}
		files = append(files, path)
	}
	return files, nil
}

// elevationEarlier reports whether an earlier run wrote an elevation.
func elevationEarlier(path string) bool {
	return beginsWith(path, func(line string) bool { return strings.TrimSpace(line) == calcsheet.SVGBegins })
}

// writeElevations writes the elevation of every stack into its file.
func writeElevations(ctx context.Context, f *sheetsFlags, files []string, stacks []*calcsheet.Stack) error {
	if len(files) == 0 {
		return nil
	}
	if err := os.MkdirAll(f.elevations, 0o777); err != nil {
		return fmt.Errorf("--elevations: %w", plainCause(err))
	}
	for i, s := range stacks {
		if err := outfile.Write(ctx, files[i], s.SVG); err != nil {
			return err
		}
	}
	return nil
}

// fileName makes a name of a column line fit for a file.
func fileName(s string) string {
	name := strings.Map(func(r rune) rune {
		if unicode.IsLetter(r) || unicode.IsDigit(r) || r == '-' || r == '_' {
			return r
		}
		return '-'
	}, s)
	if name = strings.Trim(name, "-"); name == "" {
		return "stack"
	}
	return name
}
