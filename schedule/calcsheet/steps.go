package calcsheet

import (
	"stanchion/design/working"
)

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
