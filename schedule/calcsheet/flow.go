package calcsheet

import (
	"slices"
	"strings"

	"stanchion/design/working"
)

// line is one line of a sheet, in em: what stands on it from the left, what
// stands at its right edge, and whether it stays with the next one. Boxes are
// put together when the line is drawn: most lines are set several times before
// their size is settled.
type line struct {
	parts    []placed
	w        float64
	up, down float64
	scale    float64 // of all of it; 0 is 1
	edge     box
	before   float64 // room above
	keep     bool
}

// placed is a box at a place on a line.
type placed struct {
	b *box
	x float64
}

// put adds a box at a place.
func (l *line) put(b *box, x float64) {
	l.parts = append(l.parts, placed{b, x})
	l.w = max(l.w, x+b.w)
	l.up, l.down = max(l.up, b.up), max(l.down, b.down)
}

// body returns what stands on the line as one box.
func (l *line) body() box {
	var b box
	for _, p := range l.parts {
		b.put(*p.b, p.x, 0)
	}
	if b = compact(b); l.scale > 0 {
		b = b.scaled(l.scale)
	}
	return b
}

// ascent and descent are the room above and below the baseline, without the
// edge's own where it is less.
func (l *line) ascent() float64  { return max(l.up, l.edge.up, ascent) }
func (l *line) descent() float64 { return max(l.down, l.edge.down, descent) }

func (l *line) height() float64 { return l.before + l.ascent() + l.descent() }

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

// setStep is a step set in type.
type setStep struct {
	left, clause box
	parts        [][]box // formula, numbers, result, note: each of pieces
	whole        []box   // each part in one piece
	formula      bool    // the first part is the formula with symbols, and one with numbers follows
}

func (s *setter) of(step *working.Step) *setStep {
	if t, ok := s.steps[step]; ok {
		return t
	}
	t := &setStep{left: typeset(step.Left), clause: textBox(step.Clause, upright, 0.85)}
	equals := row(textBox("=", upright, 1), gap(around))
	add := func(whole box, list []box) {
		list[0] = row(equals, list[0])
		t.parts = append(t.parts, list)
		t.whole = append(t.whole, row(equals, whole))
	}
	t.formula = step.Formula != nil && step.Numbers != nil
	if step.Formula != nil {
		add(typeset(step.Formula), pieces(step.Formula))
	}
	if step.Numbers != nil {
		add(typeset(step.Numbers), pieces(step.Numbers))
	}
	if step.Result.Figures != "" {
		result := resultBox(step.Result, step.Unit)
		add(result, []box{result})
	}
	if step.Limit != "" {
		face, word := upright, passes(step.Within)
		if !step.Within {
			face = bold
		}
		t.extend([]box{row(textBox(step.Limit, upright, 1), gap(space), textBox(word, face, 1))})
	}
	if step.Note != "" {
		t.extend(words(note(step.Note), upright))
	}
	s.steps[step] = t
	return t
}

// extend adds a part that is set in its pieces.
func (t *setStep) extend(part []box) {
	t.parts = append(t.parts, part)
	t.whole = append(t.whole, row(part...))
}

