package schedule

import (
	"fmt"
	"slices"
)

// settle decides which of the columns that name one field supplies it: a
// visible one before a hidden one, a mapped one before one that names the
// field exactly, that before one that suggests it. The others are left alone.
func (l *layout) settle() {
	l.leave(func(b, o *Binding) string {
		if b.hidden && !o.hidden && b.key == o.key {
			return "it is hidden"
		}
		return ""
	})
	l.leave(func(b, o *Binding) string {
		if o.rank > b.rank && b.key == o.key {
			if o.rank == mapped {
				return "the mapping gives another"
			}
			return "another names the field exactly"
		}
		return ""
	})
	l.leave(func(b, o *Binding) string {
		level := b.key.field == levelField && (o.key.field == fromField || o.key.field == toField)
		whole := b.key.field == endsField && o.key.field == endsField && b.key.axis == o.key.axis && b.key.end == noEnd && o.key.end != noEnd
		if level || whole {
			return "others say it in full"
		}
		return ""
	})
	l.settleAxes()
	l.clash()
}

// leave takes out the bindings that another one beats. A column that supplies
// nothing more is named among those left alone.
func (l *layout) leave(beaten func(b, o *Binding) string) {
	kept := l.bindings[:0:0]
	var out []Seen
	var cols []int
	for i := range l.bindings {
		b := &l.bindings[i]
		why := ""
		for j := range l.bindings {
			if o := &l.bindings[j]; o.Col != b.Col && why == "" {
				if reason := beaten(b, o); reason != "" {
					why = fmt.Sprintf("%s: %s is read from %s (%q)", reason, b.Field, o.Cell, o.Heading)
				}
			}
		}
		if why == "" {
			kept = append(kept, *b)
			continue
		}
		out = append(out, Seen{Cell: b.Cell, Heading: b.Heading, Why: why})
		cols = append(cols, b.Col)
	}
	l.bindings = kept
	for i, s := range out {
		supplies := slices.ContainsFunc(kept, func(b Binding) bool { return b.Col == cols[i] })
		repeated := i > 0 && cols[i-1] == cols[i]
		if !supplies && !repeated {
			l.left = append(l.left, s)
		}
	}
}

// settleAxes keeps x-x headings from being read in either notation. Beside
// y-y and z-z of the same kind they are torsion, which nothing here asks for;
// beside y-y alone the notation is in doubt, and y-y with it.
func (l *layout) settleAxes() {
	kept := l.troubles[:0:0]
	for _, p := range l.troubles {
		m := readHeading(p.Heading)
		if len(m.keys) > 0 && m.keys[0].axis == xAxis && l.hasAxes(m.keys[0].field) {
			l.left = append(l.left, Seen{Cell: p.Cell, Heading: p.Heading, Why: "x-x is the member's own axis here"})
			continue
		}
		kept = append(kept, p)
	}
	l.troubles = kept
}

func (l *layout) hasAxes(f fieldName) bool {
	y, z := false, false
	for i := range l.bindings {
		if k := l.bindings[i].key; k.field == f {
			y, z = y || k.axis == yAxis, z || k.axis == zAxis
		}
	}
	return y && z
}

// clash gathers the columns that supply the same with the same right.
func (l *layout) clash() {
	done := make([]bool, len(l.bindings))
	for i := range l.bindings {
		group := []Binding{l.bindings[i]}
		for j := i + 1; j < len(l.bindings); j++ {
			if !done[i] && !done[j] && l.bindings[i].sameAs(&l.bindings[j]) {
				group, done[j] = append(group, l.bindings[j]), true
			}
		}
		if len(group) > 1 {
			l.clashes = append(l.clashes, group)
		}
	}
}
