package schedule

import (
	"strings"

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

// section, families and grade resolve a name, or take it as it stands where
// nothing resolves it.
func (n *Names) section(name string) (string, error) {
	if n.Section == nil {
		return name, nil
	}
	return n.Section(name)
}

func (n *Names) families(list string) ([]string, error) {
	if n.Family != nil {
		return n.Family(list)
	}
	var families []string
	for _, f := range strings.FieldsFunc(list, func(r rune) bool { return r == ',' || r == ';' || r == '/' || r == '&' || r == '+' }) {
		if f = trim(f); f != "" {
			families = append(families, f)
		}
	}
	return families, nil
}

func (n *Names) grade(name string) (string, error) {
	if n.Grade != nil {
		return n.Grade(name)
	}
	g, err := material.Parse(name)
	return g.Name, err
}
