package main

import (
	"context"
	"errors"
	"fmt"
	"io"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/catalogue"
)

// sectionsFlags say which sections to show, and how.
type sectionsFlags struct {
	families                      []string
	depth, width, thickness, mass string
	set                           []string
	format, output                string
	force, quiet                  bool
}

func sectionsCommand(con *console) *cobra.Command {
	var f sectionsFlags
	c := &cobra.Command{
		Use:   "sections [WORD]...",
		Short: "list and search the sections that the program knows",
		Long: "Lists sections in the order in which they are tried: by mass, depth and width. WORD is a\n" +
			"family or a part of a name, or the whole name in any of the trade's spellings. With three\n" +
			"sections or fewer, every property is shown.\n\n" +
			"A range is written LEAST..GREATEST; either may be left out: 200..260, ..260, 200.. or 200.\n" +
			"Depth, width and thickness (flange or wall) are in mm, mass is in kg/m.",
		Example: `  stanchion sections UKC --depth ..260 --mass 40..90
  stanchion sections "HE 200 A"
  stanchion sections --family "SHS CF" --width 100..150 --thickness 5..
  stanchion sections UKC UKB -o columns.csv`,
		RunE: func(c *cobra.Command, args []string) error {
			con.quiet = f.quiet
			return runSections(c.Context(), con, c, &f, args)
		},
	}
	c.Long += "\n\n" + plainStatuses
	fl := c.Flags()
	fl.StringArrayVar(&f.families, "family", nil, "show this `FAMILY` (UKC, HE, \"SHS CF\", ...); may be repeated")
	fl.StringVar(&f.depth, "depth", "", "overall depth in this `RANGE`, mm")
	fl.StringVar(&f.width, "width", "", "width in this `RANGE`, mm")
	fl.StringVar(&f.thickness, "thickness", "", "flange or wall thickness in this `RANGE`, mm")
	fl.StringVar(&f.mass, "mass", "", "mass in this `RANGE`, kg/m")
	fl.StringArrayVar(&f.set, "set", nil, "stock=`FILE`: show the sections of a stock list")
	fl.StringVar(&f.format, "format", "table", "`FORM` of the list: table, csv or json (lines)")
	fl.StringVarP(&f.output, "output", "o", "", "write the list to `FILE` (.csv, .json or .txt says its form)")
	fl.BoolVar(&f.force, "force", false, "replace the output file if it exists")
	fl.BoolVarP(&f.quiet, "quiet", "q", false, "say errors alone")
	return c
}

func runSections(ctx context.Context, con *console, c *cobra.Command, f *sectionsFlags, words []string) error {
	cat, err := sectionsSource(c, f.set)
	if err != nil {
		return err
	}
	list, err := f.search(c, cat, words)
	if err != nil {
		return err
	}
	write, err := f.writer(c)
	if err != nil {
		return err
	}
	emit := func(w io.Writer) error { return write(w, list) }
	if f.output == "" || f.output == stdio {
		return emit(con.out)
	}
	if err := writeNewFile(ctx, f.output, f.force, emit); err != nil {
		return err
	}
	con.say("%d sections: %s", len(list), f.output)
	return nil
}

// sectionsSource returns the whole catalogue or the stock list that a setting
// names.
func sectionsSource(c *cobra.Command, set []string) (*catalogue.Catalogue, error) {
	cat := catalogue.Default()
	for _, s := range set {
		name, file, ok := strings.Cut(s, "=")
		if !ok || strings.TrimSpace(strings.ToLower(name)) != "stock" {
			return nil, usage(c, "--set %s: the setting that this command takes is stock=FILE", s)
		}
		stock, err := readStock(strings.TrimSpace(file))
		if err != nil {
			return nil, err
		}
		cat = stock
	}
	return cat, nil
}

// search returns the sections that the flags and words ask for, in order.
func (f *sectionsFlags) search(c *cobra.Command, cat *catalogue.Catalogue, words []string) ([]*catalogue.Section, error) {
	families := slices.Clone(f.families)
	var parts []string
	for _, w := range words {
		if _, err := catalogue.ParseFamilies(w); err == nil {
			families = append(families, w)
		} else {
			parts = append(parts, compactName(w))
		}
	}
	filter, mass, err := f.filter(c, families)
	if err != nil {
		return nil, err
	}
	list, err := bothFinishes(cat, filter)
	if err != nil {
		return nil, err
	}
	list = slices.DeleteFunc(list, func(s *catalogue.Section) bool {
		return !mass.holds(s.Mass) || !holdsAll(compactName(s.Name()), parts)
	})
	if len(list) > 0 {
		return list, nil
	}
	return f.noneFound(cat, words, parts)
}

// noneFound reads the words as the whole name of a section, in a spelling that
// no part of its name has; the error names the nearest. Where names hold the
// parts, it is the ranges and families that leave none.
func (f *sectionsFlags) noneFound(cat *catalogue.Catalogue, words, parts []string) ([]*catalogue.Section, error) {
	name := strings.Join(words, " ")
	narrowed := len(parts) == 0 || f.depth+f.width+f.thickness+f.mass != "" || len(f.families) > 0
	if narrowed && slices.ContainsFunc(cat.Sections(), func(s *catalogue.Section) bool { return holdsAll(compactName(s.Name()), parts) }) {
		return nil, fmt.Errorf("no section is like that: widen a range, or leave a family out")
	}
	s, err := cat.Find(name, catalogue.FindOptions{})
	var unknown *catalogue.UnknownSectionError
	if errors.As(err, &unknown) && unknown.Reason == "" && len(unknown.Nearest) == 0 {
		return nil, fmt.Errorf("%q is in no section's name: give a part of one (203x203), or a family: %s", name, strings.Join(catalogue.FamilyNames(), ", "))
	}
	if err != nil {
		return nil, err
	}
	return []*catalogue.Section{s}, nil
}

// filter turns the flags into the catalogue's filter, and the range of mass.
func (f *sectionsFlags) filter(c *cobra.Command, families []string) (catalogue.Filter, span, error) {
	filter := catalogue.Filter{Families: families}
	var mass span
	for _, r := range []struct {
		flag, text  string
		least, most *float64
	}{
		{"depth", f.depth, &filter.MinDepth, &filter.MaxDepth},
		{"width", f.width, &filter.MinWidth, &filter.MaxWidth},
		{"thickness", f.thickness, &filter.MinThickness, &filter.MaxThickness},
		{"mass", f.mass, &mass.least, &mass.most},
	} {
		s, err := parseSpan(r.text)
		if err != nil {
			return filter, mass, usage(c, "--%s %s: %v", r.flag, r.text, err)
		}
		*r.least, *r.most = s.least, s.most
	}
	return filter, mass, nil
}

// bothFinishes filters with hollow sections of either finish, unless a family
// says which.
func bothFinishes(cat *catalogue.Catalogue, filter catalogue.Filter) ([]*catalogue.Section, error) {
	hot, err := cat.Filter(filter)
	if err != nil {
		return nil, err
	}
	filter.ColdFormed = true
	cold, err := cat.Filter(filter)
	if err != nil {
		return nil, err
	}
	list := slices.Concat(hot, cold)
	slices.SortFunc(list, catalogue.Compare)
	return slices.Compact(list), nil
}

// compactName folds a name, or a part of one, so that spaces, case and the
// multiplication sign make no difference.
func compactName(s string) string {
	return strings.NewReplacer(" ", "", "×", "X", "*", "X", "-", "").Replace(strings.ToUpper(s))
}

func holdsAll(name string, parts []string) bool {
	for _, p := range parts {
		if !strings.Contains(name, p) {
			return false
		}
	}
	return true
}
