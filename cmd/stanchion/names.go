package main

import (
	"stanchion/catalogue"
	"stanchion/design"
)

// national resolves the name of a national set, or of the user's own.
func (r *run) national(name string) (design.National, error) { return nationalSet(name, r.input) }

// stock reads the list of sections that a setting names.
func (r *run) stock(file string) (*catalogue.Catalogue, error) {
	return readStock(findFile(file, r.input))
}

// familyOf names the family of a section as the schedule and the settings take
// it: with the finish of a cold-formed one.
func (r *run) familyOf(section string) string {
	if family, ok := r.families[section]; ok {
		return family
	}
	s, err := r.cat.Find(section, catalogue.FindOptions{})
	if err != nil {
		s, err = catalogue.Default().Find(section, catalogue.FindOptions{}) // given, not in stock
	}
	family := ""
	if err == nil {
		family = s.Family
		if s.Finish == catalogue.ColdFormed {
			family += " CF"
		}
	}
	r.families[section] = family
	return family
}
