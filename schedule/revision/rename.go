package revision

import (
	"fmt"
	"strings"

	"stanchion/design"
)

// Renaming says that a mark, a grid reference or a level has another name in
// the new issue, or that a member has, all its names said.
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

// Rename gives the members of the old issue the names of the new one. A
// renaming is of a mark, grid reference or level wherever it stands or, if none
// is called so, of the one member with that Name. Names that no member has are
// errors.
func Rename(old, new []Member, list []Renaming) error {
	n := namesOf(new)
	before := namesOf(old)
	parts := map[string]string{}
	members := map[string]*design.Column{}
	for _, r := range list {
		a, b := design.FoldName(r.Old), design.FoldName(r.New)
		switch {
		case before.parts[a] && n.parts[b]:
			parts[a] = r.New
		case before.members[a] != nil && n.members[b] != nil:
			members[a] = n.members[b]
		case !before.parts[a] && before.members[a] == nil:
			return fmt.Errorf("no mark, grid reference or level of the old issue is %q, and no member by all its names", r.Old)
		case !n.parts[b] && n.members[b] == nil:
			return fmt.Errorf("no mark, grid reference or level of the new issue is %q, and no member by all its names", r.New)
		default:
			return fmt.Errorf("%q and %q are not of one kind: give two marks, grid references or levels, or two members by all their names", r.Old, r.New)
		}
	}
	for i := range old {
		col := &old[i].Column
		if to := members[design.FoldName(old[i].Name())]; to != nil {
			col.Mark, col.Stack, col.From, col.To = to.Mark, to.Stack, to.From, to.To
			continue
		}
		for _, name := range []*string{&col.Mark, &col.Stack, &col.From, &col.To} {
			if to, ok := parts[design.FoldName(*name)]; ok {
				*name = to
			}
		}
	}
	return nil
}

// names are those that an issue has, folded.
type names struct {
	parts   map[string]bool           // marks, grid references, levels
	members map[string]*design.Column // by all names
}

func namesOf(members []Member) names {
	n := names{map[string]bool{}, map[string]*design.Column{}}
	for i := range members {
		col := &members[i].Column
		for _, name := range []string{col.Mark, col.Stack, col.From, col.To} {
			n.parts[design.FoldName(name)] = true
		}
		n.members[design.FoldName(members[i].Name())] = col
	}
	return n
}
