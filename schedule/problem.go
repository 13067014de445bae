package schedule

import (
	"fmt"
	"strings"
)

// Problem is one thing that a schedule holds and that cannot be read. It says
// where it stands, what was found and what to do.
type Problem struct {
	File    string // as given by the user
	Cell    string // "Columns!F12", "line 12, column 6"; empty for the file as a whole
	Row     int    // from 1; 0 for the file as a whole
	Col     int    // from 0; -1 for the row as a whole
	Heading string // as the user wrote it; empty where the column has none
	Value   string // as the user wrote it; empty where nothing stands there
	What    string // what was found: `N_Ed is "tbc"`
	Do      string // what to do: `give a number in kN, or clear the row`
}

// Error returns the problem as one line:
// `loads.xlsx, Columns!F12: N_Ed is "tbc": give a number in kN, or clear the row`.
func (p *Problem) Error() string {
	where := join(", ", p.File, p.Cell)
	return join(": ", where, p.Message())
}

// Message returns what was found and what to do, without the place.
func (p *Problem) Message() string { return join(": ", p.What, p.Do) }

// Refusal is an error that stops the run before anything is written: no
// header, two headers for one field, a sign convention in doubt, no members.
// The command ends with status 3.
type Refusal struct {
	Problem
	Seen []Problem // what was found, one entry a place
}

// Error returns the problem and, on lines of their own, what was found.
func (r *Refusal) Error() string {
	var b strings.Builder
	b.WriteString(r.Problem.Error())
	for i := range r.Seen {
		if i == maxSeen {
			fmt.Fprintf(&b, "\n  and %d more", len(r.Seen)-maxSeen)
			break
		}
		s := &r.Seen[i]
		fmt.Fprintf(&b, "\n  %s", join(": ", s.Cell, s.Message()))
	}
	return b.String()
}

// maxSeen is how many finds a message lists.
const maxSeen = 40

// join joins the parts that are not empty.
func join(sep string, parts ...string) string {
	kept := parts[:0:0]
	for _, p := range parts {
		if p != "" {
			kept = append(kept, p)
		}
	}
	return strings.Join(kept, sep)
}
