package main

import (
	"strings"

	"stanchion/catalogue"
	"stanchion/design"
	"stanchion/schedule/takeoff"
)

// national resolves the name of a national set, or of the user's own.
func (r *run) national(name string) (design.National, error) { return nationalSet(name, r.input) }

// stock reads the list of sections that a setting names.
func (r *run) stock(file string) (*catalogue.Catalogue, error) {
	return readStock(findFile(file, r.input))
}

// section returns the section of a result. One that was given need not be in
// stock, and one of the steel at hand need not be in any catalogue.
func (r *run) section(name string) (*catalogue.Section, error) {
	s, err := r.cat.Find(name, catalogue.FindOptions{})
	if err != nil && r.atHand != nil {
		s, err = r.atHand.Find(name, catalogue.FindOptions{})
	}
	if err != nil {
		s, err = catalogue.Default().Find(name, catalogue.FindOptions{})
	}
	return s, err
}

// familyOf names the family of a result's section as the schedule and the
// settings take it: with the finish of a cold-formed one.
func (r *run) familyOf(section string) string {
	family, ok := r.families[section]
	if !ok {
		if s, err := r.section(section); err == nil {
			family = takeoff.FamilyName(s)
		}
		r.families[section] = family
	}
	return family
}

// asTyped returns a name as it can be typed into a command.
func asTyped(name string) string {
	if strings.ContainsAny(name, " \t&()[]{};,'`$!#*?<>|~") {
		return `"` + name + `"`
	}
	return name
}