// words sets the words of a text, each with the blank behind it.
func words(s string, f face) []box {
	fields := strings.Fields(s)
	list := make([]box, len(fields))
	for i, w := range fields {
		list[i] = textWithSymbols(w, f)
		if i < len(fields)-1 {
			list[i] = row(list[i], gap(space))
		}
	}
	return list
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

// oneLine sets a step on one line, from 0.
func (s *setter) oneLine(step *working.Step) []placed {
	t := s.of(step)
	list := []placed{{&t.left, 0}}
	at := t.left.w + around
	first := 0
	if s.bare && t.formula {
		first = 1
	}
	for i := first; i < len(t.whole); i++ {
		list = append(list, placed{&t.whole[i], at})
		at += t.whole[i].w + around
	}
	return list
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

// filler sets boxes into lines.
type filler struct {
	width, indent float64
	lines         []line
	at            float64
}

// start opens a line.
func (f *filler) start(x float64) {
	f.lines = append(f.lines, line{})
	f.at = x
}

func (f *filler) put(b *box) {
	f.lines[len(f.lines)-1].put(b, f.at)
	f.at += b.w
}

// place puts a box on the line, or on a new one where it finds no room.
func (f *filler) place(b *box) {
	if room := f.width - f.indent; b.w > room {
		small := b.scaled(room / b.w) // one piece too long for a line
		b = &small
	}
	if f.at+b.w > f.width && f.at > f.indent {
		f.start(f.indent)
	}
	f.put(b)
}

// fill sets boxes one after another from x on, further lines from indent on.
func (s *setter) fill(list []box, x, indent float64) []line {
	f := filler{width: s.width, indent: indent}
	f.start(x)
	for i := range list {
		f.place(&list[i])
	}
	return f.lines
}

// step sets a step: its parts on one line as long as they find room, broken
// inside where one alone is too wide.
func (s *setter) step(t *setStep, left float64) []line {
	f := filler{width: s.width, indent: left}
	f.start(0)
	f.put(&t.left)
	f.at = max(left, t.left.w+space)
	first := 0
	if s.bare && t.formula {
		first = 1
	}
	for i := first; i < len(t.whole); i++ {
		whole := &t.whole[i]
		if i > first {
			f.at += around
		}
		if f.at+whole.w <= f.width {
			f.put(whole)
			continue
		}
		if whole.w <= f.width-f.indent {
			f.place(whole)
			continue
		}
		f.place(&t.parts[i][0])
		f.indent = left + 1.2
		for k := range t.parts[i][1:] {
			f.place(&t.parts[i][1+k])
		}
		f.indent = left
	}
	s.atEdge(&f, t.clause)
	return f.lines
}

// tightest is how far a line is made smaller so that its clause stands on it.
const tightest = 0.89

// atEdge puts a clause at the right edge of the last line, or of an earlier
// one that has room, or of a line of its own.
func (s *setter) atEdge(f *filler, clause box) {
	if clause.w == 0 {
		return
	}
	last := &f.lines[len(f.lines)-1]
	if k := (s.width - 0.3 - clause.w) / last.w; k < 1 && k >= tightest {
		last.scale, last.edge = k, clause
		return
	}
	for i := len(f.lines) - 1; i >= 0; i-- {
		if f.lines[i].w+0.5+clause.w <= s.width {
			f.lines[i].edge = clause
			return
		}
	}
	f.lines = append(f.lines, line{edge: clause})
}

// setValue is a given value set in type.
type setValue struct {
	symbol, value, together box
	note                    []box
}

func (s *setter) ofValue(v *working.Value) *setValue {
	if t, ok := s.given[v]; ok {
		return t
	}
	t := &setValue{symbol: typeset(v.Left), value: row(textBox("=", upright, 1), gap(space), resultBox(v.Number, v.Unit))}
	t.together = row(t.symbol, gap(space), t.value)
	if v.Note != "" {
		t.note = words("("+v.Note+")", upright)
	}
	s.given[v] = t
	return t
}

// values sets given values, as many on a line as find room.
func (s *setter) values(list working.Values, left float64) []line {
	f := filler{width: s.width, indent: 0}
	for i := range list {
		t := s.ofValue(&list[i])
		if i == 0 || f.at+1.2+t.together.w > f.width {
			f.start(0)
			f.put(&t.symbol)
			f.at = max(left, t.symbol.w+space)
			f.put(&t.value)
		} else {
			f.at += 1.2
			f.put(&t.together)
		}
		if len(t.note) == 0 {
			continue
		}
		f.at += space
		f.indent = left
		for k := range t.note {
			f.place(&t.note[k])
		}
		f.indent = 0
	}
	return f.lines
}

// cellBox sets a cell of a table.
func cellBox(s string, f face) box { return row(words(s, f)...) }

// tableSize is the size of the type in tables.
const tableSize = 0.92

// table sets a table. Where it is too wide its widest column of texts is
// wrapped.
func (s *setter) table(t *working.Table) []line {
	widths := make([]float64, len(t.Head))
	total := 0.0
	for j := range t.Head {
		widths[j] = cellBox(t.Head[j], bold).w
		for _, r := range t.Rows {
			widths[j] = max(widths[j], cellBox(r[j], upright).w)
		}
		total += widths[j]
	}
	const between = 0.8
	room := s.width/tableSize - between*float64(len(widths)-1)
	if total > room {
		widest := 0
		for j := range widths {
			if !t.Right[j] && widths[j] > widths[widest] {
				widest = j
			}
		}
		widths[widest] = max(4, widths[widest]-(total-room))
	}
	var lines []line
	for i, r := range append([][]string{t.Head}, t.Rows...) {
		f := upright
		if i == 0 {
			f = bold
		}
		lines = append(lines, s.tableRow(r, t.Right, widths, between, f)...)
	}
	return lines
}

func (s *setter) tableRow(row []string, right []bool, widths []float64, between float64, f face) []line {
	var lines []line
	x := 0.0
	for j, cell := range row {
		inner := setter{width: widths[j] + 0.01}
		for k, l := range inner.fill(words(cell, f), 0, 0) {
			if k == len(lines) {
				lines = append(lines, line{scale: tableSize})
			}
			at := x
			if right[j] {
				at += widths[j] - l.w
			}
			for _, p := range l.parts {
				lines[k].put(p.b, at+p.x)
			}
		}
		x += widths[j] + between
	}
	return lines
}

// fitting returns the number of lines that stand in a height, em, with leading
// between them, so that no line is parted from one that it stays with.
func fitting(lines []line, height, leading float64) int {
	n, used := 0, 0.0
	for n < len(lines) {
		h := lines[n].height() + leading
		if n == 0 {
			h -= lines[n].before
		}
		if used+h > height {
			break
		}
		used += h
		n++
	}
	if n == len(lines) {
		return n
	}
	for k := n; k > 0; k-- {
		if !lines[k-1].keep {
			return k
		}
	}
	return n
}
