package revision

import (
	"fmt"
	"slices"
	"strings"
)

// Renaming says that a mark, a grid reference or a level has another name in
// the new issue.
type Renaming struct{ Old, New string }

// ParseRenaming reads OLD=NEW.
func ParseRenaming(s string) (Renaming, error) {
	old, new, ok := strings.Cut(s, "=")
	r := Renaming{strings.TrimSpace(old), strings.TrimSpace(new)}
	if !ok || r.Old == "" || r.New == "" {
		return r, fmt.Errorf("%q is no renaming: give OLD=NEW", s)
	}
	return r, nil
}

// Rename gives the members of the old issue the names of the new one. A name
// that no member has is an error.
func Rename(members []Member, list []Renaming) error {
	used := make([]bool, len(list))
	for i := range members {
		col := &members[i].Column
		for _, name := range []*string{&col.Mark, &col.Stack, &col.From, &col.To} {
			k := slices.IndexFunc(list, func(r Renaming) bool { return fold(r.Old) == fold(*name) })
			if k >= 0 {
				*name, used[k] = list[k].New, true
			}
		}
	}
	if k := slices.Index(used, false); k >= 0 {
		return fmt.Errorf("no mark, grid reference or level of the old issue is %q", list[k].Old)
	}
	return nil
}
