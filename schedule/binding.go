package schedule

// Binding says which field a column supplies.
type Binding struct {
	Col         int    // 0 is A
	Heading     string // as the user wrote it, rows joined
	Cell        string // where it stands
	Field       string // "N_Ed", "M_y,Ed top"
	Unit        string // as used
	Combination string // named in the heading

	key    key
	unit   unit
	named  bool    // heading or unit row name the unit
	above  *height // force in the part above this height
	rank   int     // 3 mapped by the user, 2 named exactly, 1 suggested
	hidden bool
}

// mapped is the rank of a heading that the user has mapped to a field.
const mapped = 3

// sameAs reports whether two columns supply the same thing.
func (b *Binding) sameAs(o *Binding) bool {
	return b.key == o.key && sameName(b.Combination, o.Combination) && sameHeight(b.above, o.above)
}

func sameHeight(a, b *height) bool {
	if a == nil || b == nil {
		return a == b
	}
	return *a == *b
}

// title returns the field as messages name it: with combination and height.
func (b *Binding) title() string {
	s := b.Field
	if b.above != nil {
		if b.above.fraction {
			s += " above a fraction of the length"
		} else {
			s += " above " + metres(b.above.mm) + " m"
		}
	}
	return join(" ", s, b.Combination)
}
