package calcsheet

import "math"

// box is something set in type: marks about an origin on the baseline, and the
// room that they take. All is in em, so that a box serves every size.
type box struct {
	w, up, down float64
	marks       []mark
}

// mark is a piece of text or a rule of a box. y grows upwards.
type mark struct {
	x, y float64
	text string // empty: a rule from x, y to x2, y2
	face face
	size float64 // of the text, em; thickness of the rule
	x2   float64
	y2   float64
}

// rule is the thickness of the rules in formulas, em.
const ruleWidth = 0.05

// textBox sets a text.
func textBox(s string, f face, size float64) box {
	if s == "" {
		return box{}
	}
	return box{w: f.width(s) * size, up: ascent * size, down: descent * size,
		marks: []mark{{text: s, face: f, size: size}}}
}

func gap(w float64) box { return box{w: w} }

// put adds a box at a place, without widening the room to the right.
func (b *box) put(o box, x, y float64) {
	for _, m := range o.marks {
		m.x += x
		m.y += y
		m.x2 += x
		m.y2 += y
		b.marks = append(b.marks, m)
	}
	b.w = math.Max(b.w, x+o.w)
	b.up = math.Max(b.up, y+o.up)
	b.down = math.Max(b.down, o.down-y)
}

// line adds a rule.
func (b *box) line(x, y, x2, y2 float64) {
	b.marks = append(b.marks, mark{x: x, y: y, x2: x2, y2: y2, size: ruleWidth})
}

// row sets boxes side by side.
func row(boxes ...box) box {
	var b box
	x := 0.0
	for _, o := range boxes {
		b.put(o, x, 0)
		x += o.w
	}
	b.w = x
	return b
}

// scaled returns the box at another size.
func (b box) scaled(k float64) box {
	out := box{w: b.w * k, up: b.up * k, down: b.down * k, marks: make([]mark, len(b.marks))}
	for i, m := range b.marks {
		out.marks[i] = mark{x: m.x * k, y: m.y * k, text: m.text, face: m.face, size: m.size * k, x2: m.x2 * k, y2: m.y2 * k}
	}
	return out
}
