package calcsheet

import (
	"slices"

	"stanchion/design/working"
)

// setter turns blocks into lines of a width, em. What it sets once it
// remembers for other widths.
type setter struct {
	width float64
	bare  bool // numbers alone, where there are any
	steps map[*working.Step]*setStep
	given map[*working.Value]*setValue

	checks *working.Block // the table of checks, made once
}

func newSetter() *setter {
	return &setter{steps: map[*working.Step]*setStep{}, given: map[*working.Value]*setValue{}}
}

// block sets a block: its title and its items.
func (s *setter) block(b *working.Block) []line {
	title := textBox(b.Title, bold, 1.05)
	lines := []line{{before: 0.55, keep: true}}
	lines[0].put(&title, 0)
	left := s.leftWidth(b)
	for i, item := range b.Items {
		var set []line
		switch item := item.(type) {
		case working.Values:
			set = s.values(item, left)
			if s.bare && i > 0 && len(set) == 1 && s.runOn(&lines[len(lines)-1], b.Items[i-1], s.values(item, 0)[0].parts, box{}) {
				continue
			}
		case *working.Step:
			if i > 0 && (s.bare || item.Formula == nil) && s.runOn(&lines[len(lines)-1], b.Items[i-1], s.oneLine(item), s.of(item).clause) {
				continue
			}
			set = s.step(s.of(item), left)
		case working.Table:
			set = s.table(&item)
		case working.Words:
			set = s.fill(words(string(item), upright), 0, 0)
		}
		for i := range set {
			set[i].keep = i < len(set)-1
		}
		lines = append(lines, set...)
	}
	return lines
}

// runOn adds what would stand on a line of its own to the line before it, where
// both find room there, and reports whether they do: a ratio behind the force
// in it, and where a sheet is full whatever is short enough.
func (s *setter) runOn(last *line, before working.Item, parts []placed, clause box) bool {
	const between = 1.5
	if _, table := before.(working.Table); table || last.scale > 0 {
		return false
	}
	if _, words := before.(working.Words); words || !s.bare && last.edge.w > 0 {
		return false
	}
	from := parts[0].x
	w := 0.0
	for _, p := range parts {
		w = max(w, p.x-from+p.b.w)
	}
	at := last.w + between
	if last.edge.w > 0 {
		at += 0.5 + last.edge.w
	}
	room := s.width
	if clause.w > 0 {
		room -= 0.5 + clause.w
	}
	if at+w > room {
		return false
	}
	last.parts = slices.Clone(last.parts)
	if last.edge.w > 0 {
		edge := last.edge
		last.put(&edge, last.w+0.5)
		at = last.w + between
	}
	for _, p := range parts {
		last.put(p.b, at+p.x-from)
	}
	last.edge = clause
	return true
}

// leftWidth is where the signs = of a block stand: behind its widest left
// side, unless that is too wide.
func (s *setter) leftWidth(b *working.Block) float64 {
	width, limit := 0.0, 0.22*s.width
	for _, item := range b.Items {
		w := 0.0
		switch item := item.(type) {
		case working.Values:
			w = s.ofValue(&item[0]).symbol.w
		case *working.Step:
			if item.Formula != nil { // a ratio has its sign behind it
				w = s.of(item).left.w
			}
		}
		if w <= limit {
			width = max(width, w)
		}
	}
	return width + space
}
