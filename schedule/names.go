package schedule

import (
	"slices"
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/design/material"
)

// foldName brings a mark, level or name into the form under which two of them
// are the same: lower case, single spaces.
func foldName(s string) string {
	s = trim(s)
	plain := true
	for i := range len(s) {
		if c := s[i]; c >= 'A' && c <= 'Z' || c >= 0x80 || c == '\t' || c == '\n' || c == ' ' && s[i-1] == ' ' {
			plain = false
			break
		}
	}
	if plain {
		return s
	}
	return strings.ToLower(strings.Join(strings.FieldsFunc(s, isSpace), " "))
}

// sameName reports whether two names are the same for people.
func sameName(a, b string) bool { return a == b || foldName(a) == foldName(b) }

// names resolve the names that stand in cells and settings.
type names struct {
	stock *catalogue.Catalogue // nil: none
	lax   bool                 // a stock list is set and not at hand: it may know what the catalogue does not
	set   *design.Settings
}

// newNames reads the stock list that the settings name.
func newNames(opts *Options, set *Settings) (*names, error) {
	n := &names{set: &set.Design}
	if set.Stock == "" {
		return n, nil
	}
	if opts.Stock == nil {
		n.lax = true
		return n, nil
	}
	stock, err := opts.Stock(set.Stock)
	if err != nil {
		return nil, &Refusal{Problem: Problem{What: err.Error()}}
	}
	n.stock = stock
	return n, nil
}

// section resolves a section's name to the one that reads back whatever the
// settings and families. The families settle a name that fits sections of
// several; empty: those of the settings do.
func (n *names) section(name string, families []string) (string, error) {
	if len(families) == 0 {
		families = n.set.Families
	}
	o := catalogue.FindOptions{ColdFormed: n.set.ColdFormed, Families: families}
	if n.stock != nil {
		if s, err := n.stock.Find(name, o); err == nil {
			return s.FullName(), nil
		}
	}
	s, err := catalogue.Default().Find(name, o)
	if err == nil {
		return s.FullName(), nil
	}
	if n.lax {
		return name, nil
	}
	return "", err
}

// parseFamilies reads one family or several, each under the name that the
// program writes: "UKC", "SHS CF".
func parseFamilies(list string) ([]string, error) {
	specs, err := catalogue.ParseFamilies(list)
	var families []string
	for _, s := range specs {
		name := s.Family
		switch s.Finish {
		case catalogue.HotFinished:
			name += " HF"
		case catalogue.ColdFormed:
			name += " CF"
		}
		families = append(families, name)
	}
	return families, err
}

// sameFamilies writes a list of families so that two lists of the same ones
// are equal.
func sameFamilies(list []string) string {
	list = slices.Clone(list)
	slices.Sort(list)
	return strings.Join(list, ", ")
}

// parseGrade reads one grade.
func parseGrade(name string) (string, error) {
	g, err := material.Parse(name)
	return g.Name, err
}
