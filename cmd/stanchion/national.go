package main

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"

	"github.com/spf13/cobra"

	"stanchion/design"
	"stanchion/design/ec3"
)

func nationalCommand(con *console) *cobra.Command {
	return &cobra.Command{
		Use:   "national [SET]...",
		Short: "show the national sets, each value with where it comes from",
		Long: "Shows the nationally determined parameters of the built-in sets or of your own.\n\n" +
			"A set of your own is a CSV of name, value and, where you like, source. Its first line may be\n" +
			"`base,UK` to name the set that it starts from (EN where none is named). Give the file's name\n" +
			"in place of a set's: --set national=ours.csv.\n\n" + plainStatuses,
		Example: "  stanchion national UK\n  stanchion national",
		RunE: func(_ *cobra.Command, args []string) error {
			sets := ec3.NationalSets()
			if len(args) > 0 {
				sets = nil
			}
			for _, name := range args {
				n, err := nationalSet(name, stdio)
				if err != nil {
					return err
				}
				sets = append(sets, n)
			}
			showNational(con.out, sets)
			return nil
		},
	}
}

func showNational(w io.Writer, sets []design.National) {
	for i := range sets {
		if i > 0 {
			fmt.Fprintln(w)
		}
		fmt.Fprintln(w, sets[i].Name)
		t := newTable("", "", "")
		for _, v := range ec3.NationalValues(&sets[i]) {
			t.add("  "+v.Name, v.Value, v.Source)
		}
		for _, line := range t.lines()[1:] {
			fmt.Fprintln(w, line)
		}
	}
}

// nationalSet returns the built-in set of a name, or the user's own where the
// name is that of a file. schedule is the file that names it, for the folder.
func nationalSet(name, schedule string) (design.National, error) {
	n, err := ec3.NationalSet(name)
	if err == nil || !strings.EqualFold(filepath.Ext(strings.TrimSpace(name)), ".csv") {
		return n, err
	}
	return readNational(findFile(strings.TrimSpace(name), schedule))
}

// readNational reads a national set of the user's own.
func readNational(path string) (design.National, error) {
	var none design.National
	f, err := os.Open(path)
	if err != nil {
		return none, fmt.Errorf("national set %s: %w", path, plainCause(err))
	}
	defer f.Close()
	r := csv.NewReader(f)
	r.FieldsPerRecord = -1
	r.TrimLeadingSpace = true
	n, err := ec3.NationalSet("EN")
	if err != nil {
		return none, err
	}
	begun := false
	for {
		rec, err := r.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return none, fmt.Errorf("%s: %w", path, err)
		}
		if err := applyNationalLine(&n, rec, &begun); err != nil {
			line, _ := r.FieldPos(0)
			return none, fmt.Errorf("%s, line %d: %w", path, line, err)
		}
	}
	n.Name = path
	return n, nil
}

// applyNationalLine applies one line of a user's set; begun tells that a value
// was applied before.
func applyNationalLine(n *design.National, rec []string, begun *bool) error {
	for i := range rec {
		rec[i] = strings.TrimSpace(strings.TrimPrefix(rec[i], "\ufeff"))
	}
	if len(rec) < 2 {
		return errors.New("a line needs a name and a value")
	}
	name, value := rec[0], rec[1]
	switch strings.ToLower(name) {
	case "name", "parameter":
		return nil // a heading
	case "base":
		if *begun {
			return errors.New("the set that it starts from must stand before the values")
		}
		base, err := ec3.NationalSet(value)
		*n = base
		return err
	}
	*begun = true
	source := "the user's own set"
	if len(rec) > 2 && rec[2] != "" {
		source = rec[2]
	}
	return ec3.SetNational(n, name, value, source)
}
